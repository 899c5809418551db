import type { InvoiceSnapshot } from "@/lib/cases/paper-schema";
import type { RevisionSnapshot } from "@/lib/cases/quote-schema";
import { formatMoney } from "@/lib/quote/money";
import { type Block, type RenderedMail, renderLetter } from "./letter";

export { invitationMail, passwordResetMail } from "./account-letters";

type Shop = RevisionSnapshot["shop"];

const firstName = (name: string) => name.trim().split(/\s+/)[0] ?? name;

const linesOf = (shop: Shop) =>
  [shop.address, [shop.phone, shop.email].filter(Boolean).join(" · "), shop.registration].filter(Boolean);

const fromShop = (to: string, shop: Shop, subject: string, heading: string, blocks: Block[]) =>
  renderLetter({ to, subject, sender: shop.name, senderLines: linesOf(shop), heading, blocks });

/** An instant in the shop's zone and the paper's language: "1 December 2026, 16:52". */
function when(iso: string, locale: string, timeZone: string): string {
  const options = {
    timeZone,
    day: "numeric",
    month: "long",
    year: "numeric",
    hour: "2-digit",
    minute: "2-digit",
    hourCycle: "h23",
  } as const;
  return new Intl.DateTimeFormat(locale === "en-US" ? "en-GB" : locale, options)
    .format(new Date(iso))
    .replace(" at ", ", ");
}

const paperWord = (snapshot: RevisionSnapshot) => (snapshot.paperWord === "estimate" ? "Estimate" : "Quotation");

export function quoteMail({
  to,
  snapshot,
  url,
}: {
  to: string;
  snapshot: RevisionSnapshot;
  url: string;
}): RenderedMail {
  const money = (minor: number) => formatMoney(minor, snapshot.currency, snapshot.locale);
  const { shop, vehicle, customer, totals } = snapshot;
  return fromShop(
    to,
    shop,
    `${paperWord(snapshot)} for your ${vehicle.label}, case ${snapshot.caseNumber}`,
    snapshot.headline,
    [
      {
        kind: "text",
        text: `${firstName(customer.name)}, we have looked at your ${vehicle.label}. ${snapshot.finding}`,
      },
      {
        kind: "text",
        text: "What each job costs, what can wait and at what risk is on your page. Nothing is done before you say yes.",
      },
      { kind: "button", label: "See and answer", url },
      {
        kind: "facts",
        rows: [
          ["Needed now", `${money(totals.neededNowMinor)}, tax included`],
          ["All of it", `${money(totals.totalMinor)}, tax included`],
          ["Stands until", when(snapshot.validUntil, snapshot.locale, snapshot.timeZone)],
        ],
      },
      {
        kind: "note",
        text: "The address is for you alone: whoever has it can answer for you. Rather speak to us? Call, and we write down what you decide.",
      },
    ],
  );
}

/** The same address once more, for a quote that nobody has answered yet. */
export function reminderMail({
  to,
  snapshot,
  url,
}: {
  to: string;
  snapshot: RevisionSnapshot;
  url: string;
}): RenderedMail {
  const { shop, vehicle, customer } = snapshot;
  return fromShop(
    to,
    shop,
    `Your ${vehicle.label} waits for your answer, case ${snapshot.caseNumber}`,
    "We wait for your answer",
    [
      {
        kind: "text",
        text: `${firstName(customer.name)}, we have not heard from you about your ${vehicle.label} yet. ${snapshot.headline}`,
      },
      { kind: "button", label: "See and answer", url },
      {
        kind: "note",
        text: `It stands until ${when(snapshot.validUntil, snapshot.locale, snapshot.timeZone)}. Without your yes nothing is done.`,
      },
    ],
  );
}

