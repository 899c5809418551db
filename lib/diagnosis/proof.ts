import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import { describeCode } from "@/lib/obd/trouble-codes";
import { type BandRow, bandFor, bandText, DEFAULT_BANDS, judge } from "./bands";
import type { CaseFile, CaseVehicle, CylinderReadings, Sample, TestRecord } from "./case-file";
import { CAUSES } from "./causes";
import { PROVING, SOUND_OUTCOMES } from "./knowledge/proving";
import { TESTS } from "./tests";
import { type CauseId, type CodeStatus, MODE_LABELS, type Mode, type Phase, type ReadinessState } from "./vocabulary";

export type ProofVerdict = "passes" | "still-inside" | "fails" | "incomplete";

export interface ProofRow {
  mode: Mode;
  /** A parameter id, or `TOTALFT` for short and long trim together. */
  parameter: ParameterId | "TOTALFT";
  bank?: number;
  cylinder?: number;
  before: number | null;
  after: number | null;
  verdict: ProofVerdict;
  /** One sentence with the numbers. */
  rule: string;
}

export interface ProofTestRow {
  id: TestRecord["id"];
  before: string | null;
  after: string | null;
  verdict: ProofVerdict;
  rule: string;
}

export interface ProofResult {
  verdict: ProofVerdict;
  rows: ProofRow[];
  tests: ProofTestRow[];
  missing: { what: string; message: string }[];
  codes: { code: string; state: "gone" | "returned" | "new" | "not-read"; message: string }[];
  monitors: { monitor: string; state: ReadinessState; message: string }[];
}

/** A recorded test; without a phase it is as found. */
export type ProofTest = Pick<TestRecord, "id" | "outcome"> & Partial<TestRecord> & { phase?: Phase };

export interface ProofInput {
  caseFile: CaseFile;
  provenCauses: readonly CauseId[];
  /** Recorded tests; those of phase `after` repeat what showed the fault. Without a phase: as found. */
  tests?: readonly ProofTest[];
  /** Codes read after the repair; absent or undefined: not read. */
  afterCodes?: readonly { code: string; status: CodeStatus }[];
  readiness?: Record<string, ReadinessState> | null;
  bands?: readonly BandRow[];
}

/** Total trim must come back to this after a repair: sterner than the everyday band (common practice). */
export const PROOF_TRIM_PCT = 5;
/** Below these since clearing, long trim has not relearned and is not judged. */
const RELEARN_KM = 80;
const RELEARN_WARM_UPS = 3;

const num = (sample: Sample | undefined, id: ParameterId): number | null => {
  const v = sample?.values[id];
  return typeof v === "number" ? v : null;
};
const last = (samples: Sample[], mode: Mode, phase: Phase) =>
  samples.filter((s) => s.mode === mode && s.phase === phase).at(-1);
const signed = (n: number) => `${n > 0 ? "+" : ""}${Math.round(n * 10) / 10}`;

function justCleared(samples: Sample[], history: CaseFile["history"]): boolean {
  const after = samples.filter((s) => s.phase === "after");
  const known = after.some((s) => num(s, "CLR_DIST") !== null || num(s, "WARM_UPS") !== null);
  const fresh = after.some(
    (s) => (num(s, "CLR_DIST") ?? Infinity) < RELEARN_KM || (num(s, "WARM_UPS") ?? Infinity) < RELEARN_WARM_UPS,
  );
  return known ? fresh : history.includes("codes-cleared") || history.includes("battery-off");
}

function trimRow(before: Sample, after: Sample | undefined, bank: 1 | 2, cleared: boolean): ProofRow | null {
  const pair = (s: Sample | undefined) => ({
    short: num(s, bank === 1 ? "SHRTFT1" : "SHRTFT2"),
    long: num(s, bank === 1 ? "LONGFT1" : "LONGFT2"),
  });
  const b = pair(before);
  if (b.short === null && b.long === null) return null;
  const beforeTotal = (b.short ?? 0) + (b.long ?? 0);
  const wasOff = Math.abs(beforeTotal) > PROOF_TRIM_PCT;
  const a = pair(after);
  const where = `${MODE_LABELS[before.mode]}, bank ${bank}`;
  const row = { mode: before.mode, parameter: "TOTALFT" as const, bank, before: beforeTotal };
  if (!after || (a.short === null && a.long === null))
    return wasOff
      ? {
          ...row,
          after: null,
          verdict: "incomplete",
          rule: `${where}: total trim was ${signed(beforeTotal)} %; no reading after the repair in this mode.`,
        }
      : null;
  if (cleared && a.short === null)
    return {
      ...row,
      after: null,
      verdict: "incomplete",
      rule: `${where}: codes were just cleared, long trim alone is not judged; take short trim.`,
    };
  const total = (a.short ?? 0) + (a.long ?? 0);
  const ok = Math.abs(total) <= PROOF_TRIM_PCT && (!cleared || Math.abs(a.short ?? 0) <= PROOF_TRIM_PCT);
  const note = cleared ? " Long trim restarted when codes were cleared, so short and total count." : "";
  return {
    ...row,
    after: total,
    verdict: ok ? (wasOff ? "passes" : "still-inside") : "fails",
    rule: `${where}: total trim ${signed(beforeTotal)} % before, ${signed(total)} % after; proof asks for −${PROOF_TRIM_PCT} to +${PROOF_TRIM_PCT} %.${note}`,
  };
}

