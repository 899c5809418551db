import { readFileSync } from "node:fs";
import { describe, expect, it, vi } from "vitest";
import { assess } from "@/lib/diagnosis/assess";
import { CAUSES } from "@/lib/diagnosis/causes";
import { trimTableSource } from "@/lib/diagnosis/cli-knowledge-source";
import { REPORTED_BASE, SIGN_BASE, TEST_BASE } from "@/lib/diagnosis/knowledge/base-rates";
import { CODE_FAMILIES, codeFamily } from "@/lib/diagnosis/knowledge/code-families";
import { KNOWLEDGE } from "@/lib/diagnosis/knowledge/index";
import { PROVING, SOUND_OUTCOMES } from "@/lib/diagnosis/knowledge/proving";
import { trimLikelihood } from "@/lib/diagnosis/likelihood";
import { TESTS } from "@/lib/diagnosis/tests";
import { CAUSE_IDS, COMPLAINT_LABELS, COMPLAINTS, TEST_IDS } from "@/lib/diagnosis/vocabulary";
import { caseOf, PORT_MAF } from "./helpers";

// Hundreds of whole assessments; a busy machine needs longer than the default.
vi.setConfig({ testTimeout: 120_000 });

describe("the knowledge", () => {
  it("has an entry, a title and a plain sentence for every cause", () => {
    for (const id of CAUSE_IDS) {
      expect(KNOWLEDGE[id], id).toBeDefined();
      expect(KNOWLEDGE[id].why.length, id).toBeGreaterThan(20);
      expect(KNOWLEDGE[id].source.length, id).toBeGreaterThan(5);
      expect(CAUSES[id].sentence, id).toMatch(/^[A-Z].*\.$/);
      // The customer's sentence keeps the trade's abbreviations out.
      expect(CAUSES[id].sentence, id).not.toMatch(/\b(MAF|MAP|EGR|PCV|ECU|ECT|IAT|O2|trim|lambda|rail)\b/);
    }
  });
  it("speaks only of outcomes, signs and codes that exist", () => {
    for (const id of CAUSE_IDS) {
      const k = KNOWLEDGE[id];
      for (const [test, rates] of Object.entries(k.tests ?? {})) {
        const known = Object.keys(TEST_BASE[test as keyof typeof TEST_BASE]);
        for (const [o, p] of Object.entries(rates)) {
          expect(known, `${id} ${test}`).toContain(o);
          expect(p).toBeGreaterThanOrEqual(0);
        }
        expect(
          Object.values(rates).reduce((s, x) => s + x, 0),
          `${id} ${test}`,
        ).toBeLessThanOrEqual(101);
      }
      for (const [sign, rates] of Object.entries(k.signs ?? {})) {
        for (const o of Object.keys(rates))
          expect(Object.keys(SIGN_BASE[sign as keyof typeof SIGN_BASE]), `${id} ${sign}`).toContain(o);
        expect(
          Object.values(rates).reduce((s, x) => s + x, 0),
          `${id} ${sign}`,
        ).toBeLessThanOrEqual(101);
      }
      for (const family of Object.keys(k.codes ?? {})) expect(Object.keys(CODE_FAMILIES)).toContain(family);
    }
    for (const [test, base] of Object.entries(TEST_BASE))
      expect(
        Object.values(base).reduce((s, x) => s + x, 0),
        test,
      ).toBeCloseTo(100, 6);
    for (const [sign, base] of Object.entries(SIGN_BASE))
      expect(
        Object.values(base).reduce((s: number, x) => s + x, 0),
        sign,
      ).toBeCloseTo(100, 6);
    for (const c of COMPLAINTS) expect(REPORTED_BASE[c], COMPLAINT_LABELS[c]).toBeGreaterThan(0);
  });
  it("knows every outcome of every test, and the sound ones", () => {
    for (const id of TEST_IDS) {
      const known = Object.keys(TEST_BASE[id]);
      for (const { id: outcome } of TESTS[id].outcomes) if (id !== "soak-compare") expect(known, id).toContain(outcome);
      for (const outcome of SOUND_OUTCOMES[id] ?? [])
        expect(
          TESTS[id].outcomes.map((o) => o.id),
          id,
        ).toContain(outcome);
      expect(TESTS[id].minutes).toBeGreaterThan(0);
    }
    for (const [cause, tests] of Object.entries(PROVING))
      for (const [test, outcomes] of Object.entries(tests))
        for (const o of outcomes)
          expect(
            TESTS[test as keyof typeof TESTS].outcomes.map((x) => x.id),
            `${cause} ${test}`,
          ).toContain(o);
  });
  it("sorts codes into families (SAE J2012 meanings)", () => {
    expect([codeFamily("P0171"), codeFamily("P0174"), codeFamily("P2187")]).toEqual(["lean", "lean", "lean"]);
    expect([codeFamily("P0132"), codeFamily("P0154"), codeFamily("P0135")]).toEqual([
      "o2-front-high",
      "o2-front-dead",
      "o2-heater",
    ]);
    expect([codeFamily("P0420"), codeFamily("P0016"), codeFamily("P0087"), codeFamily("P1234")]).toEqual([
      "catalyst",
      "cam-crank",
      "fuel-pressure-low",
      null,
    ]);
  });
  it("keeps the table written by the engine model current", () => {
    // biome formatting is left out of that folder, so the text is compared as written.
    const written = readFileSync(new URL("../../../lib/diagnosis/tables/trims.ts", import.meta.url), "utf8");
    expect(written).toBe(trimTableSource());
  });
});

