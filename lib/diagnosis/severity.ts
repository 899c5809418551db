import { type Engine, type Fault, OPERATING_POINTS, solveEngine } from "@/lib/engine/steady-state";
import { TRIM_BEHAVIOURS, type TrimBehaviour } from "./knowledge/shape";

/** One row of the table: so likely within its behaviour, on one bank or both, and the trim it makes at each point. */
export interface TrimRow {
  share: number;
  scope: "one" | "both";
  trimPct: number[];
}
export type TrimTable = Record<"maf" | "map", Record<TrimBehaviour, TrimRow[]>>;

interface Variant {
  share: number;
  scope: "one" | "both";
  fault: Fault;
}

/** The trim the loop can reach before it gives up; makers differ between 20 and 35 (long) plus short. Common practice. */
const AUTHORITY_PCT = 38;

const spread = (
  shares: readonly number[],
  scopeOne: number,
  make: (i: number, scope: "one" | "both") => Fault,
): Variant[] =>
  shares.flatMap((share, i) => [
    ...(scopeOne < 1 ? [{ share: share * (1 - scopeOne), scope: "both" as const, fault: make(i, "both") }] : []),
    ...(scopeOne > 0 ? [{ share: share * scopeOne, scope: "one" as const, fault: make(i, "one") }] : []),
  ]);
const each = <T>(list: readonly T[], i: number): T => list[i] as T;
const even = (n: number) => Array.from({ length: n }, () => 1 / n);

const leakAreas = [0.5, 0.8, 1.1, 1.5, 1.9, 2.4, 3.2];
const fall = ([still, droop]: readonly [number, number]) => [
  still,
  still * (1 - 0.12 * droop),
  still * (1 - 0.35 * droop),
  still * (1 - droop),
];
const flat = (v: number) => [v, v, v, v];

/**
 * Every behaviour as severities of faults for the engine model, for a 2-litre four (all figures scale with displacement;
 * with two banks of two cylinders where one bank is meant). Severity spreads are common practice.
 */
