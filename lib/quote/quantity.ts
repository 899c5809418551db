import { parseScaled, toDecimal } from "./money";

/** Quantities and hours are counted in thousandths: 2400 is 2.4. */
export const MILLI_DIGITS = 3;

const formats = new Map<string, Intl.NumberFormat>();

/** A quantity as people of that locale write it, without needless zeros: 2400 → "2.4". */
export function formatQuantity(milli: number, locale: string): string {
  let format = formats.get(locale);
  if (!format) {
    format = new Intl.NumberFormat(locale, { minimumFractionDigits: 0, maximumFractionDigits: MILLI_DIGITS });
    formats.set(locale, format);
  }
  return format.format(toDecimal(milli, MILLI_DIGITS) as Intl.StringNumericLiteral).replace("-", "−");
}

/** Reads a quantity as typed; "1.2345" is refused rather than rounded. */
export function parseQuantity(text: string, locale: string): ReturnType<typeof parseScaled> {
  return parseScaled(text, MILLI_DIGITS, locale);
}
