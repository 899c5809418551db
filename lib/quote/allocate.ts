import { toSafeNumber } from "./round";

/**
 * Splits an amount over weights so that the parts add up to it exactly.
 *
 * @param amountMinor integer minor units of one currency; may be negative
 * @param weights non-negative integers, at least one above zero
 * @returns integers in minor units, in the order of `weights`
 * @throws RangeError when an argument is not as above
 * Method: largest remainder; a tie goes to the earlier position.
 */
export function allocate(amountMinor: number, weights: readonly number[]): number[] {
  if (!Number.isSafeInteger(amountMinor)) throw new RangeError("the amount must be a whole number");
  if (weights.some((weight) => !Number.isSafeInteger(weight) || weight < 0))
    throw new RangeError("weights must be whole and not negative");
  const total = weights.reduce((sum, weight) => sum + BigInt(weight), 0n);
  if (total === 0n) throw new RangeError("at least one weight must be above zero");
  const sign = amountMinor < 0 ? -1n : 1n;
  const amount = BigInt(Math.abs(amountMinor));
  const parts = weights.map((weight) => (amount * BigInt(weight)) / total);
  const remainders = weights.map((weight, index) => ({ index, left: (amount * BigInt(weight)) % total }));
  let short = amount - parts.reduce((sum, part) => sum + part, 0n);
  remainders.sort((a, b) => (a.left === b.left ? a.index - b.index : a.left > b.left ? -1 : 1));
  for (const { index } of remainders) {
    if (short === 0n) break;
    parts[index] = parts[index]! + 1n;
    short -= 1n;
  }
  return parts.map((part) => toSafeNumber(sign * part));
}
