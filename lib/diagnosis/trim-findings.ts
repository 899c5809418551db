import { OPERATING_POINTS } from "@/lib/engine/steady-state";
import type { Observation, TrimReading } from "./observation";
import type { Readings } from "./readings";
import { MODE_LABELS, type Mode } from "./vocabulary";

/** Below this the engine is warming up and trims say nothing. */
const WARM_C = 65;

interface Total extends TrimReading {
  mode: Mode;
  from: string[];
}

/** Total trim by bank and mode, only where the loop is closed and the engine warm; everything else is noted. */
function usableTotals(r: Readings): Total[] {
  const totals: Total[] = [];
  const banks = r.caseFile.vehicle.banks === 2 ? ([1, 2] as const) : ([1] as const);
  for (const bank of banks) {
    const shorts = r.all(bank === 1 ? "SHRTFT1" : "SHRTFT2");
    const longs = r.all(bank === 1 ? "LONGFT1" : "LONGFT2");
    const samples = [...new Set([...shorts, ...longs].map((x) => x.sample))];
    for (const sample of samples) {
      const short = shorts.find((x) => x.sample === sample);
      const long = longs.find((x) => x.sample === sample);
      const some = short ?? long;
      if (!some) continue;
      // half a total is no total: the other half was typed but can't be, and its own note says so
      const values = r.caseFile.samples?.[sample]?.values ?? {};
      const typed = (id: "SHRTFT1" | "LONGFT1" | "SHRTFT2" | "LONGFT2") => typeof values[id] === "number";
      const isHalved =
        (!short && typed(bank === 1 ? "SHRTFT1" : "SHRTFT2")) || (!long && typed(bank === 1 ? "LONGFT1" : "LONGFT2"));
      if (isHalved) continue;
      const point = OPERATING_POINTS.indexOf(some.mode as (typeof OPERATING_POINTS)[number]);
      if (point < 0) {
        r.note(
          some.path,
          `Trims are not read ${MODE_LABELS[some.mode].toLowerCase()}: fuel is cut or the engine is not running steadily.`,
        );
        continue;
      }
      const loop = r.loopOf(sample);
      if (loop && loop.value !== "CL" && loop.value !== "CL-Fault") {
        r.note(some.path, "The loop is open here, so the trims are stale and not used.");
        continue;
      }
      const ect = r.beside("ECT", { sample });
      if (ect && ect.value < WARM_C) {
        r.note(some.path, `At ${ect.value} °C coolant the engine is not warm: trims are not used.`);
        continue;
      }
      if (loop?.value === "CL-Fault") r.note(loop.path, "Closed loop with a sensor fault: trims are read with care.");
      totals.push({
        bank,
        point,
        mode: some.mode,
        totalPct: (short?.value ?? 0) + (long?.value ?? 0),
        from: [short?.path, long?.path].filter((p) => p !== undefined),
      });
    }
  }
  return merged(totals);
}

/** A mode measured twice is one reading: the mean. */
function merged(totals: readonly Total[]): Total[] {
  const byPlace = new Map<string, Total[]>();
  for (const t of totals) {
    const place = `${t.bank} ${t.point}`;
    byPlace.set(place, [...(byPlace.get(place) ?? []), t]);
  }
  return [...byPlace.values()]
    .map((same) => ({
      ...(same[0] as Total),
      totalPct: same.reduce((sum, t) => sum + t.totalPct, 0) / same.length,
      from: same.flatMap((t) => t.from),
    }))
    .sort((a, b) => a.bank - b.bank || a.point - b.point);
}

const signed = (n: number) => `${n > 0 ? "+" : ""}${n.toFixed(1)}`;

