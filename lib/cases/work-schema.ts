import { z } from "zod";
import { CONDITIONS } from "./quote-schema";
import { idText, instantText, line, moneyMinor, needed, reasonText } from "./schema";

export const OLD_PART_FATES = ["kept-for-customer", "returned-core", "discarded", "none"] as const;
export const OLD_PART_LABELS: Record<(typeof OLD_PART_FATES)[number], string> = {
  "kept-for-customer": "Kept for the customer",
  "returned-core": "Returned as core",
  discarded: "Discarded",
  none: "No old part",
};
export const PART_STATES = ["ordered", "arrived", "fitted"] as const;
export const PAYMENT_WAYS = ["cash", "card-terminal", "cheque", "transfer"] as const;
export const PAYMENT_LABELS: Record<(typeof PAYMENT_WAYS)[number], string> = {
  cash: "Cash",
  "card-terminal": "Card at the counter",
  cheque: "Cheque",
  transfer: "Bank transfer",
};

const ofCase = z.object({ caseId: idText });

/** Without a job the clock runs on the diagnosis. */
export const clockOnInput = ofCase.extend({ workJobId: idText.nullish() });
export const clockOffInput = ofCase.extend({ at: instantText.optional() });
export const correctClockInput = ofCase.extend({
  clockId: idText,
  startedAt: instantText,
  endedAt: instantText,
  reason: reasonText,
});
export const usePartInput = ofCase.extend({
  workJobId: idText,
  lineId: z.string().max(40).nullish(),
  description: needed("The part", 200),
  partNumber: line("The part number", 60).nullish(),
  quantityMilli: z
    .number()
    .int()
    .min(1, "A quantity must be above zero.")
    .max(10_000_000, "That is more than 10,000; check the quantity."),
  condition: z.enum(CONDITIONS).default("new"),
  oldPart: z.enum(OLD_PART_FATES).default("discarded"),
  status: z.enum(PART_STATES).default("fitted"),
  arrivesOn: z.iso.date().nullish(),
});
export const setPartInput = ofCase.extend({
  partId: idText,
  status: z.enum(PART_STATES),
  oldPart: z.enum(OLD_PART_FATES).optional(),
  arrivesOn: z.iso.date().nullish(),
});
export const removePartInput = ofCase.extend({ partId: idText });
export const finishJobInput = ofCase.extend({ workJobId: idText, correction: needed("What was done", 600) });
export const strikeJobInput = ofCase.extend({ workJobId: idText, reason: reasonText });
export const paymentInput = ofCase.extend({
  paperId: idText,
  how: z.enum(PAYMENT_WAYS, { error: "Say how it was paid." }),
  amountMinor: moneyMinor.min(1, "An amount must be above zero."),
  reference: line("The reference", 80).nullish(),
});