export function approvalReceiptMail(model: {
  to: string;
  snapshot: RevisionSnapshot;
  yesJobIds: readonly string[];
  totalMinor: number;
  givenBy: string;
}): RenderedMail {
  const { to, snapshot, totalMinor, givenBy } = model;
  const money = (minor: number) => formatMoney(minor, snapshot.currency, snapshot.locale);
  const yes = new Set(model.yesJobIds);
  const agreed = snapshot.jobs.filter((job) => yes.has(job.id));
  const later = snapshot.jobs.filter((job) => !yes.has(job.id));
  const rows = [
    ...(snapshot.diagnosis
      ? [{ label: "Diagnosis, agreed before", amount: money(snapshot.diagnosis.totalMinor) }]
      : []),
    ...snapshot.agreed.map((job) => ({ label: `${job.title}, agreed before`, amount: money(job.totalMinor) })),
    ...agreed.map((job) => ({ label: job.customerTitle, amount: money(job.totalMinor) })),
    { label: "Total, tax included", amount: money(totalMinor), isTotal: true },
  ];
  const heading = agreed.length > 0 ? `You agreed to ${money(totalMinor)}` : "You said not now to every job";
  return fromShop(to, snapshot.shop, `Your answer, case ${snapshot.caseNumber}`, heading, [
    {
      kind: "text",
      text: `Answered by ${givenBy} for the ${snapshot.vehicle.label}, revision ${snapshot.number}. We do no more than this without asking again.`,
    },
    { kind: "sums", rows },
    ...later.map((job): Block => ({ kind: "note", text: `Not now: ${job.customerTitle}. ${job.ifWaits}`.trim() })),
    ...(later.some((job) => job.isSafety)
      ? [
          {
            kind: "alarm" as const,
            text: "A job that concerns safety was put off. Please read the risk above, and ask us before you drive on.",
          },
        ]
      : []),
  ]);
}

export function questionMail(model: {
  to: string;
  caseNumber: number;
  customerName: string;
  text: string;
}): RenderedMail {
  return renderLetter({
    to: model.to,
    subject: `Question from ${model.customerName}, case ${model.caseNumber}`,
    sender: "Firedeck",
    heading: `${model.customerName} asks about case ${model.caseNumber}`,
    blocks: [
      { kind: "words", text: model.text, by: model.customerName },
      {
        kind: "note",
        text: "Answer it on the quote of the case; the answer goes to the customer by mail and stands on their page.",
      },
    ],
  });
}

export function answerMail(model: {
  to: string;
  shopName: string;
  customerName: string;
  answeredBy: string;
  text: string;
}): RenderedMail {
  return renderLetter({
    to: model.to,
    subject: `${model.shopName} answers your question`,
    sender: model.shopName,
    heading: "Your question, answered",
    blocks: [
      { kind: "text", text: `${firstName(model.customerName)}, you asked about your quote.` },
      { kind: "words", text: model.text, by: `${model.answeredBy}, ${model.shopName}` },
      { kind: "note", text: "The page you were sent shows the whole exchange, and takes your answer." },
    ],
  });
}

function billed(snapshot: InvoiceSnapshot) {
  const money = (minor: number) => formatMoney(minor, snapshot.currency, snapshot.locale);
  return [
    ...(snapshot.diagnosis ? [{ label: "Diagnosis", amount: money(snapshot.diagnosis.totalMinor) }] : []),
    ...snapshot.jobs.map((job) => ({ label: job.title, amount: money(job.totalMinor) })),
    { label: "Total, tax included", amount: money(snapshot.totals.totalMinor), isTotal: true },
  ];
}

/** The invoice itself goes along as a PDF; the caller attaches it. */
export function invoiceMail({
  to,
  snapshot,
  url,
}: {
  to: string;
  snapshot: InvoiceSnapshot;
  url: string;
}): RenderedMail {
  const { shop, vehicle, customer } = snapshot;
  return fromShop(to, shop, `Invoice ${snapshot.number} for your ${vehicle.label}`, `Your ${vehicle.label} is ready`, [
    { kind: "text", text: `${firstName(customer.name)}, ${snapshot.correction}` },
    { kind: "sums", rows: billed(snapshot) },
    { kind: "button", label: "See what was done, before and after", url },
    { kind: "note", text: snapshot.warranty },
  ]);
}

export function releaseMail({
  to,
  snapshot,
  url,
}: {
  to: string;
  snapshot: InvoiceSnapshot;
  url: string;
}): RenderedMail {
  const { shop, vehicle, customer, release } = snapshot;
  const owes = snapshot.totals.totalMinor > 0;
  return fromShop(
    to,
    shop,
    `Your ${vehicle.label} leaves unrepaired, case ${snapshot.caseNumber}`,
    `Your ${vehicle.label} leaves as it came`,
    [
      { kind: "text", text: `${firstName(customer.name)}, nothing was repaired. ${release?.reason ?? ""}`.trim() },
      ...(release?.notSafeToDrive ? [{ kind: "alarm" as const, text: "Not safe to drive." }] : []),
      ...(release?.safetyNote ? [{ kind: "text" as const, text: release.safetyNote }] : []),
      ...(owes ? [{ kind: "sums" as const, rows: billed(snapshot) }] : []),
      { kind: "button", label: "See what we found", url },
    ],
  );
}
