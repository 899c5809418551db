import "server-only";
import { and, eq, isNull } from "drizzle-orm";
import { causeMarks, testOutcomes } from "@/db/schema";
import { markCauseInput, recordTestInput, undoTestInput, unmarkCauseInput } from "@/lib/cases/schema";
import { assess } from "@/lib/diagnosis/assess";
import { CAUSES } from "@/lib/diagnosis/causes";
import { AppError, invalidField, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { caseFileOf } from "../cases/facts";
import { lockOpenCase, openForWrite, refreshCase } from "../cases/refresh";
import { defineVerb } from "../verb";
import { shopMemory } from "./memory";
import { recordOutcome } from "./record";

export const recordTest = defineVerb({
  name: "test.record",
  summary: "Record a test's outcome",
  action: "test.record",
  input: recordTestInput,
  async run(tx, ctx, { caseId, ...input }) {
    await lockOpenCase(tx, ctx, caseId);
    const id = await recordOutcome(tx, ctx, caseId, input);
    const parts = await refreshCase(tx, ctx, caseId);
    return { id, leadCause: parts.row.leadCause };
  },
});

export const undoTest = defineVerb({
  name: "test.undo",
  summary: "Undo a recorded outcome",
  action: "test.record",
  input: undoTestInput,
  async run(tx, ctx, { caseId, outcomeId }) {
    await lockOpenCase(tx, ctx, caseId);
    const undone = await tx
      .update(testOutcomes)
      .set({ undoneAt: ctx.now })
      .where(
        and(
          eq(testOutcomes.shopId, ctx.shopId),
          eq(testOutcomes.caseId, caseId),
          eq(testOutcomes.id, outcomeId),
          isNull(testOutcomes.undoneAt),
        ),
      )
      .returning({ id: testOutcomes.id });
    if (undone.length === 0) throw notFound("The outcome");
    await refreshCase(tx, ctx, caseId);
    return { undone: true };
  },
});

/** `proven` needs a recorded test or a reading that proves it; `suspected` needs the technician's reason. */
export const markCause = defineVerb({
  name: "cause.mark",
  summary: "Mark a cause proven or suspected",
  action: "cause.mark",
  input: markCauseInput,
  async run(tx, ctx, { caseId, causeId, mark, reason, provenByTestId }) {
    const parts = await openForWrite(tx, ctx, caseId);
    if (!(causeId in CAUSES)) throw invalidField("/causeId", "That is not one of the causes.");
    if (provenByTestId && !parts.tests.some((test) => test.id === provenByTestId))
      throw invalidField("/provenByTestId", "That test is not recorded in this case.");
    if (mark === "proven" && parts.tests.length === 0 && parts.samples.length === 0) {
      throw new AppError(
        "precondition",
        "A proof needs a recorded test or reading. Record it, or mark the cause as suspected.",
      );
    }
    const memory = await shopMemory(tx, ctx.shopId, caseId);
    const ranked = assess(caseFileOf(parts), { memory }).causes;
    const rank = ranked.findIndex((cause) => cause.id === causeId);
    const found = ranked[rank];
    // a new word on the same cause replaces the old one
    await tx
      .update(causeMarks)
      .set({ withdrawnAt: ctx.now })
      .where(
        and(
          eq(causeMarks.shopId, ctx.shopId),
          eq(causeMarks.caseId, caseId),
          eq(causeMarks.causeId, causeId),
          isNull(causeMarks.withdrawnAt),
        ),
      );
    const id = newId("mark", ctx.now.getTime());
    await tx.insert(causeMarks).values({
      shopId: ctx.shopId,
      id,
      caseId,
      causeId,
      mark,
      reason,
      provenByTestId: provenByTestId ?? null,
      rank: found ? rank + 1 : null,
      probability: found?.probability ?? null,
      location: found?.location ?? null,
      byId: ctx.actor.id,
      byName: ctx.actor.name,
      at: ctx.now,
    });
    await refreshCase(tx, ctx, caseId);
    return { id };
  },
});

export const unmarkCause = defineVerb({
  name: "cause.unmark",
  summary: "Take a mark back, with a reason",
  action: "cause.mark",
  input: unmarkCauseInput,
  async run(tx, ctx, { caseId, markId }) {
    await lockOpenCase(tx, ctx, caseId);
    const gone = await tx
      .update(causeMarks)
      .set({ withdrawnAt: ctx.now })
      .where(
        and(
          eq(causeMarks.shopId, ctx.shopId),
          eq(causeMarks.caseId, caseId),
          eq(causeMarks.id, markId),
          isNull(causeMarks.withdrawnAt),
        ),
      )
      .returning({ id: causeMarks.id });
    if (gone.length === 0) throw notFound("The mark");
    await refreshCase(tx, ctx, caseId);
    return { withdrawn: true };
  },
});
