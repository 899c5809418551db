import "server-only";
import { createHash } from "node:crypto";
import { and, eq, isNull, ne } from "drizzle-orm";
import { customerLinks, papers, quoteRevisions } from "@/db/schema";
import { canonicalJson } from "@/lib/canonical";
import { sendQuoteInput, withdrawQuoteInput } from "@/lib/cases/quote-schema";
import { env } from "@/lib/env";
import { AppError, invalidField, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { quoteMail } from "@/lib/mail/templates";
import { renderQuote } from "@/lib/pdf/render";
import { settingsOf } from "../cases/facts";
import { moveTo, openForWrite, refreshCase } from "../cases/refresh";
import { queueMail } from "../mail/queue";
import { quotePaperModel } from "../papers/models";
import { defineVerb } from "../verb";
import { makeLink } from "./links";
import { isUnchanged, snapshotOf } from "./snapshot";

const SENDABLE = ["quoting", "waiting", "repair"];

/** The SHA-256 of a snapshot in one canonical form: the same data gives the same sum. */
export const digestOf = (snapshot: unknown) => createHash("sha256").update(canonicalJson(snapshot)).digest("hex");

export const sendQuote = defineVerb({
  name: "quote.send",
  summary: "Send the quote to the customer as a new revision",
  action: "quote.send",
  input: sendQuoteInput,
  async run(tx, ctx, { caseId, to }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const { row, customer } = parts;
    if (!SENDABLE.includes(row.stage))
      throw new AppError(
        "precondition",
        "A quote is sent from quoting, or again while the customer decides or the repair runs.",
      );
    const number = (parts.revisions[0]?.number ?? 0) + 1;
    const settings = settingsOf(parts);
    const expiresAt = new Date(ctx.now.getTime() + settings.quoteValidDays * 86_400_000);
    const snapshot = snapshotOf(parts, { number, now: ctx.now, expiresAt });
    if (snapshot.jobs.length === 0) throw invalidField("/jobs", "There is no job to ask about. Add one first.");
    const empty = snapshot.jobs.find((job) => job.lines.length === 0);
    if (empty) throw invalidField("/jobs", `“${empty.title}” has no lines yet.`);
    if (!snapshot.headline || !snapshot.finding)
      throw invalidField("/finding", "Say in plain words what is wrong before sending.");
    if (isUnchanged(parts, snapshot, ctx.now))
      throw new AppError(
        "precondition",
        `Revision ${number - 1} says exactly this already and waits for an answer. Change something first, or withdraw it.`,
      );
    const address = to ?? customer.email;
    const id = newId("rev", ctx.now.getTime());
    const sha256 = digestOf(snapshot);
    await tx
      .update(quoteRevisions)
      .set({ supersededAt: ctx.now })
      .where(
        and(
          eq(quoteRevisions.shopId, ctx.shopId),
          eq(quoteRevisions.caseId, caseId),
          isNull(quoteRevisions.supersededAt),
          isNull(quoteRevisions.withdrawnAt),
        ),
      );
    await tx.insert(quoteRevisions).values({
      shopId: ctx.shopId,
      id,
      caseId,
      number,
      snapshot,
      sha256,
      currency: snapshot.currency,
      totalMinor: snapshot.totals.totalMinor,
      sentAt: ctx.now,
      sentById: ctx.actor.id,
      sentByName: ctx.actor.name,
      expiresAt,
    });
    const link = await makeLink(tx, ctx, { caseId, kind: "quote", targetId: id, sentTo: address ?? null, expiresAt });
    const url = `${env().APP_URL}/q/${link.secret}`;
    const bytes = await renderQuote(quotePaperModel(snapshot, sha256, ctx.now, settings.paper));
    await tx.insert(papers).values({
      shopId: ctx.shopId,
      id: newId("pap", ctx.now.getTime()),
      caseId,
      kind: "quote",
      number: `${row.number}-${number}`,
      title: `${settings.paperWord === "estimate" ? "Estimate" : "Quotation"}, revision ${number}`,
      snapshot,
      bytes: Buffer.from(bytes),
      sha256,
      currency: snapshot.currency,
      totalMinor: snapshot.totals.totalMinor,
      issuedAt: ctx.now,
      issuedByName: ctx.actor.name,
    });
    if (address) await queueMail(tx, ctx, { caseId, kind: "quote", ...quoteMail({ to: address, snapshot, url }) });
    if (row.stage !== "waiting") await moveTo(tx, ctx, row, "waiting");
    await refreshCase(tx, ctx, caseId);
    // with no address the counter hands the link over by text or on paper
    return { revisionId: id, number, mailed: Boolean(address), url: address ? null : url };
  },
});

export const withdrawQuote = defineVerb({
  name: "quote.withdraw",
  summary: "Withdraw a sent quote; its link stops",
  action: "quote.send",
  input: withdrawQuoteInput,
  async run(tx, ctx, { caseId, revisionId }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const revision = parts.revisions.find((each) => each.id === revisionId);
    if (!revision) throw notFound("The revision");
    if (parts.approvals.some((approval) => approval.revisionId === revisionId))
      throw new AppError("precondition", "The customer has answered this revision; it stands as a record.");
    if (revision.withdrawnAt) return { withdrawn: true };
    await tx
      .update(quoteRevisions)
      .set({ withdrawnAt: ctx.now })
      .where(and(eq(quoteRevisions.shopId, ctx.shopId), eq(quoteRevisions.id, revisionId)));
    await tx
      .update(customerLinks)
      .set({ revokedAt: ctx.now })
      .where(
        and(
          eq(customerLinks.shopId, ctx.shopId),
          eq(customerLinks.targetId, revisionId),
          ne(customerLinks.kind, "invoice"),
        ),
      );
    if (parts.row.stage === "waiting") await moveTo(tx, ctx, parts.row, "quoting", "Quote withdrawn");
    await refreshCase(tx, ctx, caseId);
    return { withdrawn: true };
  },
});
