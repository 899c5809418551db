/** Sensor physics: zirconia voltage, pump cell, thermistors, trace reading. */

const GAS_CONSTANT = 8.314462618;
const FARADAY = 96485.33212;
const KELVIN = 273.15;
export const REFERENCE_OXYGEN_ATM = 0.2095;

/** Zirconia cell, mV. Nernst; CODATA 2018. Temperature in °C, oxygen in atm at the electrode (equilibrium), above 0. */
export const nernstMv = (celsius: number, oxygenAtm: number, referenceAtm = REFERENCE_OXYGEN_ATM) =>
  ((1000 * GAS_CONSTANT * (celsius + KELVIN)) / (4 * FARADAY)) * Math.log(referenceAtm / oxygenAtm);

/** Its inverse: oxygen at the electrode, atm, for a voltage. */
export const oxygenFromMv = (celsius: number, mv: number, referenceAtm = REFERENCE_OXYGEN_ATM) =>
  referenceAtm / Math.exp((mv / 1000) * ((4 * FARADAY) / (GAS_CONSTANT * (celsius + KELVIN))));

/** λ of a common five-wire pump-cell sensor from its current in mA: straight-line approximation, λ 0.65 to 2. */
export const lambdaFromPumpMa = (ma: number) => 1 / (0.9956 - (ma >= 0 ? 0.4482 : 0.283) * ma);

export interface SteinhartHart {
  a: number;
  b: number;
  c: number;
}
/** Two curves in wide use; coefficients fitted through 0, 50 and 100 °C of the published tables. */
export const NTC_CURVES = {
  A: { a: 1.3017331448854658e-3, b: 2.5873055639535946e-4, c: 1.7259681220354165e-7 },
  B: { a: 1.452136e-3, b: 2.352199e-4, c: 7.368181e-8 },
} as const satisfies Record<string, SteinhartHart>;

/** °C of a thermistor from ohms above 0. Steinhart–Hart; good from −40 to 130 °C on these curves. */
export function ntcCelsius(ohm: number, { a, b, c }: SteinhartHart): number {
  const l = Math.log(ohm);
  return 1 / (a + b * l + c * l ** 3) - KELVIN;
}

/** Ohms of a thermistor at a temperature: the Steinhart–Hart cubic solved. */
export function ntcOhm(celsius: number, { a, b, c }: SteinhartHart): number {
  const y = (a - 1 / (celsius + KELVIN)) / (2 * c);
  const x = Math.sqrt((b / (3 * c)) ** 3 + y * y);
  return Math.exp(Math.cbrt(x - y) - Math.cbrt(x + y));
}

/** Beta model from 20 °C: R20 in ohm, beta in K. */
export const betaOhm = (r20: number, beta: number, celsius: number) =>
  r20 * Math.exp(beta * (1 / (celsius + KELVIN) - 1 / 293.15));

/** Volts at a pulled-up thermistor. */
export const dividerVolts = (ohm: number, pullUpOhm: number, supplyV = 5) => (supplyV * ohm) / (ohm + pullUpOhm);

export interface TraceReading {
  crossings: number;
  min: number;
  max: number;
  mean: number;
  richShare: number;
  verdict:
    | "healthy"
    | "slow"
    | "reads lean"
    | "reads rich"
    | "open circuit or cold sensor"
    | "lean or shorted low; force rich";
}

/**
 * Reads a switching sensor's trace, volts at equal times (10 Hz or faster). The state changes only past 0.50 going up or
 * 0.40 going down, so noise at the threshold is not counted. Common practice; empty traces throw.
 */
export function readTrace(volts: readonly number[], threshold = 0.45, hysteresis = 0.05): TraceReading {
  if (volts.length === 0) throw new RangeError("an empty trace");
  let rich = (volts[0] ?? 0) > threshold;
  let crossings = 0;
  for (const v of volts) {
    if (!rich && v >= threshold + hysteresis) {
      rich = true;
      crossings++;
    } else if (rich && v <= threshold - hysteresis) {
      rich = false;
      crossings++;
    }
  }
  const min = Math.min(...volts);
  const max = Math.max(...volts);
  const mean = volts.reduce((s, v) => s + v, 0) / volts.length;
  const richShare = volts.filter((v) => v > threshold).length / volts.length;
  const verdict =
    max < 0.1
      ? "lean or shorted low; force rich"
      : max - min < 0.1 && mean > 0.35 && mean < 0.55
        ? "open circuit or cold sensor"
        : mean < 0.35 && max < 0.6
          ? "reads lean"
          : mean > 0.6 && min > 0.4
            ? "reads rich"
            : min < 0.2 && max > 0.75 && crossings >= 3
              ? "healthy"
              : "slow";
  return { crossings, min, max, mean, richShare, verdict };
}

/** Rear ÷ front crossings: below 0.3 stores oxygen, above about 0.5 does not (common practice). */
export function switchRatio(
  front: number,
  rear: number,
): { ratio: number; verdict: "catalyst good" | "doubtful" | "catalyst spent (if mixture and sensors are right)" } {
  const ratio = rear / front;
  return {
    ratio,
    verdict:
      ratio < 0.3 ? "catalyst good" : ratio < 0.5 ? "doubtful" : "catalyst spent (if mixture and sensors are right)",
  };
}

/** Conversion of a catalyst, percent, from the same gas before and after. */
export const conversionPct = (before: number, after: number) => (100 * (before - after)) / before;
