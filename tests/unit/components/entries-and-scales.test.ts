import { describe, expect, it } from "vitest";
import { readAnswers } from "@/components/approve/form-names";
import { bitsScale, netBits } from "@/components/ledger/bits-scale";
import { timesWords } from "@/components/ledger/causes-ledger";
import type { LedgerCauseView } from "@/components/ledger/model";
import { outsidePath, stretch, tracePath } from "@/components/log/trace";
import { bandScale, markSense } from "@/components/ui/band-scale";
import { formatNumber, formatPrice, formatShare, formatSpan, formatWhen } from "@/components/ui/format";
import { moneyEntry, parseMoney, parseNumber } from "@/components/ui/parse-entry";
import { isoToZoned, zonedToIso } from "@/components/ui/zoned-time";
import { priceJob } from "@/lib/quote/job";

describe("what is typed", () => {
  it.each([
    ["14.1", 14.1],
    ["14,1", 14.1],
    ["−8", -8],
    ["182,000", 182000],
    ["1,234.5", 1234.5],
    [" 2 010 ", 2010],
    ["x", null],
    ["", null],
    ["1-2", null],
  ])("reads %j as %j", (text, expected) => {
    expect(parseNumber(text)).toBe(expected);
  });

  it("keeps money in minor units of its own currency", () => {
    // ISO 4217: the dollar has two decimals, the yen none, the Kuwaiti dinar three.
    expect(parseMoney("$180", "USD")).toBe(18000);
    expect(parseMoney("1,180.50", "USD")).toBe(118050);
    expect(parseMoney("500", "JPY")).toBe(500);
    expect(parseMoney("1.234", "KWD")).toBe(1234);
    expect(parseMoney("1.234", "USD")).toBeNull();
    expect(parseMoney("180 USD", "USD")).toBe(18000);
    // a letter between figures is a slip: it is never left out to make another amount
    expect(parseMoney("1e9", "USD")).toBeNull();
    expect(parseMoney("1O0", "USD")).toBeNull();
    expect(moneyEntry(18000, "USD")).toBe("180.00");
    expect(moneyEntry(500, "JPY")).toBe("500");
  });
});

describe("what is shown", () => {
  it("writes a real minus and a plus where it counts", () => {
    expect(formatNumber(-8, 0)).toBe("−8");
    expect(formatNumber(14.1, 1, { signed: true })).toBe("+14.1");
    expect(formatNumber(-0.04, 1)).toBe("0.0");
    expect(formatPrice(-74987, "USD")).toBe("−$749.87");
  });

  it("says spans and shares as people do, and never claims certainty", () => {
    expect(formatSpan(35)).toBe("35 min");
    expect(formatSpan(146)).toBe("2 h 26");
    expect(formatSpan(27 * 60)).toBe("1 d 3 h");
    expect(formatShare(0.742)).toBe("74 %");
    expect(formatShare(0.004)).toBe("under 1 %");
    expect(formatShare(0.9996)).toBe("over 99 %");
  });

  it("names days by the shop's clock", () => {
    const now = "2026-12-01T23:30:00Z";
    // 23:30 UTC is already the 2nd in Auckland (UTC+13 in December), still the 1st in New York (UTC−5).
    expect(formatWhen("2026-12-02T02:00:00Z", now, "Pacific/Auckland")).toBe("15:00");
    expect(formatWhen("2026-12-02T14:00:00Z", now, "America/New_York")).toBe("tomorrow 09:00");
  });
});

describe("the shop's wall clock", () => {
  it("goes to an instant and back, also beside a change of the clocks", () => {
    expect(zonedToIso("2026-12-01T16:30", "America/New_York")).toBe("2026-12-01T21:30:00.000Z");
    // The European Union turns its clocks on the last Sunday of March (29 March 2026) at 01:00 UTC (Directive 2000/84/EC).
    expect(zonedToIso("2026-03-29T01:30", "Europe/Berlin")).toBe("2026-03-29T00:30:00.000Z");
    expect(zonedToIso("2026-03-29T03:30", "Europe/Berlin")).toBe("2026-03-29T01:30:00.000Z");
    expect(isoToZoned("2026-12-01T21:30:00.000Z", "America/New_York")).toBe("2026-12-01T16:30");
    expect(zonedToIso("tomorrow", "UTC")).toBeNull();
  });
});

describe("the band mark", () => {
  it("gives the band the middle third whatever the unit", () => {
    const trim = bandScale({ low: -8, high: 8 }, 60, 4);
    expect([trim.left, trim.right]).toEqual([20, 40]);
    expect(trim.at(0)).toBe(30);
    // Beyond one band-width the shape stays at the edge.
    expect(trim.at(38)).toBe(56);
    expect(trim.at(-300)).toBe(4);
  });

  it("mirrors a band with one end, and says it in words", () => {
    const misfires = bandScale({ low: null, high: 6 }, 60, 4);
    expect(misfires.at(0)).toBe(30);
    expect(misfires.side(38)).toBe(1);
    expect(misfires.side(-5)).toBe(0);
    expect(markSense(38, { low: null, high: 6 }, 0)).toBe("above the usual band up to 6");
    expect(markSense(14.1, { low: -8, high: 8 }, 1)).toBe("above the usual band −8 to 8");
  });
});

