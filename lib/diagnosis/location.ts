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

type Place = { bank: number | null; cylinder: number | null };

/** Where a cause would sit, as far as the case says. A bank only where the vehicle has two. */
export function locator(observations: readonly Observation[], caseFile: CaseFile): (cause: CauseId) => Place {
  const { banks, bank1Cylinders, airMetering } = caseFile.vehicle;
  const named = observations.filter(
    (o) =>
      o.cylinder !== undefined &&
      (o.kind === "sign" || o.kind === "test" || (o.kind === "code" && o.codeFamily.startsWith("injector"))),
  );
  const theCylinder = (named.find((o) => o.kind === "test") ?? named[0])?.cylinder ?? null;
  const banked = banks === 2 ? observations.filter((o) => o.bank !== undefined && o.abnormal) : [];
  const tested = banked.find((o) => o.kind === "test")?.bank;
  const signed = banked.find((o) => o.kind !== "code")?.bank;
  const coded = banked.filter((o) => o.kind === "code");
  const trims = observations.find((o) => o.kind === "trims");

  const bankOf = (cause: CauseId, cylinder: number | null): number | null => {
    const code = coded.find((o) => o.kind === "code" && KNOWLEDGE[cause].codes?.[o.codeFamily] !== undefined);
    const said = tested ?? code?.bank ?? signed;
    if (said !== undefined) return said;
    if (trims?.kind === "trims" && trims.abnormal) {
      const metering = airMetering === "map" ? "map" : "maf";
      const { where, likelihood } = trimLikelihood(KNOWLEDGE[cause].trims ?? "quiet", metering, trims.trims, 2);
      if (where.bank1 > 0.7 * likelihood) return 1;
      if (where.bank2 > 0.7 * likelihood) return 2;
    }
    return cylinder !== null && bank1Cylinders ? (bank1Cylinders.includes(cylinder) ? 1 : 2) : null;
  };
  return (cause) => {
    const cylinder = AT_CYLINDER.has(cause) ? theCylinder : null;
    return { cylinder, bank: banks === 2 && ON_BANK.has(cause) ? bankOf(cause, cylinder) : null };
  };
}
