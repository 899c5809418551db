import type { Band } from "@/components/ui/band-scale";
import type { Family } from "@/components/ui/family";

export interface VehicleRowView {
  id: string;
  href: string;
  label: string;
  plate: string | null;
  vin: string | null;
  customer: string;
  engine: string;
  visits: number;
  lastVisit: string | null;
}

/** What a VIN's check says: it fits, it warns, or it is not a VIN. */
export interface VinView {
  text: string;
  state: "fits" | "warns" | "fails";
  words: string;
}

/** One reading of one visit, ready to draw. */
export interface ReadingOverTime {
  text: string;
  value: number;
  band: Band | null;
  family: Family | null;
  isImpossible: boolean;
}

export interface VisitReadings {
  id: string;
  number: string;
  href: string;
  on: string;
  /** "as found", "after the repair". */
  phase: string;
  odometer: string;
  /** By the id of the column; null where it was not taken. */
  cells: readonly (ReadingOverTime | null)[];
}

export interface ReadingColumn {
  id: string;
  label: string;
  unit: string;
  decimals: number;
}
