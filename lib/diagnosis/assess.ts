import type { AssessedCause, Assessment, Finding, ShopMemory } from "./answer";
import type { BandRow } from "./bands";
import type { CaseFile } from "./case-file";
import { CAUSES } from "./causes";
import { cautionsFor } from "./cautions";
import { observationBits, trimBits } from "./likelihood";
import { locator } from "./location";
import { nextTests } from "./next-tests";
import type { Observation } from "./observation";
import { observe } from "./observe";
import { priorsOf } from "./priors";
import { repetitionFactors } from "./repetition";
import { findSecondFault } from "./second-fault";
import type { CauseId } from "./vocabulary";

export type { AssessedCause, Assessment, Finding, NextTest, SecondFault, ShopMemory } from "./answer";

export interface AssessOptions {
  /** This shop's closed cases; another shop's never come here. */
  memory?: ShopMemory;
  /** The shop's bands, kept with the case: they colour the sheet; evidence rests on its own thresholds. */
  bands?: readonly BandRow[];
}

/** Stated to four decimals, and probabilities follow from what is stated. */
const stated = (bits: number) => Math.round(bits * 1e4) / 1e4;

/** Weights in bits by cause for every observation, rows in the order of `observations`. */
export function weigh(
  observations: readonly Observation[],
  causes: readonly CauseId[],
  caseFile: CaseFile,
): number[][] {
  const trims = observations.find((o) => o.kind === "trims");
  const metering = caseFile.vehicle.airMetering === "map" ? "map" : "maf";
  const bits = trims?.kind === "trims" ? trimBits(metering, trims.trims, caseFile.vehicle.banks ?? 1) : () => 0;
  const rows = observations.map((o) => causes.map((cause) => observationBits(o, cause, bits)));
  const factors = repetitionFactors(observations, rows);
  return rows.map((row, i) => row.map((w) => stated(w * (factors[i] ?? 1))));
}

/** Softmax in base 2. */
export function normalize(bits: readonly number[]): number[] {
  const top = Math.max(...bits);
  const raw = bits.map((b) => 2 ** (b - top));
  const sum = raw.reduce((s, x) => s + x, 0);
  return raw.map((x) => x / sum);
}

/**
 * The assessment: what is likely wrong, why, what stays unexplained and which test to do next. Pure: the same case gives
 * the same answer in the browser and on the server. Samples taken after a repair never count.
 */
export function assess(caseFile: CaseFile, options: AssessOptions = {}): Assessment {
  const { causes, bits: priorBitsRaw, memory } = priorsOf(caseFile, options.memory);
  const priorBits = priorBitsRaw.map((b) => Number(b.toFixed(6)));
  const { observations, readings } = observe(caseFile);
  const weights = weigh(observations, causes, caseFile);
  const totals = priorBits.map((b, c) => weights.reduce((sum, row) => sum + (row[c] ?? 0), b));
  const probability = normalize(totals);

  const order = causes.map((_, i) => i).sort((a, b) => (probability[b] ?? 0) - (probability[a] ?? 0) || a - b);
  const locate = locator(observations, caseFile);
  const assessed: AssessedCause[] = order.map((c) => {
    const id = causes[c] as CauseId;
    const evidence: AssessedCause["evidence"] = [];
    for (let i = 0; i < observations.length; i++) {
      const weight = weights[i]?.[c] ?? 0;
      if (weight !== 0) evidence.push({ finding: (observations[i] as Observation).id, weight });
    }
    evidence.sort((a, b) => Math.abs(b.weight) - Math.abs(a.weight));
    return {
      id,
      title: CAUSES[id].title,
      family: CAUSES[id].family,
      probability: probability[c] ?? 0,
      priorBits: priorBits[c] ?? 0,
      location: locate(id),
      evidence,
    };
  });

  const findings: Finding[] = observations.map(({ id, statement, from, family, abnormal }) => ({
    id,
    statement,
    from: [...from].sort(),
    family,
    abnormal,
  }));
  const lead = order[0] ?? 0;
  // A finding is left unexplained when it is out of the ordinary and the leading cause makes it no likelier than chance.
  const unexplained = observations.flatMap((o, i) => (o.abnormal && (weights[i]?.[lead] ?? 0) < 0.25 ? [o.id] : []));
  return {
    version: 1,
    findings,
    causes: assessed,
    unexplained,
    nextTests: nextTests(caseFile, observations, causes, probability),
    cautions: cautionsFor(caseFile, observations),
    dataQuality: [...readings.notes].sort((a, b) =>
      a.path < b.path ? -1 : a.path > b.path ? 1 : a.message < b.message ? -1 : 1,
    ),
    secondFault: findSecondFault(observations, causes, priorBits, weights, order),
    memory,
  };
}
