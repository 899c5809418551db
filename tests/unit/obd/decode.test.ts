import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { decodeCodes } from "@/lib/obd/answers";
import { type DecodeContext, decodeAnswer, NEW_CONTEXT, type Reading, railGaugeKPa } from "@/lib/obd/decode";
import { PARAMETERS } from "@/lib/obd/parameters";
import { PIDS } from "@/lib/obd/pids";
import { decodeMonitors } from "@/lib/obd/readiness";

const load = (name: string) =>
  JSON.parse(readFileSync(new URL(`../../../fixtures/checks/${name}.json`, import.meta.url), "utf8"));

const hex = (text: string) => text.split(" ").map((b) => Number.parseInt(b, 16));

interface Row {
  id: string;
  input: string;
  field: string;
  // biome-ignore lint/suspicious/noExplicitAny: the table's expected values have many shapes
  expected: any;
  unit: string;
  tolerance: number;
  source: string;
}

function readings(text: string, context?: DecodeContext): Reading[] {
  const { answer } = decodeAnswer(hex(text), context);
  return answer.kind === "data" ? answer.readings : [];
}

const only = (list: Reading[], id: string): Reading => {
  const found = list.filter((r) => r.id === id);
  expect(found, id).toHaveLength(1);
  return found[0]!;
};

/** Decodes the row's answers one after another, as one control unit's, and compares the field of the last. */
function checkRow(row: Row): void {
  let context = NEW_CONTEXT;
  const parts = row.input.split(" then ");
  for (const part of parts.slice(0, -1)) context = decodeAnswer(hex(part), context).context;
  const { answer, problems } = decodeAnswer(hex(parts.at(-1) ?? ""), context);
  expect(problems).toEqual([]);
  if (row.field === "dtcs") {
    expect(answer).toMatchObject({ kind: "codes", codes: row.expected });
    return;
  }
  if (answer.kind === "tests") {
    const [test] = answer.tests;
    const [value, min, max, pass] = row.expected;
    expect(Math.abs(test!.value - value)).toBeLessThanOrEqual(row.tolerance);
    expect(Math.abs(test!.min - min)).toBeLessThanOrEqual(row.tolerance);
    expect(Math.abs(test!.max - max)).toBeLessThanOrEqual(row.tolerance);
    expect(test).toMatchObject({ pass, unit: row.unit });
    return;
  }
  const list = answer.kind === "data" ? answer.readings : [];
  if (row.field === "FUELSYS1,FUELSYS2") {
    expect(list.map((r) => r.value)).toEqual(row.expected);
    return;
  }
  // PIDs 14, 24 and 34 are bank 1 sensor 1, 15 is bank 1 sensor 2, 3C is bank 1 sensor 1 (J1979, place table).
  const place = row.input.startsWith("41 15") ? "12" : "11";
  const reading = only(list, row.field.replace("xy", place));
  switch (reading.kind) {
    case "number":
      if (row.expected === null) expect(reading.value).toBeNull();
      else {
        expect(Math.abs(reading.value! - row.expected)).toBeLessThanOrEqual(row.tolerance);
        expect(reading.unit).toBe(row.unit);
      }
      break;
    case "monitors": {
      const { mil, codeCount, ignition, monitors } = reading.value;
      expect({
        MIL: mil,
        DTC_CNT: codeCount,
        ignition,
        supported: monitors.filter((m) => m.supported).map((m) => m.id),
        not_ready: monitors.filter((m) => !m.ready).map((m) => m.id),
      }).toEqual(row.expected);
      break;
    }
    case "sensors":
      expect(reading.value.map((p) => `B${p.bank}S${p.sensor}`)).toEqual(row.expected);
      break;
    case "supported":
      expect(reading.value.map((p) => p.toString(16).toUpperCase().padStart(2, "0"))).toEqual(row.expected);
      break;
    default:
      expect(reading.value).toEqual(row.expected);
  }
}

describe("every row of the parameter table (SAE J1979 / ISO 15031-5, source in each row)", () => {
  const rows = load("obd-parameters") as Row[];
  it("has all 135 rows", () => expect(rows.length).toBe(135));
  it.each(rows)("$id ($source)", checkRow);
});

