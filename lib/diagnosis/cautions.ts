import type { CaseFile } from "./case-file";
import type { Observation } from "./observation";
import { HAZARDS } from "./tests";

/** Cautions of the case itself; each test carries its own. They defer to the maker's procedure and local codes. */
export function cautionsFor(caseFile: CaseFile, observations: readonly Observation[]): string[] {
  const cautions: string[] = [];
  const has = (sign: string, state: string) =>
    observations.some((o) => o.kind === "sign" && o.sign === sign && o.states.includes(state));
  if (caseFile.complaints.includes("fuel-leak-seen") || caseFile.complaints.includes("fuel-smell"))
    cautions.push(HAZARDS.leak);
  if (caseFile.complaints.includes("mil-flashing"))
    cautions.push(
      "A flashing warning lamp means the catalyst is being damaged: do not drive on; a hot catalyst not over grass.",
    );
  if (has("full-load-mixture", "lean")) cautions.push(HAZARDS.leanload);
  if (has("misfires", "one") || has("misfires", "two") || has("misfires", "pair")) cautions.push(HAZARDS.catalyst);
  if (caseFile.complaints.includes("overheats") || has("coolant", "hot")) cautions.push(HAZARDS.hotcoolant);
  if (has("gas", "rich-everywhere") || has("gas", "rich-idle")) cautions.push(HAZARDS.co);
  if (caseFile.vehicle.hybrid)
    cautions.push("Hybrid: high voltage on orange cables; out of ready mode, key away, it may start itself.");
  if (caseFile.vehicle.fuelSystem === "direct" || caseFile.vehicle.fuelSystem === "port+direct")
    cautions.push("Direct injection: high-pressure fuel injects through skin; confirm zero pressure before opening.");
  return cautions;
}
