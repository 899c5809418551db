/**
 * The fixed words of a case: every id that the database, the forms, the import and the assessment share,
 * with its plain English label. Ids never change; labels may.
 */

export const FUEL_SYSTEMS = ["port", "direct", "port+direct", "throttle-body", "carburetted"] as const;
export type FuelSystem = (typeof FUEL_SYSTEMS)[number];
export const FUEL_SYSTEM_LABELS: Record<FuelSystem, string> = {
  port: "Port injection",
  direct: "Direct injection",
  "port+direct": "Port and direct injection",
  "throttle-body": "Throttle-body injection",
  carburetted: "Carburettor",
};

export const AIR_METERINGS = ["maf", "map", "maf+map", "none"] as const;
export type AirMetering = (typeof AIR_METERINGS)[number];
export const AIR_METERING_LABELS: Record<AirMetering, string> = {
  maf: "Air-flow meter",
  map: "Manifold pressure (speed-density)",
  "maf+map": "Air-flow meter and manifold pressure",
  none: "None (carburettor)",
};

export const ASPIRATIONS = ["natural", "boosted"] as const;
export type Aspiration = (typeof ASPIRATIONS)[number];
export const ASPIRATION_LABELS: Record<Aspiration, string> = { natural: "Naturally aspirated", boosted: "Boosted" };

export const IGNITIONS = ["coil-on-plug", "waste-spark", "distributor", "points"] as const;
export type Ignition = (typeof IGNITIONS)[number];
export const IGNITION_LABELS: Record<Ignition, string> = {
  "coil-on-plug": "Coil on plug",
  "waste-spark": "Wasted spark, one coil for two cylinders",
  distributor: "Distributor, electronic",
  points: "Distributor with points",
};

export const O2_SENSINGS = ["switching", "wide-range", "none"] as const;
export type O2Sensing = (typeof O2_SENSINGS)[number];
export const O2_SENSING_LABELS: Record<O2Sensing, string> = {
  switching: "Switching (zirconia)",
  "wide-range": "Wide-range",
  none: "No oxygen sensor",
};

export const FUELS = ["E0", "E5", "E10", "E15", "E20", "E85"] as const;
export type Fuel = (typeof FUELS)[number];
export const FUEL_LABELS: Record<Fuel, string> = {
  E0: "E0, no ethanol",
  E5: "E5",
  E10: "E10",
  E15: "E15",
  E20: "E20",
  E85: "E85",
};

export const FUEL_RETURNS = ["return", "returnless"] as const;
export type FuelReturn = (typeof FUEL_RETURNS)[number];
export const THROTTLE_CONTROLS = ["cable", "electronic"] as const;
export type ThrottleControl = (typeof THROTTLE_CONTROLS)[number];

export const MODES = [
  "key-on",
  "starting",
  "idling",
  "raised-idle",
  "accelerating",
  "cruising",
  "decelerating",
] as const;
export type Mode = (typeof MODES)[number];
export const MODE_LABELS: Record<Mode, string> = {
  "key-on": "Key on, engine off",
  starting: "Starting",
  idling: "Idling",
  "raised-idle": "2,500 r/min, no load",
  accelerating: "Accelerating",
  cruising: "Cruising",
  decelerating: "Decelerating",
};

export const PHASES = ["before", "after"] as const;
export type Phase = (typeof PHASES)[number];
export const PHASE_LABELS: Record<Phase, string> = { before: "As found", after: "After the repair" };

