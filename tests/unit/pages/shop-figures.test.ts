import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { marginOf } from "@/app/(staff)/prices/_views/margin";
import {
  comebackFinding,
  hoursFinding,
  quotedFinding,
  rankFinding,
  waitingFinding,
  weeksOf,
} from "@/app/(staff)/reports/_views/figures";
import { vinView } from "@/app/(staff)/vehicles/_views/vin-words";

// the check tables name the source of each row
const rowsOf = (table: string) => JSON.parse(readFileSync(`fixtures/checks/${table}.json`, "utf8")) as Row[];
interface Row {
  id: string;
  input: Record<string, number> & string;
  expected: Record<string, number> & number;
}
const PRACTICE = rowsOf("shop-practice");
const row = (id: string) => {
  const found = PRACTICE.find((each) => each.id === id);
  if (!found) throw new Error(`no check row ${id}`);
  return found;
};
const percentIn = (text: string) => Number(/(\d+) %/.exec(text)?.[1]);

describe("figures of the shop against the check table", () => {
  it.each(PRACTICE.filter(({ id }) => /^margin-[\d.]+-[\d.]+$/.test(id)))("$id", ({ input, expected }) => {
    const margin = marginOf(Number(input.cost) * 100, Number(input.price) * 100);
    expect((margin ?? Number.NaN) * 100).toBeCloseTo(Number(expected.margin_pct), 2);
  });

  it("has no margin on a price of nothing", () => {
    expect(marginOf(100, 0)).toBeNull();
  });

  it.each(["labour-one-technician-week", "labour-slow-week", "labour-shop-month-4-technicians"])(
    "%s: hours sold of hours worked",
    (id) => {
      const { input, expected } = row(id);
      const finding = hoursFinding([
        { personId: "a", name: "A", soldH: Number(input.sold_h), workedH: Number(input.worked_h) },
      ]);
      expect(percentIn(finding.title)).toBe(Math.round(Number(expected.efficiency_pct)));
    },
  );

  it("counts comebacks of closed cases", () => {
    const { input, expected } = row("comeback");
    const from = new Date("2026-09-01T00:00:00Z");
    const finding = comebackFinding(
      {
        comebacks: Array.from({ length: Number(input.comebacks) }, (_, index) => ({
          number: 2500 + index,
          openedAt: new Date(from.getTime() + index * 86_400_000),
          firstNumber: 2400 + index,
          family: "lean",
        })),
        ended: [{ week: "2026-08-31", family: "lean", closed: Number(input.closed), released: 0 }],
      },
      { from, to: new Date("2026-11-30T00:00:00Z"), timeZone: "UTC" },
    );
    expect(percentIn(finding.title)).toBe(Math.round(Number(expected)));
    expect(finding.rows.map((each) => each.cases.length)).toEqual([3, 0, 0, 0]);
  });

  it("counts what was agreed of what was answered, and leaves the unanswered out", () => {
    const { input, expected } = row("close-rate");
    const each = 10_000;
    const week = {
      week: "2026-11-30",
      jobs: Number(input.quoted),
      yesJobs: Number(input.approved),
      approvedMinor: Number(input.approved) * each,
      openMinor: 7 * each,
      quotedMinor: (Number(input.quoted) + 7) * each,
    };
    const finding = quotedFinding([week], ["2026-11-30"], { currency: "USD", locale: "en-US" });
    expect(percentIn(finding.title)).toBe(Math.round(Number(expected)));
    expect(finding.title).toContain(`${input.approved} of ${input.quoted} jobs`);
    expect(finding.title).toContain("$700.00 still asked");
  });

  it("counts how often the proven cause was ranked first", () => {
    const { input, expected } = row("diag-hit-rate");
    const first = Number(input.first_test_confirmed);
    const title = rankFinding({ first, second: Number(input.cases) - first - 5, third: 3, lower: 2 });
    expect(percentIn(title)).toBe(Number(expected));
  });

  it("adds up to the whole of each week, whoever had the cases", () => {
    const finding = waitingFinding(
      [
        { week: "2026-11-23", party: "customer", hours: 30 },
        { week: "2026-11-23", party: "technician", hours: 10 },
        { week: "2026-11-30", party: "counter", hours: 4 },
      ],
      ["2026-11-23", "2026-11-30"],
    );
    const sums = [0, 1].map((week) => finding.rows.reduce((sum, party) => sum + (party.weeks[week] ?? 0), 0));
    expect(sums[0]).toBeCloseTo(1, 10);
    expect(sums[1]).toBeCloseTo(1, 10);
    // 30 of 44 hours: arithmetic
    expect(percentIn(finding.title)).toBe(68);
  });
});

describe("weeks begin on Monday, as ISO 8601 has them", () => {
  it("names the Mondays of a span", () => {
    // ISO 8601: 2026-W49 begins on Monday, 30 November 2026
    const span = {
      from: new Date("2026-11-18T12:00:00Z"),
      to: new Date("2026-12-01T12:00:00Z"),
      timeZone: "Europe/Lisbon",
    };
    expect(weeksOf(span)).toEqual(["2026-11-16", "2026-11-23", "2026-11-30"]);
  });

  it("takes the day from the shop's own clock", () => {
    // 03:00 UTC on Monday is still Sunday evening in New York (UTC−5 in winter, IANA time zone database)
    const at = new Date("2026-11-30T03:00:00Z");
    expect(weeksOf({ from: at, to: at, timeZone: "America/New_York" })).toEqual(["2026-11-23"]);
    expect(weeksOf({ from: at, to: at, timeZone: "UTC" })).toEqual(["2026-11-30"]);
  });
});

describe("what a vehicle's page says of its VIN", () => {
  const vins = rowsOf("vehicle-identification").filter(({ id }) => id.startsWith("vin-")) as unknown as {
    id: string;
    input: string;
    expected: { valid?: boolean; check?: string };
  }[];
  it.each(vins.filter(({ expected }) => expected.valid === true))("$input fits", ({ input }) => {
    expect(vinView(input).state).toBe("fits");
  });

  it("warns and does not fail where the check digit does not bind", () => {
    // ISO 3780 gives S to Z to Europe; 49 CFR 565 binds numbers of the United States only
    expect(vinView("WZZAA12B1LZ000001").state).toBe("warns");
    expect(vinView("1ZZAA12B1LZ000001").state).toBe("fails");
  });
});
