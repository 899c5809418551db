import type { CylinderReadings } from "../case-file";
import type { TestId } from "../vocabulary";
import { adjacent, misfires } from "./misfires";
import type { FindingSheet } from "./sheet";

/** Readings by cylinder: compression, leak-down, balance, gaps, firing voltage, injector drop. */
export function cylinders(f: FindingSheet): void {
  misfires(f);
  const compression = f.r.byCylinder("compressionKPa").at(-1);
  if (compression) {
    const list = Object.entries(compression.values).map(([c, v]) => ({ c: Number(c), v }));
    const top = Math.max(...list.map((x) => x.v));
    const low = list
      .filter((x) => x.v < 0.75 * top)
      .map((x) => x.c)
      .sort((a, b) => a - b);
    const words = list.map((x) => `${x.c}: ${x.v}`).join(", ");
    if (list.length >= 2) {
      const state =
        low.length === 0
          ? top < 870 * (f.baro / 101.3)
            ? "all-low"
            : "even"
          : low.length === 1
            ? "one-low"
            : low.length === 2 && adjacent(f, low)
              ? "adjacent-low"
              : "several-low";
      f.test(
        "compression",
        [state],
        `Compression ${words} kPa: ${state.replaceAll("-", " ")}`,
        [{ path: compression.path }],
        state !== "even",
        "compression",
        state === "even" ? null : "mech",
        low.length === 1 ? { cylinder: low[0] } : {},
      );
    }
  }
  const leak = f.r.byCylinder("leakdownPct").at(-1);
  if (leak) {
    const bad = Object.entries(leak.values)
      .filter(([, v]) => v > 25)
      .map(([c]) => Number(c));
    const states = bad.length > 0 ? ["intake", "exhaust", "crankcase", "coolant"] : ["in-spec"];
    f.test(
      "cylinder-leakdown",
      states,
      bad.length > 0
        ? `Leak-down ${bad.map((c) => `${leak.values[String(c)]} % at cylinder ${c}`).join(", ")}`
        : "Leak-down within 25 % on every cylinder",
      [{ path: leak.path }],
      bad.length > 0,
      "compression",
      bad.length > 0 ? "mech" : null,
      bad.length === 1 ? { cylinder: bad[0] } : {},
    );
  }
  const relative = f.r.byCylinder("relativeCompressionPct").at(-1);
  if (relative) {
    const bad = Object.entries(relative.values)
      .filter(([, v]) => v < 87)
      .map(([c]) => Number(c));
    const state = bad.length === 0 ? "even" : bad.length === 1 ? "one-low" : "several-low";
    f.test(
      "relative-compression",
      [state],
      `Relative compression: ${state.replaceAll("-", " ")}`,
      [{ path: relative.path }],
      bad.length > 0,
      "compression",
      bad.length > 0 ? "mech" : null,
      bad.length === 1 ? { cylinder: bad[0] } : {},
    );
  }
  const balance = f.r.byCylinder("powerBalanceRpmDrop").at(-1);
  if (balance) {
    const values = Object.values(balance.values).sort((a, b) => a - b);
    const median = values[Math.floor(values.length / 2)] ?? 0;
    const bad = Object.entries(balance.values)
      .filter(([, v]) => v < 0.5 * median)
      .map(([c]) => Number(c));
    const state = bad.length === 0 ? "even" : bad.length === 1 ? "one-weak" : "several-weak";
    f.test(
      "power-balance",
      [state],
      `Power balance: ${state.replaceAll("-", " ")}`,
      [{ path: balance.path }],
      bad.length > 0,
      "misfire",
      bad.length > 0 ? "spark" : null,
      bad.length === 1 ? { cylinder: bad[0] } : {},
    );
  }
  const drop = f.r.byCylinder("injectorDropKPa").at(-1);
  if (drop) deviation(f, "injector-balance", drop.values, drop.path, 0.1);
  const gap = f.r.byCylinder("plugGapMm").at(-1);
  const limit = f.r.one("plugGapLimitMm");
  if (gap && limit) {
    const wide = Object.values(gap.values).filter((v) => v > limit.value * 1.05).length;
    f.test(
      "plug-inspection",
      wide > 0 ? ["worn"] : ["fuel-fouled", "oil-fouled", "deposits", "normal"],
      wide > 0 ? `Plug gaps beyond the limit of ${limit.value} mm` : "Plug gaps within the limit",
      [{ path: gap.path }, limit],
      wide > 0,
      null,
      wide > 0 ? "spark" : null,
    );
  }
  const kv = f.r.byCylinder("secondaryKv").at(-1);
  if (kv) {
    const list = Object.entries(kv.values).map(([c, v]) => ({ c: Number(c), v }));
    const middle = list.map((x) => x.v).sort((a, b) => a - b)[Math.floor(list.length / 2)] ?? 0;
    const high = list.filter((x) => x.v > middle + 4);
    const low = list.filter((x) => x.v < middle - 3.5);
    const state = middle > 15 ? "all-high" : high.length === 1 ? "one-high" : low.length === 1 ? "one-low" : "normal";
    const cylinder = state === "one-high" ? high[0]?.c : state === "one-low" ? low[0]?.c : undefined;
    f.test(
      "secondary-scope",
      [state],
      `Firing voltage: ${state.replaceAll("-", " ")}`,
      [{ path: kv.path }],
      state !== "normal",
      null,
      state === "normal" ? null : "spark",
      cylinder ? { cylinder } : {},
    );
  }
}

function deviation(f: FindingSheet, test: TestId, values: CylinderReadings, path: string, share: number): void {
  const list = Object.entries(values).map(([c, v]) => ({ c: Number(c), v }));
  if (list.length < 2) return;
  const mean = list.reduce((s, x) => s + x.v, 0) / list.length;
  const low = list.filter((x) => x.v < mean * (1 - share));
  const high = list.filter((x) => x.v > mean * (1 + share));
  // One cylinder far out pulls the mean: judge by the larger deviation.
  const lowest = Math.min(...list.map((x) => x.v));
  const highest = Math.max(...list.map((x) => x.v));
  const state =
    low.length === 0 && high.length === 0
      ? "even"
      : mean - lowest >= highest - mean
        ? low.length > 1
          ? "several-low"
          : "one-low"
        : "one-high";
  const cylinder = state === "one-low" ? low[0]?.c : state === "one-high" ? high[0]?.c : undefined;
  f.test(
    test,
    [state],
    `Injector pressure drop: ${state.replaceAll("-", " ")}`,
    [{ path }],
    state !== "even",
    null,
    state === "even" ? null : state === "one-high" ? "rich" : "lean",
    cylinder ? { cylinder } : {},
  );
}
