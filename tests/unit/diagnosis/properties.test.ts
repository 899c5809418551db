import fc from "fast-check";
import { describe, expect, it, vi } from "vitest";
import { testApplies } from "@/lib/diagnosis/applies";
import { assess } from "@/lib/diagnosis/assess";
import { parseCaseFile } from "@/lib/diagnosis/case-file";
import { KNOWLEDGE } from "@/lib/diagnosis/knowledge/index";
import { testDistribution } from "@/lib/diagnosis/likelihood";
import { TESTS } from "@/lib/diagnosis/tests";
import { CIRCUMSTANCES, COMPLAINTS, MODES, NEUTRAL_OUTCOMES, TEST_IDS, type TestId } from "@/lib/diagnosis/vocabulary";
import { PARAMETER_IDS, PARAMETERS } from "@/lib/obd/parameters";
import { BOOSTED_DIRECT, CARBURETTED, caseOf, fixtureCases, PORT_MAF } from "./helpers";

// Hundreds of whole assessments; a busy machine needs longer than the default.
vi.setConfig({ testTimeout: 120_000 });

const vehicles = fc.constantFrom<object>(
  PORT_MAF,
  CARBURETTED,
  BOOSTED_DIRECT,
  { ...PORT_MAF, cylinders: 6, banks: 2 },
  { ...PORT_MAF, airMetering: "map", ignition: "distributor" },
  {},
);
const numeric = PARAMETER_IDS.filter((id) => PARAMETERS[id].kind === "number");
const values = fc.dictionary(
  fc.constantFrom(...numeric),
  fc.oneof(fc.double({ min: -1e6, max: 1e6, noNaN: true }), fc.integer({ min: -300, max: 3000 })),
  { maxKeys: 12 },
);
const samples = fc.array(fc.record({ mode: fc.constantFrom(...MODES), values }), { maxLength: 4 });
const recorded = fc.uniqueArray(
  fc.constantFrom(...TEST_IDS).chain((id) =>
    fc.record({
      id: fc.constant(id),
      outcome: fc.constantFrom(...TESTS[id].outcomes.map((o) => o.id), ...NEUTRAL_OUTCOMES),
    }),
  ),
  { maxLength: 5, selector: (t) => t.id },
);
const cases = fc.record({
  version: fc.constant(1),
  vehicle: vehicles,
  complaints: fc.uniqueArray(fc.constantFrom(...COMPLAINTS), { maxLength: 3 }),
  circumstances: fc.uniqueArray(fc.constantFrom(...CIRCUMSTANCES), { maxLength: 2 }),
  codes: fc.array(
    fc.record({
      code: fc.constantFrom("P0171", "P0172", "P0300", "P0302", "P0420", "P0128", "P0335", "P0131", "P1234", "U0100"),
    }),
    { maxLength: 3 },
  ),
  samples,
  tests: recorded,
});
const summary = (input: unknown) => assess(caseOf(input)).causes.map((c) => [c.id, c.probability] as const);

