import type { Reading } from "../readings";
import { type FindingSheet, STEADY } from "./sheet";

/** Temperatures: after a cold soak, after a warm-up, too hot; a loop that stays open. */
export function heat(f: FindingSheet): void {
  const key = f.r.all("engineOffHours").find((x) => x.value >= 5);
  if (key) {
    const ect = f.r.beside("ECT", key);
    const iat = f.r.beside("IAT", key);
    const ambient = f.r.beside("AAT", key)?.value ?? f.r.caseFile.site?.ambientC;
    if (ect && (iat || ambient !== undefined)) {
      // Three thermometers: the one that stands apart from the two that agree is the liar.
      const others = [iat?.value, ambient].filter((x): x is number => x !== undefined);
      const gap = (a: number, b: number) => Math.abs(a - b) > 8;
      const iatOff = iat && ambient !== undefined && gap(iat.value, ambient) && !gap(ect.value, ambient);
      const reference = ambient ?? iat?.value ?? ect.value;
      const ectOff = !iatOff && others.every((o) => gap(ect.value, o)) && gap(ect.value, reference);
      const from = [ect, iat, key];
      if (ectOff)
        f.test(
          "soak-compare",
          [ect.value < reference ? "coolant-cold" : "coolant-hot"],
          `After ${key.value} h standing the coolant sensor says ${ect.value} °C while the air is ${reference} °C`,
          from,
          true,
          "coolant",
          ect.value < reference ? "rich" : "lean",
        );
      else if (iatOff)
        f.test(
          "soak-compare",
          ["intake-off"],
          `After ${key.value} h standing the intake sensor says ${iat.value} °C, the others about ${reference} °C`,
          from,
          true,
          "coolant",
          "mech",
        );
      else
        f.test("soak-compare", ["agree"], `Temperatures agree after ${key.value} h standing`, from, false, "coolant");
    }
  }
  if (!f.found.some((x) => x.kind === "test" && x.test === "soak-compare")) implausibleHeat(f);
  const running = f.r.all("ECT").filter((x) => x.mode !== "key-on" && x.mode !== "starting");
  const hottest = running.reduce<Reading | undefined>((a, b) => (!a || b.value > a.value ? b : a), undefined);
  const late = running.filter((x) => (f.r.beside("RUNTM", x)?.value ?? (x.mode === "idling" ? 0 : 700)) >= 600);
  const last = late.at(-1);
  const ambient = f.r.caseFile.site?.ambientC ?? 15;
  if (hottest && hottest.value > 109)
    f.sign("coolant", ["hot"], `Coolant at ${hottest.value} °C`, [hottest], true, "coolant", "mech");
  else if (last && last.value < 75) {
    const absurd = last.value < Math.min(ambient, 20) - 3 || last.value < 5;
    f.sign(
      "coolant",
      [absurd ? "implausibly-cold" : "cool"],
      `Coolant ${absurd ? "is said to be" : "only"} ${last.value} °C after a warm-up`,
      [last, f.r.beside("RUNTM", last)],
      true,
      "coolant",
      "rich",
    );
  } else if (hottest && hottest.value >= 75)
    f.sign("coolant", ["normal"], `Coolant reaches ${hottest.value} °C`, [hottest], false, "coolant");
  else if (running.some((x) => x.value < Math.min(ambient - 12, 5))) {
    const x = running.find((y) => y.value < Math.min(ambient - 12, 5));
    f.sign(
      "coolant",
      ["implausibly-cold"],
      `Coolant said to be ${x?.value} °C with ${ambient} °C outside`,
      [x],
      true,
      "coolant",
      "rich",
    );
  }
  const open = f.r.allLoops().find((l) => {
    const ect = f.r.beside("ECT", l);
    const run = f.r.beside("RUNTM", l);
    return (
      (l.value === "OL" || l.value === "OL-Fault") &&
      STEADY.includes(l.mode) &&
      ((ect?.value ?? 0) >= 70 || (run?.value ?? 0) >= 400 || l.value === "OL-Fault")
    );
  });
  if (open)
    f.sign("loop", ["open-when-warm"], "The control loop stays open on a warm engine", [open], true, null, "mech");
}

/** Readings no weather explains, without a soak: an open sensor reads −40 °C, a shorted one far above 100 °C. */
function implausibleHeat(f: FindingSheet): void {
  const outside = f.r.one("AAT")?.value ?? f.r.caseFile.site?.ambientC;
  const air = f.r
    .all("IAT")
    .find((x) => x.value > 105 || x.value <= -38 || (outside !== undefined && x.value < outside - 18));
  if (air) {
    f.test(
      "soak-compare",
      ["intake-off"],
      `Intake air said to be ${air.value} °C${outside === undefined ? "" : ` with ${outside} °C outside`}`,
      [air],
      true,
      "coolant",
      "mech",
    );
    return;
  }
  const cold = f.r
    .all("ECT")
    .find((x) => x.mode === "key-on" && (x.value <= -38 || (outside !== undefined && x.value < outside - 15)));
  if (cold && !(outside !== undefined && outside < -25))
    f.test(
      "soak-compare",
      ["coolant-cold"],
      `Coolant said to be ${cold.value} °C, colder than the air`,
      [cold],
      true,
      "coolant",
      "rich",
    );
}
