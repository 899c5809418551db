import { z } from "zod";
import { vehicleSchema } from "@/lib/diagnosis/case-file";
import { CIRCUMSTANCES, COMPLAINTS, HISTORIES, MODES, PHASES } from "@/lib/diagnosis/vocabulary";
import { BACK, PARK_REASONS, PATH } from "./stages";

/** Text as people type it: trimmed, capped, and free of NULs, which the database can't keep. */
export const line = (what: string, max = 200) =>
  z
    .string({ error: `${what} must be text.` })
    .trim()
    .max(max, `${what} has more than ${max} characters.`)
    .refine((text) => !text.includes("\u0000"), `${what} holds a character that can't be kept (a NUL).`);
export const needed = (what: string, max = 200) => line(what, max).min(1, `${what} is missing.`);
const optional = <T extends z.ZodType>(schema: T) =>
  z.preprocess((value) => (value === "" || value === null ? undefined : value), schema.optional());

export const idText = z
  .string()
  .min(3)
  .max(60)
  .regex(/^[a-z]+_[0-9a-z]+$|^[A-Za-z0-9_-]+$/, "That is not one of our ids.");
export const reasonText = needed("The reason", 500);
export const moneyMinor = z
  .number({ error: "An amount of money is a number." })
  .max(100_000_000, "That is more than a million; check the amount.")
  .min(0, "An amount can't be below zero.")
  .int("Money is counted in whole cents.");
const EARLIEST = Date.UTC(1990, 0, 1);
const LATEST = Date.UTC(2100, 0, 1);
export const instantText = z.iso
  .datetime({ offset: true, error: "That is not a date and time." })
  .refine((text) => Date.parse(text) > EARLIEST && Date.parse(text) < LATEST, "That date is not possible here.");

export const ARRIVALS = ["waits", "drop-off", "key-drop", "tow-in"] as const;
export const ARRIVAL_LABELS: Record<(typeof ARRIVALS)[number], string> = {
  waits: "Waits here",
  "drop-off": "Dropped off",
  "key-drop": "Key drop",
  "tow-in": "Towed in",
};
export const AUTHORIZATION_WAYS = ["in-person", "phone", "e-mail", "link", "signature"] as const;
export const AUTHORIZATION_LABELS: Record<(typeof AUTHORIZATION_WAYS)[number], string> = {
  "in-person": "In person",
  phone: "By phone",
  "e-mail": "By e-mail",
  link: "By link",
  signature: "Signed on paper",
};

export const customerInput = z.object({
  name: needed("The customer's name", 120),
  email: optional(z.email("That is not an e-mail address.").max(200)),
  phone: optional(
    line("The phone number", 40).regex(/^[+0-9 ().\-/x]*$/, "A phone number has digits, spaces and + ( ) - only."),
  ),
  address: optional(line("The address", 300)),
  note: optional(line("The note", 1000)),
});

export const vehicleInput = z.object({
  label: needed("The vehicle", 80),
  plate: optional(line("The plate", 16)),
  vin: optional(line("The VIN", 20)),
  modelYear: optional(z.number().int().min(1900, "No car is that old.").max(2100, "That year is not possible.")),
  engine: vehicleSchema,
  note: optional(line("The note", 1000)),
});

export const diagnosisAuthorization = z.object({
  amountMinor: moneyMinor,
  givenBy: needed("Who said yes", 120),
  how: z.enum(AUTHORIZATION_WAYS, { error: "Say how the yes was given." }),
  contact: optional(line("The number or address", 200)),
  words: optional(line("The words", 500)),
});

export const intakeFields = z.object({
  complaints: z.array(z.enum(COMPLAINTS)).max(12).default([]),
  words: needed("The complaint in the customer's words", 600),
  circumstances: z.array(z.enum(CIRCUMSTANCES)).max(12).default([]),
  history: z.array(z.enum(HISTORIES)).max(12).default([]),
  conditionNote: optional(line("When it happens", 400)),
  arrival: z.enum(ARRIVALS).default("drop-off"),
  odometerInKm: optional(
    z
      .number({ error: "The odometer is a number." })
      .int("Whole kilometres only.")
      .min(0, "The odometer can't be below zero.")
      .max(3_000_000, "No odometer shows that much."),
  ),
  odometerUnreadable: optional(line("Why the odometer can't be read", 200)),
  keepParts: z.boolean().default(false),
  roadTestAllowed: z.boolean().default(true),
  promisedAt: optional(instantText),
  technicianId: optional(idText),
});

