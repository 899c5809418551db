import "server-only";
import { and, eq, isNull, lte } from "drizzle-orm";
import { clockEntries } from "@/db/schema";
import { clockOffInput, clockOnInput, correctClockInput } from "@/lib/cases/work-schema";
import { AppError, invalidField, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { openForWrite, refreshCase } from "../cases/refresh";
import { defineVerb } from "../verb";

/** A person is on one clock at a time: clocking on elsewhere ends the running one. */
export const clockOn = defineVerb({
  name: "clock.on",
  summary: "Clock on to a job, or to the diagnosis",
  action: "work.clock",
  input: clockOnInput,
  async run(tx, ctx, { caseId, workJobId }) {
    const parts = await openForWrite(tx, ctx, caseId);
    if (workJobId) {
      const job = parts.workJobs.find((each) => each.id === workJobId);
      if (!job) throw notFound("The job");
      if (job.state !== "approved")
        throw new AppError("precondition", "That job is finished. Work beyond what was agreed needs another yes.");
      if (parts.row.stage !== "repair") throw new AppError("precondition", "Work on a job starts in repair.");
    } else if (parts.row.ceilingMinor === null) {
      throw new AppError("precondition", "Diagnosis has not been agreed to yet, so its time can't be counted.");
    }
    const running = parts.clocks.find((clock) => clock.personId === ctx.actor.id && !clock.endedAt);
    if (running && running.workJobId === (workJobId ?? null)) return { clockId: running.id };
    await tx
      .update(clockEntries)
      .set({ endedAt: ctx.now })
      // an entry that starts later than this one cannot end here
      .where(
        and(
          eq(clockEntries.shopId, ctx.shopId),
          eq(clockEntries.personId, ctx.actor.id),
          isNull(clockEntries.endedAt),
          lte(clockEntries.startedAt, ctx.now),
        ),
      );
    const id = newId("clk", ctx.now.getTime());
    await tx.insert(clockEntries).values({
      shopId: ctx.shopId,
      id,
      caseId,
      workJobId: workJobId ?? null,
      personId: ctx.actor.id,
      personName: ctx.actor.name,
      startedAt: ctx.now,
    });
    await refreshCase(tx, ctx, caseId);
    return { clockId: id };
  },
});

export const clockOff = defineVerb({
  name: "clock.off",
  summary: "Clock off",
  action: "work.clock",
  input: clockOffInput,
  async run(tx, ctx, { caseId }) {
    const parts = await openForWrite(tx, ctx, caseId, { evenIfOver: true });
    const running = parts.clocks.find((clock) => clock.personId === ctx.actor.id && !clock.endedAt);
    if (!running) return { minutes: 0 };
    await tx
      .update(clockEntries)
      .set({ endedAt: ctx.now })
      .where(and(eq(clockEntries.shopId, ctx.shopId), eq(clockEntries.id, running.id)));
    await refreshCase(tx, ctx, caseId);
    return { minutes: Math.round((ctx.now.getTime() - running.startedAt.getTime()) / 60_000) };
  },
});

export const correctClock = defineVerb({
  name: "clock.correct",
  summary: "Correct a clock entry, with a reason",
  action: "work.correctClock",
  input: correctClockInput,
  async run(tx, ctx, { caseId, clockId, startedAt, endedAt, reason }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const entry = parts.clocks.find((clock) => clock.id === clockId);
    if (!entry) throw notFound("The clock entry");
    if (Date.parse(endedAt) <= Date.parse(startedAt))
      throw invalidField("/endedAt", "The end must come after the start.");
    if (Date.parse(endedAt) > ctx.now.getTime()) throw invalidField("/endedAt", "The end can't lie in the future.");
    await tx
      .update(clockEntries)
      .set({
        startedAt: new Date(startedAt),
        endedAt: new Date(endedAt),
        correctedReason: reason,
        version: entry.version + 1,
      })
      .where(and(eq(clockEntries.shopId, ctx.shopId), eq(clockEntries.id, clockId)));
    await refreshCase(tx, ctx, caseId);
    return { corrected: true };
  },
});