export const COMPLAINTS = [
  "mil-on",
  "mil-flashing",
  "rough-idle",
  "stalls-at-idle",
  "idle-too-high",
  "idle-too-low",
  "surges-at-cruise",
  "hesitates",
  "lacks-power",
  "misfires",
  "backfires-intake",
  "backfires-exhaust",
  "knocks",
  "runs-on",
  "no-start-cranks",
  "hard-start-cold",
  "hard-start-hot",
  "stalls-when-warm",
  "poor-economy",
  "black-smoke",
  "fuel-smell",
  "sulphur-smell",
  "overheats",
  "failed-emissions-test",
  "ticks-or-hisses",
  "worse-after-refuelling",
  "no-crank",
  "starts-then-dies",
  "stalls-while-driving",
  "hunts-at-idle",
  "reduced-power-mode",
  "bucks",
  "blue-smoke",
  "white-smoke",
  "fuel-leak-seen",
  "hard-to-refuel",
  "monitors-not-ready",
] as const;
export type ComplaintId = (typeof COMPLAINTS)[number];
export const COMPLAINT_LABELS: Record<ComplaintId, string> = {
  "mil-on": "Warning lamp on",
  "mil-flashing": "Warning lamp flashing",
  "rough-idle": "Rough idle",
  "stalls-at-idle": "Stalls at idle",
  "idle-too-high": "Idle too high",
  "idle-too-low": "Idle too low",
  "surges-at-cruise": "Surges at steady speed",
  hesitates: "Hesitates when pulling away",
  "lacks-power": "Lacks power",
  misfires: "Misfires",
  "backfires-intake": "Backfires through the intake",
  "backfires-exhaust": "Bangs in the exhaust",
  knocks: "Knocks or pings",
  "runs-on": "Runs on after switching off",
  "no-start-cranks": "Cranks, does not start",
  "hard-start-cold": "Hard to start cold",
  "hard-start-hot": "Hard to start hot",
  "stalls-when-warm": "Stalls when warm",
  "poor-economy": "Uses too much fuel",
  "black-smoke": "Black smoke",
  "fuel-smell": "Smell of fuel",
  "sulphur-smell": "Smell of bad eggs",
  overheats: "Overheats",
  "failed-emissions-test": "Failed the emissions test",
  "ticks-or-hisses": "Ticks or hisses",
  "worse-after-refuelling": "Worse after filling up",
  "no-crank": "Does not crank",
  "starts-then-dies": "Starts, then dies",
  "stalls-while-driving": "Stalls while driving",
  "hunts-at-idle": "Idle goes up and down",
  "reduced-power-mode": "Reduced power mode",
  bucks: "Bucks and jerks",
  "blue-smoke": "Blue smoke",
  "white-smoke": "White smoke",
  "fuel-leak-seen": "Fuel leak seen",
  "hard-to-refuel": "Hard to fill up",
  "monitors-not-ready": "Self-tests not ready",
};

export const CIRCUMSTANCES = [
  "cold",
  "warm",
  "hot-soak",
  "wet",
  "frost",
  "uphill",
  "after-refuelling",
  "low-tank",
  "intermittent",
] as const;
export type Circumstance = (typeof CIRCUMSTANCES)[number];
export const CIRCUMSTANCE_LABELS: Record<Circumstance, string> = {
  cold: "When cold",
  warm: "When warm",
  "hot-soak": "After a hot stop",
  wet: "In the wet",
  frost: "In cool, damp or frosty weather",
  uphill: "Uphill or under load",
  "after-refuelling": "After filling up",
  "low-tank": "With a low tank",
  intermittent: "Comes and goes",
};

export const HISTORIES = ["battery-off", "codes-cleared", "recent-work", "misfuelled"] as const;
export type History = (typeof HISTORIES)[number];
export const HISTORY_LABELS: Record<History, string> = {
  "battery-off": "Battery was disconnected",
  "codes-cleared": "Codes were cleared",
  "recent-work": "Recent work on the engine",
  misfuelled: "Wrong fuel was filled",
};

export const CODE_STATUSES = ["stored", "pending", "permanent"] as const;
export type CodeStatus = (typeof CODE_STATUSES)[number];
export const CODE_STATUS_LABELS: Record<CodeStatus, string> = {
  stored: "Stored",
  pending: "Pending",
  permanent: "Permanent",
};

export const READINESS_STATES = ["complete", "incomplete", "unsupported"] as const;
export type ReadinessState = (typeof READINESS_STATES)[number];

export const LOOP_STATES = ["OL", "CL", "OL-Drive", "OL-Fault", "CL-Fault"] as const;
export type LoopState = (typeof LOOP_STATES)[number];

