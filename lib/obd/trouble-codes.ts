import { CODE_ROWS, CODE_SYSTEMS } from "./trouble-code-table";

export interface CodeDescription {
  code: string;
  /** What the code states, not what is broken. */
  meaning: string;
  system: string;
  bank?: number;
  sensor?: number;
  cylinder?: number;
  /** False for the maker-specific ranges, which have no standard meaning. */
  generic: boolean;
}

let table: Map<string, CodeDescription> | undefined;

function codeTable(): Map<string, CodeDescription> {
  if (table) return table;
  table = new Map();
  for (const line of CODE_ROWS.trim().split("\n")) {
    const [code = "", system, meaning = "", bank, sensor, cylinder] = line.split("|");
    table.set(code, {
      code,
      meaning,
      system: CODE_SYSTEMS[Number(system)] ?? "",
      ...(bank ? { bank: Number(bank) } : {}),
      ...(sensor ? { sensor: Number(sensor) } : {}),
      ...(cylinder ? { cylinder: Number(cylinder) } : {}),
      generic: true,
    });
  }
  return table;
}

/** A letter P, C, B or U, a digit 0 to 3 and three hexadecimal digits, in any case. */
export function isTroubleCode(text: string): boolean {
  return /^[PCBU][0-3][0-9A-F]{3}$/i.test(text.trim());
}

export type CodeControl = "standard" | "maker" | "reserved";

/**
 * Who defines a code. Source: SAE J2012 / ISO 15031-6 ranges.
 * @throws RangeError when the text is not a code
 */
export function codeControl(text: string): CodeControl {
  const code = text.trim().toUpperCase();
  if (!isTroubleCode(code)) throw new RangeError("not a trouble code");
  const [letter, digit] = [code[0], code[1]];
  if (letter === "P") {
    if (digit === "0" || digit === "2") return "standard";
    if (digit === "1") return "maker";
    return Number.parseInt(code[2] ?? "0", 16) < 4 ? "maker" : "standard";
  }
  if (digit === "0") return "standard";
  return digit === "3" ? "reserved" : "maker";
}

/**
 * Two bytes as they travel → code text; null for 00 00, which means "no code".
 * Source: SAE J2012 (bits 15–14 letter, 13–12 digit, then three hexadecimal digits).
 */
export function decodeTroubleCode(high: number, low: number): string | null {
  if (high === 0 && low === 0) return null;
  const hex = (n: number, width: number) => n.toString(16).toUpperCase().padStart(width, "0");
  return `${"PCBU"[high >> 6]}${(high >> 4) & 3}${hex(high & 15, 1)}${hex(low, 2)}`;
}

/** The meaning of a code, or null when the text is no code. A maker's code is never guessed at. */
export function describeCode(text: string): CodeDescription | null {
  const code = text.trim().toUpperCase();
  if (!isTroubleCode(code)) return null;
  const known = codeTable().get(code);
  if (known) return known;
  const generic = codeControl(code) === "standard";
  return {
    code,
    meaning: generic ? "standard code outside this list" : "maker-specific: see the maker's information",
    system: generic ? "other" : "maker-specific",
    generic,
  };
}
