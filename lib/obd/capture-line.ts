/**
 * One line of a capture: J1979 / ISO 15031-5 answers as hex, with or without a leading time and an ISO 15765-4 CAN id
 * and length: `12.480 7E8 04 41 0C 1A F8`, `18 DA F1 10 03 41 0D 32`, `7E8#03410D32`, `41 0C 1A F8`.
 */

export interface CaptureTime {
  /** How it was written; "count" is a whole number whose unit the line does not tell. */
  form: "seconds" | "clock" | "date" | "epoch" | "count";
  /** Seconds: as logged, since midnight (clock) or since 1970 (date without a zone is taken as UTC); null for a count. */
  seconds: number | null;
  count: number | null;
}

export type CaptureLine =
  /** A CAN frame of a control unit, or one without its id; `data` begins with the protocol byte. */
  | { kind: "frame"; time: CaptureTime | null; source: string | null; data: number[] }
  /** A whole answer, from its service byte. */
  | { kind: "answer"; time: CaptureTime | null; source: string | null; bytes: number[] }
  /** Blank, a comment, a request, or traffic that is no diagnosis. */
  | { kind: "skipped"; reason: "blank" | "comment" | "request" | "other traffic" }
  | { kind: "problem"; reason: string };

/** The longest ISO 15765-2 message is 4095 bytes, three characters each, and its prefix. */
const LONGEST_LINE = 16384;

const isAnswer = (b: number | undefined) => b !== undefined && ((b >= 0x41 && b <= 0x4a) || b === 0x7f);
const isRequest = (b: number | undefined) => b !== undefined && b >= 0x01 && b <= 0x0a;

/**
 * Reads one line, without its line end; never throws.
 * @param midMessage whether frames without an id are in the middle of a message, so that 21 begins a frame, not a time
 */
