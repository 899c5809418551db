import type { Band } from "@/components/ui/band-scale";
import type { Family } from "@/components/ui/family";
import type { ProofVerdict } from "@/lib/diagnosis/proof";
import type { Mode } from "@/lib/diagnosis/vocabulary";

export type { ProofVerdict } from "@/lib/diagnosis/proof";

export interface ProofPairView {
  id: string;
  label: string;
  unit: string;
  before: number | null;
  after: number | null;
  band: Band;
  /** The family of the value before, when it was outside. */
  family: Family | null;
  decimals: number;
  signed: boolean;
  verdict: ProofVerdict;
}

export interface ProofModeView {
  mode: Mode;
  title: string;
  /** "780 and 760 r/min, coolant 91 and 90 °C". */
  note?: string;
  /** The figure that tells most: total trim, where there is one. */
  figure: { before: string; after: string; unit: string } | null;
  verdict: ProofVerdict;
  /** The rule in one sentence with the numbers it used. */
  rule: string;
  rows: readonly ProofPairView[];
}

export interface ProofTestView {
  id: string;
  title: string;
  before: string;
  after: string | null;
  verdict: ProofVerdict;
  rule: string;
}
