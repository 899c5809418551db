import { stoichiometricRatio, volumeDemand } from "./mixture";

/**
 * A small steady-state engine: what one fault does to the air, the fuel and so the fuel trim, cylinder by cylinder, at
 * four operating points. It is not a simulator: it is the arithmetic a technician does on paper, done for every
 * severity. Sources: ideal gas flow and volumetric efficiency (Heywood, Internal Combustion Engine Fundamentals,
 * ch. 2 and 3), choked and subsonic orifice flow, square-root injector flow, mixture chemistry of `mixture.ts`.
 */

export const OPERATING_POINTS = ["idling", "raised-idle", "cruising", "accelerating"] as const;
export type OperatingPoint = (typeof OPERATING_POINTS)[number];

interface PointFigures {
  rpm: number;
  mapKPa: number;
  /** Referred to manifold density; throttled engines breathe worse (0.45 to 0.65 at idle, common practice). */
  ve: number;
}
const POINTS: Record<OperatingPoint, PointFigures> = {
  idling: { rpm: 750, mapKPa: 33, ve: 0.55 },
  "raised-idle": { rpm: 2500, mapKPa: 30, ve: 0.62 },
  cruising: { rpm: 2200, mapKPa: 50, ve: 0.75 },
  accelerating: { rpm: 3500, mapKPa: 95, ve: 0.85 },
};
const BARO_KPA = 101;
const CHARGE_K = 313;
/** Share of idle air the throttle and its bypass cannot shut off, so the idle rises beyond it. Common practice. */
const THROTTLE_MINIMUM = 0.35;

export interface Engine {
  displacementL: number;
  cylinders: number;
  banks: 1 | 2;
  metering: "maf" | "map";
  /** Ethanol share of the fuel it is set for, 0 to 1. */
  ethanol: number;
}

/** What is wrong; absent fields are sound. Lists by point are in the order of `OPERATING_POINTS`. */
export interface Fault {
  /** Effective area of a leak after the throttle, mm². */
  leakMm2?: number;
  /** The leak lies at one runner: its cylinder takes this share of the leak (the rest spreads evenly). */
  leakAtCylinder?: number;
  /** Share of the air that enters behind the meter, by point. */
  ductShare?: readonly number[];
  /** Meter reading ÷ true flow, by point. */
  meterGain?: readonly number[];
  /** Manifold pressure sensor error, kPa. */
  mapOffsetKPa?: number;
  /** Pressure across the injectors ÷ nominal, by point. */
  pressureRatio?: readonly number[];
  /** Fuel that reaches the manifold past the injectors, g/s, the same at every point. */
  extraFuelGps?: number;
  /** Air that comes with it (purge), g/s. */
  extraAirGps?: number;
  /** Injector flow ÷ nominal, the same everywhere or by point, of the first `injectorCylinders` cylinders (default 1). */
  injectorFactor?: number | readonly number[];
  injectorCylinders?: number;
  /** Share of the manifold filling that is inert exhaust, by point, and does not burn. */
  inertShare?: readonly number[];
  /** Bias of the front sensor: it reports λ + bias, by point. */
  sensorBias?: readonly number[];
  /** Share of cylinder 1's charge that leaves unburned. */
  misfireShare?: number;
  /** Ethanol share actually in the tank. */
  tankEthanol?: number;
}

export interface PointResult {
  /** Percent the control loop must add (+) or take (−), bank 1 and bank 2, before any authority limit. */
  trimPct: [number, number];
  /** λ of every cylinder with the trim applied. */
  lambda: number[];
  /** True air, g/s. */
  airGps: number;
  /** Idle speed ÷ normal (above 1 when a leak exceeds what the throttle can take back). */
  speedRatio: number;
}

/** Mass flow through a hole from atmosphere into the manifold, g/s. Choked below about 0.53 of the barometer. Cd 0.8. */
export function leakFlowGps(areaMm2: number, mapKPa: number, baroKPa = BARO_KPA, airK = 293): number {
  const gamma = 1.4;
  const r = Math.min(1, Math.max(mapKPa / baroKPa, 0));
  const critical = (2 / (gamma + 1)) ** (gamma / (gamma - 1));
  const choked = Math.sqrt(gamma) * (2 / (gamma + 1)) ** ((gamma + 1) / (2 * (gamma - 1)));
  const psi =
    r <= critical ? choked : Math.sqrt(((2 * gamma) / (gamma - 1)) * (r ** (2 / gamma) - r ** ((gamma + 1) / gamma)));
  // kPa · mm² → N·10⁻³; √(R·T) in m/s: the quotient is kg/s · 10⁻³, which is g/s.
  return (0.8 * areaMm2 * baroKPa * psi) / Math.sqrt(287.05 * airK);
}

