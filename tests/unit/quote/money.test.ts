import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { allocate } from "@/lib/quote/allocate";
import { priceFromCost } from "@/lib/quote/markup";
import { formatMoney, minorDigits, parseMoney, toDecimal } from "@/lib/quote/money";
import { formatQuantity, parseQuantity } from "@/lib/quote/quantity";
import { isExemptOn } from "@/lib/quote/schema";

describe("money", () => {
  // ISO 4217, list one: minor units 0, 2 and 3
  it.each([
    ["JPY", 0],
    ["USD", 2],
    ["EUR", 2],
    ["KWD", 3],
  ] as const)("%s has %i decimals", (currency, digits) => expect(minorDigits(currency)).toBe(digits));

  it("refuses what is no currency", () => expect(() => minorDigits("XQX")).toThrow("XQX"));

  // Unicode CLDR's patterns, as the runtime's tables hold them
  it.each([
    [74987, "USD", "en-US", "$749.87"],
    [-74987, "USD", "en-US", "−$749.87"],
    [74987, "EUR", "de-DE", "749,87 €"],
    [123456789, "EUR", "de-DE", "1.234.567,89 €"],
    [74987, "JPY", "en-US", "¥74,987"],
    [1, "KWD", "en-US", "KWD 0.001"],
    [9007199254740991, "USD", "en-US", "$90,071,992,547,409.91"],
  ])("%i %s in %s is %s", (minor, currency, locale, text) =>
    expect(formatMoney(minor, currency, locale).replace(/[\u00a0\u202f]/g, " ")).toBe(text),
  );

  it.each([
    ["749.87", "USD", "en-US", 74987],
    ["$1,234.5", "USD", "en-US", 123450],
    ["1.234,50 €", "EUR", "de-DE", 123450],
    ["1 234,5", "EUR", "fr-FR", 123450],
    ["−3", "USD", "en-US", -300],
    [".5", "USD", "en-US", 50],
    ["1.500", "USD", "en-US", 150],
    ["80", "JPY", "en-US", 80],
  ])("reads %s %s in %s", (text, currency, locale, minor) =>
    expect(parseMoney(text, currency, locale)).toEqual({ ok: true, minor }),
  );

  it.each([
    ["", "USD", "en-US", "empty"],
    ["1,5", "USD", "en-US", "not-a-number"],
    ["1.5.2", "USD", "en-US", "not-a-number"],
    ["12e3", "USD", "en-US", "not-a-number"],
    ["abc", "USD", "en-US", "not-a-number"],
    [".", "USD", "en-US", "not-a-number"],
    ["1.005", "USD", "en-US", "too-many-decimals"],
    ["0.5", "JPY", "en-US", "too-many-decimals"],
    ["99999999999999999", "USD", "en-US", "too-large"],
  ])("refuses %s %s in %s: %s", (text, currency, locale, reason) =>
    expect(parseMoney(text, currency, locale)).toEqual({ ok: false, reason }),
  );

  it("reads back whatever it wrote, in every language and currency", () => {
    const locales = fc.constantFrom("en-US", "en-GB", "de-DE", "fr-FR", "es-ES", "de-CH");
    const currencies = fc.constantFrom("USD", "EUR", "GBP", "JPY", "KWD");
    fc.assert(
      fc.property(fc.integer({ min: -1e12, max: 1e12 }), currencies, locales, (minor, currency, locale) => {
        expect(parseMoney(formatMoney(minor, currency, locale), currency, locale)).toEqual({ ok: true, minor });
      }),
    );
  });

  it("writes decimals without dividing", () => {
    expect([toDecimal(5, 2), toDecimal(-5, 2), toDecimal(500, 0), toDecimal(0, 3)]).toEqual([
      "0.05",
      "-0.05",
      "500",
      "0.000",
    ]);
  });
});

describe("quantities", () => {
  it("are thousandths, written without needless zeros", () => {
    expect([formatQuantity(2400, "en-US"), formatQuantity(1000, "en-US"), formatQuantity(1, "de-DE")]).toEqual([
      "2.4",
      "1",
      "0,001",
    ]);
  });
  it("are refused rather than rounded", () => {
    expect(parseQuantity("2.4", "en-US")).toEqual({ ok: true, minor: 2400 });
    expect(parseQuantity("2.4005", "en-US")).toEqual({ ok: false, reason: "too-many-decimals" });
  });
});

describe("allocate", () => {
  const weights = fc
    .array(fc.nat({ max: 1e9 }), { minLength: 1, maxLength: 20 })
    .filter((list) => list.some((weight) => weight > 0));

  it("loses nothing, and gives each part within one unit of its exact share", () => {
    fc.assert(
      fc.property(fc.integer({ min: -1e12, max: 1e12 }), weights, (amount, list) => {
        const parts = allocate(amount, list);
        expect(parts.reduce((a, b) => a + b, 0)).toBe(amount);
        const whole = list.reduce((a, b) => a + BigInt(b), 0n);
        for (const [index, part] of parts.entries()) {
          const off = BigInt(part) * whole - BigInt(amount) * BigInt(list[index]!);
          expect(off < whole && off > -whole).toBe(true);
        }
      }),
    );
  });

  it("gives a tie to the earlier position", () => expect(allocate(100, [1, 1, 1])).toEqual([34, 33, 33]));

  it.each([
    [1.5, [1]],
    [1, [0, 0]],
    [1, [-1, 2]],
    [1, []],
  ])("refuses %f over %j", (amount, list) => expect(() => allocate(amount, list)).toThrow(RangeError));
});

describe("the markup ladder", () => {
  // percentages of this ladder are made up; the prices follow by arithmetic
  const ladder = [
    { upToMinor: 1000, markupBasisPoints: 10_000 },
    { upToMinor: 10_000, markupBasisPoints: 5_000 },
    { upToMinor: null, markupBasisPoints: 3_000 },
  ];

  it.each([
    [0, 0],
    [500, 1000],
    [1000, 2000],
    [1001, 2000],
    [2000, 3000],
    [10_000, 15_000],
    [10_100, 15_000],
    [20_000, 26_000],
  ])("a cost of %i sells at %i", (cost, price) => expect(priceFromCost(cost, ladder)).toBe(price));

  it("never sells a dearer part for less", () => {
    fc.assert(
      fc.property(fc.nat({ max: 50_000 }), fc.nat({ max: 5000 }), (cost, more) => {
        expect(priceFromCost(cost + more, ladder)).toBeGreaterThanOrEqual(priceFromCost(cost, ladder));
      }),
    );
  });

  it("refuses a ladder that does not rise or does not end", () => {
    expect(() => priceFromCost(1, [{ upToMinor: 100, markupBasisPoints: 1 }])).toThrow("last step");
    expect(() => priceFromCost(1, [ladder[1]!, ladder[0]!, ladder[2]!])).toThrow("rise");
    expect(() => priceFromCost(-1, ladder)).toThrow("below zero");
  });
});

describe("a certificate of exemption", () => {
  it("holds to the end of its last day", () => {
    expect(isExemptOn({ expiresOn: "2026-12-31" }, "2026-12-31")).toBe(true);
    expect(isExemptOn({ expiresOn: "2026-12-31" }, "2027-01-01")).toBe(false);
    expect(isExemptOn(null, "2026-01-01")).toBe(false);
  });
});
