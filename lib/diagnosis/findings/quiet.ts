import { type FindingSheet, STEADY } from "./sheet";

/** Several subjects measured and none out of the ordinary: with a fault that runs all the time that is rare. */
export function quiet(f: FindingSheet): void {
  const measured = new Set(f.found.map((f) => (f.kind === "sign" ? f.sign : f.kind === "test" ? f.test : "")));
  const trims = ["SHRTFT1", "LONGFT1"] as const;
  const totals = STEADY.map((m) => trims.map((t) => f.r.one(t, m)?.value)).filter((p) =>
    p.some((x) => x !== undefined),
  );
  const quietTrims = totals.length > 0 && totals.every((p) => Math.abs((p[0] ?? 0) + (p[1] ?? 0)) <= 6);
  const abnormal = f.found.some((f) => f.abnormal) || (totals.length > 0 && !quietTrims);
  const subjects = measured.size + (quietTrims ? totals.length : 0);
  // A stored code beside nothing but healthy readings is history until it is seen again; more must then be healthy.
  const codes = f.r.caseFile.codes.length;
  if (!abnormal && subjects >= (codes > 0 ? 7 : 5))
    f.sign(
      "readings-all-quiet",
      [subjects >= 9 && codes === 0 ? "broad" : "some"],
      `${subjects} subjects measured, none out of the ordinary`,
      [],
      false,
      null,
    );
}
