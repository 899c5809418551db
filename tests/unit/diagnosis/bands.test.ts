import { describe, expect, it } from "vitest";
import { bandFor, DEFAULT_BANDS, judge, judgeTotalTrim } from "@/lib/diagnosis/bands";
import { PARAMETER_IDS } from "@/lib/obd/parameters";
import { BOOSTED_DIRECT, CARBURETTED, caseOf, PORT_MAF } from "./helpers";

const port = caseOf({ version: 1, vehicle: PORT_MAF }).vehicle;
const carburettor = caseOf({ version: 1, vehicle: CARBURETTED }).vehicle;
const boosted = caseOf({ version: 1, vehicle: BOOSTED_DIRECT }).vehicle;

describe("bands", () => {
  it("every row names a parameter, a source and an order", () => {
    for (const row of DEFAULT_BANDS) {
      expect(PARAMETER_IDS).toContain(row.parameter);
      expect(row.source.length).toBeGreaterThan(5);
      if (row.low !== null && row.high !== null) expect(row.low).toBeLessThan(row.high);
    }
  });
  it("calls total trim quiet to 5, watched to 10, deviant from 10 (common practice)", () => {
    expect([0, 5, -5, 5.1, -9.9, 10, -10, 25].map(judgeTotalTrim)).toEqual([
      "inside",
      "inside",
      "inside",
      "watch",
      "watch",
      "outside",
      "outside",
      "outside",
    ]);
    expect(judge("LONGFT1", 7, "idling", port)).toMatchObject({ state: "watch", side: "high", family: "lean" });
    expect(judge("LONGFT1", -12, "idling", port)).toMatchObject({ state: "outside", side: "low", family: "rich" });
  });
  it("scales idle air flow with displacement (0.8 to 1.5 g/s per litre, common practice)", () => {
    expect(bandFor("MAF", "idling", port)).toEqual({ low: 1.6, high: 3.2 });
    expect(judge("MAF", 2.5, "idling", port).state).toBe("inside");
    expect(bandFor("MAF", "idling", { ...port, displacementL: undefined })).toBeNull();
  });
  it("follows the barometer for vacuum: 58 to 71 kPa at sea level, less on a mountain", () => {
    const sea = bandFor("manifoldVacuumKPa", "idling", port);
    expect(sea?.low).toBeCloseTo(58.3, 1);
    expect(sea?.high).toBeCloseTo(73.3, 1);
    expect(judge("manifoldVacuumKPa", 44, "idling", port, DEFAULT_BANDS, { baroKPa: 79 }).state).toBe("inside");
    expect(judge("manifoldVacuumKPa", 44, "idling", port).state).toBe("outside");
  });
  it("gives the reason a reading is impossible and what was probably meant", () => {
    expect(judge("ECT", 910, "idling", port)).toMatchObject({
      state: "impossible",
      message: "This sensor's range ends at 215 °C",
      likely: 91,
    });
    expect(judge("ECT", 195, "idling", port)).toMatchObject({ state: "outside", likely: 90.6 });
    expect(judge("fuelPressureKPa", 55, "idling", port)).toMatchObject({ state: "outside" });
    expect(judge("RPM", -5, "idling", port)).toMatchObject({ state: "impossible", side: "low" });
    expect(judge("ECT", Number.NaN, "idling", port).state).toBe("impossible");
  });
  it("refuses readings of parts the vehicle lacks", () => {
    expect(judge("SHRTFT1", 3, "idling", carburettor).state).toBe("impossible");
    expect(judge("O2S11", 0.45, "idling", boosted).state).toBe("impossible");
    expect(judge("SHRTFT2", 3, "idling", port).state).toBe("impossible");
    expect(judge("MAF", 3, "idling", { ...port, airMetering: "map" }).state).toBe("impossible");
    expect(judge("SHRTFT1", 3, "idling", {}).state).toBe("inside");
  });
  it("takes the shop's own rows instead", () => {
    const own = [
      { parameter: "ECT", low: 80, high: 95, family: { low: "rich", high: "mech" }, source: "this shop" } as const,
    ];
    expect(judge("ECT", 97, "idling", port, own)).toMatchObject({ state: "outside", side: "high", family: "mech" });
    expect(judge("RPM", 97, "idling", port, own).state).toBe("unbanded");
  });
});
