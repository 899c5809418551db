import { z } from "zod";
import { moneyEntry, parseMoney, parseNumber } from "@/components/ui/parse-entry";
import { isCurrency } from "@/lib/quote/money";
import { EXCESS_RULES, type ShopSettings, shopSettings } from "@/lib/shops/schema";

/** The settings as they are typed: amounts and rates are text, the rest is as it is kept. */
export const shopFormValues = z
  .object({
    name: z.string().trim().min(1, "The shop needs a name.").max(120),
    address: z.string().trim().max(300),
    phone: z
      .string()
      .trim()
      .max(40)
      .regex(/^[+0-9 ().\-/x]*$/, "A phone number has digits, spaces and + ( ) - only."),
    email: z.union([z.literal(""), z.email("That is not an e-mail address.").max(200)]),
    registration: z.string().trim().max(80),
    currency: z
      .string()
      .trim()
      .toUpperCase()
      .refine(isCurrency, "That is not a currency; it is three letters, as USD."),
    locale: z.string().trim().max(12).refine(isLocale, "That is not a language and region, as en-US."),
    timeZone: shopSettings.shape.timeZone.unwrap(),
    dayOpens: z.string().regex(/^\d\d:\d\d$/, "Say when the shop opens."),
    dayCloses: z.string().regex(/^\d\d:\d\d$/, "Say when the shop closes."),
    taxName: z.string().trim().min(1, "The tax needs a name.").max(40),
    taxPercent: z.string().trim(),
    taxKinds: shopSettings.shape.taxKinds.unwrap(),
    rounding: shopSettings.shape.rounding.unwrap(),
    paper: shopSettings.shape.paper.unwrap(),
    paperWord: shopSettings.shape.paperWord.unwrap(),
    excessRule: z.enum(EXCESS_RULES),
    ceiling: z.string().trim(),
    quoteValidDays: z.string().trim(),
    writersMaySetRates: z.boolean(),
    pressure: z.enum(["kPa", "psi", "inHg"]),
    temperature: z.enum(["C", "F"]),
    distance: z.enum(["km", "mi"]),
    warrantyText: z.string().trim().max(1000),
    legalText: z.string().trim().max(2000),
    reason: z.string().trim().max(300),
  })
  .superRefine((values, refine) => {
    const fault = (path: string, message: string) => refine.addIssue({ code: "custom", path: [path], message });
    const percent = parseNumber(values.taxPercent);
    if (percent === null || percent < 0 || percent > 100) fault("taxPercent", "A tax rate is a number from 0 to 100.");
    else if (Math.abs(percent * 100 - Math.round(percent * 100)) > 1e-9)
      fault("taxPercent", "A tax rate has at most two decimals.");
    if (isCurrency(values.currency)) {
      const ceiling = parseMoney(values.ceiling, values.currency);
      if (ceiling === null || ceiling < 0) fault("ceiling", "That is not an amount of money.");
    }
    const days = parseNumber(values.quoteValidDays);
    if (days === null || !Number.isInteger(days) || days < 1 || days > 90)
      fault("quoteValidDays", "A quote holds from 1 to 90 whole days.");
    if (values.dayOpens && values.dayCloses && values.dayCloses <= values.dayOpens)
      fault("dayCloses", "The shop closes after it opens.");
  });
export type ShopFormValues = z.output<typeof shopFormValues>;

function isLocale(locale: string): boolean {
  try {
    new Intl.NumberFormat(locale);
    return locale !== "";
  } catch {
    return false;
  }
}

export function valuesOf(name: string, settings: ShopSettings): ShopFormValues {
  return {
    name,
    address: settings.address,
    phone: settings.phone,
    email: settings.email,
    registration: settings.registration,
    currency: settings.currency,
    locale: settings.locale,
    timeZone: settings.timeZone,
    dayOpens: settings.dayOpens,
    dayCloses: settings.dayCloses,
    taxName: settings.taxName,
    taxPercent: String(settings.taxBasisPoints / 100),
    taxKinds: settings.taxKinds,
    rounding: settings.rounding,
    paper: settings.paper,
    paperWord: settings.paperWord,
    excessRule: settings.excessRule,
    ceiling: moneyEntry(settings.defaultCeilingMinor, settings.currency),
    quoteValidDays: String(settings.quoteValidDays),
    writersMaySetRates: settings.writersMaySetRates,
    pressure: settings.units.pressure,
    temperature: settings.units.temperature,
    distance: settings.units.distance,
    warrantyText: settings.warrantyText,
    legalText: settings.legalText,
    reason: "",
  };
}

/** What is typed as it is kept; what the form does not show (the usual bands) stays as it was. */
export function settingsOf(values: ShopFormValues, kept: ShopSettings): ShopSettings {
  return {
    ...kept,
    address: values.address,
    phone: values.phone,
    email: values.email,
    registration: values.registration,
    currency: values.currency,
    locale: values.locale,
    timeZone: values.timeZone,
    dayOpens: values.dayOpens,
    dayCloses: values.dayCloses,
    taxName: values.taxName,
    taxBasisPoints: Math.round((parseNumber(values.taxPercent) ?? 0) * 100),
    taxKinds: values.taxKinds,
    rounding: values.rounding,
    paper: values.paper,
    paperWord: values.paperWord,
    excessRule: values.excessRule,
    defaultCeilingMinor: parseMoney(values.ceiling, values.currency) ?? kept.defaultCeilingMinor,
    quoteValidDays: parseNumber(values.quoteValidDays) ?? kept.quoteValidDays,
    writersMaySetRates: values.writersMaySetRates,
    units: { pressure: values.pressure, temperature: values.temperature, distance: values.distance },
    warrantyText: values.warrantyText,
    legalText: values.legalText,
  };
}

/** Where a fault the server names belongs in the form. */
export const SERVER_FIELDS: Record<string, keyof ShopFormValues> = {
  "/name": "name",
  "/reason": "reason",
  "/settings/taxBasisPoints": "taxPercent",
  "/settings/defaultCeilingMinor": "ceiling",
  "/settings/units/pressure": "pressure",
  "/settings/units/temperature": "temperature",
  "/settings/units/distance": "distance",
};

export const FIELD_WORDS: Record<keyof ShopFormValues, string> = {
  name: "Name",
  address: "Address",
  phone: "Phone",
  email: "E-mail",
  registration: "Registration",
  currency: "Currency",
  locale: "Language of numbers and dates",
  timeZone: "Time zone",
  dayOpens: "Opens",
  dayCloses: "Closes",
  taxName: "Name of the tax",
  taxPercent: "Tax rate",
  taxKinds: "Charged on",
  rounding: "Rounded",
  paper: "Paper size",
  paperWord: "A quote is called",
  excessRule: "More than was agreed",
  ceiling: "Ceiling of a diagnosis",
  quoteValidDays: "A quote holds",
  writersMaySetRates: "Service writers may change rates",
  pressure: "Pressure",
  temperature: "Temperature",
  distance: "Distance",
  warrantyText: "Warranty",
  legalText: "Terms",
  reason: "Reason",
};
