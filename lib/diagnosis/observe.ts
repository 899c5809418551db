import { describeCode } from "@/lib/obd/trouble-codes";
import type { CaseFile } from "./case-file";
import type { CauseFamily } from "./causes";
import { quietObservation } from "./findings/quiet";
import { SIGN_BASE, TEST_BASE } from "./knowledge/base-rates";
import { CODE_FAMILIES, type CodeFamily, codeFamily } from "./knowledge/code-families";
import { SOUND_OUTCOMES } from "./knowledge/proving";
import type { Observation, Theme } from "./observation";
import { readingFindings } from "./reading-findings";
import { Readings } from "./readings";
import { TESTS } from "./tests";
import { trimObservation } from "./trim-findings";
import { CIRCUMSTANCE_LABELS, HISTORY_LABELS, NEUTRAL_OUTCOMES, type TestId } from "./vocabulary";

const TEST_THEMES: Partial<Record<TestId, Theme>> = {
  "fuel-pressure": "fuel-supply",
  "fuel-pressure-under-load": "fuel-supply",
  "fuel-volume": "fuel-supply",
  "pump-current": "fuel-supply",
  "o2-forced-rich": "front-o2",
  "o2-forced-lean": "front-o2",
  "ect-resistance": "coolant",
  "thermostat-warm-up": "coolant",
  "soak-compare": "coolant",
  "boost-check": "boost",
  "vacuum-gauge": "vacuum",
  "exhaust-back-pressure": "vacuum",
  "catalyst-efficiency": "catalyst",
  "rear-o2-forced": "catalyst",
  "map-key-on": "map",
  "throttle-sweep": "throttle",
  "throttle-clean": "idle",
  "egr-block": "egr",
  "egr-command": "egr",
  "crank-signal": "crank",
  "cam-signal": "cam",
  "cam-crank-correlation": "cam",
  "phaser-command": "cam",
  "evap-smoke": "evap",
  "battery-and-charging": "electrical",
  "voltage-drop": "electrical",
  compression: "compression",
  "relative-compression": "compression",
  "cylinder-leakdown": "compression",
  "power-balance": "misfire",
};

const CODE_THEMES: Partial<Record<CodeFamily, Theme>> = {
  lean: "mixture",
  rich: "mixture",
  "trim-fault": "mixture",
  "o2-front-low": "front-o2",
  "o2-front-high": "front-o2",
  "o2-front-slow": "front-o2",
  "o2-front-dead": "front-o2",
  "o2-rear": "catalyst",
  catalyst: "catalyst",
  "ect-range": "coolant",
  "ect-hot": "coolant",
  "ect-cold": "coolant",
  "coolant-cool": "coolant",
  overheat: "coolant",
  "boost-low": "boost",
  "boost-high": "boost",
  boost: "boost",
  "fuel-pressure-low": "rail",
  "map-range": "map",
  "map-low": "map",
  "map-high": "map",
  "throttle-signal": "throttle",
  idle: "idle",
  "idle-high": "idle",
  "idle-low": "idle",
  "egr-high": "egr",
  "egr-low": "egr",
  egr: "egr",
  crank: "crank",
  cam: "cam",
  "cam-crank": "cam",
  "cam-phaser": "cam",
  "evap-leak": "evap",
  purge: "evap",
  "evap-vent": "evap",
  voltage: "electrical",
};

const CODE_FAMILY_COLOURS: Partial<Record<CodeFamily, CauseFamily>> = {
  lean: "lean",
  rich: "rich",
  coil: "spark",
  knock: "spark",
  crank: "spark",
  cam: "spark",
};

/** Directions of a soak comparison that a recorded test leaves open. */
const WIDER_OUTCOMES: Record<string, string[]> = { "coolant-off": ["coolant-cold", "coolant-hot"] };

function recordedTests(caseFile: CaseFile, note: (path: string, message: string) => void): Observation[] {
  const found = new Map<TestId, Observation>();
  caseFile.tests.forEach((test, index) => {
    const path = `tests[${index}]`;
    const { title, outcomes } = TESTS[test.id];
    if ((NEUTRAL_OUTCOMES as readonly string[]).includes(test.outcome)) return;
    const label = outcomes.find((o) => o.id === test.outcome)?.label;
    const known = TEST_BASE[test.id];
    // A reading may know more than the record: no pressure at all is recorded as "low".
    const states = (WIDER_OUTCOMES[test.outcome] ?? [test.outcome]).concat(
      test.id === "fuel-pressure" && test.outcome === "low" ? ["none"] : [],
    );
    if (!label || !states.some((s) => s in known)) {
      note(`${path}.outcome`, `"${test.outcome}" is not an outcome known for this test: kept, not used.`);
      return;
    }
    if (found.has(test.id)) note(path, `${title} is recorded more than once: the last outcome counts.`);
    const sound = SOUND_OUTCOMES[test.id];
    found.delete(test.id);
    found.set(test.id, {
      kind: "test",
      id: `${test.id}-${test.outcome}`,
      test: test.id,
      states,
      recorded: true,
      statement: `${title}: ${label.toLowerCase()}${test.cylinder ? ` (cylinder ${test.cylinder})` : ""}${test.bank ? ` (bank ${test.bank})` : ""}`,
      from: [path],
      // A swap has no sound outcome of its own; what moves with a part is out of the ordinary.
      abnormal: sound ? !sound.includes(test.outcome) : test.outcome === "fault-follows" || test.outcome === "rises",
      family: null,
      theme: TEST_THEMES[test.id] ?? null,
      ...(test.bank ? { bank: test.bank } : {}),
      ...(test.cylinder ? { cylinder: test.cylinder } : {}),
    });
  });
  return [...found.values()];
}

