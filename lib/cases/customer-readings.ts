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

/** What a customer reads instead of the trade's name; a parameter without one is not shown to customers. */
const PLAIN: Partial<Record<ParameterId, string>> = {
  RPM: "Engine speed",
  MAF: "Air drawn in",
  MAP: "Pressure at the intake",
  ECT: "Engine temperature",
  IAT: "Air temperature",
  SPARKADV: "Ignition timing",
  baseTimingDeg: "Ignition timing",
  dwellDeg: "Ignition dwell",
  knockRetardDeg: "Timing held back",
  manifoldVacuumKPa: "Suction",
  backPressureKPa: "Pressure in the exhaust",
  fuelPressureKPa: "Fuel pressure",
  FRP: "Fuel pressure",
  fuelPressureDropKPaIn5Min: "Fuel pressure lost",
  O2S11: "Exhaust sensor",
  O2S21: "Exhaust sensor, second",
  O2S12: "Sensor after the catalyst",
  O2S22: "Sensor after the catalyst, second",
  o2s11CrossingsPer10s: "Exhaust sensor, swings",
  EQ_RAT11: "Mixture",
  coPct: "Carbon monoxide",
  co2Pct: "Carbon dioxide",
  o2Pct: "Oxygen left over",
  hcPpm: "Unburnt fuel",
  noxPpm: "Nitrogen oxides",
  crankRpm: "Cranking speed",
  crankingV: "Battery while cranking",
  VPWR: "Supply voltage",
  pumpV: "Voltage at the fuel pump",
  idleAirPct: "Idle air",
  CATEMP11: "Catalyst temperature",
};

const numberOf = (value: unknown): number | null =>
  typeof value === "number" && Number.isFinite(value) ? value : null;

/** A trim beyond what a control unit can state is kept with the case, but is not told to the customer. */
function trimOf(sample: Sample, id: "SHRTFT1" | "LONGFT1"): number | null {
  const value = numberOf(sample.values[id]);
  const { possible } = PARAMETERS[id];
  return value !== null && possible && (value < possible.min || value > possible.max) ? null : value;
}

function trimReading(sample: Sample): RevisionReading | null {
  const short = trimOf(sample, "SHRTFT1");
  const long = trimOf(sample, "LONGFT1");
  if (short === null && long === null) return null;
  const sum = (short ?? 0) + (long ?? 0);
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

interface Shown extends RevisionReading {
  distance: number;
}

/** Readings of one phase that have a usual band, each with how far it lies outside (negative: inside). */
function bandedReadings(samples: readonly Sample[], vehicle: CaseVehicle): Shown[] {
  const shown: Shown[] = [];
  for (const sample of samples) {
    for (const [id, raw] of Object.entries(sample.values)) {
      const value = numberOf(raw);
      if (value === null || !(id in PARAMETERS)) continue;
      const parameter = id as ParameterId;
      const { state, band, family } = judge(parameter, value, sample.mode, vehicle);
      const label = PLAIN[parameter];
      if (!label || !band || state === "impossible" || state === "unbanded") continue;
      const low = band.low ?? Math.min(0, value);
      const high = band.high ?? Math.max(low + 1, Math.abs(low) * 2);
      const at = (value - low) / (high - low || 1);
      const { unit, decimals } = PARAMETERS[parameter];
      shown.push({
        label: `${label}, ${(PLACES[sample.mode] ?? sample.mode).toLowerCase()}`,
        value: `${value.toFixed(decimals).replace("-", "−")} ${unit.replace("° before TDC", "°")}`.trim(),
        at,
        family,
        inside: state !== "outside",
        distance: Math.max(-at, at - 1),
      });
    }
  }
  return shown;
}

const trimsOf = (samples: readonly Sample[]): RevisionReading[] =>
  (["idling", "cruising", "raised-idle", "accelerating"] as const)
    .flatMap((mode) => samples.filter((sample) => sample.mode === mode).slice(0, 1))
    .map(trimReading)
    .filter((reading) => reading !== null);

const bare = ({ distance: _, ...reading }: Shown): RevisionReading => reading;

/**
 * The few readings a customer is shown: fuel correction standing and moving where it deviates, else the readings that
 * lie furthest outside their usual band. The title is in plain words; `at` is 0 … 1 inside the band.
 */
export function customerReadings(
  samples: readonly Sample[],
  vehicle: CaseVehicle,
): { title: string; readings: RevisionReading[] } {
  const found = samples.filter((sample) => sample.phase === "before");
  const trims = trimsOf(found);
  if (trims.some((reading) => !reading.inside)) {
    const isLean = trims.some((reading) => reading.family === "lean");
    const title = isLean
      ? "How much extra fuel the engine has to add to make up for the air."
      : "How much fuel the engine has to hold back.";
    return { title, readings: trims.slice(0, 3) };
  }
  const outside = bandedReadings(found, vehicle).filter((reading) => !reading.inside);
  outside.sort((a, b) => b.distance - a.distance);
  return {
    title: outside.length > 0 ? "Where your engine sits against the usual range." : "",
    readings: outside.slice(0, 3).map(bare),
  };
}

/** The readings a customer was shown, each with the one taken after the repair in the same place, where there is one. */
export function pairedReadings(
  samples: readonly Sample[],
  vehicle: CaseVehicle,
): { label: string; before: RevisionReading; after: RevisionReading | null }[] {
  const repaired = samples.filter((sample) => sample.phase === "after");
  const after = [...trimsOf(repaired), ...bandedReadings(repaired, vehicle).map(bare)];
  return customerReadings(samples, vehicle).readings.map((before) => ({
    label: before.label,
    before,
    after: after.find((each) => each.label === before.label) ?? null,
  }));
}
