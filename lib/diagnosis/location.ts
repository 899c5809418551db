import type { CaseFile } from "./case-file";
import { KNOWLEDGE } from "./knowledge/index";
import { trimLikelihood } from "./likelihood";
import type { Observation } from "./observation";
import type { CauseId } from "./vocabulary";

/** Causes that sit at one cylinder. */
const AT_CYLINDER: ReadonlySet<CauseId> = new Set<CauseId>([
  "intake-air-leak",
  "injector-leaking",
  "injector-restricted",
  "injector-circuit-fault",
  "spark-plugs-worn",
  "plug-well-contaminated",
  "ignition-coil-failing",
  "plug-lead-leaking",
  "low-compression",
  "valve-train-worn",
  "head-gasket-leak",
]);
/** Causes that sit on one bank. */
const ON_BANK: ReadonlySet<CauseId> = new Set<CauseId>([
  ...AT_CYLINDER,
  "exhaust-leak-upstream",
  "o2-sensor-slow",
  "o2-sensor-reads-lean",
  "o2-sensor-reads-rich",
  "o2-heater-fault",
  "rear-o2-fault",
  "catalyst-degraded",
  "exhaust-restricted",
  "cam-phaser-fault",
  "valve-timing-off",
  "cam-sensor-fault",
  "knock-sensor-fault",
]);

/** Where a cause would sit, as far as the case says. On one bank only where the vehicle has two. */
export function locate(
  cause: CauseId,
  observations: readonly Observation[],
  caseFile: CaseFile,
): { bank: number | null; cylinder: number | null } {
  const { banks, bank1Cylinders } = caseFile.vehicle;
  let cylinder: number | null = null;
  let bank: number | null = null;
  if (AT_CYLINDER.has(cause)) {
    const named = observations.filter(
      (o) =>
        o.cylinder !== undefined &&
        (o.kind === "sign" || o.kind === "test" || (o.kind === "code" && /^injector/.test(o.codeFamily))),
    );
    cylinder = (named.find((o) => o.kind === "test") ?? named[0])?.cylinder ?? null;
  }
  if (banks === 2 && ON_BANK.has(cause)) {
    const own = observations.filter((o) => o.bank !== undefined && o.abnormal && o.kind !== "code");
    const coded =
      caseFile.codes.length > 0
        ? observations.find(
            (o) => o.kind === "code" && o.bank !== undefined && KNOWLEDGE[cause].codes?.[o.codeFamily] !== undefined,
          )
        : undefined;
    bank = (own.find((o) => o.kind === "test") ?? coded ?? own[0])?.bank ?? null;
    const trims = observations.find((o) => o.kind === "trims");
    if (bank === null && trims?.kind === "trims" && trims.abnormal) {
      const { where, likelihood } = trimLikelihood(
        KNOWLEDGE[cause].trims ?? "quiet",
        caseFile.vehicle.airMetering === "map" ? "map" : "maf",
        trims.trims,
        2,
      );
      if (where.bank1 > 0.7 * likelihood) bank = 1;
      else if (where.bank2 > 0.7 * likelihood) bank = 2;
    }
    if (bank === null && cylinder !== null && bank1Cylinders) bank = bank1Cylinders.includes(cylinder) ? 1 : 2;
  }
  return { bank, cylinder };
}