describe("every row of the code table inside answers (SAE J2012 / ISO 15031-6)", () => {
  const rows = load("trouble-code-decoding") as { id: string; input: string; expected: string; source: string }[];
  it.each(rows)("$id in services 03, 07 and 0A, framed by CAN and in pairs ($source)", ({ input, expected }) => {
    const states = [
      ["43", "confirmed"],
      ["47", "pending"],
      ["4A", "permanent"],
    ] as const;
    for (const [service, state] of states) {
      const can = decodeAnswer(hex(`${service} 01 ${input}`));
      expect(can.answer).toMatchObject({ kind: "codes", state, codes: [expected] });
      const pairs = decodeAnswer(hex(`${service} ${input} 00 00 00 00`));
      expect(pairs.answer).toMatchObject({ kind: "codes", state, codes: [expected] });
      expect([...can.problems, ...pairs.problems]).toEqual([]);
    }
    expect(readings(`42 02 00 ${input}`)).toMatchObject([{ kind: "code", frame: 0, value: expected }]);
  });
});

describe("several parameters in one answer (SAE J1979, CAN form)", () => {
  it("reads each in turn", () => {
    const list = readings("41 0C 1A F8 0D 50 05 7B 06 80 07 99");
    expect(list.map((r) => [r.id, r.value])).toEqual([
      ["RPM", 1726],
      ["VSS", 80],
      ["ECT", 83],
      ["SHRTFT1", 0],
      ["LONGFT1", 19.53125],
    ]);
  });
  it("finds byte B of a trim where the answer leaves no other reading, as banks 3 and 4", () => {
    expect(readings("41 06 80 8A").map((r) => r.id)).toEqual(["SHRTFT1", "SHRTFT3"]);
    expect(readings("41 08 80 8A 0C 1A F8").map((r) => r.id)).toEqual(["SHRTFT2", "SHRTFT4", "RPM"]);
  });
  it("says so where it could be read both ways, and settles it once the sensors are known", () => {
    // 06 80, 0D 05, 0C 0D 05 or 06 80 0D, 05 0C, 0D 05: both use every byte.
    const both = "41 06 80 0D 05 0C 0D 05";
    const read = decodeAnswer(hex(both));
    expect(read.answer).toMatchObject({ readings: [{ id: "SHRTFT1", value: 0 }] });
    expect(read.problems).toMatchObject([{ pid: 0x06 }]);
    const pairs = (context: DecodeContext) => readings(both, context).map((r) => [r.id, r.value]);
    expect(pairs(decodeAnswer(hex("41 13 33")).context)).toEqual([
      ["SHRTFT1", 0],
      ["VSS", 5],
      ["RPM", 833.25],
    ]);
    expect(pairs(decodeAnswer(hex("41 1D 55")).context)).toEqual([
      ["SHRTFT1", 0],
      ["SHRTFT3", -89.84375],
      ["ECT", -28],
      ["VSS", 5],
    ]);
  });
  it("reports an unknown parameter, short bytes and an empty answer, and keeps what came before", () => {
    const unknown = decodeAnswer(hex("41 05 7B E7 01 02"));
    expect(unknown.answer).toMatchObject({ readings: [{ id: "ECT", value: 83 }] });
    expect(unknown.problems).toEqual([{ pid: 0xe7, reason: "unknown parameter, 2 bytes after it not read" }]);
    expect(decodeAnswer(hex("41 0C 1A")).problems).toEqual([{ pid: 0x0c, reason: "needs 2 bytes, 1 are there" }]);
    expect(decodeAnswer([0x41]).problems).toHaveLength(1);
    expect(decodeAnswer([]).answer.kind).toBe("unread");
    expect(decodeAnswer([0x55, 1]).answer.kind).toBe("unread");
  });
  it("reports values the standard gives no meaning", () => {
    for (const text of ["41 03 03 00", "41 51 77", "41 1C FE", "41 5E FF FF"]) {
      expect(decodeAnswer(hex(text)).problems, text).toHaveLength(1);
    }
  });
});

