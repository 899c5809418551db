import type { NextTest } from "./answer";
import { testApplies } from "./applies";
import type { CaseFile } from "./case-file";
import { PROVING } from "./knowledge/proving";
import { testDistribution } from "./likelihood";
import type { Observation } from "./observation";
import { TESTS } from "./tests";
import { type CauseId, TEST_IDS, type TestId } from "./vocabulary";

const LISTED = 8;
const NAMED_PER_OUTCOME = 3;
/** Walking over, hooking up, writing down: no test is free. Common practice. */
const SET_UP_MINUTES = 4;

/** Tests whose outcome only means something beside another. */
const NEEDS_FIRST: Partial<Record<TestId, (o: readonly Observation[]) => boolean>> = {
  "compression-wet": (o) => o.some((x) => x.kind === "test" && x.test === "compression" && x.abnormal),
  "coil-swap": (o) =>
    o.some(
      (x) =>
        (x.kind === "sign" && x.sign === "misfires" && x.abnormal) ||
        (x.kind === "sign" && x.sign === "gas" && x.states[0] === "misfire"),
    ),
  "injector-swap": (o) => o.some((x) => x.kind === "sign" && x.sign === "misfires" && x.abnormal),
  "power-balance": () => true,
  "road-log": (o) => o.length > 0,
  "wiggle-heat-cold": (o) => o.some((x) => x.kind === "circumstance" && x.circumstance === "intermittent"),
};

const log2 = (x: number) => (x > 0 ? Math.log2(x) : 0);

/**
 * Ranks the tests still to do by expected information per minute. The information of a test is what its outcome tells
 * about the cause on average: the mutual information of cause and outcome under the present probabilities.
 */
export function nextTests(
  caseFile: CaseFile,
  observations: readonly Observation[],
  causes: readonly CauseId[],
  totals: readonly number[],
  probability: readonly number[],
): NextTest[] {
  const done = new Set<TestId>(caseFile.tests.map((t) => t.id));
  for (const o of observations) if (o.kind === "test") done.add(o.test);
  const list: NextTest[] = [];
  for (const id of TEST_IDS) {
    if (done.has(id) || !testApplies(id, caseFile.vehicle) || !(NEEDS_FIRST[id]?.(observations) ?? true)) continue;
    const test = TESTS[id];
    const unrelated = testDistribution(id, null);
    const outcomes = Object.keys(unrelated);
    const p = outcomes.map(() => 0);
    let information = 0;
    const likelihoods = causes.map((cause) => testDistribution(id, cause));
    causes.forEach((_, c) => {
      outcomes.forEach((o, k) => {
        p[k] = (p[k] ?? 0) + (probability[c] ?? 0) * (likelihoods[c]?.[o] ?? 0);
      });
    });
    causes.forEach((_, c) => {
      if ((probability[c] ?? 0) < 1e-9) return;
      outcomes.forEach((o, k) => {
        const l = likelihoods[c]?.[o] ?? 0;
        information += (probability[c] ?? 0) * l * log2(l / (p[k] || 1));
      });
    });
    const bits = Math.max(0, information);
    list.push({
      id,
      title: test.title,
      minutes: test.minutes,
      tools: test.tools,
      cautions: test.cautions,
      expectedInformationBits: Number(bits.toFixed(4)),
      bitsPerMinute: Number((bits / (test.minutes + SET_UP_MINUTES)).toFixed(5)),
      outcomeProbability: Object.fromEntries(outcomes.map((o, k) => [o, Number((p[k] ?? 0).toFixed(4))])),
      ifOutcome: {},
      proves: Object.fromEntries(
        causes.flatMap((cause) => (PROVING[cause]?.[id] ? [[cause, PROVING[cause]?.[id]]] : [])),
      ),
    });
  }
  list.sort((a, b) => b.bitsPerMinute - a.bitsPerMinute || (a.id < b.id ? -1 : 1));
  const best = list.filter((t) => t.expectedInformationBits >= 0.002).slice(0, LISTED);
  for (const test of best) test.ifOutcome = fork(test.id, causes, totals);
  return best;
}

/** What each outcome would make of the ranking: the leading causes after it. */
function fork(id: TestId, causes: readonly CauseId[], totals: readonly number[]): NextTest["ifOutcome"] {
  const unrelated = testDistribution(id, null);
  const result: NextTest["ifOutcome"] = {};
  for (const outcome of Object.keys(unrelated)) {
    const base = unrelated[outcome] ?? 1;
    const after = causes.map(
      (cause, c) => (totals[c] ?? 0) + Math.log2((testDistribution(id, cause)[outcome] ?? base) / base),
    );
    const top = Math.max(...after);
    const raw = after.map((b) => 2 ** (b - top));
    const sum = raw.reduce((s, x) => s + x, 0);
    const lead = raw
      .map((x, c) => [c, x / sum] as const)
      .sort((a, b) => b[1] - a[1] || a[0] - b[0])
      .slice(0, NAMED_PER_OUTCOME);
    result[outcome] = Object.fromEntries(lead.map(([c, q]) => [causes[c] as CauseId, Number(q.toFixed(4))]));
  }
  return result;
}
