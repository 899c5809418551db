import type { Family } from "@/components/ui/family";

export interface EvidenceView {
  /** Id of the finding. */
  id: string;
  statement: string;
  /** Where it was read: "Idling: short and long trim". */
  source: string;
  /** Bits: above zero speaks for the cause. */
  weight: number;
}

export interface MarkView {
  id: string;
  kind: "proven" | "suspected";
  by: string;
  /** "13:41". */
  when: string;
  reason: string;
}

export interface LedgerCauseView {
  id: string;
  title: string;
  family: Family;
  /** 0 … 1. */
  probability: number;
  /** log₂ of the prior; never above zero. */
  priorBits: number;
  evidence: readonly EvidenceView[];
  /** Findings it does not account for, in a sentence each; null when not worked out for this cause. */
  unexplained: readonly string[] | null;
  /** "Bank 1, cylinder 3". */
  where: string | null;
  mark: MarkView | null;
  /** Recorded tests that prove it. Without one it can only be suspected. */
  provenBy: readonly { id: string; label: string }[];
}

export interface LedgerView {
  /** Likeliest first. */
  causes: readonly LedgerCauseView[];
  /** The causes not shown one by one. */
  rest: { count: number; probability: number };
}

export interface OutcomeView {
  id: string;
  /** "trim recovers". */
  label: string;
  /** Who would lead then. */
  leader: { title: string; probability: number } | null;
}

export interface NextTestView {
  id: string;
  title: string;
  minutes: number;
  bits: number;
  /** Two or three; more are offered in the dialog. */
  outcomes: readonly OutcomeView[];
  cautions: readonly string[];
  tools?: string;
  /** "Needs 20 min; 12 min of what was agreed are left." */
  overCeiling?: string;
}

export interface TestChoice {
  id: string;
  title: string;
  minutes: number;
  outcomes: readonly { id: string; label: string }[];
  cautions: readonly string[];
}

export interface RecordedTestView {
  id: string;
  title: string;
  outcome: string;
  when: string;
  by: string;
  note?: string;
}

export interface RecordOutcome {
  testId: string;
  outcome: string;
  cylinder?: number;
  bank?: number;
  note?: string;
}

export type ActResult = { ok: true; kept?: boolean } | { ok: false; message: string };
