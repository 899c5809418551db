/** Atom ratios used by exhaust analysers, by fuel. Source: OIML R 99 (gasoline, LPG, CNG); blends by volume from composition. */
const GAS_FUELS: Record<string, { hcv: number; ocv: number }> = {
  gasoline: { hcv: 1.7261, ocv: 0.0176 },
  LPG: { hcv: 2.525, ocv: 0 },
  CNG: { hcv: 4, ocv: 0 },
  // The blend's own atom ratios, by ideal mixing of gasoline CH1.87 and ethanol.
  E10: { hcv: 1.9449, ocv: 0.0331 },
};

export interface ExhaustGas {
  coPct: number;
  co2Pct: number;
  o2Pct: number;
  hcPpm: number;
  noxPpm?: number;
  /** Default gasoline, which is also what analysers assume for low ethanol blends. */
  fuel?: "gasoline" | "LPG" | "CNG" | "E10";
  /** Carbon atoms an HC reading stands for: 6 for hexane by infrared (default). */
  k1?: number;
}

/**
 * λ from dry exhaust gas (volume percent; HC and NO in ppm), Brettschneider's balance with water-gas constant 3.5.
 * Accurate from about 0.97 to 1.03, useful from 0.8 to 1.4. Null when CO2 is 0, CO + CO2 is below 6 % (the sample is
 * mostly air: 40 CFR 85 subpart W) or an input is not finite or negative.
 * Source: J. Brettschneider, Technische Berichte 6 (1979) 4, 177–186; constants as in OIML R 99 / ISO 3930.
 */
export function lambdaFromGas(gas: ExhaustGas): number | null {
  const { coPct: co, co2Pct: co2, o2Pct: o2, hcPpm, noxPpm = 0, fuel = "gasoline", k1 = 6 } = gas;
  if (![co, co2, o2, hcPpm, noxPpm].every((n) => Number.isFinite(n) && n >= 0)) return null;
  if (co2 === 0 || co + co2 < 6) return null;
  const { hcv, ocv } = GAS_FUELS[fuel] ?? { hcv: 1.7261, ocv: 0.0176 };
  const hc = hcPpm / 10_000;
  const no = noxPpm / 10_000;
  const water = ((hcv / 4) * 3.5) / (3.5 + co / co2) - ocv / 2;
  return (co2 + co / 2 + o2 + no / 2 + water * (co2 + co)) / ((1 + hcv / 4 - ocv / 2) * (co2 + co + k1 * hc));
}

/** CO undiluted by air: CO × 15 / (CO + CO2) when the sum is below 15 %. Source: UN Regulation 83, type II test. */
export function correctedCo(coPct: number, co2Pct: number): number {
  const sum = coPct + co2Pct;
  return sum > 0 && sum < 15 ? (coPct * 15) / sum : coPct;
}