describe("whatever is typed", () => {
  it("sums to one, adds up and never throws", () => {
    fc.assert(
      fc.property(cases, (input) => {
        const answer = assess(caseOf(input));
        expect(Math.abs(answer.causes.reduce((s, c) => s + c.probability, 0) - 1)).toBeLessThan(1e-9);
        const [a, b] = [answer.causes[0], answer.causes.at(-1)];
        const bits = (c: typeof a) => (c?.priorBits ?? 0) + (c?.evidence ?? []).reduce((s, e) => s + e.weight, 0);
        expect(Math.abs(bits(a) - bits(b) - Math.log2((a?.probability ?? 1) / (b?.probability ?? 1)))).toBeLessThan(
          0.01,
        );
        for (const c of answer.causes) expect(Number.isFinite(c.probability)).toBe(true);
      }),
      { numRuns: 250 },
    );
  });

  it("does not care about the order of samples and keys", () => {
    const flip = (o: object) => Object.fromEntries(Object.entries(o).reverse());
    fc.assert(
      fc.property(cases, (input) => {
        const turned = {
          ...flip(input),
          samples: [...input.samples].reverse().map((s) => ({ mode: s.mode, values: flip(s.values) })),
        };
        expect(summary(turned)).toEqual(summary(input));
      }),
      { numRuns: 150 },
    );
  });

  it("never throws when a value goes missing", () => {
    for (const c of [...fixtureCases("examples"), ...fixtureCases("tuning").slice(0, 40)]) {
      const input = c.case as { samples?: { values: Record<string, unknown> }[] };
      for (const [i, sample] of (input.samples ?? []).entries())
        for (const key of Object.keys(sample.values)) {
          const without = structuredClone(input);
          delete without.samples?.[i]?.values[key];
          expect(summary(without).length).toBeGreaterThan(30);
        }
    }
  });

  it("an outcome that speaks most against a cause never raises it", () => {
    fc.assert(
      fc.property(cases, fc.constantFrom(...TEST_IDS), (input, id) => {
        const file = caseOf({ ...input, tests: input.tests.filter((t) => t.id !== id) });
        if (!testApplies(id, file.vehicle)) return;
        const before = assess(file);
        for (const { id: outcome } of TESTS[id].outcomes) {
          if (!(outcome in testDistribution(id, null))) continue;
          const lowest = before.causes.reduce((a, b) =>
            (testDistribution(id, b.id)[outcome] ?? 0) < (testDistribution(id, a.id)[outcome] ?? 0) ? b : a,
          );
          if (!KNOWLEDGE[lowest.id].tests?.[id]) continue;
          const after = assess({ ...file, tests: [...file.tests, { id, outcome }] });
          const p = after.causes.find((c) => c.id === lowest.id)?.probability ?? 0;
          // Readings that say the same as the outcome are then said once; with none recorded the rule is strict.
          if (file.samples.length === 0) expect(p).toBeLessThanOrEqual(lowest.probability + 1e-9);
        }
      }),
      { numRuns: 60 },
    );
  });

  it("neutral outcomes move nothing", () => {
    fc.assert(
      fc.property(cases, fc.constantFrom(...TEST_IDS), fc.constantFrom(...NEUTRAL_OUTCOMES), (input, id, outcome) => {
        const tests = input.tests.filter((t) => t.id !== id);
        expect(summary({ ...input, tests: [...tests, { id, outcome }] })).toEqual(summary({ ...input, tests }));
      }),
      { numRuns: 60 },
    );
  });

  it("samples taken after a repair count for nothing", () => {
    fc.assert(
      fc.property(cases, samples, (input, later) => {
        expect(
          summary({ ...input, samples: [...input.samples, ...later.map((s) => ({ ...s, phase: "after" }))] }),
        ).toEqual(summary(input));
      }),
      { numRuns: 80 },
    );
  });

  it("refuses or notes every field at and beyond its limits, by path", () => {
    for (const id of PARAMETER_IDS) {
      const { possible, kind } = PARAMETERS[id];
      for (const bad of [Number.NaN, Number.POSITIVE_INFINITY, "12", true, []]) {
        const parsed = parseCaseFile({
          version: 1,
          vehicle: PORT_MAF,
          samples: [{ mode: "idling", values: { [id]: bad } }],
        });
        expect(parsed.ok, `${id} ${String(bad)}`).toBe(false);
        if (!parsed.ok) {
          expect(parsed.errors[0]?.path).toContain(`samples[0].values.${id}`);
          expect(parsed.errors[0]?.reason.length).toBeGreaterThan(10);
        }
      }
      if (kind !== "number" || !possible) continue;
      for (const v of [possible.min, possible.max, possible.min - 1, possible.max + 1, -1e12, 1e12]) {
        const answer = assess(caseOf({ version: 1, vehicle: {}, samples: [{ mode: "idling", values: { [id]: v } }] }));
        const beyond = v < possible.min || v > possible.max;
        expect(answer.dataQuality.some((n) => n.path === `samples[0].values.${id}`) || !beyond, `${id} ${v}`).toBe(
          true,
        );
      }
    }
  });
});

