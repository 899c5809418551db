/**
 * Every parameter a case may hold, one row each.
 *
 * Standard parameters carry their SAE J1979 / J1930 abbreviation and range; bay measurements have camel-case ids with
 * the unit in the name. `possible` is what the sensor or instrument can state at all (J1979 scaling range for standard
 * parameters, instrument range by common practice for the others): outside it a number is kept, noted and not used.
 */

export const PARAMETER_GROUPS = [
  "air",
  "mixture",
  "heat",
  "spark",
  "pressure",
  "gas",
  "cylinder",
  "electrical",
  "other",
] as const;
export type ParameterGroup = (typeof PARAMETER_GROUPS)[number];

export interface Parameter<Id extends string = string> {
  id: Id;
  label: string;
  short: string;
  unit: string;
  group: ParameterGroup;
  decimals: number;
  possible: { min: number; max: number } | null;
  kind: "number" | "cylinders" | "loop";
  signed?: boolean;
}

type Row = readonly [
  label: string,
  short: string,
  unit: string,
  group: ParameterGroup,
  decimals: number,
  min: number | null,
  max: number | null,
  kind?: "cylinders" | "loop",
  signed?: true,
];

const ROWS = {
  RPM: ["Engine speed", "Speed", "r/min", "other", 0, 0, 16383.75],
  VSS: ["Vehicle speed", "Vehicle", "km/h", "other", 0, 0, 255],
  ECT: ["Coolant temperature", "Coolant", "°C", "heat", 0, -40, 215],
  IAT: ["Intake air temperature", "Intake air", "°C", "heat", 0, -40, 215],
  AAT: ["Ambient air temperature", "Ambient", "°C", "heat", 0, -40, 215],
  EOT: ["Engine oil temperature", "Oil", "°C", "heat", 0, -40, 215],
  MAF: ["Mass air flow", "Air flow", "g/s", "air", 2, 0, 655.35],
  MAP: ["Manifold pressure, absolute", "Manifold", "kPa", "air", 0, 0, 510],
  BARO: ["Barometric pressure", "Barometer", "kPa", "air", 0, 0, 255],
  TP: ["Throttle position", "Throttle", "%", "air", 1, 0, 100],
  TP_R: ["Throttle position, relative", "Throttle rel.", "%", "air", 1, 0, 100],
  LOAD_PCT: ["Calculated load", "Load", "%", "air", 1, 0, 100],
  LOAD_ABS: ["Absolute load", "Abs. load", "%", "air", 1, 0, 25700],
  SPARKADV: ["Ignition advance", "Advance", "° before TDC", "spark", 1, -64, 63.5, undefined, true],
  SHRTFT1: ["Short trim, bank 1", "Short 1", "%", "mixture", 1, -100, 99.22, undefined, true],
  LONGFT1: ["Long trim, bank 1", "Long 1", "%", "mixture", 1, -100, 99.22, undefined, true],
  SHRTFT2: ["Short trim, bank 2", "Short 2", "%", "mixture", 1, -100, 99.22, undefined, true],
  LONGFT2: ["Long trim, bank 2", "Long 2", "%", "mixture", 1, -100, 99.22, undefined, true],
  FUELSYS1: ["Fuel system 1 status", "Loop 1", "", "mixture", 0, null, null, "loop"],
  FUELSYS2: ["Fuel system 2 status", "Loop 2", "", "mixture", 0, null, null, "loop"],
  O2S11: ["Front oxygen sensor, bank 1, mean", "O2 1-1", "V", "mixture", 2, 0, 1.275],
  O2S12: ["Rear oxygen sensor, bank 1, mean", "O2 1-2", "V", "mixture", 2, 0, 1.275],
  O2S21: ["Front oxygen sensor, bank 2, mean", "O2 2-1", "V", "mixture", 2, 0, 1.275],
  O2S22: ["Rear oxygen sensor, bank 2, mean", "O2 2-2", "V", "mixture", 2, 0, 1.275],
  o2s11MinV: ["Front oxygen sensor, bank 1, lowest", "1-1 low", "V", "mixture", 2, -0.5, 1.5],
  o2s11MaxV: ["Front oxygen sensor, bank 1, highest", "1-1 high", "V", "mixture", 2, -0.5, 1.5],
  o2s11CrossingsPer10s: [
    "Front oxygen sensor, bank 1, crossings in 10 s",
    "1-1 cross",
    "per 10 s",
    "mixture",
    0,
    0,
    200,
  ],
  o2s12MinV: ["Rear oxygen sensor, bank 1, lowest", "1-2 low", "V", "mixture", 2, -0.5, 1.5],
  o2s12MaxV: ["Rear oxygen sensor, bank 1, highest", "1-2 high", "V", "mixture", 2, -0.5, 1.5],
  o2s12CrossingsPer10s: [
    "Rear oxygen sensor, bank 1, crossings in 10 s",
    "1-2 cross",
    "per 10 s",
    "mixture",
    0,
    0,
    200,
  ],
  o2s21MinV: ["Front oxygen sensor, bank 2, lowest", "2-1 low", "V", "mixture", 2, -0.5, 1.5],
  o2s21MaxV: ["Front oxygen sensor, bank 2, highest", "2-1 high", "V", "mixture", 2, -0.5, 1.5],
  o2s21CrossingsPer10s: [
    "Front oxygen sensor, bank 2, crossings in 10 s",
    "2-1 cross",
    "per 10 s",
    "mixture",
    0,
    0,
    200,
  ],
  o2s22MinV: ["Rear oxygen sensor, bank 2, lowest", "2-2 low", "V", "mixture", 2, -0.5, 1.5],
  o2s22MaxV: ["Rear oxygen sensor, bank 2, highest", "2-2 high", "V", "mixture", 2, -0.5, 1.5],
  o2s22CrossingsPer10s: [
    "Rear oxygen sensor, bank 2, crossings in 10 s",
    "2-2 cross",
    "per 10 s",
    "mixture",
    0,
    0,
    200,
  ],
  EQ_RAT: ["Commanded lambda", "λ commanded", "", "mixture", 3, 0, 2],
  EQ_RAT11: ["Measured lambda, bank 1", "λ bank 1", "", "mixture", 3, 0, 2],
  EQ_RAT21: ["Measured lambda, bank 2", "λ bank 2", "", "mixture", 3, 0, 2],
  FRP: ["Fuel rail pressure, gauge", "Rail", "kPa", "pressure", 0, 0, 655350],
  frpCommandedKPa: ["Fuel rail pressure, commanded", "Rail cmd.", "kPa", "pressure", 0, 0, 655350],
  fuelPressureKPa: ["Fuel pressure, gauge", "Fuel press.", "kPa", "pressure", 0, 0, 2000],
  fuelPressureSpecKPa: ["Fuel pressure, maker's figure", "Spec", "kPa", "pressure", 0, 10, 2000],
  fuelPressureDropKPaIn5Min: ["Fuel pressure lost in 5 min", "Drop 5 min", "kPa", "pressure", 0, 0, 2000],
  lowSideFuelKPa: ["Low-side fuel pressure", "Low side", "kPa", "pressure", 0, 0, 2000],
  manifoldVacuumKPa: ["Manifold vacuum, below atmosphere", "Vacuum", "kPa", "pressure", 0, -300, 105],
  backPressureKPa: ["Exhaust back-pressure, gauge", "Back press.", "kPa", "pressure", 1, 0, 500],
  boostCommandedKPa: ["Boost pressure commanded, absolute", "Boost cmd.", "kPa", "pressure", 0, 0, 510],
  EVAP_PCT: ["Purge commanded", "Purge", "%", "mixture", 0, 0, 100],
  EGR_PCT: ["EGR commanded", "EGR", "%", "air", 0, 0, 100],
  FLI: ["Fuel level", "Fuel level", "%", "other", 0, 0, 100],
  ALCH_PCT: ["Alcohol share of the fuel", "Alcohol", "%", "mixture", 0, 0, 100],
  VPWR: ["Control unit voltage", "Supply", "V", "electrical", 1, 0, 65.535],
  RUNTM: ["Time since start", "Run time", "s", "other", 0, 0, 65535],
  CLR_DIST: ["Distance since codes cleared", "Since clear", "km", "other", 0, 0, 65535],
  WARM_UPS: ["Warm-ups since codes cleared", "Warm-ups", "", "other", 0, 0, 255],
  CATEMP11: ["Catalyst temperature, bank 1", "Catalyst 1", "°C", "heat", 0, -40, 6513.5],
  coPct: ["Carbon monoxide", "CO", "%", "gas", 2, 0, 15],
  co2Pct: ["Carbon dioxide", "CO₂", "%", "gas", 1, 0, 20],
  o2Pct: ["Oxygen", "O₂", "%", "gas", 1, 0, 25],
  hcPpm: ["Hydrocarbons, as hexane", "HC", "ppm", "gas", 0, 0, 30000],
  noxPpm: ["Nitrogen oxides", "NOx", "ppm", "gas", 0, 0, 10000],
  knockRetardDeg: ["Knock retard", "Knock", "°", "spark", 1, 0, 60],
  baseTimingDeg: ["Base timing by lamp", "Base timing", "° before TDC", "spark", 1, -60, 60, undefined, true],
  dwellDeg: ["Dwell", "Dwell", "°", "spark", 0, 0, 180],
  injectorMs: ["Injector pulse", "Pulse", "ms", "mixture", 2, 0, 100],
  idleAirPct: ["Idle air", "Idle air", "%", "air", 0, 0, 100],
  crankingV: ["Voltage while cranking", "Cranking", "V", "electrical", 1, 0, 32],
  crankRpm: ["Cranking speed", "Crank speed", "r/min", "electrical", 0, 0, 800],
  pumpV: ["Voltage at the fuel pump", "Pump", "V", "electrical", 1, 0, 32],
  pumpA: ["Fuel pump current", "Pump current", "A", "electrical", 1, 0, 40],
  groundDropV: ["Ground voltage drop", "Ground drop", "V", "electrical", 2, -2, 16],
  camAdvanceDeg: ["Cam position", "Cam", "°", "other", 1, -90, 90, undefined, true],
  camAdvanceCommandedDeg: ["Cam position, commanded", "Cam cmd.", "°", "other", 1, -90, 90, undefined, true],
  engineOffHours: ["Engine off for", "Soak", "h", "other", 1, 0, 9000],
  secondaryKv: ["Firing voltage", "Firing", "kV", "spark", 1, 0, 80, "cylinders"],
  burnMs: ["Spark duration", "Burn", "ms", "spark", 1, 0, 20, "cylinders"],
  plugGapMm: ["Plug gap", "Gap", "mm", "spark", 2, 0, 5, "cylinders"],
  plugGapLimitMm: ["Plug gap, limit", "Gap limit", "mm", "spark", 2, 0, 5],
  misfireCounts: ["Misfires by cylinder", "Misfires", "", "cylinder", 0, 0, 1000000, "cylinders"],
  compressionKPa: ["Compression by cylinder, gauge", "Compression", "kPa", "cylinder", 0, 0, 4000, "cylinders"],
  leakdownPct: ["Leak-down by cylinder", "Leak-down", "%", "cylinder", 0, 0, 100, "cylinders"],
  relativeCompressionPct: ["Relative compression by cylinder", "Rel. compr.", "%", "cylinder", 0, 0, 150, "cylinders"],
  powerBalanceRpmDrop: ["Speed drop, cylinder cancelled", "Balance", "r/min", "cylinder", 0, -200, 2000, "cylinders"],
  injectorDropKPa: ["Injector pressure drop", "Injector drop", "kPa", "cylinder", 0, 0, 1000, "cylinders"],
  FUEL_RATE: ["Fuel rate", "Fuel rate", "L/h", "other", 2, 0, 3212.75],
  APP_R: ["Accelerator pedal, relative", "Pedal", "%", "air", 1, 0, 100],
} as const satisfies Record<string, Row>;

export type ParameterId = keyof typeof ROWS;

export const PARAMETER_IDS = Object.keys(ROWS) as ParameterId[];

export const PARAMETERS = Object.fromEntries(
  PARAMETER_IDS.map((id) => {
    const [label, short, unit, group, decimals, min, max, kind, signed] = ROWS[id] as Row;
    const parameter: Parameter<ParameterId> = {
      id,
      label,
      short,
      unit,
      group,
      decimals,
      possible: min === null || max === null ? null : { min, max },
      kind: kind ?? "number",
      ...(signed ? { signed } : {}),
    };
    return [id, parameter];
  }),
) as Record<ParameterId, Parameter<ParameterId>>;

export function isParameterId(text: string): text is ParameterId {
  return Object.hasOwn(ROWS, text);
}