describe("what the engine model makes of trims", () => {
  const bits = (
    behaviour: Parameters<typeof trimLikelihood>[0],
    trims: [point: number, total: number][],
    metering: "maf" | "map" = "maf",
  ) =>
    Math.log2(
      trimLikelihood(
        behaviour,
        metering,
        trims.map(([point, totalPct]) => ({ bank: 1 as const, point, totalPct })),
        1,
      ).likelihood /
        trimLikelihood(
          "quiet",
          metering,
          trims.map(([point, totalPct]) => ({ bank: 1 as const, point, totalPct })),
          1,
        ).likelihood,
    );
  it("tells a leak from a weak pump by the slope", () => {
    const falls: [number, number][] = [
      [0, 22],
      [1, 5],
      [2, 3],
    ];
    const rises: [number, number][] = [
      [0, 3],
      [2, 11],
      [3, 20],
    ];
    expect(bits("leak-after-throttle", falls) - bits("pressure-falls-with-flow", falls)).toBeGreaterThan(3);
    expect(bits("pressure-falls-with-flow", rises) - bits("leak-after-throttle", rises)).toBeGreaterThan(3);
  });
  it("tells high pressure (the same share everywhere) from a leaking diaphragm (fading with flow)", () => {
    const flat: [number, number][] = [
      [0, -16],
      [2, -15],
    ];
    const fades: [number, number][] = [
      [0, -21],
      [1, -6],
      [2, -3],
    ];
    expect(bits("pressure-high", flat)).toBeGreaterThan(bits("constant-extra-fuel", flat) + 2);
    expect(bits("constant-extra-fuel", fades)).toBeGreaterThan(bits("pressure-high", fades) + 2);
  });
  it("sees no air leak in the trim of a pressure-metered engine", () => {
    expect(
      Math.abs(
        bits(
          "leak-after-throttle",
          [
            [0, 1],
            [2, 1],
          ],
          "map",
        ),
      ),
    ).toBeLessThan(0.6);
  });
});

