import fc from "fast-check";
import { unit } from "mathjs";
import psychrolib from "psychrolib";
import { describe, expect, it } from "vitest";
import { humidAir, standardPressureKPa } from "@/lib/engine/air";
import { NTC_CURVES, ntcCelsius, ntcOhm } from "@/lib/engine/sensors";
import { leakFlowGps, solveEngine } from "@/lib/engine/steady-state";
import * as u from "@/lib/engine/units";

describe("unit conversions against mathjs", () => {
  const cases: [name: string, ours: (n: number) => number, theirs: (n: number) => number][] = [
    ["psi to kPa", u.psiToKpa, (n) => unit(n, "psi").toNumber("kPa")],
    ["kPa to psi", u.kpaToPsi, (n) => unit(n, "kPa").toNumber("psi")],
    ["bar to kPa", u.barToKpa, (n) => unit(n, "bar").toNumber("kPa")],
    ["miles to km", u.milesToKm, (n) => unit(n, "mile").toNumber("km")],
    ["km to miles", u.kmToMiles, (n) => unit(n, "km").toNumber("mile")],
    ["US gallons to litres", u.usGallonsToLitres, (n) => unit(n, "gallon").toNumber("litre")],
    ["lb/min to g/s", u.lbMinToGps, (n) => unit(n, "lbm/minute").toNumber("g/s")],
    ["°C to °F", u.celsiusToFahrenheit, (n) => unit(n, "degC").toNumber("degF")],
    ["°F to °C", u.fahrenheitToCelsius, (n) => unit(n, "degF").toNumber("degC")],
  ];
  it.each(cases)("%s", (_, ours, theirs) => {
    // mathjs rounds some of its factors in the sixth figure (US gallon, psi).
    for (const n of [0.5, 1, 7.3, 36.6, 250, 1234.5]) expect(Math.abs(ours(n) / theirs(n) - 1)).toBeLessThan(3e-5);
  });
  it("round trips", () => {
    fc.assert(
      fc.property(fc.double({ min: -1e4, max: 1e4, noNaN: true }), (x) => {
        for (const back of [
          u.kpaToPsi(u.psiToKpa(x)),
          u.kpaToInHg(u.inHgToKpa(x)),
          u.fahrenheitToCelsius(u.celsiusToFahrenheit(x)),
          u.gpsToLbMin(u.lbMinToGps(x)),
        ])
          expect(back).toBeCloseTo(x, 6);
      }),
    );
  });
});

describe("humid air against psychrolib (ASHRAE Handbook of Fundamentals)", () => {
  it("agrees on density and humidity ratio from 0 to 45 °C", () => {
    psychrolib.SetUnitSystem(psychrolib.SI);
    for (const t of [0, 10, 20, 30, 45])
      for (const rh of [0, 20, 50, 80, 100])
        for (const kPa of [70, 85, 101.325]) {
          const ours = humidAir(kPa, t, rh);
          const w = psychrolib.GetHumRatioFromRelHum(t, rh / 100, kPa * 1000);
          expect(Math.abs(ours.mixingGPerKg - 1000 * w)).toBeLessThan(0.6);
          const theirs = psychrolib.GetMoistAirDensity(t, w, kPa * 1000);
          expect(Math.abs(ours.densityGPerL / theirs - 1)).toBeLessThan(0.0015);
        }
  });
  it("agrees on the standard atmosphere", () => {
    for (const m of [0, 500, 1500, 3000])
      expect(Math.abs(standardPressureKPa(m) * 1000 - psychrolib.GetStandardAtmPressure(m))).toBeLessThan(30);
  });
});

describe("the steady-state engine", () => {
  const engine = { displacementL: 2, cylinders: 4, banks: 1 as const, metering: "maf" as const, ethanol: 0.1 };
  it("passes 0.19 to 0.2 g/s through a choked square millimetre", () => {
    // Textbook choked flow 0.0404 · P/√T times Cd 0.8 at sea level.
    expect(leakFlowGps(1, 33, 101.325, 288)).toBeCloseTo((0.0404 * 101.325 * 0.8) / Math.sqrt(288), 2);
  });
  it("needs no trim when nothing is wrong", () => {
    for (const p of solveEngine(engine, {})) expect(Math.abs(p.trimPct[0])).toBeLessThan(1e-9);
  });
  it("sees a leak with an air-flow meter, fading with flow, and hardly with pressure metering", () => {
    const maf = solveEngine(engine, { leakMm2: 2 }).map((p) => p.trimPct[0]);
    expect(maf[0]).toBeGreaterThan(12);
    expect(maf[2]).toBeLessThan(4);
    const map = solveEngine({ ...engine, metering: "map" }, { leakMm2: 2 });
    for (const p of map) expect(Math.abs(p.trimPct[0])).toBeLessThan(1);
    expect(solveEngine({ ...engine, metering: "map" }, { leakMm2: 12 })[0]?.speedRatio).toBeGreaterThan(1.2);
  });
  it("makes 0.03 g/s of extra fuel about 14 to 17 % at idle, 3 % cruising, 1 % at load", () => {
    // Arithmetic of a constant flow against 3, 15 and 90 g/s of air, common practice figures 14, 3 and 0.5 %.
    const t = solveEngine(engine, { extraFuelGps: 0.03 }).map((p) => p.trimPct[0]);
    expect(t[0]).toBeGreaterThan(-18);
    expect(t[0]).toBeLessThan(-12);
    expect(t[2]).toBeGreaterThan(-4);
    expect(t[3]).toBeGreaterThan(-1.5);
  });
  it("follows the square root of pressure", () => {
    // 44 % more pressure is 20 % more fuel, so trim takes one sixth away.
    for (const p of solveEngine(engine, { pressureRatio: [1.44, 1.44, 1.44, 1.44] }))
      expect(p.trimPct[0]).toBeCloseTo(-100 / 6, 6);
  });
  it("needs 36.9 % more volume of E85 than of E10", () => {
    for (const p of solveEngine(engine, { tankEthanol: 0.85 })) expect(p.trimPct[0]).toBeCloseTo(36.9, 0);
  });
  it("leaves one cylinder lean when the leak is at its runner though the mean is right", () => {
    const [idle] = solveEngine(engine, { leakMm2: 1.5, leakAtCylinder: 1 });
    expect(idle?.lambda[0]).toBeGreaterThan(1.25);
    expect(idle?.lambda[1]).toBeLessThan(0.95);
  });
});

it("thermistor curves invert each other", () => {
  for (const curve of Object.values(NTC_CURVES))
    for (const c of [-40, 0, 20, 80, 120]) expect(ntcCelsius(ntcOhm(c, curve), curve)).toBeCloseTo(c, 6);
});
