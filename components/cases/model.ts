import type { Family } from "@/components/ui/family";
import type { StageId } from "@/components/ui/nav-model";

export interface CaseRowView {
  id: string;
  number: string;
  href: string;
  vehicle: string;
  plate: string | null;
  customer: string;
  /** In the customer's words. */
  complaint: string;
  /** The leading cause and what is known of it: "74 %", "proven", "suspected". */
  cause: { family: Family; label: string; note: string } | null;
  stage: StageId;
  /** On hold; `stage` is then where it came from. */
  held: boolean;
  /** "Testing", "On hold, repair", "Left unrepaired". */
  stageWords: string;
  /** "2 h 26". */
  since: string;
  technician: string | null;
  /** "16:30", "Late since 12:00". */
  promise: { words: string; isLate: boolean } | null;
}

export interface CaseGroupView {
  id: string;
  /** Whom these cases wait on: "You, Bram", "The customer". */
  title: string;
  /** "4 cases, oldest 2 h 40 min". */
  note: string;
  rows: readonly CaseRowView[];
}
