/** Ignition and cylinder arithmetic. Four-stroke engines; definitions unless a source is named. */

/** Crank degrees between firings. */
export const firingIntervalDeg = (cylinders: number) => 720 / cylinders;
export const firingIntervalMs = (cylinders: number, rpm: number) => 120_000 / (rpm * cylinders);

/** Companion cylinders reach top dead centre together: half the order apart. None for odd counts. */
export function companionPairs(order: readonly number[]): [number, number][] {
  if (order.length % 2 === 1) return [];
  const half = order.length / 2;
  return order
    .slice(0, half)
    .map((c, i): [number, number] => {
      const d = order[i + half] as number;
      return c < d ? [c, d] : [d, c];
    })
    .sort((a, b) => a[0] - b[0]);
}

/** Dwell in distributor degrees → ms and percent of a cylinder's share of the turn. */
export const dwellMs = (deg: number, rpm: number) => (1000 * deg) / (3 * rpm);
export const dwellPct = (deg: number, cylinders: number) => (100 * deg) / (360 / cylinders);
/** Half of a dwell change falls on the opening edge, one crank degree per distributor degree; more dwell retards. */
export const timingShiftFromDwellDeg = (dwellChangeDeg: number) => -dwellChangeDeg;

/** Coil charge: ms to reach a current, and stored energy. RL circuit; Infinity when the supply cannot reach it. */
export function coilCharge(henry: number, ohm: number, volts: number, amps: number): { ms: number; mJ: number } {
  const share = 1 - (amps * ohm) / volts;
  return {
    ms: share > 0 ? -1000 * (henry / ohm) * Math.log(share) : Number.POSITIVE_INFINITY,
    mJ: 500 * henry * amps * amps,
  };
}

export const crankDegFromMs = (ms: number, rpm: number) => ms * rpm * 0.006;
export const toothHz = (teeth: number, rpm: number) => (teeth * rpm) / 60;

/** Misfire share, percent of all firings. */
export const misfirePct = (misfires: number, revolutions: number, cylinders: number) =>
  (100 * misfires) / ((revolutions * cylinders) / 2);
/** Of one cylinder: its misfires ÷ its own firings. */
export const cylinderMisfirePct = (misfires: number, revolutions: number) => (100 * misfires) / (revolutions / 2);

/** How a misfire code may be named. 13 CCR 1968.2 (e)(3.1.3): above 90 % in one names it; two above 10 % are "multiple". */
export function misfireName(counts: readonly number[]): { largestPct: number; over10: number[]; name: string } {
  const total = counts.reduce((s, c) => s + c, 0);
  if (total === 0) return { largestPct: 0, over10: [], name: "none" };
  const over10 = counts.flatMap((c, i) => (c / total > 0.1 ? [i + 1] : []));
  const top = Math.max(...counts);
  return {
    largestPct: (100 * top) / total,
    over10,
    name: top / total > 0.9 ? `single cylinder ${counts.indexOf(top) + 1}` : "multiple",
  };
}

/** Octane: pump label in North America. ASTM D4814. */
export const antiKnockIndex = (ron: number, mon: number) => (ron + mon) / 2;

/** Theoretical cranking pressure, kPa gauge: polytropic from atmospheric at bottom dead centre, n 1.2 to 1.3. */
export const theoreticalCompressionKPa = (ratio: number, n = 1.2, baroKPa = 101.325) => baroKPa * ratio ** n - baroKPa;

/** Compression spread. Lowest at least 75 % of highest; `floor` is 100 psi in the unit of the values. Common practice. */
export function compressionSpread(
  values: readonly number[],
  floor: number,
): { ratioPct: number; lowCylinders: number[]; verdict: "pass" | "fail" | "low overall" } {
  const top = Math.max(...values);
  const lowCylinders = values.flatMap((v, i) => (v < 0.75 * top ? [i + 1] : []));
  return {
    ratioPct: (100 * Math.min(...values)) / top,
    lowCylinders,
    verdict: lowCylinders.length > 0 ? "fail" : top < floor ? "low overall" : "pass",
  };
}

/** Wet test: 10 % or more gained with oil points to the rings. Common practice. */
export function wetGain(dry: number, wet: number): { gainPct: number; pointsTo: "rings" | "valves or gasket" } {
  const gainPct = (100 * (wet - dry)) / dry;
  return { gainPct, pointsTo: gainPct >= 10 ? "rings" : "valves or gasket" };
}

/** Leak-down, percent of supply lost; bands by common practice. */
export function leakDown(
  supply: number,
  cylinder: number,
): { leakPct: number; band: "good" | "acceptable" | "worn" | "bad" } {
  const leakPct = (100 * (supply - cylinder)) / supply;
  return { leakPct, band: leakPct <= 10 ? "good" : leakPct <= 20 ? "acceptable" : leakPct <= 30 ? "worn" : "bad" };
}

/** Relative compression: each starter-current hump as percent of the highest. */
export const relativeCompressionPct = (peaks: readonly number[]) => peaks.map((p) => (100 * p) / Math.max(...peaks));

/** Injector balance: deviation of each pressure drop from the mean, percent; beyond 10 is out. Common practice. */
export function injectorBalance(drops: readonly number[]): { mean: number; deviationPct: number[]; out: number[] } {
  const mean = drops.reduce((s, d) => s + d, 0) / drops.length;
  const deviationPct = drops.map((d) => (100 * (d - mean)) / mean);
  return { mean, deviationPct, out: deviationPct.flatMap((d, i) => (Math.abs(d) > 10 ? [i + 1] : [])) };
}

/** Knock tone of the first mode, Hz, from the bore in mm. Draper's relation, sound at about 900 m/s in burned gas. */
export const knockHz = (boreMm: number) => 900 / (Math.PI * (boreMm / 2000));

/* ---- carburettors ---- */

/** Air speed (m/s) and depression (Pa) in a venturi. Bernoulli, incompressible; throat in mm, air in kg/m³. */
export function venturi(
  airGps: number,
  throatMm: number,
  cd = 0.95,
  density = 1.2,
): { speedMs: number; depressionPa: number } {
  const area = (Math.PI / 4) * (throatMm / 1000) ** 2;
  const speedMs = airGps / 1000 / (density * area);
  return { speedMs, depressionPa: (airGps / 1000 / (cd * area)) ** 2 / (2 * density) };
}

/** λ of a fixed jet at another air density: fuel ~ √(ρ·Δp), air ~ ρ, so λ falls as √(density ratio). */
export const fixedJetLambda = (baseLambda: number, densityRatio: number) => baseLambda * Math.sqrt(densityRatio);
/** Jet bore, mm, for another λ: fuel goes with area. */
export const jetForLambda = (jetMm: number, lambdaNow: number, lambdaWanted: number) =>
  jetMm * Math.sqrt(lambdaNow / lambdaWanted);
