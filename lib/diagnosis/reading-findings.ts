import { airDensity } from "@/lib/engine/air";
import { lambdaFromGas } from "@/lib/engine/lambda";
import type { CylinderReadings } from "./case-file";
import type { CauseFamily } from "./causes";
import type { SignId } from "./knowledge/base-rates";
import type { Observation, Theme } from "./observation";
import type { Reading, Readings } from "./readings";
import { MODE_LABELS, type Mode, type TestId } from "./vocabulary";

interface SensorState {
  states: string[];
  words: string;
  from: (Reading | undefined)[];
  abnormal: boolean;
  family: CauseFamily | null;
}
type Extra = { bank?: number; cylinder?: number };
const STEADY: Mode[] = ["idling", "raised-idle", "cruising"];
const round = (n: number, d = 1) => Number(n.toFixed(d));

/** Reads every sample and says in findings what stands there. One method a subject; thresholds are common practice. */
export class ReadingFindings {
  readonly found: Observation[] = [];
  private readonly vehicle;
  private readonly baro: number;

  constructor(private readonly r: Readings) {
    this.vehicle = r.caseFile.vehicle;
    this.baro = r.one("BARO")?.value ?? r.caseFile.site?.baroKPa ?? 101.3;
    this.idle();
    this.pressures();
    this.airFlow();
    this.frontSensors();
    this.rearSensors();
    this.gas();
    this.cylinders();
    this.fuelPressure();
    this.rail();
    this.heat();
    this.load();
    this.electrics();
    this.spark();
    this.positions();
    this.quiet();
  }

  private sign(
    sign: SignId,
    states: string[],
    statement: string,
    from: (Reading | { path: string } | undefined)[],
    abnormal: boolean,
    theme: Theme,
    family: CauseFamily | null = null,
    extra: Extra = {},
  ): void {
    const id = abnormal ? `${sign}-${states.join("-or-")}` : `${sign}-normal`;
    this.found.push({
      kind: "sign",
      id,
      sign,
      states,
      statement,
      from: from.flatMap((f) => (f ? [f.path] : [])),
      abnormal,
      theme,
      family,
      ...extra,
    });
  }

  private test(
    test: TestId,
    states: string[],
    statement: string,
    from: (Reading | { path: string } | undefined)[],
    abnormal: boolean,
    theme: Theme,
    family: CauseFamily | null = null,
    extra: Extra = {},
  ): void {
    this.found.push({
      kind: "test",
      id: `${test}-reading-${states.join("-or-")}`,
      test,
      states,
      recorded: false,
      statement,
      from: from.flatMap((f) => (f ? [f.path] : [])),
      abnormal,
      theme,
      family,
      ...extra,
    });
  }

  private warm(at: { sample: number }): boolean {
    const ect = this.r.beside("ECT", at);
    return !ect || ect.value >= 60;
  }

  private idle(): void {
    const rpm = this.r.one("RPM", "idling");
    const few = (this.vehicle.cylinders ?? 4) <= 4;
    const carb = this.vehicle.fuelSystem === "carburetted";
    if (rpm && this.warm(rpm)) {
      const low = carb ? (few ? 660 : 560) : few ? 655 : (this.vehicle.cylinders ?? 6) >= 8 ? 540 : 600;
      const high = carb ? 1050 : few ? 980 : 880;
      if (rpm.value < low)
        this.sign("idle-speed", ["low"], `Idles at ${rpm.value} r/min, low`, [rpm], true, "idle", "mech");
      else if (rpm.value > high) {
        this.sign(
          "idle-speed",
          ["high"],
          `Idles at ${rpm.value} r/min, high for a warm engine`,
          [rpm],
          true,
          "idle",
          "lean",
        );
      } else this.sign("idle-speed", ["normal"], `Idle speed ${rpm.value} r/min is usual`, [rpm], false, "idle");
    }
    const air = this.r.one("idleAirPct", "idling");
    const plate = this.r.one("TP", "idling");
    const relative = this.r.one("TP_R", "idling");
    if (air) {
      const state = air.value > 52 ? "wide" : air.value < 8 ? "closed" : "normal";
      this.sign(
        "idle-air",
        [state],
        state === "normal"
          ? `Idle air at ${air.value} % is usual`
          : `Idle air ${state === "wide" ? "wide open" : "almost shut"} at ${air.value} %`,
        [air],
        state !== "normal",
        "idle",
        state === "closed" ? "lean" : "mech",
      );
    } else if (relative || plate) {
      const t = relative ?? plate;
      const wide = relative ? relative.value > 6 : (plate?.value ?? 0) > 16.5;
      // A plate at its usual angle says little: makers place its closed value anywhere.
      if (t && wide)
        this.sign("idle-air", ["wide"], `Throttle stands wide for an idle, ${t.value} %`, [t], true, "idle", "mech");
    }
  }

