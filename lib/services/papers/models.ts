import "server-only";
import type { InvoiceSnapshot } from "@/lib/cases/paper-schema";
import type { RevisionLine, RevisionReading, RevisionSnapshot } from "@/lib/cases/quote-schema";
import type {
  Amount,
  BilledJob,
  InvoiceModel,
  PaperLanguage,
  PaperLine,
  QuoteModel,
  ReadingMark,
  ReleaseModel,
} from "@/lib/pdf/models";

const languageOf = (locale: string): PaperLanguage => {
  const language = locale.slice(0, 2);
  return language === "es" || language === "fr" || language === "de" ? language : "en";
};

const lineOf = (line: RevisionLine): PaperLine => ({ ...line, condition: line.condition as PaperLine["condition"] });
const markOf = ({ value, at, family, inside }: RevisionReading): ReadingMark => ({ value, at, family, inside });
const taxesOf = (tax: { name: string; basisPoints: number }, amountMinor: number): Amount[] =>
  tax.basisPoints > 0 ? [{ label: `${tax.name}, ${tax.basisPoints / 100} %`, amountMinor }] : [];

/** The diagnosis as a job of its own, with the ceiling it was agreed under. */
function diagnosisJob({ diagnosis }: InvoiceSnapshot): BilledJob[] {
  if (!diagnosis) return [];
  const { netMinor, totalMinor, hoursMilli } = diagnosis;
  const unitPriceMinor = hoursMilli > 0 ? Math.round((netMinor * 1000) / hoursMilli) : netMinor;
  return [
    {
      title: "Diagnosis",
      netMinor,
      billedMinor: totalMinor,
      lines: [
        {
          kind: "diagnosis",
          description: "Time on the clock, within the agreed ceiling",
          quantityMilli: hoursMilli,
          unitPriceMinor,
          netMinor,
        },
      ],
      oldParts: [],
    },
  ];
}

export function invoicePaperModel(snapshot: InvoiceSnapshot, sha256: string, issuedAt: Date): InvoiceModel {
  const { tax, totals } = snapshot;
  return {
    language: languageOf(snapshot.locale),
    locale: snapshot.locale,
    timeZone: snapshot.timeZone,
    currency: snapshot.currency,
    paper: snapshot.paper,
    number: snapshot.number,
    caseNumber: snapshot.caseNumber,
    issuedAt: issuedAt.toISOString(),
    sha256,
    shop: snapshot.shop,
    customer: snapshot.customer,
    vehicle: snapshot.vehicle,
    warranty: snapshot.warranty,
    legal: snapshot.legal,
    complaint: snapshot.complaint,
    cause: snapshot.cause,
    correction: snapshot.correction,
    jobs: [
      ...diagnosisJob(snapshot),
      ...snapshot.jobs.map((job) => ({
        title: job.title,
        netMinor: job.netMinor,
        agreedMinor: job.totalMinor,
        billedMinor: job.totalMinor,
        correction: job.correction,
        lines: job.lines.map(lineOf),
        oldParts: job.oldParts,
      })),
    ],
    totals: { netMinor: totals.netMinor, taxes: taxesOf(tax, totals.taxMinor), totalMinor: totals.totalMinor },
    authorizations: snapshot.authorizations,
    notDone: snapshot.notDone,
    readings: snapshot.readings.map(({ label, before, after }) => ({
      label,
      before: before && markOf(before),
      after: after && markOf(after),
    })),
    proof: snapshot.proof,
    partsReturned: snapshot.partsReturned,
  };
}

export function releasePaperModel(snapshot: InvoiceSnapshot, sha256: string, issuedAt: Date): ReleaseModel {
  if (!snapshot.release) throw new Error("a release paper needs its release");
  return { ...invoicePaperModel(snapshot, sha256, issuedAt), release: snapshot.release };
}

export function quotePaperModel(
  snapshot: RevisionSnapshot,
  sha256: string,
  issuedAt: Date,
  paper: "A4" | "Letter",
): QuoteModel {
  const { diagnosis, totals, tax } = snapshot;
  const titles = new Map(snapshot.jobs.map((job) => [job.id, job.customerTitle]));
  return {
    language: languageOf(snapshot.locale),
    locale: snapshot.locale,
    timeZone: snapshot.timeZone,
    currency: snapshot.currency,
    paper,
    number: `${snapshot.caseNumber}-${snapshot.number}`,
    caseNumber: snapshot.caseNumber,
    issuedAt: issuedAt.toISOString(),
    sha256,
    shop: snapshot.shop,
    customer: snapshot.customer,
    vehicle: { ...snapshot.vehicle, odometerInKm: snapshot.vehicle.odometerKm },
    warranty: snapshot.warranty,
    legal: snapshot.legal,
    word: snapshot.paperWord,
    revision: snapshot.number,
    complaint: snapshot.complaint,
    headline: snapshot.headline,
    finding: snapshot.finding,
    readingsTitle: snapshot.readingsTitle,
    readings: snapshot.readings.map((reading) => ({ label: reading.label, before: markOf(reading), after: null })),
    readingsNote: snapshot.readingsNote,
    jobs: snapshot.jobs.map((job) => ({
      title: job.customerTitle,
      urgency: job.urgency,
      ifWaits: job.ifWaits,
      needs: job.dependsOnId ? (titles.get(job.dependsOnId) ?? null) : null,
      isSafety: job.isSafety,
      totalMinor: job.totalMinor,
      lines: job.lines.map(lineOf),
    })),
    agreed: [
      ...(diagnosis ? [{ label: "Diagnosis", amountMinor: diagnosis.totalMinor }] : []),
      ...snapshot.agreed.map((job) => ({ label: job.title, amountMinor: job.totalMinor })),
    ],
    totals: {
      netMinor: totals.netMinor,
      taxes: taxesOf(tax, totals.taxMinor),
      totalMinor: totals.totalMinor,
      neededNowMinor: totals.neededNowMinor,
    },
    readyAt: snapshot.readyAt,
    validUntil: snapshot.validUntil,
    keepParts: snapshot.keepParts,
  };
}
