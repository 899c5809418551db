import type { LedgerCauseView } from "./model";

/** One axis in bits for the whole ledger. */
export interface BitsScale {
  width: number;
  zero: number;
  /** Pixels a bit. */
  perBit: number;
  at(bits: number): number;
  /** Grid lines with their labels. */
  ticks: readonly { bits: number; x: number }[];
}

export function netBits(cause: LedgerCauseView): number {
  return cause.priorBits + cause.evidence.reduce((sum, e) => sum + e.weight, 0);
}

const sumIf = (cause: LedgerCauseView, test: (w: number) => boolean) =>
  cause.evidence.reduce((sum, e) => (test(e.weight) ? sum + e.weight : sum), 0);

export const bitsFor = (cause: LedgerCauseView) => sumIf(cause, (w) => w > 0);
export const bitsAgainst = (cause: LedgerCauseView) => sumIf(cause, (w) => w < 0);

/**
 * Fits the three likeliest causes whole; others may run off the left edge, where a sign says so. At most 26 px a bit,
 * so that a nearly empty ledger does not shout.
 */
export function bitsScale(causes: readonly LedgerCauseView[], width: number): BitsScale {
  const leaders = causes.slice(0, 3);
  const right = Math.max(3, ...causes.map((c) => Math.max(bitsFor(c), netBits(c))));
  const left = Math.max(4, ...leaders.map((c) => Math.max(-c.priorBits - bitsAgainst(c), -netBits(c))));
  const perBit = Math.min(26, width / (left + right + 0.6));
  // What is not needed on the right goes to the left, where the long tails are.
  const zero = Math.round(width - (right + 0.3) * perBit);
  const step = perBit < 9 ? 8 : perBit < 18 ? 4 : 2;
  const from = -Math.floor(zero / perBit / step) * step;
  const to = Math.floor((width - zero) / perBit / step) * step;
  const at = (bits: number) => Math.round((zero + bits * perBit) * 10) / 10;
  const ticks = [];
  for (let bits = from; bits <= to; bits += step) ticks.push({ bits, x: at(bits) });
  return { width, zero, perBit, at, ticks };
}
