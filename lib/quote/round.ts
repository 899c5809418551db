/**
 * `numerator / denominator` as the nearest integer; a half goes away from zero ("half up": 2.345 → 2.35, −2.345 → −2.35).
 * This is the one rounding rule of all money here. For positive amounts it is what the Streamlined Sales and Use Tax
 * Agreement, section 324, prescribes: carry to the third decimal and round up when that exceeds four.
 *
 * @throws RangeError when the denominator is not positive
 */
export function divideHalfUp(numerator: bigint, denominator: bigint): bigint {
  if (denominator <= 0n) throw new RangeError("the denominator must be positive");
  const size = numerator < 0n ? -numerator : numerator;
  const quotient = (2n * size + denominator) / (2n * denominator);
  return numerator < 0n ? -quotient : quotient;
}

/** A bigint that fits a safe integer, as a number. */
export function toSafeNumber(value: bigint): number {
  if (value > BigInt(Number.MAX_SAFE_INTEGER) || value < BigInt(Number.MIN_SAFE_INTEGER))
    throw new RangeError("the amount is too large");
  return Number(value);
}
