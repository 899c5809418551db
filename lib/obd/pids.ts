import { isParameterId, type ParameterId } from "./parameters";

/**
 * The parameter table of SAE J1979 / ISO 15031-5 services 01 and 02, fuel and ignition part: one row a PID.
 *
 * A number field is `(raw - zero) * mul / div` of `width` bytes from byte `at` (byte 0 is A, the first after the PID,
 * most significant first). Units are the standard's: "1/min", "°" (before TDC), "-" for a ratio; the magnitudes are
 * those of lib/obd/parameters.ts. `status` tells whether the formula was compared with a public source.
 */

/** Byte of PID 4F (0 to 3) or PID 50 ("maf") whose non-zero value replaces the default scaling. */
export type ScaleBy = "lambda" | "o2Volts" | "o2Milliamps" | "map" | "maf";

export interface NumberField {
  /** J1930 abbreviation; `xy` stands for bank and sensor, which the caller's sensor layout fills in. */
  id: string;
  unit: string;
  at: number;
  width: 1 | 2;
  zero: number;
  mul: number;
  div: number;
  min: number;
  max: number;
  signed?: true;
  /** Raw value that means "this sensor is not used here". */
  unusedRaw?: number;
  scaleBy?: ScaleBy;
  /** Present only when the answer carries the byte (banks 3 and 4). */
  optional?: true;
  /** What a pressure is measured against. */
  reference?: PressureReference;
  /** The case parameter this field feeds; null when none takes it as it stands. */
  parameter: ParameterId | null;
}

export type PressureReference = "gauge" | "manifold" | "absolute";

/** What reads a row that is not plain numbers. */
export type PidForm =
  | "numbers"
  | "supported"
  | "monitors"
  | "frameCode"
  | "loops"
  | "sensors"
  | "requirement"
  | "fuelType"
  | "scaling"
  | "lengthOnly";

export interface PidRow {
  pid: number;
  name: string;
  /** Data bytes after the PID; `optionalBytes` more may follow. */
  bytes: number;
  optionalBytes: number;
  formula: string;
  form: PidForm;
  fields: readonly NumberField[];
  status: "verified" | "from memory";
}

type Scale = Pick<NumberField, "unit" | "width" | "zero" | "mul" | "div" | "min" | "max">;
const scale = (
  unit: string,
  width: 1 | 2,
  zero: number,
  mul: number,
  div: number,
  min: number,
  max: number,
): Scale => ({ unit, width, zero, mul, div, min, max });

const PERCENT = scale("%", 1, 0, 100, 255, 0, 100);
const TRIM = scale("%", 1, 128, 100, 128, -100, 99.21875);
const CELSIUS = scale("°C", 1, 40, 1, 1, -40, 215);
const KPA = scale("kPa", 1, 0, 1, 1, 0, 255);
const LAMBDA = scale("-", 2, 0, 2, 65536, 0, 2);
const CATALYST = scale("°C", 2, 400, 1, 10, -40, 6513.5);
const word = (unit: string, mul: number, div: number, max: number) => scale(unit, 2, 0, mul, div, 0, max);
const COUNT16 = (unit: string) => word(unit, 1, 1, 65535);

function field(id: string, at: number, by: Scale, more: Partial<NumberField> = {}): NumberField {
  return { id, at, ...by, parameter: isParameterId(id) ? id : null, ...more };
}

const rows = new Map<number, PidRow>();

function add(
  pid: number,
  name: string,
  formula: string,
  fields: NumberField[],
  more: { form?: PidForm; bytes?: number; status?: PidRow["status"] } = {},
): void {
  const end = (list: NumberField[]) => Math.max(0, ...list.map((f) => f.at + f.width));
  const bytes = more.bytes ?? end(fields.filter((f) => !f.optional));
  rows.set(pid, {
    pid,
    name,
    formula,
    fields,
    bytes,
    optionalBytes: Math.max(0, end(fields) - bytes),
    form: more.form ?? "numbers",
    status: more.status ?? "verified",
  });
}

