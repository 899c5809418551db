import { missingPart } from "@/lib/diagnosis/bands";
import type { CaseVehicle } from "@/lib/diagnosis/case-file";
import { isParameterId, PARAMETER_IDS, PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import type { SampleView } from "./model";

/** A row of the sheet: a parameter one types, or one the sheet computes. */
export type SheetRow =
  | { kind: "entry"; parameter: ParameterId }
  | { kind: "total-trim"; bank: 1 | 2 }
  | { kind: "misfires-all" };

export interface RowGroup {
  title: string;
  rows: SheetRow[];
}

const ORDER: readonly (readonly [title: string, parameters: readonly ParameterId[]])[] = [
  [
    "Air and load",
    [
      "RPM",
      "VSS",
      "MAF",
      "MAP",
      "LOAD_PCT",
      "LOAD_ABS",
      "TP",
      "TP_R",
      "APP_R",
      "idleAirPct",
      "manifoldVacuumKPa",
      "BARO",
      "boostCommandedKPa",
      "EGR_PCT",
    ],
  ],
  [
    "Mixture",
    [
      "SHRTFT1",
      "LONGFT1",
      "SHRTFT2",
      "LONGFT2",
      "O2S11",
      "o2s11MinV",
      "o2s11MaxV",
      "o2s11CrossingsPer10s",
      "O2S21",
      "o2s21MinV",
      "o2s21MaxV",
      "o2s21CrossingsPer10s",
      "O2S12",
      "o2s12MinV",
      "o2s12MaxV",
      "o2s12CrossingsPer10s",
      "O2S22",
      "o2s22MinV",
      "o2s22MaxV",
      "o2s22CrossingsPer10s",
      "EQ_RAT",
      "EQ_RAT11",
      "EQ_RAT21",
      "FUELSYS1",
      "FUELSYS2",
      "injectorMs",
      "EVAP_PCT",
      "ALCH_PCT",
      "FUEL_RATE",
    ],
  ],
  [
    "Fuel pressure",
    [
      "fuelPressureKPa",
      "fuelPressureSpecKPa",
      "fuelPressureDropKPaIn5Min",
      "lowSideFuelKPa",
      "FRP",
      "frpCommandedKPa",
      "backPressureKPa",
      "pumpV",
      "pumpA",
    ],
  ],
  ["Heat", ["ECT", "IAT", "AAT", "EOT", "CATEMP11"]],
  ["Spark", ["SPARKADV", "baseTimingDeg", "dwellDeg", "knockRetardDeg", "plugGapLimitMm"]],
  ["Supply", ["VPWR", "crankingV", "crankRpm", "groundDropV"]],
  ["Other", ["camAdvanceDeg", "camAdvanceCommandedDeg", "engineOffHours", "RUNTM", "FLI", "CLR_DIST", "WARM_UPS"]],
];

/** The rows every sheet opens with, before anything is typed; parts the engine lacks fall out. */
export function coreParameters(vehicle: CaseVehicle): ParameterId[] {
  const carburetted = vehicle.fuelSystem === "carburetted";
  const old = vehicle.ignition === "points" || vehicle.ignition === "distributor";
  const two = vehicle.banks === 2;
  const core: ParameterId[] = ["RPM"];
  if (vehicle.airMetering === "map") core.push("MAP");
  else core.push("MAF");
  core.push("LOAD_PCT", "manifoldVacuumKPa", "BARO", "SHRTFT1", "LONGFT1");
  if (two) core.push("SHRTFT2", "LONGFT2");
  if (vehicle.o2Sensing === "wide-range") core.push("EQ_RAT11", ...(two ? (["EQ_RAT21"] as const) : []));
  else core.push("O2S11", "o2s11CrossingsPer10s", ...(two ? (["O2S21", "o2s21CrossingsPer10s"] as const) : []));
  core.push("FUELSYS1", vehicle.fuelSystem === "direct" ? "FRP" : "fuelPressureKPa", "ECT", "IAT");
  core.push(old ? "baseTimingDeg" : "SPARKADV");
  if (vehicle.ignition === "points") core.push("dwellDeg");
  core.push("VPWR");
  const electronic = new Set<ParameterId>(["LOAD_PCT", "FUELSYS1", "IAT", "MAF"]);
  return core.filter((parameter) => !missingPart(parameter, vehicle) && !(carburetted && electronic.has(parameter)));
}

const isSheetParameter = (parameter: ParameterId) =>
  PARAMETERS[parameter].kind !== "cylinders" && PARAMETERS[parameter].group !== "gas";

/** All parameters any sample holds. */
export function takenParameters(samples: readonly SampleView[]): Set<ParameterId> {
  const taken = new Set<ParameterId>();
  for (const sample of samples)
    for (const [key, value] of Object.entries(sample.values))
      if (value !== null && value !== undefined && isParameterId(key)) taken.add(key);
  return taken;
}

/** The sheet's rows in their groups: the core, whatever was taken, and what the user added. */
export function sheetRows(
  vehicle: CaseVehicle,
  samples: readonly SampleView[],
  added: readonly ParameterId[] = [],
): RowGroup[] {
  const taken = takenParameters(samples);
  const wanted = new Set<ParameterId>([...coreParameters(vehicle), ...taken, ...added]);
  const groups: RowGroup[] = [];
  for (const [title, parameters] of ORDER) {
    const rows: SheetRow[] = [];
    for (const parameter of parameters) {
      if (wanted.has(parameter)) rows.push({ kind: "entry", parameter });
      if (parameter === "LONGFT1" && wanted.has("LONGFT1") && wanted.has("SHRTFT1"))
        rows.push({ kind: "total-trim", bank: 1 });
      if (parameter === "LONGFT2" && wanted.has("LONGFT2") && wanted.has("SHRTFT2"))
        rows.push({ kind: "total-trim", bank: 2 });
    }
    if (title === "Spark" && taken.has("misfireCounts")) rows.push({ kind: "misfires-all" });
    if (rows.length > 0) groups.push({ title, rows });
  }
  return groups;
}

/** Parameters that could still be added as a row. */
export function otherParameters(groups: readonly RowGroup[], vehicle: CaseVehicle): ParameterId[] {
  const shown = new Set(
    groups.flatMap((group) => group.rows.flatMap((row) => (row.kind === "entry" ? [row.parameter] : []))),
  );
  return PARAMETER_IDS.filter((p) => isSheetParameter(p) && !shown.has(p) && !missingPart(p, vehicle));
}

/** Labels cut to a row's width; the full one is the row's title. */
export function rowLabel(parameter: ParameterId, banks?: number): string {
  const short = PARAMETERS[parameter].label
    .replace("oxygen sensor", "O2")
    .replace("Mass air flow", "Air flow, MAF")
    .replace("Intake air temperature", "Intake air")
    .replace(" temperature", "")
    .replace("Ignition advance", "Advance")
    .replace("Barometric pressure", "Barometer")
    .replace("Manifold vacuum, below atmosphere", "Manifold vacuum")
    .replace("Control unit voltage", "Supply")
    .replace("Fuel pressure, gauge", "Fuel pressure")
    .replace("Fuel rail pressure, gauge", "Rail pressure")
    .replace("crossings in 10 s", "crossings")
    .replace(/Fuel system (\d) status/, "Loop, bank $1");
  return banks === 2 ? short : short.replace(/(O2|Loop|lambda), bank 1/, "$1");
}

export const CYLINDER_PARAMETERS = [
  "misfireCounts",
  "compressionKPa",
  "leakdownPct",
  "relativeCompressionPct",
  "powerBalanceRpmDrop",
  "injectorDropKPa",
  "secondaryKv",
  "burnMs",
  "plugGapMm",
] as const satisfies readonly ParameterId[];
export type CylinderParameter = (typeof CYLINDER_PARAMETERS)[number];

export const CYLINDER_LABELS: Record<CylinderParameter, string> = {
  misfireCounts: "Misfires",
  compressionKPa: "Compression",
  leakdownPct: "Leak-down",
  relativeCompressionPct: "Rel. compr.",
  powerBalanceRpmDrop: "Speed drop",
  injectorDropKPa: "Inj. drop",
  secondaryKv: "Firing",
  burnMs: "Burn",
  plugGapMm: "Plug gap",
};
export const GAS_PARAMETERS = ["coPct", "co2Pct", "o2Pct", "hcPpm", "noxPpm"] as const satisfies readonly ParameterId[];
export const GAS_LABELS: Record<(typeof GAS_PARAMETERS)[number], string> = {
  coPct: "CO",
  co2Pct: "CO2",
  o2Pct: "O2",
  hcPpm: "HC",
  noxPpm: "NOx",
};
