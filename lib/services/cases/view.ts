import "server-only";
import type { CaseParts } from "@/db/queries/cases";
import type { Ctx } from "@/lib/auth/context";
import { gateOf } from "@/lib/cases/stages";
import type { ShopMemory } from "@/lib/diagnosis/answer";
import { assess } from "@/lib/diagnosis/assess";
import { priceDiagnosis } from "../quotes/price";
import {
  caseFileOf,
  ceilingOf,
  diagnosisMinutes,
  factsOf,
  proofOf,
  settingsOf,
  standingRevisionOf,
  technicianOf,
} from "./facts";

/** A case with what follows from it: the file, the assessment, the proof, the gate, the diagnosis so far. */
export function refreshedView(ctx: Ctx, parts: CaseParts, memory: ShopMemory) {
  const caseFile = caseFileOf(parts);
  const proof = proofOf(parts, caseFile);
  const facts = factsOf(parts, ctx.now, proof);
  return {
    parts,
    settings: settingsOf(parts),
    caseFile,
    assessment: assess(caseFile, { memory }),
    proof,
    facts,
    gate: gateOf(facts),
    technician: technicianOf(parts),
    standing: standingRevisionOf(parts),
    diagnosis: {
      price: priceDiagnosis(parts, ctx.now),
      minutes: diagnosisMinutes(parts, ctx.now),
      ceilingMinor: ceilingOf(parts),
    },
    now: ctx.now,
  };
}

export type CaseView = ReturnType<typeof refreshedView>;
