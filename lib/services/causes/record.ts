import "server-only";
import type { Tx } from "@/db/client";
import { testOutcomes } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { testRecordSchema } from "@/lib/diagnosis/case-file";
import { AppError } from "@/lib/errors";
import { pointerOf } from "@/lib/http/problem";
import { newId } from "@/lib/ids";

export interface OutcomeInput {
  testId: string;
  outcome: string;
  phase: string;
  cylinder?: number;
  bank?: number;
  note?: string;
}

export async function recordOutcome(tx: Tx, ctx: Ctx, caseId: string, input: OutcomeInput): Promise<string> {
  const checked = testRecordSchema.safeParse({
    id: input.testId,
    outcome: input.outcome,
    cylinder: input.cylinder,
    bank: input.bank,
  });
  if (!checked.success) {
    const fields = checked.error.issues.map((issue) => ({ pointer: pointerOf(issue.path), detail: issue.message }));
    throw new AppError("invalid", fields[0]?.detail ?? "The test does not fit.", { fields });
  }
  const id = newId("tst", ctx.now.getTime());
  await tx.insert(testOutcomes).values({
    shopId: ctx.shopId,
    id,
    caseId,
    testId: input.testId,
    outcome: input.outcome,
    phase: input.phase,
    cylinder: input.cylinder ?? null,
    bank: input.bank ?? null,
    note: input.note ?? null,
    byId: ctx.actor.id,
    byName: ctx.actor.name,
    at: ctx.now,
  });
  return id;
}