const NOT_PROOF =
  /FT[12]$|^(fuelPressureSpecKPa|frpCommandedKPa|boostCommandedKPa|plugGapLimitMm|camAdvanceCommandedDeg|FLI|RUNTM|CLR_DIST|WARM_UPS|VSS|engineOffHours|BARO|AAT|RPM_|EVAP_PCT|EGR_PCT)$/;

/** Fuel pressure is judged against the maker's figure where it stands beside the reading: ± 10 % (common practice). */
function specBand(sample: Sample, id: ParameterId) {
  const spec =
    id === "fuelPressureKPa"
      ? num(sample, "fuelPressureSpecKPa")
      : id === "FRP"
        ? num(sample, "frpCommandedKPa")
        : null;
  return spec === null ? null : { low: spec * 0.9, high: spec * 1.1 };
}

function parameterRows(
  before: Sample,
  after: Sample | undefined,
  vehicle: CaseVehicle,
  bands: readonly BandRow[],
  site: CaseFile["site"],
): ProofRow[] {
  const rows: ProofRow[] = [];
  const one = (id: ParameterId, was: number, is: number | null, cylinder?: number) => {
    const own = specBand(before, id);
    const band = own ?? bandFor(id, before.mode, vehicle, bands, site);
    if (!band) return;
    const inside = (v: number, s: Sample) => {
      const limit = specBand(s, id) ?? own;
      if (limit) return v >= limit.low && v <= limit.high;
      return judge(id, v, s.mode, vehicle, bands, site).state !== "outside";
    };
    if (!own && judge(id, was, before.mode, vehicle, bands, site).state === "impossible") return;
    const wasIn = inside(was, before);
    if (wasIn && is === null) return;
    const isIn = is !== null && inside(is, after ?? before);
    const { label, unit } = PARAMETERS[id];
    const what = `${MODE_LABELS[before.mode]}: ${label}${cylinder ? `, cylinder ${cylinder}` : ""}`;
    const u = unit ? ` ${unit}` : "";
    const verdict: ProofVerdict = is === null ? "incomplete" : isIn ? (wasIn ? "still-inside" : "passes") : "fails";
    rows.push({
      mode: before.mode,
      parameter: id,
      ...(cylinder ? { cylinder } : {}),
      before: was,
      after: is,
      verdict,
      rule:
        is === null
          ? `${what} was ${was}${u} (usual ${bandText(band, unit)}); no reading after the repair.`
          : `${what} ${was}${u} before, ${is}${u} after; usual ${bandText(band, unit)}.`,
    });
  };
  for (const [key, value] of Object.entries(before.values)) {
    if (!(key in PARAMETERS) || NOT_PROOF.test(key)) continue;
    const id = key as ParameterId;
    if (typeof value === "number") one(id, value, num(after, id));
    else if (PARAMETERS[id].kind === "cylinders" && typeof value === "object" && value !== null) {
      const now = after?.values[id] as CylinderReadings | undefined;
      for (const [cylinder, was] of Object.entries(value as CylinderReadings))
        one(id, was, now?.[cylinder] ?? null, Number(cylinder));
    }
  }
  return rows;
}

function testRows(input: ProofInput): ProofTestRow[] {
  const all: readonly ProofTest[] = input.tests ?? input.caseFile.tests;
  const rows: ProofTestRow[] = [];
  for (const cause of input.provenCauses) {
    for (const [id, bad] of Object.entries(PROVING[cause] ?? {}) as [TestRecord["id"], readonly string[]][]) {
      const showed = all.find((t) => t.id === id && t.phase !== "after" && bad.includes(t.outcome));
      if (!showed || rows.some((r) => r.id === id)) continue;
      const good = SOUND_OUTCOMES[id];
      const again = all.filter((t) => t.id === id && t.phase === "after").at(-1);
      const label = (o: string) => TESTS[id].outcomes.find((x) => x.id === o)?.label.toLowerCase() ?? o;
      const title = TESTS[id].title;
      if (!again)
        rows.push({
          id,
          before: showed.outcome,
          after: null,
          verdict: "incomplete",
          rule: `${title} showed the fault (${label(showed.outcome)}); it has not been repeated after the repair.`,
        });
      else {
        const ok = good ? good.includes(again.outcome) : !bad.includes(again.outcome);
        rows.push({
          id,
          before: showed.outcome,
          after: again.outcome,
          verdict: ok ? "passes" : "fails",
          rule: `${title}: ${label(showed.outcome)} before, ${label(again.outcome)} after.`,
        });
      }
    }
  }
  return rows;
}

