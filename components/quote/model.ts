import type { Family } from "@/components/ui/family";
import type { LineKind, QuoteLineDraft, Urgency } from "@/lib/cases/quote-schema";

export type { LineKind, QuoteLineDraft, Urgency } from "@/lib/cases/quote-schema";

/** A job of the draft. Lines are as they are edited: thousandths and minor units. */
export interface QuoteJobView {
  id: string;
  version: number;
  title: string;
  customerTitle: string;
  urgency: Urgency;
  ifWaits: string;
  causeId: string | null;
  dependsOnId: string | null;
  isSafety: boolean;
  lines: QuoteLineDraft[];
}

export interface CauseChoice {
  id: string;
  title: string;
  family: Family;
  /** "proven by the smoke test, 13:41". */
  note: string;
}

export interface RateChoice {
  id: string;
  name: string;
  perHourMinor: number;
}

/** A part or operation of the price list, as a line would take it. */
export interface CatalogueChoice {
  id: string;
  kind: LineKind;
  label: string;
  note?: string;
  line: Omit<QuoteLineDraft, "id">;
}

export interface TaxRule {
  name: string;
  basisPoints: number;
  kinds: readonly LineKind[];
  rounding: "line-then-sum" | "sum-then-tax";
}

export interface QuoteMoney {
  currency: string;
  locale: string;
  tax: TaxRule;
}

export interface RevisionRowView {
  id: string;
  number: number;
  /** "sent 14:12 by Odile Tansy, opened 14:15". */
  words: string;
  state: "stands" | "answered" | "withdrawn" | "superseded" | "expired";
  /** "2 of 3 agreed". */
  answer?: string;
  totalMinor: number;
  href?: string;
}

export type SaveResult<T = unknown> =
  | { ok: true; data?: T }
  | { ok: false; message: string; fieldErrors?: Record<string, string>; conflict?: { by?: string; job: QuoteJobView } };

export type JobFields = Omit<QuoteJobView, "id" | "version">;
