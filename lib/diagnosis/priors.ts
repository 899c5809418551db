import type { ShopMemory } from "./answer";
import { applicableCauses } from "./applies";
import type { CaseFile, CaseVehicle } from "./case-file";
import { KNOWLEDGE } from "./knowledge/index";
import { circumstanceBits, complaintBits, FAITH, historyBits } from "./likelihood";
import type { CauseId, ComplaintId } from "./vocabulary";

/** No cause may pass this on what the customer says alone. */
export const COMPLAINT_ONLY_LIMIT = 0.33;

/** Wear grows with distance: half at nothing, double at 300,000 km. Common practice. */
function wearFactor(vehicle: CaseVehicle, wear: "age" | "young" | undefined): number {
  if (vehicle.odometerKm === undefined || wear !== "age") return 1;
  return Math.min(2, 0.5 + vehicle.odometerKm / 200_000);
}

/** Corrections for what the vehicle is. Common practice; each with its reason. */
function engineFactor(id: CauseId, v: CaseVehicle): number {
  const carb = v.fuelSystem === "carburetted";
  switch (id) {
    case "plug-lead-leaking": // a boot on the plug is short and rarely the culprit
      return v.ignition === "coil-on-plug" ? 0.35 : carb ? 1 : 1.2;
    case "ignition-coil-failing": // one coil each means as many as there are cylinders
      return v.ignition === "distributor" || v.ignition === "points" ? 0.35 : 1.1;
    case "ignition-primary-fault":
      return v.ignition === "distributor" || v.ignition === "points" ? 1.5 : 0.7;
    case "plug-well-contaminated":
      return v.ignition === "coil-on-plug" ? 1.3 : v.ignition === "points" ? 0.3 : 0.8;
    case "intake-valve-deposits": // nothing washes the valves of a direct-injected engine
      return v.fuelSystem === "direct" ? 2 : v.fuelSystem === "port" ? 0.5 : 0.4;
    case "oil-diluted-with-fuel":
      return v.fuelSystem === "direct" ? 2 : 0.7;
    case "injector-restricted":
    case "injector-leaking":
      return v.fuelSystem === "throttle-body" ? 0.7 : 1;
    case "idle-air-control-fault":
      return v.throttleControl === "electronic" || (v.modelYear ?? 2000) > 2008 ? 0.5 : 1.2;
    case "throttle-actuator-fault":
      return v.throttleControl === "electronic" ? 1.4 : (v.modelYear ?? 2005) < 2000 ? 0.3 : 1;
    case "egr-stuck-open":
    case "egr-stuck-closed":
      return v.hasEgr === true ? 1.3 : carb ? 0.3 : 0.9;
    case "regulator-diaphragm-leak":
      return v.fuelReturn === "return" || (v.modelYear ?? 2000) < 2002 ? 1.3 : 0.5;
    case "fuel-pressure-high":
      return v.fuelReturn === "return" ? 1.3 : carb ? 0.4 : 0.9;
    case "fuel-filter-restricted": // later filters live in the tank with the pump
      return (v.modelYear ?? 2000) > 2005 ? 0.6 : 1.2;
    case "crankcase-vent-fault":
    case "brake-booster-leak":
      return carb ? 0.5 : 1;
    case "intake-air-leak":
      return carb ? 0.7 : 1;
    case "secondary-air-fault":
      return v.hasSecondaryAir === true ? 2 : 0.6;
    case "cam-phaser-fault":
      return v.variableCamTiming === true ? 1.4 : (v.modelYear ?? 2005) < 2003 ? 0.35 : 0.9;
    case "immobiliser-active":
      return (v.modelYear ?? 2005) >= 1996 ? 1 : 0.3;
    case "air-filter-restricted":
      return carb ? 1.8 : 0.9;
    case "fuel-vapour-lock":
      return carb ? 1 : 0.15;
    case "carburettor-icing":
      return carb ? 1 : 0.2;
    case "supply-voltage-low":
      return v.hybrid ? 0.6 : 1;
    case "low-compression":
    case "head-gasket-leak":
      return carb ? 0.9 : 1;
    case "fuel-pump-weak":
      return carb ? 0.6 : 1;
    case "evap-leak":
    case "evap-vent-blocked":
      return carb ? 0.2 : 1;
    case "engine-flooded":
      return carb ? 1.6 : 1;
    case "ethanol-learned-wrong":
      return v.fuel === "E85" ? 3 : 0.6;
    case "ethanol-content-high":
      return v.fuel === "E85" ? 0.2 : carb ? 0.5 : 1;
    case "catalyst-degraded":
    case "rear-o2-fault":
      return (v.modelYear ?? 2005) < 1996 ? 0.4 : 1;
    default:
      return 1;
  }
}

function sum<T>(items: ReadonlySet<T>, bits: (item: T) => number): number {
  let total = 0;
  for (const item of items) total += bits(item);
  return total;
}

/** What the customer says, in bits. Complaints of one case describe one thing: beyond the first they count less. */
function complaintsBits(complaints: readonly ComplaintId[], cause: CauseId): number {
  const unique = [...new Set(complaints)];
  if (unique.length === 0) return 0;
  const share = FAITH.complaint * (unique.length === 1 ? 1 : unique.length ** -0.35);
  return share * unique.reduce((sum, complaint) => sum + complaintBits(complaint, cause), 0);
}

