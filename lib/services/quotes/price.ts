import "server-only";
import type { CaseParts } from "@/db/queries/cases";
import type { RevisionSnapshot } from "@/lib/cases/quote-schema";
import { type JobPrice, netWithin, priceAmount, type ShopTax } from "@/lib/quote/job";
import { lineGross } from "@/lib/quote/price";
import type { ShopSettings } from "@/lib/shops/schema";
import { ceilingOf, diagnosisMinutes, settingsOf } from "../cases/facts";

export const taxOf = (settings: ShopSettings): ShopTax => ({
  basisPoints: settings.taxBasisPoints,
  kinds: settings.taxKinds,
  rounding: settings.rounding,
});

export function diagnosisCeilingNet(parts: CaseParts): number | null {
  const ceiling = ceilingOf(parts);
  return ceiling === null ? null : netWithin(ceiling, "diagnosis", taxOf(settingsOf(parts)));
}

export interface DiagnosisPrice extends JobPrice {
  hoursMilli: number;
  perHourMinor: number;
  ceilingMinor: number;
}

/** The diagnosis: time on the clock in tenths of an hour at the rate agreed at intake, never above the ceiling. */
export function priceDiagnosis(parts: CaseParts, now: Date): DiagnosisPrice | null {
  const ceilingMinor = ceilingOf(parts);
  if (ceilingMinor === null) return null;
  const tax = taxOf(settingsOf(parts));
  const perHourMinor = parts.row.rates?.diagnosis ?? parts.row.rates?.general ?? 0;
  const hoursMilli = Math.ceil(diagnosisMinutes(parts, now) / 6) * 100;
  const byClock = lineGross(perHourMinor, hoursMilli);
  const netMinor = Math.min(parts.draft?.diagnosisNetMinor ?? byClock, netWithin(ceilingMinor, "diagnosis", tax));
  return { ...priceAmount(netMinor, "diagnosis", tax), hoursMilli, perHourMinor, ceilingMinor };
}

/** What a customer owes if these jobs are done: the diagnosis, what was agreed before, and each yes. Sums of parts, so they add up. */
export function answeredTotal(snapshot: RevisionSnapshot, yes: ReadonlySet<string>): number {
  return (
    snapshot.totals.startsAtMinor +
    snapshot.jobs.filter((job) => yes.has(job.id)).reduce((sum, job) => sum + job.totalMinor, 0)
  );
}