for (const base of [0x00, 0x20, 0x40, 0x60, 0x80, 0xa0, 0xc0]) {
  add(base, "supported parameters", "bit 7 of A = base + 1 … bit 0 of D = base + 20 hex", [], {
    form: "supported",
    bytes: 4,
  });
}
add(0x01, "monitor status since codes cleared", "bits", [], { form: "monitors", bytes: 4 });
add(0x02, "code that stored the freeze frame", "J2012 code", [], { form: "frameCode", bytes: 2 });
add(0x03, "fuel system status", "one bit a system", [], { form: "loops", bytes: 2 });
add(0x04, "calculated load", "A*100/255", [field("LOAD_PCT", 0, PERCENT)]);
add(0x05, "engine coolant temperature", "A-40", [field("ECT", 0, CELSIUS)]);

const trims: [number, string, string, string][] = [
  [0x06, "SHRTFT", "1", "short-term fuel trim"],
  [0x07, "LONGFT", "1", "long-term fuel trim"],
  [0x08, "SHRTFT", "2", "short-term fuel trim"],
  [0x09, "LONGFT", "2", "long-term fuel trim"],
  [0x55, "STSO2FT", "1", "short-term trim of the rear sensor"],
  [0x56, "LGSO2FT", "1", "long-term trim of the rear sensor"],
  [0x57, "STSO2FT", "2", "short-term trim of the rear sensor"],
  [0x58, "LGSO2FT", "2", "long-term trim of the rear sensor"],
];
for (const [pid, id, bank, name] of trims) {
  const other = bank === "1" ? "3" : "4";
  add(pid, `${name}, bank ${bank} (byte B: bank ${other})`, "(A-128)*100/128", [
    field(id + bank, 0, TRIM),
    field(id + other, 1, TRIM, { optional: true }),
  ]);
}

