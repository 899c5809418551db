import { z } from "zod";
import "@/lib/fault-words";
import { parseMoney, parseNumber } from "@/components/ui/parse-entry";
import { kmInternal, type UnitPrefs } from "@/components/ui/units";
import { zonedToIso } from "@/components/ui/zoned-time";
import { ARRIVALS, AUTHORIZATION_WAYS, type OpenCaseInput } from "@/lib/cases/schema";
import type { CaseVehicle } from "@/lib/diagnosis/case-file";
import { CIRCUMSTANCES, COMPLAINTS, HISTORIES } from "@/lib/diagnosis/vocabulary";
import { checkVin } from "@/lib/obd/vin";

/** The new-case form as it is typed: text throughout, turned into `OpenCaseInput` by `toOpenCase`. */
const text = z.string().trim();

export const newCaseValues = z.object({
  customerId: text,
  name: text.max(120),
  phone: text.max(40).regex(/^[+0-9 ().\-/x]*$/, "A phone number has digits, spaces and + ( ) - only."),
  email: z.union([z.literal(""), z.email("That is not an e-mail address.")]),
  vehicleId: text,
  label: text.max(80),
  modelYear: text.regex(/^(\d{4})?$/, "A year has four figures."),
  plate: text.max(16),
  vin: text.max(20),
  vinKept: z.boolean(),
  vinReason: text.max(300),
  engine: z.record(z.string(), z.string()),
  odometer: text,
  isOdometerUnreadable: z.boolean(),
  odometerReason: text.max(200),
  words: text.min(1, "Write what the customer said.").max(600),
  complaints: z.array(z.enum(COMPLAINTS)).max(12),
  circumstances: z.array(z.enum(CIRCUMSTANCES)),
  history: z.array(z.enum(HISTORIES)),
  conditionNote: text.max(400),
  arrival: z.enum(ARRIVALS),
  promised: text,
  technicianId: text,
  ceiling: text,
  isAuthorized: z.boolean(),
  givenBy: text.max(120),
  how: z.enum(AUTHORIZATION_WAYS),
  contact: text.max(200),
  keepParts: z.boolean(),
  roadTestAllowed: z.boolean(),
});
export type NewCaseValues = z.output<typeof newCaseValues>;

export interface FormContext {
  currency: string;
  timeZone: string;
  now: string;
  units: UnitPrefs;
}

export function newCaseSchema(context: FormContext) {
  return newCaseValues.superRefine((v, refine) => {
    const fault = (path: keyof NewCaseValues, message: string) =>
      refine.addIssue({ code: "custom", path: [path], message });
    if (!v.customerId && !v.name) fault("name", "Name the customer, or choose one.");
    if (!v.vehicleId && !v.label) fault("label", "Name the vehicle: make, model and engine.");
    if (v.modelYear && (Number(v.modelYear) < 1900 || Number(v.modelYear) > 2100))
      fault("modelYear", "That year is not possible.");
    if (v.vin && !v.vehicleId && !v.vinKept) {
      const vin = checkVin(v.vin);
      if (vin.binding && vin.state === "bad_check_digit") fault("vin", "The check digit does not fit.");
      else if (vin.state === "bad_length" && vin.normalized.length > 17) fault("vin", "A VIN has 17 characters.");
    }
    if (v.vinKept && !v.vinReason) fault("vinReason", "Say why it is kept as typed.");
    if (v.odometer && !v.isOdometerUnreadable) {
      const shown = parseNumber(v.odometer);
      if (shown === null || shown < 0) fault("odometer", "The odometer is a number.");
      else if (kmInternal(shown, context.units) > 3_000_000) fault("odometer", "No odometer shows that much.");
    }
    if (v.isOdometerUnreadable && !v.odometerReason) fault("odometerReason", "Say why it can’t be read.");
    if (v.promised) {
      const at = zonedToIso(v.promised, context.timeZone);
      if (!at) fault("promised", "That is not a date and time.");
      else if (Date.parse(at) < Date.parse(context.now)) fault("promised", "That has passed.");
    }
    const ceiling = parseMoney(v.ceiling, context.currency);
    if (v.ceiling && (ceiling === null || ceiling < 0)) fault("ceiling", "That is not an amount.");
    if (v.isAuthorized) {
      if (!ceiling) fault("ceiling", "Name the amount that was agreed.");
      if (!v.givenBy) fault("givenBy", "Say who agreed.");
    }
  });
}

