import type { Band } from "@/components/ui/band-scale";
import type { Family } from "@/components/ui/family";
import type { Mode } from "@/lib/diagnosis/vocabulary";
import type { ParameterId } from "@/lib/obd/parameters";

/** One lane of the timeline. All lanes share the time axis; points are `stepS` apart, null where nothing was logged. */
export interface LaneView {
  id: string;
  label: string;
  unit: string;
  /** Ends of the lane's scale. */
  min: number;
  max: number;
  decimals: number;
  signed?: boolean;
  band: Band | null;
  /** Families of a value below and above the band. */
  family: { low: Family | null; high: Family | null };
  traces: readonly { points: readonly (number | null)[]; isDashed?: boolean }[];
}

export interface SegmentView {
  mode: Mode;
  fromS: number;
  toS: number;
}

export interface LogView {
  spanS: number;
  stepS: number;
  lanes: readonly LaneView[];
  segments: readonly SegmentView[];
}

export interface TrimCellView {
  bank: 1 | 2;
  short: number | null;
  long: number | null;
  /** Why there is none: "fuel cut", "open loop". */
  why?: string;
}

export interface TrimRowView {
  mode: Mode;
  banks: readonly TrimCellView[];
}

export interface ModeMeansView {
  mode: Mode;
  seconds: number;
  values: readonly { text: string; family: Family | null }[];
  isKept: boolean;
  mayKeep: boolean;
}

export interface ColumnView {
  header: string;
  parameter: ParameterId | null;
  unit: string | null;
  read: number;
  missing: number;
  refused: number;
}

export type LogResult = { ok: true } | { ok: false; message: string };