describe("the ledger's axis", () => {
  const cause = (priorBits: number, weights: number[]): LedgerCauseView => ({
    id: "x",
    title: "x",
    family: "lean",
    probability: 0.5,
    priorBits,
    evidence: weights.map((weight, i) => ({ id: String(i), statement: "", source: "", weight })),
    unexplained: null,
    where: null,
    mark: null,
    provenBy: [],
  });

  it("holds the leaders whole and places the net where the sum is", () => {
    const causes = [cause(-4.3, [3.4, 1.4, 0.9, 0.5, 0.4, 0.3, 0.2]), cause(-4.6, [3.2, -0.6]), cause(-5.4, [3])];
    const scale = bitsScale(causes, 416);
    expect(netBits(causes[0]!)).toBeCloseTo(2.8, 10);
    for (const c of causes.slice(0, 2)) {
      expect(scale.at(c.priorBits)).toBeGreaterThanOrEqual(0);
      expect(scale.at(c.evidence.reduce((sum, e) => sum + Math.max(0, e.weight), 0))).toBeLessThanOrEqual(416);
    }
    expect(scale.at(0)).toBe(scale.zero);
    expect(scale.ticks.some((tick) => tick.bits === 0)).toBe(true);
  });

  it("says a weight as times likelier", () => {
    // 2 to the power of 1.4 is 2.639, of 3.4 is 10.56.
    expect(timesWords(1.4)).toBe("2.6 × likelier");
    expect(timesWords(3.4)).toBe("11 × likelier");
    expect(timesWords(-1)).toBe("2.0 × less so");
  });
});

describe("a trace", () => {
  const scale = { x: (s: number) => s, y: (v: number) => v, fromS: 0, toS: 10, stepS: 1 };

  it("leaves gaps as gaps", () => {
    expect(tracePath([1, 2, null, 4, 5], scale)).toBe("M0 1L1 2M3 4L4 5");
  });

  it("keeps a spike when there are more points than pixels", () => {
    const points = Array.from({ length: 1000 }, (_, i) => (i === 457 ? 99 : 1));
    const path = tracePath(points, { x: (s) => s / 10, y: (v) => v, fromS: 0, toS: 999, stepS: 1 });
    expect(path).toContain(" 99");
    expect(path.length).toBeLessThan(points.length * 6);
  });

  it("draws only what is outside, and sums a stretch", () => {
    expect(outsidePath([5, 12, 13, 5], { low: null, high: 10 }, "high", scale)).toBe("M1 12L2 13");
    expect(stretch([1, null, 3, 8], 0, 2, 1)).toEqual({ low: 1, high: 3, mean: 2 });
    expect(stretch([null, null], 0, 1, 1)).toBeNull();
  });
});

describe("a job's price while it is typed", () => {
  const line = (kind: "labour" | "part" | "fee", quantityMilli: number, unitPriceMinor: number) => ({
    id: "l",
    kind,
    description: "x",
    quantityMilli,
    unitPriceMinor,
  });
  const tax = {
    name: "Tax",
    basisPoints: 1000,
    kinds: ["labour", "part", "fee"] as const,
    rounding: "sum-then-tax" as const,
  };

  it("adds lines and tax to the cent", () => {
    // 2.4 h × 142.00 = 340.80; 64.20; 4 × 6.80 = 27.20; 8.00: together 440.20, tax of 10 % 44.02.
    const lines = [
      line("labour", 2400, 14200),
      line("part", 1000, 6420),
      line("part", 4000, 680),
      line("fee", 1000, 800),
    ];
    expect(priceJob(lines, tax)).toMatchObject({ netMinor: 44020, taxMinor: 4402, totalMinor: 48422 });
  });

  it("rounds half upwards, by line or over the sum as the shop has set", () => {
    // Two lines of 0.05 at 10 %: by line 0.005 each goes up to 0.01, together 0.02; over the sum 0.01.
    const lines = [line("part", 1000, 5), line("part", 1000, 5)];
    expect(priceJob(lines, { ...tax, rounding: "line-then-sum" }).taxMinor).toBe(2);
    expect(priceJob(lines, tax).taxMinor).toBe(1);
  });

  it("leaves untaxed kinds untaxed", () => {
    expect(
      priceJob([line("labour", 1000, 10000), line("part", 1000, 1000)], { ...tax, kinds: ["part"] }).taxMinor,
    ).toBe(100);
  });
});

describe("the customer's posted form", () => {
  it("is read job by job; an unanswered job is left out", () => {
    const form = new FormData();
    form.set("answer.j1", "yes");
    form.set("answer.j3", "not-now");
    form.set("reason.j3", "next month");
    form.set("risk.j3", "on");
    form.set("reason.j1", "ignored with a yes");
    form.set("answer.other", "yes");
    form.set("givenBy", "  Juniper Tock ");
    form.set("keepParts", "on");
    expect(readAnswers(form, ["j1", "j2", "j3"])).toEqual({
      answers: [
        { jobId: "j1", answer: "yes" },
        { jobId: "j3", answer: "not-now", reason: "Has read the risk. next month" },
      ],
      givenBy: "Juniper Tock",
      keepParts: true,
      mayDecide: false,
      takesPapersByMail: false,
    });
  });
});
