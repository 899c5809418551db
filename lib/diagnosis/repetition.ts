import type { Observation } from "./observation";

const range = (row: readonly number[]) => {
  let [low, high] = [0, 0];
  for (const w of row) {
    if (w < low) low = w;
    if (w > high) high = w;
  }
  return high - low;
};

/**
 * What repeats another finding counts half. Inside a theme the finding that separates causes best speaks in full, and so
 * does every test at the bench; signs and codes of the same theme that are also out of the ordinary count half. Findings
 * within the ordinary keep their weight: each clears something of its own.
 */
export function repetitionFactors(
  observations: readonly Observation[],
  rows: readonly (readonly number[])[],
): number[] {
  const strongest = new Map<string, number>();
  observations.forEach((o, i) => {
    if (!o.theme || !o.abnormal) return;
    const best = strongest.get(o.theme);
    const better =
      best === undefined ||
      isTest(o) > isTest(observations[best]) ||
      (isTest(o) === isTest(observations[best]) && range(rows[i] ?? []) > range(rows[best] ?? []));
    if (better) strongest.set(o.theme, i);
  });
  const hasTrims = observations.some((o) => o.kind === "trims");
  return observations.map((o, i) => {
    if (!o.theme || !o.abnormal || o.kind === "test") return 1;
    // The code says what the control unit once saw; trims measured now say it better.
    if (o.kind === "code" && o.theme === "mixture" && hasTrims) return 0.5;
    return strongest.get(o.theme) === i ? 1 : 0.5;
  });
}

const isTest = (o: Observation | undefined) => (o?.kind === "test" ? 1 : 0);