  private pressures(): void {
    const vacuum = this.r.one("manifoldVacuumKPa", "idling");
    const map = this.r.one("MAP", "idling");
    const gaugeMap = vacuum ? this.baro - vacuum.value : undefined;
    if (vacuum && map && gaugeMap !== undefined && vacuum.sample === map.sample) {
      const off = map.value - gaugeMap;
      if (Math.abs(off) > 6)
        this.sign(
          "map-offset",
          [off > 0 ? "high" : "low"],
          `Manifold sensor says ${map.value} kPa, the gauge ${round(gaugeMap)} kPa`,
          [map, vacuum],
          true,
          "map",
          off > 0 ? "rich" : "lean",
        );
    }
    const key = this.r.one("MAP", "key-on");
    const keyBaro = this.r.one("BARO", "key-on");
    // Key on, engine off, both should read the air outside; the sensor's own BARO may come from the same faulty sensor.
    const outside = this.r.caseFile.site?.baroKPa ?? keyBaro?.value;
    if (key && outside !== undefined) {
      const off = key.value - outside;
      const far = Math.abs(off) > 4;
      if (!this.found.some((f) => f.kind === "sign" && f.sign === "map-offset"))
        this.sign(
          "map-offset",
          [far ? (off > 0 ? "high" : "low") : "agrees"],
          far
            ? `Key on, manifold sensor ${key.value} kPa against ${round(outside)} kPa outside`
            : `Manifold sensor agrees with the barometer`,
          [key, keyBaro],
          far,
          "map",
          far ? (off > 0 ? "rich" : "lean") : null,
        );
    }
    const offset = this.found.find((f) => f.kind === "sign" && f.sign === "map-offset" && f.abnormal);
    const trueMap = gaugeMap ?? (offset ? undefined : map?.value);
    const at = vacuum ?? map;
    if (trueMap !== undefined && at && this.warm(at)) {
      const weak = trueMap > (this.vehicle.fuelSystem === "carburetted" ? 46.5 : 44.5);
      this.sign(
        "idle-vacuum",
        [weak ? "weak" : "normal"],
        `Manifold at ${round(trueMap, 0)} kPa idling${weak ? ": vacuum is weak" : ", as it should be"}`,
        [vacuum ?? map],
        weak,
        "vacuum",
        weak ? "mech" : null,
      );
    } else if (map && offset && this.warm(map)) {
      // The sensor is suspect, so its idle figure says nothing about the engine.
      this.r.note(map.path, "The manifold sensor disagrees with the air outside: its idle pressure is not used.");
    }
    const raised = this.r.one("manifoldVacuumKPa", "raised-idle");
    const raisedMap = this.r.one("MAP", "raised-idle");
    const idleVac = vacuum?.value ?? (map ? this.baro - map.value : undefined);
    const raisedVac = raised?.value ?? (raisedMap && map ? this.baro - raisedMap.value : undefined);
    if (idleVac !== undefined && raisedVac !== undefined && idleVac > 40) {
      const falls = raisedVac < idleVac - 9;
      if (falls)
        this.test(
          "vacuum-gauge",
          ["falls-at-2500"],
          `Vacuum falls from ${round(idleVac, 0)} to ${round(raisedVac, 0)} kPa when 2,500 r/min is held`,
          [raised ?? raisedMap, vacuum ?? map],
          true,
          "vacuum",
          "mech",
        );
    }
    const back =
      this.r.one("backPressureKPa", "raised-idle") ??
      this.r.one("backPressureKPa", "accelerating") ??
      this.r.one("backPressureKPa", "idling");
    if (back) {
      const limit = back.mode === "idling" ? 10 : back.mode === "raised-idle" ? 20 : 50;
      const high = back.value > limit;
      this.test(
        "exhaust-back-pressure",
        [high ? "high" : "in-spec"],
        `Back-pressure ${back.value} kPa ${MODE_LABELS[back.mode].toLowerCase()}${high ? ": restricted" : ", free"}`,
        [back],
        high,
        "vacuum",
        high ? "mech" : null,
      );
    }
  }