export function variants(behaviour: TrimBehaviour, metering: "maf" | "map"): Variant[] {
  switch (behaviour) {
    case "quiet":
    case "healthy":
    case "sensor-slow":
      return spread([1], 0, () => ({}));
    case "leak-after-throttle":
      return spread(even(leakAreas.length), 0.22, (i, scope) => ({
        leakMm2: each(leakAreas, i) * (scope === "one" ? 0.7 : 1),
        leakAtCylinder: scope === "one" ? 1 : 0,
      }));
    case "leak-at-duct": {
      const shapes = [
        [0.1, 0.09, 0.08, 0.06],
        [0.14, 0.13, 0.12, 0.08],
        [0.2, 0.17, 0.15, 0.1],
        [0.22, 0.12, 0.07, 0.04],
        [0.06, 0.09, 0.12, 0.12],
        [0.08, 0.1, 0.14, 0.16],
      ];
      return spread(even(shapes.length), 0, (i) => ({ ductShare: each(shapes, i) }));
    }
    case "meter-under-reads": {
      const gains = [
        [0.95, 0.93, 0.89, 0.84],
        [0.97, 0.92, 0.87, 0.8],
        [0.94, 0.9, 0.85, 0.78],
        [0.9, 0.87, 0.82, 0.76],
        [0.85, 0.84, 0.83, 0.8],
        [1.1, 1.02, 0.9, 0.85],
        [1.04, 0.98, 0.9, 0.86],
        [0.98, 0.95, 0.92, 0.89],
      ];
      return spread(even(gains.length), 0, (i) => ({ meterGain: each(gains, i) }));
    }
    case "meter-over-reads": {
      const gains = [
        [1.06, 1.1, 1.14, 1.18],
        [1.08, 1.14, 1.2, 1.24],
        [1.15, 1.15, 1.16, 1.16],
        [1.25, 1.25, 1.25, 1.22],
        [1.2, 1.12, 1.06, 1.0],
        [1.04, 1.08, 1.11, 1.14],
      ];
      return spread(even(gains.length), 0, (i) => ({ meterGain: each(gains, i) }));
    }
    case "map-reads-high":
      return spread(even(5), 0, (i) => ({ mapOffsetKPa: each([2.5, 4, 6, 8, 11], i) }));
    case "map-reads-low":
      return spread(even(5), 0, (i) => ({ mapOffsetKPa: -each([2.5, 4, 6, 8, 11], i) }));
    case "pressure-falls-with-flow": {
      const cases = [
        [1, 0.25],
        [1, 0.4],
        [0.97, 0.35],
        [0.93, 0.4],
        [0.88, 0.3],
        [0.8, 0.35],
        [0.75, 0.2],
        [0.7, 0.45],
      ] as const;
      return spread(even(cases.length), 0, (i) => ({ pressureRatio: fall(each(cases, i)) }));
    }
    case "pressure-high":
      return spread(even(5), 0, (i) => ({ pressureRatio: flat(each([1.15, 1.25, 1.4, 1.6, 1.85], i)) }));
    case "constant-extra-fuel":
      return spread(even(5), 0, (i) => ({ extraFuelGps: each([0.012, 0.02, 0.028, 0.038, 0.05], i) }));
    case "oil-vapour":
      return spread(even(4), 0, (i) => ({ extraFuelGps: each([0.009, 0.016, 0.024, 0.034], i) }));
    case "purge":
      return [
        ...spread([0.18, 0.22, 0.22, 0.18], 0, (i) => ({
          extraFuelGps: each([0.012, 0.02, 0.03, 0.042], i),
          extraAirGps: 0.05,
        })),
        ...spread([0.07, 0.07, 0.06], 0, (i) => ({ extraAirGps: each([0.18, 0.32, 0.5], i) })),
      ];
    case "injector-rich":
      return [
        ...spread([0.2, 0.2, 0.2, 0.2], 1, (i) => ({
          injectorFactor: each([1.15, 1.25, 1.4, 1.6], i),
          extraFuelGps: each([0.004, 0.008, 0.012, 0.02], i),
        })),
        // A set on one bank that flows too much, most where the pulse is long.
        ...spread([0.1, 0.1], 1, (i) => ({
          injectorFactor: each(
            [
              [1.04, 1.08, 1.12, 1.18],
              [1.12, 1.13, 1.15, 1.17],
            ],
            i,
          ),
          injectorCylinders: 3,
        })),
      ];
    case "injector-lean":
      return [
        ...spread([0.18, 0.2, 0.16, 0.08], 1, (i) => ({ injectorFactor: each([0.9, 0.8, 0.68, 0.5], i) })),
        // A bank's injectors, or its supply, clogged: short at high flow first.
        ...spread([0.09, 0.09], 1, (i) => ({
          injectorFactor: each(
            [
              [0.96, 0.93, 0.89, 0.83],
              [0.9, 0.88, 0.86, 0.84],
            ],
            i,
          ),
          injectorCylinders: 3,
        })),
        ...spread([0.12, 0.08], 0, (i) => ({ injectorFactor: each([0.92, 0.85], i), injectorCylinders: 12 })),
      ];
    case "egr-open":
      return metering === "maf"
        ? spread([1], 0, () => ({}))
        : // Recirculated gas is hot and partly air at idle: only a small part of its pressure is fuelled for nothing.
          spread(even(4), 0, (i) => ({
            inertShare: [each([0.01, 0.03, 0.05, 0.09], i), each([0.005, 0.01, 0.02, 0.04], i), 0.01, 0],
          }));
    case "exhaust-blocked":
      return metering === "maf"
        ? spread([1], 0, () => ({}))
        : spread(even(3), 0, (i) => ({
            inertShare: [0.01, each([0.02, 0.04, 0.08], i), each([0.02, 0.03, 0.06], i), each([0.06, 0.1, 0.16], i)],
          }));
    case "exhaust-leak":
      return spread(even(4), 0.85, (i) => {
        const b = each([0.07, 0.11, 0.16, 0.22], i);
        return { sensorBias: [b, 0.5 * b, 0.35 * b, 0.08 * b] };
      });
    case "sensor-lean":
      return spread(even(5), 0.9, (i) => ({ sensorBias: flat(each([0.08, 0.13, 0.19, 0.26, 0.33], i)) }));
    case "sensor-rich":
      return spread(even(5), 0.9, (i) => ({ sensorBias: flat(-each([0.08, 0.13, 0.18, 0.23, 0.28], i)) }));
    case "ethanol-more":
      return spread([0.1, 0.15, 0.2, 0.2, 0.2, 0.15], 0, (i) => ({
        tankEthanol: each([0.22, 0.3, 0.4, 0.5, 0.65, 0.85], i),
      }));
    case "ethanol-less":
      // The unit believes in more alcohol than there is: the mirror image, set out as injector flow.
      return [
        ...spread([0.2, 0.2, 0.2, 0.2], 0, (i) => ({
          injectorFactor: each([1.08, 1.17, 1.28, 1.38], i),
          injectorCylinders: 12,
        })),
        ...spread([0.2], 0, () => ({ injectorFactor: 0.88, injectorCylinders: 12 })),
      ];
    case "misfire-air":
      return spread([0.35, 0.25, 0.2, 0.12, 0.08], 1, (i) => ({ misfireShare: each([0, 0.06, 0.14, 0.26, 0.45], i) }));
    case "cold-enrichment":
      // Warm-up enrichment is largest at idle and partly hidden once the loop is closed.
      return spread(even(4), 0, (i) => {
        const e = each([0, 0.02, 0.05, 0.12], i);
        return { injectorFactor: [1 + e, 1 + 0.8 * e, 1 + 0.6 * e, 1 + 0.5 * e], injectorCylinders: 12 };
      });
    case "charge-leak":
      return metering === "maf"
        ? // Air already metered escapes: the meter over-reads in effect, under boost.
          spread(even(3), 0, (i) => ({
            meterGain: [1, 1.01, each([1.01, 1.03, 1.05], i), each([1.08, 1.15, 1.25], i)],
          }))
        : spread([1], 0, () => ({}));
    case "rail-low": {
      const cases = [
        [0.98, 0.25],
        [0.95, 0.4],
        [0.9, 0.45],
        [0.85, 0.1],
        [0.78, 0.05],
        [0.7, 0.1],
      ] as const;
      return spread(even(cases.length), 0, (i) => ({ pressureRatio: fall(each(cases, i)) }));
    }
  }
}

/** Sweeps every behaviour through the engine model. Deterministic. */
export function buildTrimTable(): TrimTable {
  const table = { maf: {}, map: {} } as TrimTable;
  for (const metering of ["maf", "map"] as const) {
    for (const behaviour of TRIM_BEHAVIOURS) {
      table[metering][behaviour] = variants(behaviour, metering).map(({ share, scope, fault }) => {
        const engine: Engine = {
          displacementL: 2,
          cylinders: scope === "one" ? 6 : 4,
          banks: scope === "one" ? 2 : 1,
          metering,
          ethanol: 0.1,
        };
        const solved = solveEngine(engine, fault, scope);
        const limit = (t: number) => Math.round(10 * Math.max(-AUTHORITY_PCT, Math.min(AUTHORITY_PCT, t))) / 10;
        return {
          share: Math.round(share * 1e4) / 1e4,
          scope,
          trimPct: OPERATING_POINTS.map((_, i) => limit(solved[i]?.trimPct[0] ?? 0)),
        };
      });
    }
  }
  return table;
}
