/** Mixture chemistry. Source: Heywood, Internal Combustion Engine Fundamentals, ch. 3; EN 228 densities. */

export const GASOLINE_RATIO = 14.599;
export const ETHANOL_RATIO = 9.0021;
/** kg/m³ at 20 °C. */
export const GASOLINE_DENSITY = 745;
export const ETHANOL_DENSITY = 789;

/**
 * Stoichiometric air-fuel ratio by mass of a fuel CHyOz, from its atom ratios.
 * @throws RangeError when the composition cannot burn or is not finite
 */
export function ratioFromComposition(hydrogenPerCarbon: number, oxygenPerCarbon: number): number {
  const need = 4 + hydrogenPerCarbon - 2 * oxygenPerCarbon;
  if (!Number.isFinite(need) || need <= 0 || hydrogenPerCarbon < 0 || oxygenPerCarbon < 0)
    throw new RangeError("not the composition of a fuel");
  return (34.56 * need) / (12.011 + 1.008 * hydrogenPerCarbon + 15.999 * oxygenPerCarbon);
}

/** Mass share of ethanol in a blend, from its volume share (0 to 1; values outside are clamped). */
export function ethanolMassShare(volumeShare: number): number {
  const v = Math.min(1, Math.max(0, volumeShare));
  return (v * ETHANOL_DENSITY) / (v * ETHANOL_DENSITY + (1 - v) * GASOLINE_DENSITY);
}

/** Stoichiometric ratio of a gasoline–ethanol blend by volume share (0 to 1, clamped). */
export function stoichiometricRatio(volumeShare: number): number {
  const w = ethanolMassShare(volumeShare);
  return w * ETHANOL_RATIO + (1 - w) * GASOLINE_RATIO;
}

/** Density of a blend, g/L, ideal mixing, 20 °C. */
export function blendDensity(volumeShare: number): number {
  const v = Math.min(1, Math.max(0, volumeShare));
  return v * ETHANOL_DENSITY + (1 - v) * GASOLINE_DENSITY;
}

/** Fuel volume needed for one unit of air, relative to gasoline without ethanol: what an injector must deliver. */
export function volumeDemand(volumeShare: number): number {
  return (GASOLINE_RATIO * GASOLINE_DENSITY) / (stoichiometricRatio(volumeShare) * blendDensity(volumeShare));
}

/** Percent more fuel volume a blend needs than the base blend, both by volume share. */
export function volumeShiftPct(volumeShare: number, baseShare = 0): number {
  return 100 * (volumeDemand(volumeShare) / volumeDemand(baseShare) - 1);
}

/** λ ↔ air-fuel ratio ↔ equivalence ratio. λ above 1 is lean. Zero or negative λ gives Infinity or nonsense: check first. */
export const ratioFromLambda = (lambda: number, stoichiometric: number) => lambda * stoichiometric;
export const lambdaFromRatio = (ratio: number, stoichiometric: number) => ratio / stoichiometric;
export const phiFromLambda = (lambda: number) => 1 / lambda;

/** Extra fuel per unit of air at a λ, percent. */
export const extraFuelPct = (lambda: number) => 100 * (1 / lambda - 1);

/** Percent more (+) or less fuel that short and long trim make together, exactly: they multiply. */
export const trimProduct = (shortPct: number, longPct: number) =>
  100 * ((1 + shortPct / 100) * (1 + longPct / 100) - 1);
/** The trade's sum of short and long trim. */
export const trimSum = (shortPct: number, longPct: number) => shortPct + longPct;
