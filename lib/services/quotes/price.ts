import "server-only";
import type { CaseParts } from "@/db/queries/cases";
import type { LineKind, QuoteLineDraft, RevisionSnapshot } from "@/lib/cases/quote-schema";
import type { ShopSettings } from "@/lib/shops/schema";
import { ceilingOf, diagnosisMinutes, settingsOf } from "../cases/facts";

/** Half a minor unit and above goes up; both factors are integers, so nothing is lost before the one division. */
const scaled = (amount: number, factor: number, scale: number) =>
  Number((BigInt(amount) * BigInt(factor) * 2n + BigInt(scale)) / (2n * BigInt(scale)));

export const lineNet = (line: Pick<QuoteLineDraft, "quantityMilli" | "unitPriceMinor">) =>
  scaled(line.unitPriceMinor, line.quantityMilli, 1000);

export interface PricedJob {
  netMinor: number;
  taxMinor: number;
  totalMinor: number;
  lineNets: number[];
}

type TaxRule = Pick<ShopSettings, "taxBasisPoints" | "taxKinds" | "rounding">;

/** One job's price. Each line is rounded to the cent first; tax is rounded by line or once over the job, as the shop has set. */
export function priceJob(
  lines: readonly (Pick<QuoteLineDraft, "quantityMilli" | "unitPriceMinor"> & { kind: LineKind })[],
  rule: TaxRule,
): PricedJob {
  const lineNets = lines.map(lineNet);
  const netMinor = lineNets.reduce((sum, net) => sum + net, 0);
  const taxable = lineNets.filter((_, index) => rule.taxKinds.includes(lines[index]!.kind));
  const taxMinor =
    rule.rounding === "line-then-sum"
      ? taxable.reduce((sum, net) => sum + scaled(net, rule.taxBasisPoints, 10_000), 0)
      : scaled(
          taxable.reduce((sum, net) => sum + net, 0),
          rule.taxBasisPoints,
          10_000,
        );
  return { netMinor, taxMinor, totalMinor: netMinor + taxMinor, lineNets };
}

export const priceAmount = (netMinor: number, kind: LineKind, rule: TaxRule) =>
  priceJob([{ kind, quantityMilli: 1000, unitPriceMinor: netMinor }], rule);

/** The highest net whose total with tax stays inside what was agreed; the ceiling is agreed tax included. */
export function netWithin(totalMinor: number, kind: LineKind, rule: TaxRule): number {
  let net = rule.taxKinds.includes(kind) ? scaled(totalMinor, 10_000, 10_000 + rule.taxBasisPoints) : totalMinor;
  while (net > 0 && priceAmount(net, kind, rule).totalMinor > totalMinor) net -= 1;
  return net;
}

export function diagnosisCeilingNet(parts: CaseParts): number | null {
  const ceiling = ceilingOf(parts);
  return ceiling === null ? null : netWithin(ceiling, "diagnosis", settingsOf(parts));
}

export interface DiagnosisPrice extends PricedJob {
  hoursMilli: number;
  perHourMinor: number;
  /** What the clock alone would come to, before the ceiling; for the strip. */
  ceilingMinor: number | null;
}

/** The diagnosis: time on the clock in tenths of an hour at the rate agreed at intake, never above the ceiling. */
export function priceDiagnosis(parts: CaseParts, now: Date): DiagnosisPrice | null {
  const ceilingMinor = ceilingOf(parts);
  if (ceilingMinor === null) return null;
  const settings = settingsOf(parts);
  const perHourMinor = parts.row.rates?.diagnosis ?? parts.row.rates?.general ?? 0;
  const tenths = Math.ceil(diagnosisMinutes(parts, now) / 6);
  const byClock = scaled(perHourMinor, tenths, 10);
  const netMinor = Math.min(parts.draft?.diagnosisNetMinor ?? byClock, netWithin(ceilingMinor, "diagnosis", settings));
  return { ...priceAmount(netMinor, "diagnosis", settings), hoursMilli: tenths * 100, perHourMinor, ceilingMinor };
}

/** What a customer owes if these jobs are done: the diagnosis, what was agreed before, and each yes. Sums of parts, so they add up. */
export function answeredTotal(snapshot: RevisionSnapshot, yes: ReadonlySet<string>): number {
  return (
    snapshot.totals.startsAtMinor +
    snapshot.jobs.filter((job) => yes.has(job.id)).reduce((sum, job) => sum + job.totalMinor, 0)
  );
}
