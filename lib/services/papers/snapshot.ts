import "server-only";
import type { CaseParts } from "@/db/queries/cases";
import { pairedReadings } from "@/lib/cases/customer-readings";
import type { InvoiceSnapshot, PaperAuthorization, PaperJob } from "@/lib/cases/paper-schema";
import { AUTHORIZATION_LABELS } from "@/lib/cases/schema";
import { OLD_PART_LABELS } from "@/lib/cases/work-schema";
import { CAUSES } from "@/lib/diagnosis/causes";
import { priceJob } from "@/lib/quote/job";
import { caseFileOf, proofOf, settingsOf } from "../cases/facts";
import { priceDiagnosis, taxOf } from "../quotes/price";

export interface InvoiceOptions {
  number: string;
  correction: string;
  odometerOutKm: number | null;
  now: Date;
}

function causeText(parts: CaseParts): string {
  const lines = parts.marks.map((mark) => {
    const title = CAUSES[mark.causeId as keyof typeof CAUSES]?.title ?? mark.causeId;
    return `${title}, ${mark.mark}: ${mark.reason}`;
  });
  return lines.join("\n") || "No cause was found.";
}

function authorizationsOf(parts: CaseParts): PaperAuthorization[] {
  const diagnosis = parts.authorizations.map((each, index) => ({
    what: index === 0 ? "Diagnosis, up to" : "Diagnosis, raised to",
    givenBy: each.givenBy,
    how: AUTHORIZATION_LABELS[each.how as keyof typeof AUTHORIZATION_LABELS] ?? each.how,
    contact: each.contact,
    words: each.words,
    at: each.at.toISOString(),
    amountMinor: each.amountMinor,
    takenBy: each.takenByName,
  }));
  const repairs = parts.approvals.map((each) => ({
    what: `Revision ${parts.revisions.find((revision) => revision.id === each.revisionId)?.number ?? ""}, total`,
    givenBy: each.givenBy,
    how: AUTHORIZATION_LABELS[each.how as keyof typeof AUTHORIZATION_LABELS] ?? each.how,
    contact: each.contact,
    words: each.words,
    at: each.at.toISOString(),
    amountMinor: each.totalMinor,
    takenBy: each.takenByName,
  }));
  return [...diagnosis, ...repairs];
}

function base(
  parts: CaseParts,
  options: InvoiceOptions,
): Omit<InvoiceSnapshot, "release" | "jobs" | "totals" | "diagnosis" | "notDone"> {
  const { row, shop, customer, vehicle } = parts;
  const settings = settingsOf(parts);
  const file = caseFileOf(parts);
  return {
    version: 1,
    number: options.number,
    caseNumber: row.number,
    issuedAt: options.now.toISOString(),
    currency: settings.currency,
    locale: settings.locale,
    timeZone: settings.timeZone,
    paper: settings.paper,
    shop: {
      name: shop.name,
      address: settings.address,
      phone: settings.phone,
      email: settings.email,
      registration: settings.registration,
    },
    customer: { name: customer.name, email: customer.email, phone: customer.phone, address: customer.address },
    vehicle: {
      label: vehicle.label,
      modelYear: vehicle.modelYear,
      plate: vehicle.plate,
      vin: vehicle.vin,
      odometerInKm: row.odometerInKm,
      odometerOutKm: options.odometerOutKm,
      odometerUnreadable: row.odometerUnreadable,
      distanceUnit: settings.units.distance,
    },
    complaint: row.words,
    cause: causeText(parts),
    correction: options.correction,
    readings: pairedReadings(file.samples ?? [], file.vehicle),
    proof: proofText(parts),
    tax: { name: settings.taxName, basisPoints: settings.taxBasisPoints },
    authorizations: authorizationsOf(parts),
    partsReturned: row.keepParts
      ? "The customer asked for the replaced parts."
      : "The customer did not ask for the replaced parts.",
    warranty: settings.warrantyText,
    legal: settings.legalText,
  };
}

function proofText(parts: CaseParts): string {
  if (parts.row.waiver) return `Proof waived by ${parts.row.waiver.by}: ${parts.row.waiver.reason}`;
  const proof = proofOf(parts);
  return proof.verdict === "passes" ? "The after readings pass." : "";
}

