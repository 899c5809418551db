import "server-only";
import { and, eq, isNull } from "drizzle-orm";
import type { CaseParts } from "@/db/queries/cases";
import { clockEntries, partsUsed, workJobs } from "@/db/schema";
import { finishJobInput, removePartInput, setPartInput, strikeJobInput, usePartInput } from "@/lib/cases/work-schema";
import { AppError, invalidField, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { minutesWorked, openParts } from "../cases/facts";
import { openForWrite, refreshCase } from "../cases/refresh";
import { defineVerb } from "../verb";

function workJobOf(parts: CaseParts, workJobId: string) {
  const job = parts.workJobs.find((each) => each.id === workJobId);
  if (!job) throw notFound("The job");
  if (parts.row.stage !== "repair") throw new AppError("precondition", "Work is recorded while the case is in repair.");
  if (job.state !== "approved")
    throw new AppError("precondition", `“${job.title}” is ${job.state === "done" ? "done" : "struck"} already.`);
  return job;
}

/** A part goes in as agreed: another part, or more of it, needs a yes even at the same price. */
export const usePart = defineVerb({
  name: "work.usePart",
  summary: "Record a part ordered, arrived or fitted",
  action: "work.write",
  input: usePartInput,
  async run(tx, ctx, { caseId, workJobId, ...part }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const job = workJobOf(parts, workJobId);
    const agreed = part.lineId ? job.lines.find((line) => line.id === part.lineId && line.kind === "part") : undefined;
    if (part.lineId && !agreed) throw invalidField("/lineId", "That part is not in the agreed job.");
    if (part.status === "fitted") {
      if (!agreed)
        throw new AppError(
          "precondition",
          "This part is not in what was agreed. Ask for more work first; a changed part needs a yes even at the same price.",
        );
      const already = parts.partsUsed
        .filter((each) => each.workJobId === workJobId && each.lineId === part.lineId && each.status === "fitted")
        .reduce((sum, each) => sum + each.quantityMilli, 0);
      if (already + part.quantityMilli > agreed.quantityMilli) {
        throw invalidField(
          "/quantityMilli",
          `Agreed were ${agreed.quantityMilli / 1000}; that would be ${(already + part.quantityMilli) / 1000}. Ask for more work first.`,
        );
      }
      if (agreed.condition && agreed.condition !== part.condition)
        throw invalidField("/condition", `Agreed was a ${agreed.condition} part. Another condition needs a yes first.`);
    }
    const id = newId("prt", ctx.now.getTime());
    await tx.insert(partsUsed).values({
      shopId: ctx.shopId,
      id,
      caseId,
      workJobId,
      lineId: part.lineId ?? null,
      description: part.description,
      partNumber: part.partNumber ?? agreed?.partNumber ?? null,
      quantityMilli: part.quantityMilli,
      condition: part.condition,
      oldPart: part.oldPart,
      status: part.status,
      arrivesOn: part.arrivesOn ?? null,
      byName: ctx.actor.name,
      at: ctx.now,
    });
    await refreshCase(tx, ctx, caseId);
    return { partId: id };
  },
});

export const setPart = defineVerb({
  name: "work.setPart",
  summary: "Say where a part is: ordered, arrived, fitted",
  action: "work.write",
  input: setPartInput,
  async run(tx, ctx, { caseId, partId, status, oldPart, arrivesOn }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const part = parts.partsUsed.find((each) => each.id === partId);
    if (!part) throw notFound("The part");
    workJobOf(parts, part.workJobId);
    if (status === "fitted" && !part.lineId)
      throw new AppError("precondition", "This part is not in what was agreed. Ask for more work first.");
    await tx
      .update(partsUsed)
      .set({
        status,
        ...(oldPart ? { oldPart } : {}),
        ...(arrivesOn !== undefined ? { arrivesOn } : {}),
        version: part.version + 1,
      })
      .where(and(eq(partsUsed.shopId, ctx.shopId), eq(partsUsed.id, partId)));
    await refreshCase(tx, ctx, caseId);
    return { saved: true };
  },
});

export const removePart = defineVerb({
  name: "work.removePart",
  summary: "Take a recorded part back (the audit keeps it)",
  action: "work.write",
  input: removePartInput,
  async run(tx, ctx, { caseId, partId }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const part = parts.partsUsed.find((each) => each.id === partId);
    if (!part) throw notFound("The part");
    workJobOf(parts, part.workJobId);
    await tx.delete(partsUsed).where(and(eq(partsUsed.shopId, ctx.shopId), eq(partsUsed.id, partId)));
    await refreshCase(tx, ctx, caseId);
    return { removed: true };
  },
});

export const finishJob = defineVerb({
  name: "work.finish",
  summary: "Mark an agreed job done",
  action: "work.write",
  input: finishJobInput,
  async run(tx, ctx, { caseId, workJobId, correction }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const job = workJobOf(parts, workJobId);
    const open = openParts(parts, workJobId);
    if (open > 0)
      throw new AppError(
        "precondition",
        `Record the ${open === 1 ? "part" : `${open} parts`} of “${job.title}” first.`,
      );
    if (
      minutesWorked(parts, workJobId, ctx.now) === 0 &&
      !parts.clocks.some((clock) => clock.workJobId === workJobId)
    ) {
      throw new AppError(
        "precondition",
        `Nobody was clocked on to “${job.title}”. Clock on, so that its time is recorded.`,
      );
    }
    await tx
      .update(clockEntries)
      .set({ endedAt: ctx.now })
      .where(
        and(
          eq(clockEntries.shopId, ctx.shopId),
          eq(clockEntries.workJobId, workJobId),
          eq(clockEntries.personId, ctx.actor.id),
          isNull(clockEntries.endedAt),
        ),
      );
    await tx
      .update(workJobs)
      .set({ state: "done", correction, doneAt: ctx.now, doneByName: ctx.actor.name, version: job.version + 1 })
      .where(and(eq(workJobs.shopId, ctx.shopId), eq(workJobs.id, workJobId)));
    await refreshCase(tx, ctx, caseId);
    return { state: "done" as const };
  },
});

export const strikeJob = defineVerb({
  name: "work.strike",
  summary: "Strike an agreed job, with a reason",
  action: "work.strike",
  input: strikeJobInput,
  async run(tx, ctx, { caseId, workJobId, reason }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const job = workJobOf(parts, workJobId);
    await tx
      .update(workJobs)
      .set({ state: "struck", strikeReason: reason, version: job.version + 1 })
      .where(and(eq(workJobs.shopId, ctx.shopId), eq(workJobs.id, workJobId)));
    await refreshCase(tx, ctx, caseId);
    return { state: "struck" as const };
  },
});
