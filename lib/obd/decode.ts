import { decodeCodes, decodeTests, type Framing, type TestResult, vinText } from "./answers";
import type { ParameterId } from "./parameters";
import {
  FUEL_SYSTEM_LABELS,
  FUEL_TYPES,
  type NumberField,
  PIDS,
  type PidRow,
  type PressureReference,
  REQUIREMENTS,
} from "./pids";
import { decodeMonitors, type MonitorStatus } from "./readiness";
import { decodeTroubleCode } from "./trouble-codes";

/** One byte string that could not be read; `pid` is null when it belongs to no parameter. */
export interface Problem {
  pid: number | null;
  reason: string;
}

export interface SensorPlace {
  bank: number;
  sensor: number;
}

interface Base {
  pid: number;
  /** Freeze frame number for service 02; null for live data. */
  frame: number | null;
  /** J1930 abbreviation with bank and sensor filled in. */
  id: string;
  /** The case parameter this feeds as it stands, or null. */
  parameter: ParameterId | null;
}

export type Reading = Base &
  (
    | {
        kind: "number";
        /** In `unit`, inside min…max; null only when the answer says that the sensor is not used. */
        value: number | null;
        unit: string;
        min: number;
        max: number;
        reference?: PressureReference;
      }
    | { kind: "label"; code: number; value: string }
    | { kind: "sensors"; value: SensorPlace[] }
    | { kind: "supported"; value: number[] }
    | { kind: "monitors"; value: MonitorStatus }
    | { kind: "scaling"; value: number[] }
    | { kind: "code"; value: string | null }
  );

/** What earlier answers of the same control unit said that later ones need. Start from `NEW_CONTEXT`. */
export interface DecodeContext {
  /** Which of PIDs 13 and 1D numbers the oxygen sensors; null until it is known. */
  layout: "two-bank" | "four-bank" | null;
  /** Whether trims carry byte B for banks 3 and 4; null until it is known. */
  moreBanks: boolean | null;
  /** PID 4F bytes A to D and PID 50 byte A; zero means default scaling. */
  maxima: { lambda: number; o2Volts: number; o2Milliamps: number; map: number; maf: number };
  /** How codes are framed, when the line tells (a CAN id was there). */
  framing?: Framing;
}

export const NEW_CONTEXT: DecodeContext = {
  layout: null,
  moreBanks: null,
  maxima: { lambda: 0, o2Volts: 0, o2Milliamps: 0, map: 0, maf: 0 },
};

export type Answer =
  | { kind: "data"; service: 1 | 2; readings: Reading[] }
  | { kind: "codes"; service: 3 | 7 | 10; state: "confirmed" | "pending" | "permanent"; codes: string[] }
  | { kind: "cleared" }
  | { kind: "tests"; tests: TestResult[] }
  | { kind: "vin"; vin: string | null; part: { number: number; bytes: number[] } | null }
  | { kind: "negative"; service: number; code: number; meaning: string }
  | { kind: "unread" };

export interface Decoded {
  answer: Answer;
  /** Everything in the answer that was not read, with its reason. */
  problems: Problem[];
  /** The context to decode the next answer of the same control unit with. */
  context: DecodeContext;
}

const hex = (n: number) => n.toString(16).toUpperCase().padStart(2, "0");

/**
 * One positive or negative J1979 answer → its values.
 *
 * @param bytes the message alone, from the service byte (41…4A hex, or 7F), without id, length, padding or checksum
 * @param context what earlier answers of the same control unit taught
 * @returns values, and in `problems` each unknown PID, short or leftover byte, reserved value; nothing is guessed
 * Never throws. Source: SAE J1979 / ISO 15031-5.
 */
