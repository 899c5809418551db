import { airDensity } from "@/lib/engine/air";
import { type FindingSheet, round, STEADY } from "./sheet";

/** Air flow against the size of the engine, against manifold pressure, and at full load. */
export function airFlow(f: FindingSheet): void {
  const litres = f.vehicle.displacementL;
  if (!litres) return;
  const idle = f.r.one("MAF", "idling");
  const idleRpm = idle && f.r.beside("RPM", idle);
  if (idle && f.warm(idle)) {
    const perLitre = (idle.value / litres) * (750 / Math.max(idleRpm?.value ?? 750, 400)) * (101.3 / f.baro) ** 0.3;
    const state = perLitre < 0.85 ? "low" : perLitre > 1.75 ? "high" : "normal";
    f.sign(
      "idle-air-flow",
      [state],
      `Idle air flow ${idle.value} g/s, ${state === "normal" ? "fits the engine's size and speed" : `${state} for ${litres} L`}`,
      [idle, idleRpm],
      state !== "normal",
      "idle",
      state === "low" ? "lean" : state === "high" ? "rich" : null,
    );
  }
  for (const mode of STEADY) {
    const maf = f.r.one("MAF", mode);
    const map = maf && f.r.beside("MAP", maf);
    const rpm = maf && f.r.beside("RPM", maf);
    if (!maf || !map || !rpm || rpm.value < 300) continue;
    const iat = f.r.beside("IAT", maf)?.value ?? 25;
    // Expected breathing depends on load: about 0.55 at idle, 0.75 cruising, referred to manifold density.
    const ve = mode === "idling" ? 0.55 : mode === "raised-idle" ? 0.63 : 0.75;
    const expected = (ve * map.value * litres * rpm.value) / 120 / (0.28705 * (iat + 283));
    const ratio = maf.value / expected;
    const state = ratio < 0.62 ? "maf-low" : ratio > 1.5 ? "maf-high" : "agrees";
    f.sign(
      "air-agreement",
      [state],
      state === "agrees"
        ? "Air flow agrees with manifold pressure and speed"
        : `Air flow ${maf.value} g/s against about ${round(expected)} g/s from manifold pressure`,
      [maf, map, rpm],
      state !== "agrees",
      "map",
      state === "maf-low" ? "lean" : state === "maf-high" ? "rich" : null,
    );
    break;
  }
  const full = f.r.one("MAF", "accelerating");
  const rpm = full && f.r.beside("RPM", full);
  const plate = full && (f.r.beside("TP", full) ?? f.r.beside("LOAD_PCT", full));
  if (full && rpm && (plate?.value ?? 0) >= 75 && f.vehicle.aspiration !== "boosted") {
    const iat = f.r.beside("IAT", full)?.value ?? f.r.caseFile.site?.ambientC ?? 25;
    const ve = (100 * full.value) / (airDensity(f.baro, iat) * litres * (rpm.value / 120));
    const low = ve < 75;
    f.sign(
      "full-load-breathing",
      [low ? "low" : "normal"],
      `Volumetric efficiency ${round(ve, 0)} % at full load${low ? ": low" : ""}`,
      [full, rpm, plate],
      low,
      null,
      low ? "mech" : null,
    );
  }
}
