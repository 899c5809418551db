import { describe, expect, it } from "vitest";
import checks from "@/fixtures/checks/shop-practice.json";
import { type ExcessRule, mustAskAgain } from "@/lib/quote/excess";
import { effectiveRateMinor, marginBasisPoints, markupBasisPoints, priceForMargin } from "@/lib/quote/markup";
import { priceQuote, totalFor } from "@/lib/quote/price";
import { divideHalfUp } from "@/lib/quote/round";
import type { LineKind, QuoteInput, Rounding } from "@/lib/quote/schema";

// every expected value below stands in fixtures/checks/shop-practice.json, each row with its source
interface Check {
  id: string;
  input: Record<string, never>;
  expected: never;
  source: string;
}
const rows = checks as unknown as Check[];
const named = (start: string) => rows.filter((row) => row.id.startsWith(start));
const row = (id: string) => rows.find((each) => each.id === id)!;
const minor = (decimal: string | number) => Number(divideHalfUp(BigInt(Math.round(Number(decimal) * 10_000)), 100n));

const simple = (
  lines: [string, number, LineKind?][],
  rate: number,
  rounding: Rounding,
  kinds: LineKind[] = ["part", "labour", "fee", "diagnosis", "sublet"],
): QuoteInput => ({
  currency: "USD",
  rounding,
  taxes: [{ id: "t", label: "Sales tax", basisPoints: rate, kinds }],
  jobs: [
    {
      id: "j",
      lines: lines.map(([price, quantity, kind = "part"]) => ({
        kind,
        unitPriceMinor: minor(price),
        quantityMilli: quantity * 1000,
      })),
    },
  ],
});

describe("worked examples of shop practice", () => {
  it.each(["tax-total", "tax-diff"])("%s: tax on the total and by line", (id) => {
    const { input, expected } = row(id) as unknown as {
      input: { lines: [string, number][] };
      expected: Record<string, string>;
    };
    const bySum = priceQuote(simple(input.lines, 825, "sum-then-tax"));
    const byLine = priceQuote(simple(input.lines, 825, "line-then-sum"));
    expect(bySum.netMinor).toBe(minor(expected.base!));
    expect(bySum.taxMinor).toBe(minor(expected.tax_on_total!));
    expect(byLine.taxMinor).toBe(minor(expected.tax_per_line!));
  });

  it("rounds tax as the agreement's section 324 says", () => {
    const { input, expected } = row("ssuta-0.3267") as unknown as {
      input: { tax_unrounded: string };
      expected: string;
    };
    expect(Number(divideHalfUp(BigInt(Number(input.tax_unrounded) * 10_000), 100n))).toBe(minor(expected));
  });

  it.each(named("round-"))("$id: a half goes up", ({ input, expected }) => {
    const { amount } = input as unknown as { amount: string };
    const thousandths = BigInt(amount.replace(".", ""));
    expect(Number(divideHalfUp(thousandths, 10n))).toBe(
      Math.round(Number((expected as { half_up: string }).half_up) * 100),
    );
  });

  // the one worked invoice in its three tax forms
  const source = (
    row("invoice-parts-taxed") as unknown as {
      input: Record<string, { price: string; qty: number; hours: string; rate: string }[] & string>;
    }
  ).input;
  const lines: [string, number, LineKind][] = [
    ...source.parts!.map((part): [string, number, LineKind] => [part.price, part.qty, "part"]),
    ...source.labour!.map((work): [string, number, LineKind] => [work.rate, Number(work.hours), "labour"]),
    [source.shop_supplies!, 1, "fee"],
    [source.disposal!, 1, "fee"],
  ];

  it("prices the worked invoice with parts taxed", () => {
    const { expected } = row("invoice-parts-taxed") as unknown as { expected: Record<string, string> };
    const priced = priceQuote(simple(lines, 825, "sum-then-tax", ["part"]));
    const of = (kind: LineKind) =>
      priced.jobs[0]!.lines.filter((line) => line.kind === kind).reduce((sum, line) => sum + line.netMinor, 0);
    expect([of("part"), of("labour"), priced.taxMinor, priced.totalMinor]).toEqual(
      ["parts", "labour", "tax", "total"].map((name) => minor(expected[name]!)),
    );
  });

  it("prices the worked invoice with everything taxed, and with value-added tax on top or inside", () => {
    const taxed = row("invoice-all-taxed") as unknown as { expected: { tax: string; total: string } };
    const all = priceQuote(simple(lines, 825, "sum-then-tax"));
    expect([all.taxMinor, all.totalMinor]).toEqual([minor(taxed.expected.tax), minor(taxed.expected.total)]);
    const vat = (row("invoice-vat") as unknown as { expected: { net: string; vat: string; gross: string } }).expected;
    const onTop = priceQuote(simple(lines, 2000, "sum-then-tax"));
    expect([onTop.netMinor, onTop.taxMinor, onTop.totalMinor]).toEqual([
      minor(vat.net),
      minor(vat.vat),
      minor(vat.gross),
    ]);
    const inside = priceQuote({ ...simple([[vat.gross, 1]], 2000, "sum-then-tax"), pricesIncludeTax: true });
    expect([inside.netMinor, inside.taxMinor, inside.totalMinor]).toEqual([
      minor(vat.net),
      minor(vat.vat),
      minor(vat.gross),
    ]);
  });

  it.each(named("overage-"))("$id: when to ask again", ({ input, expected }) => {
    const { authorised, needed } = input as unknown as { authorised: number; needed: number };
    const rules: Record<string, ExcessRule> = {
      any_excess: "any",
      lesser_of_10_or_10pct: "lesser-10-or-10pct",
      greater_of_10_or_10pct_cap_50: "greater-10-or-10pct-cap-50",
      ten_pct: "10pct",
    };
    for (const [name, rule] of Object.entries(rules))
      expect(mustAskAgain(rule, authorised * 100, needed * 100) ? "ask" : "ok", name).toBe(expected[name as never]);
  });

  it.each(named("margin-").filter((each) => "cost" in each.input))("$id: margin and markup", ({ input, expected }) => {
    const { cost, price } = input as unknown as { cost: number; price: number };
    const { margin_pct, markup_pct } = expected as unknown as { margin_pct: number; markup_pct: number };
    expect(marginBasisPoints(minor(price), minor(cost))).toBe(Math.round(margin_pct * 100));
    expect(markupBasisPoints(minor(price), minor(cost))).toBe(Math.round(markup_pct * 100));
  });

  it.each(named("price-from-margin"))("$id: price for a margin", ({ input, expected }) => {
    const { cost, target_margin_pct } = input as unknown as { cost: number; target_margin_pct: number };
    expect(priceForMargin(minor(cost), target_margin_pct * 100)).toBe(minor(expected));
  });

  it.each(named("labour-"))("$id: the rate really earned", ({ input, expected }) => {
    const { labour_sales, sold_h } = input as unknown as { labour_sales: number; sold_h: number };
    expect(effectiveRateMinor(labour_sales * 100, sold_h * 1000)).toBe(
      minor((expected as { effective_rate: number }).effective_rate),
    );
  });
});

