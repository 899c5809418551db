import type { FindingSheet } from "./sheet";

/** Mixture and boost under load. */
export function fullLoad(f: FindingSheet): void {
  for (const bank of [1, 2] as const) {
    const lambda = f.r.one(bank === 1 ? "EQ_RAT11" : "EQ_RAT21", "accelerating");
    const wanted = lambda && f.r.beside("EQ_RAT", lambda);
    const volts = f.r.one(bank === 1 ? "O2S11" : "O2S21", "accelerating");
    const at = lambda ?? volts;
    if (!at) continue;
    const plate = f.r.beside("TP", at) ?? f.r.beside("LOAD_PCT", at);
    if (plate && plate.value < 45) continue;
    if (lambda) {
      const lean = lambda.value > Math.max(1.015, (wanted?.value ?? 0.88) + 0.1);
      const rich = wanted ? lambda.value < wanted.value - 0.05 : lambda.value < 0.74;
      f.sign(
        "full-load-mixture",
        [lean ? "lean" : rich ? "over-rich" : "normal"],
        `λ ${lambda.value} accelerating${wanted ? ` for ${wanted.value} commanded` : ""}${lean ? ": lean under load" : rich ? ": richer than commanded" : ""}`,
        [lambda, wanted],
        lean || rich,
        lean ? "fuel-supply" : null,
        lean ? "lean" : rich ? "rich" : null,
      );
    } else if (volts) {
      const lean = volts.value < 0.4;
      f.sign(
        "full-load-mixture",
        [lean ? "lean" : "normal"],
        `Front sensor ${volts.value} V accelerating${lean ? ": lean under load" : ""}`,
        [volts],
        lean,
        lean ? "fuel-supply" : null,
        lean ? "lean" : null,
      );
    }
    break;
  }
  const boost = f.r.one("MAP", "accelerating");
  const wanted = boost && f.r.beside("boostCommandedKPa", boost);
  if (boost && wanted && wanted.value > 0) {
    const ratio = boost.value / wanted.value;
    const state = ratio < 0.91 ? "low" : ratio > 1.08 ? "high" : "as-commanded";
    f.test(
      "boost-check",
      [state],
      `Boost ${boost.value} of ${wanted.value} kPa commanded`,
      [boost, wanted],
      state !== "as-commanded",
      "boost",
      state === "as-commanded" ? null : "mech",
    );
  }
}
