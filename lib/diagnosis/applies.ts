import type { CaseVehicle } from "./case-file";
import { CAUSE_IDS, type CauseId, type TestId } from "./vocabulary";

type Need = (v: CaseVehicle) => boolean;

/** An unstated property rules nothing out: a new case knows little about its vehicle. */
const unless =
  (test: Need): Need =>
  (v) =>
    !test(v);
/** Whether the model year leaves room for a part nobody has stated; an unknown year leaves room for everything. */
const before = (v: CaseVehicle, year: number) => v.modelYear === undefined || v.modelYear < year;
const carburetted: Need = (v) => v.fuelSystem === "carburetted";
const injected = unless(carburetted);
// on-board diagnostics, required of cars sold in the US from model year 1996 (40 CFR 86.094-17), ended the carburettor
const needsCarburettor: Need = (v) => v.fuelSystem === "carburetted" || (v.fuelSystem === undefined && before(v, 1996));
const closedLoop: Need = (v) => !carburetted(v) && v.o2Sensing !== "none";
const hasMeter: Need = (v) => v.airMetering === undefined || v.airMetering === "maf" || v.airMetering === "maf+map";
const hasMapSensor: Need = (v) => v.airMetering === undefined || v.airMetering === "map" || v.airMetering === "maf+map";
const boosted: Need = (v) => v.aspiration === undefined || v.aspiration === "boosted";
const direct: Need = (v) => v.fuelSystem === undefined || v.fuelSystem === "direct" || v.fuelSystem === "port+direct";
// common practice: distributors were gone by the middle of the 2000s, points a generation earlier
const distributor: Need = (v) =>
  v.ignition === "distributor" || v.ignition === "points" || (v.ignition === undefined && before(v, 2008));
const points: Need = (v) => v.ignition === "points" || (v.ignition === undefined && before(v, 1990));
const adjustableTiming: Need = (v) => distributor(v);
const electronicEngine: Need = (v) => injected(v) || (v.o2Sensing !== undefined && v.o2Sensing !== "none");
const year = (v: CaseVehicle) => v.modelYear ?? 2005;

const CAUSE_NEEDS: Partial<Record<CauseId, Need>> = {
  "air-duct-leak": (v) => hasMeter(v) && injected(v),
  "charge-air-leak": boosted,
  "boost-control-fault": boosted,
  "maf-under-reads": (v) => hasMeter(v) && injected(v),
  "maf-over-reads": (v) => hasMeter(v) && injected(v),
  "map-reads-high": (v) => hasMapSensor(v) && injected(v),
  "map-reads-low": (v) => hasMapSensor(v) && injected(v),
  "throttle-deposits": injected,
  "idle-air-control-fault": injected,
  "throttle-position-fault": injected,
  "throttle-actuator-fault": (v) => injected(v) && v.throttleControl !== "cable" && year(v) >= 1995,
  "egr-stuck-open": (v) => v.hasEgr !== false,
  "egr-stuck-closed": (v) => v.hasEgr !== false,
  "secondary-air-fault": (v) => v.hasSecondaryAir !== false,
  "exhaust-leak-upstream": closedLoop,
  "fuel-check-valve-leaking": injected,
  "fuel-pressure-high": (v) => v.fuelSystem !== "direct",
  "regulator-diaphragm-leak": (v) => injected(v) && v.fuelReturn !== "returnless" && v.fuelSystem !== "direct",
  "fuel-pump-circuit-fault": injected,
  "injector-leaking": injected,
  "injector-restricted": injected,
  "injector-circuit-fault": injected,
  "high-pressure-fuel-low": direct,
  "rail-pressure-sensor-biased": (v) => direct(v) || (injected(v) && v.fuelReturn === "returnless"),
  "purge-valve-stuck-open": injected,
  "evap-leak": (v) => year(v) >= 1990,
  "evap-vent-blocked": (v) => year(v) >= 1990,
  "ethanol-learned-wrong": (v) => injected(v) && year(v) >= 1998,
  "o2-sensor-slow": closedLoop,
  "o2-sensor-reads-lean": closedLoop,
  "o2-sensor-reads-rich": closedLoop,
  "o2-heater-fault": closedLoop,
  "rear-o2-fault": (v) => closedLoop(v) && year(v) >= 1994,
  "catalyst-degraded": closedLoop,
  "ect-reads-cold": electronicEngine,
  "ect-reads-hot": electronicEngine,
  "iat-biased": electronicEngine,
  "knock-sensor-fault": injected,
  "crank-sensor-fault": (v) => v.ignition !== "points",
  "cam-sensor-fault": (v) => injected(v) && v.ignition !== "points",
  "distributor-worn": distributor,
  "condenser-or-ballast-fault": points,
  "advance-unit-fault": distributor,
  "timing-retarded": adjustableTiming,
  "timing-advanced": adjustableTiming,
  "cam-phaser-fault": (v) => v.variableCamTiming !== false && injected(v) && year(v) >= 1993,
  "intake-valve-deposits": (v) => injected(v),
  "reference-voltage-fault": injected,
  "control-unit-fault": electronicEngine,
  "immobiliser-active": (v) => year(v) >= 1993 && injected(v),
  "float-level-high": needsCarburettor,
  "float-level-low": needsCarburettor,
  "jet-restricted": needsCarburettor,
  "accelerator-pump-weak": needsCarburettor,
  "choke-stuck-closed": needsCarburettor,
  "choke-stuck-open": needsCarburettor,
  "idle-mixture-misset": needsCarburettor,
  "idle-cut-solenoid-fault": needsCarburettor,
  "power-valve-leaking": needsCarburettor,
  "carburettor-icing": (v) =>
    v.fuelSystem === undefined || v.fuelSystem === "carburetted" || v.fuelSystem === "throttle-body",
  "fuel-vapour-lock": (v) => v.fuelSystem !== "direct",
};

