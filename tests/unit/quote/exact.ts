import { all, create, type Fraction } from "mathjs";
import type { PricedJob } from "@/lib/quote/price";
import type { QuoteInput } from "@/lib/quote/schema";

// an independent way to the same sums: exact fractions of a mathematics library, from the written rule alone
const math = create(all!, { number: "Fraction" });
export const f = (value: number | bigint, over: number | bigint = 1) =>
  math.fraction(Number(value), Number(over)) as Fraction;
export const plus = (a: Fraction, b: Fraction) => math.add(a, b) as Fraction;
export const minus = (a: Fraction, b: Fraction) => math.subtract(a, b) as Fraction;
export const times = (a: Fraction, b: Fraction) => math.multiply(a, b) as Fraction;
export const over = (a: Fraction, b: Fraction) => math.divide(a, b) as Fraction;
export const sumOf = (values: Fraction[]) => values.reduce(plus, f(0));

/** Half up, for amounts that are not negative: the greatest whole number not above x + 1/2. */
export const halfUp = (x: Fraction): number =>
  Number((math.floor(plus(x, f(1, 2)) as never) as unknown as Fraction).valueOf());
export const distance = (a: Fraction, b: number): number => Math.abs(Number(minus(a, f(b)).valueOf()));

/** Rates of a line, tax by tax, a compound one on top of those before it. */
export function rates(quote: QuoteInput, line: { kind: string; taxable?: boolean }): Fraction[] {
  const found: Fraction[] = [];
  for (const tax of quote.taxes) {
    const isDue = line.taxable ?? (tax.kinds as string[]).includes(line.kind);
    const base = tax.compound ? plus(f(1), sumOf(found)) : f(1);
    found.push(isDue ? times(f(tax.basisPoints, 10_000), base) : f(0));
  }
  return found;
}

/** Net price and taxes of a job by the written rule, from the amounts of its lines. */
export function exactJob(quote: QuoteInput, job: PricedJob): { net: number; tax: number } {
  const byLine = quote.rounding === "line-then-sum";
  const lines = job.lines.map((line) => ({ amount: f(line.amountMinor), rates: rates(quote, line) }));
  if (quote.pricesIncludeTax) {
    const nets = lines.map((line) => over(line.amount, plus(f(1), sumOf(line.rates))));
    const net = byLine ? nets.map(halfUp).reduce((a, b) => a + b, 0) : halfUp(sumOf(nets));
    const gross = job.lines.reduce((sum, line) => sum + line.amountMinor, 0);
    return { net, tax: quote.exempt ? 0 : gross - net };
  }
  const net = job.lines.reduce((sum, line) => sum + line.amountMinor, 0);
  if (quote.exempt) return { net, tax: 0 };
  const tax = quote.taxes.reduce((sum, _, index) => {
    const exact = lines.map((line) => times(line.amount, line.rates[index]!));
    return sum + (byLine ? exact.map(halfUp).reduce((a, b) => a + b, 0) : halfUp(sumOf(exact)));
  }, 0);
  return { net, tax };
}
