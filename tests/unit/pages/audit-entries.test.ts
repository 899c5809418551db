import { describe, expect, it } from "vitest";
import { type EntryContext, entryView, fieldViews } from "@/app/(staff)/_views/audit/entries";
import { chainDays, dayBounds } from "@/app/(staff)/audit/_views/days";
import type { AuditRow } from "@/lib/services/audit/read";

const CONTEXT: EntryContext = {
  staff: [{ id: "user_bram", name: "Bram Ferrule", role: "technician", isActive: true }],
  caseNumbers: new Map([["case_1", 2431]]),
  neighbours: new Map(),
  currency: "USD",
  locale: "en-US",
  timeZone: "UTC",
  isOneDay: true,
};

const entry = (over: Partial<AuditRow>): AuditRow => ({
  shopId: "shop_1",
  seq: 12,
  at: new Date("2026-12-01T13:15:22Z"),
  actorId: "user_hester",
  actorName: "Hester Quillon",
  role: "owner",
  requestId: "7d2f0c11-0000-4000-8000-000000000000",
  verb: "price.saveRate",
  reason: null,
  entity: "labour_rates",
  entityId: "rate_1",
  caseId: null,
  action: "update",
  before: null,
  after: null,
  previousHash: "aa".repeat(32),
  hash: "bb".repeat(32),
  ...over,
});

describe("an audit entry as it is read", () => {
  const rate = {
    before: { shop_id: "shop_1", id: "rate_1", name: "Diagnosis", per_hour_minor: 13_800, version: 3, is_active: true },
    after: { shop_id: "shop_1", id: "rate_1", name: "Diagnosis", per_hour_minor: 14_200, version: 4, is_active: true },
  };

  it("shows what changed first, then what is the same, and nothing the machine keeps for itself", () => {
    expect(fieldViews(rate, CONTEXT)).toEqual([
      { name: "Rate an hour", before: "$138.00", after: "$142.00", isChanged: true, numeric: true },
      { name: "Name", before: "Diagnosis", after: "Diagnosis", isChanged: false, numeric: false },
      { name: "In use", before: "yes", after: "yes", isChanged: false, numeric: false },
    ]);
    expect(entryView(entry(rate), CONTEXT).what).toBe("rate an hour from $138.00 to $142.00");
  });

  it("opens readings one level, so that only the cell that moved is shown as changed", () => {
    const fields = fieldViews(
      {
        before: { case_id: "case_1", values: { RPM: 780, SHRTFT1: 14.1 } },
        after: { case_id: "case_1", values: { RPM: 780, SHRTFT1: 3.2 } },
      },
      CONTEXT,
    );
    expect(fields.filter((field) => field.isChanged)).toEqual([
      { name: "Short trim, bank 1, %", before: "14.1", after: "3.2", isChanged: true, numeric: true },
    ]);
    expect(fields.find((field) => field.name === "Case")?.after).toBe("2431");
  });

  it("names people and cases instead of their ids", () => {
    const view = entryView(
      entry({
        entity: "cases",
        verb: "case.assign",
        caseId: "case_1",
        before: { technician_id: null },
        after: { technician_id: "user_bram" },
      }),
      CONTEXT,
    );
    expect(view.to).toBe("Case 2431");
    expect(view.fields[0]).toMatchObject({ before: "", after: "Bram Ferrule", isChanged: true });
  });

  it("says that three entries agree only when each holds the hash of the one before it", () => {
    const sound = {
      ...CONTEXT,
      neighbours: new Map([
        [11, { seq: 11, hash: "aa".repeat(32), previousHash: "99".repeat(32) }],
        [13, { seq: 13, hash: "cc".repeat(32), previousHash: "bb".repeat(32) }],
      ]),
    };
    expect(entryView(entry(rate), sound).hashes.agree).toBe(true);
    const cut = { ...sound, neighbours: new Map([[11, { seq: 11, hash: "a0".repeat(32), previousHash: "" }]]) };
    expect(entryView(entry(rate), cut).hashes.agree).toBe(false);
    // with the entry before it gone nothing can agree
    expect(entryView(entry(rate), CONTEXT).hashes.agree).toBe(false);
  });
});

describe("the days of the chain", () => {
  it("bounds a day by the shop's own clock, also when the clocks change", () => {
    // Daylight saving time began in New York on 8 March 2026 at 02:00, so that day has 23 hours (IANA time zone database)
    const day = dayBounds("2026-03-08", "America/New_York");
    expect(day?.from.toISOString()).toBe("2026-03-08T05:00:00.000Z");
    expect(day?.to.toISOString()).toBe("2026-03-09T04:00:00.000Z");
    expect(dayBounds("2026-13-40", "UTC")).toBeNull();
    expect(dayBounds("today", "UTC")).toBeNull();
  });

  it("shows every day of a month, quiet ones too, and the break on the day it lies on", () => {
    const days = chainDays(
      [
        { day: "2026-11-20", entries: 40, first: 1, last: 40 },
        { day: "2026-12-01", entries: 9, first: 41, last: 49 },
      ],
      { seq: 41 },
      new Date("2026-12-01T12:00:00Z"),
      "UTC",
    );
    expect(days).toHaveLength(30);
    expect(days.filter((day) => day.entries === 0)).toHaveLength(28);
    expect(days.filter((day) => day.breakAt !== undefined).map((day) => day.day)).toEqual(["2026-12-01"]);
    expect(days.at(-1)).toMatchObject({ label: "1 Dec", breakAt: 41 });
  });
});
