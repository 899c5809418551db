import type { CauseFamily } from "./causes";
import type { CauseId, TestId } from "./vocabulary";

/** The assessment's answer, version 1. Its arithmetic is the arithmetic done: nothing here is for show. */
export interface Assessment {
  version: 1;
  findings: Finding[];
  /** Likeliest first; their probabilities sum to 1 over the causes the vehicle can have. */
  causes: AssessedCause[];
  /** Ids of findings out of the ordinary that the leading cause does not account for. */
  unexplained: string[];
  nextTests: NextTest[];
  cautions: string[];
  dataQuality: { path: string; message: string }[];
  /** Two causes that together explain what neither does alone. */
  secondFault: SecondFault | null;
  /** What this shop's own closed cases added, where there were any. */
  memory: { similar: number; ended: { id: CauseId; count: number }[] } | null;
}

export interface Finding {
  id: string;
  statement: string;
  /** Paths in the case file, e.g. `samples[0].values.SHRTFT1`. */
  from: string[];
  family: CauseFamily | null;
  /** False when the finding is what a sound engine shows. */
  abnormal: boolean;
}

export interface AssessedCause {
  id: CauseId;
  title: string;
  family: CauseFamily;
  probability: number;
  /** log₂ of the prior. */
  priorBits: number;
  location: { bank: number | null; cylinder: number | null };
  /** Weights in bits; findings of no weight for this cause are left out. Strongest first. */
  evidence: { finding: string; weight: number }[];
}

export interface NextTest {
  id: TestId;
  title: string;
  minutes: number;
  tools: string[];
  cautions: string[];
  expectedInformationBits: number;
  bitsPerMinute: number;
  /** Outcome → its probability now. */
  outcomeProbability: Record<string, number>;
  /** Outcome → the leading causes after it. */
  ifOutcome: Record<string, Partial<Record<CauseId, number>>>;
  /** Causes this test proves on its own, with the outcomes that do. */
  proves: Partial<Record<CauseId, readonly string[]>>;
}

export interface SecondFault {
  causes: [CauseId, CauseId];
  /** How much better the pair explains the findings than the leading cause alone, in bits. */
  bits: number;
  statement: string;
}

/** Closed cases of one shop with a proven cause, most specific match first. Comebacks have been subtracted. */
export interface ShopMemory {
  entries: { complaintFamily: string; fuelSystem: string; causes: Partial<Record<CauseId, number>> }[];
}
