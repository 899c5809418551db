import "server-only";
import type { Tx } from "@/db/client";
import type { CaseParts } from "@/db/queries/cases";
import { papers, payments } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { closeInput, releaseInput } from "@/lib/cases/schema";
import { paymentInput } from "@/lib/cases/work-schema";
import { env } from "@/lib/env";
import { AppError, invalidField, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { invoiceMail, releaseMail } from "@/lib/mail/templates";
import { renderInvoice, renderRelease } from "@/lib/pdf/render";
import { takeNumber } from "../cases/open";
import { moveTo, openForWrite, refreshCase, setCase } from "../cases/refresh";
import { requireGate } from "../cases/stage";
import { queueMail } from "../mail/queue";
import { makeLink } from "../quotes/links";
import { digestOf } from "../quotes/send";
import { defineVerb } from "../verb";
import { invoicePaperModel, releasePaperModel } from "./models";
import { invoiceSnapshot, releaseSnapshot } from "./snapshot";

const YEAR_MS = 365 * 86_400_000;

function checkOdometer(parts: CaseParts, outKm: number | undefined): void {
  const inKm = parts.row.odometerInKm;
  if (outKm === undefined || inKm === null) return;
  if (outKm < inKm) throw invalidField("/odometerOutKm", `The odometer went in at ${inKm} km; it can't leave at less.`);
}

async function issuePaper(
  tx: Tx,
  ctx: Ctx,
  parts: CaseParts,
  paper: {
    kind: "invoice" | "release";
    number: string;
    title: string;
    snapshot: unknown;
    bytes: Uint8Array;
    sha256: string;
    currency: string;
    totalMinor: number;
  },
) {
  const id = newId("pap", ctx.now.getTime());
  await tx.insert(papers).values({
    shopId: ctx.shopId,
    id,
    caseId: parts.row.id,
    ...paper,
    snapshot: paper.snapshot,
    bytes: Buffer.from(paper.bytes),
    issuedAt: ctx.now,
    issuedByName: ctx.actor.name,
  });
  const link = await makeLink(tx, ctx, {
    caseId: parts.row.id,
    kind: "invoice",
    targetId: id,
    sentTo: parts.customer.email,
    expiresAt: new Date(ctx.now.getTime() + YEAR_MS),
  });
  return { id, url: `${env().APP_URL}/i/${link.secret}` };
}

/** Proof passed or waived → numbered invoice, mailed → the case is frozen. One transaction, so a number is never lost. */
export const closeCase = defineVerb({
  name: "case.close",
  summary: "Close a case: issue its invoice and mail it",
  action: "invoice.issue",
  input: closeInput,
  async run(tx, ctx, { caseId, correction, odometerOutKm }) {
    const parts = await openForWrite(tx, ctx, caseId);
    if (parts.row.stage !== "proof") throw new AppError("precondition", "A case closes from proof.");
    requireGate(ctx, parts, "closed");
    checkOdometer(parts, odometerOutKm);
    const number = String(await takeNumber(tx, ctx, "invoice", 1001));
    const snapshot = invoiceSnapshot(parts, { number, correction, odometerOutKm: odometerOutKm ?? null, now: ctx.now });
    const sha256 = digestOf(snapshot);
    const bytes = await renderInvoice(invoicePaperModel(snapshot, sha256, ctx.now));
    const { id, url } = await issuePaper(tx, ctx, parts, {
      kind: "invoice",
      number,
      title: `Invoice ${number}`,
      snapshot,
      bytes,
      sha256,
      currency: snapshot.currency,
      totalMinor: snapshot.totals.totalMinor,
    });
    if (parts.customer.email)
      await queueMail(tx, ctx, {
        caseId,
        kind: "invoice",
        paperId: id,
        ...invoiceMail({ to: parts.customer.email, snapshot, url }),
      });
    await moveTo(tx, ctx, parts.row, "closed");
    await setCase(tx, ctx, caseId, {
      closedAt: ctx.now,
      odometerOutKm: odometerOutKm ?? null,
      outcome: parts.row.waiver ? "waived" : "proven",
    });
    await refreshCase(tx, ctx, caseId);
    return { paperId: id, number, totalMinor: snapshot.totals.totalMinor, currency: snapshot.currency };
  },
});

/** The vehicle leaves as it came: the findings and any safety advice on paper, the diagnosis charged or not. */
export const releaseCase = defineVerb({
  name: "case.release",
  summary: "Let a vehicle go without repair",
  action: "case.release",
  input: releaseInput,
  async run(tx, ctx, { caseId, ...input }) {
    const parts = await openForWrite(tx, ctx, caseId);
    if (parts.workJobs.some((job) => job.state === "done"))
      throw new AppError("precondition", "Work has been done on this case; prove it and close it instead.");
    if (parts.workJobs.some((job) => job.state === "approved"))
      throw new AppError("precondition", "There are agreed jobs. Strike them with a reason before the vehicle leaves.");
    if (input.notSafeToDrive && !input.acknowledgedBy)
      throw invalidField("/acknowledgedBy", "Write who was told that the vehicle is not safe to drive.");
    checkOdometer(parts, input.odometerOutKm);
    const draft = releaseSnapshot(parts, { number: "", ...input, now: ctx.now });
    const owes = draft.totals.totalMinor > 0;
    const number = String(await takeNumber(tx, ctx, owes ? "invoice" : "release", owes ? 1001 : 1));
    const snapshot = { ...draft, number };
    const sha256 = digestOf(snapshot);
    const bytes = await renderRelease(releasePaperModel(snapshot, sha256, ctx.now));
    const title = owes ? `Invoice ${number}, vehicle left unrepaired` : `Left unrepaired, nothing owed, ${number}`;
    const { id, url } = await issuePaper(tx, ctx, parts, {
      kind: owes ? "invoice" : "release",
      number,
      title,
      snapshot,
      bytes,
      sha256,
      currency: snapshot.currency,
      totalMinor: snapshot.totals.totalMinor,
    });
    if (parts.customer.email)
      await queueMail(tx, ctx, {
        caseId,
        kind: "release",
        paperId: id,
        ...releaseMail({ to: parts.customer.email, snapshot, url }),
      });
    await moveTo(tx, ctx, parts.row, "released", input.reason);
    await setCase(tx, ctx, caseId, {
      closedAt: ctx.now,
      odometerOutKm: input.odometerOutKm ?? null,
      safetyNote: input.safetyNote ?? null,
      outcome: "released",
      parkedFrom: null,
      parkedFor: null,
    });
    await refreshCase(tx, ctx, caseId);
    return { paperId: id, number, totalMinor: snapshot.totals.totalMinor, currency: snapshot.currency };
  },
});

export const recordPayment = defineVerb({
  name: "payment.record",
  summary: "Record a payment taken at the counter",
  action: "payment.record",
  input: paymentInput,
  async run(tx, ctx, { caseId, paperId, how, amountMinor, reference }) {
    const parts = await openForWrite(tx, ctx, caseId, { evenIfOver: true });
    const paper = parts.papers.find((each) => each.id === paperId && each.kind === "invoice");
    if (!paper) throw notFound("The invoice");
    const paid = parts.payments
      .filter((each) => each.paperId === paperId)
      .reduce((sum, each) => sum + each.amountMinor, 0);
    if (paid + amountMinor > paper.totalMinor)
      throw invalidField("/amountMinor", "That is more than is still owed on this invoice.");
    const id = newId("pay", ctx.now.getTime());
    await tx.insert(payments).values({
      shopId: ctx.shopId,
      id,
      caseId,
      paperId,
      how,
      amountMinor,
      currency: paper.currency,
      reference: reference ?? null,
      takenByName: ctx.actor.name,
      at: ctx.now,
    });
    return { paymentId: id, balanceMinor: paper.totalMinor - paid - amountMinor };
  },
});