const bankOf = (cylinder: number, engine: Engine) => (engine.banks === 2 && cylinder > engine.cylinders / 2 ? 1 : 0);

/** Solves one operating point. `scope`: a sensor bias touches bank 1 alone or both. */
export function solvePoint(
  engine: Engine,
  point: OperatingPoint,
  fault: Fault,
  scope: "one" | "both" = "both",
): PointResult {
  const at = OPERATING_POINTS.indexOf(point);
  const { rpm, mapKPa, ve } = POINTS[point];
  const n = engine.cylinders;
  const sound = (ve * mapKPa * engine.displacementL * rpm) / 120 / (0.28705 * CHARGE_K);

  const leak = leakFlowGps(fault.leakMm2 ?? 0, mapKPa) + (fault.extraAirGps ?? 0);
  // The throttle gives way until it is shut; past that the engine gets more air than it needs and speeds up.
  const total = point === "idling" ? Math.max(sound, leak + THROTTLE_MINIMUM * sound) : sound;
  const inert = fault.inertShare?.[at] ?? 0;

  const measured =
    engine.metering === "maf"
      ? (total - leak) * (1 - (fault.ductShare?.[at] ?? 0)) * (fault.meterGain?.[at] ?? 1)
      : // Manifold pressure counts leak air like any other, and inert gas as if it were air.
        (total * (mapKPa + (fault.mapOffsetKPa ?? 0))) / mapKPa / (1 - inert);

  const nominalRatio = stoichiometricRatio(engine.ethanol);
  const tank = fault.tankEthanol ?? engine.ethanol;
  // Injectors meter volume. Fuel is counted here in what the nominal blend would burn with: a volume of a blend that
  // needs more volume for the same air counts for less.
  const dose = volumeDemand(engine.ethanol) / volumeDemand(tank);

  const air = Array.from({ length: n }, (_, i) => {
    const even = (total - leak) / n;
    const local = fault.leakAtCylinder ?? 0;
    return even + leak * ((1 - local) / n + (i === 0 ? local : 0));
  });
  const fuel = Array.from({ length: n }, (_, i) => {
    const flow = typeof fault.injectorFactor === "number" ? fault.injectorFactor : fault.injectorFactor?.[at];
    const factor = i < (fault.injectorCylinders ?? 1) ? (flow ?? 1) : 1;
    return (measured / n / nominalRatio) * factor * Math.sqrt(fault.pressureRatio?.[at] ?? 1) * dose;
  });
  const extra = (fault.extraFuelGps ?? 0) / n;

  const trims: [number, number] = [0, 0];
  for (const bank of [0, 1] as const) {
    const mine = air.flatMap((_, i) => (bankOf(i + 1, engine) === bank ? [i] : []));
    if (mine.length === 0) continue;
    let bias = bank === 0 || scope === "both" ? (fault.sensorBias?.[at] ?? 0) : 0;
    // Unburned charge brings its oxygen to the sensor; its fuel does not fully react there. About 0.6 of it counts.
    if (fault.misfireShare && bank === 0) bias += (0.6 * fault.misfireShare) / mine.length;
    const target = 1 / (1 + bias);
    const sum = (list: number[]) => mine.reduce((s, i) => s + (list[i] ?? 0), 0);
    const wanted = sum(air) / (nominalRatio * target);
    trims[bank] = (100 * (wanted - extra * mine.length)) / sum(fuel) - 100;
  }
  if (engine.banks === 1) trims[1] = trims[0];
  const lambda = air.map(
    (a, i) => a / (nominalRatio * ((fuel[i] ?? 0) * (1 + trims[bankOf(i + 1, engine)] / 100) + extra)),
  );
  return { trimPct: trims, lambda, airGps: total, speedRatio: total / sound };
}

/** Solves all four points in their order. */
export function solveEngine(engine: Engine, fault: Fault, scope: "one" | "both" = "both"): PointResult[] {
  return OPERATING_POINTS.map((point) => solvePoint(engine, point, fault, scope));
}
