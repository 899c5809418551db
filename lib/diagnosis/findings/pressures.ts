import { MODE_LABELS } from "../vocabulary";
import { type FindingSheet, round } from "./sheet";

/** Manifold and exhaust pressure: sensor against barometer and gauge, vacuum at idle and held at 2,500 r/min. */
export function pressures(f: FindingSheet): void {
  const vacuum = f.r.one("manifoldVacuumKPa", "idling");
  const map = f.r.one("MAP", "idling");
  const gaugeMap = vacuum ? f.baro - vacuum.value : undefined;
  if (vacuum && map && gaugeMap !== undefined && vacuum.sample === map.sample) {
    const off = map.value - gaugeMap;
    if (Math.abs(off) > 6)
      f.sign(
        "map-offset",
        [off > 0 ? "high" : "low"],
        `Manifold sensor says ${map.value} kPa, the gauge ${round(gaugeMap)} kPa`,
        [map, vacuum],
        true,
        "map",
        off > 0 ? "rich" : "lean",
      );
  }
  const key = f.r.one("MAP", "key-on");
  const keyBaro = f.r.one("BARO", "key-on");
  // Key on, engine off, both should read the air outside; the sensor's own BARO may come from the same faulty sensor.
  const outside = f.r.caseFile.site?.baroKPa ?? keyBaro?.value;
  if (key && outside !== undefined) {
    const off = key.value - outside;
    const far = Math.abs(off) > 4;
    if (!f.found.some((f) => f.kind === "sign" && f.sign === "map-offset"))
      f.sign(
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
  const offset = f.found.find((f) => f.kind === "sign" && f.sign === "map-offset" && f.abnormal);
  const trueMap = gaugeMap ?? (offset ? undefined : map?.value);
  const at = vacuum ?? map;
  if (trueMap !== undefined && at && f.warm(at)) {
    const weak = trueMap > (f.vehicle.fuelSystem === "carburetted" ? 46.5 : 44.5);
    f.sign(
      "idle-vacuum",
      [weak ? "weak" : "normal"],
      `Manifold at ${round(trueMap, 0)} kPa idling${weak ? ": vacuum is weak" : ", as it should be"}`,
      [vacuum ?? map],
      weak,
      "vacuum",
      weak ? "mech" : null,
    );
  } else if (map && offset && f.warm(map)) {
    // The sensor is suspect, so its idle figure says nothing about the engine.
    f.r.note(map.path, "The manifold sensor disagrees with the air outside: its idle pressure is not used.");
  }
  const raised = f.r.one("manifoldVacuumKPa", "raised-idle");
  const raisedMap = f.r.one("MAP", "raised-idle");
  const idleVac = vacuum?.value ?? (map ? f.baro - map.value : undefined);
  const raisedVac = raised?.value ?? (raisedMap && map ? f.baro - raisedMap.value : undefined);
  if (idleVac !== undefined && raisedVac !== undefined && idleVac > 40) {
    const falls = raisedVac < idleVac - 9;
    if (falls)
      f.test(
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
    f.r.one("backPressureKPa", "raised-idle") ??
    f.r.one("backPressureKPa", "accelerating") ??
    f.r.one("backPressureKPa", "idling");
  if (back) {
    const limit = back.mode === "idling" ? 10 : back.mode === "raised-idle" ? 20 : 50;
    const high = back.value > limit;
    f.test(
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
