import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type CaptureEvent, captureShare, readCapture } from "@/lib/obd/capture";
import { type CaptureLine, parseCaptureLine } from "@/lib/obd/capture-line";

/** Values: SAE J1979 formulas (`41 0C 1A F8` = 1726 1/min, `41 0D 32` = 50 km/h); ids and framing: ISO 15765-4 / -2. */
const hex = (text: string) => text.split(" ").map((b) => Number.parseInt(b, 16));
const ascii = (text: string) => [...Buffer.from(text, "ascii")].map((b) => b.toString(16).toUpperCase()).join(" ");

const at = (line: CaptureLine) => ("time" in line ? (line.time?.seconds ?? null) : null);

function values(lines: string[]): [number | null, string, unknown][] {
  const out: [number | null, string, unknown][] = [];
  for (const e of readCapture(lines)) {
    if (e.kind !== "answer" || e.answer.kind !== "data") continue;
    for (const r of e.answer.readings) out.push([e.time?.seconds ?? null, r.id, r.value]);
  }
  return out;
}

const problems = (events: Iterable<CaptureEvent>) =>
  [...events].flatMap((e) =>
    e.kind === "problem" ? [e.reason] : e.kind === "answer" ? e.problems.map((p) => p.reason) : [],
  );

describe("one line of a capture", () => {
  const rpm = { kind: "frame", source: "7E8", data: hex("04 41 0C 1A F8") };
  it.each([
    ["12.480 7E8 04 41 0C 1A F8", 12.48],
    ["12,480;7E8;04;41;0C;1A;F8", 12.48],
    ["12.480,7E8,04,41,0C,1A,F8", 12.48],
    ["(12.480) can0 7E8#04410C1AF8", 12.48],
    ["12.480 7E8 [5] 04 41 0C 1A F8", 12.48],
    ["12480ms 7e8 04 41 0c 1a f8", 12.48],
    ["00:00:12.480 7E8 04410C1AF8", 12.48],
    ["1700000012.5 7E8 04 41 0C 1A F8", 1700000012.5],
    ["1700000012500 7E8 04 41 0C 1A F8", 1700000012.5],
    // 2023-11-14 22:13:20 UTC is 1,700,000,000 s after 1970 (POSIX time).
    ["2023-11-14T22:13:20Z 7E8 04 41 0C 1A F8", 1700000000],
    ["2023-11-15T00:13:20+02:00 7E8 04 41 0C 1A F8", 1700000000],
    ["2023-11-14 22:13:20.5 7E8 04 41 0C 1A F8", 1700000000.5],
    ["7E804410C1AF8", null],
    ["\uFEFF0x7E8 0x04 0x41 0x0C 0x1A 0xF8", null],
  ])("%s", (text, seconds) => {
    const line = parseCaptureLine(text);
    expect(line).toMatchObject(rpm);
    expect(at(line)).toBe(seconds);
  });
  it("reads 29-bit ids in one piece and in four", () => {
    for (const text of ["18DAF110 03 41 0D 32", "18 DA F1 10 03 41 0D 32", "18DAF110#03410D32", "18DAF11003410D32"]) {
      expect(parseCaptureLine(text), text).toMatchObject({
        kind: "frame",
        source: "18DAF110",
        data: hex("03 41 0D 32"),
      });
    }
  });
  it("reads answers without id, and with their length alone", () => {
    expect(parseCaptureLine("41 0C 1A F8")).toMatchObject({ kind: "answer", bytes: hex("41 0C 1A F8"), time: null });
    expect(parseCaptureLine("410C1AF8")).toMatchObject({ kind: "answer", bytes: hex("41 0C 1A F8") });
    expect(parseCaptureLine("0.5 410C1AF8")).toMatchObject({ kind: "answer", bytes: hex("41 0C 1A F8") });
    // PIDs that look like services, and a second byte that looks like one, are no times.
    expect(parseCaptureLine("41 42 37 DC")).toMatchObject({ kind: "answer", time: null, bytes: hex("41 42 37 DC") });
    expect(parseCaptureLine("04 41 0C 1A F8")).toMatchObject({ kind: "frame", data: hex("04 41 0C 1A F8") });
    expect(parseCaptureLine("06 41 00 BE 3E B8 13 00")).toMatchObject({ kind: "frame" });
    expect(parseCaptureLine("4 41 0C 1A F8")).toMatchObject({ kind: "frame", data: hex("04 41 0C 1A F8") });
  });
  it("keeps a whole number before an id as a count, for its unit is not told", () => {
    expect(parseCaptureLine("12 7E8 04 41 0C 1A F8")).toMatchObject({
      ...rpm,
      time: { form: "count", count: 12, seconds: null },
    });
    expect(parseCaptureLine("480 41 0D 32")).toMatchObject({ time: { count: 480 }, bytes: hex("41 0D 32") });
  });
  it("passes over what is no answer and refuses what is no hex", () => {
    expect(parseCaptureLine("   ")).toEqual({ kind: "skipped", reason: "blank" });
    expect(parseCaptureLine("# warm idle")).toEqual({ kind: "skipped", reason: "comment" });
    for (const text of [
      "7DF 02 01 0C",
      "7E0 30 00 00",
      "18DB33F1 02 01 0C",
      "18DA10F1 30 00 00",
      ">01 0C",
      "02 43 00",
    ]) {
      expect(parseCaptureLine(text), text).toEqual({ kind: "skipped", reason: "request" });
    }
    expect(parseCaptureLine("1F0 04 41 0C 1A F8")).toEqual({ kind: "skipped", reason: "other traffic" });
    for (const text of [
      "NO DATA",
      "7E8 04 41 0G",
      "7E8",
      "7E8 [8] 04 41",
      "7E8 04 4 10",
      "99 98 97",
      "4".repeat(20000),
    ]) {
      expect(parseCaptureLine(text).kind, text.slice(0, 20)).toBe("problem");
    }
  });
});

