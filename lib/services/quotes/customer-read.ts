import "server-only";
import { and, asc, eq } from "drizzle-orm";
import { inShop } from "@/db/client";
import { caseById, loadCaseParts } from "@/db/queries/cases";
import { papers, payments } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import type { InvoiceSnapshot } from "@/lib/cases/paper-schema";
import type { RevisionSnapshot } from "@/lib/cases/quote-schema";
import { notFound } from "@/lib/errors";
import { noteOpened } from "./approve";

export interface CustomerQuote {
  snapshot: RevisionSnapshot;
  revisionId: string;
  standing: "open" | "withdrawn" | "superseded" | "expired";
  answer: { yesJobIds: string[]; totalMinor: number; givenBy: string; at: string; how: string } | null;
  questions: { id: string; fromCustomer: boolean; name: string; text: string; at: string }[];
  photos: { id: string; caption: string | null }[];
  progress: {
    stage: string;
    technician: string | null;
    jobs: { state: string; soldMinutes: number }[];
    partsOpen: { description: string; arrivesOn: string | null }[];
    hasAfterReadings: boolean;
    readyAt: string | null;
    closedAt: string | null;
  };
}

/** What a customer sees of a sent revision: the snapshot and what happened since, nothing of the shop's own working. */
export async function readCustomerQuote(ctx: Ctx): Promise<CustomerQuote> {
  const link = ctx.link;
  if (link?.kind !== "quote") throw notFound("The quote");
  return inShop(
    ctx,
    async (tx) => {
      const row = await caseById(tx, ctx.shopId, link.caseId);
      if (!row) throw notFound("The quote");
      const parts = await loadCaseParts(tx, row);
      const revision = parts.revisions.find((each) => each.id === link.targetId);
      if (!revision) throw notFound("The quote");
      await noteOpened(tx, ctx, revision);
      const approval = parts.approvals.find((each) => each.revisionId === revision.id);
      const standing = revision.withdrawnAt
        ? "withdrawn"
        : revision.supersededAt
          ? "superseded"
          : revision.expiresAt < ctx.now
            ? "expired"
            : "open";
      return {
        snapshot: revision.snapshot,
        revisionId: revision.id,
        standing,
        answer: approval
          ? {
              yesJobIds: approval.answers.filter((each) => each.answer === "yes").map((each) => each.jobId),
              totalMinor: approval.totalMinor,
              givenBy: approval.givenBy,
              at: approval.at.toISOString(),
              how: approval.how,
            }
          : null,
        questions: parts.questions
          .filter((each) => each.revisionId === revision.id)
          .map(({ id, fromCustomer, byName, text, at }) => ({
            id,
            fromCustomer,
            name: byName,
            text,
            at: at.toISOString(),
          })),
        photos: parts.files
          .filter((file) => revision.snapshot.photoIds.includes(file.id))
          .map(({ id, caption }) => ({ id, caption })),
        progress: {
          stage: row.stage === "parked" ? (row.parkedFrom ?? "repair") : row.stage,
          technician: parts.people.find((person) => person.id === row.technicianId)?.name ?? null,
          jobs: parts.workJobs.map(({ state, soldMinutes }) => ({ state, soldMinutes })),
          partsOpen: parts.partsUsed
            .filter((part) => part.status === "ordered")
            .map(({ description, arrivesOn }) => ({ description, arrivesOn })),
          hasAfterReadings: parts.samples.some((sample) => sample.phase === "after"),
          readyAt: row.promisedAt?.toISOString() ?? revision.snapshot.readyAt,
          closedAt: row.closedAt?.toISOString() ?? null,
        },
      };
    },
    { verb: "quote.opened" },
  );
}

/** The bytes of the paper a link opens: the quote's, or the invoice's. */
export async function readLinkPaper(ctx: Ctx): Promise<{ name: string; bytes: Buffer; sha256: string }> {
  const link = ctx.link;
  if (!link) throw notFound("The paper");
  return inShop(
    ctx,
    async (tx) => {
      const ofCase = and(eq(papers.shopId, ctx.shopId), eq(papers.caseId, link.caseId));
      const rows = await tx
        .select()
        .from(papers)
        .where(
          link.kind === "invoice" ? and(ofCase, eq(papers.id, link.targetId)) : and(ofCase, eq(papers.kind, "quote")),
        );
      const quote = link.kind === "quote" ? await quoteNumber(tx, ctx, link) : null;
      const paper = link.kind === "invoice" ? rows[0] : rows.find((each) => each.number === quote);
      if (!paper) throw notFound("The paper");
      return { name: `${paper.kind}-${paper.number}.pdf`, bytes: paper.bytes, sha256: paper.sha256 };
    },
    { readOnly: true },
  );
}

async function quoteNumber(
  tx: Parameters<Parameters<typeof inShop>[1]>[0],
  ctx: Ctx,
  link: NonNullable<Ctx["link"]>,
): Promise<string | null> {
  const row = await caseById(tx, ctx.shopId, link.caseId);
  if (!row) return null;
  const parts = await loadCaseParts(tx, row);
  const revision = parts.revisions.find((each) => each.id === link.targetId);
  return revision ? `${row.number}-${revision.number}` : null;
}

export interface CustomerInvoice {
  snapshot: InvoiceSnapshot;
  paidMinor: number;
  payments: { how: string; at: string; amountMinor: number }[];
}

export async function readCustomerInvoice(ctx: Ctx): Promise<CustomerInvoice> {
  const link = ctx.link;
  if (link?.kind !== "invoice") throw notFound("The invoice");
  return inShop(
    ctx,
    async (tx) => {
      const ofPaper = and(eq(payments.shopId, ctx.shopId), eq(payments.paperId, link.targetId));
      const [paper] = await tx
        .select({ snapshot: papers.snapshot })
        .from(papers)
        .where(and(eq(papers.shopId, ctx.shopId), eq(papers.id, link.targetId)));
      if (!paper) throw notFound("The invoice");
      const paid = await tx.select().from(payments).where(ofPaper).orderBy(asc(payments.at));
      return {
        snapshot: paper.snapshot as InvoiceSnapshot,
        paidMinor: paid.reduce((sum, each) => sum + each.amountMinor, 0),
        payments: paid.map(({ how, at, amountMinor }) => ({ how, at: at.toISOString(), amountMinor })),
      };
    },
    { readOnly: true },
  );
}
