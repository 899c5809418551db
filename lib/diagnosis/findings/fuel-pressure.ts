import { judge } from "../bands";
import type { Mode } from "../vocabulary";
import type { FindingSheet } from "./sheet";

/** Fuel pressure against the maker's figure, still, under load and after shutdown; pump feed, tank and blend. */
export function fuelPressure(f: FindingSheet): void {
  const pick = (modes: Mode[]) => {
    for (const mode of modes) {
      const p = f.r.one("fuelPressureKPa", mode);
      const spec = p && f.r.beside("fuelPressureSpecKPa", p);
      if (p && spec && spec.value > 0) return { p, spec, ratio: p.value / spec.value };
    }
    return null;
  };
  const still = pick(["idling", "raised-idle", "starting"]);
  const list = (["idling", "raised-idle", "starting"] as const).flatMap((m) => pick([m]) ?? []);
  if (still) {
    const worst = list.reduce((a, b) =>
      Math.abs(Math.log(Math.max(b.ratio, 0.01))) > Math.abs(Math.log(Math.max(a.ratio, 0.01))) ? b : a,
    );
    const state = worst.ratio < 0.15 ? "none" : worst.ratio < 0.89 ? "low" : worst.ratio > 1.12 ? "high" : "in-spec";
    f.test(
      "fuel-pressure",
      [state],
      `Fuel pressure ${worst.p.value} kPa against ${worst.spec.value} kPa: ${state === "in-spec" ? "in specification" : state}`,
      [worst.p, worst.spec],
      state !== "in-spec",
      "fuel-supply",
      state === "high" ? "rich" : state === "in-spec" ? null : "lean",
    );
  }
  if (!still) {
    // Without the maker's figure only a reading far outside what such systems hold says anything (common practice bands).
    const bare = f.r.one("fuelPressureKPa", "idling", "raised-idle", "starting");
    const judged = bare && judge("fuelPressureKPa", bare.value, bare.mode, f.vehicle);
    if (bare && judged?.state === "outside" && judged.side) {
      const state = bare.value < 10 ? "none" : judged.side;
      f.test(
        "fuel-pressure",
        [state],
        `Fuel pressure ${bare.value} kPa: ${judged.message.toLowerCase()}`,
        [bare],
        true,
        "fuel-supply",
        state === "high" ? "rich" : "lean",
      );
    }
  }
  const loaded = pick(["accelerating"]);
  if (loaded) {
    const drops = loaded.ratio < 0.87;
    f.test(
      "fuel-pressure-under-load",
      [drops ? "drops" : "holds"],
      `Fuel pressure ${drops ? "drops to" : "holds"} ${loaded.p.value} of ${loaded.spec.value} kPa under load`,
      [loaded.p, loaded.spec],
      drops,
      "fuel-supply",
      drops ? "lean" : null,
    );
  }
  const drop = f.r.one("fuelPressureDropKPaIn5Min");
  const key = f.r.one("fuelPressureKPa", "key-on");
  const keySpec = key && f.r.beside("fuelPressureSpecKPa", key);
  if (drop) {
    const leaks = drop.value > 40;
    f.test(
      "fuel-pressure-hold",
      [leaks ? "leaks-down" : "holds"],
      `Loses ${drop.value} kPa in 5 minutes${leaks ? "" : ": holds"}`,
      [drop],
      leaks,
      "fuel-supply",
      leaks ? "lean" : null,
    );
  } else if (
    key &&
    keySpec &&
    (f.r.beside("engineOffHours", key)?.value ?? 0) >= 1 &&
    key.value < 0.3 * keySpec.value
  ) {
    f.test(
      "fuel-pressure-hold",
      ["leaks-down"],
      `Only ${key.value} of ${keySpec.value} kPa left after standing`,
      [key, keySpec],
      true,
      "fuel-supply",
      "lean",
    );
  }
  const volts = f.r.one("pumpV");
  if (volts) {
    const state = volts.value < 2 ? "none" : volts.value < (volts.mode === "starting" ? 8 : 11.5) ? "low" : "good";
    f.sign(
      "pump-feed",
      [state],
      `${volts.value} V at the pump${state === "good" ? "" : state === "none" ? ": no feed" : ": low"}`,
      [volts],
      state !== "good",
      null,
      state === "good" ? null : "lean",
    );
  }
  const amps = f.r.one("pumpA");
  if (amps) {
    const state = amps.value < 0.3 ? "none" : amps.value < 2.2 ? "low" : amps.value > 8 ? "high" : "normal";
    f.test(
      "pump-current",
      [state],
      `Pump draws ${amps.value} A`,
      [amps],
      state !== "normal",
      "fuel-supply",
      state === "normal" ? null : "lean",
    );
  }
  const level = f.r.one("FLI");
  if (level) {
    const empty = level.value < 5;
    if (empty) f.sign("tank-level", ["empty"], `Tank at ${level.value} %`, [level], true, null, "lean");
  }
  const alcohol = f.r.one("ALCH_PCT");
  if (alcohol) {
    const expected = Number((f.vehicle.fuel ?? "E10").slice(1));
    const high = alcohol.value > expected + 9;
    f.test(
      "ethanol-content",
      [high ? "high" : "expected"],
      `${alcohol.value} % alcohol in a tank meant for ${expected} %`,
      [alcohol],
      high,
      null,
      high ? "lean" : null,
    );
  }
}
