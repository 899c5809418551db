import { describe, expect, it, vi } from "vitest";
import { assess } from "@/lib/diagnosis/assess";
import { TEST_BASE } from "@/lib/diagnosis/knowledge/base-rates";
import { KNOWLEDGE } from "@/lib/diagnosis/knowledge/index";
import { priorsOf, similarCases } from "@/lib/diagnosis/priors";
import { CAUSE_IDS, type CauseId, COMPLAINTS } from "@/lib/diagnosis/vocabulary";
import { BOOSTED_DIRECT, CARBURETTED, caseOf, fixtureCases, PORT_MAF } from "./helpers";

// Hundreds of whole assessments; a busy machine needs longer than the default.
vi.setConfig({ testTimeout: 120_000 });

describe("the arithmetic shown is the arithmetic done", () => {
  const all = [...fixtureCases("examples"), ...fixtureCases("tuning")];
  it("adds up to 0.01 bit between any two causes, and to one in all", () => {
    for (const c of all) {
      const { causes, findings } = assess(caseOf(c.case));
      expect(Math.abs(causes.reduce((s, x) => s + x.probability, 0) - 1)).toBeLessThan(1e-9);
      const ids = new Set(findings.map((f) => f.id));
      const bits = causes.map((x) => x.priorBits + x.evidence.reduce((s, e) => s + e.weight, 0));
      for (const x of causes) for (const e of x.evidence) expect(ids.has(e.finding)).toBe(true);
      for (let i = 1; i < causes.length; i++) {
        const ratio = Math.log2((causes[0]?.probability ?? 0) / (causes[i]?.probability ?? 0));
        expect(Math.abs((bits[0] ?? 0) - (bits[i] ?? 0) - ratio), c.name).toBeLessThan(0.01);
      }
    }
  });

  it("is Bayes' rule: priors times outcome rates, enumerated by hand", () => {
    // Outcome probabilities completed here, on their own: what is stated, the rest shared in the usual proportion.
    const rate = (cause: CauseId, test: keyof typeof TEST_BASE, outcome: string): number => {
      const base = TEST_BASE[test];
      const stated = KNOWLEDGE[cause].tests?.[test] ?? {};
      const free = Object.keys(base).filter((o) => !(o in stated));
      const left =
        Object.keys(stated).length === 0 ? 100 : Math.max(0, 100 - Object.values(stated).reduce((s, x) => s + x, 0));
      const freeTotal = free.reduce((s, o) => s + (base[o] ?? 0), 0);
      const raw = Object.keys(base).map((o) => {
        const pct =
          o in stated
            ? (stated[o] ?? 0)
            : Object.keys(stated).length === 0
              ? (base[o] ?? 0)
              : freeTotal > 0
                ? (left * (base[o] ?? 0)) / freeTotal
                : 0;
        return [o, Math.max(pct / 100, 0.003)] as const;
      });
      const total = raw.reduce((s, [, p]) => s + p, 0);
      return (raw.find(([o]) => o === outcome)?.[1] ?? 0) / total;
    };
    const outcomes = {
      "intake-smoke": ["leak-seen", "no-leak"],
      "spark-tester": ["strong", "weak-or-none-one"],
      "exhaust-back-pressure": ["in-spec", "high"],
    } as const;
    for (const smoke of outcomes["intake-smoke"])
      for (const spark of outcomes["spark-tester"])
        for (const back of outcomes["exhaust-back-pressure"]) {
          const file = caseOf({
            version: 1,
            vehicle: PORT_MAF,
            complaints: ["rough-idle"],
            tests: [
              { id: "intake-smoke", outcome: smoke },
              { id: "spark-tester", outcome: spark },
              { id: "exhaust-back-pressure", outcome: back },
            ],
          });
          const { causes, bits } = priorsOf(file);
          const joint = causes.map(
            (c, i) =>
              2 ** (bits[i] ?? 0) *
              rate(c, "intake-smoke", smoke) *
              rate(c, "spark-tester", spark) *
              rate(c, "exhaust-back-pressure", back),
          );
          const total = joint.reduce((s, x) => s + x, 0);
          const answer = assess(file);
          for (const [i, c] of causes.entries()) {
            const got = answer.causes.find((x) => x.id === c)?.probability ?? Number.NaN;
            expect(Math.abs(got - (joint[i] ?? 0) / total), `${c} ${smoke} ${spark} ${back}`).toBeLessThan(2e-4);
          }
        }
  });

  it("expected information is what the outcomes tell on average, enumerated by hand", () => {
    const file = caseOf({ version: 1, vehicle: PORT_MAF, complaints: ["misfires"] });
    const answer = assess(file);
    const entropy = (p: number[]) => -p.reduce((s, x) => s + (x > 0 ? x * Math.log2(x) : 0), 0);
    const now = entropy(answer.causes.map((c) => c.probability));
    for (const test of answer.nextTests.slice(0, 4)) {
      let after = 0;
      for (const outcome of Object.keys(test.ifOutcome)) {
        const then = assess(
          caseOf({ version: 1, vehicle: PORT_MAF, complaints: ["misfires"], tests: [{ id: test.id, outcome }] }),
        );
        after += (test.outcomeProbability[outcome] ?? 0) * entropy(then.causes.map((c) => c.probability));
        const lead = then.causes[0];
        expect(Math.abs((test.ifOutcome[outcome]?.[lead?.id as CauseId] ?? 0) - (lead?.probability ?? 0))).toBeLessThan(
          0.002,
        );
      }
      expect(Math.abs(now - after - test.expectedInformationBits)).toBeLessThan(0.01);
    }
  });
});

