import type { Metadata } from "next";
import Link from "next/link";
import { PapersPart, type PaperView } from "@/components/papers/papers-part";
import { capitalise, countWord, formatPrice, formatWhen } from "@/components/ui/format";
import { moneyEntry } from "@/components/ui/parse-entry";
import { mayDo } from "@/lib/auth/permissions";
import { PAYMENT_LABELS, PAYMENT_WAYS } from "@/lib/cases/work-schema";
import { readAuditContext } from "@/lib/services/audit/read";
import { readCaseHistory } from "@/lib/services/cases/read";
import type { CaseView } from "@/lib/services/cases/view";
import { ActDialog } from "../../../_client/act-dialog";
import { entryView } from "../../../_views/audit/entries";
import { CaseShell } from "../_views/case-shell";
import { loadCase, type PartParams } from "../_views/load";

export const metadata: Metadata = { title: "Papers and history" };

const PAGE = 100;

function paperViews(view: CaseView): PaperView[] {
  const { papers, payments } = view.parts;
  return papers.map((paper) => {
    const paid = payments
      .filter((payment) => payment.paperId === paper.id)
      .reduce((sum, payment) => sum + payment.amountMinor, 0);
    const owed = paper.totalMinor - paid;
    const money = (minor: number) => formatPrice(minor, paper.currency, view.settings.locale);
    return {
      id: paper.id,
      number: paper.number,
      title: paper.title,
      issued: `${formatWhen(paper.issuedAt.toISOString(), view.now.toISOString(), view.settings.timeZone)}, ${paper.issuedByName}`,
      total: { minor: paper.totalMinor, currency: paper.currency },
      bytes: paper.bytes,
      sha256: paper.sha256,
      href: `/api/papers/${paper.id}`,
      state:
        paper.kind !== "invoice"
          ? undefined
          : owed <= 0
            ? "paid"
            : paid > 0
              ? `${money(owed)} still owed`
              : "not paid yet",
    };
  });
}

export default async function PapersPage({
  params,
  searchParams,
}: PartParams & { searchParams: Promise<{ before?: string }> }) {
  const { ctx, view } = await loadCase((await params).number);
  const { row, papers, payments } = view.parts;
  const before = Number((await searchParams).before);
  const rows = await readCaseHistory(ctx, row.id, Number.isSafeInteger(before) && before > 0 ? before : undefined);
  const invoice = papers.findLast((paper) => paper.kind === "invoice");
  const owed = invoice
    ? invoice.totalMinor -
      payments
        .filter((payment) => payment.paperId === invoice.id)
        .reduce((sum, payment) => sum + payment.amountMinor, 0)
    : 0;
  const count =
    papers.length === 0
      ? "No paper yet"
      : `${capitalise(countWord(papers.length))} ${papers.length === 1 ? "paper" : "papers"}`;
  const standing = invoice
    ? owed <= 0
      ? ", the invoice is paid"
      : `, ${formatPrice(owed, invoice.currency, view.settings.locale)} is owed`
    : "";
  const last = rows[PAGE - 1];
  const shown = rows.slice(0, PAGE);
  const { currency, locale, timeZone } = view.settings;
  const context = { ...(await readAuditContext(ctx, shown)), currency, locale, timeZone, isOneDay: false };
  return (
    <CaseShell ctx={ctx} view={view} part="papers">
      <PapersPart
        title={`${count}${standing}`}
        papers={paperViews(view)}
        history={shown.map((entry) => entryView(entry, context))}
        locale={view.settings.locale}
        acts={
          invoice && owed > 0 && mayDo(ctx.actor.role, "payment.record") ? (
            <ActDialog
              label="Record a payment"
              look="act"
              verb="payment.record"
              input={{ caseId: row.id, paperId: invoice.id }}
              fields={[
                {
                  kind: "money",
                  name: "amountMinor",
                  label: "Amount",
                  currency: invoice.currency,
                  value: moneyEntry(owed, invoice.currency),
                },
                {
                  kind: "choice",
                  name: "how",
                  label: "How",
                  options: PAYMENT_WAYS.map((value) => ({ value, label: PAYMENT_LABELS[value] })),
                  value: "card-terminal",
                },
                { kind: "text", name: "reference", label: "Reference", optional: true },
              ]}
              sendLabel="Record it"
            />
          ) : undefined
        }
        more={
          rows.length > PAGE && last ? (
            <Link className="btn quiet" href={`/cases/${row.number}/papers?before=${last.seq}`}>
              Show 100 more
            </Link>
          ) : undefined
        }
      />
    </CaseShell>
  );
}
