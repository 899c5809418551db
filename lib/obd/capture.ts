import { joinVinParts } from "./answers";
import { type CaptureTime, parseCaptureLine } from "./capture-line";
import { type Answer, type DecodeContext, decodeAnswer, NEW_CONTEXT, type Problem } from "./decode";
import { createReassembler } from "./iso-tp";

export type CaptureEvent =
  | {
      kind: "answer";
      /** Line the answer ended on, from 1. */
      line: number;
      /** Time of the line it began on. */
      time: CaptureTime | null;
      /** The control unit's CAN id in hex, or null when the line has none. */
      source: string | null;
      answer: Answer;
      problems: Problem[];
    }
  /** A line that is no answer and hurts nothing. */
  | { kind: "skipped"; line: number; reason: string }
  | { kind: "problem"; line: number; source: string | null; reason: string };

export interface CaptureReader {
  /** One line without its end → what it completes: nothing, one answer, or what is wrong with it. */
  push(text: string): CaptureEvent[];
  /** Messages left unfinished at the end of the capture. */
  finish(): CaptureEvent[];
}

interface Unit {
  context: DecodeContext;
  startedAt: CaptureTime | null;
  vinParts: Map<number, number[]>;
}

/**
 * Reads a capture line by line in memory that does not grow with its length (at most one message a control unit is
 * held). Each control unit keeps its own sensor layout and scaling. Never throws on what a line holds.
 *
 * @param start what is known beforehand, for example a layout found by an earlier reading of the same capture
 * Sources: SAE J1979 / ISO 15031-5 answers, ISO 15765-2 frames, ISO 15765-4 ids.
 */
export function createCaptureReader(start: DecodeContext = NEW_CONTEXT): CaptureReader {
  const frames = createReassembler();
  const units = new Map<string, Unit>();
  let line = 0;

  function unitOf(source: string | null): Unit {
    const key = source ?? "";
    let unit = units.get(key);
    if (!unit) {
      const context: DecodeContext = source === null ? start : { ...start, framing: "can" };
      unit = { context, startedAt: null, vinParts: new Map() };
      units.set(key, unit);
    }
    return unit;
  }

  function decode(source: string | null, time: CaptureTime | null, bytes: number[], framed: boolean): CaptureEvent {
    const unit = unitOf(source);
    const context: DecodeContext = framed ? { ...unit.context, framing: "can" } : unit.context;
    const read = decodeAnswer(bytes, context);
    unit.context = source === null ? { ...read.context, framing: start.framing } : read.context;
    return { kind: "answer", line, time, source, answer: joinVin(unit, read.answer), problems: read.problems };
  }

  return {
    push(text) {
      line += 1;
      const read = parseCaptureLine(text, frames.isOpen(""));
      if (read.kind === "problem") return [{ kind: "problem", line, source: null, reason: read.reason }];
      if (read.kind === "skipped")
        return read.reason === "blank" ? [] : [{ kind: "skipped", line, reason: read.reason }];
      const { source, time } = read;
      if (read.kind === "answer") return [decode(source, time, read.bytes, source !== null)];
      const key = source ?? "";
      const unit = unitOf(source);
      if (!frames.isOpen(key) || (read.data[0] ?? 0) >> 4 < 2) unit.startedAt = time;
      const { message, problems } = frames.push(key, read.data);
      const events: CaptureEvent[] = problems.map((reason) => ({ kind: "problem", line, source, reason }));
      if (message) events.push(decode(source, unit.startedAt, message, true));
      return events;
    },
    finish() {
      return frames.finish().map(({ source, got, length }) => ({
        kind: "problem",
        line,
        source: source === "" ? null : source,
        reason: `capture ends after ${got} of ${length} bytes of a message`,
      }));
    },
  };
}

/** Adds a part of an older line's VIN; the answer that completes it carries the number. */
function joinVin(unit: Unit, answer: Answer): Answer {
  if (answer.kind !== "vin" || !answer.part) return answer;
  if (answer.part.number === 1) unit.vinParts.clear();
  unit.vinParts.set(answer.part.number, answer.part.bytes);
  if (unit.vinParts.size < 5) return answer;
  const joined = joinVinParts(unit.vinParts);
  unit.vinParts.clear();
  return "vin" in joined ? { ...answer, vin: joined.vin } : answer;
}

/** Every event of a capture in order. @param lines text lines without their ends */
export function* readCapture(lines: Iterable<string>, start: DecodeContext = NEW_CONTEXT): Generator<CaptureEvent> {
  const reader = createCaptureReader(start);
  for (const text of lines) yield* reader.push(text);
  yield* reader.finish();
}

/**
 * Share of the lines (blank ones and comments aside) that read as diagnostic answers or requests, 0 to 1; 0 when there
 * are none. A table of numbers stays near 0, a capture near 1.
 */
export function captureShare(lines: Iterable<string>): number {
  let all = 0;
  let good = 0;
  for (const text of lines) {
    const read = parseCaptureLine(text);
    if (read.kind === "skipped" && (read.reason === "blank" || read.reason === "comment")) continue;
    all += 1;
    if (read.kind === "answer" || read.kind === "frame" || (read.kind === "skipped" && read.reason === "request")) {
      good += 1;
    }
  }
  return all === 0 ? 0 : good / all;
}
