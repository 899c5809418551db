import type { Metadata } from "next";
import { formatPrice } from "@/components/ui/format";
import { mayDo } from "@/lib/auth/permissions";
import { isOver, type Stage } from "@/lib/cases/stages";
import { netWithin } from "@/lib/quote/job";
import { readPriceList } from "@/lib/services/cases/read";
import { taxOf } from "@/lib/services/quotes/price";
import { isUnchanged, snapshotOf } from "@/lib/services/quotes/snapshot";
import { QuoteClient } from "../_client/quote-client";
import { CaseShell } from "../_views/case-shell";
import { loadCase, type PartParams } from "../_views/load";
import {
  catalogueChoices,
  causeChoices,
  draftView,
  photoViews,
  questionViews,
  quoteJobViews,
  revisionRows,
  validUntilWords,
} from "../_views/quote-view";

export const metadata: Metadata = { title: "Quote" };

const SENDABLE: Stage[] = ["quoting", "waiting", "repair"];

export default async function QuotePage({ params }: PartParams) {
  const { ctx, view } = await loadCase((await params).number);
  const { row, customer, revisions, approvals } = view.parts;
  const { settings, standing } = view;
  const prices = await readPriceList(ctx);
  const stage = row.stage as Stage;
  const { role } = ctx.actor;
  const number = (revisions[0]?.number ?? 0) + 1;
  const expiresAt = new Date(ctx.now.getTime() + settings.quoteValidDays * 86_400_000);
  const money = (minor: number) => formatPrice(minor, settings.currency, settings.locale);
  const { price, ceilingMinor } = view.diagnosis;
  const isAnswered = standing !== null && approvals.some((each) => each.revisionId === standing.id);
  const snapshot = snapshotOf(view.parts, { number, now: ctx.now, expiresAt });
  const cannotSend = SENDABLE.includes(stage)
    ? isUnchanged(view.parts, snapshot, ctx.now)
      ? `Revision ${number - 1} says exactly this and waits for an answer.`
      : undefined
    : isOver(stage)
      ? "The case has ended."
      : stage === "parked"
        ? "The case is on hold."
        : "A quote is sent once a cause is marked and the case is handed over.";
  return (
    <CaseShell ctx={ctx} view={view} part="quote">
      <QuoteClient
        caseId={row.id}
        number={number}
        customerName={customer.name}
        jobs={quoteJobViews(view)}
        draft={draftView(view)}
        snapshot={snapshot}
        photos={photoViews(view)}
        money={{
          currency: settings.currency,
          locale: settings.locale,
          tax: {
            name: settings.taxName,
            basisPoints: settings.taxBasisPoints,
            kinds: settings.taxKinds,
            rounding: settings.rounding,
          },
        }}
        timeZone={settings.timeZone}
        diagnosis={
          price && ceilingMinor !== null
            ? {
                words: `Diagnosis, agreed at intake up to ${money(netWithin(ceilingMinor, "diagnosis", taxOf(settings)))}, ${money(ceilingMinor)} with tax`,
                hoursMilli: price.hoursMilli,
                netMinor: price.netMinor,
              }
            : null
        }
        causes={causeChoices(view)}
        rates={prices.rates
          .filter((rate) => rate.isActive)
          .map((rate) => ({ id: rate.id, name: rate.name, perHourMinor: row.rates?.[rate.id] ?? rate.perHourMinor }))}
        setJobs={prices.setJobs
          .filter((job) => job.isActive)
          .map((job) => ({ id: job.id, title: job.name, note: job.customerTitle }))}
        catalogue={catalogueChoices(view, prices)}
        revisions={revisionRows(view)}
        maySeeCost={mayDo(role, "cost.see")}
        mayPrice={mayDo(role, "quote.price")}
        maySend={mayDo(role, "quote.send")}
        sendTo={customer.email}
        validUntilWords={validUntilWords(view)}
        cannotSend={cannotSend}
        questions={questionViews(view)}
        standing={standing && !isAnswered ? { revisionId: standing.id, snapshot: standing.snapshot } : null}
        mayRecord={mayDo(role, "approval.record")}
        mayReply={mayDo(role, "quote.answerQuestion")}
        readOnly={isOver(stage)}
      />
    </CaseShell>
  );
}