describe("a proving outcome", () => {
  /** One outcome, one cause: with it recorded and the usual complaint, the cause is first. */
  const DEFINITE: [cause: keyof typeof KNOWLEDGE, test: TestId, outcome: string, vehicle: object][] = [
    ["crankcase-vent-fault", "crankcase-vent-pinch", "trim-recovers", PORT_MAF],
    ["brake-booster-leak", "booster-hose-pinch", "trim-recovers", PORT_MAF],
    ["purge-valve-stuck-open", "purge-line-pinch", "trim-recovers", PORT_MAF],
    ["egr-stuck-open", "egr-block", "idle-recovers", PORT_MAF],
    ["throttle-deposits", "throttle-clean", "idle-recovers", PORT_MAF],
    ["exhaust-leak-upstream", "exhaust-leak-check", "leak-seen", PORT_MAF],
    ["exhaust-restricted", "exhaust-back-pressure", "high", PORT_MAF],
    ["regulator-diaphragm-leak", "regulator-vacuum-port", "fuel-present", PORT_MAF],
    ["fuel-check-valve-leaking", "fuel-pressure-hold", "leaks-down", PORT_MAF],
    ["ethanol-content-high", "ethanol-content", "high", PORT_MAF],
    ["fuel-contaminated", "fuel-sample", "water-or-stale", PORT_MAF],
    ["ignition-coil-failing", "coil-swap", "fault-follows", PORT_MAF],
    ["plug-lead-leaking", "secondary-spray", "arcing", { ...PORT_MAF, ignition: "distributor" }],
    ["head-gasket-leak", "combustion-gas-in-coolant", "positive", PORT_MAF],
    ["thermostat-stuck-open", "thermostat-warm-up", "slow", PORT_MAF],
    ["catalyst-degraded", "catalyst-efficiency", "low", PORT_MAF],
    ["evap-leak", "evap-smoke", "leak-seen", PORT_MAF],
    ["rear-o2-fault", "rear-o2-forced", "no-response", PORT_MAF],
    ["o2-heater-fault", "o2-heater-circuit", "open", PORT_MAF],
    ["knock-sensor-fault", "knock-sensor-tap", "no-response", PORT_MAF],
    ["crank-sensor-fault", "crank-signal", "missing", PORT_MAF],
    ["cam-sensor-fault", "cam-signal", "missing", PORT_MAF],
    ["valve-timing-off", "cam-crank-correlation", "off", PORT_MAF],
    ["cam-phaser-fault", "phaser-command", "no-motion", PORT_MAF],
    ["supply-voltage-low", "battery-and-charging", "low", PORT_MAF],
    ["reference-voltage-fault", "reference-voltage", "off", PORT_MAF],
    ["timing-retarded", "timing-light", "late", CARBURETTED],
    ["timing-advanced", "timing-light", "early", CARBURETTED],
    ["float-level-high", "float-level", "high", CARBURETTED],
    ["float-level-low", "float-level", "low", CARBURETTED],
    ["accelerator-pump-weak", "accelerator-pump-shot", "weak", CARBURETTED],
    ["choke-stuck-closed", "choke-plate", "closed-when-warm", CARBURETTED],
    ["choke-stuck-open", "choke-plate", "open-when-cold", CARBURETTED],
    ["combustion-deposits", "borescope", "piston-deposits", CARBURETTED],
    ["rail-pressure-sensor-biased", "rail-sensor-compare", "off", BOOSTED_DIRECT],
    ["intake-valve-deposits", "borescope", "valve-deposits", BOOSTED_DIRECT],
  ];
  it.each(DEFINITE)("%s by %s: %s", (cause, id, outcome, vehicle) => {
    const reported = Object.entries(KNOWLEDGE[cause].reported).sort((a, b) => b[1] - a[1]);
    for (const complaints of [[reported[0]?.[0]], reported.slice(0, 2).map(([c]) => c)]) {
      const answer = assess(caseOf({ version: 1, vehicle, complaints, tests: [{ id, outcome }] }));
      expect(answer.causes[0]?.id, complaints.join()).toBe(cause);
    }
  });
});
