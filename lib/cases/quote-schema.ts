import { z } from "zod";

export const LINE_KINDS = ["labour", "part", "sublet", "fee", "diagnosis"] as const;
export const URGENCIES = ["now", "soon", "optional"] as const;
export const CONDITIONS = ["new", "rebuilt", "used"] as const;

export type LineKind = (typeof LINE_KINDS)[number];
export type Urgency = (typeof URGENCIES)[number];

const money = z.number().int("Money is counted in whole cents.").min(0, "A price can't be below zero.").max(100_000_000, "That is more than a million; check the amount.");

/** One line of a job as it is edited. Quantities are thousandths (hours too), money is minor units. */
export const quoteLineDraft = z.object({
  id: z.string().min(1).max(40),
  kind: z.enum(LINE_KINDS),
  description: z.string().trim().min(1, "Say what it is.").max(200),
  quantityMilli: z
    .number()
    .int("Quantities have at most three decimals.")
    .min(1, "A quantity must be above zero.")
    .max(10_000_000, "That is more than 10,000; check the quantity."),
  unitPriceMinor: money,
  costMinor: money.nullish(),
  partNumber: z.string().trim().max(60).nullish(),
  condition: z.enum(CONDITIONS).nullish(),
  rateId: z.string().max(40).nullish(),
});
export type QuoteLineDraft = z.output<typeof quoteLineDraft>;

/** What a customer may see of a line: no cost, no markup. */
export interface RevisionLine {
  id: string;
  kind: LineKind;
  description: string;
  quantityMilli: number;
  unitPriceMinor: number;
  netMinor: number;
  partNumber: string | null;
  condition: string | null;
}

export interface RevisionJob {
  id: string;
  causeId: string | null;
  title: string;
  customerTitle: string;
  urgency: Urgency;
  ifWaits: string;
  dependsOnId: string | null;
  isSafety: boolean;
  netMinor: number;
  taxMinor: number;
  totalMinor: number;
  lines: RevisionLine[];
}

export interface RevisionReading {
  label: string;
  value: string;
  /** Position of the value when the usual band is 0 … 1. */
  at: number;
  family: "lean" | "rich" | "spark" | "mech" | null;
  inside: boolean;
}

/** A quote as it was sent: everything the customer's page and the paper show, and nothing else. */
export interface RevisionSnapshot {
  version: 1;
  number: number;
  caseNumber: number;
  paperWord: "estimate" | "quotation";
  currency: string;
  locale: string;
  timeZone: string;
  shop: { name: string; address: string; phone: string; email: string; registration: string };
  customer: { name: string; email: string | null; phone: string | null };
  vehicle: { label: string; modelYear: number | null; plate: string | null; vin: string | null; odometerKm: number | null; distanceUnit: "km" | "mi" };
  complaint: string;
  headline: string;
  finding: string;
  readingsTitle: string;
  readings: RevisionReading[];
  readingsNote: string;
  photoIds: string[];
  diagnosis: { netMinor: number; taxMinor: number; totalMinor: number; hoursMilli: number } | null;
  jobs: RevisionJob[];
  tax: { name: string; basisPoints: number };
  rounding: "line-then-sum" | "sum-then-tax";
  taxKinds: LineKind[];
  totals: { netMinor: number; taxMinor: number; totalMinor: number; neededNowMinor: number };
  readyAt: string | null;
  warranty: string;
  legal: string;
  keepParts: boolean;
  validUntil: string;
}
