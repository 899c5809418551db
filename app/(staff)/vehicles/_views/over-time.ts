import { formatReading, shownBand, totalTrim } from "@/components/readings/judging";
import type { Values } from "@/components/readings/model";
import { formatNumber, formatShortDate } from "@/components/ui/format";
import { kmShown, shownUnit, type UnitPrefs } from "@/components/ui/units";
import type { ReadingColumn, ReadingOverTime, VisitReadings } from "@/components/vehicles/model";
import { judge } from "@/lib/diagnosis/bands";
import { type CaseVehicle, vehicleSchema } from "@/lib/diagnosis/case-file";
import type { Mode } from "@/lib/diagnosis/vocabulary";
import type { ParameterId } from "@/lib/obd/parameters";

/** What tells how an engine ages, in the mode where it is most telling. */
const WATCHED: readonly (
  | { id: string; label: string; trim: 1 | 2; modes: readonly Mode[] }
  | { id: string; label: string; parameter: ParameterId; modes: readonly Mode[] }
)[] = [
  { id: "trim1", label: "Total trim, bank 1, idling", trim: 1, modes: ["idling"] },
  { id: "trim2", label: "Total trim, bank 2, idling", trim: 2, modes: ["idling"] },
  { id: "cruise1", label: "Total trim, bank 1, cruising", trim: 1, modes: ["cruising"] },
  { id: "rpm", label: "Idle speed", parameter: "RPM", modes: ["idling"] },
  { id: "coolant", label: "Coolant, idling", parameter: "ECT", modes: ["idling"] },
  { id: "air", label: "Air flow, idling", parameter: "MAF", modes: ["idling"] },
  { id: "map", label: "Manifold, idling", parameter: "MAP", modes: ["idling"] },
  { id: "pressure", label: "Fuel pressure", parameter: "fuelPressureKPa", modes: ["idling", "key-on"] },
  { id: "supply", label: "Supply", parameter: "VPWR", modes: ["idling"] },
];
const COLUMNS = 6;

interface VisitRow {
  id: string;
  number: number;
  openedAt: Date;
  odometerInKm: number | null;
  odometerOutKm: number | null;
}
interface SampleRow {
  caseId: string;
  mode: string;
  phase: string;
  values: Record<string, unknown>;
  takenAt: Date;
}

export interface OverTimeContext {
  engine: Record<string, unknown>;
  modelYear: number | null;
  units: UnitPrefs;
  timeZone: string;
  locale: string;
}

function cellOf(
  watched: (typeof WATCHED)[number],
  samples: readonly SampleRow[],
  vehicle: CaseVehicle,
  units: UnitPrefs,
): ReadingOverTime | null {
  // the last sample of a mode is the one that stood
  for (const mode of watched.modes) {
    for (const sample of samples.filter((each) => each.mode === mode).toReversed()) {
      const values = sample.values as Values;
      if ("trim" in watched) {
        const total = totalTrim(values, watched.trim);
        if (total)
          return {
            text: formatNumber(total.value, 1, { signed: true }),
            value: total.value,
            band: total.band,
            family: total.family,
            isImpossible: false,
          };
        continue;
      }
      const value = values[watched.parameter];
      if (typeof value !== "number") continue;
      const judged = judge(watched.parameter, value, mode, vehicle);
      return {
        text: formatReading(watched.parameter, value, units),
        value: shownUnit(watched.parameter, units).toShown(value),
        band: judged.band ? shownBand(watched.parameter, judged.band, units) : null,
        family: judged.state === "outside" ? (judged.family ?? "mech") : null,
        isImpossible: judged.state === "impossible",
      };
    }
  }
  return null;
}

function columnOf(watched: (typeof WATCHED)[number], units: UnitPrefs): ReadingColumn {
  if ("trim" in watched) return { id: watched.id, label: watched.label, unit: "%", decimals: 1 };
  const { unit, decimals } = shownUnit(watched.parameter, units);
  return { id: watched.id, label: watched.label, unit, decimals };
}

/** The readings of a vehicle's visits, newest first: as found, and after the repair where they were taken again. */
export function readingsOverTime(
  visits: readonly VisitRow[],
  samples: readonly SampleRow[],
  context: OverTimeContext,
): { columns: ReadingColumn[]; visits: VisitReadings[] } {
  const { units, timeZone, locale } = context;
  const parsed = vehicleSchema.safeParse(context.engine);
  const rows = visits.flatMap((visit) =>
    (["after", "before"] as const).flatMap((phase) => {
      const own = samples.filter((sample) => sample.caseId === visit.id && sample.phase === phase);
      if (own.length === 0) return [];
      const km = phase === "after" ? (visit.odometerOutKm ?? visit.odometerInKm) : visit.odometerInKm;
      const vehicle: CaseVehicle = {
        ...(parsed.success ? parsed.data : vehicleSchema.parse({})),
        modelYear: context.modelYear ?? undefined,
        odometerKm: km ?? undefined,
      };
      return [{ visit, phase, km, cells: WATCHED.map((watched) => cellOf(watched, own, vehicle, units)) }];
    }),
  );
  const shown = WATCHED.map((_, index) => index)
    .filter((index) => rows.some((row) => row.cells[index]))
    .slice(0, COLUMNS);
  return {
    columns: shown.map((index) => columnOf(WATCHED[index]!, units)),
    visits:
      shown.length === 0
        ? []
        : rows.map(({ visit, phase, km, cells }) => ({
            id: `${visit.id}-${phase}`,
            number: String(visit.number),
            href: `/cases/${visit.number}/readings`,
            on: formatShortDate(visit.openedAt.toISOString(), timeZone),
            phase: phase === "before" ? "as found" : "after the repair",
            odometer: km === null ? "not read" : formatNumber(kmShown(km, units), 0, { locale }),
            cells: shown.map((index) => cells[index] ?? null),
          })),
  };
}
