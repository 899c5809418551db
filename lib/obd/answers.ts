import { decodeTroubleCode } from "./trouble-codes";

/**
 * Answers of J1979 services that carry no parameter table: codes (03, 07, 0A), test results (06), VIN (09 02).
 * Source: SAE J1979 / ISO 15031-5; framing by ISO 15765-4 against ISO 9141-2, ISO 14230-4 and SAE J1850.
 */

export type Framing = "can" | "pairs";

/**
 * The bytes after 43, 47 or 4A → codes in order. CAN answers begin with a count; older lines carry plain pairs with
 * 00 00 as padding. Without `framing` an odd number of bytes is read as CAN, an even one as pairs.
 *
 * @returns what could be read, and in `problems` a count that does not fit or a byte without its pair
 */
export function decodeCodes(data: readonly number[], framing?: Framing): { codes: string[]; problems: string[] } {
  const problems: string[] = [];
  const form = framing ?? (data.length % 2 === 1 ? "can" : "pairs");
  const [count = 0] = data;
  if (data.length === 0) problems.push("answer ends before its codes");
  let pairs = form === "can" ? data.slice(1) : data;
  if (form === "can" && data.length > 0) {
    if (pairs.length < count * 2) {
      problems.push(`count says ${count} codes and ${Math.floor(pairs.length / 2)} are there`);
    } else if (pairs.slice(count * 2).some((b) => b !== 0)) {
      problems.push(`${pairs.length - count * 2} bytes left over after ${count} codes`);
    }
    pairs = pairs.slice(0, count * 2);
  }
  if (pairs.length % 2 === 1) problems.push("last code has one byte only");
  const codes: string[] = [];
  for (let i = 0; i + 1 < pairs.length; i += 2) {
    const code = decodeTroubleCode(pairs[i] ?? 0, pairs[i + 1] ?? 0);
    if (code) codes.push(code);
  }
  return { codes, problems };
}

export interface TestResult {
  mid: number;
  tid: number;
  /** Unit-and-scaling id. */
  uas: number;
  value: number;
  min: number;
  max: number;
  unit: string;
  pass: boolean;
  /** Cylinder whose misfires are counted (monitors A2 to AD hex). */
  cylinder: number | null;
}

/** Unit-and-scaling ids read here (from memory of J1979); the printed 0.000122 V is used as it is printed. */
const SCALINGS: Readonly<Record<number, { per: number; unit: string }>> = {
  10: { per: 0.000122, unit: "V" },
  32: { per: 0.00390625, unit: "-" },
  36: { per: 1, unit: "count" },
};

/**
 * The bytes after 46, CAN form: nine a test (MID, TID, scaling id, value, min, max).
 * A test with another scaling id is reported and left out; it passes when min ≤ value ≤ max.
 */
export function decodeTests(data: readonly number[]): {
  tests: TestResult[];
  problems: { pid: number; reason: string }[];
} {
  const tests: TestResult[] = [];
  const problems: { pid: number; reason: string }[] = [];
  for (let i = 0; i < data.length; i += 9) {
    const [mid = 0, tid = 0, uas = 0, vH = 0, vL = 0, nH = 0, nL = 0, xH = 0, xL = 0] = data.slice(i, i + 9);
    if (mid % 0x20 === 0) {
      problems.push({ pid: mid, reason: "list of supported tests is not read" });
      break;
    }
    if (data.length - i < 9) {
      problems.push({ pid: mid, reason: `test result needs 9 bytes, ${data.length - i} are there` });
      break;
    }
    const by = SCALINGS[uas];
    if (!by) {
      problems.push({ pid: mid, reason: `unit and scaling id ${uas.toString(16).toUpperCase()} is not known` });
      continue;
    }
    const [value, min, max] = [(vH << 8) | vL, (nH << 8) | nL, (xH << 8) | xL];
    tests.push({
      mid,
      tid,
      uas,
      value: value * by.per,
      min: min * by.per,
      max: max * by.per,
      unit: by.unit,
      pass: min <= value && value <= max,
      cylinder: mid >= 0xa2 && mid <= 0xad ? mid - 0xa1 : null,
    });
  }
  return { tests, problems };
}

/** Text of a VIN, or the reason it is none: 17 characters after leading 00 padding, digits and letters but I, O, Q. */
export function vinText(bytes: readonly number[]): { vin: string } | { reason: string } {
  const start = bytes.findIndex((b) => b !== 0);
  const held = start < 0 ? [] : bytes.slice(start);
  if (held.length !== 17) return { reason: `VIN needs 17 characters, ${held.length} are there` };
  const vin = String.fromCharCode(...held);
  return /^[A-HJ-NPR-Z0-9]{17}$/.test(vin) ? { vin } : { reason: "VIN holds a character a VIN cannot hold" };
}

/**
 * The five numbered answers of older lines (49 02 n and four bytes each, the first padded with 00) → VIN.
 * @param parts message number (1 to 5) → its four bytes
 */
export function joinVinParts(parts: ReadonlyMap<number, readonly number[]>): { vin: string } | { reason: string } {
  const bytes: number[] = [];
  for (let n = 1; n <= 5; n++) {
    const part = parts.get(n);
    if (part?.length !== 4) return { reason: `part ${n} of the VIN is missing` };
    bytes.push(...part);
  }
  return vinText(bytes);
}
