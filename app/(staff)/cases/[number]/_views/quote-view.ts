import type { CustomerPhoto, QuestionView } from "@/components/approve/model";
import type { CatalogueChoice, CauseChoice, QuoteJobView, RevisionRowView } from "@/components/quote/model";
import { formatDate, formatPrice, formatWhen } from "@/components/ui/format";
import { CAUSES } from "@/lib/diagnosis/causes";
import type { PriceList } from "@/lib/services/cases/read";
import type { CaseView } from "@/lib/services/cases/view";

const when = (view: CaseView, at: Date) => formatWhen(at.toISOString(), view.now.toISOString(), view.settings.timeZone);

/** Jobs that can still be edited: those the customer has not agreed to. */
export function quoteJobViews(view: CaseView): QuoteJobView[] {
  const agreed = new Set(view.parts.workJobs.map((job) => job.quoteJobId));
  return view.parts.quoteJobs
    .filter((job) => !agreed.has(job.id))
    .map(({ id, version, title, customerTitle, urgency, ifWaits, causeId, dependsOnId, isSafety, lines }) => ({
      id,
      version,
      title,
      customerTitle,
      urgency: urgency as QuoteJobView["urgency"],
      ifWaits,
      causeId,
      dependsOnId,
      isSafety,
      lines,
    }));
}

export function causeChoices(view: CaseView): CauseChoice[] {
  return view.parts.marks.map((mark) => {
    const cause = CAUSES[mark.causeId as keyof typeof CAUSES];
    return {
      id: mark.causeId,
      title: cause?.title ?? mark.causeId,
      family: cause?.family ?? "mech",
      note: `${mark.mark} ${when(view, mark.at)}: ${mark.reason}`,
    };
  });
}

export function draftView(view: CaseView) {
  const { draft, marks } = view.parts;
  if (draft) {
    return {
      version: draft.version,
      headline: draft.headline,
      finding: draft.finding,
      warranty: draft.warranty,
      readyAt: draft.readyAt?.toISOString() ?? null,
      diagnosisNetMinor: draft.diagnosisNetMinor,
    };
  }
  const mark = marks.findLast((each) => each.mark === "proven") ?? marks.at(-1);
  const cause = mark ? CAUSES[mark.causeId as keyof typeof CAUSES] : undefined;
  return {
    version: 1,
    headline: cause ? "What we found" : "",
    finding: cause?.sentence ?? "",
    warranty: view.settings.warrantyText,
    readyAt: null,
    diagnosisNetMinor: null,
  };
}

export function revisionRows(view: CaseView): RevisionRowView[] {
  return view.parts.revisions.map((revision) => {
    const answer = view.parts.approvals.find((each) => each.revisionId === revision.id);
    const yes = answer?.answers.filter((each) => each.answer === "yes").length ?? 0;
    const paper = view.parts.papers.find(
      (each) => each.kind === "quote" && each.number === `${view.parts.row.number}-${revision.number}`,
    );
    const state = revision.withdrawnAt
      ? "withdrawn"
      : answer
        ? "answered"
        : revision.supersededAt
          ? "superseded"
          : revision.expiresAt < view.now
            ? "expired"
            : "stands";
    return {
      id: revision.id,
      number: revision.number,
      words: `sent ${when(view, revision.sentAt)} by ${revision.sentByName}${revision.firstOpenedAt ? `, opened ${when(view, revision.firstOpenedAt)}` : ", not opened yet"}`,
      state,
      answer: answer
        ? `${yes} of ${answer.answers.length} agreed, ${answer.how === "link" ? "by link" : answer.how === "phone" ? "by phone" : "in person"}`
        : undefined,
      totalMinor: revision.totalMinor,
      href: paper ? `/api/papers/${paper.id}` : undefined,
    };
  });
}

export function photoViews(view: CaseView): CustomerPhoto[] {
  return view.parts.files
    .filter((file) => file.kind === "photo" && file.state === "ready" && file.forCustomer)
    .map((file) => ({
      id: file.id,
      src: `/api/files/${file.id}`,
      alt: file.caption ?? "Photo from the workshop",
      caption: file.caption ?? undefined,
    }));
}

export function questionViews(view: CaseView): QuestionView[] {
  return view.parts.questions.map((each) => ({
    id: each.id,
    from: each.fromCustomer ? "customer" : "shop",
    name: each.byName,
    text: each.text,
    when: when(view, each.at),
  }));
}

/** Operations and parts as lines; labour at the rate the case froze when its diagnosis was agreed. */
export function catalogueChoices(view: CaseView, prices: PriceList): CatalogueChoice[] {
  const money = (minor: number) => formatPrice(minor, view.settings.currency, view.settings.locale);
  const frozen = view.parts.row.rates ?? {};
  const operations = prices.operations
    .filter((operation) => operation.isActive)
    .map((operation): CatalogueChoice => {
      const rate = prices.rates.find((each) => each.id === operation.rateId);
      const perHourMinor = frozen[operation.rateId] ?? rate?.perHourMinor ?? 0;
      return {
        id: operation.id,
        kind: "labour",
        label: operation.name,
        note: `${operation.hoursMilli / 1000} h`,
        line: {
          kind: "labour",
          description: operation.name,
          quantityMilli: Math.max(1, operation.hoursMilli),
          unitPriceMinor: perHourMinor,
          costMinor: null,
          partNumber: null,
          condition: null,
          rateId: operation.rateId,
        },
      };
    });
  const parts = prices.parts
    .filter((part) => part.isActive)
    .map(
      (part): CatalogueChoice => ({
        id: part.id,
        kind: "part",
        label: part.name,
        note: `${part.number}, ${money(part.priceMinor)}`,
        line: {
          kind: "part",
          description: part.name,
          quantityMilli: 1000,
          unitPriceMinor: part.priceMinor,
          costMinor: part.costMinor,
          partNumber: part.number,
          condition: part.condition as "new" | "rebuilt" | "used",
          rateId: null,
        },
      }),
    );
  return [...operations, ...parts];
}

export function validUntilWords(view: CaseView): string {
  const until = new Date(view.now.getTime() + view.settings.quoteValidDays * 86_400_000);
  return formatDate(until.toISOString(), view.settings.timeZone);
}
