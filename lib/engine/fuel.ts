import { L_PER_US_GALLON } from "./units";

/** Injectors, fuel delivery and consumption. Sources named by function; inputs must be finite and positive unless said. */

/** Pressure across an injector, kPa: rail gauge + barometer − manifold. */
export const injectorDeltaKPa = (railGaugeKPa: number, baroKPa: number, mapKPa: number) =>
  railGaugeKPa + baroKPa - mapKPa;

/** Flow at another pressure, in the unit of `flow`. Square-root law; NaN for a negative ratio. */
export const flowAtPressure = (flow: number, fromKPa: number, toKPa: number) => flow * Math.sqrt(toKPa / fromKPa);

/** Trim that a pressure ratio asks for, percent: the square root law turned round. */
export const trimFromPressureRatio = (ratio: number) => 100 * (1 / Math.sqrt(ratio) - 1);

/** Fuel of one injection, mg: air per cylinder and cycle ÷ air-fuel ratio (four-stroke, one injection a cycle). */
export const fuelPerInjectionMg = (airGps: number, rpm: number, cylinders: number, ratio: number) =>
  (1000 * airGps * 120) / rpm / cylinders / ratio;

/** Pulse, ms: fuel ÷ static flow + dead time. `densityGPerCc` about 0.745. Dead time about 0.6 to 1.2 ms at 14 V. */
export const pulseMs = (fuelMg: number, staticCcMin: number, densityGPerCc: number, deadMs: number) =>
  (60 * fuelMg) / (staticCcMin * densityGPerCc) + deadMs;

/** Duty of one injection every two turns, percent; above 85 continuous is an injector's limit (common practice). */
export const dutyPct = (ms: number, rpm: number) => (ms * rpm) / 1200;

/** Fuel flow, L/h, from metered air: trim must not be added again. Ratio and density (g/L) of the fuel in the tank. */
export const fuelLitresPerHour = (airGps: number, lambda: number, ratio: number, densityGPerL: number) =>
  (3600 * airGps) / (ratio * lambda) / densityGPerL;

/** L/100 km, or null standing still. */
export const litresPer100Km = (litresPerHour: number, kmh: number): number | null =>
  kmh > 0 ? (100 * litresPerHour) / kmh : null;

/** Average over unequal segments: add litres and kilometres, then divide. Null without distance. */
export function averageLitresPer100Km(segments: readonly { km: number; litres: number }[]): number | null {
  const km = segments.reduce((s, x) => s + x.km, 0);
  return km > 0 ? (100 * segments.reduce((s, x) => s + x.litres, 0)) / km : null;
}

/** Grams of CO2 a US gallon of gasoline makes. Source: EPA-420-F-11-041; 75 FR 25324. */
export const CO2_G_PER_US_GALLON = 8887;
export const CO2_G_PER_LITRE = CO2_G_PER_US_GALLON / L_PER_US_GALLON;
export const co2GPerKm = (l100: number) => (l100 * CO2_G_PER_LITRE) / 100;
/** By carbon balance: all carbon to CO2. Molar masses 44.009 and 12.011. */
export const co2GPerLitreFromCarbon = (carbonMassShare: number, densityGPerL: number) =>
  (carbonMassShare * 44.009 * densityGPerL) / 12.011;

/** Ethanol share by the water method, percent by volume (contraction ignored; common practice). */
export const ethanolByWaterPct = (fuelMl: number, waterMl: number, lowerLayerMl: number) =>
  (100 * (lowerLayerMl - waterMl)) / fuelMl;

/** Fuel used in a year because of a fault: km/100 × L/100 km × extra. */
export const extraFuelLitres = (km: number, baseL100: number, extraPct: number) =>
  ((km / 100) * baseL100 * extraPct) / 100;
