/** Currencies whose minor unit is not a hundredth (ISO 4217:2015, list one). */
const DIGITS: Record<string, number> = {
  ...Object.fromEntries(
    [
      "BIF",
      "CLP",
      "DJF",
      "GNF",
      "ISK",
      "JPY",
      "KMF",
      "KRW",
      "PYG",
      "RWF",
      "UGX",
      "VND",
      "VUV",
      "XAF",
      "XOF",
      "XPF",
    ].map((code) => [code, 0]),
  ),
  ...Object.fromEntries(["BHD", "IQD", "JOD", "KWD", "LYD", "OMR", "TND"].map((code) => [code, 3])),
};

const known = new Set(Intl.supportedValuesOf("currency"));

export const isCurrency = (code: string): boolean => known.has(code);

/**
 * Decimals of a currency's minor unit: 2 for most, 0 or 3 for some.
 *
 * @throws RangeError for an unknown code
 */
export function minorDigits(currency: string): number {
  if (!isCurrency(currency)) throw new RangeError(`“${currency}” is not a currency.`);
  return DIGITS[currency] ?? 2;
}

/** Minor units as a plain decimal: (74987, 2) → "749.87". Exact: no division takes place. */
export function toDecimal(minor: number, digits: number): string {
  if (!Number.isSafeInteger(minor)) throw new RangeError("minor units are whole numbers");
  const sign = minor < 0 ? "-" : "";
  const all = String(Math.abs(minor)).padStart(digits + 1, "0");
  return digits === 0 ? sign + all : `${sign}${all.slice(0, -digits)}.${all.slice(-digits)}`;
}

// making a formatter costs a hundred times what using it does
const formats = new Map<string, Intl.NumberFormat>();

function currencyFormat(currency: string, locale: string): Intl.NumberFormat {
  const key = `${locale} ${currency}`;
  let format = formats.get(key);
  if (!format) {
    const digits = minorDigits(currency);
    format = new Intl.NumberFormat(locale, {
      style: "currency",
      currency,
      minimumFractionDigits: digits,
      maximumFractionDigits: digits,
    });
    formats.set(key, format);
  }
  return format;
}

/**
 * An amount as people of that locale write it, with the currency's decimals and a real minus sign.
 *
 * @param minor integer minor units
 */
export function formatMoney(minor: number, currency: string, locale: string): string {
  // a decimal text is formatted exactly, whatever its size
  const text = toDecimal(minor, minorDigits(currency)) as Intl.StringNumericLiteral;
  return currencyFormat(currency, locale).format(text).replace("-", "−");
}

export type ParsedMoney =
  | { ok: true; minor: number }
  | { ok: false; reason: "empty" | "not-a-number" | "too-many-decimals" | "too-large" };

/** The signs a locale groups digits with and marks decimals by. */
export function numberSigns(locale: string): { decimal: string; group: string } {
  const parts = new Intl.NumberFormat(locale, { useGrouping: "always" }).formatToParts(1234567.5);
  const of = (type: string) => parts.find((part) => part.type === type)?.value ?? "";
  return { decimal: of("decimal") || ".", group: of("group") };
}

/**
 * Reads a decimal number as typed in a locale and scales it to an integer; nothing is rounded.
 *
 * @param digits how many decimals may be given
 */
export function parseScaled(text: string, digits: number, locale: string): ParsedMoney {
  const { decimal, group } = numberSigns(locale);
  let plain = text.trim().replace(/[−–]/g, "-");
  if (plain === "") return { ok: false, reason: "empty" };
  const cut = plain.lastIndexOf(decimal);
  const whole = cut < 0 ? plain : plain.slice(0, cut);
  const fraction = cut < 0 ? "" : plain.slice(cut + decimal.length);
  // groups of three only, so that "1,5" is never read as fifteen; all kinds of space count as one
  const spaces = /[\s\u00a0\u202f'’]/g;
  const separator = /[\s\u00a0\u202f'’]/.test(group)
    ? "[\\s\\u00a0\\u202f'’]"
    : `[${group.replace(/[\\\]^-]/g, "\\$&") || ","}]`;
  if (!new RegExp(`^-?(\\d+|\\d{1,3}(${separator}\\d{3})+)?$`).test(whole) || !/^\d*$/.test(fraction))
    return { ok: false, reason: "not-a-number" };
  if (whole.replace("-", "") === "" && fraction === "") return { ok: false, reason: "not-a-number" };
  if (fraction.replace(/0+$/, "").length > digits) return { ok: false, reason: "too-many-decimals" };
  plain = whole.replace(spaces, "").replaceAll(group, "") + fraction.slice(0, digits).padEnd(digits, "0");
  const minor = Number(plain === "-" ? "0" : plain);
  if (!Number.isSafeInteger(minor)) return { ok: false, reason: "too-large" };
  return { ok: true, minor: minor === 0 ? 0 : minor };
}

/** Reads an amount as typed, with or without the currency's sign or code around it. */
export function parseMoney(text: string, currency: string, locale: string): ParsedMoney {
  const parts = new Intl.NumberFormat(locale, { style: "currency", currency }).formatToParts(1);
  const sign = parts.find((part) => part.type === "currency")?.value ?? currency;
  // where the sign stood between minus and digits it leaves a space
  const bare = text
    .replace(sign, "")
    .replace(currency, "")
    .replace(/^\s*([-−–])\s+/, "$1");
  return parseScaled(bare, minorDigits(currency), locale);
}
