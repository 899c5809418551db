import { z } from "zod";
import { CONDITIONS, quoteLineDraft, URGENCIES } from "./quote-schema";
import { idText, line, moneyMinor, needed } from "./schema";

const row = z.object({
  id: idText.nullish(),
  version: z.number().int().nullish(),
  isActive: z.boolean().default(true),
});

export const RATE_PURPOSES = ["general", "diagnosis", "warranty"] as const;

export const saveRateInput = row.extend({
  name: needed("The rate", 80),
  perHourMinor: moneyMinor,
  purpose: z.enum(RATE_PURPOSES),
  reason: line("The reason", 300).nullish(),
});
export const saveOperationInput = row.extend({
  name: needed("The operation", 160),
  hoursMilli: z
    .number()
    .int("Hours have at most three decimals.")
    .min(0, "Hours can't be below zero.")
    .max(200_000, "No operation takes more than 200 hours."),
  rateId: idText,
});
export const savePartInput = row.extend({
  number: needed("The part number", 60),
  name: needed("The part", 160),
  costMinor: moneyMinor,
  priceMinor: moneyMinor,
  condition: z.enum(CONDITIONS).default("new"),
});
export const saveSetJobInput = row.extend({
  name: needed("The set job", 120),
  customerTitle: needed("Its name for the customer", 160),
  causeId: z.string().max(60).nullish(),
  urgency: z.enum(URGENCIES).default("now"),
  ifWaits: line("What happens if it waits", 600).default(""),
  lines: z.array(quoteLineDraft).max(200),
});
