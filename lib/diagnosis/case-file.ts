import { z } from "zod";
import { isParameterId, PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import { TESTS } from "./tests";
import {
  AIR_METERINGS,
  ASPIRATIONS,
  CIRCUMSTANCES,
  CODE_STATUSES,
  COMPLAINTS,
  FUEL_RETURNS,
  FUEL_SYSTEMS,
  FUELS,
  HISTORIES,
  IGNITIONS,
  LOOP_STATES,
  type LoopState,
  MODES,
  NEUTRAL_OUTCOMES,
  O2_SENSINGS,
  PHASES,
  READINESS_STATES,
  TEST_IDS,
  THROTTLE_CONTROLS,
} from "./vocabulary";

/** A reading by cylinder: cylinder number as text → value in the parameter's unit. */
export type CylinderReadings = Record<string, number>;
/** What a sample holds: known parameters typed, unknown ones kept as they came. */
export type Values = Partial<Record<ParameterId, number | CylinderReadings | LoopState>> & Record<string, unknown>;

const finite = (what: string, min: number, max: number) =>
  z
    .number({ error: `${what} must be a number from ${min} to ${max}` })
    .refine((n) => Number.isFinite(n) && n >= min && n <= max, {
      error: `${what} must be a number from ${min} to ${max}`,
    });

const whole = (what: string, min: number, max: number) =>
  finite(what, min, max).refine(Number.isInteger, { error: `${what} must be a whole number from ${min} to ${max}` });

/** Null means "not stated", as an empty field of a form does. */
const maybe = <T extends z.ZodType>(schema: T) => z.preprocess((v) => (v === null ? undefined : v), schema.optional());

const oneOf = <const T extends readonly [string, ...string[]]>(what: string, values: T) =>
  z.enum(values, { error: `${what} must be one of: ${values.join(", ")}` });

const listOf = <T extends z.ZodType>(what: string, item: T) =>
  maybe(z.array(item, { error: `${what} must be a list` }));

/** A list of the case: absent and empty are the same. */
const items = <T extends z.ZodType>(what: string, item: T) =>
  z.preprocess((v) => v ?? [], z.array(item, { error: `${what} must be a list` }));

const yesNo = (what: string) => maybe(z.boolean({ error: `${what} must be true or false` }));

/** Readings of any sample: wrong types refused by path; unknown keys kept; null treated as absent. */
const valuesSchema = z
  .record(z.string(), z.unknown(), { error: "values must be an object of readings by parameter" })
  .transform((raw, ctx): Values => {
    const kept: Values = {};
    const refuse = (path: (string | number)[], message: string) => ctx.addIssue({ code: "custom", path, message });
    for (const [key, value] of Object.entries(raw)) {
      if (value === null || value === undefined) continue;
      if (!isParameterId(key)) {
        kept[key] = value;
        continue;
      }
      const { kind, possible, unit, label } = PARAMETERS[key];
      const range = possible ? ` (${possible.min} to ${possible.max}${unit ? ` ${unit}` : ""})` : "";
      if (kind === "loop") {
        if (LOOP_STATES.includes(value as LoopState)) kept[key] = value as LoopState;
        else refuse([key], `${label} must be one of: ${LOOP_STATES.join(", ")}`);
      } else if (kind === "number") {
        if (typeof value === "number" && Number.isFinite(value)) kept[key] = value;
        else refuse([key], `${label} must be a number${range}`);
      } else if (typeof value !== "object" || Array.isArray(value)) {
        refuse([key], `${label} must be an object of cylinder number to number${range}`);
      } else {
        const byCylinder: CylinderReadings = {};
        for (const [cylinder, reading] of Object.entries(value)) {
          if (reading === null || reading === undefined) continue;
          if (!/^[1-9]\d?$/.test(cylinder)) refuse([key, cylinder], "cylinder must be a whole number from 1 to 16");
          else if (typeof reading !== "number" || !Number.isFinite(reading))
            refuse([key, cylinder], `${label} must be a number${range}`);
          else byCylinder[cylinder] = reading;
        }
        kept[key] = byCylinder;
      }
    }
    return kept;
  });

export const vehicleSchema = z.object(
  {
    modelYear: maybe(whole("model year", 1900, 2100)),
    odometerKm: maybe(finite("odometer", 0, 5_000_000)),
    displacementL: maybe(finite("displacement", 0.05, 20)),
    cylinders: maybe(whole("cylinders", 1, 16)),
    banks: maybe(whole("banks", 1, 4)),
    fuelSystem: maybe(oneOf("fuel system", FUEL_SYSTEMS)),
    airMetering: maybe(oneOf("air metering", AIR_METERINGS)),
    aspiration: maybe(oneOf("aspiration", ASPIRATIONS)),
    ignition: maybe(oneOf("ignition", IGNITIONS)),
    o2Sensing: maybe(oneOf("O2 sensing", O2_SENSINGS)),
    fuel: maybe(oneOf("fuel", FUELS)),
    firingOrder: listOf("firing order", whole("cylinder", 1, 16)),
    bank1Cylinders: listOf("bank 1 cylinders", whole("cylinder", 1, 16)),
    fuelReturn: maybe(oneOf("fuel return", FUEL_RETURNS)),
    throttleControl: maybe(oneOf("throttle control", THROTTLE_CONTROLS)),
    hasEgr: yesNo("hasEgr"),
    hasSecondaryAir: yesNo("hasSecondaryAir"),
    variableCamTiming: yesNo("variableCamTiming"),
    hybrid: yesNo("hybrid"),
  },
  { error: "vehicle must be an object" },
);

export const sampleSchema = z.object(
  {
    mode: oneOf("mode", MODES),
    phase: maybe(oneOf("phase", PHASES)).transform((phase) => phase ?? "before"),
    values: z.preprocess((v) => v ?? {}, valuesSchema),
  },
  { error: "a sample must be an object" },
);

export const codeSchema = z.object(
  {
    code: z
      .string({ error: "code must be a letter P, C, B or U and four hexadecimal digits" })
      .trim()
      .toUpperCase()
      .regex(/^[PCBU][0-3][0-9A-F]{3}$/, { error: "code must be a letter P, C, B or U and four hexadecimal digits" }),
    status: maybe(oneOf("status", CODE_STATUSES)).transform((status) => status ?? "stored"),
    freezeFrame: maybe(z.object({ values: valuesSchema }, { error: "freezeFrame must hold values" })),
  },
  { error: "a code must be an object" },
);

export const testRecordSchema = z
  .object(
    {
      id: oneOf("test", TEST_IDS),
      outcome: z.string({ error: "outcome must be text" }).min(1, { error: "outcome must not be empty" }),
      cylinder: maybe(whole("cylinder", 1, 16)),
      bank: maybe(whole("bank", 1, 4)),
      mode: maybe(oneOf("mode", MODES)),
      value: maybe(finite("value", -1e9, 1e9)),
    },
    { error: "a test must be an object" },
  )
  .superRefine((test, ctx) => {
    const { outcomes, openOutcomes } = TESTS[test.id];
    const known: string[] = [...outcomes.map((o) => o.id as string), ...NEUTRAL_OUTCOMES];
    if (!known.includes(test.outcome) && !openOutcomes)
      ctx.addIssue({
        code: "custom",
        path: ["outcome"],
        message: `outcome of ${test.id} must be one of: ${known.join(", ")}`,
      });
  });

/**
 * The case file, version 1. Only `version` and `vehicle` must be there. Units are those of `PARAMETERS`.
 * Numbers a sensor cannot mean pass (the assessment notes and ignores them); wrong types do not.
 */
export const caseFileSchema = z.object(
  {
    version: z.literal(1, { error: "version must be 1" }),
    vehicle: vehicleSchema,
    site: maybe(
      z.object(
        { baroKPa: maybe(finite("barometer", 40, 115)), ambientC: maybe(finite("ambient temperature", -60, 60)) },
        { error: "site must be an object" },
      ),
    ),
    complaints: items("complaints", oneOf("complaint", COMPLAINTS)),
    circumstances: items("circumstances", oneOf("circumstance", CIRCUMSTANCES)),
    history: items("history", oneOf("history", HISTORIES)),
    readiness: maybe(
      z.record(z.string(), oneOf("monitor state", READINESS_STATES), { error: "readiness must be an object" }),
    ),
    codes: items("codes", codeSchema),
    samples: items("samples", sampleSchema),
    tests: items("tests", testRecordSchema),
  },
  { error: "a case must be a JSON object" },
);

export type CaseFile = z.output<typeof caseFileSchema>;
export type CaseVehicle = CaseFile["vehicle"];
export type Sample = CaseFile["samples"][number];
export type CaseCode = CaseFile["codes"][number];
export type TestRecord = CaseFile["tests"][number];

export interface CaseFileError {
  path: string;
  reason: string;
}

/** `["samples", 0, "values", "ECT"]` → `samples[0].values.ECT`; an empty path is `(case)`. */
export function pathText(path: readonly PropertyKey[]): string {
  let text = "";
  for (const part of path) text += typeof part === "number" ? `[${part}]` : text ? `.${String(part)}` : String(part);
  return text || "(case)";
}

/** Checks a case from outside. Every fault is named by path with what would have been accepted. Never throws. */
export function parseCaseFile(
  input: unknown,
): { ok: true; caseFile: CaseFile } | { ok: false; errors: CaseFileError[] } {
  const result = caseFileSchema.safeParse(input);
  if (result.success) return { ok: true, caseFile: result.data };
  return { ok: false, errors: result.error.issues.map((i) => ({ path: pathText(i.path), reason: i.message })) };
}
