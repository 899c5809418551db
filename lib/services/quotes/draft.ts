import "server-only";
import { and, eq, sql } from "drizzle-orm";
import type { Tx } from "@/db/client";
import type { CaseParts } from "@/db/queries/cases";
import { parts as catalogue, labourRates, quoteDrafts, quoteJobs, setJobs } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { mayDo } from "@/lib/auth/permissions";
import {
  addQuoteJobInput,
  addSetJobInput,
  type QuoteLineDraft,
  quoteDraftInput,
  removeQuoteJobInput,
  saveQuoteJobInput,
} from "@/lib/cases/quote-schema";
import { CAUSES } from "@/lib/diagnosis/causes";
import { AppError, invalidField, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { settingsOf } from "../cases/facts";
import { openForWrite, refreshCase } from "../cases/refresh";
import { defineVerb } from "../verb";
import { diagnosisCeilingNet } from "./price";

/** The draft of a case, made on first use from its marked cause so that the writer starts from a sentence. */
export async function ensureDraft(tx: Tx, ctx: Ctx, parts: CaseParts) {
  if (parts.draft) return parts.draft;
  const mark = parts.marks.findLast((each) => each.mark === "proven") ?? parts.marks.at(-1);
  const cause = mark ? CAUSES[mark.causeId as keyof typeof CAUSES] : undefined;
  const [draft] = await tx
    .insert(quoteDrafts)
    .values({
      shopId: ctx.shopId,
      caseId: parts.row.id,
      headline: cause ? "What we found" : "",
      finding: cause?.sentence ?? "",
      warranty: settingsOf(parts).warrantyText,
    })
    .onConflictDoNothing()
    .returning();
  return draft!;
}

export const saveDraft = defineVerb({
  name: "quote.saveDraft",
  summary: "Save what the quote says to the customer",
  action: "quote.price",
  input: quoteDraftInput,
  async run(tx, ctx, { caseId, version, headline, finding, warranty, readyAt, diagnosisNetMinor }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const draft = await ensureDraft(tx, ctx, parts);
    if (draft.version !== version)
      throw new AppError("conflict", "Someone else changed this quote while you wrote.", { current: draft });
    const ceiling = diagnosisCeilingNet(parts);
    if (diagnosisNetMinor != null && ceiling !== null && diagnosisNetMinor > ceiling) {
      throw invalidField(
        "/diagnosisNetMinor",
        "The diagnosis would cost more than the ceiling the customer agreed to.",
      );
    }
    await tx
      .update(quoteDrafts)
      .set({
        headline,
        finding,
        warranty,
        readyAt: readyAt ? new Date(readyAt) : null,
        diagnosisNetMinor: diagnosisNetMinor ?? null,
        version: version + 1,
      })
      .where(and(eq(quoteDrafts.shopId, ctx.shopId), eq(quoteDrafts.caseId, caseId)));
    return { version: version + 1 };
  },
});

/** A job the customer has said yes to keeps its price; more work is another job with its own yes. */
function refuseAgreed(parts: CaseParts, jobId: string): void {
  if (parts.workJobs.some((job) => job.quoteJobId === jobId)) {
    throw new AppError(
      "precondition",
      "The customer agreed to this job at its price. It can't be changed; add a job and ask again.",
    );
  }
}

/** What a technician writes has no prices: known lines keep theirs, new ones take the shop's rate or list price. */
async function withoutPrices(
  tx: Tx,
  ctx: Ctx,
  parts: CaseParts,
  lines: QuoteLineDraft[],
  before: QuoteLineDraft[],
): Promise<QuoteLineDraft[]> {
  const rates = await tx
    .select()
    .from(labourRates)
    .where(and(eq(labourRates.shopId, ctx.shopId), eq(labourRates.isActive, true)));
  const general = rates.find((rate) => rate.purpose === "general") ?? rates[0];
  const frozen = parts.row.rates;
  const result: QuoteLineDraft[] = [];
  for (const line of lines) {
    const known = before.find((each) => each.id === line.id);
    if (known && known.kind === line.kind) {
      result.push({ ...line, unitPriceMinor: known.unitPriceMinor, costMinor: known.costMinor, rateId: known.rateId });
      continue;
    }
    if (line.kind === "labour" || line.kind === "diagnosis") {
      result.push({
        ...line,
        unitPriceMinor: (general && frozen?.[general.id]) ?? general?.perHourMinor ?? 0,
        costMinor: null,
        rateId: general?.id ?? null,
      });
      continue;
    }
    const [listed] = line.partNumber
      ? await tx
          .select()
          .from(catalogue)
          .where(and(eq(catalogue.shopId, ctx.shopId), eq(catalogue.number, line.partNumber)))
      : [];
    result.push({ ...line, unitPriceMinor: listed?.priceMinor ?? 0, costMinor: listed?.costMinor ?? null });
  }
  return result;
}

async function insertJob(
  tx: Tx,
  ctx: Ctx,
  parts: CaseParts,
  fields: Omit<typeof quoteJobs.$inferInsert, "shopId" | "id" | "caseId" | "position">,
): Promise<string> {
  await ensureDraft(tx, ctx, parts);
  const id = newId("job", ctx.now.getTime());
  const position = parts.quoteJobs.reduce((max, job) => Math.max(max, job.position), 0) + 1;
  await tx.insert(quoteJobs).values({ shopId: ctx.shopId, id, caseId: parts.row.id, position, ...fields });
  return id;
}

export const addQuoteJob = defineVerb({
  name: "quote.addJob",
  summary: "Add a job to the quote",
  action: "quote.draft",
  input: addQuoteJobInput,
  async run(tx, ctx, { caseId, ...job }) {
    const parts = await openForWrite(tx, ctx, caseId);
    requireDependency(parts, job.dependsOnId, null);
    const lines = mayDo(ctx.actor.role, "quote.price") ? job.lines : await withoutPrices(tx, ctx, parts, job.lines, []);
    const id = await insertJob(tx, ctx, parts, {
      title: job.title,
      customerTitle: job.customerTitle || job.title,
      urgency: job.urgency,
      ifWaits: job.ifWaits,
      causeId: job.causeId ?? null,
      dependsOnId: job.dependsOnId ?? null,
      isSafety: job.isSafety,
      lines,
    });
    await refreshCase(tx, ctx, caseId);
    return { jobId: id };
  },
});

export const addSetJob = defineVerb({
  name: "quote.addSetJob",
  summary: "Add a set job to the quote",
  action: "quote.draft",
  input: addSetJobInput,
  async run(tx, ctx, { caseId, setJobId }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const [job] = await tx
      .select()
      .from(setJobs)
      .where(and(eq(setJobs.shopId, ctx.shopId), eq(setJobs.id, setJobId)));
    if (!job) throw notFound("The set job");
    const marked = parts.marks.find((mark) => mark.causeId === job.causeId);
    const lines = job.lines.map((line) => ({
      ...line,
      id: newId("ln"),
      unitPriceMinor: frozenRate(parts, line) ?? line.unitPriceMinor,
    }));
    const id = await insertJob(tx, ctx, parts, {
      title: job.name,
      customerTitle: job.customerTitle,
      urgency: job.urgency,
      ifWaits: job.ifWaits,
      causeId: marked?.causeId ?? job.causeId,
      dependsOnId: null,
      isSafety: false,
      lines,
    });
    await refreshCase(tx, ctx, caseId);
    return { jobId: id };
  },
});

const frozenRate = (parts: CaseParts, line: QuoteLineDraft) =>
  line.kind === "labour" && line.rateId ? parts.row.rates?.[line.rateId] : undefined;

function requireDependency(parts: CaseParts, dependsOnId: string | null | undefined, jobId: string | null): void {
  if (!dependsOnId) return;
  if (dependsOnId === jobId) throw invalidField("/dependsOnId", "A job can't need itself.");
  let at = parts.quoteJobs.find((job) => job.id === dependsOnId);
  if (!at) throw invalidField("/dependsOnId", "The job it needs is not in this quote.");
  for (let steps = 0; at && steps < 200; steps++) {
    if (at.id === jobId) throw invalidField("/dependsOnId", "These jobs would need each other.");
    const next: string | null = at.dependsOnId;
    at = next ? parts.quoteJobs.find((job) => job.id === next) : undefined;
  }
}

export const saveQuoteJob = defineVerb({
  name: "quote.saveJob",
  summary: "Save a job of the quote",
  action: "quote.draft",
  input: saveQuoteJobInput,
  async run(tx, ctx, { caseId, jobId, version, ...job }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const before = parts.quoteJobs.find((each) => each.id === jobId);
    if (!before) throw notFound("The job");
    refuseAgreed(parts, jobId);
    if (before.version !== version) {
      const seen = mayDo(ctx.actor.role, "cost.see")
        ? before
        : { ...before, lines: before.lines.map(({ costMinor: _, ...line }) => line) };
      throw new AppError("conflict", "Someone else changed this job while you wrote.", { current: seen });
    }
    requireDependency(parts, job.dependsOnId, jobId);
    const lines = mayDo(ctx.actor.role, "quote.price")
      ? job.lines
      : await withoutPrices(tx, ctx, parts, job.lines, before.lines);
    await tx
      .update(quoteJobs)
      .set({
        title: job.title,
        customerTitle: job.customerTitle || job.title,
        urgency: job.urgency,
        ifWaits: job.ifWaits,
        causeId: job.causeId ?? null,
        dependsOnId: job.dependsOnId ?? null,
        isSafety: job.isSafety,
        lines,
        version: version + 1,
      })
      .where(and(eq(quoteJobs.shopId, ctx.shopId), eq(quoteJobs.id, jobId)));
    return { version: version + 1 };
  },
});

export const removeQuoteJob = defineVerb({
  name: "quote.removeJob",
  summary: "Take a job out of the quote",
  action: "quote.price",
  input: removeQuoteJobInput,
  async run(tx, ctx, { caseId, jobId, version }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const before = parts.quoteJobs.find((each) => each.id === jobId);
    if (!before) throw notFound("The job");
    refuseAgreed(parts, jobId);
    if (before.version !== version)
      throw new AppError("conflict", "Someone else changed this job meanwhile.", { current: before });
    await tx
      .update(quoteJobs)
      .set({ dependsOnId: null, version: sql`${quoteJobs.version} + 1` })
      .where(and(eq(quoteJobs.shopId, ctx.shopId), eq(quoteJobs.caseId, caseId), eq(quoteJobs.dependsOnId, jobId)));
    await tx.delete(quoteJobs).where(and(eq(quoteJobs.shopId, ctx.shopId), eq(quoteJobs.id, jobId)));
    await refreshCase(tx, ctx, caseId);
    return { removed: true };
  },
});
