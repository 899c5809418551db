import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { codeControl, decodeTroubleCode, describeCode, isTroubleCode } from "@/lib/obd/trouble-codes";

const load = (name: string) =>
  JSON.parse(readFileSync(new URL(`../../../fixtures/checks/${name}.json`, import.meta.url), "utf8"));

describe("trouble codes (SAE J2012 / ISO 15031-6)", () => {
  it("describes every code of the published list", () => {
    const rows = load("trouble-codes") as {
      code: string;
      meaning: string;
      system: string;
      bank?: number;
      sensor?: number;
      cylinder?: number;
    }[];
    expect(rows.length).toBe(665);
    for (const row of rows) {
      const got = describeCode(row.code);
      expect(got).toMatchObject({ code: row.code, meaning: row.meaning, system: row.system, generic: true });
      expect(got?.bank ?? null, row.code).toBe(row.bank ?? null);
      expect(got?.sensor ?? null, row.code).toBe(row.sensor ?? null);
      expect(got?.cylinder ?? null, row.code).toBe(row.cylinder ?? null);
    }
  });
  it.each(load("trouble-code-decoding") as { id: string; input: string; expected: string; expected_control: string }[])(
    "decodes $input",
    (row) => {
      const [high = 0, low = 0] = row.input.split(" ").map((b) => Number.parseInt(b, 16));
      expect(decodeTroubleCode(high, low)).toBe(row.expected);
      expect(codeControl(row.expected)).toBe(row.expected_control);
    },
  );
  it("reads 00 00 as no code and never guesses a maker's code", () => {
    expect(decodeTroubleCode(0, 0)).toBeNull();
    expect(describeCode("p1234")).toMatchObject({ code: "P1234", generic: false, system: "maker-specific" });
    expect(describeCode("P0ZZZ")).toBeNull();
    expect(isTroubleCode(" p0171 ")).toBe(true);
    expect(isTroubleCode("P4171")).toBe(false);
  });
});