const NUMERIC = new Set(["displacementL", "cylinders", "banks"]);

/** The engine's fields as typed to what a case file holds; empty fields are left out. */
export function toEngine(typed: Record<string, string>, modelYear: string): CaseVehicle {
  const engine: Record<string, unknown> = {};
  for (const [key, value] of Object.entries(typed)) {
    if (value === "") continue;
    if (NUMERIC.has(key)) {
      const n = parseNumber(value);
      if (n !== null) engine[key] = n;
    } else if (value === "yes" || value === "no") engine[key] = value === "yes";
    else engine[key] = value;
  }
  if (modelYear) engine.modelYear = Number(modelYear);
  return engine as CaseVehicle;
}

export function toOpenCase(v: NewCaseValues, context: FormContext): OpenCaseInput {
  const vin = checkVin(v.vin);
  // A US or Canadian number that fails its check is not kept as the VIN, but as what was read and why.
  const vinAsNote = v.vinKept && vin.binding && vin.state === "bad_check_digit";
  const odometer = v.isOdometerUnreadable ? null : parseNumber(v.odometer);
  const amountMinor = parseMoney(v.ceiling, context.currency) ?? 0;
  return {
    customer: v.customerId
      ? { id: v.customerId }
      : { name: v.name, phone: v.phone || undefined, email: v.email || undefined },
    vehicle: v.vehicleId
      ? { id: v.vehicleId }
      : {
          label: v.label,
          plate: v.plate || undefined,
          vin: v.vin && !vinAsNote ? vin.normalized : undefined,
          modelYear: v.modelYear ? Number(v.modelYear) : undefined,
          engine: toEngine(v.engine, v.modelYear),
          note: v.vinKept && v.vin ? `VIN read as ${vin.normalized}: ${v.vinReason}` : undefined,
        },
    words: v.words,
    complaints: v.complaints,
    circumstances: v.circumstances,
    history: v.history,
    conditionNote: v.conditionNote || undefined,
    arrival: v.arrival,
    odometerInKm: odometer === null ? undefined : kmInternal(odometer, context.units),
    odometerUnreadable: v.isOdometerUnreadable ? v.odometerReason : undefined,
    keepParts: v.keepParts,
    roadTestAllowed: v.roadTestAllowed,
    promisedAt: (v.promised && zonedToIso(v.promised, context.timeZone)) || undefined,
    technicianId: v.technicianId || undefined,
    authorization: v.isAuthorized
      ? { amountMinor, givenBy: v.givenBy, how: v.how, contact: v.contact || undefined }
      : undefined,
  };
}

/** Where a fault the server names belongs in the form. */
export const SERVER_FIELDS: Record<string, keyof NewCaseValues> = {
  "/customer": "name",
  "/customer/name": "name",
  "/customer/email": "email",
  "/customer/phone": "phone",
  "/vehicle": "label",
  "/vehicle/label": "label",
  "/vehicle/vin": "vin",
  "/vehicle/plate": "plate",
  "/vehicle/modelYear": "modelYear",
  "/words": "words",
  "/odometerInKm": "odometer",
  "/odometerUnreadable": "odometerReason",
  "/promisedAt": "promised",
  "/technicianId": "technicianId",
  "/authorization": "ceiling",
  "/authorization/amountMinor": "ceiling",
  "/authorization/givenBy": "givenBy",
};

export const FIELD_WORDS: Partial<Record<keyof NewCaseValues, string>> = {
  name: "Customer",
  phone: "Phone",
  email: "E-mail",
  label: "Vehicle",
  modelYear: "Model year",
  vin: "VIN",
  vinReason: "VIN kept as typed",
  odometer: "Odometer",
  odometerReason: "Odometer unreadable",
  words: "Complaint",
  promised: "Promise",
  ceiling: "Ceiling",
  givenBy: "Who agreed",
};