describe("rules in particular", () => {
  const base: QuoteInput = {
    currency: "USD",
    taxes: [{ id: "t", label: "Tax", basisPoints: 1000, kinds: ["part", "labour", "fee"] }],
    jobs: [
      { id: "a", lines: [{ kind: "labour", quantityMilli: 2000, unitPriceMinor: 10_000 }] },
      { id: "b", dependsOn: "a", lines: [{ kind: "part", quantityMilli: 1000, unitPriceMinor: 10_000 }] },
    ],
  };

  // worked by hand from the written rule: 3 % of 300.00 is 9.00, capped at 6.00, shared 2 : 1
  it("spreads a capped shop fee over the jobs that cause it", () => {
    const priced = priceQuote({
      ...base,
      fees: [
        {
          id: "s",
          label: "Supplies",
          on: ["labour", "part"],
          amount: { kind: "percent", basisPoints: 300, capMinor: 600 },
        },
      ],
    });
    expect(priced.fees[0]!.amountMinor).toBe(600);
    expect(priced.jobs.map((job) => job.netMinor)).toEqual([20_400, 10_200]);
    expect(priced.totalMinor).toBe(33_660);
  });

  // a tax of 5 % and one of 9.975 % on top of it: 100.00 + 5.00, 10.47375 on 105.00, rounded 10.47
  it("takes a compound tax on the taxes before it", () => {
    const taxes = [
      { id: "one", label: "One", basisPoints: 500, kinds: ["part" as const] },
      { id: "two", label: "Two", basisPoints: 1000, kinds: ["part" as const], compound: true },
    ];
    const priced = priceQuote({
      ...base,
      taxes,
      jobs: [{ id: "a", lines: [{ kind: "part", quantityMilli: 1000, unitPriceMinor: 10_000 }] }],
    });
    expect(priced.taxes.map((tax) => tax.amountMinor)).toEqual([500, 1050]);
  });

  it("takes no tax from an exempt customer, and takes it out of prices that include it", () => {
    expect(priceQuote({ ...base, exempt: true }).totalMinor).toBe(30_000);
    const inside = priceQuote({
      ...base,
      exempt: true,
      pricesIncludeTax: true,
      jobs: [{ id: "a", lines: [{ kind: "part", quantityMilli: 1000, unitPriceMinor: 11_000 }] }],
    });
    expect([inside.netMinor, inside.taxMinor, inside.totalMinor]).toEqual([10_000, 0, 10_000]);
  });

  it("refuses a job without the one it needs, and a job of another quote", () => {
    const priced = priceQuote(base);
    expect(totalFor(priced, ["a", "b"]).totalMinor).toBe(33_000);
    expect(totalFor(priced, ["a"]).totalMinor).toBe(22_000);
    expect(() => totalFor(priced, ["b"])).toThrow("needs");
    expect(() => totalFor(priced, ["a", "x"])).toThrow("not in this quote");
  });

  it("names each fault of an input with its place", () => {
    const faulty = {
      ...base,
      currency: "XQX",
      jobs: [
        { id: "a", dependsOn: "b", lines: [{ kind: "part" as const, quantityMilli: -1, unitPriceMinor: 1e12 }] },
        { id: "b", dependsOn: "a", lines: [] },
      ],
    };
    const fault = (() => {
      try {
        priceQuote(faulty);
      } catch (error) {
        return (error as { issues: { path: unknown[] }[] }).issues.map((issue) => issue.path.join("."));
      }
      return [];
    })();
    expect(fault).toEqual(
      expect.arrayContaining(["currency", "jobs.0.lines.0.quantityMilli", "jobs.0.lines.0.unitPriceMinor"]),
    );
    expect(() =>
      priceQuote({ ...faulty, currency: "USD", jobs: faulty.jobs.map((job) => ({ ...job, lines: [] })) }),
    ).toThrow("circle");
  });
});
