import { describe, expect, it } from "vitest";
import { judgeProof, type ProofInput } from "@/lib/diagnosis/proof";
import { caseOf, PORT_MAF } from "./helpers";

const asFound = [
  { mode: "idling", values: { RPM: 760, ECT: 90, SHRTFT1: 14.1, LONGFT1: 10.2 } },
  { mode: "raised-idle", values: { RPM: 2500, SHRTFT1: 2.3, LONGFT1: 2.1 } },
];
const repaired = (short: number, long: number, extra: object = {}) => [
  { mode: "idling", phase: "after", values: { RPM: 750, ECT: 91, SHRTFT1: short, LONGFT1: long, ...extra } },
  { mode: "raised-idle", phase: "after", values: { RPM: 2500, SHRTFT1: 1, LONGFT1: 1 } },
];
const prove = (file: object, rest: Partial<ProofInput> = {}) =>
  judgeProof({
    caseFile: caseOf({ version: 1, vehicle: PORT_MAF, ...file }),
    provenCauses: ["intake-air-leak"],
    ...rest,
  });

describe("proof of a repair", () => {
  it("passes when trims are back within 5 % where they were off and the code has not returned", () => {
    const result = prove(
      { codes: [{ code: "P0171" }], samples: [...asFound, ...repaired(1.6, 0.8)] },
      { afterCodes: [], readiness: { FUEL: "complete", CAT: "incomplete" } },
    );
    expect(result.verdict).toBe("passes");
    const row = result.rows.find((r) => r.mode === "idling" && r.parameter === "TOTALFT");
    expect(row).toMatchObject({ bank: 1, verdict: "passes" });
    expect(row?.rule).toContain("+24.3 % before, +2.4 % after");
    expect(result.rows.find((r) => r.mode === "raised-idle" && r.parameter === "TOTALFT")?.verdict).toBe(
      "still-inside",
    );
    expect(result.monitors.find((m) => m.monitor === "CAT")?.message).toContain("not complete yet");
  });
  it("fails when they are not back, or a code returned", () => {
    expect(prove({ samples: [...asFound, ...repaired(6, 3)] }).verdict).toBe("fails");
    expect(
      prove(
        { codes: [{ code: "P0171" }], samples: [...asFound, ...repaired(1, 1)] },
        { afterCodes: [{ code: "P0171", status: "pending" }] },
      ).verdict,
    ).toBe("fails");
  });
  it("is incomplete without readings in the modes that were off, or codes unread", () => {
    const none = prove({ samples: asFound });
    expect(none.verdict).toBe("incomplete");
    expect(none.missing[0]).toMatchObject({ what: "idling" });
    expect(none.missing.some((m) => m.what === "raised-idle")).toBe(false);
    expect(
      prove({ codes: [{ code: "P0171" }], samples: [...asFound, ...repaired(1, 1)] }).missing.map((m) => m.what),
    ).toEqual(["codes"]);
  });
  it("does not judge long trim alone right after clearing", () => {
    const row = prove({ samples: [...asFound, ...repaired(4, 0, { CLR_DIST: 3 })] }).rows.find(
      (r) => r.parameter === "TOTALFT" && r.mode === "idling",
    );
    expect(row?.verdict).toBe("passes");
    expect(row?.rule).toContain("restarted");
    const onlyLong = prove({
      samples: [...asFound, { mode: "idling", phase: "after", values: { LONGFT1: 0, CLR_DIST: 3 } }],
    });
    expect(onlyLong.rows.find((r) => r.parameter === "TOTALFT" && r.mode === "idling")?.verdict).toBe("incomplete");
  });
  it("proves what trims cannot show by the confirming test repeated with a good outcome", () => {
    const file = {
      samples: [{ mode: "idling", values: { SHRTFT1: 1, LONGFT1: 1, misfireCounts: { "1": 0, "3": 80 } } }],
      tests: [{ id: "spark-tester", outcome: "weak-or-none-one", cylinder: 3 }],
    };
    const input = { provenCauses: ["ignition-coil-failing"] as ProofInput["provenCauses"] };
    const open = prove(file, input);
    expect(open.verdict).toBe("incomplete");
    expect(open.tests[0]).toMatchObject({ id: "spark-tester", verdict: "incomplete" });
    const tests = [
      { id: "spark-tester", outcome: "weak-or-none-one", phase: "before" },
      { id: "spark-tester", outcome: "strong", phase: "after" },
    ] as const;
    const good = {
      ...file,
      samples: [...file.samples, { mode: "idling", phase: "after", values: { misfireCounts: { "1": 0, "3": 1 } } }],
    };
    const closed = prove(good, { ...input, tests });
    expect(closed.verdict).toBe("passes");
    expect(closed.rows.find((r) => r.cylinder === 3)).toMatchObject({ before: 80, after: 1, verdict: "passes" });
    expect(prove(good, { ...input, tests: [tests[0], { ...tests[0], phase: "after" }] }).verdict).toBe("fails");
  });
  it("proves a code-only case by its monitor run and the code not returned", () => {
    const file = { codes: [{ code: "P0442" }] };
    const input = { provenCauses: ["evap-leak"] as ProofInput["provenCauses"], afterCodes: [] };
    expect(prove(file, { ...input, readiness: { EVAP: "incomplete" } })).toMatchObject({ verdict: "incomplete" });
    expect(prove(file, { ...input, readiness: { EVAP: "complete" } })).toMatchObject({ verdict: "passes" });
  });
  it("judges fuel pressure by the maker's figure beside it", () => {
    const sample = (phase: string, kpa: number) => ({
      mode: "idling",
      phase,
      values: { fuelPressureKPa: kpa, fuelPressureSpecKPa: 380 },
    });
    const result = prove(
      { samples: [sample("before", 300), sample("after", 378)] },
      { provenCauses: ["fuel-pump-weak"] },
    );
    expect(result.rows.find((r) => r.parameter === "fuelPressureKPa")).toMatchObject({
      before: 300,
      after: 378,
      verdict: "passes",
    });
  });
  it("says so when nothing recorded shows the fault", () => {
    expect(prove({}).missing[0]?.message).toContain("air leak at the intake");
  });
});
