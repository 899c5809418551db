/**
 * Published exhaust limits, as examples of rule shapes: the local programme always rules. "May not exceed": equal passes.
 * Sources: Directive 2014/45/EU Annex I 8.2.1.2 (closed-loop catalyst); 40 CFR 85.2203 (1981 and later light-duty).
 */
export function euCoLimitPct(firstUse: string, mode: "idle" | "high_idle"): number {
  const later = firstUse >= "2002-07-01";
  return mode === "idle" ? (later ? 0.3 : 0.5) : later ? 0.2 : 0.3;
}
/** λ 1 ± 0.03 at high idle, to the third decimal as instruments print it. */
export const euLambdaPasses = (lambda: number) => lambda >= 0.97 - 1e-9 && lambda <= 1.03 + 1e-9;
export const usIdlePasses = (hcPpm: number, coPct: number) => hcPpm <= 220 && coPct <= 1.2;
