import type { CauseFamily } from "../causes";
import type { SignId } from "../knowledge/base-rates";
import type { Observation, Theme } from "../observation";
import type { Reading, Readings } from "../readings";
import type { Mode, TestId } from "../vocabulary";

export interface Extra {
  bank?: number;
  cylinder?: number;
}
export const STEADY: Mode[] = ["idling", "raised-idle", "cruising"];
export const round = (n: number, d = 1) => Number(n.toFixed(d));

type From = readonly (Reading | { path: string } | undefined)[];
const paths = (from: From) => from.flatMap((f) => (f ? [f.path] : []));

/** Where the subjects write their findings down. Thresholds in them are common practice unless a source is named. */
export class FindingSheet {
  readonly found: Observation[] = [];
  readonly vehicle;
  /** Station pressure, kPa: measured, stated for the site, or standard. */
  readonly baro: number;

  constructor(readonly r: Readings) {
    this.vehicle = r.caseFile.vehicle;
    this.baro = r.one("BARO")?.value ?? r.caseFile.site?.baroKPa ?? 101.3;
  }

  sign(
    sign: SignId,
    states: string[],
    statement: string,
    from: From,
    abnormal: boolean,
    theme: Theme,
    family: CauseFamily | null = null,
    extra: Extra = {},
  ): void {
    const id = abnormal ? `${sign}-${states.join("-or-")}` : `${sign}-normal`;
    this.found.push({
      kind: "sign",
      id,
      sign,
      states,
      statement,
      from: paths(from),
      abnormal,
      theme,
      family,
      ...extra,
    });
  }

  /** A reading that says what a confirming test would: it stands in for the test until that is recorded. */
  test(
    test: TestId,
    states: string[],
    statement: string,
    from: From,
    abnormal: boolean,
    theme: Theme,
    family: CauseFamily | null = null,
    extra: Extra = {},
  ): void {
    const id = `${test}-reading-${states.join("-or-")}`;
    this.found.push({
      kind: "test",
      id,
      test,
      states,
      recorded: false,
      statement,
      from: paths(from),
      abnormal,
      theme,
      family,
      ...extra,
    });
  }

  /** Warm as far as the sample says; a sample without coolant temperature counts as warm. */
  warm(at: { sample: number }): boolean {
    const ect = this.r.beside("ECT", at);
    return !ect || ect.value >= 60;
  }
}
