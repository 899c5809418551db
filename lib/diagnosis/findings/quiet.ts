import type { CaseFile } from "../case-file";
import type { Observation } from "../observation";

/** Measured and healthy: so many subjects make a breadth worth saying. */
const SOME = 5;
const BROAD = 9;

/**
 * How much was measured or tested and found healthy. A fault that is there all the time rarely hides from a broad set;
 * a stored code beside nothing but healthy readings is history until it is seen again, and then more must be healthy.
 */
export function quietObservation(observations: readonly Observation[], caseFile: CaseFile): Observation | null {
  const measured = observations.filter((o) => o.kind === "trims" || o.kind === "sign" || o.kind === "test");
  if (measured.some((o) => o.abnormal)) return null;
  const subjects = measured.reduce((n, o) => n + (o.kind === "trims" ? o.trims.length : 1), 0);
  const coded = caseFile.codes.length > 0 ? 1 : 0;
  if (subjects < SOME + coded) return null;
  return {
    kind: "sign",
    id: "readings-all-quiet",
    sign: "readings-all-quiet",
    states: [subjects >= BROAD + coded ? "broad" : "some"],
    statement: `${subjects} readings and tests, none out of the ordinary`,
    from: [],
    abnormal: false,
    family: null,
    theme: null,
  };
}
