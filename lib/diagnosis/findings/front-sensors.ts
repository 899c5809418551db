import type { CauseFamily } from "../causes";
import type { Observation } from "../observation";
import type { Reading } from "../readings";
import type { Mode } from "../vocabulary";
import type { FindingSheet } from "./sheet";

interface SensorState {
  states: string[];
  words: string;
  from: (Reading | undefined)[];
  abnormal: boolean;
  family: CauseFamily | null;
}

/** The front oxygen sensor as a sensor: does it swing, stand, or lag. */
export function frontSensors(f: FindingSheet): void {
  for (const bank of [1, 2] as const) {
    const n = bank === 1 ? "11" : "21";
    let best: SensorState | undefined;
    for (const mode of ["raised-idle", "cruising", "idling"] as const) {
      const mean = f.r.one(`O2S${n}`, mode);
      const min = f.r.one(`o2s${n}MinV`, mode);
      const max = f.r.one(`o2s${n}MaxV`, mode);
      const crossings = f.r.one(`o2s${n}CrossingsPer10s`, mode);
      const any = mean ?? min ?? max ?? crossings;
      if (!any) continue;
      const ect = f.r.beside("ECT", any);
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
        crossings.value < (mode === "idling" ? 2 : f.vehicle.fuelSystem === "throttle-body" ? 3 : 5)
      )
        now = say("slow", `crosses only ${crossings.value} times in 10 s`, "mech");
      else if (moves) now = say("swings", "swings as it should", null);
      // A mean alone, beside trims, is the trims said again (or a contradiction, noted there); without them it counts.
      else if (mean && mean.value > 0.7 && !trimsIn(f, mode, bank))
        now = say("stuck-high", `averages ${mean.value} V`, "rich");
      else if (mean && mean.value < 0.25 && !trimsIn(f, mode, bank))
        now = say("stuck-low", `averages ${mean.value} V`, "lean");
      if (now && (!best || (now.abnormal && !best.abnormal))) best = now;
    }
    if (best) {
      const statement = `Front oxygen sensor, bank ${bank}, ${best.words}`;
      f.sign("front-o2", best.states, statement, best.from, best.abnormal, "front-o2", best.family, { bank });
    }
  }
  // Two banks make one finding: the worse sensor speaks.
  const both = f.found.filter((f) => f.kind === "sign" && f.sign === "front-o2");
  if (both.length === 2) {
    const drop = both[0]?.abnormal ? both[1] : both[0];
    f.found.splice(f.found.indexOf(drop as Observation), 1);
  }
}

function trimsIn(f: FindingSheet, mode: Mode, bank: 1 | 2): boolean {
  return (
    f.r.one(bank === 1 ? "SHRTFT1" : "SHRTFT2", mode) !== undefined ||
    f.r.one(bank === 1 ? "LONGFT1" : "LONGFT2", mode) !== undefined
  );
}
