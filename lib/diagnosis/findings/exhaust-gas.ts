import { lambdaFromGas } from "@/lib/engine/lambda";
import type { CauseFamily } from "../causes";
import type { Theme } from "../observation";
import type { Reading } from "../readings";
import { MODE_LABELS, type Mode } from "../vocabulary";
import { type FindingSheet, round } from "./sheet";

/** Exhaust gas: λ, unburned charge, nitrogen oxides, and whether it contradicts the trim. */
export function exhaustGas(f: FindingSheet): void {
  const carb = f.vehicle.fuelSystem === "carburetted" || f.vehicle.o2Sensing === "none";
  const states: { mode: Mode; state: string; lambda: number | null; from: (Reading | undefined)[]; words: string }[] =
    [];
  for (const mode of ["idling", "raised-idle", "cruising", "accelerating"] as const) {
    const co = f.r.one("coPct", mode);
    const co2 = f.r.one("co2Pct", mode);
    const o2 = f.r.one("o2Pct", mode);
    const hc = f.r.one("hcPpm", mode);
    const nox = f.r.one("noxPpm", mode);
    if (!co && !hc && !nox) continue;
    const lambda =
      co && co2 && o2
        ? lambdaFromGas({
            coPct: co.value,
            co2Pct: co2.value,
            o2Pct: o2.value,
            hcPpm: hc?.value ?? 0,
            noxPpm: nox?.value,
          })
        : null;
    if (co && co2 && co.value + co2.value < 6) {
      f.r.note(co.path, "CO and CO₂ together are below 6 %: the sample is mostly air and is not used.");
      continue;
    }
    const c = co?.value ?? 0;
    const h = hc?.value ?? 0;
    const ox = o2?.value ?? 0;
    // Fixed jets run richer in thin air, about √(density): what the altitude explains is not a fault.
    const richLimit = 4 + 30 * Math.max(0, 1 - Math.sqrt(f.baro / 101.3));
    let state = "normal";
    if ((nox?.value ?? 0) > 1200 && mode !== "accelerating") state = "high-nox";
    else if (carb) {
      if (c > richLimit) state = "rich";
      else if (h > 450 && ox > 1.5 && c > 0.5) state = "misfire";
      else if (c < 0.45 && ox > 2) state = "lean";
      else if (h > 900) state = "misfire";
    } else if (h > 350 && ox > 1 && c < 2.5) state = "misfire";
    else if (c > 1 && (lambda === null || lambda < 0.99)) state = "rich";
    else if (lambda !== null && lambda > 1.04) state = h > 500 ? "misfire" : "lean";
    else if (c > 0.9 && ox < 1.2) state = "rich";
    else if (c >= 0.35 && h >= 80) state = "dead-catalyst";
    const words = [
      lambda === null ? "" : `λ ${lambda.toFixed(2)}`,
      co ? `CO ${c} %` : "",
      hc ? `HC ${h} ppm` : "",
      o2 ? `O₂ ${ox} %` : "",
      nox ? `NOx ${nox.value} ppm` : "",
    ]
      .filter(Boolean)
      .join(", ");
    states.push({ mode, state, lambda, from: [co, co2, o2, hc, nox], words });
  }
  if (states.length === 0) return;
  // Gas against trim: the tail pipe and the control loop cannot both be right.
  for (const s of states) {
    const total = (f.r.one("SHRTFT1", s.mode)?.value ?? 0) + (f.r.one("LONGFT1", s.mode)?.value ?? 0);
    const total2 =
      f.vehicle.banks === 2 ? (f.r.one("SHRTFT2", s.mode)?.value ?? 0) + (f.r.one("LONGFT2", s.mode)?.value ?? 0) : 0;
    const most = Math.abs(total2) > Math.abs(total) ? total2 : total;
    if (s.state === "rich" && most > 7) {
      f.sign(
        "gas-against-trim",
        ["rich-yet-adding"],
        `The tail pipe is rich (${s.words}) while trim adds ${round(most)} %`,
        s.from,
        true,
        "front-o2",
        "rich",
      );
      return;
    }
    if (s.lambda !== null && s.lambda > 1.04 && most < -7) {
      f.sign(
        "gas-against-trim",
        ["lean-yet-taking"],
        `The tail pipe is lean (${s.words}) while trim takes away ${round(-most)} %`,
        s.from,
        true,
        "front-o2",
        "lean",
      );
      return;
    }
  }
  const kind = (mode: Mode) => states.find((s) => s.mode === mode)?.state;
  const is = (word: string) => states.filter((s) => s.state === word);
  const idle = kind("idling");
  const others = states.filter((s) => s.mode !== "idling");
  let state: string[] = ["normal"];
  if (is("misfire").length > 0) state = ["misfire"];
  else
    for (const word of ["rich", "lean"] as const) {
      const hits = is(word).length;
      if (hits === 0) continue;
      if (idle === word)
        state =
          others.length === 0
            ? [`${word}-idle`, `${word}-everywhere`]
            : others.some((s) => s.state === word)
              ? [`${word}-everywhere`]
              : [`${word}-idle`];
      else state = idle === undefined ? [`${word}-off-idle`, `${word}-everywhere`] : [`${word}-off-idle`];
      break;
    }
  if (state[0] === "normal") {
    if (is("high-nox").length > 0) state = ["high-nox"];
    else if (is("dead-catalyst").length > 0) state = ["dead-catalyst"];
  }
  const abnormal = state[0] !== "normal";
  const family: CauseFamily | null = /rich/.test(state[0] ?? "")
    ? "rich"
    : /lean/.test(state[0] ?? "")
      ? "lean"
      : abnormal
        ? "spark"
        : null;
  const theme: Theme =
    state[0] === "misfire"
      ? "misfire"
      : state[0] === "dead-catalyst"
        ? "catalyst"
        : state[0] === "high-nox"
          ? "egr"
          : f.vehicle.o2Sensing === "none"
            ? null
            : "mixture";
  const name =
    {
      misfire: "unburned charge",
      "high-nox": "nitrogen oxides are high",
      "dead-catalyst": "as it leaves the engine, not as it leaves a good catalyst",
    }[state[0] ?? ""] ?? (state[0] ?? "").replaceAll("-", " ");
  f.sign(
    "gas",
    state,
    `Exhaust gas ${states.map((s) => `${MODE_LABELS[s.mode].toLowerCase()} ${s.words}`).join("; ")}: ${name}`,
    states.flatMap((s) => s.from),
    abnormal,
    theme,
    family,
  );
}
