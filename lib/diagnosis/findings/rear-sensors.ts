import type { Observation } from "../observation";
import { type FindingSheet, round, STEADY } from "./sheet";

/** The rear sensor and, through it, the catalyst. */
export function rearSensors(f: FindingSheet): void {
  for (const bank of [1, 2] as const) {
    const front = bank === 1 ? "11" : "21";
    const rear = bank === 1 ? "12" : "22";
    for (const mode of ["cruising", "raised-idle", "idling"] as const) {
      const crossings = f.r.one(`o2s${rear}CrossingsPer10s`, mode);
      const mean = f.r.one(`O2S${rear}`, mode);
      if (!crossings && !mean) continue;
      const frontCrossings = f.r.one(`o2s${front}CrossingsPer10s`, mode);
      if (crossings && frontCrossings && frontCrossings.value >= 5) {
        const ratio = crossings.value / frontCrossings.value;
        if (ratio > 0.5 || ratio < 0.3) {
          const low = ratio > 0.5;
          f.test(
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
      const min = f.r.one(`o2s${rear}MinV`, mode);
      const max = f.r.one(`o2s${rear}MaxV`, mode);
      const flat = (crossings?.value ?? 0) === 0 && (!min || !max || max.value - min.value < 0.06);
      if (mean && flat && (mean.value > 0.9 || mean.value < 0.04))
        f.sign(
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
  const cats = f.found.filter((f) => f.kind === "test" && f.test === "catalyst-efficiency");
  if (cats.length === 2) {
    const drop = cats[0]?.abnormal ? cats[1] : cats[0];
    f.found.splice(f.found.indexOf(drop as Observation), 1);
  }
}

/** The rear sensor as a second opinion: behind the catalyst it still tells lean from rich when the front one lies. */
export function rearAgainstTrim(f: FindingSheet): void {
  if (f.found.some((x) => x.kind === "sign" && x.sign === "gas-against-trim")) return;
  for (const bank of [1, 2] as const)
    for (const mode of STEADY) {
      const rear = f.r.one(bank === 1 ? "O2S12" : "O2S22", mode);
      if (!rear) continue;
      const short = f.r.beside(bank === 1 ? "SHRTFT1" : "SHRTFT2", rear);
      const long = f.r.beside(bank === 1 ? "LONGFT1" : "LONGFT2", rear);
      if (!short && !long) continue;
      const total = (short?.value ?? 0) + (long?.value ?? 0);
      if (rear.value < 0.2 && total <= -10)
        f.sign(
          "gas-against-trim",
          ["lean-yet-taking"],
          `The rear sensor is lean (${rear.value} V) while trim takes away ${round(-total)} %`,
          [rear, short, long],
          true,
          "front-o2",
          "lean",
          { bank },
        );
      else if (rear.value > 0.8 && total >= 10)
        f.sign(
          "gas-against-trim",
          ["rich-yet-adding"],
          `The rear sensor is rich (${rear.value} V) while trim adds ${round(total)} %`,
          [rear, short, long],
          true,
          "front-o2",
          "rich",
          { bank },
        );
      else continue;
      return;
    }
}