  private airFlow(): void {
    const litres = this.vehicle.displacementL;
    if (!litres) return;
    const idle = this.r.one("MAF", "idling");
    const idleRpm = idle && this.r.beside("RPM", idle);
    if (idle && this.warm(idle)) {
      const perLitre =
        (idle.value / litres) * (750 / Math.max(idleRpm?.value ?? 750, 400)) * (101.3 / this.baro) ** 0.3;
      const state = perLitre < 0.85 ? "low" : perLitre > 1.75 ? "high" : "normal";
      this.sign(
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
      const maf = this.r.one("MAF", mode);
      const map = maf && this.r.beside("MAP", maf);
      const rpm = maf && this.r.beside("RPM", maf);
      if (!maf || !map || !rpm || rpm.value < 300) continue;
      const iat = this.r.beside("IAT", maf)?.value ?? 25;
      // Expected breathing depends on load: about 0.55 at idle, 0.75 cruising, referred to manifold density.
      const ve = mode === "idling" ? 0.55 : mode === "raised-idle" ? 0.63 : 0.75;
      const expected = (ve * map.value * litres * rpm.value) / 120 / (0.28705 * (iat + 283));
      const ratio = maf.value / expected;
      const state = ratio < 0.62 ? "maf-low" : ratio > 1.5 ? "maf-high" : "agrees";
      this.sign(
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
    const full = this.r.one("MAF", "accelerating");
    const rpm = full && this.r.beside("RPM", full);
    const plate = full && (this.r.beside("TP", full) ?? this.r.beside("LOAD_PCT", full));
    if (full && rpm && (plate?.value ?? 0) >= 75 && this.vehicle.aspiration !== "boosted") {
      const iat = this.r.beside("IAT", full)?.value ?? this.r.caseFile.site?.ambientC ?? 25;
      const ve = (100 * full.value) / (airDensity(this.baro, iat) * litres * (rpm.value / 120));
      const low = ve < 75;
      this.sign(
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

  private frontSensors(): void {
    for (const bank of [1, 2] as const) {
      const n = bank === 1 ? "11" : "21";
      let best: SensorState | undefined;
      for (const mode of ["raised-idle", "cruising", "idling"] as const) {
        const mean = this.r.one(`O2S${n}`, mode);
        const min = this.r.one(`o2s${n}MinV`, mode);
        const max = this.r.one(`o2s${n}MaxV`, mode);
        const crossings = this.r.one(`o2s${n}CrossingsPer10s`, mode);
        const any = mean ?? min ?? max ?? crossings;
        if (!any) continue;
        const ect = this.r.beside("ECT", any);
        if (ect && ect.value < 40) continue;
        const from = [mean, min, max, crossings];
        const still =
          (crossings?.value ?? 0) <= 1 && (min === undefined || max === undefined || max.value - min.value < 0.3);
        const moves = crossings !== undefined || (min !== undefined && max !== undefined);
        const say = (state: string, words: string, family: CauseFamily | null): SensorState => ({
          states: [state],
          words,
          from,
          abnormal: state !== "swings",
          family,
        });
        let now: SensorState | undefined;
        if (moves && still && (mean?.value ?? min?.value ?? 0) > 0.62)
          now = say("stuck-high", `stands at ${mean?.value ?? max?.value} V and does not move`, "rich");
        else if (moves && still && (mean?.value ?? max?.value ?? 1) < 0.32)
          now = say("stuck-low", `stands at ${mean?.value ?? max?.value} V and does not move`, "lean");
        else if (moves && still && min && max && max.value - min.value < 0.15)
          now = say("flat-middle", `lies flat at ${mean?.value ?? min.value} V`, "mech");
        else if (max && max.value < 0.5) now = say("stuck-low", `never rises above ${max.value} V`, "lean");
        else if (min && min.value > 0.45) now = say("stuck-high", `never falls below ${min.value} V`, "rich");
        else if (
          crossings &&
          crossings.value < (mode === "idling" ? 2 : this.vehicle.fuelSystem === "throttle-body" ? 3 : 5)
        )
          now = say("slow", `crosses only ${crossings.value} times in 10 s`, "mech");
        else if (moves) now = say("swings", "swings as it should", null);
        // A mean alone, beside trims, is the trims said again (or a contradiction, noted there); without them it counts.
        else if (mean && mean.value > 0.7 && !this.trimsIn(mode, bank))
          now = say("stuck-high", `averages ${mean.value} V`, "rich");
        else if (mean && mean.value < 0.25 && !this.trimsIn(mode, bank))
          now = say("stuck-low", `averages ${mean.value} V`, "lean");
        if (now && (!best || (now.abnormal && !best.abnormal))) best = now;
      }
      if (best) {
        const statement = `Front oxygen sensor, bank ${bank}, ${best.words}`;
        this.sign("front-o2", best.states, statement, best.from, best.abnormal, "front-o2", best.family, { bank });
      }
    }
    // Two banks make one finding: the worse sensor speaks.
    const both = this.found.filter((f) => f.kind === "sign" && f.sign === "front-o2");
    if (both.length === 2) {
      const drop = both[0]?.abnormal ? both[1] : both[0];
      this.found.splice(this.found.indexOf(drop as Observation), 1);
    }
  }

  private trimsIn(mode: Mode, bank: 1 | 2): boolean {
    return (
      this.r.one(bank === 1 ? "SHRTFT1" : "SHRTFT2", mode) !== undefined ||
      this.r.one(bank === 1 ? "LONGFT1" : "LONGFT2", mode) !== undefined
    );
  }

  private rearSensors(): void {
    for (const bank of [1, 2] as const) {
      const front = bank === 1 ? "11" : "21";
      const rear = bank === 1 ? "12" : "22";
      for (const mode of ["cruising", "raised-idle", "idling"] as const) {
        const crossings = this.r.one(`o2s${rear}CrossingsPer10s`, mode);
        const mean = this.r.one(`O2S${rear}`, mode);
        if (!crossings && !mean) continue;
        const frontCrossings = this.r.one(`o2s${front}CrossingsPer10s`, mode);
        if (crossings && frontCrossings && frontCrossings.value >= 5) {
          const ratio = crossings.value / frontCrossings.value;
          if (ratio > 0.5 || ratio < 0.3) {
            const low = ratio > 0.5;
            this.test(
              "catalyst-efficiency",
              [low ? "low" : "in-spec"],
              low
                ? `Rear sensor, bank ${bank}, follows the front: ${crossings.value} crossings to ${frontCrossings.value}`
                : `Rear sensor, bank ${bank}, is steady`,
              [crossings, frontCrossings],
              low,
              "catalyst",
              low ? "mech" : null,
              { bank },
            );
          }
        }
        const min = this.r.one(`o2s${rear}MinV`, mode);
        const max = this.r.one(`o2s${rear}MaxV`, mode);
        const flat = (crossings?.value ?? 0) === 0 && (!min || !max || max.value - min.value < 0.06);
        if (mean && flat && (mean.value > 0.9 || mean.value < 0.04))
          this.sign(
            "rear-o2",
            ["stuck"],
            `Rear sensor, bank ${bank}, stands at ${mean.value} V`,
            [mean, min, max],
            true,
            "catalyst",
            "mech",
            { bank },
          );
        break;
      }
    }
    const cats = this.found.filter((f) => f.kind === "test" && f.test === "catalyst-efficiency");
    if (cats.length === 2) {
      const drop = cats[0]?.abnormal ? cats[1] : cats[0];
      this.found.splice(this.found.indexOf(drop as Observation), 1);
    }
  }

  private gas(): void {
    const carb = this.vehicle.fuelSystem === "carburetted" || this.vehicle.o2Sensing === "none";
    const states: { mode: Mode; state: string; lambda: number | null; from: (Reading | undefined)[]; words: string }[] =
      [];
    for (const mode of ["idling", "raised-idle", "cruising", "accelerating"] as const) {
      const co = this.r.one("coPct", mode);
      const co2 = this.r.one("co2Pct", mode);
      const o2 = this.r.one("o2Pct", mode);
      const hc = this.r.one("hcPpm", mode);
      const nox = this.r.one("noxPpm", mode);
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
        this.r.note(co.path, "CO and CO₂ together are below 6 %: the sample is mostly air and is not used.");
        continue;
      }
      const c = co?.value ?? 0;
      const h = hc?.value ?? 0;
      const ox = o2?.value ?? 0;
      // Fixed jets run richer in thin air, about √(density): what the altitude explains is not a fault.
      const richLimit = 4 + 30 * Math.max(0, 1 - Math.sqrt(this.baro / 101.3));
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
      const total = (this.r.one("SHRTFT1", s.mode)?.value ?? 0) + (this.r.one("LONGFT1", s.mode)?.value ?? 0);
      const total2 =
        this.vehicle.banks === 2
          ? (this.r.one("SHRTFT2", s.mode)?.value ?? 0) + (this.r.one("LONGFT2", s.mode)?.value ?? 0)
          : 0;
      const most = Math.abs(total2) > Math.abs(total) ? total2 : total;
      if (s.state === "rich" && most > 7) {
        this.sign(
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
        this.sign(
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
            : this.vehicle.o2Sensing === "none"
              ? null
              : "mixture";
    const name =
      {
        misfire: "unburned charge",
        "high-nox": "nitrogen oxides are high",
        "dead-catalyst": "as it leaves the engine, not as it leaves a good catalyst",
      }[state[0] ?? ""] ?? (state[0] ?? "").replaceAll("-", " ");
    this.sign(
      "gas",
      state,
      `Exhaust gas ${states.map((s) => `${MODE_LABELS[s.mode].toLowerCase()} ${s.words}`).join("; ")}: ${name}`,
      states.flatMap((s) => s.from),
      abnormal,
      theme,
      family,
    );
  }

  private cylinders(): void {
    this.misfires();
    const compression = this.r.byCylinder("compressionKPa").at(-1);
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
            ? top < 870 * (this.baro / 101.3)
              ? "all-low"
              : "even"
            : low.length === 1
              ? "one-low"
              : low.length === 2 && this.adjacent(low)
                ? "adjacent-low"
                : "several-low";
        this.test(
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
    const leak = this.r.byCylinder("leakdownPct").at(-1);
    if (leak) {
      const bad = Object.entries(leak.values)
        .filter(([, v]) => v > 25)
        .map(([c]) => Number(c));
      const states = bad.length > 0 ? ["intake", "exhaust", "crankcase", "coolant"] : ["in-spec"];
      this.test(
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
    const relative = this.r.byCylinder("relativeCompressionPct").at(-1);
    if (relative) {
      const bad = Object.entries(relative.values)
        .filter(([, v]) => v < 87)
        .map(([c]) => Number(c));
      const state = bad.length === 0 ? "even" : bad.length === 1 ? "one-low" : "several-low";
      this.test(
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
    const balance = this.r.byCylinder("powerBalanceRpmDrop").at(-1);
    if (balance) {
      const values = Object.values(balance.values).sort((a, b) => a - b);
      const median = values[Math.floor(values.length / 2)] ?? 0;
      const bad = Object.entries(balance.values)
        .filter(([, v]) => v < 0.5 * median)
        .map(([c]) => Number(c));
      const state = bad.length === 0 ? "even" : bad.length === 1 ? "one-weak" : "several-weak";
      this.test(
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
    const drop = this.r.byCylinder("injectorDropKPa").at(-1);
    if (drop) this.deviation("injector-balance", drop.values, drop.path, 0.1);
    const gap = this.r.byCylinder("plugGapMm").at(-1);
    const limit = this.r.one("plugGapLimitMm");
    if (gap && limit) {
      const wide = Object.values(gap.values).filter((v) => v > limit.value * 1.05).length;
      this.test(
        "plug-inspection",
        wide > 0 ? ["worn"] : ["fuel-fouled", "oil-fouled", "deposits", "normal"],
        wide > 0 ? `Plug gaps beyond the limit of ${limit.value} mm` : "Plug gaps within the limit",
        [{ path: gap.path }, limit],
        wide > 0,
        null,
        wide > 0 ? "spark" : null,
      );
    }
    const kv = this.r.byCylinder("secondaryKv").at(-1);
    if (kv) {
      const list = Object.entries(kv.values).map(([c, v]) => ({ c: Number(c), v }));
      const middle = list.map((x) => x.v).sort((a, b) => a - b)[Math.floor(list.length / 2)] ?? 0;
      const high = list.filter((x) => x.v > middle + 4);
      const low = list.filter((x) => x.v < middle - 3.5);
      const state = middle > 15 ? "all-high" : high.length === 1 ? "one-high" : low.length === 1 ? "one-low" : "normal";
      const cylinder = state === "one-high" ? high[0]?.c : state === "one-low" ? low[0]?.c : undefined;
      this.test(
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

  private deviation(test: TestId, values: CylinderReadings, path: string, share: number): void {
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
    this.test(
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

  private adjacent([a = 0, b = 0]: number[]): boolean {
    // In line, numbers that follow each other are neighbours; on two banks only inside one bank.
    if (Math.abs(a - b) !== 1) return false;
    if (this.vehicle.banks !== 2) return true;
    const one = this.vehicle.bank1Cylinders;
    return one ? one.includes(a) === one.includes(b) : true;
  }

  private misfires(): void {
    const counts = this.r.byCylinder("misfireCounts");
    const codes = this.r.caseFile.codes
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
      this.sign(
        "misfires",
        ["none"],
        total > 0 ? `Misfire counts are noise (${total})` : "No misfires counted",
        from,
        false,
        "misfire",
      );
      return;
    }
    const n = this.vehicle.cylinders ?? 4;
    let states: string[];
    let words: string;
    const extra: Extra = {};
    if (bad.length === 1 && !(random && total <= 5 && named.length === 0)) {
      states = ["one"];
      words = `cylinder ${bad[0]} alone`;
      extra.cylinder = bad[0];
    } else if (bad.length === 2) {
      const companions = this.companions(bad[0] ?? 0, bad[1] ?? 0);
      if (companions === true) {
        states = ["pair"];
        words = `cylinders ${bad.join(" and ")}, which share a coil or a top dead centre`;
      } else if (companions === null && this.vehicle.ignition === "waste-spark") {
        states = ["pair", "two"];
        words = `cylinders ${bad.join(" and ")}; the firing order is not stated, so whether they are companions is not known`;
      } else if (this.adjacent(bad)) {
        states = ["adjacent", "two"];
        words = `neighbours ${bad.join(" and ")}`;
      } else {
        states = ["two"];
        words = `cylinders ${bad.join(" and ")}`;
      }
    } else {
      const one = this.vehicle.bank1Cylinders;
      const oneBank =
        this.vehicle.banks === 2 &&
        one !== undefined &&
        bad.length > 2 &&
        (bad.every((c) => one.includes(c)) || bad.every((c) => !one.includes(c)));
      states = oneBank ? ["bank"] : ["several"];
      words = oneBank ? "one bank" : bad.length > 0 ? `cylinders ${bad.join(", ")}` : "more than one cylinder";
      if (oneBank && one) extra.bank = one.includes(bad[0] ?? 0) ? 1 : 2;
      if (oneBank && bad.length < n / 2) states = ["bank", "several"];
    }
    this.sign("misfires", states, `Misfire: ${words}`, from, true, "misfire", "spark", extra);
    if (modes.size > 0) {
      const idle = modes.has("idling") || modes.has("raised-idle");
      const load = modes.has("accelerating");
      const measuredBoth =
        counts.some((c) => c.mode === "idling") &&
        counts.some((c) => c.mode === "accelerating" || c.mode === "cruising");
      if (load && !idle && measuredBoth)
        this.sign("misfires-when", ["load"], "Misfires under load, not at idle", from, true, null, "spark");
      else if (idle && !load && measuredBoth && !modes.has("cruising"))
        this.sign("misfires-when", ["idle"], "Misfires at idle, not under load", from, true, null, "spark");
    }
  }

  private companions(a: number, b: number): boolean | null {
    const order = this.vehicle.firingOrder;
    if (!order || order.length % 2 === 1) return null;
    const at = order.indexOf(a);
    return at >= 0 && order[(at + order.length / 2) % order.length] === b;
  }

  private fuelPressure(): void {
    const pick = (modes: Mode[]) => {
      for (const mode of modes) {
        const p = this.r.one("fuelPressureKPa", mode);
        const spec = p && this.r.beside("fuelPressureSpecKPa", p);
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
      this.test(
        "fuel-pressure",
        [state],
        `Fuel pressure ${worst.p.value} kPa against ${worst.spec.value} kPa: ${state === "in-spec" ? "in specification" : state}`,
        [worst.p, worst.spec],
        state !== "in-spec",
        "fuel-supply",
        state === "high" ? "rich" : state === "in-spec" ? null : "lean",
      );
    }
    const loaded = pick(["accelerating"]);
    if (loaded) {
      const drops = loaded.ratio < 0.87;
      this.test(
        "fuel-pressure-under-load",
        [drops ? "drops" : "holds"],
        `Fuel pressure ${drops ? "drops to" : "holds"} ${loaded.p.value} of ${loaded.spec.value} kPa under load`,
        [loaded.p, loaded.spec],
        drops,
        "fuel-supply",
        drops ? "lean" : null,
      );
    }
    const drop = this.r.one("fuelPressureDropKPaIn5Min");
    const key = this.r.one("fuelPressureKPa", "key-on");
    const keySpec = key && this.r.beside("fuelPressureSpecKPa", key);
    if (drop) {
      const leaks = drop.value > 40;
      this.test(
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
      (this.r.beside("engineOffHours", key)?.value ?? 0) >= 1 &&
      key.value < 0.3 * keySpec.value
    ) {
      this.test(
        "fuel-pressure-hold",
        ["leaks-down"],
        `Only ${key.value} of ${keySpec.value} kPa left after standing`,
        [key, keySpec],
        true,
        "fuel-supply",
        "lean",
      );
    }
    const volts = this.r.one("pumpV");
    if (volts) {
      const state = volts.value < 2 ? "none" : volts.value < (volts.mode === "starting" ? 8 : 11.5) ? "low" : "good";
      this.sign(
        "pump-feed",
        [state],
        `${volts.value} V at the pump${state === "good" ? "" : state === "none" ? ": no feed" : ": low"}`,
        [volts],
        state !== "good",
        "fuel-supply",
        state === "good" ? null : "lean",
      );
    }
    const amps = this.r.one("pumpA");
    if (amps) {
      const state = amps.value < 0.3 ? "none" : amps.value < 2.2 ? "low" : amps.value > 8 ? "high" : "normal";
      this.test(
        "pump-current",
        [state],
        `Pump draws ${amps.value} A`,
        [amps],
        state !== "normal",
        "fuel-supply",
        state === "normal" ? null : "lean",
      );
    }
    const level = this.r.one("FLI");
    if (level) {
      const empty = level.value < 5;
      if (empty) this.sign("tank-level", ["empty"], `Tank at ${level.value} %`, [level], true, null, "lean");
    }
    const alcohol = this.r.one("ALCH_PCT");
    if (alcohol) {
      const expected = Number((this.vehicle.fuel ?? "E10").slice(1));
      const high = alcohol.value > expected + 9;
      this.test(
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

  private rail(): void {
    const compare = (mode: Mode) => {
      const is = this.r.one("FRP", mode);
      const wanted = is && this.r.beside("frpCommandedKPa", is);
      return is && wanted && wanted.value > 0 ? { is, wanted, ratio: is.value / wanted.value } : null;
    };
    const idle = compare("idling") ?? compare("raised-idle") ?? compare("cruising") ?? compare("starting");
    const load = compare("accelerating");
    const at = [load, idle].flatMap((x) => (x ? [x.is, x.wanted] : []));
    if (!idle && !load) return;
    const low = (x: typeof idle) => x !== null && x.ratio < 0.88;
    if (idle && low(idle))
      this.sign(
        "rail",
        load && !low(load) ? ["low"] : ["low"],
        `Rail ${idle.is.value} of ${idle.wanted.value} kPa commanded`,
        at,
        true,
        "rail",
        "lean",
      );
    else if (load && low(load))
      this.sign(
        "rail",
        idle ? ["low-at-load"] : ["low-at-load", "low"],
        `Rail ${load.is.value} of ${load.wanted.value} kPa commanded under load`,
        at,
        true,
        "rail",
        "lean",
      );
    else if ((idle?.ratio ?? load?.ratio ?? 1) > 1.15)
      this.sign("rail", ["high"], "Rail pressure above command", at, true, "rail", "rich");
    else this.sign("rail", ["as-commanded"], "Rail pressure follows its command", at, false, "rail");
    const lowSide = this.r.one("lowSideFuelKPa");
    if (lowSide && !this.found.some((f) => f.kind === "test" && f.test === "fuel-pressure")) {
      const bad = lowSide.value < 300;
      this.test(
        "fuel-pressure",
        [bad ? "low" : "in-spec"],
        `Low-side fuel pressure ${lowSide.value} kPa${bad ? ": low" : ""}`,
        [lowSide],
        bad,
        "fuel-supply",
        bad ? "lean" : null,
      );
    }
  }

  private heat(): void {
    const key = this.r.all("engineOffHours").find((x) => x.value >= 5);
    if (key) {
      const ect = this.r.beside("ECT", key);
      const iat = this.r.beside("IAT", key);
      const ambient = this.r.beside("AAT", key)?.value ?? this.r.caseFile.site?.ambientC;
      if (ect && (iat || ambient !== undefined)) {
        // Three thermometers: the one that stands apart from the two that agree is the liar.
        const others = [iat?.value, ambient].filter((x): x is number => x !== undefined);
        const gap = (a: number, b: number) => Math.abs(a - b) > 8;
        const iatOff = iat && ambient !== undefined && gap(iat.value, ambient) && !gap(ect.value, ambient);
        const reference = ambient ?? iat?.value ?? ect.value;
        const ectOff = !iatOff && others.every((o) => gap(ect.value, o)) && gap(ect.value, reference);
        const from = [ect, iat, key];
        if (ectOff)
          this.test(
            "soak-compare",
            [ect.value < reference ? "coolant-cold" : "coolant-hot"],
            `After ${key.value} h standing the coolant sensor says ${ect.value} °C while the air is ${reference} °C`,
            from,
            true,
            "coolant",
            ect.value < reference ? "rich" : "lean",
          );
        else if (iatOff)
          this.test(
            "soak-compare",
            ["intake-off"],
            `After ${key.value} h standing the intake sensor says ${iat.value} °C, the others about ${reference} °C`,
            from,
            true,
            "coolant",
            "mech",
          );
        else
          this.test(
            "soak-compare",
            ["agree"],
            `Temperatures agree after ${key.value} h standing`,
            from,
            false,
            "coolant",
          );
      }
    }
    const running = this.r.all("ECT").filter((x) => x.mode !== "key-on" && x.mode !== "starting");
    const hottest = running.reduce<Reading | undefined>((a, b) => (!a || b.value > a.value ? b : a), undefined);
    const late = running.filter((x) => (this.r.beside("RUNTM", x)?.value ?? (x.mode === "idling" ? 0 : 700)) >= 600);
    const last = late.at(-1);
    const ambient = this.r.caseFile.site?.ambientC ?? 15;
    if (hottest && hottest.value > 109)
      this.sign("coolant", ["hot"], `Coolant at ${hottest.value} °C`, [hottest], true, "coolant", "mech");
    else if (last && last.value < 75) {
      const absurd = last.value < Math.min(ambient, 20) - 3 || last.value < 5;
      this.sign(
        "coolant",
        [absurd ? "implausibly-cold" : "cool"],
        `Coolant ${absurd ? "is said to be" : "only"} ${last.value} °C after a warm-up`,
        [last, this.r.beside("RUNTM", last)],
        true,
        "coolant",
        "rich",
      );
    } else if (hottest && hottest.value >= 75)
      this.sign("coolant", ["normal"], `Coolant reaches ${hottest.value} °C`, [hottest], false, "coolant");
    else if (running.some((x) => x.value < Math.min(ambient - 12, 5))) {
      const x = running.find((y) => y.value < Math.min(ambient - 12, 5));
      this.sign(
        "coolant",
        ["implausibly-cold"],
        `Coolant said to be ${x?.value} °C with ${ambient} °C outside`,
        [x],
        true,
        "coolant",
        "rich",
      );
    }
    const open = this.r.allLoops().find((l) => {
      const ect = this.r.beside("ECT", l);
      const run = this.r.beside("RUNTM", l);
      return (
        (l.value === "OL" || l.value === "OL-Fault") &&
        STEADY.includes(l.mode) &&
        ((ect?.value ?? 0) >= 70 || (run?.value ?? 0) >= 400 || l.value === "OL-Fault")
      );
    });
    if (open)
      this.sign("loop", ["open-when-warm"], "The control loop stays open on a warm engine", [open], true, null, "mech");
  }

  private load(): void {
    for (const bank of [1, 2] as const) {
      const lambda = this.r.one(bank === 1 ? "EQ_RAT11" : "EQ_RAT21", "accelerating");
      const wanted = lambda && this.r.beside("EQ_RAT", lambda);
      const volts = this.r.one(bank === 1 ? "O2S11" : "O2S21", "accelerating");
      const at = lambda ?? volts;
      if (!at) continue;
      const plate = this.r.beside("TP", at) ?? this.r.beside("LOAD_PCT", at);
      if (plate && plate.value < 45) continue;
      if (lambda) {
        const lean = lambda.value > Math.max(1.015, (wanted?.value ?? 0.88) + 0.1);
        const rich = wanted ? lambda.value < wanted.value - 0.05 : lambda.value < 0.74;
        this.sign(
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
        this.sign(
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
    const boost = this.r.one("MAP", "accelerating");
    const wanted = boost && this.r.beside("boostCommandedKPa", boost);
    if (boost && wanted && wanted.value > 0) {
      const ratio = boost.value / wanted.value;
      const state = ratio < 0.91 ? "low" : ratio > 1.08 ? "high" : "as-commanded";
      this.test(
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

  private electrics(): void {
    const volts = this.r.one("crankingV");
    const running = this.r
      .all("VPWR")
      .filter((x) => x.mode !== "key-on" && x.mode !== "starting")
      .at(-1);
    const ground = this.r.one("groundDropV");
    const lowCrank = volts && volts.value < 9.4;
    const lowRun = running && running.value < 12.9;
    if (lowCrank || lowRun)
      this.test(
        "battery-and-charging",
        ["low"],
        [lowCrank ? `${volts.value} V while cranking` : "", lowRun ? `${running.value} V running` : ""]
          .filter(Boolean)
          .join(", "),
        [volts, running],
        true,
        "electrical",
        "spark",
      );
    else if (volts || running)
      this.test("battery-and-charging", ["in-spec"], "Supply voltage is good", [volts, running], false, "electrical");
    if (ground) {
      const bad = ground.value > 0.25;
      this.test(
        "voltage-drop",
        [bad ? "high" : "in-spec"],
        `${ground.value} V lost in the ground`,
        [ground],
        bad,
        "electrical",
        bad ? "spark" : null,
      );
    }
    const speed = this.r.one("crankRpm");
    if (speed) {
      const state = speed.value < 130 ? "slow" : speed.value > 255 ? "fast" : "normal";
      this.sign(
        "cranking",
        [state],
        `Cranks at ${speed.value} r/min${state === "normal" ? "" : `, ${state}`}`,
        [speed],
        state !== "normal",
        "electrical",
        state === "normal" ? null : "mech",
      );
    }
  }

  private spark(): void {
    const knock = this.r
      .all("knockRetardDeg")
      .reduce<Reading | undefined>((a, b) => (!a || b.value > a.value ? b : a), undefined);
    if (knock) {
      const high = knock.value > 4;
      this.sign(
        "knock-retard",
        [high ? "high" : "normal"],
        `${knock.value}° of knock retard`,
        [knock],
        high,
        null,
        high ? "spark" : null,
      );
    }
    const advance = this.r.one("SPARKADV", "cruising");
    if (advance) {
      const low = advance.value < 20;
      this.sign(
        "cruise-advance",
        [low ? "low" : "normal"],
        `${advance.value}° advance cruising${low ? ", held back" : ""}`,
        [advance],
        low,
        null,
        low ? "spark" : null,
      );
    }
    const base = this.r.one("baseTimingDeg", "idling") ?? this.r.one("baseTimingDeg");
    if (base) {
      const idleOnly = base.mode === "idling";
      const raised = this.r.one("baseTimingDeg", "raised-idle");
      const late = base.value < 1;
      const early = base.value > 17;
      if (idleOnly && raised && raised.value - base.value < 5)
        this.test(
          "timing-light",
          ["late"],
          `Timing moves only from ${base.value}° to ${raised.value}° with speed`,
          [base, raised],
          true,
          null,
          "spark",
        );
      else if (idleOnly)
        this.test(
          "timing-light",
          [late ? "late" : early ? "early" : "in-spec"],
          `Base timing ${base.value}°${late ? ", late" : early ? ", early" : ""}`,
          [base],
          late || early,
          null,
          late || early ? "spark" : null,
        );
    }
    const dwell = this.r.one("dwellDeg");
    const n = this.vehicle.cylinders;
    if (dwell && n) {
      const [low, high] = n <= 2 ? [90, 105] : n === 3 ? [60, 75] : n === 4 ? [43, 59] : n === 6 ? [34, 46] : [25, 34];
      const off = dwell.value < low || dwell.value > high;
      this.test(
        "dwell-check",
        [off ? "off" : "in-spec"],
        `Dwell ${dwell.value}°${off ? `, outside ${low} to ${high}°` : ""}`,
        [dwell],
        off,
        null,
        off ? "spark" : null,
      );
    }
  }

  private positions(): void {
    const cam = this.r.one("camAdvanceDeg");
    const wanted = cam && this.r.beside("camAdvanceCommandedDeg", cam);
    if (cam && wanted) {
      const off = Math.abs(cam.value - wanted.value) > 7;
      this.sign(
        "cam-position",
        [off ? "off" : "as-commanded"],
        `Cam at ${cam.value}° for ${wanted.value}° commanded`,
        [cam, wanted],
        off,
        "cam",
        off ? "mech" : null,
      );
    }
  }

  /** Several subjects measured and none out of the ordinary: with a fault that runs all the time that is rare. */
  private quiet(): void {
    const measured = new Set(this.found.map((f) => (f.kind === "sign" ? f.sign : f.kind === "test" ? f.test : "")));
    const trims = ["SHRTFT1", "LONGFT1"] as const;
    const totals = STEADY.map((m) => trims.map((t) => this.r.one(t, m)?.value)).filter((p) =>
      p.some((x) => x !== undefined),
    );
    const quietTrims = totals.length > 0 && totals.every((p) => Math.abs((p[0] ?? 0) + (p[1] ?? 0)) <= 6);
    const abnormal = this.found.some((f) => f.abnormal) || (totals.length > 0 && !quietTrims);
    const subjects = measured.size + (quietTrims ? totals.length : 0);
    // A stored code beside nothing but healthy readings is history until it is seen again; more must then be healthy.
    const codes = this.r.caseFile.codes.length;
    if (!abnormal && subjects >= (codes > 0 ? 7 : 5))
      this.sign(
        "readings-all-quiet",
        [subjects >= 9 && codes === 0 ? "broad" : "some"],
        `${subjects} subjects measured, none out of the ordinary`,
        [],
        false,
        null,
      );
  }
}
