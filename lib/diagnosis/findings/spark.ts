import type { Reading } from "../readings";
import type { FindingSheet } from "./sheet";

/** Knock, advance, base timing, dwell. */
export function spark(f: FindingSheet): void {
  const knock = f.r
    .all("knockRetardDeg")
    .reduce<Reading | undefined>((a, b) => (!a || b.value > a.value ? b : a), undefined);
  if (knock) {
    const high = knock.value > 4;
    f.sign(
      "knock-retard",
      [high ? "high" : "normal"],
      `${knock.value}° of knock retard`,
      [knock],
      high,
      null,
      high ? "spark" : null,
    );
  }
  const advance = f.r.one("SPARKADV", "cruising");
  if (advance) {
    const low = advance.value < 20;
    f.sign(
      "cruise-advance",
      [low ? "low" : "normal"],
      `${advance.value}° advance cruising${low ? ", held back" : ""}`,
      [advance],
      low,
      null,
      low ? "spark" : null,
    );
  }
  const base = f.r.one("baseTimingDeg", "idling") ?? f.r.one("baseTimingDeg");
  if (base) {
    const idleOnly = base.mode === "idling";
    const raised = f.r.one("baseTimingDeg", "raised-idle");
    const late = base.value < 1;
    const early = base.value > 17;
    if (idleOnly && raised && raised.value - base.value < 5)
      f.test(
        "timing-light",
        ["late"],
        `Timing moves only from ${base.value}° to ${raised.value}° with speed`,
        [base, raised],
        true,
        null,
        "spark",
      );
    else if (idleOnly)
      f.test(
        "timing-light",
        [late ? "late" : early ? "early" : "in-spec"],
        `Base timing ${base.value}°${late ? ", late" : early ? ", early" : ""}`,
        [base],
        late || early,
        null,
        late || early ? "spark" : null,
      );
  }
  const dwell = f.r.one("dwellDeg");
  const n = f.vehicle.cylinders;
  if (dwell && n) {
    const [low, high] = n <= 2 ? [90, 105] : n === 3 ? [60, 75] : n === 4 ? [43, 59] : n === 6 ? [34, 46] : [25, 34];
    const off = dwell.value < low || dwell.value > high;
    f.test(
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
