import { z } from "zod";
import { isCurrency } from "./money";

export const LINE_KINDS = ["labour", "part", "sublet", "fee", "diagnosis"] as const;
export const URGENCIES = ["now", "soon", "optional"] as const;
export const ROUNDINGS = ["line-then-sum", "sum-then-tax"] as const;

export type LineKind = (typeof LINE_KINDS)[number];
export type Urgency = (typeof URGENCIES)[number];
export type Rounding = (typeof ROUNDINGS)[number];

/** A million in a currency of two decimals; anything above is a slip of the finger. */
const MAX_MINOR = 100_000_000;
const amount = z
  .number({ error: "Enter an amount." })
  .int("Amounts are counted in whole minor units.")
  .min(0, "An amount can't be below zero.")
  .max(MAX_MINOR, "That is more than a million; check the amount.");
const basisPoints = z
  .number()
  .int("Rates have at most two decimals.")
  .min(0, "A rate can't be below zero.")
  .max(10_000, "A rate can't be above 100 %.");
const id = z.string().min(1).max(60);
const label = z.string().trim().min(1, "Give it a name.").max(80);

/** A discount takes either a part of the sum or a fixed amount off, never more than the sum itself. */
export const discountSchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("percent"), basisPoints }),
  z.object({ kind: z.literal("amount"), amountMinor: amount }),
]);
export type Discount = z.output<typeof discountSchema>;

export const lineSchema = z.object({
  id: id.optional(),
  kind: z.enum(LINE_KINDS, { error: "Say what kind of line it is." }),
  description: z.string().max(200, "That is longer than 200 characters.").default(""),
  quantityMilli: z
    .number({ error: "Enter a quantity." })
    .int("Quantities have at most three decimals.")
    .min(0, "A quantity can't be below zero.")
    .max(10_000_000, "That is more than 10,000; check the quantity."),
  unitPriceMinor: amount,
  /** For the shop alone; never reaches a customer. */
  costMinor: amount.nullish(),
  /** Overrides the taxes' own list of kinds; absent follows it. */
  taxable: z.boolean().optional(),
  discount: discountSchema.nullish(),
});
export type QuoteLine = z.input<typeof lineSchema>;

export const jobSchema = z.object({
  id,
  urgency: z.enum(URGENCIES).default("now"),
  lines: z.array(lineSchema).max(500, "A job has at most 500 lines."),
  dependsOn: id.nullish(),
  discount: discountSchema.nullish(),
});
export type QuoteJob = z.input<typeof jobSchema>;

export const taxSchema = z.object({
  id,
  label,
  basisPoints,
  /** The lines it is taken on. */
  kinds: z.array(z.enum(LINE_KINDS)),
  /** Taken on the net amount plus the taxes listed before it. */
  compound: z.boolean().default(false),
});
export type Tax = z.input<typeof taxSchema>;

export const feeSchema = z.object({
  id,
  label,
  /** The lines a percentage is taken on. */
  on: z.array(z.enum(LINE_KINDS)).default(["labour", "part"]),
  amount: z.discriminatedUnion("kind", [
    z.object({ kind: z.literal("percent"), basisPoints, capMinor: amount.nullish() }),
    z.object({ kind: z.literal("fixed"), amountMinor: amount }),
  ]),
});
export type ShopFee = z.input<typeof feeSchema>;
export type ParsedFee = z.output<typeof feeSchema>;

export const exemptionSchema = z.object({
  certificate: z.string().trim().min(1, "Write the number of the certificate.").max(60),
  expiresOn: z.iso.date("Write the day it runs out, as 2026-12-31."),
});
export type Exemption = z.output<typeof exemptionSchema>;

/** Whether a certificate frees from tax on that day (`YYYY-MM-DD`); on its last day it still does. */
export const isExemptOn = (exemption: Pick<Exemption, "expiresOn"> | null | undefined, day: string): boolean =>
  exemption != null && exemption.expiresOn >= day;

export const quoteInputSchema = z
  .object({
    currency: z.string().refine(isCurrency, "No such currency."),
    jobs: z.array(jobSchema).max(200, "A quote has at most 200 jobs."),
    taxes: z.array(taxSchema).max(10, "At most ten taxes."),
    fees: z.array(feeSchema).max(10, "At most ten fees.").default([]),
    discount: discountSchema.nullish(),
    /** Prices of lines hold the tax already. */
    pricesIncludeTax: z.boolean().default(false),
    /** The customer pays no tax; check the certificate's day with `isExemptOn`. */
    exempt: z.boolean().default(false),
    rounding: z.enum(ROUNDINGS).default("sum-then-tax"),
  })
  .superRefine((quote, context) => {
    const ids = quote.jobs.map((job) => job.id);
    for (const [index, job] of quote.jobs.entries()) {
      const fault = (path: string, message: string) =>
        context.addIssue({ code: "custom", path: ["jobs", index, path], message });
      if (ids.indexOf(job.id) !== index) fault("id", "Another job has the same id.");
      if (job.dependsOn === job.id) fault("dependsOn", "A job can't need itself.");
      else if (job.dependsOn && !ids.includes(job.dependsOn))
        fault("dependsOn", "The job it needs is not in this quote.");
      else if (inCircle(quote.jobs, job.id)) fault("dependsOn", "These jobs need each other in a circle.");
    }
    const taxIds = quote.taxes.map((tax) => tax.id);
    for (const [index, taxId] of taxIds.entries())
      if (taxIds.indexOf(taxId) !== index)
        context.addIssue({ code: "custom", path: ["taxes", index, "id"], message: "Another tax has the same id." });
  });

export type QuoteInput = z.input<typeof quoteInputSchema>;

function inCircle(jobs: readonly { id: string; dependsOn?: string | null }[], start: string): boolean {
  let at = jobs.find((job) => job.id === start)?.dependsOn;
  for (let steps = 0; at && steps <= jobs.length; steps++) {
    if (at === start) return true;
    const next: string = at;
    at = jobs.find((job) => job.id === next)?.dependsOn;
  }
  return false;
}