describe("the trade's table of trim shapes (common practice; fixtures/checks/fuel-trim-patterns.json)", () => {
  // Shape over idling, cruising, accelerating on each bank; the causes the table names, corrected for boost leaks and the
  // regulator diaphragm, of which one must lead and most of the leading three must be.
  const V6 = { ...PORT_MAF, displacementL: 3, cylinders: 6, banks: 2 };
  const rows: [shape: string, bank1: number[], bank2: number[], causes: string[]][] = [
    [
      "lean, falls with flow, both banks",
      [22, 9, 3],
      [21, 8, 4],
      ["intake-air-leak", "crankcase-vent-fault", "brake-booster-leak", "purge-valve-stuck-open", "air-duct-leak"],
    ],
    [
      "lean, falls with flow, one bank",
      [19, 8, 3],
      [1, 2, 1],
      ["intake-air-leak", "exhaust-leak-upstream", "crankcase-vent-fault"],
    ],
    [
      "lean, rises with flow, both banks",
      [4, 11, 19],
      [5, 12, 20],
      ["fuel-pump-weak", "fuel-filter-restricted", "maf-under-reads", "fuel-pump-circuit-fault", "air-duct-leak"],
    ],
    [
      "lean, rises with flow, one bank",
      [4, 11, 18],
      [0, 1, 1],
      ["injector-restricted", "ignition-coil-failing", "spark-plugs-worn"],
    ],
    [
      "lean everywhere, both banks",
      [12, 13, 12],
      [12, 12, 13],
      ["ethanol-content-high", "fuel-pump-weak", "maf-under-reads", "injector-restricted", "air-duct-leak"],
    ],
    [
      "lean everywhere, one bank",
      [14, 15, 14],
      [0, 1, -1],
      ["o2-sensor-reads-lean", "exhaust-leak-upstream", "injector-restricted", "ignition-coil-failing"],
    ],
    [
      "rich, falls with flow, both banks",
      [-18, -9, -4],
      [-17, -8, -3],
      ["purge-valve-stuck-open", "oil-diluted-with-fuel", "regulator-diaphragm-leak", "maf-over-reads"],
    ],
    [
      "rich, falls with flow, one bank",
      [-17, -8, -4],
      [0, 0, 1],
      ["injector-leaking", "o2-sensor-reads-rich", "ignition-coil-failing"],
    ],
    [
      "rich, rises with flow, both banks",
      [-4, -9, -15],
      [-5, -10, -16],
      ["maf-over-reads", "fuel-pressure-high", "air-filter-restricted"],
    ],
    [
      "rich everywhere, both banks",
      [-14, -13, -12],
      [-13, -12, -13],
      ["fuel-pressure-high", "maf-over-reads", "ect-reads-cold", "o2-sensor-reads-rich"],
    ],
    ["rich everywhere, one bank", [-14, -14, -13], [0, 1, 0], ["o2-sensor-reads-rich", "injector-leaking"]],
    ["changing sign with flow", [-12, 2, 14], [-11, 3, 15], ["maf-under-reads", "fuel-pump-weak"]],
  ];
  it.each(rows)("%s", (_, bank1, bank2, causes) => {
    const modes = ["idling", "cruising", "accelerating"];
    const samples = modes.map((mode, i) => ({
      mode,
      values: { SHRTFT1: 0, LONGFT1: bank1[i], SHRTFT2: 0, LONGFT2: bank2[i], FUELSYS1: "CL" },
    }));
    const lead = assess(caseOf({ version: 1, vehicle: V6, samples })).causes.slice(0, 3);
    expect(causes).toContain(lead[0]?.id);
    expect(lead.filter((c) => causes.includes(c.id)).length).toBeGreaterThanOrEqual(2);
  });
});

