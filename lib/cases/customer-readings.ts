import { judge } from "@/lib/diagnosis/bands";
import type { CaseVehicle, Sample } from "@/lib/diagnosis/case-file";
import type { Mode } from "@/lib/diagnosis/vocabulary";
import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import type { RevisionReading } from "./quote-schema";

const PLACES: Partial<Record<Mode, string>> = {
  "key-on": "Before starting",
  starting: "Starting",
  idling: "Standing still",
  "raised-idle": "Standing, engine raised",
  cruising: "On the move",
  accelerating: "Accelerating",
  decelerating: "Slowing down",
};

/** Total trim usual band of the trade (common practice): within ten percent either way. */
const TRIM = { low: -10, high: 10 };

const numberOf = (value: unknown): number | null =>
  typeof value === "number" && Number.isFinite(value) ? value : null;

function trimReading(sample: Sample): RevisionReading | null {
  const total = numberOf(sample.values.LONGFT1) ?? numberOf(sample.values.SHRTFT1);
  if (total === null) return null;
  const sum = (numberOf(sample.values.SHRTFT1) ?? 0) + (numberOf(sample.values.LONGFT1) ?? 0);
  const inside = sum >= TRIM.low && sum <= TRIM.high;
  const amount = Math.round(Math.abs(sum));
  const value = inside ? `${amount} %, as usual` : `${amount} % ${sum > 0 ? "extra" : "less"}`;
  return {
    label: PLACES[sample.mode] ?? sample.mode,
    value,
    at: (sum - TRIM.low) / (TRIM.high - TRIM.low),
    family: inside ? null : sum > 0 ? "lean" : "rich",
    inside,
  };
}

/**
 * The few readings a customer is shown: fuel correction standing and moving where there is any, else the readings that
 * lie furthest outside their usual band. Returned with a title in plain words; `at` is 0 … 1 inside the band.
 */
export function customerReadings(
  samples: readonly Sample[],
  vehicle: CaseVehicle,
): { title: string; readings: RevisionReading[] } {
  const found = samples.filter((sample) => sample.phase === "before");
  const trims = (["idling", "cruising", "raised-idle", "accelerating"] as const)
    .flatMap((mode) => found.filter((sample) => sample.mode === mode).slice(0, 1))
    .map(trimReading)
    .filter((reading) => reading !== null);
  if (trims.some((reading) => !reading.inside)) {
    const extra = trims.some((reading) => reading.family === "lean");
    return {
      title: extra
        ? "How much extra fuel the engine has to add to make up for the air."
        : "How much fuel the engine has to hold back.",
      readings: trims.slice(0, 3),
    };
  }
  const outside: (RevisionReading & { distance: number })[] = [];
  for (const sample of found) {
    for (const [id, raw] of Object.entries(sample.values)) {
      const value = numberOf(raw);
      if (value === null || !(id in PARAMETERS)) continue;
      const parameter = id as ParameterId;
      const judged = judge(parameter, value, sample.mode, vehicle);
      const band = judged.band;
      if (judged.state !== "outside" || !band) continue;
      const low = band.low ?? Math.min(0, value);
      const high = band.high ?? Math.max(low + 1, Math.abs(low) * 2);
      const at = (value - low) / (high - low || 1);
      const { label, unit, decimals } = PARAMETERS[parameter];
      outside.push({
        label: `${label}, ${(PLACES[sample.mode] ?? sample.mode).toLowerCase()}`,
        value: `${value.toFixed(decimals)} ${unit}`.trim(),
        at,
        family: judged.family,
        inside: false,
        distance: Math.max(-at, at - 1),
      });
    }
  }
  outside.sort((a, b) => b.distance - a.distance);
  return {
    title: outside.length > 0 ? "Where your engine sits against the usual range." : "",
    readings: outside.slice(0, 3).map(({ distance: _, ...reading }) => reading),
  };
}
