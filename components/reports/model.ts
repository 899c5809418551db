import type { Family } from "@/components/ui/family";

export interface StageTimeView {
  label: string;
  /** Hours: median and the middle half of cases. */
  medianH: number;
  lowerH: number;
  upperH: number;
}

export interface WaitingShareView {
  label: string;
  /** Share of open hours by week, 0 … 1, oldest first. */
  weeks: readonly number[];
}

export interface QuotedWeekView {
  label: string;
  quotedMinor: number;
  approvedMinor: number;
}

export interface HoursView {
  label: string;
  soldH: number;
  workedH: number;
}

export interface ComebackRowView {
  family: Family;
  closed: number;
  /** Case number and its place in the span, 0 … 1. */
  cases: readonly { number: string; href: string; at: number }[];
}

export interface RankView {
  first: number;
  second: number;
  third: number;
  lower: number;
}

export interface ClosedWeekView {
  label: string;
  closed: number;
  released: number;
  invoicedMinor: number;
  paidMinor: number;
}
