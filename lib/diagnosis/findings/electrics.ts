import type { FindingSheet } from "./sheet";

/** Supply, ground and cranking speed. */
export function electrics(f: FindingSheet): void {
  const volts = f.r.one("crankingV");
  const running = f.r
    .all("VPWR")
    .filter((x) => x.mode !== "key-on" && x.mode !== "starting")
    .at(-1);
  const ground = f.r.one("groundDropV");
  const lowCrank = volts && volts.value < 9.4;
  const lowRun = running && running.value < 12.9;
  if (lowCrank || lowRun)
    f.test(
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
    f.test("battery-and-charging", ["in-spec"], "Supply voltage is good", [volts, running], false, "electrical");
  if (ground) {
    const bad = ground.value > 0.25;
    f.test(
      "voltage-drop",
      [bad ? "high" : "in-spec"],
      `${ground.value} V lost in the ground`,
      [ground],
      bad,
      "electrical",
      bad ? "spark" : null,
    );
  }
  const speed = f.r.one("crankRpm");
  if (speed) {
    const state = speed.value < 130 ? "slow" : speed.value > 255 ? "fast" : "normal";
    f.sign(
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