describe("priors", () => {
  it("lets no cause pass 0.35 on one complaint alone, whatever the engine", () => {
    for (const vehicle of [PORT_MAF, CARBURETTED, BOOSTED_DIRECT, {}])
      for (const complaint of COMPLAINTS) {
        const lead = assess(caseOf({ version: 1, vehicle, complaints: [complaint] })).causes[0];
        expect(lead?.probability, complaint).toBeLessThan(0.35);
      }
  });
  it("gives a carburettor cause to no injected engine, a meter to no carburettor, boost to no natural engine", () => {
    const ids = (vehicle: object) => new Set(assess(caseOf({ version: 1, vehicle })).causes.map((c) => c.id));
    const port = ids(PORT_MAF);
    for (const id of [
      "float-level-high",
      "choke-stuck-closed",
      "jet-restricted",
      "boost-control-fault",
      "charge-air-leak",
      "high-pressure-fuel-low",
    ] as const)
      expect(port.has(id)).toBe(false);
    const carburettor = ids(CARBURETTED);
    for (const id of [
      "maf-under-reads",
      "o2-sensor-slow",
      "injector-leaking",
      "catalyst-degraded",
      "throttle-deposits",
    ] as const)
      expect(carburettor.has(id)).toBe(false);
    const everything = new Set([
      ...port,
      ...carburettor,
      ...ids(BOOSTED_DIRECT),
      ...ids({ ...PORT_MAF, ignition: "distributor", fuelReturn: "return", airMetering: "maf+map" }),
    ]);
    expect(CAUSE_IDS.filter((id) => !everything.has(id))).toEqual([]);
  });
});

describe("shop memory", () => {
  const file = caseOf({ version: 1, vehicle: PORT_MAF, complaints: ["misfires"] });
  const entry = (causes: Partial<Record<CauseId, number>>, fuelSystem = "port", complaintFamily = "misfire") => ({
    entries: [{ complaintFamily, fuelSystem, causes }],
  });
  const of = (id: CauseId, memory?: Parameters<typeof assess>[1]) =>
    assess(file, memory).causes.find((c) => c.id === id)?.probability ?? 0;

  it("moves the prior as Dirichlet counts beside 40 general cases", () => {
    const before = of("plug-well-contaminated");
    const after = of("plug-well-contaminated", { memory: entry({ "plug-well-contaminated": 10 }) });
    expect(after).toBeCloseTo((40 * before + 10) / 50, 4);
    expect(assess(file, { memory: entry({ "plug-well-contaminated": 10 }) }).memory).toEqual({
      similar: 10,
      ended: [{ id: "plug-well-contaminated", count: 10 }],
    });
  });
  it("counts only the same complaint family and fuel system, and comebacks subtract", () => {
    const before = of("ignition-coil-failing");
    expect(of("ignition-coil-failing", { memory: entry({ "ignition-coil-failing": 30 }, "direct") })).toBe(before);
    expect(of("ignition-coil-failing", { memory: entry({ "ignition-coil-failing": 30 }, "port", "rich") })).toBe(
      before,
    );
    const two = {
      entries: [...entry({ "ignition-coil-failing": 3 }).entries, ...entry({ "ignition-coil-failing": -3 }).entries],
    };
    expect(similarCases(two, file).size).toBe(0);
    expect(of("ignition-coil-failing", { memory: two })).toBe(before);
  });
});
