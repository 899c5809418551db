import type { Mode } from "../vocabulary";
import type { Extra, FindingSheet } from "./sheet";

/** Which cylinders misfire, from counters and codes together, and when. */
export function misfires(f: FindingSheet): void {
  const counts = f.r.byCylinder("misfireCounts");
  const codes = f.r.caseFile.codes
    .map((c, i) => ({
      cylinder: /^P03(0\d|1[0-2])$/.test(c.code) ? Number(c.code.slice(3)) : null,
      path: `codes[${i}]`,
    }))
    .filter((c): c is { cylinder: number; path: string } => c.cylinder !== null);
  if (counts.length === 0 && codes.length === 0) return;
  const sum: Record<string, number> = {};
  const modes = new Set<Mode>();
  for (const c of counts) {
    for (const [k, v] of Object.entries(c.values)) sum[k] = (sum[k] ?? 0) + v;
    if (Object.values(c.values).reduce((s, v) => s + v, 0) > 5) modes.add(c.mode);
  }
  const total = Object.values(sum).reduce((s, v) => s + v, 0);
  const named = codes.filter((c) => c.cylinder > 0).map((c) => c.cylinder);
  const random = codes.some((c) => c.cylinder === 0);
  // Counts say it by cylinder: a share above 10 % counts, as the misfire rule of 13 CCR 1968.2 has it.
  let bad =
    total > 5
      ? Object.entries(sum)
          .filter(([, v]) => v > 0.1 * total && v > 3)
          .map(([k]) => Number(k))
      : [];
  if (bad.length === 0) bad = [...new Set(named)];
  bad.sort((a, b) => a - b);
  const from = [...counts.map((c) => ({ path: c.path })), ...codes];
  if (bad.length === 0 && !random) {
    f.sign(
      "misfires",
      ["none"],
      total > 0 ? `Misfire counts are noise (${total})` : "No misfires counted",
      from,
      false,
      "misfire",
    );
    return;
  }
  const n = f.vehicle.cylinders ?? 4;
  let states: string[];
  let words: string;
  const extra: Extra = {};
  if (bad.length === 1 && !(random && total <= 5 && named.length === 0)) {
    states = ["one"];
    words = `cylinder ${bad[0]} alone`;
    extra.cylinder = bad[0];
  } else if (bad.length === 2) {
    const companion = companions(f, bad[0] ?? 0, bad[1] ?? 0);
    if (companion === true) {
      states = ["pair"];
      words = `cylinders ${bad.join(" and ")}, which share a coil or a top dead centre`;
    } else if (companion === null && f.vehicle.ignition === "waste-spark") {
      states = ["pair", "two"];
      words = `cylinders ${bad.join(" and ")}; the firing order is not stated, so whether they are companions is not known`;
    } else if (adjacent(f, bad)) {
      states = ["adjacent", "two"];
      words = `neighbours ${bad.join(" and ")}`;
    } else {
      states = ["two"];
      words = `cylinders ${bad.join(" and ")}`;
    }
  } else {
    const one = f.vehicle.bank1Cylinders;
    const oneBank =
      f.vehicle.banks === 2 &&
      one !== undefined &&
      bad.length > 2 &&
      (bad.every((c) => one.includes(c)) || bad.every((c) => !one.includes(c)));
    states = oneBank ? ["bank"] : ["several"];
    words = oneBank ? "one bank" : bad.length > 0 ? `cylinders ${bad.join(", ")}` : "more than one cylinder";
    if (oneBank && one) extra.bank = one.includes(bad[0] ?? 0) ? 1 : 2;
    if (oneBank && bad.length < n / 2) states = ["bank", "several"];
  }
  f.sign("misfires", states, `Misfire: ${words}`, from, true, "misfire", "spark", extra);
  if (modes.size > 0) {
    const idle = modes.has("idling") || modes.has("raised-idle");
    const load = modes.has("accelerating");
    const measuredBoth =
      counts.some((c) => c.mode === "idling") && counts.some((c) => c.mode === "accelerating" || c.mode === "cruising");
    if (load && !idle && measuredBoth)
      f.sign("misfires-when", ["load"], "Misfires under load, not at idle", from, true, null, "spark");
    else if (idle && !load && measuredBoth && !modes.has("cruising"))
      f.sign("misfires-when", ["idle"], "Misfires at idle, not under load", from, true, null, "spark");
  }
}

function companions(f: FindingSheet, a: number, b: number): boolean | null {
  const order = f.vehicle.firingOrder;
  if (!order || order.length % 2 === 1) return null;
  const at = order.indexOf(a);
  return at >= 0 && order[(at + order.length / 2) % order.length] === b;
}

export function adjacent(f: FindingSheet, [a = 0, b = 0]: number[]): boolean {
  // In line, numbers that follow each other are neighbours; on two banks only inside one bank.
  if (Math.abs(a - b) !== 1) return false;
  if (f.vehicle.banks !== 2) return true;
  const one = f.vehicle.bank1Cylinders;
  return one ? one.includes(a) === one.includes(b) : true;
}