/** The causes this vehicle can have, in the order of the vocabulary. */
export function applicableCauses(vehicle: CaseVehicle): CauseId[] {
  return CAUSE_IDS.filter((id) => CAUSE_NEEDS[id]?.(vehicle) ?? true);
}

const TEST_NEEDS: Partial<Record<TestId, Need>> = {
  "crankcase-vent-pinch": () => true,
  "purge-line-pinch": injected,
  "egr-block": (v) => v.hasEgr !== false,
  "egr-command": (v) => v.hasEgr !== false,
  "maf-unplugged": (v) => hasMeter(v) && injected(v),
  "exhaust-leak-check": closedLoop,
  "regulator-vacuum-port": (v) => injected(v) && v.fuelReturn !== "returnless",
  "injector-balance": (v) => injected(v) && v.fuelSystem !== "direct",
  "injector-signal": injected,
  "injector-swap": injected,
  "o2-forced-rich": closedLoop,
  "o2-forced-lean": closedLoop,
  "o2-heater-circuit": closedLoop,
  "rear-o2-forced": closedLoop,
  "catalyst-efficiency": closedLoop,
  "ect-resistance": electronicEngine,
  "iat-resistance": electronicEngine,
  "soak-compare": electronicEngine,
  "map-key-on": (v) => hasMapSensor(v) && injected(v),
  "throttle-sweep": injected,
  "throttle-clean": injected,
  "coil-swap": (v) => v.ignition !== "points" && v.ignition !== "distributor",
  "timing-light": adjustableTiming,
  "dwell-check": points,
  "crank-signal": (v) => v.ignition !== "points",
  "cam-signal": injected,
  "cam-crank-correlation": injected,
  "knock-sensor-tap": injected,
  "evap-smoke": (v) => year(v) >= 1990,
  "float-level": needsCarburettor,
  "accelerator-pump-shot": needsCarburettor,
  "choke-plate": needsCarburettor,
  "idle-mixture-screw": needsCarburettor,
  "boost-check": boosted,
  "phaser-command": (v) => v.variableCamTiming !== false && injected(v),
  "rail-sensor-compare": (v) => direct(v),
  "reference-voltage": injected,
  "fuel-pressure-hold": injected,
  "pump-current": injected,
  "power-balance": injected,
};

export const testApplies = (id: TestId, vehicle: CaseVehicle): boolean => TEST_NEEDS[id]?.(vehicle) ?? true;
