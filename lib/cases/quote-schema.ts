import { z } from "zod";

export const LINE_KINDS = ["labour", "part", "sublet", "fee", "diagnosis"] as const;
export const URGENCIES = ["now", "soon", "optional"] as const;
export const CONDITIONS = ["new", "rebuilt", "used"] as const;

export type LineKind = (typeof LINE_KINDS)[number];
export type Urgency = (typeof URGENCIES)[number];

const money = z
  .number({ error: "An amount of money is a number." })
  .max(100_000_000, "That is more than a million; check the amount.")
  .min(0, "A price can't be below zero.")
  .int("Money is counted in whole cents.");

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
  vehicle: {
    label: string;
    modelYear: number | null;
    plate: string | null;
    vin: string | null;
    odometerKm: number | null;
    distanceUnit: "km" | "mi";
  };
  complaint: string;
  headline: string;
  finding: string;
  readingsTitle: string;
  readings: RevisionReading[];
  readingsNote: string;
  photoIds: string[];
  diagnosis: { netMinor: number; taxMinor: number; totalMinor: number; hoursMilli: number } | null;
  jobs: RevisionJob[];
  /** Jobs agreed by an earlier revision of this case; they stand and are not asked again. */
  agreed: { title: string; totalMinor: number }[];
  tax: { name: string; basisPoints: number };
  rounding: "line-then-sum" | "sum-then-tax";
  taxKinds: LineKind[];
  /** Everything asked here said yes to, the diagnosis and what was agreed before included. */
  totals: { netMinor: number; taxMinor: number; totalMinor: number; neededNowMinor: number; startsAtMinor: number };
  readyAt: string | null;
  warranty: string;
  legal: string;
  keepParts: boolean;
  validUntil: string;
}

const text = (what: string, max: number) => z.string().trim().max(max, `${what} has more than ${max} characters.`);

export const quoteDraftInput = z.object({
  caseId: z.string(),
  version: z.number().int(),
  headline: text("The headline", 120),
  finding: text("The finding", 2000),
  warranty: text("The warranty", 1000),
  readyAt: z.iso.datetime({ offset: true }).nullish(),
  diagnosisNetMinor: money.nullish(),
});

export const quoteJobFields = z.object({
  title: text("The job", 120).min(1, "Name the job."),
  customerTitle: text("The job's name for the customer", 160).default(""),
  urgency: z.enum(URGENCIES).default("now"),
  ifWaits: text("What happens if it waits", 600).default(""),
  causeId: z.string().max(60).nullish(),
  dependsOnId: z.string().max(60).nullish(),
  isSafety: z.boolean().default(false),
  lines: z.array(quoteLineDraft).max(200, "A job has at most 200 lines.").default([]),
});
export const addQuoteJobInput = quoteJobFields.extend({ caseId: z.string() });
export const addSetJobInput = z.object({ caseId: z.string(), setJobId: z.string() });
export const saveQuoteJobInput = quoteJobFields.extend({
  caseId: z.string(),
  jobId: z.string(),
  version: z.number().int(),
});
export const removeQuoteJobInput = z.object({ caseId: z.string(), jobId: z.string(), version: z.number().int() });
export const sendQuoteInput = z.object({
  caseId: z.string(),
  to: z.email("That is not an e-mail address.").nullish(),
  seen: z.number().int().nullish(),
});
export const withdrawQuoteInput = z.object({
  caseId: z.string(),
  revisionId: z.string(),
  reason: text("The reason", 500).min(1, "Give a reason."),
});

export const jobAnswer = z.object({
  jobId: z.string(),
  answer: z.enum(["yes", "not-now"]),
  reason: text("The reason", 300).optional(),
});
export const answersFields = z.object({
  answers: z.array(jobAnswer).max(100),
  givenBy: text("The name", 120).min(2, "Type the name of who answers."),
  keepParts: z.boolean().default(false),
});
export const giveApprovalInput = answersFields.extend({
  accepted: z.literal(true, { error: "Tick that you agree to the total." }).optional(),
});
export const recordApprovalInput = answersFields.extend({
  caseId: z.string(),
  revisionId: z.string(),
  how: z.enum(["phone", "in-person"], { error: "Say whether it was by phone or in person." }),
  contact: text("The number", 200).optional(),
  words: text("The words", 600).min(1, "Write the words that were said."),
});
export const askInput = z.object({ text: text("The question", 1000).min(1, "Write your question.") });
export const replyInput = z.object({
  caseId: z.string(),
  revisionId: z.string(),
  text: text("The answer", 1000).min(1, "Write the answer."),
});