export const CAUSE_IDS = [
  "intake-air-leak",
  "crankcase-vent-fault",
  "brake-booster-leak",
  "air-duct-leak",
  "charge-air-leak",
  "maf-under-reads",
  "maf-over-reads",
  "map-reads-high",
  "map-reads-low",
  "air-filter-restricted",
  "throttle-deposits",
  "idle-air-control-fault",
  "throttle-position-fault",
  "throttle-actuator-fault",
  "egr-stuck-open",
  "egr-stuck-closed",
  "secondary-air-fault",
  "exhaust-restricted",
  "boost-control-fault",
  "exhaust-leak-upstream",
  "fuel-pump-weak",
  "fuel-pump-circuit-fault",
  "fuel-filter-restricted",
  "fuel-check-valve-leaking",
  "fuel-pressure-high",
  "regulator-diaphragm-leak",
  "fuel-leak-external",
  "tank-empty",
  "injector-leaking",
  "injector-restricted",
  "injector-circuit-fault",
  "high-pressure-fuel-low",
  "rail-pressure-sensor-biased",
  "purge-valve-stuck-open",
  "evap-leak",
  "evap-vent-blocked",
  "ethanol-content-high",
  "ethanol-learned-wrong",
  "fuel-contaminated",
  "octane-too-low",
  "oil-diluted-with-fuel",
  "engine-flooded",
  "o2-sensor-slow",
  "o2-sensor-reads-lean",
  "o2-sensor-reads-rich",
  "o2-heater-fault",
  "rear-o2-fault",
  "ect-reads-cold",
  "ect-reads-hot",
  "iat-biased",
  "thermostat-stuck-open",
  "engine-overheating",
  "knock-sensor-fault",
  "crank-sensor-fault",
  "cam-sensor-fault",
  "spark-plugs-worn",
  "plug-well-contaminated",
  "ignition-coil-failing",
  "plug-lead-leaking",
  "ignition-primary-fault",
  "distributor-worn",
  "condenser-or-ballast-fault",
  "advance-unit-fault",
  "timing-retarded",
  "timing-advanced",
  "low-compression",
  "head-gasket-leak",
  "valve-timing-off",
  "valve-train-worn",
  "cam-phaser-fault",
  "combustion-deposits",
  "intake-valve-deposits",
  "catalyst-degraded",
  "supply-voltage-low",
  "power-or-ground-fault",
  "reference-voltage-fault",
  "control-unit-fault",
  "immobiliser-active",
  "float-level-high",
  "float-level-low",
  "jet-restricted",
  "accelerator-pump-weak",
  "choke-stuck-closed",
  "choke-stuck-open",
  "idle-mixture-misset",
  "idle-cut-solenoid-fault",
  "power-valve-leaking",
  "carburettor-icing",
  "fuel-vapour-lock",
  "not-engine",
  "no-fault-found",
] as const;
export type CauseId = (typeof CAUSE_IDS)[number];

export const TEST_IDS = [
  "intake-smoke",
  "enrichment-spray",
  "crankcase-vent-pinch",
  "booster-hose-pinch",
  "purge-line-pinch",
  "egr-block",
  "maf-unplugged",
  "exhaust-leak-check",
  "fuel-pressure",
  "fuel-pressure-under-load",
  "fuel-volume",
  "fuel-pressure-hold",
  "regulator-vacuum-port",
  "injector-balance",
  "injector-signal",
  "injector-swap",
  "ethanol-content",
  "fuel-sample",
  "o2-forced-rich",
  "o2-forced-lean",
  "o2-heater-circuit",
  "ect-resistance",
  "iat-resistance",
  "map-key-on",
  "throttle-sweep",
  "throttle-clean",
  "spark-tester",
  "coil-swap",
  "plug-inspection",
  "secondary-spray",
  "timing-light",
  "dwell-check",
  "relative-compression",
  "compression",
  "compression-wet",
  "cylinder-leakdown",
  "combustion-gas-in-coolant",
  "vacuum-gauge",
  "exhaust-back-pressure",
  "cam-crank-correlation",
  "crank-signal",
  "cam-signal",
  "knock-sensor-tap",
  "thermostat-warm-up",
  "cooling-pressure",
  "evap-smoke",
  "catalyst-efficiency",
  "battery-and-charging",
  "float-level",
  "accelerator-pump-shot",
  "choke-plate",
  "idle-mixture-screw",
  "oil-check",
  "air-filter-look",
  "boost-check",
  "egr-command",
  "rear-o2-forced",
  "borescope",
  "visual-inspection",
  "fuel-leak-look",
  "power-balance",
  "pump-current",
  "voltage-drop",
  "reference-voltage",
  "wiggle-heat-cold",
  "secondary-scope",
  "soak-compare",
  "phaser-command",
  "rail-sensor-compare",
  "road-log",
] as const;
export type TestId = (typeof TEST_IDS)[number];

/** Outcomes every test may have; they move nothing. */
export const NEUTRAL_OUTCOMES = ["inconclusive", "not-reproduced", "not-accessible"] as const;
export type NeutralOutcome = (typeof NEUTRAL_OUTCOMES)[number];
export const NEUTRAL_OUTCOME_LABELS: Record<NeutralOutcome, string> = {
  inconclusive: "Inconclusive",
  "not-reproduced": "Fault not present during the test",
  "not-accessible": "Could not get to it",
};