export function decodeAnswer(bytes: readonly number[], context: DecodeContext = NEW_CONTEXT): Decoded {
  const unread = (reason: string, pid: number | null = null): Decoded => ({
    answer: { kind: "unread" },
    problems: [{ pid, reason }],
    context,
  });
  if (bytes.some((b) => !Number.isInteger(b) || b < 0 || b > 255)) return unread("what is no byte");
  const [service, second, third] = bytes;
  if (service === undefined) return unread("empty answer");
  switch (service) {
    case 0x41:
      return decodeData(bytes.slice(1), 1, context);
    case 0x42:
      return decodeData(bytes.slice(1), 2, context);
    case 0x43:
    case 0x47:
    case 0x4a: {
      const { codes, problems } = decodeCodes(bytes.slice(1), context.framing);
      const number = service === 0x43 ? 3 : service === 0x47 ? 7 : 10;
      const state = number === 3 ? "confirmed" : number === 7 ? "pending" : "permanent";
      return {
        answer: { kind: "codes", service: number, state, codes },
        problems: problems.map((reason) => ({ pid: null, reason })),
        context,
      };
    }
    case 0x44:
      return { answer: { kind: "cleared" }, problems: [], context };
    case 0x46: {
      if (second === undefined) return unread("answer ends before its test");
      const { tests, problems } = decodeTests(bytes.slice(1));
      return { answer: { kind: "tests", tests }, problems, context };
    }
    case 0x49: {
      if (second !== 0x02) {
        return unread(
          second === undefined ? "answer ends before its information type" : "not read here",
          second ?? null,
        );
      }
      const held = bytes.slice(3);
      // Older lines send the number in five numbered answers of four bytes; joinVinParts puts them together.
      if (third !== undefined && third >= 1 && third <= 5 && held.length === 4) {
        return { answer: { kind: "vin", vin: null, part: { number: third, bytes: held } }, problems: [], context };
      }
      const read = third === 1 ? vinText(held) : { reason: "VIN answer holds other than one item" };
      if ("reason" in read) return unread(read.reason, 0x02);
      return { answer: { kind: "vin", vin: read.vin, part: null }, problems: [], context };
    }
    case 0x7f: {
      if (second === undefined || third === undefined) return unread("negative answer is short");
      const meaning = REFUSALS[third] ?? "other reason";
      return { answer: { kind: "negative", service: second, code: third, meaning }, problems: [], context };
    }
    default:
      return unread(`${hex(service)} is no answer of a service read here`);
  }
}

/** Response codes of ISO 15031-5. */
const REFUSALS: Readonly<Record<number, string>> = {
  16: "general reject",
  17: "service not supported",
  18: "sub-function not supported or format invalid",
  33: "busy, repeat the request",
  34: "conditions not correct",
  120: "answer will follow",
};

/**
 * How many bytes the trims with an optional byte take is found from the whole answer: `ways[i]` counts, up to two, the
 * ways to read everything from byte i to the end.
 */
function countWays(data: readonly number[], service: 1 | 2): number[] {
  const ways = new Array<number>(data.length + 1).fill(0);
  ways[data.length] = 1;
  for (let i = data.length - 1; i >= 0; i--) {
    const row = PIDS.get(data[i] ?? -1);
    if (!row) continue;
    const start = i + service;
    const short = ways[start + row.bytes] ?? 0;
    const long = row.optionalBytes ? (ways[start + row.bytes + row.optionalBytes] ?? 0) : 0;
    ways[i] = Math.min(2, short + long);
  }
  return ways;
}

function decodeData(data: readonly number[], service: 1 | 2, given: DecodeContext): Decoded {
  const readings: Reading[] = [];
  const problems: Problem[] = [];
  let context = given;
  if (data.length === 0) problems.push({ pid: null, reason: "answer ends before its parameter" });
  const ways = countWays(data, service);
  let i = 0;
  while (i < data.length) {
    const pid = data[i] ?? 0;
    const row = PIDS.get(pid);
    if (!row) {
      problems.push({ pid, reason: `unknown parameter, ${data.length - i - 1} bytes after it not read` });
      break;
    }
    const start = i + service;
    const left = Math.max(0, data.length - start);
    if (left < row.bytes) {
      problems.push({ pid, reason: `needs ${row.bytes} bytes, ${left} are there` });
      break;
    }
    const frame = service === 2 ? (data[i + 1] ?? 0) : null;
    let length: number | null = row.bytes;
    if (row.optionalBytes) length = chooseLength(row, start, left, ways, context);
    const read = readRow(row, data.slice(start, start + (length ?? row.bytes)), frame, context);
    readings.push(...read.readings);
    problems.push(...read.problems);
    if (service === 1) context = learn(context, row, data.slice(start, start + row.bytes));
    if (length === null) {
      problems.push({ pid, reason: "whether a second byte follows is not known; the rest is not read" });
      break;
    }
    i = start + length;
  }
  return { answer: { kind: "data", service, readings }, problems, context };
}

