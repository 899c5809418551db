import { allocate } from "./allocate";
import { divideHalfUp, toSafeNumber } from "./round";
import {
  type Discount,
  type LineKind,
  type ParsedFee,
  type QuoteInput,
  quoteInputSchema,
  type Urgency,
} from "./schema";
import { taxJob } from "./tax";

export interface PricedLine {
  id: string | null;
  kind: LineKind;
  description: string;
  quantityMilli: number;
  unitPriceMinor: number;
  /** Unit price times quantity, rounded to the minor unit. */
  grossMinor: number;
  /** The line's own discount and its shares of the job's and the quote's. */
  discountMinor: number;
  /** What is left, in the form prices are written in (with tax when prices include it). */
  amountMinor: number;
  netMinor: number;
  costMinor: number | null;
  taxable?: boolean;
  /** The shop fee this line is a share of. */
  feeId: string | null;
}

export interface TaxAmount {
  id: string;
  label: string;
  amountMinor: number;
}

export interface Sums {
  netMinor: number;
  taxes: TaxAmount[];
  taxMinor: number;
  totalMinor: number;
}

export interface PricedJob extends Sums {
  id: string;
  urgency: Urgency;
  dependsOn: string | null;
  lines: PricedLine[];
}

export interface PricedQuote extends Sums {
  currency: string;
  jobs: PricedJob[];
  discountMinor: number;
  fees: TaxAmount[];
}

/** A part of an amount in hundredths of a percent, rounded half up. */
export const partOf = (amountMinor: number, basisPoints: number): number =>
  toSafeNumber(divideHalfUp(BigInt(amountMinor) * BigInt(basisPoints), 10_000n));

/** Unit price times quantity in thousandths, rounded half up to the minor unit. */
export const lineGross = (unitPriceMinor: number, quantityMilli: number): number =>
  toSafeNumber(divideHalfUp(BigInt(unitPriceMinor) * BigInt(quantityMilli), 1000n));

function discountOn(amountMinor: number, discount: Discount | null | undefined): number {
  if (!discount) return 0;
  return discount.kind === "percent"
    ? partOf(amountMinor, discount.basisPoints)
    : Math.min(discount.amountMinor, amountMinor);
}

const total = (values: readonly number[]) => values.reduce((a, b) => a + b, 0);

/** Takes a discount off several lines in proportion to what each costs, to the last minor unit. */
function takeOff(lines: PricedLine[], discountMinor: number): void {
  if (discountMinor === 0) return;
  const shares = allocate(
    discountMinor,
    lines.map((line) => line.amountMinor),
  );
  for (const [index, line] of lines.entries()) {
    line.discountMinor += shares[index]!;
    line.amountMinor -= shares[index]!;
  }
}

const amountsOf = (lines: readonly PricedLine[]) => total(lines.map((line) => line.amountMinor));

/**
 * Prices a quote. In this order:
 * 1. each line: unit price × quantity, rounded; its own discount off;
 * 2. each job: its discount off, spread over its lines;
 * 3. shop fees: a percentage of the lines it is taken on (at most its cap) or a fixed amount, for the whole quote, and
 *    spread over the jobs in proportion, so that each job carries its share and can be agreed to alone;
 * 4. the quote's discount off everything, fees too, spread over all lines;
 * 5. taxes by job (see `taxJob`).
 * Every sum is the plain sum of its parts: lines make jobs, jobs make the quote. One rounding rule, half up.
 *
 * @throws ZodError when the input is not as `quoteInputSchema` says
 */
