import "server-only";
import { and, asc, desc, eq, lt } from "drizzle-orm";
import { type CaseParts, caseByNumber, loadCaseParts } from "@/db/queries/cases";
import { audit, parts as catalogue, labourRates, operations, papers, setJobs } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { mayDo } from "@/lib/auth/permissions";
import { notFound } from "@/lib/errors";
import { shopMemory } from "../causes/memory";
import { readIn } from "../verb";
import { refreshedView } from "./view";

/** A case by the number people say aloud, with all that its seven parts show; costs only for those who may see them. */
export async function readCase(ctx: Ctx, number: number) {
  return readIn(ctx, "case.read", async (tx) => {
    const row =
      Number.isSafeInteger(number) && number > 0 && number < 2_000_000_000
        ? await caseByNumber(tx, ctx.shopId, number)
        : undefined;
    if (!row) throw notFound("The case");
    const memory = await shopMemory(tx, ctx.shopId, row.id);
    return refreshedView(ctx, withoutCosts(ctx, await loadCaseParts(tx, row)), memory);
  });
}

function withoutCosts(ctx: Ctx, parts: CaseParts): CaseParts {
  if (mayDo(ctx.actor.role, "cost.see")) return parts;
  return {
    ...parts,
    quoteJobs: parts.quoteJobs.map((job) => ({ ...job, lines: job.lines.map(({ costMinor: _, ...line }) => line) })),
  };
}

/** What a quote can be made of. */
export async function readPriceList(ctx: Ctx) {
  return readIn(ctx, "case.read", async (tx) => {
    const rates = await tx
      .select()
      .from(labourRates)
      .where(eq(labourRates.shopId, ctx.shopId))
      .orderBy(asc(labourRates.name));
    const ops = await tx
      .select()
      .from(operations)
      .where(eq(operations.shopId, ctx.shopId))
      .orderBy(asc(operations.name))
      .limit(500);
    const listed = await tx
      .select()
      .from(catalogue)
      .where(eq(catalogue.shopId, ctx.shopId))
      .orderBy(asc(catalogue.name))
      .limit(1000);
    const jobs = await tx
      .select()
      .from(setJobs)
      .where(eq(setJobs.shopId, ctx.shopId))
      .orderBy(asc(setJobs.name))
      .limit(500);
    const seesCost = mayDo(ctx.actor.role, "cost.see");
    return {
      rates,
      operations: ops,
      parts: seesCost ? listed : listed.map((part) => ({ ...part, costMinor: null })),
      setJobs: seesCost
        ? jobs
        : jobs.map((job) => ({ ...job, lines: job.lines.map(({ costMinor: _, ...line }) => line) })),
    };
  });
}

export type PriceList = Awaited<ReturnType<typeof readPriceList>>;

const COSTS = new Set(["costMinor", "cost_minor"]);

/** The same value with every cost taken out, at any depth. */
function bare(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(bare);
  if (typeof value !== "object" || value === null) return value;
  return Object.fromEntries(
    Object.entries(value).flatMap(([key, part]) => (COSTS.has(key) ? [] : [[key, bare(part)]])),
  );
}

/** Every event of a case in order, newest first; what a thing cost the shop only for those who may see it. */
export async function readCaseHistory(ctx: Ctx, caseId: string, beforeSeq?: number) {
  return readIn(ctx, "case.read", async (tx) => {
    const rows = await tx
      .select()
      .from(audit)
      .where(
        and(eq(audit.shopId, ctx.shopId), eq(audit.caseId, caseId), ...(beforeSeq ? [lt(audit.seq, beforeSeq)] : [])),
      )
      .orderBy(desc(audit.seq))
      .limit(101);
    if (mayDo(ctx.actor.role, "cost.see")) return rows;
    type Stored = (typeof rows)[number]["before"];
    return rows.map((row) => ({ ...row, before: bare(row.before) as Stored, after: bare(row.after) as Stored }));
  });
}

export async function readPaper(ctx: Ctx, paperId: string) {
  return readIn(ctx, "case.read", async (tx) => {
    const [paper] = await tx
      .select()
      .from(papers)
      .where(and(eq(papers.shopId, ctx.shopId), eq(papers.id, paperId)));
    if (!paper) throw notFound("The paper");
    return paper;
  });
}
