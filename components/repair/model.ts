import type { Family } from "@/components/ui/family";
import type { OLD_PART_FATES, PART_STATES } from "@/lib/cases/work-schema";

export type OldPartFate = (typeof OLD_PART_FATES)[number];
export type PartState = (typeof PART_STATES)[number];

/** One record of a part: ordered, arrived or fitted. */
export interface PartRecordView {
  id: string;
  quantityMilli: number;
  status: PartState;
  oldPart: OldPartFate;
  /** "due Thursday", "arrived 14:45". */
  note?: string;
}

/** A part of the job as agreed, with what was recorded of it. */
export interface WorkPartView {
  lineId: string;
  description: string;
  partNumber: string | null;
  condition: string | null;
  agreedMilli: number;
  /** Whether an old part comes off at all (a cleaner has none). */
  hasOldPart: boolean;
  records: readonly PartRecordView[];
}

export interface WorkJobView {
  id: string;
  title: string;
  cause: { family: Family; words: string } | null;
  /** "0.3 h sold, one hose. Best done before the manifold goes back." */
  note?: string;
  soldMinutes: number;
  /** Minutes of ended entries. */
  workedMinutes: number;
  /** Clocks that run now. */
  running: readonly { personName: string; isMe: boolean; since: string }[];
  state: "approved" | "done" | "struck";
  /** What was done, or why it was struck, and by whom. */
  outcome?: string;
  parts: readonly WorkPartView[];
  notes: readonly { id: string; text: string; words: string }[];
  photos: readonly { id: string; src: string; alt: string }[];
}

export type WorkResult = { ok: true; kept?: boolean } | { ok: false; message: string };

export interface UsePart {
  workJobId: string;
  lineId: string;
  description: string;
  quantityMilli: number;
  condition: string | null;
  oldPart: OldPartFate;
  status: PartState;
  arrivesOn?: string;
}
