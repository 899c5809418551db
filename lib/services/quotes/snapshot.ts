import "server-only";
import type { CaseParts } from "@/db/queries/cases";
import { canonicalJson } from "@/lib/canonical";
import { customerReadings } from "@/lib/cases/customer-readings";
import type { RevisionJob, RevisionSnapshot, Urgency } from "@/lib/cases/quote-schema";
import { priceJob } from "@/lib/quote/job";
import { caseFileOf, settingsOf, standingRevisionOf } from "../cases/facts";
import { priceDiagnosis, taxOf } from "./price";

export interface SnapshotOptions {
  number: number;
  now: Date;
  expiresAt: Date;
}

const formatTime = (at: Date, locale: string, timeZone: string) =>
  new Intl.DateTimeFormat(locale === "en-US" ? "en-GB" : locale, {
    timeZone,
    day: "numeric",
    month: "long",
    hour: "2-digit",
    minute: "2-digit",
    hourCycle: "h23",
  })
    .format(at)
    .replace(" at ", ", ");

/** Everything the customer will see of a quote and nothing a customer must not see (cost, markup, notes). */
export function snapshotOf(parts: CaseParts, { number, now, expiresAt }: SnapshotOptions): RevisionSnapshot {
  const { row, shop, customer, vehicle, draft } = parts;
  const settings = settingsOf(parts);
  const caseFile = caseFileOf(parts);
  const agreedJobs = parts.workJobs.filter((job) => job.state !== "struck");
  const asked = parts.quoteJobs.filter((job) => !parts.workJobs.some((work) => work.quoteJobId === job.id));
  const jobs: RevisionJob[] = asked.map((job) => {
    const priced = priceJob(job.lines, taxOf(settings));
    return {
      id: job.id,
      causeId: job.causeId,
      title: job.title,
      customerTitle: job.customerTitle,
      urgency: job.urgency as Urgency,
      ifWaits: job.ifWaits,
      dependsOnId: job.dependsOnId,
      isSafety: job.isSafety,
      netMinor: priced.netMinor,
      taxMinor: priced.taxMinor,
      totalMinor: priced.totalMinor,
      lines: job.lines.map((line, index) => ({
        id: line.id,
        kind: line.kind,
        description: line.description,
        quantityMilli: line.quantityMilli,
        unitPriceMinor: line.unitPriceMinor,
        netMinor: priced.lineNets[index] ?? 0,
        partNumber: line.partNumber ?? null,
        condition: line.condition ?? (line.kind === "part" ? "new" : null),
      })),
    };
  });
  const diagnosis = priceDiagnosis(parts, now);
  const agreed = agreedJobs.map((job) => ({ title: job.title, totalMinor: job.approvedMinor }));
  const startsAtMinor = (diagnosis?.totalMinor ?? 0) + agreed.reduce((sum, job) => sum + job.totalMinor, 0);
  const sum = (list: RevisionJob[], of: (job: RevisionJob) => number) =>
    list.reduce((total, job) => total + of(job), 0);
  const shown = customerReadings(caseFile.samples ?? [], caseFile.vehicle);
  const measured = parts.samples.findLast(
    (sample) => sample.phase === "before" && Object.keys(sample.values).length > 0,
  );
  return {
    version: 1,
    number,
    caseNumber: row.number,
    paperWord: settings.paperWord,
    currency: settings.currency,
    locale: settings.locale,
    timeZone: settings.timeZone,
    shop: {
      name: shop.name,
      address: settings.address,
      phone: settings.phone,
      email: settings.email,
      registration: settings.registration,
    },
    customer: { name: customer.name, email: customer.email, phone: customer.phone },
    vehicle: {
      label: vehicle.label,
      modelYear: vehicle.modelYear,
      plate: vehicle.plate,
      vin: vehicle.vin,
      odometerKm: row.odometerInKm,
      distanceUnit: settings.units.distance,
    },
    complaint: row.words,
    headline: draft?.headline ?? "",
    finding: draft?.finding ?? "",
    readingsTitle: shown.title,
    readings: shown.readings,
    readingsNote:
      measured && shown.readings.length > 0
        ? `Measured on ${formatTime(measured.takenAt, settings.locale, settings.timeZone)} by ${measured.takenByName}.`
        : "",
    photoIds: parts.files
      .filter((file) => file.kind === "photo" && file.state === "ready" && file.forCustomer)
      .map((file) => file.id),
    diagnosis: diagnosis
      ? {
          netMinor: diagnosis.netMinor,
          taxMinor: diagnosis.taxMinor,
          totalMinor: diagnosis.totalMinor,
          hoursMilli: diagnosis.hoursMilli,
        }
      : null,
    jobs,
    agreed,
    tax: { name: settings.taxName, basisPoints: settings.taxBasisPoints },
    rounding: settings.rounding,
    taxKinds: settings.taxKinds,
    totals: {
      netMinor: (diagnosis?.netMinor ?? 0) + sum(jobs, (job) => job.netMinor),
      taxMinor: (diagnosis?.taxMinor ?? 0) + sum(jobs, (job) => job.taxMinor),
      totalMinor: startsAtMinor + sum(jobs, (job) => job.totalMinor),
      neededNowMinor:
        startsAtMinor +
        sum(
          jobs.filter((job) => job.urgency === "now"),
          (job) => job.totalMinor,
        ),
      startsAtMinor,
    },
    readyAt: (draft?.readyAt ?? row.promisedAt)?.toISOString() ?? null,
    warranty: draft?.warranty ?? settings.warrantyText,
    legal: settings.legalText,
    keepParts: row.keepParts,
    validUntil: expiresAt.toISOString(),
  };
}

/**
 * Whether a new revision would ask exactly what the standing one asks already. Asking twice only confuses: the first
 * link would stop, and the customer would see nothing new.
 */
export function isUnchanged(parts: CaseParts, snapshot: RevisionSnapshot, now: Date): boolean {
  const standing = standingRevisionOf(parts);
  if (!standing || standing.expiresAt < now) return false;
  if (parts.approvals.some((approval) => approval.revisionId === standing.id)) return false;
  const asked = ({ headline, finding, warranty, photoIds, jobs }: RevisionSnapshot) =>
    canonicalJson({ headline, finding, warranty, photoIds, jobs });
  return asked(standing.snapshot) === asked(snapshot);
}