add(0x0a, "fuel rail pressure, gauge", "3*A", [
  field("FRP", 0, scale("kPa", 1, 0, 3, 1, 0, 765), { reference: "gauge" }),
]);
add(0x0b, "intake manifold absolute pressure", "A", [field("MAP", 0, KPA, { scaleBy: "map", reference: "absolute" })]);
add(0x0c, "engine speed", "(256A+B)/4", [field("RPM", 0, word("1/min", 1, 4, 16383.75))]);
add(0x0d, "vehicle speed", "A", [field("VSS", 0, scale("km/h", 1, 0, 1, 1, 0, 255))]);
add(0x0e, "ignition advance, cylinder 1", "A/2-64", [field("SPARKADV", 0, scale("°", 1, 128, 1, 2, -64, 63.5))]);
add(0x0f, "intake air temperature", "A-40", [field("IAT", 0, CELSIUS)]);
add(0x10, "mass air flow", "(256A+B)/100", [field("MAF", 0, word("g/s", 1, 100, 655.35), { scaleBy: "maf" })]);
add(0x11, "absolute throttle position", "A*100/255", [field("TP", 0, PERCENT)]);
add(0x13, "oxygen sensors, two banks", "bits", [], { form: "sensors", bytes: 1 });
for (let pid = 0x14; pid <= 0x1b; pid++) {
  add(pid, "switching oxygen sensor", "V=A*0.005; T=(B-128)*100/128, FF not used", [
    field("O2Sxy", 0, scale("V", 1, 0, 1, 200, 0, 1.275)),
    field("SHRTFTxy", 1, TRIM, { unusedRaw: 0xff }),
  ]);
}
add(0x1c, "diagnostic requirement the vehicle was built to", "code", [], { form: "requirement", bytes: 1 });
add(0x1d, "oxygen sensors, four banks", "bits", [], { form: "sensors", bytes: 1 });
add(0x1f, "time since engine start", "256A+B", [field("RUNTM", 0, COUNT16("s"))]);
add(0x21, "distance with the lamp on", "256A+B", [field("MIL_DIST", 0, COUNT16("km"))]);
// The case's rail pressure is gauge: what is measured against something else does not feed it unconverted.
add(0x22, "rail pressure relative to manifold", "(256A+B)*0.079", [
  field("FRP", 0, word("kPa", 79, 1000, 5177.265), { parameter: null, reference: "manifold" }),
]);
add(0x23, "rail pressure, gauge (direct injection)", "(256A+B)*10", [
  field("FRP", 0, word("kPa", 10, 1, 655350), { reference: "gauge" }),
]);
for (let pid = 0x24; pid <= 0x2b; pid++) {
  add(pid, "wide-range oxygen sensor, lambda and voltage", "L=(256A+B)*2/65536; V=(256C+D)*8/65536", [
    field("EQ_RATxy", 0, LAMBDA, { scaleBy: "lambda" }),
    field("O2Sxy", 2, word("V", 8, 65536, 8), { scaleBy: "o2Volts" }),
  ]);
}
add(0x2c, "commanded EGR", "A*100/255", [field("EGR_PCT", 0, PERCENT)]);
add(0x2d, "EGR error", "(A-128)*100/128", [field("EGR_ERR", 0, TRIM)]);
add(0x2e, "commanded purge", "A*100/255", [field("EVAP_PCT", 0, PERCENT)]);
add(0x2f, "fuel level", "A*100/255", [field("FLI", 0, PERCENT)]);
add(0x30, "warm-ups since codes cleared", "A", [field("WARM_UPS", 0, scale("count", 1, 0, 1, 1, 0, 255))]);
add(0x31, "distance since codes cleared", "256A+B", [field("CLR_DIST", 0, COUNT16("km"))]);
add(
  0x32,
  "evaporative system vapour pressure",
  "two's complement (256A+B)/4",
  [field("EVAP_VP", 0, scale("Pa", 2, 0, 1, 4, -8192, 8191.75), { signed: true })],
  { status: "from memory" },
);
add(0x33, "barometric pressure", "A", [field("BARO", 0, KPA, { reference: "absolute" })]);
for (let pid = 0x34; pid <= 0x3b; pid++) {
  add(pid, "wide-range oxygen sensor, lambda and pump current", "L=(256A+B)*2/65536; I=(256C+D)/256-128", [
    field("EQ_RATxy", 0, LAMBDA, { scaleBy: "lambda" }),
    field("O2Sxy", 2, scale("mA", 2, 32768, 1, 256, -128, 128), { scaleBy: "o2Milliamps" }),
  ]);
}
["11", "21", "12", "22"].forEach((place, i) => {
  add(0x3c + i, `catalyst temperature, bank ${place[0]} sensor ${place[1]}`, "(256A+B)/10-40", [
    field(`CATEMP${place}`, 0, CATALYST),
  ]);
});
add(0x41, "monitor status this driving cycle", "bits", [], { form: "monitors", bytes: 4 });
add(0x42, "control module supply voltage", "(256A+B)/1000", [field("VPWR", 0, word("V", 1, 1000, 65.535))]);
add(0x43, "absolute load", "(256A+B)*100/255", [field("LOAD_ABS", 0, word("%", 100, 255, 25700))]);
add(0x44, "commanded lambda", "(256A+B)*2/65536", [field("EQ_RAT", 0, LAMBDA, { scaleBy: "lambda" })]);
const percents: [number, string, string][] = [
  [0x45, "TP_R", "relative throttle position"],
  [0x47, "TP_B", "throttle position B"],
  [0x48, "TP_C", "throttle position C"],
  [0x49, "APP_D", "accelerator pedal D"],
  [0x4a, "APP_E", "accelerator pedal E"],
  [0x4b, "APP_F", "accelerator pedal F"],
  [0x4c, "TAC_PCT", "commanded throttle actuator"],
  [0x52, "ALCH_PCT", "alcohol share of the fuel"],
  [0x5a, "APP_R", "relative accelerator pedal"],
];
for (const [pid, id, name] of percents) add(pid, name, "A*100/255", [field(id, 0, PERCENT)]);
add(0x46, "ambient air temperature", "A-40", [field("AAT", 0, CELSIUS)]);
add(0x4d, "run time with the lamp on", "256A+B", [field("MIL_TIME", 0, COUNT16("min"))]);
add(0x4e, "time since codes cleared", "256A+B", [field("CLR_TIME", 0, COUNT16("min"))]);
add(0x4f, "maxima of lambda, sensor volts, sensor mA, MAP/10", "A, B, C, D", [], { form: "scaling", bytes: 4 });
add(0x50, "maximum of mass air flow / 10", "A", [], { form: "scaling", bytes: 4, status: "from memory" });
add(0x51, "fuel type", "code", [], { form: "fuelType", bytes: 1 });
// Documented both as two's complement and as raw - 32768, so the raw word is shown.
add(0x54, "evaporative vapour pressure, wide (raw)", "256A+B", [field("EVAP_VP_RAW", 0, COUNT16("raw"))], {
  status: "from memory",
});
add(0x59, "rail pressure, absolute", "(256A+B)*10", [
  field("FRP", 0, word("kPa", 10, 1, 655350), { parameter: null, reference: "absolute" }),
]);
add(0x5c, "engine oil temperature", "A-40", [field("EOT", 0, CELSIUS)]);
add(0x5d, "fuel injection timing", "(256A+B)/128-210", [
  field("FUEL_TIMING", 0, scale("°", 2, 26880, 1, 128, -210, 301.992)),
]);
add(0x5e, "engine fuel rate", "(256A+B)*0.05", [field("FUEL_RATE", 0, word("L/h", 1, 20, 3212.75))]);
add(
  0x9d,
  "fuel rate by mass, engine and vehicle",
  "(256A+B)*0.02",
  [field("ENG_FUEL_RATE", 0, word("g/s", 1, 50, 1310.7)), field("VEH_FUEL_RATE", 2, word("g/s", 1, 50, 1310.7))],
  { status: "from memory" },
);
// Not read here, but the length lets the parameters behind them in one answer be found (J1979, from memory).
const lengths: [number, number, string][] = [
  [0x12, 1, "secondary air status"],
  [0x1e, 1, "auxiliary input status"],
  [0x53, 2, "absolute vapour pressure"],
  [0x5b, 1, "hybrid battery remaining life"],
  [0x5f, 1, "emission requirement"],
  [0x61, 1, "demanded torque"],
  [0x62, 1, "actual torque"],
  [0x63, 2, "reference torque"],
];
for (const [pid, bytes, name] of lengths) {
  add(pid, name, "", [], { form: "lengthOnly", bytes, status: "from memory" });
}

