import type { FindingSheet } from "./sheet";

/** Idle speed and the air that makes it. */
export function idle(f: FindingSheet): void {
  const rpm = f.r.one("RPM", "idling");
  const few = (f.vehicle.cylinders ?? 4) <= 4;
  const carb = f.vehicle.fuelSystem === "carburetted";
  if (rpm && f.warm(rpm)) {
    const low = carb ? (few ? 660 : 560) : few ? 655 : (f.vehicle.cylinders ?? 6) >= 8 ? 540 : 600;
    const high = carb ? 1050 : few ? 980 : 880;
    if (rpm.value < low) f.sign("idle-speed", ["low"], `Idles at ${rpm.value} r/min, low`, [rpm], true, "idle", "mech");
    else if (rpm.value > high) {
      f.sign(
        "idle-speed",
        ["high"],
        `Idles at ${rpm.value} r/min, high for a warm engine`,
        [rpm],
        true,
        "idle",
        "lean",
      );
    } else f.sign("idle-speed", ["normal"], `Idle speed ${rpm.value} r/min is usual`, [rpm], false, "idle");
  }
  const air = f.r.one("idleAirPct", "idling");
  const plate = f.r.one("TP", "idling");
  const relative = f.r.one("TP_R", "idling");
  if (air) {
    const state = air.value > 52 ? "wide" : air.value < 8 ? "closed" : "normal";
    f.sign(
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
      f.sign("idle-air", ["wide"], `Throttle stands wide for an idle, ${t.value} %`, [t], true, "idle", "mech");
  }
}