export function parseCaptureLine(text: string, midMessage = false): CaptureLine {
  if (text.length > LONGEST_LINE) return problem("line is longer than any answer");
  const line = text.replace(/^\uFEFF/, "").trim();
  if (line === "") return { kind: "skipped", reason: "blank" };
  if (/^(#|\/\/|%)/.test(line)) return { kind: "skipped", reason: "comment" };
  const spaced = /[\s;]/.test(line) ? line.split(/[\s;]+/) : line.split(",");
  const plain = !/[>,]/.test(line) && !spaced.includes("");
  const tokens = plain ? spaced : spaced.map((t) => t.replace(/^>|,$/g, "")).filter((t) => t !== "");
  const { time, used } = takeTime(tokens, midMessage);
  return readFrame(tokens.slice(used), time);
}

/** Two upper-case digits, the common form, looked up: most of the reading of a long capture is this. */
const BYTES = new Map(Array.from({ length: 256 }, (_, n) => [n.toString(16).toUpperCase().padStart(2, "0"), n]));

function problem(reason: string): CaptureLine {
  return { kind: "problem", reason };
}

function readFrame(given: string[], time: CaptureTime | null): CaptureLine {
  const head = takeId(given);
  const rest = [...head.rest];
  let stated: number | null = null;
  const size = /^\[(\d{1,2})\]$/.exec(rest[0] ?? "") ?? (head.id !== null ? /^([0-8])$/.exec(rest[0] ?? "") : null);
  if (size) {
    stated = Number(size[1]);
    rest.shift();
  }
  let length: string | null = null;
  if (head.id === null && rest.length > 1 && /^[0-9]$/.test(rest[0] ?? "")) length = rest.shift() ?? null;
  const data: number[] = [];
  for (const token of rest) {
    const byte = BYTES.get(token);
    if (byte !== undefined) {
      data.push(byte);
      continue;
    }
    const digits = token.replace(/^0x/i, "");
    if (!/^([0-9a-f]{2})+$/i.test(digits)) return problem(`"${token.slice(0, 24)}" is no hex byte`);
    for (let i = 0; i < digits.length; i += 2) data.push(Number.parseInt(digits.slice(i, i + 2), 16));
  }
  if (length !== null) data.unshift(Number(length));
  if (data.length === 0) return problem("no bytes");
  if (stated !== null && stated !== data.length) return problem(`says ${stated} bytes and holds ${data.length}`);
  return head.id === null ? withoutId(data, time) : withId(head.id, data, time);
}

function withId(id: { value: number; extended: boolean }, data: number[], time: CaptureTime | null): CaptureLine {
  const { value, extended } = id;
  // ISO 15765-4: 7DF and 7E0–7E7 ask, 7E8–7EF answer; with 29 bits 18DB33F1 and 18DAxxF1 ask, 18DAF1xx answers.
  const asks = extended
    ? value === 0x18db33f1 || (value & 0x1fff00ff) === 0x18da00f1
    : value === 0x7df || (value >= 0x7e0 && value <= 0x7e7);
  const answers = extended ? value >>> 8 === 0x18daf1 : value >= 0x7e8 && value <= 0x7ef;
  if (asks && !answers) return { kind: "skipped", reason: "request" };
  if (!answers) return { kind: "skipped", reason: "other traffic" };
  const source = value
    .toString(16)
    .toUpperCase()
    .padStart(extended ? 8 : 3, "0");
  // Frame types 4 to 15 do not exist, so an answer that follows its id without a length cannot be taken for one.
  if (isAnswer(data[0])) return { kind: "answer", time, source, bytes: data };
  return { kind: "frame", time, source, data };
}

function withoutId(data: number[], time: CaptureTime | null): CaptureLine {
  const [first = 0, second, third] = data;
  if (isAnswer(first)) return { kind: "answer", time, source: null, bytes: data };
  const fits = first === data.length - 1 || data.length === 8;
  if (first >= 3 && first <= 7 && isAnswer(second) && fits) return { kind: "frame", time, source: null, data };
  // "02 43 00" alone is a freeze frame request; padded to a whole frame it is an empty list of codes.
  if (first === 2 && isAnswer(second) && data.length === 8) return { kind: "frame", time, source: null, data };
  const isFirst = first >> 4 === 1 && data.length === 8 && isAnswer(third);
  if (isFirst || first >> 4 === 2) return { kind: "frame", time, source: null, data };
  if (isRequest(first)) return { kind: "skipped", reason: "request" };
  return problem("no answer of a diagnostic service");
}

interface Head {
  id: { value: number; extended: boolean } | null;
  rest: string[];
}

function takeId(tokens: string[]): Head {
  let [first = "", ...rest] = tokens;
  if (/^[a-z]*can\d+$/i.test(first)) [first = "", ...rest] = rest;
  const hash = /^([0-9a-f]{3}|[0-9a-f]{8})#([0-9a-f]*)$/i.exec(first);
  if (hash) [first, rest] = [hash[1] ?? "", [hash[2] ?? "", ...rest]];
  const digits = first.replace(/^0x/i, "");
  const number = Number.parseInt(digits, 16);
  const found = (value: number, extended: boolean, left: string[]): Head => ({ id: { value, extended }, rest: left });
  if (/^[0-7][0-9a-f]{2}$/i.test(digits)) return found(number, false, rest);
  if (/^00000[0-7][0-9a-f]{2}$/i.test(digits) && rest.length > 0) return found(number, false, rest);
  if (/^18d[ab][0-9a-f]{4}$/i.test(digits)) return found(number, true, rest);
  if (hash && digits.length === 8) return found(number, true, rest);
  const four = tokens.slice(0, 4).join("");
  if (/^18$/.test(first) && /^18d[ab][0-9a-f]{4}$/i.test(four)) {
    return found(Number.parseInt(four, 16), true, tokens.slice(4));
  }
  // Without blanks: an odd number of digits begins with a three-digit id.
  if (rest.length === 0 && /^7[0-9a-f]{4,}$/i.test(digits) && digits.length % 2 === 1) {
    return found(Number.parseInt(digits.slice(0, 3), 16), false, [digits.slice(3)]);
  }
  if (rest.length === 0 && /^18d[ab][0-9a-f]{6,}$/i.test(digits)) {
    return found(Number.parseInt(digits.slice(0, 8), 16), true, [digits.slice(8)]);
  }
  return { id: null, rest: first === "" ? rest : [first, ...rest] };
}

const CLOCK = /^(\d{1,2}):(\d{2}):(\d{2}(?:[.,]\d+)?)$/;
const DATE = /^(\d{4})-(\d{2})-(\d{2})(?:[T_](\d{2}:\d{2}:\d{2}(?:[.,]\d+)?)(Z|[+-]\d{2}:?\d{2})?)?$/i;

function takeTime(tokens: string[], midMessage: boolean): { time: CaptureTime | null; used: number } {
  const nothing = { time: null, used: 0 };
  const first = (tokens[0] ?? "").replace(/^[([](.*?)[)\]]?:?$/, "$1");
  const at = (form: CaptureTime["form"], seconds: number | null, used = 1) => ({
    time: { form, seconds, count: null },
    used,
  });
  const clock = first.includes(":") ? clockSeconds(first) : null;
  if (clock !== null) return at("clock", clock);
  const date = first.includes("-") ? DATE.exec(first) : null;
  if (date) {
    const day = Date.UTC(Number(date[1]), Number(date[2]) - 1, Number(date[3])) / 1000;
    const inDay = clockSeconds(date[4] ?? tokens[1] ?? "");
    if (inDay === null) return nothing;
    return at("date", day + inDay - zoneSeconds(date[5] ?? ""), date[4] ? 1 : 2);
  }
  const number = /^(\d+)(?:[.,](\d+))?(s|ms)?$/i.exec(first);
  if (!number || tokens.length < 2) return nothing;
  const value = Number(`${number[1]}.${number[2] ?? "0"}`);
  if (!Number.isFinite(value)) return nothing;
  if (number[3]) return at("seconds", number[3].toLowerCase() === "ms" ? value / 1000 : value);
  if (number[2] !== undefined || first !== tokens[0])
    return value < 1e9 ? at("seconds", value) : at("epoch", epoch(value));
  if (!canBeCount(first, tokens.slice(1), midMessage)) return nothing;
  if (value >= 1e9) return at("epoch", epoch(value));
  return { time: { form: "count", seconds: null, count: value }, used: 1 };
}

/** Seconds, milliseconds or microseconds since 1970, told apart by size (years 2001 to 5138 in each). */
function epoch(value: number): number {
  if (value < 1e11) return value;
  return value < 1e14 ? value / 1000 : value / 1e6;
}

function clockSeconds(text: string): number | null {
  const m = CLOCK.exec(text);
  if (!m) return null;
  const [h, min, s] = [Number(m[1]), Number(m[2]), Number((m[3] ?? "").replace(",", "."))];
  return h < 24 && min < 60 && s < 61 ? h * 3600 + min * 60 + s : null;
}

function zoneSeconds(zone: string): number {
  const m = /^([+-])(\d{2}):?(\d{2})$/.exec(zone);
  return m ? (m[1] === "-" ? -1 : 1) * (Number(m[2]) * 3600 + Number(m[3]) * 60) : 0;
}

/**
 * Whether a whole number before `rest` can only be a time. Before an id it is one; before an answer without an id it
 * could also be the answer's own first byte, its length, or a consecutive frame's number.
 */
function canBeCount(first: string, rest: string[], midMessage: boolean): boolean {
  const { id, rest: left } = takeId(rest);
  if (id !== null) return true;
  if (!left.every((t) => /^([0-9a-f]{2})+$/i.test(t))) return false;
  if (!isAnswer(Number.parseInt((left[0] ?? "").slice(0, 2), 16))) return false;
  const bytes = left.join("").length / 2;
  if (first.length === 1) return Number(first) !== bytes;
  if (first.length > 2) return true;
  if (first.startsWith("0") || isAnswer(Number.parseInt(first, 16))) return false;
  return !(first.startsWith("2") && (midMessage || bytes === 7));
}
