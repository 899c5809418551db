import "server-only";
import { isDeepStrictEqual } from "node:util";
import { and, eq, sql } from "drizzle-orm";
import type { Tx } from "@/db/client";
import type { SampleRow } from "@/db/queries/cases";
import { samples } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { describeSampleInput, removeSampleInput, sampleInput, setReadingsInput } from "@/lib/cases/schema";
import { sampleSchema } from "@/lib/diagnosis/case-file";
import { AppError, notFound } from "@/lib/errors";
import { pointerOf } from "@/lib/http/problem";
import { newId } from "@/lib/ids";
import { lockOpenCase, refreshCase } from "../cases/refresh";
import { defineVerb } from "../verb";

/** Checks readings as a case file's sample; a wrong type is refused with its path, an impossible number is kept. */
export function checkValues(mode: string, phase: string, values: Record<string, unknown>): Record<string, unknown> {
  const result = sampleSchema.safeParse({ mode, phase, values });
  if (result.success) return result.data.values;
  const fields = result.error.issues.map((issue) => ({ pointer: pointerOf(issue.path), detail: issue.message }));
  throw new AppError("invalid", fields[0]?.detail ?? "The readings do not fit.", { fields });
}

export async function insertSample(
  tx: Tx,
  ctx: Ctx,
  caseId: string,
  consented: boolean,
  input: { mode: string; phase: string; how?: string; values: Record<string, unknown> },
) {
  const values = checkValues(input.mode, input.phase, input.values);
  const [last] = await tx
    .select({ position: sql<number>`coalesce(max(${samples.position}), 0)` })
    .from(samples)
    .where(and(eq(samples.shopId, ctx.shopId), eq(samples.caseId, caseId)));
  const id = newId("smp", ctx.now.getTime());
  await tx.insert(samples).values({
    shopId: ctx.shopId,
    id,
    caseId,
    position: (last?.position ?? 0) + 1,
    mode: input.mode,
    phase: input.phase,
    how: input.how ?? null,
    values,
    takenAt: ctx.now,
    takenById: ctx.actor.id,
    takenByName: ctx.actor.name,
    beforeConsent: !consented,
  });
  return id;
}

export const addSample = defineVerb({
  name: "readings.addSample",
  summary: "Add a column of readings",
  action: "reading.write",
  input: sampleInput,
  async run(tx, ctx, { caseId, ...input }) {
    const row = await lockOpenCase(tx, ctx, caseId);
    const id = await insertSample(tx, ctx, caseId, row.ceilingMinor !== null, input);
    await refreshCase(tx, ctx, caseId);
    return { id };
  },
});

async function sampleForUpdate(tx: Tx, ctx: Ctx, caseId: string, sampleId: string): Promise<SampleRow> {
  const [row] = await tx
    .select()
    .from(samples)
    .where(and(eq(samples.shopId, ctx.shopId), eq(samples.caseId, caseId), eq(samples.id, sampleId)))
    .for("update");
  if (!row) throw notFound("The sample");
  return row;
}

const absent = (value: unknown) => (value === undefined || value === "" ? null : value);

/**
 * Writes single cells. A cell whose stored value is no longer what the writer saw is a conflict and nothing of the
 * request is written; cells that others changed meanwhile but this request does not touch stay as they are.
 */
export const setReadings = defineVerb({
  name: "readings.set",
  summary: "Write readings, cell by cell",
  action: "reading.write",
  input: setReadingsInput,
  async run(tx, ctx, { caseId, sampleId, changes }) {
    await lockOpenCase(tx, ctx, caseId);
    const row = await sampleForUpdate(tx, ctx, caseId, sampleId);
    const values: Record<string, unknown> = { ...row.values };
    const conflicts: { parameter: string; yours: unknown; theirs: unknown }[] = [];
    for (const { parameter, was, now } of changes) {
      const stored = absent(values[parameter]);
      if (!isDeepStrictEqual(stored, absent(was)) && !isDeepStrictEqual(stored, absent(now)))
        conflicts.push({ parameter, yours: absent(now), theirs: stored });
      if (absent(now) === null) delete values[parameter];
      else values[parameter] = now;
    }
    if (conflicts.length > 0) {
      throw new AppError("conflict", "Someone else wrote in the same cell.", {
        current: { sampleId, by: row.takenByName, version: row.version, cells: conflicts },
      });
    }
    const checked = checkValues(row.mode, row.phase, values);
    await tx
      .update(samples)
      .set({ values: checked, version: row.version + 1 })
      .where(and(eq(samples.shopId, ctx.shopId), eq(samples.id, sampleId)));
    await refreshCase(tx, ctx, caseId);
    return { version: row.version + 1 };
  },
});

export const describeSample = defineVerb({
  name: "readings.describe",
  summary: "Change a sample's mode, or how it was taken",
  action: "reading.write",
  input: describeSampleInput,
  async run(tx, ctx, { caseId, sampleId, mode, how }) {
    await lockOpenCase(tx, ctx, caseId);
    const row = await sampleForUpdate(tx, ctx, caseId, sampleId);
    await tx
      .update(samples)
      .set({ mode, how: how ?? null, version: row.version + 1 })
      .where(and(eq(samples.shopId, ctx.shopId), eq(samples.id, sampleId)));
    await refreshCase(tx, ctx, caseId);
    return { version: row.version + 1 };
  },
});

export const removeSample = defineVerb({
  name: "readings.removeSample",
  summary: "Take a sample out of the case (the audit keeps it)",
  action: "reading.write",
  input: removeSampleInput,
  async run(tx, ctx, { caseId, sampleId }) {
    await lockOpenCase(tx, ctx, caseId);
    await sampleForUpdate(tx, ctx, caseId, sampleId);
    await tx.delete(samples).where(and(eq(samples.shopId, ctx.shopId), eq(samples.id, sampleId)));
    await refreshCase(tx, ctx, caseId);
    return { removed: true };
  },
});
