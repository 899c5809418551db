import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { checkVin } from "@/lib/obd/vin";

interface Row {
  id: string;
  // biome-ignore lint/suspicious/noExplicitAny: text or an object, by row
  input: any;
  // biome-ignore lint/suspicious/noExplicitAny: by row
  expected: any;
  source: string;
}
const rows: Row[] = JSON.parse(
  readFileSync(new URL("../../../fixtures/checks/vehicle-identification.json", import.meta.url), "utf8"),
);

describe("VIN (49 CFR 565.15, ISO 3779, ISO 3780)", () => {
  it.each(rows)("$id", ({ input, expected, source }) => {
    if (typeof input === "string" && typeof expected === "object") {
      const got = checkVin(input);
      expect(
        {
          sum: got.sum,
          remainder: got.remainder,
          check: got.expectedCheckDigit,
          valid: got.state === "valid",
          region: got.region,
        },
        source,
      ).toEqual(expected);
    } else if (typeof input === "string") {
      const state = checkVin(input).state;
      if (expected === "bad_model_year_or_check") expect(["bad_model_year", "bad_check_digit"]).toContain(state);
      else expect(state, source).toBe(expected);
    } else {
      const years = checkVin(input.vin, { lightVehicle: input.light_vehicle }).modelYears;
      expect(years, source).toEqual([expected].flat());
    }
  });
  it("suggests the number meant when one character was misread", () => {
    expect(checkVin("IM8GDM9AXKP042788").suspects[0]).toBe("1M8GDM9AXKP042788");
    expect(checkVin("1M8GDM9AXKPO42788").suspects[0]).toBe("1M8GDM9AXKP042788");
    expect(checkVin("1M8GDM9AXKP042878").suspects).toContain("1M8GDM9AXKP042788");
    expect(checkVin("1M8GDM9AXKP0427B8").suspects).toContain("1M8GDM9AXKP042788");
  });
  it("binds the check digit for the United States and Canada only", () => {
    expect(checkVin("1M8GDM9A1KP042788").binding).toBe(true);
    expect(checkVin("WZZDD33E0BZ000999")).toMatchObject({ state: "bad_check_digit", binding: false, region: "Europe" });
  });
  it("reads blanks and lower case as typed on a plate", () => {
    expect(checkVin(" 1m8 gdm9a-xkp042788 ").state).toBe("valid");
    expect(checkVin("").state).toBe("empty");
  });
  it("never throws and catches every single wrong digit", () => {
    fc.assert(fc.property(fc.string(), (text) => void checkVin(text)));
    const good = "1M8GDM9AXKP042788";
    for (let i = 11; i < 17; i++)
      for (let d = 0; d <= 9; d++)
        if (String(d) !== good[i])
          expect(checkVin(good.slice(0, i) + d + good.slice(i + 1)).state).toBe("bad_check_digit");
  });
});
