import { currencyDecimals } from "./format";

/**
 * A number as people type it: a decimal point or comma, grouping, a real or a typewriter minus.
 * "182,000" is a grouped whole number, "14,1" a decimal comma. Returns null for anything else.
 */
export function parseNumber(text: string): number | null {
  let t = text
    .trim()
    .replaceAll("−", "-")
    .replaceAll(/[\s\u00a0\u202f']/g, "");
  if (t === "") return null;
  if (/^[+-]?\d{1,3}(,\d{3})+(\.\d*)?$/.test(t)) t = t.replaceAll(",", "");
  else if (/^[+-]?\d*,\d+$/.test(t)) t = t.replace(",", ".");
  if (!/^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(t)) return null;
  const n = Number(t);
  return Number.isFinite(n) ? n : null;
}

/** An amount as typed ("180", "$1,180.50", "180 USD") in minor units, or null. */
export function parseMoney(text: string, currency: string): number | null {
  // a sign or a code of the currency stands before or after; a letter between figures is a slip, not to be left out
  if (/\d[^\d.,'\s]+\d/u.test(text)) return null;
  const n = parseNumber(text.replaceAll(/[^\d.,+\-−\s]/g, ""));
  if (n === null) return null;
  const factor = 10 ** currencyDecimals(currency);
  const minor = Math.round(n * factor);
  return Math.abs(n * factor - minor) < 1e-6 ? minor : null;
}

/** An amount for an input: "180.00". */
export function moneyEntry(minor: number, currency: string): string {
  const decimals = currencyDecimals(currency);
  return (minor / 10 ** decimals).toFixed(decimals);
}
