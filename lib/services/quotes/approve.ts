import "server-only";
import { and, eq } from "drizzle-orm";
import type { Tx } from "@/db/client";
import type { CaseParts, RevisionRow } from "@/db/queries/cases";
import { approvals, questions, quoteRevisions, workJobs } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import {
  type answersFields,
  askInput,
  giveApprovalInput,
  type QuoteLineDraft,
  type RevisionSnapshot,
  recordApprovalInput,
  replyInput,
} from "@/lib/cases/quote-schema";
import { AppError, invalidField, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { answerMail, approvalReceiptMail, questionMail } from "@/lib/mail/templates";
import { settingsOf } from "../cases/facts";
import { moveTo, openForWrite, refreshCase } from "../cases/refresh";
import { queueMail } from "../mail/queue";
import { defineVerb } from "../verb";
import { answeredTotal } from "./price";

interface Given {
  how: "link" | "phone" | "in-person";
  givenBy: string;
  contact: string | null;
  words: string | null;
  keepParts: boolean;
  answers: (typeof answersFields)["_output"]["answers"];
}

/** Each job answered once, none unknown, and a yes only where the job it needs has one too. */
export function checkAnswers(snapshot: RevisionSnapshot, answers: Given["answers"]): void {
  const byJob = new Map(answers.map((answer) => [answer.jobId, answer.answer]));
  if (byJob.size !== answers.length) throw invalidField("/answers", "A job is answered twice.");
  for (const answer of answers) {
    if (!snapshot.jobs.some((job) => job.id === answer.jobId))
      throw invalidField("/answers", "That job is not in this quote.");
  }
  for (const [index, job] of snapshot.jobs.entries()) {
    const answer = byJob.get(job.id);
    if (!answer)
      throw new AppError("invalid", `Say yes or not now to “${job.customerTitle}”.`, {
        fields: [{ pointer: `/answers/${index}`, detail: "Say yes or not now." }],
      });
    if (
      answer === "yes" &&
      job.dependsOnId &&
      snapshot.jobs.some((each) => each.id === job.dependsOnId) &&
      byJob.get(job.dependsOnId) !== "yes"
    ) {
      const needs = snapshot.jobs.find((each) => each.id === job.dependsOnId)!;
      throw new AppError("invalid", `“${job.customerTitle}” needs “${needs.customerTitle}” as well.`, {
        fields: [{ pointer: `/answers/${index}`, detail: `It needs “${needs.customerTitle}” as well.` }],
      });
    }
  }
}

/** Records the one answer to a revision. A second one, by whatever way, gets the first one's answer and changes nothing. */
async function applyAnswers(tx: Tx, ctx: Ctx, parts: CaseParts, revision: RevisionRow, given: Given) {
  const already = parts.approvals.find((approval) => approval.revisionId === revision.id);
  if (already)
    return { approvalId: already.id, totalMinor: already.totalMinor, currency: already.currency, repeated: true };
  if (revision.withdrawnAt) throw new AppError("precondition", "The shop has withdrawn this quote. Please call us.");
  if (revision.supersededAt)
    throw new AppError("precondition", "There is a newer version of this quote. Please look at that one.");
  if (revision.expiresAt < ctx.now)
    throw new AppError("precondition", "This quote has run out. Please call us for a new one.");
  const { snapshot } = revision;
  checkAnswers(snapshot, given.answers);
  const yes = new Set(given.answers.filter((answer) => answer.answer === "yes").map((answer) => answer.jobId));
  const totalMinor = answeredTotal(snapshot, yes);
  const id = newId("apr", ctx.now.getTime());
  await tx.insert(approvals).values({
    shopId: ctx.shopId,
    id,
    caseId: parts.row.id,
    revisionId: revision.id,
    revisionSha256: revision.sha256,
    how: given.how,
    givenBy: given.givenBy,
    contact: given.contact,
    words: given.words,
    answers: given.answers,
    keepParts: given.keepParts,
    totalMinor,
    currency: revision.currency,
    address: ctx.address ?? null,
    userAgent: ctx.userAgent ?? null,
    takenById: ctx.actor.id,
    takenByName: ctx.actor.role === "customer" ? "link" : ctx.actor.name,
    at: ctx.now,
  });
  const position = parts.workJobs.length;
  for (const [index, job] of snapshot.jobs.filter((each) => yes.has(each.id)).entries()) {
    const lines: QuoteLineDraft[] = job.lines.map((line) => ({
      id: line.id,
      kind: line.kind,
      description: line.description,
      quantityMilli: line.quantityMilli,
      unitPriceMinor: line.unitPriceMinor,
      partNumber: line.partNumber,
      condition: line.condition as QuoteLineDraft["condition"],
    }));
    const soldMilli = job.lines
      .filter((line) => line.kind === "labour")
      .reduce((sum, line) => sum + line.quantityMilli, 0);
    await tx.insert(workJobs).values({
      shopId: ctx.shopId,
      id: newId("wrk", ctx.now.getTime() + index),
      caseId: parts.row.id,
      revisionId: revision.id,
      quoteJobId: job.id,
      position: position + index + 1,
      causeId: job.causeId,
      title: job.title,
      approvedMinor: job.totalMinor,
      soldMinutes: Math.round((soldMilli * 60) / 1000),
      lines,
      state: "approved",
    });
  }
  if (parts.row.stage === "waiting" && (yes.size > 0 || parts.workJobs.some((job) => job.state === "approved")))
    await moveTo(tx, ctx, parts.row, "repair");
  const mailTo = parts.customer.email;
  if (mailTo)
    await queueMail(tx, ctx, {
      caseId: parts.row.id,
      kind: "receipt",
      ...approvalReceiptMail({ to: mailTo, snapshot, yesJobIds: [...yes], totalMinor, givenBy: given.givenBy }),
    });
  await refreshCase(tx, ctx, parts.row.id);
  return { approvalId: id, totalMinor, currency: revision.currency, repeated: false };
}

export const giveApproval = defineVerb({
  name: "approval.give",
  summary: "Answer a quote by its link, job by job",
  action: "approval.give",
  input: giveApprovalInput,
  async run(tx, ctx, input) {
    if (ctx.link?.kind !== "quote") throw notFound("The quote");
    const parts = await openForWrite(tx, ctx, ctx.link.caseId, { evenIfOver: true });
    const revision = parts.revisions.find((each) => each.id === ctx.link?.targetId);
    if (!revision) throw notFound("The quote");
    return applyAnswers(tx, ctx, parts, revision, {
      ...input,
      how: "link",
      contact: parts.customer.email,
      words: null,
    });
  },
});

export const recordApproval = defineVerb({
  name: "approval.record",
  summary: "Record an answer given by phone or in person",
  action: "approval.record",
  input: recordApprovalInput,
  async run(tx, ctx, { caseId, revisionId, ...input }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const revision = parts.revisions.find((each) => each.id === revisionId);
    if (!revision) throw notFound("The revision");
    if (input.how === "phone" && !input.contact) throw invalidField("/contact", "Write the number that was called.");
    return applyAnswers(tx, ctx, parts, revision, { ...input, contact: input.contact ?? null });
  },
});

export const askQuestion = defineVerb({
  name: "quote.ask",
  summary: "Ask the shop about a quote",
  action: "quote.ask",
  input: askInput,
  async run(tx, ctx, { text }) {
    if (ctx.link?.kind !== "quote") throw notFound("The quote");
    const parts = await openForWrite(tx, ctx, ctx.link.caseId);
    const id = newId("ask", ctx.now.getTime());
    await tx.insert(questions).values({
      shopId: ctx.shopId,
      id,
      caseId: parts.row.id,
      revisionId: ctx.link.targetId,
      fromCustomer: true,
      text,
      byName: parts.customer.name,
      at: ctx.now,
    });
    const shopMail = settingsOf(parts).email;
    if (shopMail)
      await queueMail(tx, ctx, {
        caseId: parts.row.id,
        kind: "question",
        ...questionMail({ to: shopMail, caseNumber: parts.row.number, customerName: parts.customer.name, text }),
      });
    return { id };
  },
});

export const answerQuestion = defineVerb({
  name: "quote.reply",
  summary: "Answer a customer's question",
  action: "quote.answerQuestion",
  input: replyInput,
  async run(tx, ctx, { caseId, revisionId, text }) {
    const parts = await openForWrite(tx, ctx, caseId);
    if (!parts.revisions.some((each) => each.id === revisionId)) throw notFound("The revision");
    const id = newId("ask", ctx.now.getTime());
    await tx.insert(questions).values({
      shopId: ctx.shopId,
      id,
      caseId,
      revisionId,
      fromCustomer: false,
      text,
      byName: ctx.actor.name,
      at: ctx.now,
    });
    if (parts.customer.email) {
      await queueMail(tx, ctx, {
        caseId,
        kind: "answer",
        ...answerMail({
          to: parts.customer.email,
          shopName: parts.shop.name,
          customerName: parts.customer.name,
          answeredBy: ctx.actor.name,
          text,
        }),
      });
    }
    return { id };
  },
});

/** Notes the first time a customer looks at a revision: the counter sees that the link was opened. */
export async function noteOpened(tx: Tx, ctx: Ctx, revision: Pick<RevisionRow, "id" | "firstOpenedAt">): Promise<void> {
  if (revision.firstOpenedAt) return;
  await tx
    .update(quoteRevisions)
    .set({ firstOpenedAt: ctx.now })
    .where(and(eq(quoteRevisions.shopId, ctx.shopId), eq(quoteRevisions.id, revision.id)));
}
