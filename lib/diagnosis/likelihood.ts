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
import { TRIM_BEHAVIOURS, type TrimBehaviour } from "./knowledge/shape";
import type { Observation, TrimReading } from "./observation";
import { TRIM_TABLE } from "./tables/trims";
import { CAUSE_IDS, type CauseId, type Circumstance, type ComplaintId, type History, type TestId } from "./vocabulary";

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

/** One test or sign, worked out for every cause: rows by cause index, columns by outcome. */
export interface OutcomeTable {
  outcomes: string[];
  column: Map<string, number>;
  /** Probabilities under an unrelated cause. */
  base: number[];
  rows: number[][];
  /** Σ p·log₂p of each row: what is left to learn once the cause is known. */
  selfInformation: number[];
}

const CAUSE_INDEX = new Map(CAUSE_IDS.map((id, i) => [id, i]));
export const causeIndex = (cause: CauseId): number => CAUSE_INDEX.get(cause) ?? 0;

function buildTable(base: Distribution, statedBy: (cause: CauseId) => Distribution | undefined): OutcomeTable {
  const outcomes = Object.keys(base);
  const flat = (d: Distribution) => outcomes.map((o) => d[o] ?? 0);
  const unrelated = flat(complete(base, undefined));
  const rows = CAUSE_IDS.map((cause) => {
    const stated = statedBy(cause);
    return stated ? flat(complete(base, stated)) : unrelated;
  });
  return {
    outcomes,
    column: new Map(outcomes.map((o, i) => [o, i])),
    base: unrelated,
    rows,
    selfInformation: rows.map((row) => row.reduce((s, p) => s + p * Math.log2(p), 0)),
  };
}

const testTables = new Map<TestId, OutcomeTable>();
const signTables = new Map<SignId, OutcomeTable>();

export function testTable(test: TestId): OutcomeTable {
  let table = testTables.get(test);
  if (!table) {
    table = buildTable(TEST_BASE[test], (cause) => KNOWLEDGE[cause].tests?.[test]);
    testTables.set(test, table);
  }
  return table;
}

export function signTable(sign: SignId): OutcomeTable {
  let table = signTables.get(sign);
  if (!table) {
    table = buildTable(SIGN_BASE[sign], (cause) => KNOWLEDGE[cause].signs?.[sign]);
    signTables.set(sign, table);
  }
  return table;
}

/** Outcome probabilities of a test under a cause; `null` for an unrelated cause. */
export function testDistribution(test: TestId, cause: CauseId | null): Distribution {
  const table = testTable(test);
  const row = cause === null ? table.base : (table.rows[causeIndex(cause)] ?? table.base);
  return Object.fromEntries(table.outcomes.map((o, i) => [o, row[i] ?? 0]));
}

/** Bits by which any of the states favours a cause over an unrelated one. */
function tableBits(table: OutcomeTable, states: readonly string[], cause: CauseId): number {
  const row = table.rows[causeIndex(cause)] ?? table.base;
  if (row === table.base) return 0;
  let p = 0;
  let q = 0;
  for (const state of states) {
    const k = table.column.get(state);
    if (k === undefined) continue;
    p += row[k] ?? 0;
    q += table.base[k] ?? 0;
  }
  return bits(p, q);
}

const bits = (p: number, q: number) => Math.log2(Math.max(p, FLOOR)) - Math.log2(Math.max(q, FLOOR));

/** log₂ of how much likelier a rate makes something than its base, both in percent. */
const rateBits = (percent: number | undefined, base: number) =>
  percent === undefined ? 0 : Math.log2(Math.max(percent, 0.25)) - Math.log2(Math.max(base, 0.25));

export const complaintBits = (complaint: ComplaintId, cause: CauseId): number =>
  // A complaint that a cause is not known for is still brought now and then, less often than by chance.
  rateBits(KNOWLEDGE[cause].reported[complaint] ?? 0.4 * REPORTED_BASE[complaint], REPORTED_BASE[complaint]);

/** When it happens and what was done before, in bits; part of what the customer says. */
export function circumstanceBits(circumstance: Circumstance, cause: CauseId): number {
  const base = CIRCUMSTANCE_BASE[circumstance];
  return FAITH.circumstance * rateBits(KNOWLEDGE[cause].circumstances?.[circumstance] ?? 0.75 * base, base);
}
export function historyBits(history: History, cause: CauseId): number {
  const base = HISTORY_BASE[history];
  return FAITH.history * rateBits(KNOWLEDGE[cause].history?.[history] ?? 0.85 * base, base);
}

const codeBits = (family: CodeFamily, cause: CauseId): number =>
  // A stored code that the cause does not set must come from somewhere else.
  rateBits(KNOWLEDGE[cause].codes?.[family] ?? 0.6 * CODE_FAMILIES[family].base, CODE_FAMILIES[family].base);

const tellingCodesCache = new Map<CauseId, [CodeFamily, number][]>();

/** Codes a cause usually sets, with what their absence says in bits. */
function tellingCodes(cause: CauseId): [CodeFamily, number][] {
  let list = tellingCodesCache.get(cause);
  if (!list) {
    list = (Object.entries(KNOWLEDGE[cause].codes ?? {}) as [CodeFamily, number][]).flatMap(([family, p]) =>
      p > 20
        ? [
            [family, Math.log2(1 - Math.min(p, 90) / 100) - Math.log2(1 - CODE_FAMILIES[family].base / 100)] as [
              CodeFamily,
              number,
            ],
          ]
        : [],
    );
    tellingCodesCache.set(cause, list);
  }
  return list;
}

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

/** The best behaviour may lead the worst by this much: no pattern of trims alone proves anything. */
const TRIM_RANGE_BITS = 9;

/**
 * The trim evidence of every behaviour against a quiet engine, computed once for a case. Trims of several modes and banks
 * come from one engine and one learned table, so past two they are not independent: their bits shrink together.
 */
export function trimBits(
  metering: "maf" | "map",
  trims: readonly TrimReading[],
  banks: number,
): (cause: CauseId) => number {
  const dependence = trims.length > 2 ? (2 / trims.length) ** 0.45 : 1;
  const raw = new Map<TrimBehaviour, number>(
    TRIM_BEHAVIOURS.map((b) => [b, dependence * Math.log2(trimLikelihood(b, metering, trims, banks).likelihood)]),
  );
  const floor = Math.max(...raw.values()) - TRIM_RANGE_BITS;
  const of = (behaviour: TrimBehaviour) => Math.max(raw.get(behaviour) ?? floor, floor);
  const quiet = of("quiet");
  return (cause) => of(KNOWLEDGE[cause].trims ?? "quiet") - quiet;
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
      return FAITH.test * tableBits(testTable(observation.test), observation.states, cause);
    case "sign":
      return FAITH.sign * tableBits(signTable(observation.sign), observation.states, cause);
    case "code":
      return FAITH.code * codeBits(observation.codeFamily, cause);
    case "codes-absent": {
      let sum = 0;
      for (const [family, weight] of tellingCodes(cause)) if (observation.families.includes(family)) sum += weight;
      return FAITH.code * 0.5 * Math.max(sum, -3);
    }
    case "circumstance":
    case "history":
      // What the customer says is weighed with the complaint, in the prior.
      return 0;
    case "trims":
      return FAITH.trims * trims(cause);
  }
}
