/** Air: density, humidity, altitude, flow. Sources: ideal gas; ISO 2533; Tetens; Heywood ch. 2. Celsius and kPa. */

export const R_DRY = 0.28705;
const KELVIN = 273.15;

/** Dry-air density, g/L (kg/m³). Ideal gas; not for temperatures at or below −273.15 °C (Infinity or negative). */
export const airDensity = (kPa: number, celsius: number) => kPa / (R_DRY * (celsius + KELVIN));

/** Saturation vapour pressure over water, kPa. Tetens; good from −20 to 50 °C. */
export const saturationKPa = (celsius: number) => 0.61078 * Math.exp((17.2694 * celsius) / (celsius + 237.29));

export interface HumidAir {
  vapourKPa: number;
  mixingGPerKg: number;
  densityGPerL: number;
}

/** Humid air from pressure, temperature and relative humidity (0 to 100 %, clamped). */
export function humidAir(kPa: number, celsius: number, humidityPct: number): HumidAir {
  const e = (Math.min(100, Math.max(0, humidityPct)) / 100) * saturationKPa(celsius);
  return {
    vapourKPa: e,
    mixingGPerKg: (1000 * 0.622 * e) / (kPa - e),
    densityGPerL: (kPa - 0.378 * e) / (R_DRY * (celsius + KELVIN)),
  };
}

/** Standard atmosphere below 11 km: pressure at an altitude in metres. ISO 2533. */
export const standardPressureKPa = (metres: number) => 101.325 * (1 - 2.25577e-5 * metres) ** 5.25588;
/** Its inverse: altitude in metres from station pressure (not from a weather report reduced to sea level). */
export const altitudeM = (kPa: number) => (1 - (kPa / 101.325) ** (1 / 5.25588)) / 2.25577e-5;
export const standardTemperatureC = (metres: number) => 15 - 0.0065 * metres;

/** Air flow of a four-stroke engine, g/s. `ve` 0 to about 1.1, referred to manifold density. */
export const speedDensityGps = (ve: number, mapKPa: number, displacementL: number, rpm: number, chargeC: number) =>
  (ve * mapKPa * displacementL * rpm) / 120 / (R_DRY * (chargeC + KELVIN));

/** Volumetric efficiency in percent from metered air, referred to ambient density. Above 100 when boosted. */
export const volumetricEfficiencyPct = (
  mafGps: number,
  displacementL: number,
  rpm: number,
  baroKPa: number,
  iatC: number,
) => (100 * mafGps) / (airDensity(baroKPa, iatC) * displacementL * (rpm / 120));

/** Absolute load, percent. SAE J1979 PID 43 with its reference density 1.184 g/L. */
export const absoluteLoadPct = (mafGps: number, rpm: number, displacementL: number) =>
  (100 * mafGps * 120) / rpm / (1.184 * displacementL);

/** Air flow to expect, g/s: warm idle about 0.8 to 1.5 a litre (common practice), full load from volumetric efficiency. */
export const expectedIdleGps = (displacementL: number) => ({ low: 0.8 * displacementL, high: 1.5 * displacementL });
export const expectedFullLoadGps = (displacementL: number, rpm: number, baroKPa: number, iatC: number, ve = 0.85) =>
  ve * airDensity(baroKPa, iatC) * displacementL * (rpm / 120);

/** Manifold vacuum below atmosphere, kPa. */
export const vacuumKPa = (baroKPa: number, mapKPa: number) => baroKPa - mapKPa;