/** Bytes a trim takes at this place, or null when the answer can be read both ways. */
function chooseLength(
  row: PidRow,
  start: number,
  left: number,
  ways: readonly number[],
  context: DecodeContext,
): number | null {
  const long = row.bytes + row.optionalBytes;
  if (left < long) return row.bytes;
  const asShort = (ways[start + row.bytes] ?? 0) > 0;
  const asLong = (ways[start + long] ?? 0) > 0;
  if (asShort !== asLong) return asShort ? row.bytes : long;
  if (context.moreBanks === null) return null;
  return context.moreBanks ? long : row.bytes;
}

type Read = { readings: Reading[]; problems: Problem[] };

function readRow(row: PidRow, bytes: readonly number[], frame: number | null, context: DecodeContext): Read {
  const { pid } = row;
  const [a = 0, b = 0] = bytes;
  const base = { pid, frame, parameter: null };
  const one = (reading: Reading): Read => ({ readings: [reading], problems: [] });
  const none = (reason: string): Read => ({ readings: [], problems: [{ pid, reason }] });
  switch (row.form) {
    case "supported":
      return one({ ...base, kind: "supported", id: "supported_pids", value: maskPids(pid, bytes) });
    case "monitors": {
      const { status, oddities } = decodeMonitors(bytes, pid === 0x41 ? "this-cycle" : "since-clear");
      return {
        readings: [{ ...base, kind: "monitors", id: "monitor_status", value: status }],
        problems: oddities.map((reason) => ({ pid, reason })),
      };
    }
    case "frameCode":
      return one({ ...base, kind: "code", id: "DTCFRZF", value: decodeTroubleCode(a, b) });
    case "loops": {
      const out: Read = { readings: [], problems: [] };
      for (const [n, code] of [a, b].entries()) {
        const value = FUEL_SYSTEM_LABELS[code];
        const id = n === 0 ? "FUELSYS1" : "FUELSYS2";
        if (value === undefined) out.problems.push({ pid, reason: `${id} reads ${hex(code)}, which has no meaning` });
        // "none" says that there is no such system or the engine is off: no loop state for a case to hold.
        else out.readings.push({ ...base, kind: "label", id, code, value, parameter: value === "none" ? null : id });
      }
      return out;
    }
    case "sensors":
      return one({ ...base, kind: "sensors", id: "O2SLOC", value: sensorPlaces(pid, a) });
    case "requirement":
    case "fuelType": {
      const value = row.form === "fuelType" ? FUEL_TYPES[a] : REQUIREMENTS[a];
      if (value === undefined) return none(`${hex(a)} has no meaning known here`);
      return one({ ...base, kind: "label", id: row.form === "fuelType" ? "FUEL_TYP" : "OBDSUP", code: a, value });
    }
    case "scaling":
      return one({ ...base, kind: "scaling", id: "maxima", value: [...bytes] });
    case "lengthOnly":
      return none(`${row.name}: not read here`);
    case "numbers":
      return readNumbers(row, bytes, frame, context);
  }
}

function readNumbers(row: PidRow, bytes: readonly number[], frame: number | null, context: DecodeContext): Read {
  const out: Read = { readings: [], problems: [] };
  const { pid } = row;
  const place = placeOf(pid, context.layout);
  for (const f of row.fields) {
    if (f.at + f.width > bytes.length) continue;
    const high = bytes[f.at] ?? 0;
    const raw = f.width === 1 ? high : (high << 8) | (bytes[f.at + 1] ?? 0);
    const { value, min, max } = scaled(f, raw, context);
    if (value !== null && (value < min || value > max)) {
      out.problems.push({ pid, reason: `${f.id} ${value} ${f.unit} is beyond the standard's ${min} to ${max}` });
      continue;
    }
    let { id, parameter } = f;
    if (id.endsWith("xy")) {
      if (place) {
        id = id.slice(0, -2) + place.bank + place.sensor;
        parameter = placedParameter(id, pid);
      }
    }
    out.readings.push({
      pid,
      frame,
      kind: "number",
      id,
      parameter,
      value,
      unit: f.unit,
      min,
      max,
      ...(f.reference ? { reference: f.reference } : {}),
    });
  }
  if (!place && row.fields.some((f) => f.id.endsWith("xy"))) {
    out.problems.push({ pid, reason: "which bank and sensor this is depends on PID 13 or 1D, not seen yet" });
  }
  return out;
}

