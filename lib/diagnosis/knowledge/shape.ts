import type { CauseId, Circumstance, ComplaintId, History, TestId } from "../vocabulary";
import type { SignId } from "./base-rates";
import type { CodeFamily } from "./code-families";

/**
 * What a cause predicts. All figures are percent of cases that have this cause: of 100 workshop cases with it, so many
 * show the complaint, store the code, give the outcome. What is not stated is as often as with any other cause
 * (`base-rates.ts`). Unstated outcomes of a stated test or sign share what is left in their usual proportion.
 */
export interface CauseKnowledge {
  /** Of 1,000 fuel and ignition cases on vehicles that can have it. */
  prior: number;
  /** `age`: likelier on a worn engine; `young`: not a matter of wear. */
  wear?: "age" | "young";
  reported: Partial<Record<ComplaintId, number>>;
  circumstances?: Partial<Record<Circumstance, number>>;
  history?: Partial<Record<History, number>>;
  codes?: Partial<Record<CodeFamily, number>>;
  signs?: Partial<Record<SignId, Record<string, number>>>;
  tests?: Partial<Record<TestId, Record<string, number>>>;
  /** Which behaviour of the engine model predicts the trims; absent: they stay quiet. */
  trims?: TrimBehaviour;
  why: string;
  source: string;
}

export const TRIM_BEHAVIOURS = [
  "quiet",
  "healthy",
  "leak-after-throttle",
  "leak-at-duct",
  "meter-under-reads",
  "meter-over-reads",
  "map-reads-high",
  "map-reads-low",
  "pressure-falls-with-flow",
  "pressure-high",
  "constant-extra-fuel",
  "purge",
  "injector-rich",
  "injector-lean",
  "egr-open",
  "exhaust-blocked",
  "exhaust-leak",
  "sensor-lean",
  "sensor-rich",
  "sensor-slow",
  "ethanol-more",
  "ethanol-less",
  "misfire-air",
  "cold-enrichment",
  "oil-vapour",
  "charge-leak",
  "rail-low",
] as const;
export type TrimBehaviour = (typeof TRIM_BEHAVIOURS)[number];

export type KnowledgePart = Partial<Record<CauseId, CauseKnowledge>>;