export const openCaseInput = intakeFields.extend({
  customer: z.union([z.object({ id: idText }), customerInput], { error: "Name a customer, or choose one." }),
  vehicle: z.union([z.object({ id: idText, engine: vehicleSchema.optional() }), vehicleInput], {
    error: "Name a vehicle, or choose one.",
  }),
  authorization: optional(diagnosisAuthorization),
  comebackOf: optional(idText),
});
export type OpenCaseInput = z.input<typeof openCaseInput>;

export const caseRef = z.object({ caseId: idText });
export const editIntakeInput = intakeFields
  .partial()
  .extend({ caseId: idText, version: z.number().int(), reason: optional(line("The reason", 500)) });
export const authorizeDiagnosisInput = diagnosisAuthorization.extend({ caseId: idText });
export const assignInput = caseRef.extend({ technicianId: idText });
export const promiseInput = caseRef.extend({ promisedAt: instantText, reason: optional(line("The reason", 500)) });
export const advanceInput = caseRef.extend({ to: z.enum(PATH) });
export const backInput = caseRef.extend({
  to: z.enum(Object.values(BACK).flat() as [string, ...string[]]),
  reason: reasonText,
});
export const parkInput = caseRef.extend({ for: z.enum(PARK_REASONS), reason: reasonText });
export const releaseInput = caseRef.extend({
  reason: reasonText,
  safetyNote: optional(line("The safety advice", 600)),
  notSafeToDrive: z.boolean().default(false),
  acknowledgedBy: optional(line("Who acknowledged it", 120)),
  chargeDiagnosis: z.boolean().default(true),
  odometerOutKm: optional(z.number().int().min(0).max(3_000_000)),
});
export const waiveInput = caseRef.extend({ reason: reasonText });
export const closeInput = caseRef.extend({
  correction: needed("What was done (the correction)", 1000),
  odometerOutKm: optional(
    z.number({ error: "The odometer is a number." }).int().min(0).max(3_000_000, "No odometer shows that much."),
  ),
});

export const sampleInput = caseRef.extend({
  mode: z.enum(MODES, { error: "Choose an operating mode." }),
  phase: z.enum(PHASES).default("before"),
  how: optional(line("How it was taken", 80)),
  values: z.record(z.string().max(40), z.unknown()).default({}),
});
/** Cell by cell: `was` is what the writer saw, so that two people on one sheet meet at the cell and nowhere else. */
export const setReadingsInput = z.object({
  caseId: idText,
  sampleId: idText,
  changes: z
    .array(z.object({ parameter: z.string().min(1).max(40), was: z.unknown(), now: z.unknown() }))
    .min(1)
    .max(200),
});
export const describeSampleInput = z.object({
  caseId: idText,
  sampleId: idText,
  mode: z.enum(MODES),
  how: optional(line("How it was taken", 80)),
});
export const removeSampleInput = z.object({
  caseId: idText,
  sampleId: idText,
  reason: optional(line("The reason", 500)),
});
export const codeInput = caseRef.extend({
  code: needed("The code", 8)
    .toUpperCase()
    .regex(/^[PCBU][0-3][0-9A-F]{3}$/, "A trouble code is a letter P, C, B or U and four characters, as P0171."),
  status: z.enum(["stored", "pending", "permanent"]).default("stored"),
  phase: z.enum(PHASES).default("before"),
  freezeFrame: z.record(z.string().max(40), z.unknown()).optional(),
});
export const removeCodeInput = z.object({ caseId: idText, codeId: idText });
export const readinessInput = caseRef.extend({
  readiness: z.record(z.string().max(40), z.enum(["complete", "incomplete", "unsupported"])),
  afterCodesRead: z.boolean().optional(),
});
export const importReadingsInput = caseRef.extend({ file: z.unknown() });

export const recordTestInput = caseRef.extend({
  testId: needed("The test", 60),
  outcome: needed("The outcome", 60),
  phase: z.enum(PHASES).default("before"),
  cylinder: optional(z.number().int().min(1).max(16)),
  bank: optional(z.number().int().min(1).max(2)),
  note: optional(line("The note", 500)),
});
export const undoTestInput = z.object({ caseId: idText, outcomeId: idText });
export const markCauseInput = caseRef.extend({
  causeId: needed("The cause", 60),
  mark: z.enum(["proven", "suspected"]),
  reason: reasonText,
  provenByTestId: optional(idText),
});
export const unmarkCauseInput = z.object({ caseId: idText, markId: idText, reason: reasonText });
export const noteInput = caseRef.extend({
  text: needed("The note", 2000),
  workJobId: optional(idText),
  kind: z.enum(["note", "more-work", "strike-proposal"]).default("note"),
});
