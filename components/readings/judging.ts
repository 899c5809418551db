import type { Band } from "@/components/ui/band-scale";
import type { Family } from "@/components/ui/family";
import { formatNumber } from "@/components/ui/format";
import { shownUnit, type UnitPrefs } from "@/components/ui/units";
import { bandText, type Judgement, judge, judgeTotalTrim } from "@/lib/diagnosis/bands";
import type { Mode } from "@/lib/diagnosis/vocabulary";
import { lambdaFromGas } from "@/lib/engine/lambda";
import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import type { SheetContext, Values } from "./model";

export function judgeReading(parameter: ParameterId, value: number, mode: Mode, context: SheetContext): Judgement {
  return judge(parameter, value, mode, context.vehicle, context.bands, context.site);
}

/** A band in the units the shop reads. */
export function shownBand(parameter: ParameterId, band: Band, units: UnitPrefs): Band {
  const { toShown } = shownUnit(parameter, units);
  return { low: band.low === null ? null : toShown(band.low), high: band.high === null ? null : toShown(band.high) };
}

/**
 * Decimals for readings that stand in one row: as many as the finest of them needs, at most one more than the
 * parameter carries by custom; trims always one.
 */
export function placesFor(parameter: ParameterId, values: readonly number[], units: UnitPrefs): number {
  const { toShown, decimals, unit } = shownUnit(parameter, units);
  if (isTrim(parameter)) return 1;
  if (unit !== PARAMETERS[parameter].unit && unit !== "° BTDC") return decimals;
  const most = decimals + (decimals < 2 ? 1 : 0);
  const needed = values.map((value) => {
    for (let places = 0; places < most; places++)
      if (Number(toShown(value).toFixed(places)) === Number(toShown(value).toFixed(most))) return places;
    return most;
  });
  return Math.max(0, decimals === 2 && unit === "V" ? 2 : 0, ...needed);
}

function isTrim(parameter: ParameterId): boolean {
  return PARAMETERS[parameter].signed === true && PARAMETERS[parameter].group === "mixture";
}

export function formatReading(
  parameter: ParameterId,
  value: number,
  units: UnitPrefs,
  locale?: string,
  places = placesFor(parameter, [value], units),
): string {
  return formatNumber(shownUnit(parameter, units).toShown(value), places, { signed: isTrim(parameter), locale });
}

/** What a person may edit: no grouping, no plus sign. */
export function editText(parameter: ParameterId, value: number, units: UnitPrefs): string {
  const { toShown, decimals } = shownUnit(parameter, units);
  return String(Number(toShown(value).toFixed(Math.max(decimals, 2))));
}

export function numberAt(values: Values, parameter: ParameterId): number | null {
  const value = values[parameter];
  return typeof value === "number" ? value : null;
}

export interface Computed {
  value: number;
  band: Band | null;
  family: Family | null;
  /** Beyond its quiet zone but not deviant: shown where it lies, without colour. */
  isWatched?: boolean;
}

export const TOTAL_TRIM_BAND: Band = { low: -10, high: 10 };

/** Short and long together; nothing where either is missing or beyond what a control unit can state. */
export function totalTrim(values: Values, bank: 1 | 2): Computed | null {
  const parts = (bank === 1 ? (["SHRTFT1", "LONGFT1"] as const) : (["SHRTFT2", "LONGFT2"] as const)).map((id) => {
    const value = numberAt(values, id);
    const { possible } = PARAMETERS[id];
    return value !== null && possible && (value < possible.min || value > possible.max) ? null : value;
  });
  const [short, long] = parts;
  if (short == null || long == null) return null;
  const value = short + long;
  const state = judgeTotalTrim(value);
  return { value, band: TOTAL_TRIM_BAND, family: state === "outside" ? (value > 0 ? "lean" : "rich") : null };
}

export function misfiresAll(values: Values, mode: Mode, context: SheetContext): Computed | null {
  const counts = values.misfireCounts;
  if (typeof counts !== "object" || counts === null) return null;
  const all = Object.values(counts as Record<string, number>);
  const isOut = all.some((count) => judgeReading("misfireCounts", count, mode, context).state === "outside");
  return { value: all.reduce((sum, count) => sum + count, 0), band: null, family: isOut ? "spark" : null };
}

export const LAMBDA_BAND: Band = { low: 0.98, high: 1.02 };

export function lambdaOf(values: Values): Computed | null {
  const [coPct, co2Pct, o2Pct, hcPpm] = (["coPct", "co2Pct", "o2Pct", "hcPpm"] as const).map((p) =>
    numberAt(values, p),
  );
  if (coPct == null || co2Pct == null || o2Pct == null || hcPpm == null) return null;
  const value = lambdaFromGas({ coPct, co2Pct, o2Pct, hcPpm, noxPpm: numberAt(values, "noxPpm") ?? 0 });
  if (value === null) return null;
  return { value, band: LAMBDA_BAND, family: value > 1.02 ? "lean" : value < 0.98 ? "rich" : null };
}

/** "Lean: 6.1 above the usual band." as the keypad says it. */
export function verdictWords(
  parameter: ParameterId,
  value: number,
  judged: Judgement,
  units: UnitPrefs,
): { word: string; rest: string } {
  const { unit, toShown, decimals } = shownUnit(parameter, units);
  const spoken = judged.band ? bandText(roundBand(shownBand(parameter, judged.band, units), decimals), unit) : "";
  if (judged.state === "impossible") return { word: "Not possible.", rest: judged.message };
  if (judged.state === "inside") return { word: "Inside", rest: `the usual band, ${spoken}` };
  if (judged.state === "unbanded") return { word: "Kept.", rest: "No usual band is set for this reading here." };
  const edge = judged.side === "low" ? judged.band?.low : judged.band?.high;
  const gap = edge == null ? "" : formatNumber(Math.abs(toShown(value) - toShown(edge)), Math.max(decimals, 1));
  const side = judged.side === "low" ? "below" : "above";
  if (judged.state === "watch") return { word: "Watch:", rest: `${gap} ${side} the usual band, not yet out of it.` };
  const word =
    judged.family === "lean" ? "Lean:" : judged.family === "rich" ? "Rich:" : judged.side === "low" ? "Low:" : "High:";
  const more =
    judged.family === "lean" && parameter.includes("FT")
      ? " The control adds fuel."
      : judged.family === "rich" && parameter.includes("FT")
        ? " The control takes fuel away."
        : "";
  return { word, rest: `${gap} ${side} the usual band.${more}` };
}

function roundBand(band: Band, decimals: number): Band {
  const round = (n: number | null) => (n === null ? null : Number(n.toFixed(Math.max(decimals, 1))));
  return { low: round(band.low), high: round(band.high) };
}

export function stateWord(family: Family | null, side: "low" | "high" | null): string {
  if (family === "lean" || family === "rich") return family;
  return side === "low" ? "low" : "high";
}
