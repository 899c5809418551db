import "server-only";
import { and, asc, desc, eq, gte, inArray, lt, type SQL, sql } from "drizzle-orm";
import { audit, cases, people } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { readIn } from "../verb";

export interface AuditQuery {
  entity?: string;
  actorId?: string;
  /** "customer" or "system": entries that no one of the staff made. */
  role?: string;
  from?: Date;
  to?: Date;
  beforeSeq?: number;
}

const PAGE = 60;

function conditionsOf(ctx: Ctx, query: AuditQuery): SQL[] {
  return [
    eq(audit.shopId, ctx.shopId),
    ...(query.entity ? [eq(audit.entity, query.entity)] : []),
    ...(query.actorId ? [eq(audit.actorId, query.actorId)] : []),
    ...(query.role ? [eq(audit.role, query.role)] : []),
    ...(query.from ? [gte(audit.at, query.from)] : []),
    ...(query.to ? [lt(audit.at, query.to)] : []),
    ...(query.beforeSeq ? [lt(audit.seq, query.beforeSeq)] : []),
  ];
}

/** Entries newest first, with whether the whole chain holds and how many entries each day has. */
export async function readAudit(ctx: Ctx, query: AuditQuery, timeZone: string) {
  return readIn(ctx, "audit.read", async (tx) => {
    const rows = await tx
      .select()
      .from(audit)
      .where(and(...conditionsOf(ctx, query)))
      .orderBy(desc(audit.seq))
      .limit(PAGE + 1);
    const days = await tx
      .select({
        day: sql<string>`to_char(${audit.at} at time zone ${timeZone}, 'YYYY-MM-DD')`,
        entries: sql<number>`count(*)::int`,
        first: sql<number>`min(${audit.seq})::int`,
        last: sql<number>`max(${audit.seq})::int`,
      })
      .from(audit)
      .where(and(eq(audit.shopId, ctx.shopId), gte(audit.at, new Date(ctx.now.getTime() - 30 * 86_400_000))))
      .groupBy(sql`1`)
      .orderBy(sql`1`);
    const faults = (await tx.execute<{ seq: string; fault: string }>(sql`select * from verify_audit()`)).rows;
    const [count] = await tx.select({ n: sql<number>`count(*)::int` }).from(audit).where(eq(audit.shopId, ctx.shopId));
    const fault = faults[0];
    return {
      rows: rows.slice(0, PAGE),
      isMore: rows.length > PAGE,
      days,
      total: count?.n ?? 0,
      fault: fault ? { seq: Number(fault.seq), fault: fault.fault } : null,
    };
  });
}

export type AuditRow = typeof audit.$inferSelect;

/** What entries need to be read: the numbers of their cases, the names of people, and the entries on both sides of each. */
export async function readAuditContext(ctx: Ctx, rows: readonly AuditRow[]) {
  return readIn(ctx, "case.read", async (tx) => {
    const staff = await tx
      .select({ id: people.id, name: people.name, role: people.role, isActive: people.isActive })
      .from(people)
      .where(eq(people.shopId, ctx.shopId))
      .orderBy(asc(people.name));
    const caseIds = [...new Set(rows.flatMap((row) => (row.caseId ? [row.caseId] : [])))];
    const numbered = caseIds.length
      ? await tx
          .select({ id: cases.id, number: cases.number })
          .from(cases)
          .where(and(eq(cases.shopId, ctx.shopId), inArray(cases.id, caseIds)))
      : [];
    const beside = [...new Set(rows.flatMap((row) => [row.seq - 1, row.seq + 1]))];
    const neighbours = beside.length
      ? await tx
          .select({ seq: audit.seq, hash: audit.hash, previousHash: audit.previousHash })
          .from(audit)
          .where(and(eq(audit.shopId, ctx.shopId), inArray(audit.seq, beside)))
      : [];
    return {
      staff,
      caseNumbers: new Map(numbered.map(({ id, number }) => [id, number])),
      neighbours: new Map(neighbours.map((entry) => [entry.seq, entry])),
    };
  });
}

export type AuditContext = Awaited<ReturnType<typeof readAuditContext>>;

/** The chain as lines of JSON, oldest first: what an outsider needs to check it. */
export async function exportAudit(ctx: Ctx): Promise<string> {
  return readIn(ctx, "audit.read", async (tx) => {
    const rows = await tx.select().from(audit).where(eq(audit.shopId, ctx.shopId)).orderBy(audit.seq);
    return rows.map((row) => JSON.stringify(row)).join("\n");
  });
}
