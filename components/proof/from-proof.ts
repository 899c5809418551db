import { placesFor, shownBand } from "@/components/readings/judging";
import { MODE_WORDS } from "@/components/readings/mode-words";
import { rowLabel } from "@/components/readings/rows";
import { formatNumber } from "@/components/ui/format";
import { METRIC, shownUnit, type UnitPrefs } from "@/components/ui/units";
import { type BandRow, bandFor, judge } from "@/lib/diagnosis/bands";
import type { CaseFile } from "@/lib/diagnosis/case-file";
import { PROOF_TRIM_PCT, type ProofResult, type ProofRow, type ProofVerdict } from "@/lib/diagnosis/proof";
import { TESTS } from "@/lib/diagnosis/tests";
import type { Mode } from "@/lib/diagnosis/vocabulary";
import { PARAMETERS } from "@/lib/obd/parameters";
import type { ProofModeView, ProofPairView, ProofTestView } from "./model";

export interface ProofOptions {
  bands?: readonly BandRow[];
  units?: UnitPrefs;
}

const RANK: Record<ProofVerdict, number> = { fails: 0, incomplete: 1, passes: 2, "still-inside": 3 };
const worst = (verdicts: readonly ProofVerdict[]): ProofVerdict =>
  [...verdicts].sort((a, b) => RANK[a] - RANK[b])[0] ?? "incomplete";

/** The proof's rows by mode, in the order of the modes, with marks in the shop's units. */
export function proofModesFrom(result: ProofResult, caseFile: CaseFile, options: ProofOptions = {}): ProofModeView[] {
  const modes = [...new Set(result.rows.map((row) => row.mode))];
  return modes.map((mode) => {
    const rows = result.rows.filter((row) => row.mode === mode);
    const verdict = worst(rows.map((row) => row.verdict));
    // A mode that showed the fault leads with what was outside; a quiet one with a few readings.
    const told = rows.filter((row) => row.verdict !== "still-inside");
    const shown =
      told.length > 0
        ? [...told, ...rows.filter((row) => row.verdict === "still-inside" && row.parameter === "TOTALFT")]
        : rows.slice(0, 3);
    const trim = rows.find((row) => row.parameter === "TOTALFT");
    return {
      mode,
      title: MODE_WORDS[mode],
      note: modeNote(mode, caseFile, options.units ?? METRIC),
      figure: trim ? { before: signed(trim.before), after: signed(trim.after), unit: "% total trim" } : null,
      verdict,
      rule: ruleOf(verdict, rows),
      rows: shown.flatMap((row) =>
        [...trimParts(row, caseFile), pairOf(row, caseFile, options)].filter((pair) => pair !== null),
      ),
    };
  });
}

const signed = (n: number | null) => (n === null ? "–" : formatNumber(n, 1, { signed: true }));

function ruleOf(verdict: ProofVerdict, rows: readonly ProofRow[]): string {
  if (verdict === "still-inside") return "It was inside before and stays inside. Nothing new has appeared.";
  const told = rows.filter((row) => row.verdict === verdict);
  const lead = told.find((row) => row.parameter === "TOTALFT") ?? told[0];
  const more = told.length - 1;
  const rest =
    more === 0
      ? ""
      : verdict === "passes"
        ? ` ${more} more that ${more === 1 ? "was" : "were"} outside ${more === 1 ? "is" : "are"} inside.`
        : ` ${more} more likewise.`;
  return `${(lead?.rule ?? "").replace(/^[^:]*: /, "").replace(/^./, (c) => c.toUpperCase())}${rest}`;
}