/** Every PID with a known length, by number. */
export const PIDS: ReadonlyMap<number, PidRow> = rows;

/** PID 03 values (J1979); no bit set means the system is absent or the engine off. */
export const FUEL_SYSTEM_LABELS: Readonly<Record<number, string>> = {
  0: "none",
  1: "OL",
  2: "CL",
  4: "OL-Drive",
  8: "OL-Fault",
  16: "CL-Fault",
};

/** PID 51 values (J1979): 00 to 10 compared with a public source, 11 to 17 from memory. */
export const FUEL_TYPES: readonly string[] = [
  "not available",
  "gasoline",
  "methanol",
  "ethanol",
  "diesel",
  "LPG",
  "CNG",
  "propane",
  "battery electric",
  "bi-fuel running gasoline",
  "bi-fuel running methanol",
  "bi-fuel running ethanol",
  "bi-fuel running LPG",
  "bi-fuel running CNG",
  "bi-fuel running propane",
  "bi-fuel running electricity",
  "bi-fuel mixed gas/electric",
  "hybrid gasoline",
  "hybrid ethanol",
  "hybrid diesel",
  "hybrid electric",
  "hybrid mixed fuel",
  "hybrid regenerative",
  "bi-fuel running diesel",
];

/** PID 1C values 01 to 0D (J1979, extract). */
export const REQUIREMENTS: Readonly<Record<number, string>> = {
  1: "OBD II (California ARB)",
  2: "OBD (US federal)",
  3: "OBD + OBD II",
  4: "OBD I",
  5: "not OBD compliant",
  6: "EOBD",
  7: "EOBD + OBD II",
  8: "EOBD + OBD",
  9: "EOBD + OBD + OBD II",
  10: "JOBD",
  11: "JOBD + OBD II",
  12: "JOBD + EOBD",
  13: "JOBD + EOBD + OBD II",
};
