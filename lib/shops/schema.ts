import { z } from "zod";

export const PRESSURE_UNITS = ["kPa", "psi", "inHg"] as const;
export const TEMPERATURE_UNITS = ["C", "F"] as const;
export const DISTANCE_UNITS = ["km", "mi"] as const;
export const EXCESS_RULES = ["any", "lesser-10-or-10pct", "greater-10-or-10pct-cap-50", "10pct"] as const;

const currencyCode = z.string().regex(/^[A-Z]{3}$/, "A currency is three capital letters, as USD.");

function isTimeZone(zone: string): boolean {
  try {
    new Intl.DateTimeFormat("en", { timeZone: zone });
    return true;
  } catch {
    return false;
  }
}

/** A shop's own settings: one document, edited by the owner, read by every screen and paper. */
export const shopSettings = z.object({
  address: z.string().max(300).default(""),
  phone: z.string().max(40).default(""),
  email: z.string().max(200).default(""),
  registration: z.string().max(80).default(""),
  locale: z.string().max(12).default("en-US"),
  timeZone: z.string().refine(isTimeZone, "No such time zone.").default("UTC"),
  currency: currencyCode.default("USD"),
  paper: z.enum(["A4", "Letter"]).default("Letter"),
  paperWord: z.enum(["estimate", "quotation"]).default("estimate"),
  taxName: z.string().max(40).default("Sales tax"),
  taxBasisPoints: z.number().int().min(0).max(10_000).default(0),
  taxKinds: z
    .array(z.enum(["labour", "part", "sublet", "fee", "diagnosis"]))
    .default(["labour", "part", "sublet", "fee", "diagnosis"]),
  rounding: z.enum(["line-then-sum", "sum-then-tax"]).default("sum-then-tax"),
  excessRule: z.enum(EXCESS_RULES).default("any"),
  defaultCeilingMinor: z.number().int().min(0).max(100_000_000).default(18_000),
  quoteValidDays: z.number().int().min(1).max(90).default(7),
  writersMaySetRates: z.boolean().default(false),
  units: z
    .object({
      pressure: z.enum(PRESSURE_UNITS).default("kPa"),
      temperature: z.enum(TEMPERATURE_UNITS).default("C"),
      distance: z.enum(DISTANCE_UNITS).default("km"),
    })
    .default({ pressure: "kPa", temperature: "C", distance: "km" }),
  bands: z.record(z.string(), z.unknown()).default({}),
  warrantyText: z.string().max(1000).default("Parts and labour: twelve months or 20,000 km, whichever comes first."),
  legalText: z.string().max(2000).default(""),
  dayOpens: z
    .string()
    .regex(/^\d\d:\d\d$/)
    .default("08:00"),
  dayCloses: z
    .string()
    .regex(/^\d\d:\d\d$/)
    .default("18:00"),
});

export type ShopSettings = z.output<typeof shopSettings>;

export const shopSettingsInput = z.object({
  name: z.string().trim().min(1, "The shop needs a name.").max(120),
  version: z.number().int(),
  settings: shopSettings,
  reason: z.string().trim().max(300).optional(),
});
