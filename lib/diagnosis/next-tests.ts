import type { NextTest } from "./answer";
import { testApplies } from "./applies";
import type { CaseFile } from "./case-file";
import { PROVING } from "./knowledge/proving";
import { causeIndex, testTable } from "./likelihood";
import type { Observation } from "./observation";
import { TESTS } from "./tests";
import { type CauseId, TEST_IDS, type TestId } from "./vocabulary";

const LISTED = 8;
const NAMED_PER_OUTCOME = 3;
/** Of the most telling test's information, the least that is still suggested. */
const WORTH_DOING = 0.25;
/** Below this a test tells next to nothing. */
const LEAST_BITS = 0.002;

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

const rounded = (x: number) => Math.round(x * 1e4) / 1e4;
const log2 = (x: number) => (x > 0 ? Math.log2(x) : 0);

/**
 * Ranks the tests still to do by expected information per minute. The information of a test is what its outcome tells
 * about the cause on average: the mutual information of cause and outcome under the present probabilities.
 */
export function nextTests(
  caseFile: CaseFile,
  observations: readonly Observation[],
  causes: readonly CauseId[],
  probability: readonly number[],
): NextTest[] {
  const done = new Set<TestId>(caseFile.tests.map((t) => t.id));
  for (const o of observations) if (o.kind === "test") done.add(o.test);
  const indices = causes.map(causeIndex);
  const list: { id: TestId; information: number; p: number[]; perMinute: number }[] = [];
  for (const id of TEST_IDS) {
    if (done.has(id) || !testApplies(id, caseFile.vehicle) || !(NEEDS_FIRST[id]?.(observations) ?? true)) continue;
    const { outcomes, rows, selfInformation } = testTable(id);
    const p = outcomes.map(() => 0);
    let given = 0;
    for (let c = 0; c < causes.length; c++) {
      const q = probability[c] ?? 0;
      const index = indices[c] ?? 0;
      const row = rows[index] as number[];
      for (let k = 0; k < p.length; k++) p[k] = (p[k] as number) + q * (row[k] as number);
      given += q * (selfInformation[index] as number);
    }
    const information = Math.max(0, given - p.reduce((s, x) => s + x * log2(x), 0));
    if (information >= LEAST_BITS) list.push({ id, information, p, perMinute: information / TESTS[id].minutes });
  }
  list.sort((a, b) => b.perMinute - a.perMinute || (a.id < b.id ? -1 : 1));
  // A quick look that tells a quarter of what another test tells is no step forward, however quick.
  const most = list.reduce((m, t) => Math.max(m, t.information), 0);
  const telling = list.filter((t) => t.information >= WORTH_DOING * most);
  return telling.slice(0, LISTED).map(({ id, information, p, perMinute }) => {
    const { title, minutes, tools, cautions } = TESTS[id];
    return {
      id,
      title,
      minutes,
      tools,
      cautions,
      expectedInformationBits: rounded(information),
      bitsPerMinute: Math.round(perMinute * 1e5) / 1e5,
      outcomeProbability: Object.fromEntries(testTable(id).outcomes.map((o, k) => [o, rounded(p[k] ?? 0)])),
      ifOutcome: fork(id, causes, indices, probability),
      proves: Object.fromEntries(
        causes.flatMap((cause) => (PROVING[cause]?.[id] ? [[cause, PROVING[cause]?.[id]]] : [])),
      ),
    };
  });
}

/** What each outcome would make of the ranking: the leading causes after it. */
function fork(
  id: TestId,
  causes: readonly CauseId[],
  indices: readonly number[],
  probability: readonly number[],
): NextTest["ifOutcome"] {
  const { outcomes, rows } = testTable(id);
  const result: NextTest["ifOutcome"] = {};
  outcomes.forEach((outcome, k) => {
    const likelihood = indices.map((index, c) => (probability[c] ?? 0) * (rows[index]?.[k] ?? 0));
    const sum = likelihood.reduce((s, x) => s + x, 0);
    const lead: number[] = [];
    for (let n = 0; n < NAMED_PER_OUTCOME; n++) {
      let best = -1;
      for (let c = 0; c < likelihood.length; c++)
        if (!lead.includes(c) && (best < 0 || (likelihood[c] ?? 0) > (likelihood[best] ?? 0))) best = c;
      if (best >= 0) lead.push(best);
    }
    result[outcome] = Object.fromEntries(lead.map((c) => [causes[c] as CauseId, rounded((likelihood[c] ?? 0) / sum)]));
  });
  return result;
}