/** The readiness monitor that watches what a code is about. Source: SAE J1979 PID 01. */
function monitorOf(code: string): string | null {
  const system = describeCode(code)?.system ?? "";
  if (system === "catalyst") return "CAT";
  if (system === "evaporative") return "EVAP";
  if (system === "oxygen sensor") return /P0(03|05|13[5]|141|155|161)/.test(code) ? "HTR" : "O2S";
  if (system === "EGR") return "EGR/VVT";
  if (system === "secondary air") return "AIR";
  if (system === "misfire") return "MIS";
  if (system === "mixture / fuel trim") return "FUEL";
  return null;
}

/**
 * Proves a repair from what was measured after it. Trims must be back within ±5 % in every mode that was off; other
 * readings that were out of band must be inside; a fault that no reading shows is proven by its confirming test repeated
 * with a good outcome; codes must not have returned; monitors are ready or said not to be.
 */
export function judgeProof(input: ProofInput): ProofResult {
  const { caseFile, provenCauses, bands = DEFAULT_BANDS } = input;
  const { samples, vehicle, site, history } = caseFile;
  const cleared = justCleared(samples, history);
  const rows: ProofRow[] = [];
  const modes = [...new Set(samples.filter((s) => s.phase === "before").map((s) => s.mode))];
  for (const mode of modes) {
    const before = last(samples, mode, "before");
    if (!before) continue;
    const after = last(samples, mode, "after");
    for (const bank of vehicle.banks === 2 ? ([1, 2] as const) : ([1] as const)) {
      const row = trimRow(before, after, bank, cleared);
      if (row) rows.push(row);
    }
    rows.push(...parameterRows(before, after, vehicle, bands, site));
  }
  const tests = testRows(input);

  const missing: ProofResult["missing"] = [
    ...[...new Set(rows.filter((r) => r.verdict === "incomplete").map((r) => r.mode))].map((mode) => ({
      what: mode,
      message: `Take the readings again, ${MODE_LABELS[mode].toLowerCase()}: that is where the fault showed.`,
    })),
    ...tests.filter((t) => t.verdict === "incomplete").map((t) => ({ what: t.id, message: t.rule })),
  ];

  const codes: ProofResult["codes"] = caseFile.codes.map(({ code }) => {
    if (!input.afterCodes)
      return { code, state: "not-read", message: `${code}: codes have not been read after the repair.` };
    return input.afterCodes.some((c) => c.code === code && c.status !== "permanent")
      ? { code, state: "returned", message: `${code} has returned.` }
      : { code, state: "gone", message: `${code} has not returned.` };
  });
  for (const { code, status } of input.afterCodes ?? [])
    if (status !== "permanent" && !caseFile.codes.some((c) => c.code === code))
      codes.push({ code, state: "new", message: `${code} is new since the repair.` });
  if (codes.some((c) => c.state === "not-read"))
    missing.push({ what: "codes", message: "Read the codes again after the repair." });

  const readiness = input.readiness ?? caseFile.readiness ?? {};
  const monitors = Object.entries(readiness).map(([monitor, state]) => ({
    monitor,
    state,
    message:
      state === "complete"
        ? `${monitor} monitor complete.`
        : state === "incomplete"
          ? `${monitor} monitor not complete yet: say so if an inspection is near.`
          : `${monitor} monitor not fitted.`,
  }));

  // Where only a code showed the fault, its own monitor must have run: no code from a test that never ran proves nothing.
  const shown = rows.filter((r) => r.verdict !== "still-inside").length + tests.length;
  if (shown === 0 && caseFile.codes.length > 0)
    for (const { code } of caseFile.codes) {
      const monitor = monitorOf(code);
      if (monitor && readiness[monitor] !== "complete")
        missing.push({
          what: monitor,
          message: `${code}: its monitor (${monitor}) has not completed since the codes were cleared.`,
        });
    }
  if (shown === 0 && caseFile.codes.length === 0 && provenCauses.length > 0)
    missing.push({
      what: "proof",
      message: `Nothing recorded shows the fault (${provenCauses.map((c) => CAUSES[c].title.toLowerCase()).join(", ")}); record the test or reading that showed it, repeated with a good outcome.`,
    });

  const verdicts = [...rows.map((r) => r.verdict), ...tests.map((t) => t.verdict)];
  const failed = verdicts.includes("fails") || codes.some((c) => c.state === "returned");
  const passed = verdicts.includes("passes") || codes.some((c) => c.state === "gone");
  const verdict: ProofVerdict = failed
    ? "fails"
    : missing.length > 0
      ? "incomplete"
      : passed
        ? "passes"
        : "still-inside";
  return { verdict, rows, tests, missing, codes, monitors };
}