describe("rules of the trade", () => {
  const lead = (input: object) => assess(caseOf({ version: 1, vehicle: PORT_MAF, ...input })).causes;
  const p = (list: ReturnType<typeof lead>, id: string) => list.find((c) => c.id === id)?.probability ?? 0;

  it("a smoke test hardly clears the crankcase vent", () => {
    const tests = [{ id: "intake-smoke", outcome: "no-leak" }];
    const before = lead({ complaints: ["rough-idle"] });
    const after = lead({ complaints: ["rough-idle"], tests });
    expect(p(after, "intake-air-leak") / p(before, "intake-air-leak")).toBeLessThan(0.25);
    expect(p(after, "crankcase-vent-fault") / p(before, "crankcase-vent-fault")).toBeGreaterThan(0.75);
  });
  it("no pressure at all is no feed or a dead pump before a weak one", () => {
    const list = lead({
      complaints: ["no-start-cranks"],
      samples: [{ mode: "starting", values: { fuelPressureKPa: 0, fuelPressureSpecKPa: 300, pumpV: 0.3 } }],
    });
    expect(list[0]?.id).toBe("fuel-pump-circuit-fault");
  });
  it("does not read trims in open loop, cold, or on one bank for the other", () => {
    for (const values of [
      { ECT: 20, SHRTFT1: 20, LONGFT1: 10 },
      { FUELSYS1: "OL", SHRTFT1: 20, LONGFT1: 10 },
    ]) {
      const answer = assess(caseOf({ version: 1, vehicle: PORT_MAF, samples: [{ mode: "idling", values }] }));
      expect(answer.findings.some((f) => f.id.startsWith("trim"))).toBe(false);
      expect(answer.dataQuality.length).toBeGreaterThan(0);
    }
    const v6 = { ...PORT_MAF, cylinders: 6, banks: 2 };
    const two = assess(
      caseOf({
        version: 1,
        vehicle: v6,
        samples: [
          {
            mode: "idling",
            values: { ECT: 90, SHRTFT1: 0, LONGFT1: 1, SHRTFT2: 13, LONGFT2: 12, FUELSYS1: "CL", FUELSYS2: "OL" },
          },
        ],
      }),
    );
    expect(two.findings.find((f) => f.id.startsWith("trim"))?.id).toContain("bank-2");
  });
  it("notes a lean sensor mean beside an unsaturated trim and does not count it twice", () => {
    const base = { ECT: 90, SHRTFT1: 14, LONGFT1: 10, FUELSYS1: "CL" };
    const plain = lead({ samples: [{ mode: "idling", values: base }] });
    const answer = assess(
      caseOf({
        version: 1,
        vehicle: PORT_MAF,
        samples: [{ mode: "idling", values: { ...base, SHRTFT1: 4, LONGFT1: 4, O2S11: 0.15 } }],
      }),
    );
    expect(answer.dataQuality.some((n) => n.path === "samples[0].values.O2S11")).toBe(true);
    const both = lead({ samples: [{ mode: "idling", values: { ...base, O2S11: 0.21 } }] });
    expect(both.map((c) => [c.id, c.probability])).toEqual(plain.map((c) => [c.id, c.probability]));
  });
  it("keeps front sensor volts of a wide-range engine out", () => {
    const answer = assess(
      caseOf({
        version: 1,
        vehicle: { ...PORT_MAF, o2Sensing: "wide-range" },
        samples: [{ mode: "idling", values: { O2S11: 0.1, o2s11MaxV: 0.1, o2s11CrossingsPer10s: 0 } }],
      }),
    );
    expect(answer.findings.some((f) => f.id.startsWith("front-o2"))).toBe(false);
    expect(answer.dataQuality.some((n) => n.path === "samples[0].values.O2S11")).toBe(true);
  });
  it("says nothing of companions without a firing order, and uses one that is stated", () => {
    const values = { misfireCounts: { "1": 60, "2": 0, "3": 0, "4": 61 } };
    const waste = { ...PORT_MAF, ignition: "waste-spark" };
    const unknown = assess(caseOf({ version: 1, vehicle: waste, samples: [{ mode: "idling", values }] }));
    expect(unknown.findings.find((f) => f.id.startsWith("misfires"))?.statement).toContain("not stated");
    const known = assess(
      caseOf({ version: 1, vehicle: { ...waste, firingOrder: [1, 3, 4, 2] }, samples: [{ mode: "idling", values }] }),
    );
    expect(known.findings.find((f) => f.id.startsWith("misfires"))?.id).toBe("misfires-pair");
  });
  it("hints at a second fault when two explain what neither does", () => {
    const answer = lead({});
    expect(answer.length).toBeGreaterThan(40);
    const two = assess(
      caseOf({
        version: 1,
        vehicle: PORT_MAF,
        codes: [{ code: "P0302" }],
        samples: [
          {
            mode: "idling",
            values: { ECT: 90, SHRTFT1: 13, LONGFT1: 10, misfireCounts: { "1": 0, "2": 140, "3": 0, "4": 0 } },
          },
          { mode: "raised-idle", values: { SHRTFT1: 2, LONGFT1: 3 } },
        ],
        tests: [
          { id: "coil-swap", outcome: "fault-follows" },
          { id: "intake-smoke", outcome: "leak-seen" },
        ],
      }),
    );
    expect(two.secondFault?.causes.slice().sort()).toEqual(["ignition-coil-failing", "intake-air-leak"]);
  });
  it("places a cause on its bank and cylinder", () => {
    const v6 = { ...PORT_MAF, cylinders: 6, banks: 2, bank1Cylinders: [1, 3, 5] };
    const answer = assess(
      caseOf({
        version: 1,
        vehicle: v6,
        tests: [{ id: "coil-swap", outcome: "fault-follows", cylinder: 4 }],
        samples: [{ mode: "idling", values: { misfireCounts: { "4": 80 } } }],
      }),
    );
    expect(answer.causes[0]).toMatchObject({ id: "ignition-coil-failing", location: { bank: 2, cylinder: 4 } });
    const inline = assess(caseOf({ version: 1, vehicle: PORT_MAF, codes: [{ code: "P0131" }] }));
    expect(inline.causes.find((c) => c.id === "o2-sensor-reads-lean")?.location.bank).toBeNull();
  });
  it("suggests no test twice and none the vehicle cannot have", () => {
    const answer = assess(
      caseOf({
        version: 1,
        vehicle: PORT_MAF,
        complaints: ["misfires"],
        tests: [{ id: "spark-tester", outcome: "inconclusive" }],
      }),
    );
    const ids = answer.nextTests.map((t) => t.id);
    expect(ids).not.toContain("spark-tester");
    for (const id of ["dwell-check", "float-level", "choke-plate", "boost-check"] as const)
      expect(ids).not.toContain(id);
    const rates = answer.nextTests.map((t) => t.bitsPerMinute);
    expect([...rates].sort((a, b) => b - a)).toEqual(rates);
  });
});