describe("what the control unit said before", () => {
  it("leaves the place of PID 16 open until 13, 1D or the support mask is seen (J1979 place table)", () => {
    const open = decodeAnswer(hex("41 16 5A 80"));
    expect(open.answer).toMatchObject({ readings: [{ id: "O2Sxy", parameter: null }, { id: "SHRTFTxy" }] });
    expect(open.problems).toHaveLength(1);
    const placed = (text: string, answer: string) => readings(answer, decodeAnswer(hex(text)).context).map((r) => r.id);
    expect(placed("41 13 33", "41 16 5A 80")).toEqual(["O2S13", "SHRTFT13"]);
    expect(placed("41 13 33", "41 18 5A 80")).toEqual(["O2S21", "SHRTFT21"]);
    expect(placed("41 1D 0F", "41 16 5A 80")).toEqual(["O2S21", "SHRTFT21"]);
    expect(placed("41 1D 55", "41 3A 80 00 80 00")).toEqual(["EQ_RAT41", "O2S41"]);
    // The mask below names 13 and not 1D.
    expect(placed("41 00 BE 3E B8 13", "41 18 5A 80")).toEqual(["O2S21", "SHRTFT21"]);
  });
  it("rescales sensor volts and milliamps by PID 4F, mass air flow by PID 50", () => {
    // raw·B/65535, (raw-32768)·C/32768: J1699-3 as the parameter table's notes have it; MAF from memory of J1979.
    const { context } = decodeAnswer(hex("41 4F 02 08 10 00 50 28 00 00 00"));
    expect(only(readings("41 24 80 00 FF FF", context), "O2S11").value).toBe(8);
    expect(only(readings("41 34 80 00 C0 00", context), "O2S11").value).toBe(8);
    expect(only(readings("41 10 FF FF", context), "MAF").value).toBe(400);
  });
  it("does not feed a wide-range voltage into a switching sensor, nor other pressures into gauge pressure", () => {
    expect(only(readings("41 14 5A 80"), "O2S11").parameter).toBe("O2S11");
    expect(only(readings("41 24 80 00 66 66"), "O2S11").parameter).toBeNull();
    expect(only(readings("41 24 80 00 66 66"), "EQ_RAT11").parameter).toBe("EQ_RAT11");
    expect(only(readings("41 59 07 D0"), "FRP")).toMatchObject({ parameter: null, reference: "absolute" });
    expect(railGaugeKPa(300, "gauge", null, null)).toBe(300);
    expect(railGaugeKPa(20000, "absolute", null, 101)).toBe(19899);
    expect(railGaugeKPa(300, "manifold", 33, 101)).toBe(232);
    expect(railGaugeKPa(300, "manifold", null, 101)).toBeNull();
  });
});

describe("freeze frames (service 02, same scaling as service 01)", () => {
  it("reads several parameters of a frame and the code that stored it", () => {
    const { answer, problems } = decodeAnswer(hex("42 02 00 01 71 0C 00 1A F8 05 00 7B"));
    expect(problems).toEqual([]);
    expect(answer).toMatchObject({
      service: 2,
      readings: [
        { id: "DTCFRZF", value: "P0171", frame: 0 },
        { id: "RPM", value: 1726, frame: 0 },
        { id: "ECT", value: 83, frame: 0 },
      ],
    });
    expect(readings("42 02 00 00 00")).toMatchObject([{ value: null }]);
    expect(decodeAnswer(hex("42 0C 00 1A")).problems).toHaveLength(1);
  });
});

describe("codes whose count does not fit", () => {
  it("keeps the whole pairs and says what is wrong", () => {
    expect(decodeCodes(hex("02 01 71"), "can")).toMatchObject({ codes: ["P0171"], problems: [expect.any(String)] });
    expect(decodeCodes(hex("01 01 71 03 00"), "can")).toMatchObject({
      codes: ["P0171"],
      problems: [expect.any(String)],
    });
    expect(decodeCodes(hex("01 01 71 00 00"), "can")).toEqual({ codes: ["P0171"], problems: [] });
    expect(decodeCodes(hex("01 33 00"), "pairs")).toMatchObject({ codes: ["P0133"], problems: [expect.any(String)] });
    expect(decodeCodes([]).problems).toHaveLength(1);
  });
});

