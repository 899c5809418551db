import { partOf } from "./price";
import { divideHalfUp, toSafeNumber } from "./round";

/** One step of a markup ladder: parts that cost up to `upToMinor` (the last step has no limit) get this markup on cost. */
export interface MarkupStep {
  upToMinor: number | null;
  markupBasisPoints: number;
}

/**
 * The selling price of a part by its cost. A dearer part is never sold for less than a cheaper one: at the start of a
 * step with a smaller markup the price stays at what the step before ended with until its own markup passes that.
 *
 * @param ladder ascending, the last step without limit
 * @throws RangeError when the ladder is not so, or the cost is negative
 */
export function priceFromCost(costMinor: number, ladder: readonly MarkupStep[]): number {
  if (!Number.isSafeInteger(costMinor) || costMinor < 0)
    throw new RangeError("a cost is a whole number of minor units, not below zero");
  checkLadder(ladder);
  let floor = 0;
  for (const { upToMinor, markupBasisPoints } of ladder) {
    if (upToMinor === null || costMinor <= upToMinor)
      return Math.max(floor, costMinor + partOf(costMinor, markupBasisPoints));
    floor = Math.max(floor, upToMinor + partOf(upToMinor, markupBasisPoints));
  }
  throw new RangeError("the last step of a ladder has no limit");
}

function checkLadder(ladder: readonly MarkupStep[]): void {
  const limits = ladder.map((step) => step.upToMinor);
  if (limits.at(-1) !== null) throw new RangeError("the last step of a ladder has no limit");
  for (let at = 0; at < limits.length - 1; at++) {
    const [limit, next] = [limits[at], limits[at + 1]];
    if (limit == null || limit < 0 || (next != null && next <= limit))
      throw new RangeError("the steps of a ladder rise");
  }
}

/**
 * Price for a wanted margin on the price: cost ÷ (1 − margin).
 *
 * @param marginBasisPoints below 10,000
 */
export function priceForMargin(costMinor: number, marginBasisPoints: number): number {
  if (!Number.isInteger(marginBasisPoints) || marginBasisPoints < 0 || marginBasisPoints >= 10_000)
    throw new RangeError("a margin lies between 0 and 100 %");
  return toSafeNumber(divideHalfUp(BigInt(costMinor) * 10_000n, BigInt(10_000 - marginBasisPoints)));
}

/** Margin on the price in hundredths of a percent: (price − cost) ÷ price; undefined without a price. */
export const marginBasisPoints = (priceMinor: number, costMinor: number): number | undefined =>
  priceMinor > 0 ? toSafeNumber(divideHalfUp(BigInt(priceMinor - costMinor) * 10_000n, BigInt(priceMinor))) : undefined;

/** Markup on the cost in hundredths of a percent: (price − cost) ÷ cost; undefined without a cost. */
export const markupBasisPoints = (priceMinor: number, costMinor: number): number | undefined =>
  costMinor > 0 ? toSafeNumber(divideHalfUp(BigInt(priceMinor - costMinor) * 10_000n, BigInt(costMinor))) : undefined;

/** Labour sold per hour sold, in minor units: the rate the shop really earns; undefined without hours. */
export const effectiveRateMinor = (labourSalesMinor: number, soldMilliHours: number): number | undefined =>
  soldMilliHours > 0 ? toSafeNumber(divideHalfUp(BigInt(labourSalesMinor) * 1000n, BigInt(soldMilliHours))) : undefined;
