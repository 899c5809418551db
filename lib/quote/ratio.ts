import { divideHalfUp, toSafeNumber } from "./round";

/** An exact fraction; the denominator is positive. No sum here passes through floating point. */
export interface Ratio {
  n: bigint;
  d: bigint;
}

export const ratio = (n: bigint | number, d: bigint | number = 1n): Ratio => ({ n: BigInt(n), d: BigInt(d) });
export const ZERO = ratio(0n);
export const ONE = ratio(1n);

const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? a : gcd(b, a % b));

/** Lowest terms, so that long sums stay short. */
function reduced({ n, d }: Ratio): Ratio {
  const divisor = gcd(n < 0n ? -n : n, d);
  return divisor > 1n ? { n: n / divisor, d: d / divisor } : { n, d };
}

export const add = (a: Ratio, b: Ratio): Ratio =>
  a.d === b.d ? { n: a.n + b.n, d: a.d } : reduced({ n: a.n * b.d + b.n * a.d, d: a.d * b.d });
export const multiply = (a: Ratio, b: Ratio): Ratio => reduced({ n: a.n * b.n, d: a.d * b.d });
/** @throws RangeError when `b` is not above zero */
export function divide(a: Ratio, b: Ratio): Ratio {
  if (b.n <= 0n) throw new RangeError("the divisor must be above zero");
  return reduced({ n: a.n * b.d, d: a.d * b.n });
}
export const sum = (values: readonly Ratio[]): Ratio => values.reduce(add, ZERO);

export const roundHalfUp = (value: Ratio): number => toSafeNumber(divideHalfUp(value.n, value.d));

const floor = ({ n, d }: Ratio): bigint => (n >= 0n || n % d === 0n ? n / d : n / d - 1n);

/**
 * Whole numbers that lie nearest to the exact shares and add up to `total`: each share is rounded down, and what is
 * missing goes to the largest remainders, a tie to the earlier position. What is missing beyond one for each (when
 * `total` is not the rounded sum of the shares) goes round again.
 */
export function spread(total: number, shares: readonly Ratio[]): number[] {
  if (shares.length === 0) return [];
  const floors = shares.map(floor);
  let missing = BigInt(total) - floors.reduce((a, b) => a + b, 0n);
  const order = shares.map((share, index) => ({ index, left: { n: share.n - floors[index]! * share.d, d: share.d } }));
  order.sort((a, b) => {
    const difference = b.left.n * a.left.d - a.left.n * b.left.d;
    return difference === 0n ? a.index - b.index : difference > 0n ? 1 : -1;
  });
  const step = missing < 0n ? -1n : 1n;
  const walk = step < 0n ? [...order].reverse() : order;
  for (let at = 0; missing !== 0n; at = (at + 1) % walk.length) {
    const { index } = walk[at]!;
    floors[index] = floors[index]! + step;
    missing -= step;
  }
  return floors.map(toSafeNumber);
}