function codeObservations(caseFile: CaseFile): Observation[] {
  const families = new Map<CodeFamily, { codes: string[]; paths: string[]; bank?: number; cylinder?: number }>();
  caseFile.codes.forEach(({ code }, index) => {
    const family = codeFamily(code);
    if (!family) return;
    const { bank, cylinder } = describeCode(code) ?? {};
    const entry = families.get(family) ?? { codes: [], paths: [], bank, cylinder };
    if (entry.codes.length > 0 && entry.bank !== bank) entry.bank = undefined;
    entry.codes.push(code);
    entry.paths.push(`codes[${index}]`);
    families.set(family, entry);
  });
  const found: Observation[] = [...families]
    .filter(([family]) => family !== "misfire")
    .map(([family, { codes, paths, bank, cylinder }]) => ({
      kind: "code",
      id: `code-${family}`,
      codeFamily: family,
      present: true,
      statement: `${codes.join(", ")}: ${CODE_FAMILIES[family].says}`,
      from: paths,
      abnormal: true,
      family: CODE_FAMILY_COLOURS[family] ?? null,
      theme: CODE_THEMES[family] ?? null,
      ...(bank && caseFile.vehicle.banks === 2 ? { bank } : {}),
      ...(cylinder ? { cylinder } : {}),
    }));
  // A control unit that stored something else had its monitors running: what it did not store says a little.
  if (caseFile.codes.length > 0 && (caseFile.vehicle.modelYear ?? 2000) >= 1996) {
    const absent = (Object.keys(CODE_FAMILIES) as CodeFamily[]).filter((f) => !families.has(f));
    found.push({
      kind: "codes-absent",
      id: "codes-not-stored",
      families: absent,
      statement: "Other codes that a fault of their own would set are not stored",
      from: ["codes"],
      abnormal: false,
      family: null,
      theme: null,
    });
  }
  return found;
}

/** Everything the case says, each thing once: findings with what they rest on, and notes on what could not be used. */
export function observe(caseFile: CaseFile): { observations: Observation[]; readings: Readings } {
  const readings = new Readings(caseFile);
  const recorded = recordedTests(caseFile, (path, message) => readings.note(path, message));
  const trims = trimObservation(readings);
  const fromReadings = readingFindings(readings);

  const observations: Observation[] = [];
  if (trims) observations.push(trims);
  for (const o of fromReadings) {
    const same = o.kind === "test" ? recorded.find((x) => x.kind === "test" && x.test === o.test) : undefined;
    if (same?.kind !== "test" || o.kind !== "test") {
      observations.push(o);
      continue;
    }
    const agree = o.states.some((s) => same.states.includes(s));
    if (!agree && o.abnormal !== same.abnormal)
      readings.note(
        o.from[0] ?? same.from[0] ?? "tests",
        `${o.statement}, but ${TESTS[o.test].title.toLowerCase()} was recorded otherwise: the recorded outcome counts.`,
      );
    // The reading sharpens the record where it says the same more exactly.
    if (agree && o.states.length < same.states.length) same.states = o.states.filter((s) => same.states.includes(s));
    same.cylinder ??= o.cylinder;
    same.bank ??= o.bank;
    same.from.push(...o.from);
  }
  observations.push(...recorded);
  const quiet = quietObservation(observations, caseFile);
  if (quiet) observations.push(quiet);
  observations.push(...codeObservations(caseFile));
  for (const [i, circumstance] of caseFile.circumstances.entries())
    observations.push({
      kind: "circumstance",
      id: `when-${circumstance}`,
      circumstance,
      statement: `It happens: ${CIRCUMSTANCE_LABELS[circumstance].toLowerCase()}`,
      from: [`circumstances[${i}]`],
      abnormal: false,
      family: null,
      theme: null,
    });
  for (const [i, history] of caseFile.history.entries())
    observations.push({
      kind: "history",
      id: `history-${history}`,
      history,
      statement: HISTORY_LABELS[history],
      from: [`history[${i}]`],
      abnormal: false,
      family: null,
      theme: null,
    });
  return { observations: dedupe(observations), readings };
}

/** One id, one finding; an unstated order of samples must not matter, so findings are sorted by id at the end. */
function dedupe(observations: Observation[]): Observation[] {
  const seen = new Map<string, Observation>();
  for (const o of observations) if (!seen.has(o.id)) seen.set(o.id, o);
  return [...seen.values()].sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
}

export const signStates = (sign: keyof typeof SIGN_BASE) => Object.keys(SIGN_BASE[sign]);
