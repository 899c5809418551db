import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { createReassembler } from "@/lib/obd/iso-tp";

/**
 * Frame layouts below are laid out by hand after ISO 15765-2: 0L single, 1L LL first, 2N consecutive (N from 1, after
 * 15 comes 0), 3S flow control; 0x14 = 20 bytes = 6 + 7 + 7.
 */
const hex = (text: string) => text.split(" ").map((b) => Number.parseInt(b, 16));

/** Cuts a message into frames as the sender of ISO 15765-2 does; the reverse of what is tested. */
function cut(message: number[]): number[][] {
  if (message.length < 8) return [[message.length, ...message]];
  const frames = [[0x10 | (message.length >> 8), message.length & 255, ...message.slice(0, 6)]];
  for (let at = 6, n = 1; at < message.length; at += 7, n++) {
    const data = [0x20 | (n % 16), ...message.slice(at, at + 7)];
    while (data.length < 8) data.push(0xaa);
    frames.push(data);
  }
  return frames;
}

describe("ISO 15765-2 frames", () => {
  it("cuts a single frame to its length, padding dropped", () => {
    const r = createReassembler();
    expect(r.push("7E8", hex("04 41 0C 1A F8 55 55 55"))).toEqual({ message: hex("41 0C 1A F8"), problems: [] });
  });
  it("joins first and consecutive frames, flow control between them ignored", () => {
    const r = createReassembler();
    expect(r.push("7E8", hex("10 14 49 02 01 31 32 33")).message).toBeNull();
    expect(r.isOpen("7E8")).toBe(true);
    expect(r.push("7E8", hex("30 00 00"))).toEqual({ message: null, problems: [] });
    expect(r.push("7E8", hex("21 34 35 36 37 38 39 41")).message).toBeNull();
    expect(r.push("7E8", hex("22 42 43 44 45 46 47 48"))).toEqual({
      message: hex("49 02 01 31 32 33 34 35 36 37 38 39 41 42 43 44 45 46 47 48"),
      problems: [],
    });
    expect(r.finish()).toEqual([]);
  });
  it("keeps two senders apart", () => {
    const r = createReassembler();
    r.push("7E8", hex("10 08 43 03 01 71 03 00"));
    r.push("7E9", hex("10 08 43 03 04 20 01 01"));
    expect(r.push("7E9", hex("21 01 13")).message).toEqual(hex("43 03 04 20 01 01 01 13"));
    expect(r.push("7E8", hex("21 01 74")).message).toEqual(hex("43 03 01 71 03 00 01 74"));
  });
  it.each([
    ["a frame out of order", ["10 14 49 02 01 31 32 33", "22 34 35 36 37 38 39 41"]],
    ["a frame twice", ["10 14 49 02 01 31 32 33", "21 34 35 36 37 38 39 41", "21 34 35 36 37 38 39 41"]],
    ["no first frame", ["21 34 35 36 37 38 39 41"]],
    ["a short consecutive frame", ["10 14 49 02 01 31 32 33", "21 34 35"]],
    ["a single frame that holds less than it says", ["05 41 0C 1A"]],
    ["a single frame of no length", ["00 41 0C 1A"]],
    ["a single frame longer than a frame", ["09 41 0C 1A F8 00 00 00"]],
    ["a first frame cut short", ["10 14 49 02"]],
    ["a first frame of a message that needs none", ["10 05 41 0C 1A F8 00 00"]],
    ["a message beyond twelve bits of length", ["10 00 00 00 20 00 41 42"]],
    ["a frame type there is not", ["41 0C 1A F8"]],
  ])("reports %s and gives no message", (_, frames) => {
    const r = createReassembler();
    const results = frames.map((f) => r.push("7E8", hex(f)));
    expect(results.every((x) => x.message === null)).toBe(true);
    expect(results.at(-1)!.problems).toHaveLength(1);
    expect(r.isOpen("7E8")).toBe(false);
  });
  it("reports a message cut off by the next, and reads the next", () => {
    const r = createReassembler();
    r.push("7E8", hex("10 14 49 02 01 31 32 33"));
    const next = r.push("7E8", hex("03 41 0D 32"));
    expect(next.message).toEqual(hex("41 0D 32"));
    expect(next.problems).toEqual(["message cut off after 6 of 20 bytes"]);
  });
  it("tells at the end what never came whole", () => {
    const r = createReassembler();
    r.push("7E8", hex("10 14 49 02 01 31 32 33"));
    expect(r.finish()).toEqual([{ source: "7E8", got: 6, length: 20 }]);
    expect(r.isOpen("7E8")).toBe(false);
  });
  it("gives back any message of 1 to 4095 bytes that was cut by the standard's rules", () => {
    fc.assert(
      fc.property(fc.uint8Array({ minLength: 1, maxLength: 4095, size: "max" }), (bytes) => {
        const r = createReassembler();
        const message = [...bytes];
        const results = cut(message).map((f) => r.push("x", f));
        expect(results.at(-1)).toEqual({ message, problems: [] });
        expect(results.slice(0, -1).every((x) => x.message === null && x.problems.length === 0)).toBe(true);
      }),
      { numRuns: 60 },
    );
  });
  it("never throws on random frames", () => {
    const frame = fc.array(fc.oneof(fc.nat(255), fc.constantFrom(0x10, 0x21, 0x22), fc.double()), { maxLength: 12 });
    fc.assert(
      fc.property(fc.array(frame, { maxLength: 40 }), (frames) => {
        const r = createReassembler();
        for (const f of frames) r.push("x", f);
        r.finish();
      }),
    );
  });
});