/** The diagnosis as priced and every agreed job that was done, each at exactly what was agreed. */
export function invoiceSnapshot(parts: CaseParts, options: InvoiceOptions): InvoiceSnapshot {
  const settings = settingsOf(parts);
  const done = parts.workJobs.filter((job) => job.state === "done");
  const jobs: PaperJob[] = done.map((job) => {
    const agreed = parts.revisions
      .find((revision) => revision.id === job.revisionId)
      ?.snapshot.jobs.find((each) => each.id === job.quoteJobId);
    const priced = agreed ?? { ...priceJob(job.lines, taxOf(settings)), lines: [] };
    const used = parts.partsUsed.filter((part) => part.workJobId === job.id && part.oldPart !== "none");
    return {
      title: job.title,
      netMinor: priced.netMinor,
      taxMinor: priced.taxMinor,
      totalMinor: job.approvedMinor,
      correction: job.correction,
      lines: agreed?.lines ?? [],
      oldParts: used.map(
        (part) => `${part.description}: ${OLD_PART_LABELS[part.oldPart as keyof typeof OLD_PART_LABELS].toLowerCase()}`,
      ),
    };
  });
  const priced = priceDiagnosis(parts, options.now);
  const diagnosis =
    priced && priced.totalMinor > 0
      ? {
          netMinor: priced.netMinor,
          taxMinor: priced.taxMinor,
          totalMinor: priced.totalMinor,
          hoursMilli: priced.hoursMilli,
        }
      : null;
  const charged = [...jobs, ...(diagnosis ? [diagnosis] : [])];
  return {
    ...base(parts, options),
    diagnosis,
    jobs,
    notDone: notDoneOf(parts),
    totals: {
      netMinor: charged.reduce((sum, each) => sum + each.netMinor, 0),
      taxMinor: charged.reduce((sum, each) => sum + each.taxMinor, 0),
      totalMinor: charged.reduce((sum, each) => sum + each.totalMinor, 0),
    },
    release: null,
  };
}

/** What was asked and not done: struck jobs with the reason, and jobs the customer put off, with the risk that was read. */
function notDoneOf(parts: CaseParts): InvoiceSnapshot["notDone"] {
  const struck = parts.workJobs
    .filter((job) => job.state === "struck")
    .map((job) => ({ title: job.title, why: job.strikeReason ?? "" }));
  const newest = parts.approvals.at(-1);
  const revision = parts.revisions.find((each) => each.id === newest?.revisionId);
  const putOff = (newest?.answers ?? [])
    .filter((answer) => answer.answer === "not-now")
    .flatMap((answer) => {
      const job = revision?.snapshot.jobs.find((each) => each.id === answer.jobId);
      return job
        ? [
            {
              title: job.customerTitle,
              why: [job.isSafety ? "Safety" : null, `Not now. ${job.ifWaits}`.trim(), answer.reason]
                .filter(Boolean)
                .join(". "),
            },
          ]
        : [];
    });
  return [...struck, ...putOff];
}

export interface ReleaseOptions {
  number: string;
  now: Date;
  reason: string;
  safetyNote?: string;
  notSafeToDrive: boolean;
  acknowledgedBy?: string;
  chargeDiagnosis: boolean;
  odometerOutKm?: number;
}

export function releaseSnapshot(parts: CaseParts, options: ReleaseOptions): InvoiceSnapshot {
  const { number, now } = options;
  const whole = invoiceSnapshot(parts, {
    number,
    now,
    correction: "Nothing was repaired; the vehicle leaves as it came.",
    odometerOutKm: options.odometerOutKm ?? null,
  });
  const diagnosis = options.chargeDiagnosis ? whole.diagnosis : null;
  return {
    ...whole,
    diagnosis,
    jobs: [],
    totals: {
      netMinor: diagnosis?.netMinor ?? 0,
      taxMinor: diagnosis?.taxMinor ?? 0,
      totalMinor: diagnosis?.totalMinor ?? 0,
    },
    release: {
      reason: options.reason,
      safetyNote: options.safetyNote ?? null,
      notSafeToDrive: options.notSafeToDrive,
      acknowledgedBy: options.acknowledgedBy ?? null,
    },
  };
}
