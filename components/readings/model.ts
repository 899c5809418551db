import type { Family } from "@/components/ui/family";
import type { UnitPrefs } from "@/components/ui/units";
import type { BandRow } from "@/lib/diagnosis/bands";
import type { CaseFile, CaseVehicle, Values } from "@/lib/diagnosis/case-file";
import type { CodeStatus, Mode, Phase } from "@/lib/diagnosis/vocabulary";
import type { ParameterId } from "@/lib/obd/parameters";

/** One column of the sheet. Values are in the units of the parameter table. */
export interface SampleView {
  id: string;
  mode: Mode;
  phase: Phase;
  /** "warm", "from log, 42 s". */
  how: string | null;
  takenAt: string;
  takenBy: string;
  values: Values;
  /** Taken before the customer had agreed to diagnosis. */
  beforeConsent?: boolean;
}

/** One cell: what the writer saw and what it is to become; null clears it. */
export interface CellChange {
  parameter: string;
  was: unknown;
  now: unknown;
}

export type SaveReadingsResult =
  | { ok: true /** Kept on this device until the network is back. */; kept?: boolean }
  | {
      ok: false;
      message: string;
      conflict?: { by: string; cells: { parameter: string; yours: unknown; theirs: unknown }[] };
    };

export type SaveReadings = (sampleId: string, changes: CellChange[]) => Promise<SaveReadingsResult>;

/** How readings of this case are judged and shown. */
export interface SheetContext {
  vehicle: CaseVehicle;
  site?: CaseFile["site"];
  bands?: readonly BandRow[];
  units: UnitPrefs;
  timeZone: string;
  locale?: string;
}

export interface FindingView {
  id: string;
  family: Family | null;
  /** The finding in a few words, set strong, and the rest of the sentence. */
  lead: string;
  rest?: string;
}

export interface CodeView {
  id: string;
  code: string;
  title: string;
  status: CodeStatus;
  phase: Phase;
  /** The freeze frame in words, and whether it agrees with a sample. */
  note?: string;
}

export type AddSample = (input: {
  mode: Mode;
  phase: Phase;
  how?: string;
}) => Promise<{ ok: true; sampleId: string } | { ok: false; message: string }>;

export type { CaseVehicle, Mode, ParameterId, Phase, Values };