/** The name of the pattern: a shape, never a verdict. */
function patternOf(totals: readonly Total[]): { id: string; words: string; family: "lean" | "rich" | null } {
  const value = (bank: number, point: number) => {
    const found = totals.filter((t) => t.bank === bank && t.point === point);
    return found.length > 0 ? found.reduce((s, t) => s + t.totalPct, 0) / found.length : undefined;
  };
  const worst = totals.reduce((a, b) => (Math.abs(b.totalPct) > Math.abs(a.totalPct) ? b : a));
  const size = Math.abs(worst.totalPct);
  if (size <= 5) return { id: "trim-quiet", words: "quiet", family: null };
  const lean = worst.totalPct > 0;
  const word = lean ? "lean" : "rich";
  const family = lean ? ("lean" as const) : ("rich" as const);
  if (size < 10) return { id: `trim-watch-${word}`, words: `a little ${word}, to watch`, family };
  const banks = [...new Set(totals.map((t) => t.bank))];
  const off = banks.filter((b) => totals.some((t) => t.bank === b && Math.abs(t.totalPct) >= 10));
  const opposite = banks.length === 2 && totals.some((t) => t.totalPct >= 8) && totals.some((t) => t.totalPct <= -8);
  const low = value(worst.bank, 0) ?? value(worst.bank, 1);
  const high =
    value(worst.bank, 3) ??
    value(worst.bank, 2) ??
    (value(worst.bank, 0) !== undefined ? value(worst.bank, 1) : undefined);
  const where = banks.length === 2 && off.length === 1 ? `-bank-${off[0]}` : "";
  const whereWords = banks.length === 2 ? (off.length === 1 ? `, bank ${off[0]} only` : ", both banks") : "";
  if (opposite && off.length === 2 && where === "")
    return { id: "trim-opposite", words: "one way here, the other way there", family: null };
  if (low === undefined || high === undefined)
    return { id: `trim-${word}${where}`, words: `${word}${whereWords}`, family };
  if (low * high < 0 && Math.abs(low) > 5 && Math.abs(high) > 5)
    return { id: `trim-mixed${where}`, words: `changing sign with air flow${whereWords}`, family: null };
  const [a, b] = [Math.abs(low), Math.abs(high)];
  if (a >= 1.5 * b && b < 10)
    return {
      id: `trim-${word}-idle-only${where}`,
      words: `${word}, and it shrinks as air flow grows${whereWords}`,
      family,
    };
  if (b >= 1.5 * a)
    return {
      id: `trim-${word}-rises-with-flow${where}`,
      words: `${word}, and it grows with air flow${whereWords}`,
      family,
    };
  return { id: `trim-${word}-everywhere${where}`, words: `${word} at every air flow${whereWords}`, family };
}

/** Trims over all modes and banks: one finding. Also notes a front sensor mean that contradicts them. */
export function trimObservation(r: Readings): Extract<Observation, { kind: "trims" }> | null {
  const totals = usableTotals(r);
  if (totals.length === 0) return null;
  for (const t of totals) {
    const sensor = r.all(t.bank === 1 ? "O2S11" : "O2S21", [t.mode])[0];
    if (
      sensor &&
      Math.abs(t.totalPct) < 25 &&
      (sensor.value < 0.25 || sensor.value > 0.7) &&
      (sensor.value < 0.25 ? t.totalPct < 12 : t.totalPct > -12)
    )
      r.note(
        sensor.path,
        `A mean of ${sensor.value} V beside ${signed(t.totalPct)} % total trim contradicts itself: with authority left a closed loop holds about 0.45 V. Sensor, or a moment's value.`,
      );
  }
  const { id, words, family } = patternOf(totals);
  const list = totals
    .map(
      (t) =>
        `${signed(t.totalPct)} % ${MODE_LABELS[t.mode].toLowerCase()}${r.caseFile.vehicle.banks === 2 ? ` bank ${t.bank}` : ""}`,
    )
    .join(", ");
  return {
    kind: "trims",
    id,
    statement: `Total trim ${list}: ${words}`,
    from: totals.flatMap((t) => t.from),
    abnormal: id !== "trim-quiet",
    family,
    theme: "mixture",
    trims: totals.map(({ bank, point, totalPct }) => ({ bank, point, totalPct })),
  };
}
