import { add, divide, multiply, ONE, type Ratio, ratio, roundHalfUp, spread, sum, ZERO } from "./ratio";
import type { LineKind, Rounding, Tax } from "./schema";

/** A line as tax sees it: what it costs after every discount, and whether it is taxed against its kind's rule. */
export interface TaxedLine {
  kind: LineKind;
  amountMinor: number;
  taxable?: boolean;
}

export interface TaxRule {
  taxes: readonly Tax[];
  pricesIncludeTax: boolean;
  exempt: boolean;
  rounding: Rounding;
}

export interface TaxedJob {
  /** In the order of the lines; they add up to `netMinor`. */
  lineNets: number[];
  netMinor: number;
  /** In the order of the taxes. */
  taxes: number[];
  taxMinor: number;
  totalMinor: number;
}

const applies = (tax: Tax, line: TaxedLine): boolean => line.taxable ?? tax.kinds.includes(line.kind);

/**
 * What each tax takes of one unit of a line's net price. A compound tax is taken on the net price and the taxes before
 * it, these exact and unrounded; so the rate of a line is one fraction, and rounding happens once, at the end.
 */
export function ratesOf(taxes: readonly Tax[], line: TaxedLine): Ratio[] {
  const rates: Ratio[] = [];
  for (const tax of taxes) {
    const base = tax.compound ? add(ONE, sum(rates)) : ONE;
    rates.push(applies(tax, line) ? multiply(ratio(tax.basisPoints, 10_000), base) : ZERO);
  }
  return rates;
}

/**
 * Net price and taxes of one job. The job is what a customer says yes or no to, so it is also where rounding ends: its
 * price with tax is a whole number of minor units, and the total of a quote is the plain sum of its jobs.
 *
 * Rounding `line-then-sum`: each tax is rounded on each line, then added. `sum-then-tax`: each tax is taken on the sum
 * of the job's lines and rounded once.
 *
 * When prices include tax, the price stays as written: the net price is rounded (by line or by job, as above), and the
 * difference is the tax, split over several taxes by largest remainder. An exempt customer pays the net price.
 */
export function taxJob(lines: readonly TaxedLine[], rule: TaxRule): TaxedJob {
  const rates = lines.map((line) => ratesOf(rule.taxes, line));
  return rule.pricesIncludeTax ? inclusive(lines, rates, rule) : exclusive(lines, rates, rule);
}

const total = (values: readonly number[]) => values.reduce((a, b) => a + b, 0);

function assemble(lineNets: number[], taxes: number[]): TaxedJob {
  const [netMinor, taxMinor] = [total(lineNets), total(taxes)];
  return { lineNets, netMinor, taxes, taxMinor, totalMinor: netMinor + taxMinor };
}

function exclusive(lines: readonly TaxedLine[], rates: Ratio[][], { taxes, exempt, rounding }: TaxRule): TaxedJob {
  const nets = lines.map((line) => line.amountMinor);
  if (exempt)
    return assemble(
      nets,
      taxes.map(() => 0),
    );
  const amounts = taxes.map((_, index) => {
    const exact = nets.map((net, at) => multiply(ratio(net), rates[at]![index]!));
    return rounding === "line-then-sum" ? total(exact.map(roundHalfUp)) : roundHalfUp(sum(exact));
  });
  return assemble(nets, amounts);
}

function inclusive(lines: readonly TaxedLine[], rates: Ratio[][], { taxes, exempt, rounding }: TaxRule): TaxedJob {
  const exactNets = lines.map((line, at) => divide(ratio(line.amountMinor), add(ONE, sum(rates[at]!))));
  const exactTaxes = taxes.map((_, index) => exactNets.map((net, at) => multiply(net, rates[at]![index]!)));
  if (rounding === "line-then-sum") {
    const nets = exactNets.map(roundHalfUp);
    const byLine = lines.map((line, at) =>
      spread(
        line.amountMinor - nets[at]!,
        exactTaxes.map((list) => list[at]!),
      ),
    );
    return assemble(
      nets,
      taxes.map((_, index) => (exempt ? 0 : total(byLine.map((list) => list[index] ?? 0)))),
    );
  }
  const net = roundHalfUp(sum(exactNets));
  const nets = spread(net, exactNets);
  const amounts = spread(total(lines.map((line) => line.amountMinor)) - net, exactTaxes.map(sum));
  return assemble(nets, exempt ? taxes.map(() => 0) : amounts);
}
