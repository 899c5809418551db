import "server-only";
import { createHash } from "node:crypto";
import { and, eq, sql } from "drizzle-orm";
import type { z } from "zod";
import { inShop, type Tx } from "@/db/client";
import { idempotency } from "@/db/schema";
import { authorize, type Ctx } from "@/lib/auth/context";
import type { Action } from "@/lib/auth/permissions";
import { AppError } from "@/lib/errors";

/** One write. Pages, the API, jobs, the seed and the tests all pass through `perform`, so no check can be gone round. */
export interface Verb<I extends z.ZodType = z.ZodType, O = unknown> {
  name: string;
  summary: string;
  action: Action;
  input: I;
  run(tx: Tx, ctx: Ctx, input: z.output<I>): Promise<O>;
}

export function defineVerb<I extends z.ZodType, O>(verb: Verb<I, O>): Verb<I, O> {
  return verb;
}

export interface PerformOptions {
  /** A repeat with the same key answers what the first one answered. */
  idempotencyKey?: string;
}

/** Parse → permission → transaction { first answer of this key, or rule, write, audit, jobs } → reply. */
export async function perform<I extends z.ZodType, O>(
  verb: Verb<I, O>,
  ctx: Ctx,
  raw: z.input<I>,
  options: PerformOptions = {},
): Promise<O> {
  authorize(ctx, verb.action);
  const input = verb.input.parse(raw);
  const reason = typeof input === "object" && input !== null && "reason" in input ? String(input.reason ?? "") : "";
  return inShop(
    ctx,
    async (tx) => {
      const key = options.idempotencyKey;
      if (!key) return verb.run(tx, ctx, input);
      const inputHash = createHash("sha256").update(JSON.stringify(input)).digest("hex");
      // a second request with the key waits here until the first has committed or gone
      const claimed = await tx
        .insert(idempotency)
        .values({ shopId: ctx.shopId, key, verb: verb.name, actorId: ctx.actor.id, inputHash, at: ctx.now })
        .onConflictDoNothing()
        .returning({ key: idempotency.key });
      const mine = and(
        eq(idempotency.shopId, ctx.shopId),
        eq(idempotency.actorId, ctx.actor.id),
        eq(idempotency.key, key),
      );
      if (claimed.length === 0) {
        const [first] = await tx
          .select({ verb: idempotency.verb, inputHash: idempotency.inputHash, answer: idempotency.answer })
          .from(idempotency)
          .where(mine);
        if (first?.verb !== verb.name || first.inputHash !== inputHash) {
          throw new AppError("conflict", "This request's key was used before for something else. Load the page again.");
        }
        return (first.answer as { value: O }).value;
      }
      const value = await verb.run(tx, ctx, input);
      await tx
        .update(idempotency)
        .set({ answer: sql`${JSON.stringify({ value: value ?? null })}::jsonb` })
        .where(mine);
      return value;
    },
    { verb: verb.name, reason },
  );
}

/** A read in one shop. */
export async function readIn<T>(ctx: Ctx, action: Action, read: (tx: Tx) => Promise<T>): Promise<T> {
  authorize(ctx, action);
  return inShop(ctx, read, { readOnly: true });
}
