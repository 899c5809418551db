import "server-only";
import type { CaseParts } from "@/db/queries/cases";
import type { Ctx } from "@/lib/auth/context";
import { advanceInput, backInput, caseRef, parkInput, waiveInput } from "@/lib/cases/schema";
import { demandsFor, isOver, mayGoBack, nextStage, type PathStage, type Stage } from "@/lib/cases/stages";
import { AppError } from "@/lib/errors";
import { defineVerb } from "../verb";
import { factsOf } from "./facts";
import { moveTo, openForWrite, refreshCase, setCase } from "./refresh";

/** Refuses with what is missing, as the gate on the screen lists it. */
export function requireGate(ctx: Ctx, parts: CaseParts, to: PathStage): void {
  const missing = demandsFor(to, factsOf(parts, ctx.now)).filter((demand) => !demand.met);
  if (missing.length === 0) return;
  throw new AppError("precondition", `Not yet: ${missing.map((demand) => demand.text).join("; ")}.`, {
    fields: missing.map((demand) => ({ pointer: "/to", detail: demand.text })),
  });
}

export const advanceCase = defineVerb({
  name: "case.advance",
  summary: "Move a case through its next gate",
  action: "case.advance",
  input: advanceInput,
  async run(tx, ctx, { caseId, to }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const { row } = parts;
    if (row.stage === to) return { stage: to };
    if (nextStage(row.stage as Stage) !== to)
      throw new AppError("precondition", `A case in ${row.stage} does not go to ${to} next.`);
    if (to === "waiting") throw new AppError("precondition", "A case is asked by sending its quote.");
    if (to === "closed") throw new AppError("precondition", "A case closes with its invoice.");
    requireGate(ctx, parts, to);
    await moveTo(tx, ctx, row, to);
    await refreshCase(tx, ctx, caseId);
    return { stage: to };
  },
});

export const sendBack = defineVerb({
  name: "case.back",
  summary: "Send a case back to an earlier stage",
  action: "case.advance",
  input: backInput,
  async run(tx, ctx, { caseId, to, reason }) {
    const { row } = await openForWrite(tx, ctx, caseId);
    if (!mayGoBack(row.stage as Stage, to as Stage))
      throw new AppError("precondition", `A case in ${row.stage} does not go back to ${to}.`);
    await moveTo(tx, ctx, row, to as Stage, reason);
    await refreshCase(tx, ctx, caseId);
    return { stage: to };
  },
});

export const parkCase = defineVerb({
  name: "case.park",
  summary: "Put a case on hold",
  action: "case.park",
  input: parkInput,
  async run(tx, ctx, input) {
    const { row } = await openForWrite(tx, ctx, input.caseId);
    if (row.stage === "parked") throw new AppError("precondition", "The case is on hold already.");
    if (ctx.actor.role === "technician" && row.technicianId !== ctx.actor.id)
      throw new AppError("forbidden", "A technician puts only their own cases on hold.");
    await setCase(tx, ctx, input.caseId, { parkedFrom: row.stage, parkedFor: input.for });
    await moveTo(tx, ctx, row, "parked", input.reason);
    await refreshCase(tx, ctx, input.caseId);
    return { stage: "parked" as const };
  },
});

export const unparkCase = defineVerb({
  name: "case.unpark",
  summary: "Take a case off hold, back to where it was",
  action: "case.park",
  input: caseRef,
  async run(tx, ctx, { caseId }) {
    const { row } = await openForWrite(tx, ctx, caseId);
    if (row.stage !== "parked" || !row.parkedFrom) throw new AppError("precondition", "The case is not on hold.");
    if (ctx.actor.role === "technician" && row.technicianId !== ctx.actor.id)
      throw new AppError("forbidden", "A technician takes only their own cases off hold.");
    await moveTo(tx, ctx, row, row.parkedFrom as Stage);
    await setCase(tx, ctx, caseId, { parkedFrom: null, parkedFor: null });
    await refreshCase(tx, ctx, caseId);
    return { stage: row.parkedFrom as Stage };
  },
});

export const waiveProof = defineVerb({
  name: "case.waiveProof",
  summary: "Waive the proof of a repair, with a reason",
  action: "case.waiveProof",
  input: waiveInput,
  async run(tx, ctx, { caseId, reason }) {
    const { row } = await openForWrite(tx, ctx, caseId);
    if (row.stage !== "proof" || isOver(row.stage))
      throw new AppError("precondition", "Only a case in proof can be waived.");
    await setCase(tx, ctx, caseId, { waiver: { reason, by: ctx.actor.name, at: ctx.now.toISOString() } });
    await refreshCase(tx, ctx, caseId);
    return { waived: true };
  },
});