describe("test results (service 06, from memory of J1979)", () => {
  it("fails a value beyond either limit, and leaves out what it cannot scale or find whole", () => {
    const tests = (text: string) => {
      const { answer, problems } = decodeAnswer(hex(text));
      return { pass: answer.kind === "tests" ? answer.tests.map((t) => t.pass) : null, problems: problems.length };
    };
    expect(tests("46 21 80 20 00 C1 00 00 00 C0")).toEqual({ pass: [false], problems: 0 });
    expect(tests("46 21 80 20 00 0F 00 10 00 C0")).toEqual({ pass: [false], problems: 0 });
    expect(tests("46 21 80 99 00 5A 00 00 00 C0")).toEqual({ pass: [], problems: 1 });
    expect(tests("46 21 80 20 00 5A")).toEqual({ pass: [], problems: 1 });
    expect(decodeAnswer(hex("46 A3 0B 24 00 03 00 00 FF FF")).answer).toMatchObject({ tests: [{ cylinder: 2 }] });
  });
});

describe("monitors", () => {
  it("reads the compression-ignition form (J1979, from memory) and this driving cycle's", () => {
    const { status, oddities } = decodeMonitors(hex("00 0F EB 80"), "since-clear");
    expect(oddities).toEqual([]);
    expect(status.ignition).toBe("compression");
    expect(status.monitors.filter((m) => m.supported).map((m) => m.id)).toEqual([
      "MIS",
      "FUEL",
      "CCM",
      "HCCAT",
      "NCAT",
      "BP",
      "EGS",
      "PM",
      "EGR/VVT",
    ]);
    expect(status.monitors.filter((m) => !m.ready).map((m) => m.id)).toEqual(["EGR/VVT"]);
    expect(readings("41 41 00 07 65 04")).toMatchObject([
      { kind: "monitors", value: { scope: "this-cycle", mil: null, codeCount: null } },
    ]);
  });
  it("takes an absent monitor that reads unfinished as finished, and says so (J1979: must read complete)", () => {
    const { status, oddities } = decodeMonitors(hex("00 07 65 02"), "since-clear");
    expect(status.monitors.every((m) => m.ready)).toBe(true);
    expect(oddities).toHaveLength(1);
    expect(() => decodeMonitors([1, 2, 3], "since-clear")).toThrow(RangeError);
  });
});

describe("the table itself", () => {
  it("feeds no case parameter a value that parameter cannot hold", () => {
    for (const row of PIDS.values()) {
      for (const f of row.fields) {
        const possible = f.parameter && PARAMETERS[f.parameter].possible;
        if (!possible) continue;
        expect(f.min, f.id).toBeGreaterThanOrEqual(possible.min);
        expect(f.max, f.id).toBeLessThanOrEqual(possible.max + 0.001);
      }
    }
  });
});

describe("any bytes", () => {
  const service = fc.constantFrom(0x41, 0x42, 0x43, 0x44, 0x46, 0x47, 0x49, 0x4a, 0x7f);
  const pid = fc.constantFrom(...PIDS.keys());
  const byte = fc.nat(255);
  const context = fc.record({
    layout: fc.constantFrom("two-bank" as const, "four-bank" as const, null),
    moreBanks: fc.constantFrom(true, false, null),
    maxima: fc.record({ lambda: byte, o2Volts: byte, o2Milliamps: byte, map: byte, maf: byte }),
  });
  it("never throw, and every number lies in its stated range", () => {
    fc.assert(
      fc.property(service, fc.array(fc.oneof(pid, byte), { maxLength: 60 }), context, (first, rest, given) => {
        const { answer, problems } = decodeAnswer([first, ...rest], given);
        expect(problems.every((p) => p.reason !== "")).toBe(true);
        if (answer.kind === "unread") expect(problems.length).toBeGreaterThan(0);
        if (answer.kind !== "data") return;
        expect(answer.readings.length + problems.length).toBeGreaterThan(0);
        for (const r of answer.readings) {
          if (r.kind !== "number" || r.value === null) continue;
          expect(r.value).toBeGreaterThanOrEqual(r.min);
          expect(r.value).toBeLessThanOrEqual(r.max);
        }
      }),
      { numRuns: 2000 },
    );
  });
  it("never throw when they are no bytes at all", () => {
    fc.assert(
      fc.property(fc.array(fc.oneof(fc.double(), fc.integer())), (list) => {
        decodeAnswer(list);
      }),
    );
  });
});
