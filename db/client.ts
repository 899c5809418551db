import { sql } from "drizzle-orm";
import { drizzle, type NodePgDatabase } from "drizzle-orm/node-postgres";
import pg from "pg";
import type { Ctx } from "@/lib/auth/context";
import * as schema from "./schema";
import { databaseUrls } from "./urls";

type Database = NodePgDatabase<typeof schema>;
/** An open transaction inside one shop. Queries take this first, so none can run outside a shop. */
export type Tx = Parameters<Parameters<Database["transaction"]>[0]>[0];

// the development server reloads modules; the pools must not multiply with them
const kept = globalThis as unknown as { firedeckPools?: Map<string, pg.Pool> };

function pool(url: string): pg.Pool {
  kept.firedeckPools ??= new Map();
  let found = kept.firedeckPools.get(url);
  if (!found) {
    found = new pg.Pool({ connectionString: url, max: 10, idleTimeoutMillis: 30_000 });
    // a broken idle connection is replaced on the next use; unhandled, it would end the process
    found.on("error", () => undefined);
    kept.firedeckPools.set(url, found);
  }
  return found;
}

export const authPool = () => pool(databaseUrls().auth);
export const authDb = () => drizzle(authPool(), { schema });
export const appPool = () => pool(databaseUrls().app);

export async function closePools(): Promise<void> {
  const pools = [...(kept.firedeckPools?.values() ?? [])];
  kept.firedeckPools = undefined;
  await Promise.all(pools.map((each) => each.end()));
}

export interface ScopeOptions {
  verb?: string;
  reason?: string;
  readOnly?: boolean;
}

/**
 * Runs `work` in one transaction that sees one shop's rows only: the row policies compare every row with the setting
 * made here, and the audit triggers take the actor from it. Nothing else opens a transaction on business tables.
 */
export async function inShop<T>(ctx: Ctx, work: (tx: Tx) => Promise<T>, options: ScopeOptions = {}): Promise<T> {
  const db = drizzle(appPool(), { schema });
  return db.transaction(
    async (tx) => {
      await tx.execute(sql`select set_config('app.shop_id', ${ctx.shopId}, true), set_config('app.actor_id', ${ctx.actor.id}, true),
        set_config('app.actor_name', ${ctx.actor.name}, true), set_config('app.role', ${ctx.actor.role}, true),
        set_config('app.request_id', ${ctx.requestId}, true), set_config('app.verb', ${options.verb ?? ""}, true),
        set_config('app.reason', ${options.reason ?? ""}, true)`);
      return work(tx);
    },
    options.readOnly ? { accessMode: "read only" } : undefined,
  );
}

/** Puts a job in the queue, in the transaction that needs it done: a rollback takes it away again. */
export async function enqueue(
  tx: Tx,
  task: string,
  payload: Record<string, unknown>,
  options: { key?: string; due?: Date } = {},
): Promise<void> {
  await tx.execute(
    sql`select enqueue(${task}, ${JSON.stringify(payload)}::json, ${options.key ?? null}, ${options.due?.toISOString() ?? null}::timestamptz)`,
  );
}
