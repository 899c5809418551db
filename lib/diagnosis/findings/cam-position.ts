import type { FindingSheet } from "./sheet";

/** Cam against its command. */
export function camPosition(f: FindingSheet): void {
  const cam = f.r.one("camAdvanceDeg");
  const wanted = cam && f.r.beside("camAdvanceCommandedDeg", cam);
  if (cam && wanted) {
    const off = Math.abs(cam.value - wanted.value) > 7;
    f.sign(
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