function pairOf(row: ProofRow, caseFile: CaseFile, options: ProofOptions): ProofPairView | null {
  const units = options.units ?? METRIC;
  const id = [row.mode, row.parameter, row.bank, row.cylinder].filter((part) => part !== undefined).join("-");
  if (row.parameter === "TOTALFT") {
    const was = row.before ?? 0;
    return {
      id,
      label: caseFile.vehicle.banks === 2 ? `Total trim, bank ${row.bank}` : "Total trim",
      unit: "%",
      before: row.before,
      after: row.after,
      band: { low: -PROOF_TRIM_PCT, high: PROOF_TRIM_PCT },
      family: Math.abs(was) > PROOF_TRIM_PCT ? (was > 0 ? "lean" : "rich") : null,
      decimals: 1,
      signed: true,
      verdict: row.verdict,
    };
  }
  const band = bandFor(row.parameter, row.mode, caseFile.vehicle, options.bands, caseFile.site);
  if (!band) return null;
  const { toShown, unit } = shownUnit(row.parameter, units);
  const judged =
    row.before === null
      ? null
      : judge(row.parameter, row.before, row.mode, caseFile.vehicle, options.bands, caseFile.site);
  return {
    id,
    label:
      `${rowLabel(row.parameter, caseFile.vehicle.banks)}${row.cylinder === undefined ? "" : `, cylinder ${row.cylinder}`}`.replace(
        "Misfires by cylinder",
        "Misfires",
      ),
    unit: row.parameter === "misfireCounts" ? "count" : unit,
    before: row.before === null ? null : toShown(row.before),
    after: row.after === null ? null : toShown(row.after),
    band: shownBand(row.parameter, band, units),
    family: judged?.state === "outside" ? (judged.family ?? "mech") : null,
    decimals: placesFor(
      row.parameter,
      [row.before, row.after].filter((n) => n !== null),
      units,
    ),
    signed: PARAMETERS[row.parameter].signed === true,
    verdict: row.verdict,
  };
}

/** Short and long trim stand above the total they make up; they are shown, the total is judged. */
function trimParts(row: ProofRow, caseFile: CaseFile): ProofPairView[] {
  if (row.parameter !== "TOTALFT" || row.verdict === "still-inside") return [];
  const last = (phase: "before" | "after") =>
    caseFile.samples?.filter((s) => s.mode === row.mode && s.phase === phase).at(-1)?.values;
  return (row.bank === 2 ? (["SHRTFT2", "LONGFT2"] as const) : (["SHRTFT1", "LONGFT1"] as const)).flatMap(
    (parameter) => {
      const before = last("before")?.[parameter];
      const after = last("after")?.[parameter];
      if (typeof before !== "number") return [];
      const band = bandFor(parameter, row.mode, caseFile.vehicle);
      if (!band) return [];
      const isOut = (band.high !== null && before > band.high) || (band.low !== null && before < band.low);
      return [
        {
          id: `${row.mode}-${parameter}`,
          label:
            caseFile.vehicle.banks === 2
              ? PARAMETERS[parameter].label
              : PARAMETERS[parameter].label.replace(", bank 1", ""),
          unit: "%",
          before,
          after: typeof after === "number" ? after : null,
          band,
          family: isOut ? (before > 0 ? ("lean" as const) : ("rich" as const)) : null,
          decimals: 1,
          signed: true,
          verdict: "still-inside" as const,
        },
      ];
    },
  );
}

/** "780 and 760 r/min, coolant 91 and 90 °C": that like was compared with like. */
function modeNote(mode: Mode, caseFile: CaseFile, units: UnitPrefs): string | undefined {
  const last = (phase: "before" | "after") =>
    caseFile.samples?.filter((s) => s.mode === mode && s.phase === phase).at(-1)?.values;
  const pair = (id: "RPM" | "ECT", prefix: string) => {
    const { toShown, unit } = shownUnit(id, units);
    const figures = [last("before")?.[id], last("after")?.[id]]
      .filter((n) => typeof n === "number")
      .map((n) => formatNumber(toShown(n as number)));
    return figures.length === 0 ? null : `${prefix}${figures.join(" and ")} ${unit}`;
  };
  return [pair("RPM", ""), pair("ECT", "coolant ")].filter(Boolean).join(", ") || undefined;
}

export function proofTestsFrom(result: ProofResult): ProofTestView[] {
  const label = (id: ProofResult["tests"][number]["id"], outcome: string) =>
    TESTS[id].outcomes.find((o) => o.id === outcome)?.label ?? outcome.replaceAll("-", " ");
  return result.tests.map((test) => ({
    id: test.id,
    title: TESTS[test.id].title,
    before: test.before === null ? "not taken" : label(test.id, test.before),
    after: test.after === null ? null : label(test.id, test.after),
    verdict: test.verdict,
    rule: test.rule,
  }));
}