const FAMILIES: readonly [name: string, complaints: readonly ComplaintId[]][] = [
  ["no-start", ["no-start-cranks", "no-crank", "starts-then-dies", "hard-start-cold", "hard-start-hot"]],
  ["heat", ["overheats", "white-smoke"]],
  ["misfire", ["misfires", "mil-flashing", "bucks", "backfires-intake", "backfires-exhaust"]],
  ["idle", ["rough-idle", "stalls-at-idle", "idle-too-high", "idle-too-low", "hunts-at-idle"]],
  ["knock", ["knocks", "runs-on"]],
  ["power", ["lacks-power", "hesitates", "reduced-power-mode", "surges-at-cruise"]],
  ["stall", ["stalls-when-warm", "stalls-while-driving"]],
  ["rich", ["black-smoke", "fuel-smell", "poor-economy", "worse-after-refuelling", "sulphur-smell"]],
  ["emissions", ["failed-emissions-test", "mil-on", "monitors-not-ready"]],
];

/** The family of complaint by which a shop's closed cases are counted: the first that any complaint belongs to. */
export function complaintFamily(complaints: readonly ComplaintId[]): string {
  return FAMILIES.find(([, list]) => complaints.some((c) => list.includes(c)))?.[0] ?? "other";
}

/** Closed cases weigh as counts beside a general prior worth this many cases. */
export const GENERAL_PRIOR_CASES = 40;

export interface PriorResult {
  causes: CauseId[];
  /** log₂ of the prior, in the order of `causes`; the priors sum to 1. */
  bits: number[];
  memory: { similar: number; ended: { id: CauseId; count: number }[] } | null;
}

/** Counts of this shop's similar cases: the same complaint family and fuel system. Negative sums count as none. */
export function similarCases(memory: ShopMemory | undefined, caseFile: CaseFile): Map<CauseId, number> {
  const counts = new Map<CauseId, number>();
  const family = complaintFamily(caseFile.complaints);
  for (const entry of memory?.entries ?? []) {
    if (entry.complaintFamily !== family || entry.fuelSystem !== caseFile.vehicle.fuelSystem) continue;
    for (const [id, count] of Object.entries(entry.causes) as [CauseId, number][])
      if (Number.isFinite(count)) counts.set(id, (counts.get(id) ?? 0) + count);
  }
  for (const [id, count] of counts) if (count <= 0) counts.delete(id);
  return counts;
}

/**
 * Priors over the causes the vehicle can have: how common, by fuel system, ignition, age, and what the customer says
 * (complaint, when it happens, what was done before); moved by the
 * shop's own closed cases as Dirichlet counts beside a general prior of `GENERAL_PRIOR_CASES` cases.
 */
export function priorsOf(caseFile: CaseFile, memory?: ShopMemory): PriorResult {
  const causes = applicableCauses(caseFile.vehicle);
  const logs = causes.map((id) => {
    const k = KNOWLEDGE[id];
    return (
      Math.log2(k.prior * wearFactor(caseFile.vehicle, k.wear) * engineFactor(id, caseFile.vehicle)) +
      complaintsBits(caseFile.complaints, id) +
      sum(new Set(caseFile.circumstances), (c) => circumstanceBits(c, id)) +
      sum(new Set(caseFile.history), (h) => historyBits(h, id))
    );
  });
  let p = limitPeak(logs);
  const counts = similarCases(memory, caseFile);
  let similar = 0;
  for (const id of causes) similar += counts.get(id) ?? 0;
  if (similar > 0) {
    // Counts of many cases must not drown evidence: they stand for their share, as Dirichlet counts do.
    p = p.map(
      (q, i) => (GENERAL_PRIOR_CASES * q + (counts.get(causes[i] as CauseId) ?? 0)) / (GENERAL_PRIOR_CASES + similar),
    );
  }
  return {
    causes,
    bits: p.map((q) => Math.log2(q)),
    memory:
      similar > 0
        ? {
            similar,
            ended: [...counts]
              .map(([id, count]) => ({ id, count }))
              .sort((a, b) => b.count - a.count || (a.id < b.id ? -1 : 1)),
          }
        : null,
  };
}

/** Normalizes, flattening just enough that nothing said at the counter alone decides. */
function limitPeak(logs: readonly number[]): number[] {
  const at = (power: number) => {
    const top = Math.max(...logs);
    const raw = logs.map((l) => 2 ** (power * (l - top)));
    const sum = raw.reduce((s, x) => s + x, 0);
    return raw.map((x) => x / sum);
  };
  const full = at(1);
  if (Math.max(...full) <= COMPLAINT_ONLY_LIMIT || logs.length < 4) return full;
  let [low, high] = [0, 1];
  for (let i = 0; i < 40; i++) {
    const mid = (low + high) / 2;
    if (Math.max(...at(mid)) > COMPLAINT_ONLY_LIMIT) high = mid;
    else low = mid;
  }
  return at(low);
}
