import { judge } from "@/lib/diagnosis/bands";
import type { CaseVehicle, Sample } from "@/lib/diagnosis/case-file";
import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";

const TRIM = /^(SHRT|LONG)FT[12]$/;

/** The same sample as a sound engine would give it: what lay outside its band moves inside, the rest stays as read. */
export function healedValues(sample: Sample, vehicle: CaseVehicle): Record<string, unknown> {
  const healed: Record<string, unknown> = {};
  for (const [id, raw] of Object.entries(sample.values)) {
    const parameter = PARAMETERS[id as ParameterId];
    if (!parameter) continue;
    if (TRIM.test(id)) healed[id] = id.startsWith("SHRT") ? 0.8 : 1.6;
    else if (id.startsWith("FUELSYS")) healed[id] = sample.mode === "accelerating" ? raw : "CL";
    // the maker's own figure says best what a sound engine shows
    else if (id === "fuelPressureKPa" && typeof sample.values.fuelPressureSpecKPa === "number")
      healed[id] = sample.values.fuelPressureSpecKPa;
    else if (typeof raw === "number") healed[id] = healedNumber(id as ParameterId, raw, sample, vehicle);
    else if (typeof raw === "object" && raw !== null) healed[id] = healedCylinders(id, raw as Record<string, number>);
    else healed[id] = raw;
  }
  return healed;
}

function healedNumber(id: ParameterId, value: number, sample: Sample, vehicle: CaseVehicle): number {
  const { state, band } = judge(id, value, sample.mode, vehicle);
  if (state === "inside" || state === "unbanded" || !band) return value;
  const low = band.low ?? (band.high === null ? value : band.high * 0.6);
  const high = band.high ?? low * 1.15;
  const scale = 10 ** PARAMETERS[id].decimals;
  return Math.round(((low + high) / 2) * scale) / scale;
}

function healedCylinders(id: string, values: Record<string, number>): Record<string, number> {
  const list = Object.values(values);
  const good = id === "compressionKPa" ? Math.max(...list) : Math.min(...list);
  return Object.fromEntries(
    Object.keys(values).map((cylinder, index) => [
      cylinder,
      id === "misfireCounts" ? 0 : Math.max(0, good + (index % 2 === 0 ? 0 : id === "compressionKPa" ? -10 : 1)),
    ]),
  );
}
