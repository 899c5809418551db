import type { Assessment, ShopMemory } from "./answer";
import type { BandRow } from "./bands";
import type { CaseFile } from "./case-file";
import { CAUSES } from "./causes";
import { CAUSE_IDS } from "./vocabulary";

export type { AssessedCause, Assessment, Finding, NextTest, SecondFault, ShopMemory } from "./answer";

export interface AssessOptions {
  memory?: ShopMemory;
  bands?: readonly BandRow[];
}

export function assess(_caseFile: CaseFile, _options: AssessOptions = {}): Assessment {
  const p = 1 / CAUSE_IDS.length;
  return {
    version: 1,
    findings: [],
    causes: CAUSE_IDS.map((id) => ({
      id,
      title: CAUSES[id].title,
      family: CAUSES[id].family,
      probability: p,
      priorBits: Math.log2(p),
      location: { bank: null, cylinder: null },
      evidence: [],
    })),
    unexplained: [],
    nextTests: [],
    cautions: [],
    dataQuality: [],
    secondFault: null,
    memory: null,
  };
}
