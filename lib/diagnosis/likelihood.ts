import {
  CIRCUMSTANCE_BASE,
  HISTORY_BASE,
  REPORTED_BASE,
  SIGN_BASE,
  type SignId,
  TEST_BASE,
} from "./knowledge/base-rates";
import { CODE_FAMILIES, type CodeFamily } from "./knowledge/code-families";
import { KNOWLEDGE } from "./knowledge/index";
import type { TrimBehaviour } from "./knowledge/shape";
import type { Observation, TrimReading } from "./observation";
import { TRIM_TABLE } from "./tables/trims";
import type { CauseId, ComplaintId, TestId } from "./vocabulary";

type Distribution = Record<string, number>;

/** No outcome is impossible: people misread, parts are intermittent. */
const FLOOR = 0.003;

/** What is stated, the rest in the usual proportion; probabilities from percent. */
function complete(base: Distribution, stated: Distribution | undefined): Distribution {
  const result: Distribution = {};
  if (!stated) {
    let total = 0;
    for (const [k, v] of Object.entries(base)) {
      result[k] = Math.max(v / 100, FLOOR);
      total += result[k];
    }
    for (const k of Object.keys(result)) result[k] = (result[k] ?? 0) / total;
    return result;
  }
  let left = 100;
  let free = 0;
  for (const [k, v] of Object.entries(base)) {
    if (k in stated) left -= stated[k] ?? 0;
    else free += v;
  }
  let total = 0;
  for (const [k, v] of Object.entries(base)) {
    const percent = k in stated ? (stated[k] ?? 0) : free > 0 ? (Math.max(left, 0) * v) / free : 0;
    result[k] = Math.max(percent / 100, FLOOR);
    total += result[k];
  }
  for (const k of Object.keys(result)) result[k] = (result[k] ?? 0) / total;
  return result;
}

const testCache = new Map<string, Distribution>();
const signCache = new Map<string, Distribution>();

/** Outcome probabilities of a test under a cause; `null` for an unrelated cause. */
export function testDistribution(test: TestId, cause: CauseId | null): Distribution {
  const stated = cause === null ? undefined : KNOWLEDGE[cause].tests?.[test];
  const key = stated ? `${test} ${cause}` : test;
  let d = testCache.get(key);
  if (!d) {
    d = complete(TEST_BASE[test], stated);
    testCache.set(key, d);
  }
  return d;
}

export function signDistribution(sign: SignId, cause: CauseId | null): Distribution {
  const stated = cause === null ? undefined : KNOWLEDGE[cause].signs?.[sign];
  const key = stated ? `${sign} ${cause}` : sign;
  let d = signCache.get(key);
  if (!d) {
    d = complete(SIGN_BASE[sign], stated);
    signCache.set(key, d);
  }
  return d;
}

const among = (d: Distribution, states: readonly string[]) => states.reduce((s, k) => s + (d[k] ?? 0), 0);
const bits = (p: number, q: number) => Math.log2(Math.max(p, FLOOR)) - Math.log2(Math.max(q, FLOOR));

/** log₂ of how much likelier a rate makes something than its base, both in percent. */
const rateBits = (percent: number | undefined, base: number) =>
  percent === undefined ? 0 : Math.log2(Math.max(percent, 0.25)) - Math.log2(Math.max(base, 0.25));

export const complaintBits = (complaint: ComplaintId, cause: CauseId): number =>
  // A complaint that a cause is not known for is still brought now and then, less often than by chance.
  rateBits(KNOWLEDGE[cause].reported[complaint] ?? 0.4 * REPORTED_BASE[complaint], REPORTED_BASE[complaint]);

const codeBits = (family: CodeFamily, cause: CauseId): number =>
  // A stored code that the cause does not set must come from somewhere else.
  rateBits(KNOWLEDGE[cause].codes?.[family] ?? 0.6 * CODE_FAMILIES[family].base, CODE_FAMILIES[family].base);

/* ---- trims: the pattern over modes and banks is one observation ---- */

const QUIET_CENTRE = 1;
const gaussian = (x: number, sigma: number) => Math.exp((-x * x) / (2 * sigma * sigma)) / (sigma * 2.5066282746);

function spreadOf(behaviour: TrimBehaviour, predicted: number): number {
  if (behaviour === "healthy") return 2.4;
  if (behaviour === "sensor-slow") return 5;
  return Math.hypot(3, 0.18 * predicted);
}