export function priceQuote(raw: QuoteInput): PricedQuote {
  const input = quoteInputSchema.parse(raw);
  const lists = input.jobs.map((job) => {
    const lines = job.lines.map((line): PricedLine => {
      const grossMinor = lineGross(line.unitPriceMinor, line.quantityMilli);
      const discountMinor = discountOn(grossMinor, line.discount);
      const amountMinor = grossMinor - discountMinor;
      return {
        id: line.id ?? null,
        kind: line.kind,
        description: line.description,
        quantityMilli: line.quantityMilli,
        unitPriceMinor: line.unitPriceMinor,
        grossMinor,
        discountMinor,
        amountMinor,
        netMinor: 0,
        costMinor: line.costMinor ?? null,
        taxable: line.taxable,
        feeId: null,
      };
    });
    takeOff(lines, discountOn(amountsOf(lines), job.discount));
    return lines;
  });

  const fees = input.fees.map((fee) => addFee(fee, lists));
  const everything = lists.flat();
  takeOff(everything, discountOn(amountsOf(everything), input.discount));

  const jobs = input.jobs.map((job, index): PricedJob => {
    const lines = lists[index]!;
    const taxed = taxJob(lines, input);
    for (const [at, line] of lines.entries()) line.netMinor = taxed.lineNets[at]!;
    const taxes = input.taxes.map(({ id, label }, at) => ({ id, label, amountMinor: taxed.taxes[at]! }));
    const { netMinor, taxMinor, totalMinor } = taxed;
    return {
      id: job.id,
      urgency: job.urgency,
      dependsOn: job.dependsOn ?? null,
      lines,
      netMinor,
      taxes,
      taxMinor,
      totalMinor,
    };
  });
  return {
    currency: input.currency,
    jobs,
    fees,
    discountMinor: total(everything.map((line) => line.discountMinor)),
    ...sumJobs(jobs, input.taxes),
  };
}

/** Adds the fee's share to each job as a line of its own. */
function addFee(fee: ParsedFee, lists: PricedLine[][]): TaxAmount {
  const bases = lists.map((lines) =>
    amountsOf(lines.filter((line) => line.feeId === null && fee.on.includes(line.kind))),
  );
  const base = total(bases);
  const { amount } = fee;
  const wanted =
    amount.kind === "fixed"
      ? amount.amountMinor
      : Math.min(partOf(base, amount.basisPoints), amount.capMinor ?? Number.MAX_SAFE_INTEGER);
  // a fixed fee with nothing to go by is shared by the jobs that have any line, else there is nothing to charge it on
  const weights = base > 0 ? bases : lists.map((lines) => (lines.length > 0 ? 1 : 0));
  const feeMinor = total(weights) > 0 ? wanted : 0;
  const shares = feeMinor > 0 ? allocate(feeMinor, weights) : [];
  for (const [index, share] of shares.entries()) {
    if (share === 0) continue;
    lists[index]!.push({
      id: null,
      kind: "fee",
      description: fee.label,
      quantityMilli: 1000,
      unitPriceMinor: share,
      grossMinor: share,
      discountMinor: 0,
      amountMinor: share,
      netMinor: 0,
      costMinor: null,
      feeId: fee.id,
    });
  }
  return { id: fee.id, label: fee.label, amountMinor: feeMinor };
}

function sumJobs(jobs: readonly PricedJob[], taxes: readonly { id: string; label: string }[]): Sums {
  return {
    netMinor: total(jobs.map((job) => job.netMinor)),
    taxes: taxes.map(({ id, label }, at) => ({
      id,
      label,
      amountMinor: total(jobs.map((job) => job.taxes[at]!.amountMinor)),
    })),
    taxMinor: total(jobs.map((job) => job.taxMinor)),
    totalMinor: total(jobs.map((job) => job.totalMinor)),
  };
}

/**
 * What a customer owes for the jobs they said yes to: the sum of the prices they were shown.
 *
 * @throws RangeError for a job that is not in the quote, or one that needs another which is not chosen
 */
export function totalFor(priced: PricedQuote, chosenJobIds: Iterable<string>): Sums {
  const chosen = new Set(chosenJobIds);
  const jobs = priced.jobs.filter((job) => chosen.has(job.id));
  if (jobs.length !== chosen.size) throw new RangeError("a chosen job is not in this quote");
  const [missing] = missingFor(priced, chosen);
  if (missing) throw new RangeError(`job ${missing.jobId} needs job ${missing.needs}`);
  return sumJobs(jobs, priced.taxes);
}

/** Chosen jobs whose needed job is not chosen as well. */
export function missingFor(priced: PricedQuote, chosen: ReadonlySet<string>): { jobId: string; needs: string }[] {
  return priced.jobs
    .filter((job) => chosen.has(job.id) && job.dependsOn && !chosen.has(job.dependsOn))
    .map((job) => ({ jobId: job.id, needs: job.dependsOn! }));
}
