import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type PricedQuote, priceQuote, totalFor } from "@/lib/quote/price";
import type { Discount, QuoteInput } from "@/lib/quote/schema";
import { quotes, RUNS } from "./arbitraries";
import { distance, exactJob, f, halfUp, over, times } from "./exact";

const total = (values: readonly number[]) => values.reduce((a, b) => a + b, 0);
const LONG_MS = 20_000 + RUNS * 6;

/** Checks a statement for every random quote. */
function always(statement: (priced: PricedQuote, quote: QuoteInput) => void): void {
  fc.assert(
    fc.property(quotes, (quote) => statement(priceQuote(quote), quote)),
    { numRuns: RUNS },
  );
}

const exactDiscount = (amountMinor: number, discount: Discount | null | undefined): number => {
  if (!discount) return 0;
  if (discount.kind === "amount") return Math.min(discount.amountMinor, amountMinor);
  return halfUp(times(f(amountMinor), f(discount.basisPoints, 10_000)));
};

describe("a priced quote", () => {
  it(
    "adds up: lines make jobs, jobs make the quote, net and taxes make the total",
    () => {
      always((priced, quote) => {
        for (const job of priced.jobs) {
          expect(total(job.lines.map((line) => line.netMinor))).toBe(job.netMinor);
          expect(total(job.taxes.map((tax) => tax.amountMinor))).toBe(job.taxMinor);
          expect(job.netMinor + job.taxMinor).toBe(job.totalMinor);
          for (const line of job.lines) expect(line.grossMinor - line.discountMinor).toBe(line.amountMinor);
          const written = total(job.lines.map((line) => line.amountMinor));
          if (!quote.pricesIncludeTax) expect(job.netMinor).toBe(written);
          else if (!quote.exempt) expect(job.totalMinor).toBe(written);
        }
        expect(total(priced.jobs.map((job) => job.netMinor))).toBe(priced.netMinor);
        expect(total(priced.jobs.map((job) => job.totalMinor))).toBe(priced.totalMinor);
        expect(priced.netMinor + priced.taxMinor).toBe(priced.totalMinor);
        for (const [index, tax] of priced.taxes.entries())
          expect(total(priced.jobs.map((job) => job.taxes[index]!.amountMinor))).toBe(tax.amountMinor);
      });
    },
    LONG_MS,
  );

  it(
    "has the taxes of an exact computation with fractions, in both roundings, with and without tax in the prices",
    () => {
      always((priced, quote) => {
        for (const job of priced.jobs) {
          const exact = exactJob(quote, job);
          expect({ net: job.netMinor, tax: job.taxMinor }).toEqual(exact);
        }
      });
    },
    LONG_MS,
  );

  it(
    "takes off what its discounts say, never more than there is, and loses nothing in spreading them",
    () => {
      always((priced, quote) => {
        let expected = 0;
        let remaining = 0;
        for (const [index, job] of quote.jobs.entries()) {
          let left = 0;
          for (const line of job.lines) {
            const gross = halfUp(times(f(line.unitPriceMinor), f(line.quantityMilli, 1000)));
            const off = exactDiscount(gross, line.discount);
            expected += off;
            left += gross - off;
          }
          const off = exactDiscount(left, job.discount);
          expected += off;
          remaining += left - off;
          for (const line of priced.jobs[index]!.lines) expect(line.amountMinor).toBeGreaterThanOrEqual(0);
        }
        const whole = remaining + total(priced.fees.map((fee) => fee.amountMinor));
        expected += exactDiscount(whole, quote.discount);
        expect(priced.discountMinor).toBe(expected);
      });
    },
    LONG_MS,
  );

  it(
    "charges each shop fee once, capped, on the lines it names",
    () => {
      const plain = quotes.map((quote) => ({ ...quote, discount: null }));
      fc.assert(
        fc.property(plain, (quote) => {
          const priced = priceQuote(quote);
          for (const [index, fee] of (quote.fees ?? []).entries()) {
            const lines = priced.jobs.flatMap((job) => job.lines);
            const base = total(
              lines
                .filter((line) => line.feeId === null && (fee.on as string[]).includes(line.kind))
                .map((line) => line.amountMinor),
            );
            const hasLines =
              quote.jobs.some((job) => job.lines.length > 0) || priced.jobs.some((job) => job.lines.length > 0);
            const wanted =
              fee.amount.kind === "fixed"
                ? fee.amount.amountMinor
                : Math.min(
                    halfUp(times(f(base), f(fee.amount.basisPoints, 10_000))),
                    fee.amount.capMinor ?? Number.POSITIVE_INFINITY,
                  );
            expect(priced.fees[index]!.amountMinor).toBe(hasLines ? wanted : 0);
            expect(total(lines.filter((line) => line.feeId === fee.id).map((line) => line.grossMinor))).toBe(
              priced.fees[index]!.amountMinor,
            );
          }
        }),
        { numRuns: RUNS },
      );
    },
    LONG_MS,
  );

  it(
    "has no price, tax or discount below zero",
    () => {
      always((priced) => {
        for (const job of priced.jobs) {
          for (const line of job.lines)
            expect(
              Math.min(line.grossMinor, line.discountMinor, line.amountMinor, line.netMinor),
            ).toBeGreaterThanOrEqual(0);
          for (const tax of job.taxes) expect(tax.amountMinor).toBeGreaterThanOrEqual(0);
        }
      });
    },
    LONG_MS,
  );

  it(
    "asks for chosen jobs exactly the sum of the prices shown",
    () => {
      fc.assert(
        fc.property(quotes, fc.infiniteStream(fc.boolean()), (quote, coin) => {
          const priced = priceQuote(quote);
          const chosen = new Set<string>();
          for (const job of priced.jobs)
            if (coin.next().value && (!job.dependsOn || chosen.has(job.dependsOn))) chosen.add(job.id);
          const shown = priced.jobs.filter((job) => chosen.has(job.id));
          const owed = totalFor(priced, chosen);
          expect(owed.totalMinor).toBe(total(shown.map((job) => job.totalMinor)));
          expect(owed.netMinor + owed.taxMinor).toBe(owed.totalMinor);
          expect(
            totalFor(
              priced,
              priced.jobs.map((job) => job.id),
            ).totalMinor,
          ).toBe(priced.totalMinor);
        }),
        { numRuns: RUNS },
      );
    },
    LONG_MS,
  );

  it(
    "comes to the same with tax in the prices or on top, but for the roundings that the rule names",
    () => {
      fc.assert(
        fc.property(quotes, (quote) => {
          const inclusive = priceQuote({ ...quote, pricesIncludeTax: true, exempt: false, fees: [], discount: null });
          for (const job of inclusive.jobs) {
            const source = quote.jobs.find((each) => each.id === job.id)!;
            // the same job written without tax: each line at the net price found
            const again = priceQuote({
              ...quote,
              pricesIncludeTax: false,
              exempt: false,
              fees: [],
              discount: null,
              jobs: [
                {
                  ...source,
                  dependsOn: null,
                  discount: null,
                  lines: source.lines.map((line, at) => ({
                    ...line,
                    discount: null,
                    quantityMilli: 1000,
                    unitPriceMinor: Math.min(job.lines[at]!.netMinor, 100_000_000),
                  })),
                },
              ],
            });
            if (job.lines.some((line) => line.netMinor > 100_000_000)) continue;
            // half a unit for the net price of each line, times one and all rates, and half a unit for every tax rounded
            const rate = quote.taxes.reduce(
              (sum, tax) =>
                tax.compound ? sum + (1 + sum) * (tax.basisPoints / 10_000) : sum + tax.basisPoints / 10_000,
              0,
            );
            const bound =
              job.lines.length * (1 + rate) +
              quote.taxes.length * Math.max(1, quote.rounding === "line-then-sum" ? job.lines.length : 1) * 0.5 +
              1;
            expect(Math.abs(again.totalMinor - job.totalMinor)).toBeLessThanOrEqual(bound);
          }
        }),
        { numRuns: RUNS },
      );
    },
    LONG_MS,
  );

  it(
    "spreads a discount in proportion, each line within one minor unit of its exact share",
    () => {
      const lines = fc.array(fc.integer({ min: 0, max: 1_000_000 }), { minLength: 1, maxLength: 12 });
      fc.assert(
        fc.property(lines, fc.integer({ min: 0, max: 10_000 }), (prices, basisPoints) => {
          const sum = total(prices);
          fc.pre(sum > 0);
          const quote = {
            currency: "USD",
            taxes: [],
            jobs: [
              {
                id: "a",
                lines: prices.map((unitPriceMinor) => ({ kind: "part" as const, quantityMilli: 1000, unitPriceMinor })),
              },
            ],
            discount: { kind: "percent" as const, basisPoints },
          };
          const priced = priceQuote(quote);
          const off = halfUp(times(f(sum), f(basisPoints, 10_000)));
          for (const [index, line] of priced.jobs[0]!.lines.entries())
            expect(distance(over(times(f(off), f(prices[index]!)), f(sum)), line.discountMinor)).toBeLessThan(1);
        }),
        { numRuns: Math.min(RUNS, 5000) },
      );
    },
    LONG_MS,
  );
});