const PLACED = new Set<string>(["O2S11", "O2S12", "O2S21", "O2S22", "EQ_RAT11", "EQ_RAT21"]);

/** A wide-range sensor's voltage or current is not the switching voltage that the case's O2Sxy holds. */
function placedParameter(id: string, pid: number): ParameterId | null {
  if (id.startsWith("O2S") && pid > 0x1b) return null;
  return PLACED.has(id) ? (id as ParameterId) : null;
}

function scaled(
  f: NumberField,
  raw: number,
  context: DecodeContext,
): { value: number | null; min: number; max: number } {
  const { min, max } = f;
  if (raw === f.unusedRaw) return { value: null, min, max };
  const top = f.scaleBy ? context.maxima[f.scaleBy] : 0;
  if (top > 0) {
    switch (f.scaleBy) {
      case "o2Milliamps":
        return { value: ((raw - 32768) * top) / 32768, min: -top, max: top };
      case "map":
        return { value: (raw * top * 10) / 255, min: 0, max: top * 10 };
      case "maf":
        return { value: (raw * top * 10) / 65535, min: 0, max: top * 10 };
      default:
        return { value: (raw * top) / 65535, min: 0, max: top };
    }
  }
  const number = f.signed && raw >= 0x8000 ? raw - 0x10000 : raw;
  return { value: ((number - f.zero) * f.mul) / f.div, min, max };
}

/** PIDs named in a support mask: bit 7 of A is base + 1, bit 0 of D is base + 20 hex. */
function maskPids(base: number, bytes: readonly number[]): number[] {
  const out: number[] = [];
  for (let n = 0; n < 32; n++) if (((bytes[n >> 3] ?? 0) >> (7 - (n & 7))) & 1) out.push(base + 1 + n);
  return out;
}

const placeAt = (n: number, perBank: number): SensorPlace => ({
  bank: Math.floor(n / perBank) + 1,
  sensor: (n % perBank) + 1,
});

function sensorPlaces(pid: number, bits: number): SensorPlace[] {
  const places: SensorPlace[] = [];
  for (let n = 0; n < 8; n++) if ((bits >> n) & 1) places.push(placeAt(n, pid === 0x13 ? 4 : 2));
  return places;
}

/** Bank and sensor of PIDs 14–1B, 24–2B, 34–3B; only the first two are the same under PID 13 and PID 1D. */
function placeOf(pid: number, layout: DecodeContext["layout"]): SensorPlace | null {
  const n = (pid & 0x0f) - 4;
  if (n < 2) return placeAt(n, 2);
  return layout === null ? null : placeAt(n, layout === "two-bank" ? 4 : 2);
}

/** A module supports PID 13 or PID 1D, never both; its support mask tells which, and so does an answer to one. */
function learn(context: DecodeContext, row: PidRow, bytes: readonly number[]): DecodeContext {
  const [a = 0, b = 0, c = 0, d = 0] = bytes;
  switch (row.pid) {
    case 0x00: {
      const has = new Set(maskPids(0, bytes));
      if (has.has(0x13) === has.has(0x1d)) return context;
      return has.has(0x13) ? { ...context, layout: "two-bank", moreBanks: false } : { ...context, layout: "four-bank" };
    }
    case 0x13:
      return { ...context, layout: "two-bank", moreBanks: false };
    case 0x1d:
      return { ...context, layout: "four-bank", moreBanks: (a & 0xf0) !== 0 };
    case 0x4f:
      return { ...context, maxima: { ...context.maxima, lambda: a, o2Volts: b, o2Milliamps: c, map: d } };
    case 0x50:
      return { ...context, maxima: { ...context.maxima, maf: a } };
    default:
      return context;
  }
}

/**
 * A rail pressure as gauge pressure, kPa.
 * @param mapKPa manifold pressure, absolute, and `baroKPa` barometric, both kPa; null when not known
 * @returns null when what the conversion needs is not known
 */
export function railGaugeKPa(
  valueKPa: number,
  reference: PressureReference,
  mapKPa: number | null,
  baroKPa: number | null,
): number | null {
  if (reference === "gauge") return valueKPa;
  if (baroKPa === null) return null;
  if (reference === "absolute") return valueKPa - baroKPa;
  return mapKPa === null ? null : valueKPa + mapKPa - baroKPa;
}