describe("a capture", () => {
  it("gives values with their times, control unit by control unit", () => {
    expect(
      values([
        "0.000 7E8 04 41 0C 1A F8 00 00 00",
        "0.010 7E8 03 41 0D 32",
        "",
        "0.020 7E9 03 41 0D 33",
        "0.5 41 05 7B",
      ]),
    ).toEqual([
      [0, "RPM", 1726],
      [0.01, "VSS", 50],
      [0.02, "VSS", 51],
      [0.5, "ECT", 83],
    ]);
  });
  it("dates a message of several frames by its first", () => {
    const lines = ["1.00 7E8 10 0A 41 0C 1A F8 0D 32", "1.02 7E8 21 05 7B 0F 46 AA AA AA"];
    expect(values(lines)).toEqual([
      [1, "RPM", 1726],
      [1, "VSS", 50],
      [1, "ECT", 83],
      [1, "IAT", 30],
    ]);
  });
  it("joins a VIN over CAN, with id and without, and over older lines", () => {
    const vin = "1A2BC34D5EF678901";
    const bytes = ascii(vin).split(" ");
    const part = (from: number, to: number) => bytes.slice(from, to).join(" ");
    const frames = [`10 14 49 02 01 ${part(0, 3)}`, `21 ${part(3, 10)}`, `22 ${part(10, 17)}`];
    // Older lines: five answers of four bytes, three 00 before the first character (J1979, from memory).
    const old = [`49 02 01 00 00 00 ${part(0, 1)}`];
    for (let n = 0; n < 4; n++) old.push(`49 02 0${n + 2} ${part(1 + 4 * n, 5 + 4 * n)}`);
    for (const lines of [frames.map((f) => `7E8 ${f}`), frames, frames.map((f) => `18 DA F1 10 ${f}`), old]) {
      const events = [...readCapture(lines)];
      expect(problems(events)).toEqual([]);
      expect(events.at(-1)).toMatchObject({ answer: { kind: "vin", vin } });
    }
  });
  it("keeps sensor layout and scaling for each control unit apart", () => {
    const lines = [
      "7E8 03 41 1D 0F",
      "7E8 06 41 4F 00 00 00 1A",
      "7E8 04 41 16 5A 80",
      "7E8 03 41 0B 80",
      "7E9 03 41 13 33",
      "7E9 04 41 18 5A 80",
      "7E9 03 41 0B 80",
    ];
    const got = values(lines).filter(([, id]) => id !== "O2SLOC" && id !== "maxima");
    expect(got.map(([, id]) => id)).toEqual(["O2S21", "SHRTFT21", "MAP", "O2S21", "SHRTFT21", "MAP"]);
    // A·D·10/255 = 128·26·10/255 kPa with PID 4F, A without (J1979).
    expect(got[2]?.[2]).toBeCloseTo(130.51, 2);
    expect(got[5]?.[2]).toBe(128);
  });
  it("frames codes by the line: a count over CAN, pairs without an id", () => {
    const codes = (line: string) =>
      [...readCapture([line])].flatMap((e) =>
        e.kind === "answer" && e.answer.kind === "codes" ? e.answer.codes : ["?"],
      );
    expect(codes("7E8 06 43 02 01 71 03 00")).toEqual(["P0171", "P0300"]);
    expect(codes("7E8 02 43 00")).toEqual([]);
    expect(codes("02 43 00 00 00 00 00 00")).toEqual([]);
    expect(codes("43 01 33 00 00 00 00")).toEqual(["P0133"]);
    expect(codes("7E8 04 47 01 03 04")).toEqual(["P0304"]);
  });
  it("reports a refused service, a lost frame and an unfinished end with their lines", () => {
    const events = [
      ...readCapture(["7E8 03 7F 09 11", "7E8 10 14 49 02 01 31 32 33", "7E8 22 34", "7E8 10 14 49 02 01 31 32 33"]),
    ];
    expect(events[0]).toMatchObject({
      line: 1,
      answer: { kind: "negative", service: 9, meaning: "service not supported" },
    });
    expect(events[1]).toMatchObject({ kind: "problem", line: 3 });
    expect(events[2]).toMatchObject({
      kind: "problem",
      line: 4,
      reason: "capture ends after 6 of 20 bytes of a message",
    });
    expect(events).toHaveLength(3);
  });
  it("is told from a table", () => {
    expect(captureShare(["# log", "0.0 7E8 03 41 0D 32", "7DF 02 01 0C", "41 0C 1A F8"])).toBe(1);
    expect(captureShare(["time,rpm,speed", "0.0,750,0", "0.1,755,0", "12;36C;24,77g/s"])).toBe(0);
    expect(captureShare([])).toBe(0);
  });
  it("never throws on any text", () => {
    const token = fc.oneof(
      fc.constantFrom(
        "7E8",
        "18DAF110",
        "18",
        "DA",
        "F1",
        "10",
        "21",
        "04",
        "41",
        "42",
        "43",
        "49",
        "02",
        "12.5",
        "12:00:01",
      ),
      fc.nat(255).map((n) => n.toString(16)),
      fc.string({ maxLength: 6 }),
    );
    const line = fc.oneof(
      fc.array(token, { maxLength: 12 }).map((t) => t.join(" ")),
      fc.string({ unit: "binary", maxLength: 80 }),
    );
    fc.assert(
      fc.property(fc.array(line, { maxLength: 30 }), (lines) => {
        for (const event of readCapture(lines)) expect(event.line).toBeLessThanOrEqual(lines.length);
        captureShare(lines);
      }),
      { numRuns: 1000 },
    );
  });
});
