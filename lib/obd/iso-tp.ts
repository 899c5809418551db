/**
 * Messages out of CAN frames. Source: ISO 15765-2 (normal addressing): single, first and consecutive frames; a flow
 * control frame is the other side's and is passed over.
 */

/** The twelve length bits of a first frame; the 32-bit form is refused, so memory stays bounded. */
const LONGEST_MESSAGE = 4095;

export interface IsoTpResult {
  /** A complete message, cut to its stated length; null while more frames are due. */
  message: number[] | null;
  /** What went wrong, in plain words: a gap in the sequence, a missing first frame, short data. */
  problems: string[];
}

interface Session {
  length: number;
  bytes: number[];
  next: number;
}

export interface IsoTpReassembler {
  /**
   * One frame of one sender.
   * @param source any text that tells senders apart, such as the CAN id
   * @param data the frame's data, protocol byte first, each 0 to 255
   */
  push(source: string, data: readonly number[]): IsoTpResult;
  /** True while a message of this sender is unfinished. */
  isOpen(source: string): boolean;
  /** Senders whose message never ended, with what was got of it; forgets them. */
  finish(): { source: string; got: number; length: number }[];
}

/** Keeps one unfinished message a sender; never throws on bad frames. */
export function createReassembler(): IsoTpReassembler {
  const open = new Map<string, Session>();

  const interrupted = (source: string): string[] => {
    const old = open.get(source);
    if (!old) return [];
    open.delete(source);
    return [`message cut off after ${old.bytes.length} of ${old.length} bytes`];
  };
  const fail = (reason: string, before: string[] = []): IsoTpResult => ({
    message: null,
    problems: [...before, reason],
  });

  function single(source: string, data: readonly number[]): IsoTpResult {
    const before = interrupted(source);
    const short = (data[0] ?? 0) & 15;
    // Frames longer than eight bytes (CAN FD) carry the length in the second byte.
    const escaped = short === 0 && data.length > 8;
    const length = escaped ? (data[1] ?? 0) : short;
    const start = escaped ? 2 : 1;
    if (length === 0 || (!escaped && length > 7)) return fail("single frame with an impossible length", before);
    if (data.length - start < length) {
      return fail(`single frame says ${length} bytes and holds ${data.length - start}`, before);
    }
    return { message: data.slice(start, start + length), problems: before };
  }

  function first(source: string, data: readonly number[]): IsoTpResult {
    const before = interrupted(source);
    if (data.length < 8) return fail("first frame shorter than eight bytes", before);
    const length = (((data[0] ?? 0) & 15) << 8) | (data[1] ?? 0);
    if (length === 0) return fail(`message longer than ${LONGEST_MESSAGE} bytes is not read`, before);
    if (length < 8) return fail("first frame of a message that fits a single frame", before);
    const bytes = data.slice(2, 2 + length);
    if (bytes.length >= length) return fail("first frame holds the whole message", before);
    open.set(source, { length, bytes, next: 1 });
    return { message: null, problems: before };
  }

  function consecutive(source: string, data: readonly number[]): IsoTpResult {
    const session = open.get(source);
    if (!session) return fail("consecutive frame without a first frame");
    const number = (data[0] ?? 0) & 15;
    if (number !== session.next) {
      open.delete(source);
      return fail(`consecutive frame ${number} where ${session.next} was due; message dropped`);
    }
    const left = session.length - session.bytes.length;
    const part = data.slice(1, 1 + left);
    if (part.length < Math.min(7, left)) {
      open.delete(source);
      return fail("consecutive frame is short; message dropped");
    }
    session.bytes.push(...part);
    session.next = (session.next + 1) & 15;
    if (session.bytes.length < session.length) return { message: null, problems: [] };
    open.delete(source);
    return { message: session.bytes, problems: [] };
  }

  return {
    push(source, data) {
      if (data.length === 0) return fail("frame without data");
      if (data.some((b) => !Number.isInteger(b) || b < 0 || b > 255)) return fail("frame holds what is no byte");
      switch ((data[0] ?? 0) >> 4) {
        case 0:
          return single(source, data);
        case 1:
          return first(source, data);
        case 2:
          return consecutive(source, data);
        case 3:
          return { message: null, problems: [] };
        default:
          return fail("unknown frame type");
      }
    },
    isOpen: (source) => open.has(source),
    finish() {
      const left = [...open].map(([source, s]) => ({ source, got: s.bytes.length, length: s.length }));
      open.clear();
      return left;
    },
  };
}
