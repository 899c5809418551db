import fc from "fast-check";
import { LINE_KINDS, type QuoteInput, ROUNDINGS, URGENCIES } from "@/lib/quote/schema";

/** How many random quotes each property sees; the bench sets 100000. */
export const RUNS = Number(process.env.QUOTE_RUNS ?? 1000);

const amount = fc.oneof(
  { weight: 6, arbitrary: fc.integer({ min: 0, max: 200_000 }) },
  { weight: 1, arbitrary: fc.integer({ min: 0, max: 100_000_000 }) },
);
const rate = fc.oneof(fc.constantFrom(0, 825, 1000, 1900, 2000, 550), fc.integer({ min: 0, max: 10_000 }));
const kinds = fc.subarray([...LINE_KINDS]);
const discount = fc.option(
  fc.oneof(
    fc.record({ kind: fc.constant("percent" as const), basisPoints: rate }),
    fc.record({ kind: fc.constant("amount" as const), amountMinor: amount }),
  ),
  { freq: 3, nil: null },
);

const line = fc.record({
  kind: fc.constantFrom(...LINE_KINDS),
  description: fc.constant("x"),
  quantityMilli: fc.oneof(fc.constant(1000), fc.integer({ min: 0, max: 20_000 })),
  unitPriceMinor: amount,
  taxable: fc.option(fc.boolean(), { freq: 8, nil: undefined }),
  discount,
});

const job = fc.record({
  urgency: fc.constantFrom(...URGENCIES),
  lines: fc.array(line, { maxLength: 5 }),
  discount,
  needsEarlier: fc.nat({ max: 12 }),
});

const tax = fc.record({ label: fc.constant("t"), basisPoints: rate, kinds, compound: fc.boolean() });
const fee = fc.record({
  label: fc.constant("f"),
  on: kinds,
  amount: fc.oneof(
    fc.record({ kind: fc.constant("percent" as const), basisPoints: rate, capMinor: fc.option(amount, { nil: null }) }),
    fc.record({ kind: fc.constant("fixed" as const), amountMinor: amount }),
  ),
});

/** Any quote that the schema takes, dependencies among jobs included. */
export const quotes: fc.Arbitrary<QuoteInput> = fc
  .record({
    currency: fc.constantFrom("USD", "JPY", "KWD"),
    jobs: fc.array(job, { maxLength: 4 }),
    taxes: fc.array(tax, { maxLength: 3 }),
    fees: fc.array(fee, { maxLength: 2 }),
    discount,
    pricesIncludeTax: fc.boolean(),
    exempt: fc.boolean().map((exempt) => exempt),
    rounding: fc.constantFrom(...ROUNDINGS),
  })
  .map(({ jobs, taxes, fees, ...rest }) => ({
    ...rest,
    jobs: jobs.map(({ needsEarlier, ...each }, index) => ({
      ...each,
      id: `job${index}`,
      dependsOn: needsEarlier < index ? `job${needsEarlier}` : null,
    })),
    taxes: taxes.map((each, index) => ({ ...each, id: `tax${index}` })),
    fees: fees.map((each, index) => ({ ...each, id: `fee${index}` })),
  }));
