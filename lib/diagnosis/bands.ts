import { KPA_PER_INHG, KPA_PER_PSI } from "@/lib/engine/units";
import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import { DEFAULT_BANDS } from "./band-table";
import type { CaseFile, CaseVehicle } from "./case-file";
import type { CauseFamily } from "./causes";
import type { Mode } from "./vocabulary";

export { DEFAULT_BANDS } from "./band-table";

/**
 * The usual band of one reading. The shop's owner may edit every row; a case keeps the rows it was judged by.
 * The first row that fits parameter, mode and engine counts.
 */
export interface BandRow {
  parameter: ParameterId;
  /** Absent: every mode. */
  modes?: readonly Mode[];
  /** Absent: every engine; otherwise all stated properties must be as stated (a list: one of them). */
  vehicle?: { readonly [K in keyof CaseVehicle]?: CaseVehicle[K] | readonly CaseVehicle[K][] };
  low: number | null;
  high: number | null;
  /** Beyond the band but short of these the reading is watched, not flagged; absent: no such zone. */
  watch?: { low: number | null; high: number | null };
  /** `litre`: the figures are per litre of displacement; `barometer`: they are subtracted from the barometer. */
  per?: "litre" | "barometer";
  family: { low: CauseFamily | null; high: CauseFamily | null };
  source: string;
}

export interface Band {
  low: number | null;
  high: number | null;
}

export interface Judgement {
  state: "inside" | "watch" | "outside" | "impossible" | "unbanded";
  family: CauseFamily | null;
  band: Band | null;
  side: "low" | "high" | null;
  message: string;
  /** What was probably meant, where a decimal or unit slip explains the number. */
  likely?: number;
}

function fits(row: BandRow, parameter: ParameterId, mode: Mode, vehicle: CaseVehicle): boolean {
  if (row.parameter !== parameter || (row.modes && !row.modes.includes(mode))) return false;
  return Object.entries(row.vehicle ?? {}).every(([key, wanted]) => {
    const has = vehicle[key as keyof CaseVehicle];
    return Array.isArray(wanted) ? wanted.includes(has as never) : has === wanted;
  });
}

interface Resolved {
  band: Band;
  watch: Band;
  row: BandRow;
}

function resolve(
  parameter: ParameterId,
  mode: Mode,
  vehicle: CaseVehicle,
  bands: readonly BandRow[],
  site: CaseFile["site"],
): Resolved | null {
  const row = bands.find((candidate) => fits(candidate, parameter, mode, vehicle));
  if (!row) return null;
  const watch = row.watch ?? { low: row.low, high: row.high };
  if (row.per === "litre") {
    const litres = vehicle.displacementL;
    if (litres === undefined) return null;
    const scale = (b: Band): Band => ({
      low: b.low === null ? null : b.low * litres,
      high: b.high === null ? null : b.high * litres,
    });
    return { band: scale({ low: row.low, high: row.high }), watch: scale(watch), row };
  }
  if (row.per === "barometer") {
    const baro = site?.baroKPa ?? 101.3;
    const flip = (b: Band): Band => ({
      low: b.high === null ? null : baro - b.high,
      high: b.low === null ? null : baro - b.low,
    });
    return { band: flip({ low: row.low, high: row.high }), watch: flip(watch), row };
  }
  return { band: { low: row.low, high: row.high }, watch, row };
}

/** The usual band for a reading in its internal unit, or null where none is kept. */
export function bandFor(
  parameter: ParameterId,
  mode: Mode,
  vehicle: CaseVehicle,
  bands: readonly BandRow[] = DEFAULT_BANDS,
  site?: CaseFile["site"],
): Band | null {
  return resolve(parameter, mode, vehicle, bands, site)?.band ?? null;
}

const trim = (n: number) => String(Math.round(n * 100) / 100);

export function bandText(band: Band, unit: string): string {
  const u = unit ? ` ${unit}` : "";
  if (band.low !== null && band.high !== null) return `${trim(band.low)} to ${trim(band.high)}${u}`;
  if (band.low !== null) return `${trim(band.low)}${u} or more`;
  return band.high === null ? "any" : `${trim(band.high)}${u} or less`;
}

const within = (value: number, band: Band) =>
  (band.low === null || value >= band.low) && (band.high === null || value <= band.high);

/** A decimal slip or a unit slip that would put the number where such readings lie. */
function likelyMeant(parameter: ParameterId, value: number, band: Band): number | undefined {
  const { unit, decimals } = PARAMETERS[parameter];
  const tries = [value / 10, value / 100, value * 10];
  if (unit === "°C") tries.push((value - 32) / 1.8);
  if (unit === "kPa") tries.push(value * KPA_PER_PSI, value * KPA_PER_INHG, value * 100, value / 1000);
  if (unit === "km/h") tries.push(value * 1.609344);
  const hit = tries.find((t) => within(t, band));
  return hit === undefined ? undefined : Number(hit.toFixed(Math.max(decimals, 1)));
}