/** Density of one total trim given its prediction; a small broad part keeps one odd number from deciding. */
const density = (behaviour: TrimBehaviour, predicted: number, seen: number) =>
  0.95 * gaussian(seen - predicted, spreadOf(behaviour, predicted)) + 0.05 * gaussian(seen, 14);

export interface TrimLikelihood {
  likelihood: number;
  /** Share of the likelihood in which only bank 1, only bank 2, or both are affected. */
  where: { bank1: number; bank2: number; both: number };
}

/** Averages over the severities of a behaviour; with two banks a one-bank fault may lie on either. */
export function trimLikelihood(
  behaviour: TrimBehaviour,
  metering: "maf" | "map",
  trims: readonly TrimReading[],
  banks: number,
): TrimLikelihood {
  const where = { bank1: 0, bank2: 0, both: 0 };
  const product = (shifted: (bank: 1 | 2) => boolean, trimPct: readonly number[]) => {
    let p = 1;
    for (const t of trims)
      p *= density(
        behaviour,
        (shifted(t.bank) ? (trimPct[t.point] ?? 0) : 0) + QUIET_CENTRE * (behaviour === "healthy" ? 0.5 : 1),
        t.totalPct,
      );
    return p;
  };
  for (const row of TRIM_TABLE[metering][behaviour]) {
    if (row.scope === "one" && banks === 2) {
      where.bank1 += row.share * 0.5 * product((b) => b === 1, row.trimPct);
      where.bank2 += row.share * 0.5 * product((b) => b === 2, row.trimPct);
    } else where.both += row.share * product(() => true, row.trimPct);
  }
  return { likelihood: where.bank1 + where.bank2 + where.both, where };
}

const TRIM_CAP_BITS = 6;

/** The trim evidence of every behaviour against a quiet engine, computed once for a case. */
export function trimBits(
  metering: "maf" | "map",
  trims: readonly TrimReading[],
  banks: number,
): (cause: CauseId) => number {
  const cache = new Map<TrimBehaviour, number>();
  const of = (behaviour: TrimBehaviour) => {
    let known = cache.get(behaviour);
    if (known === undefined) {
      known = Math.log2(trimLikelihood(behaviour, metering, trims, banks).likelihood);
      cache.set(behaviour, known);
    }
    return known;
  };
  return (cause) => {
    const raw = of(KNOWLEDGE[cause].trims ?? "quiet") - of("quiet");
    return Math.max(-TRIM_CAP_BITS, Math.min(TRIM_CAP_BITS, raw));
  };
}

/* ---- one observation ---- */

/**
 * How much faith a kind of evidence earns beyond the table: people and monitors are less independent of each other than
 * tests at the bench. Chosen on the tuning cases only.
 */
export const FAITH = {
  test: 1,
  sign: 0.85,
  code: 0.8,
  trims: 0.85,
  circumstance: 0.6,
  history: 0.5,
  complaint: 0.75,
} as const;

/** Bits by which an observation favours a cause over an unrelated one, before any discount for repetition. */
export function observationBits(observation: Observation, cause: CauseId, trims: (cause: CauseId) => number): number {
  switch (observation.kind) {
    case "test":
      return (
        FAITH.test *
        bits(
          among(testDistribution(observation.test, cause), observation.states),
          among(testDistribution(observation.test, null), observation.states),
        )
      );
    case "sign":
      return (
        FAITH.sign *
        bits(
          among(signDistribution(observation.sign, cause), observation.states),
          among(signDistribution(observation.sign, null), observation.states),
        )
      );
    case "code":
      return FAITH.code * codeBits(observation.codeFamily, cause);
    case "codes-absent": {
      let sum = 0;
      for (const family of observation.families) {
        const p = KNOWLEDGE[cause].codes?.[family];
        if (p !== undefined && p > 20)
          sum += Math.log2(1 - Math.min(p, 90) / 100) - Math.log2(1 - CODE_FAMILIES[family].base / 100);
      }
      return FAITH.code * 0.5 * Math.max(sum, -3);
    }
    case "circumstance": {
      const base = CIRCUMSTANCE_BASE[observation.circumstance];
      return (
        FAITH.circumstance * rateBits(KNOWLEDGE[cause].circumstances?.[observation.circumstance] ?? 0.75 * base, base)
      );
    }
    case "history": {
      const base = HISTORY_BASE[observation.history];
      return FAITH.history * rateBits(KNOWLEDGE[cause].history?.[observation.history] ?? 0.85 * base, base);
    }
    case "trims":
      return FAITH.trims * trims(cause);
  }
}
