import type { ReactNode } from "react";
import type { Family } from "@/components/ui/family";
import type { LineKind, QuoteLineDraft } from "@/lib/cases/quote-schema";

export const KIND_WORDS: Record<LineKind, string> = {
  labour: "Labour",
  part: "Part",
  sublet: "Sublet",
  fee: "Fee",
  diagnosis: "Diagnosis",
};
export const URGENCY_WORDS = { now: "needed now", soon: "soon", optional: "as you like" } as const;

export interface RateRowView {
  id: string;
  name: string;
  /** "work", "diagnosis", "warranty work". */
  purpose: string;
  perHour: string;
  isActive: boolean;
  act?: ReactNode;
}

export interface OperationRowView {
  id: string;
  name: string;
  hours: string;
  rate: string;
  price: string;
  isActive: boolean;
  act?: ReactNode;
}

export interface PartRowView {
  id: string;
  name: string;
  number: string;
  condition: string;
  /** Left out where the person may not see it. */
  cost?: string;
  /** Of the price: (price − cost) ÷ price. */
  margin?: string;
  /** Sold under its cost. */
  isLoss?: boolean;
  price: string;
  isActive: boolean;
  act?: ReactNode;
}

export interface SetJobLineView {
  id: string;
  kind: string;
  description: string;
  partNumber?: string;
  quantity: string;
  each: string;
  sum: string;
  cost?: string;
}

export interface SetJobView {
  id: string;
  name: string;
  customerTitle: string;
  cause: { family: Family; title: string } | null;
  urgency: string;
  ifWaits: string;
  lines: readonly SetJobLineView[];
  net: string;
  isActive: boolean;
  act?: ReactNode;
}

/** A set job as it is edited. */
export interface SetJobDraft {
  id?: string;
  version?: number;
  name: string;
  customerTitle: string;
  causeId: string | null;
  urgency: "now" | "soon" | "optional";
  ifWaits: string;
  lines: QuoteLineDraft[];
  isActive: boolean;
}