/** The part a parameter needs; a reading of a part the vehicle lacks means nothing. */
export function missingPart(parameter: ParameterId, vehicle: CaseVehicle): string | null {
  const carburetted = vehicle.fuelSystem === "carburetted";
  if (/^(SHRTFT|LONGFT|FUELSYS)/.test(parameter) && (carburetted || vehicle.o2Sensing === "none"))
    return "This engine has no closed-loop fuel control, so it has no trims";
  if (/^O2S[12]1$|^o2s[12]1/.test(parameter) && vehicle.o2Sensing === "wide-range")
    return "A wide-range sensor's voltage has no standard meaning: enter measured lambda";
  if (/^(O2S|o2s|EQ_RAT)/.test(parameter) && vehicle.o2Sensing === "none") return "This engine has no oxygen sensor";
  if (/^(SHRTFT2|LONGFT2|O2S2|o2s2|EQ_RAT21)/.test(parameter) && vehicle.banks === 1) return "This engine has one bank";
  if (parameter === "MAF" && (vehicle.airMetering === "map" || vehicle.airMetering === "none"))
    return "This engine has no air-flow meter";
  if (parameter === "MAP" && vehicle.airMetering === "none") return "This engine has no manifold pressure sensor";
  if (parameter === "boostCommandedKPa" && vehicle.aspiration === "natural") return "This engine has no boost";
  if (parameter === "dwellDeg" && vehicle.ignition !== undefined && !/points|distributor/.test(vehicle.ignition))
    return "This engine has no points";
  if (parameter === "baseTimingDeg" && vehicle.ignition !== undefined && !/points|distributor/.test(vehicle.ignition))
    return "This engine's timing is fixed by its control unit";
  if (
    (parameter === "EGR_PCT" && vehicle.hasEgr === false) ||
    (carburetted && /^(EGR_PCT|EVAP_PCT|injectorMs|FRP)$/.test(parameter))
  )
    return parameter === "EGR_PCT" && vehicle.hasEgr === false
      ? "This engine has no EGR"
      : "A carburetted engine has no such reading";
  return null;
}

/** Why a reading cannot be used: outside what its sensor can state, or of a part the vehicle lacks; null when it can. */
export function unusableReason(parameter: ParameterId, value: number, vehicle: CaseVehicle): string | null {
  const absent = missingPart(parameter, vehicle);
  if (absent) return absent;
  const { possible, unit, label } = PARAMETERS[parameter];
  if (Number.isFinite(value) && (!possible || (value >= possible.min && value <= possible.max))) return null;
  const suffix = unit ? ` ${unit}` : "";
  if (!possible) return `${label} must be a finite number`;
  return value > possible.max
    ? `This sensor's range ends at ${trim(possible.max)}${suffix}`
    : `This sensor's range starts at ${trim(possible.min)}${suffix}`;
}

/**
 * Judges one reading in its internal unit. Cylinder readings are judged one cylinder at a time.
 * `impossible`: outside what the sensor can state, or of a part the vehicle lacks; kept, but not used.
 */
export function judge(
  parameter: ParameterId,
  value: number,
  mode: Mode,
  vehicle: CaseVehicle,
  bands: readonly BandRow[] = DEFAULT_BANDS,
  site?: CaseFile["site"],
): Judgement {
  const { possible, unit } = PARAMETERS[parameter];
  const found = resolve(parameter, mode, vehicle, bands, site);
  const band = found?.band ?? null;
  const reason = unusableReason(parameter, value, vehicle);
  if (reason !== null) {
    const outOfRange = possible !== null && (value < possible.min || value > possible.max);
    if (!outOfRange) return { state: "impossible", family: null, band, side: null, message: reason };
    const likely = likelyMeant(parameter, value, band ?? { low: possible.min, high: possible.max });
    return {
      state: "impossible",
      family: null,
      band,
      side: value > possible.max ? "high" : "low",
      message: reason,
      ...(likely === undefined ? {} : { likely }),
    };
  }
  if (!found || !band) return { state: "unbanded", family: null, band: null, side: null, message: "" };
  if (within(value, band))
    return { state: "inside", family: null, band, side: null, message: `Usual: ${bandText(band, unit)}` };
  const side = band.low !== null && value < band.low ? "low" : "high";
  const word = side === "low" ? "Below" : "Above";
  const message = `${word} the usual ${bandText(band, unit)}`;
  if (within(value, found.watch)) return { state: "watch", family: found.row.family[side], band, side, message };
  // Only a gross miss suggests a slip of the pen; a faulty engine reads a little out.
  const gross =
    band.high !== null &&
    value > 0 &&
    (value > 1.8 * band.high || (band.low !== null && band.low > 0 && value < band.low / 4));
  const likely = gross && (unit === "°C" || unit === "kPa") ? likelyMeant(parameter, value, band) : undefined;
  return {
    state: "outside",
    family: found.row.family[side],
    band,
    side,
    message,
    ...(likely === undefined ? {} : { likely }),
  };
}

/** One rule for trims: total within ±5 % quiet, ±10 % and beyond deviant, between them watched. */
export function judgeTotalTrim(totalPct: number): "inside" | "watch" | "outside" {
  const size = Math.abs(totalPct);
  return size <= 5 ? "inside" : size < 10 ? "watch" : "outside";
}
