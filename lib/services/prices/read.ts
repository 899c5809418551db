import "server-only";
import { and, asc, eq, gt, or, type SQL, sql } from "drizzle-orm";
import { labourRates, operations, parts, setJobs } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { mayDo } from "@/lib/auth/permissions";
import { readIn } from "../verb";

const PAGE = 50;
const literal = (text: string) => text.replaceAll(/[\\%_]/g, (sign) => `\\${sign}`);

export interface ListPlace {
  name: string;
  id: string;
}

export interface PriceQuery {
  query: string;
  after: ListPlace | null;
}

/** How many rows of each list are in use, and the labour rates, which every list needs. */
export async function readPriceHead(ctx: Ctx) {
  return readIn(ctx, "case.read", async (tx) => {
    const rates = await tx
      .select()
      .from(labourRates)
      .where(eq(labourRates.shopId, ctx.shopId))
      .orderBy(asc(labourRates.name));
    const counted = async (table: typeof operations | typeof parts | typeof setJobs) => {
      const [row] = await tx
        .select({ n: sql<number>`count(*)::int` })
        .from(table)
        .where(and(eq(table.shopId, ctx.shopId), eq(table.isActive, true)));
      return row?.n ?? 0;
    };
    return {
      rates,
      counts: { operations: await counted(operations), parts: await counted(parts), setJobs: await counted(setJobs) },
    };
  });
}

/** Rows by name whose name or other text holds the query, from a place on. */
function conditionsOf(
  ctx: Ctx,
  table: typeof operations | typeof parts | typeof setJobs,
  texts: readonly SQL[],
  { query, after }: PriceQuery,
): SQL | undefined {
  const like = `%${literal(query.toLowerCase())}%`;
  return and(
    eq(table.shopId, ctx.shopId),
    query ? or(...texts.map((text) => sql`lower(${text}) like ${like}`)) : undefined,
    after ? or(gt(table.name, after.name), and(eq(table.name, after.name), gt(table.id, after.id))) : undefined,
  );
}

const paged = <T>(rows: T[]) => ({ rows: rows.slice(0, PAGE), isMore: rows.length > PAGE });

export async function listOperations(ctx: Ctx, query: PriceQuery) {
  return readIn(ctx, "case.read", async (tx) => {
    const rows = await tx
      .select()
      .from(operations)
      .where(conditionsOf(ctx, operations, [sql`${operations.name}`], query))
      .orderBy(asc(operations.name), asc(operations.id))
      .limit(PAGE + 1);
    return paged(rows);
  });
}

/** Parts with their cost, which only those get who may see it. */
export async function listParts(ctx: Ctx, query: PriceQuery) {
  return readIn(ctx, "case.read", async (tx) => {
    const rows = await tx
      .select()
      .from(parts)
      .where(conditionsOf(ctx, parts, [sql`${parts.name}`, sql`${parts.number}`], query))
      .orderBy(asc(parts.name), asc(parts.id))
      .limit(PAGE + 1);
    const maySee = mayDo(ctx.actor.role, "cost.see");
    return paged(rows.map((row) => ({ ...row, costMinor: maySee ? row.costMinor : null })));
  });
}

/** Set jobs with their lines; the cost of a line goes only to those who may see it. */
export async function listSetJobs(ctx: Ctx, query: PriceQuery) {
  return readIn(ctx, "case.read", async (tx) => {
    const rows = await tx
      .select()
      .from(setJobs)
      .where(conditionsOf(ctx, setJobs, [sql`${setJobs.name}`, sql`${setJobs.customerTitle}`], query))
      .orderBy(asc(setJobs.name), asc(setJobs.id))
      .limit(PAGE + 1);
    const maySee = mayDo(ctx.actor.role, "cost.see");
    return paged(
      rows.map((row) => ({
        ...row,
        lines: row.lines.map((line) => ({ ...line, costMinor: maySee ? line.costMinor : undefined })),
      })),
    );
  });
}
