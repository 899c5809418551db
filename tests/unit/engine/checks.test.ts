import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import * as air from "@/lib/engine/air";
import * as fuel from "@/lib/engine/fuel";
import * as ignition from "@/lib/engine/ignition";
import { correctedCo, lambdaFromGas } from "@/lib/engine/lambda";
import { euCoLimitPct, euLambdaPasses, usIdlePasses } from "@/lib/engine/limits";
import * as mixture from "@/lib/engine/mixture";
import * as sensors from "@/lib/engine/sensors";
import { trimBand, trimScope, trimShape } from "@/lib/engine/trim-shape";
import * as units from "@/lib/engine/units";

interface Row {
  id: string;
  // biome-ignore lint/suspicious/noExplicitAny: a table of many shapes, read by the handler of its rows
  input: any;
  expected: unknown;
  tolerance: number | null;
  source: string;
}
type Handler = [rows: RegExp, compute: (input: Row["input"], row: Row) => unknown];

const table = (name: string): Row[] =>
  JSON.parse(readFileSync(new URL(`../../../fixtures/checks/${name}.json`, import.meta.url), "utf8"));

/** Expected values and their sources stand in the published check tables; nothing here is computed by the code tested. */
function compare(got: unknown, row: Row, path = ""): void {
  const walk = (is: unknown, want: unknown, at: string): void => {
    if (typeof want === "number") {
      const relative = /relative/.test(row.source);
      const tolerance = relative ? Math.abs(want) * (row.tolerance ?? 0) : (row.tolerance ?? 0);
      expect(Math.abs((is as number) - want), `${row.id}${at}: ${is} for ${want} (${row.source})`).toBeLessThanOrEqual(
        tolerance + 1e-9,
      );
    } else if (Array.isArray(want)) {
      expect((is as unknown[]).length, row.id).toBe(want.length);
      for (const [i, w] of want.entries()) walk((is as unknown[])[i], w, `${at}[${i}]`);
    } else if (want !== null && typeof want === "object") {
      for (const [k, w] of Object.entries(want)) walk((is as Record<string, unknown>)[k], w, `${at}.${k}`);
    } else expect(is, `${row.id}${at} (${row.source})`).toEqual(want);
  };
  walk(got, row.expected, path);
}

const gasOf = (i: Row["input"]) => ({
  coPct: i.CO_pct,
  co2Pct: i.CO2_pct,
  o2Pct: i.O2_pct,
  hcPpm: i.HC_ppm_hexane,
  noxPpm: i.NO_ppm,
});

const HANDLERS: Record<string, Handler[]> = {
  "air-and-fuel-metering": [
    [/^speed-density/, (i) => air.speedDensityGps(i.VE, i.MAP_kPa, i.disp_L, i.rpm, i.temp_C)],
    [/^ve-/, (i) => air.volumetricEfficiencyPct(i.MAF_gps, i.disp_L, i.rpm, i.BARO_kPa, i.IAT_C)],
    [/^load-abs/, (i) => air.absoluteLoadPct(i.MAF_gps, i.rpm, i.disp_L)],
    [/^isa-/, (i) => air.standardPressureKPa(i)],
    [/^altitude-from-baro/, (i) => air.altitudeM(i)],
    [
      /^humid-/,
      (i) => {
        const h = air.humidAir(i.p_kPa, i.t_C, i.rh_pct);
        return { vapour_kPa: h.vapourKPa, mixing_ratio_g_per_kg: h.mixingGPerKg, density_kg_m3: h.densityGPerL };
      },
    ],
    [/^injector-dp/, (i) => fuel.injectorDeltaKPa(i.rail_gauge_kPa, i.baro_kPa, i.MAP_kPa)],
    [/^injector-/, (i) => fuel.flowAtPressure(i.flow, i.p1_kPa, i.p2_kPa)],
    [
      /^pulse-/,
      (i) => {
        const fuelMg = fuel.fuelPerInjectionMg(i.MAF_gps, i.rpm, i.cylinders, i.AFR);
        const ms = fuel.pulseMs(fuelMg, i.flow_cc_min, i.density_g_cc, i.dead_time_ms);
        return { fuel_mg: fuelMg, pulse_ms: ms, duty_pct: fuel.dutyPct(ms, i.rpm) };
      },
    ],
    [/^duty-/, (i) => fuel.dutyPct(i.pulse_ms, i.rpm)],
    [/^lbh-/, (i) => units.lbHourToCcMin(i.lb_per_h, i.density_g_cc)],
    [/^vacuum-/, (i) => units.kpaToInHg(air.vacuumKPa(air.standardPressureKPa(i.altitude_m), i.MAP_kPa))],
    [/^ntc/, (i) => sensors.ntcOhm(i.temp_C, i.curve.startsWith("A") ? sensors.NTC_CURVES.A : sensors.NTC_CURVES.B)],
    [/^sh-/, (i) => sensors.ntcCelsius(i.R_ohm, { a: i.A, b: i.B, c: i.C })],
    [/^beta-/, (i) => sensors.betaOhm(i.R20, i.beta, i.temp_C)],
    [/^divider-/, (i) => sensors.dividerVolts(i.R_ohm, i.pullup_ohm, i.Vref)],
    [/^unit-psi/, (i) => units.psiToKpa(i.psi)],
    [/^unit-inhg/, (i) => units.inHgToKpa(i.inHg)],
    [/^unit-kpa/, (i) => units.kpaToInHg(i.kPa)],
    [/^unit-lbmin/, (i) => units.lbMinToGps(i.lb_per_min)],
  ],
  "mixture-chemistry": [
    [/^afr-blend/, (i) => mixture.stoichiometricRatio(i.ethanol_vol_fraction)],
    [/^afr-/, (i) => mixture.ratioFromComposition(i.H_C, i.O_C)],
    [/^trim-shift/, (i) => mixture.volumeShiftPct(i.ethanol_vol_fraction)],
    [/^lambda-fuel-LPG/, (i) => lambdaFromGas({ ...gasOf(i), fuel: "LPG" })],
    [/^lambda-fuel-CNG/, (i) => lambdaFromGas({ ...gasOf(i), fuel: "CNG" })],
    [/^lambda-fuel-E10/, (i) => lambdaFromGas({ ...gasOf(i), fuel: "E10" })],
    [
      /^(lambda-|burned-gas|misfire-share|dilution-)/,
      (i) => lambdaFromGas({ ...gasOf(i), ...(i.K1 ? { k1: i.K1 } : {}) }),
    ],
    [/^co-corrected/, (i) => correctedCo(i.CO_pct, i.CO2_pct)],
    [
      /^conv-/,
      (i) => ({ afr: mixture.ratioFromLambda(i.lambda_, i.afr_stoich), phi: mixture.phiFromLambda(i.lambda_) }),
    ],
    [/^limit-EU/, (i) => euCoLimitPct(i.first_use, i.mode)],
    [/^limit-lambda/, (i) => euLambdaPasses(i.lambda_)],
    [/^limit-US/, (i) => usIdlePasses(i.HC_ppm, i.CO_pct)],
  ],
  "oxygen-sensors": [
    [/^nernst-/, (i) => sensors.nernstMv(i.temp_C, i.pO2_exhaust_atm, i.pO2_ref_atm)],
    [/^p-at-/, (i) => sensors.oxygenFromMv(i.temp_C, i.E_mV)],
    [/^wide-/, (i) => sensors.lambdaFromPumpMa(i.Ip_mA)],
    [
      /^trace-/,
      (i) => {
        const t = sensors.readTrace(i.volts, i.threshold, i.hysteresis_V);
        return {
          crossings: t.crossings,
          min: t.min,
          max: t.max,
          mean: t.mean,
          rich_share: t.richShare,
          verdict: t.verdict,
        };
      },
    ],
    [/^switch-ratio/, (i) => sensors.switchRatio(i.front, i.rear)],
    [/^cat-eff/, (i) => sensors.conversionPct(i.CO_in, i.CO_out)],
  ],
  "fuel-trim-patterns": [
    [
      /^total-/,
      (i) => {
        const sum = mixture.trimSum(i.stft, i.ltft);
        return { sum, product: mixture.trimProduct(i.stft, i.ltft), band: trimBand(sum) };
      },
    ],
    [
      /^shape-/,
      (i) => {
        const bank1 = trimShape(i.bank1);
        const bank2 = trimShape(i.bank2);
        return { bank1, bank2, scope: trimScope(bank1, bank2) };
      },
    ],
  ],
  ignition: [
    [
      /^companion/,
      (i) => ({
        interval_deg: ignition.firingIntervalDeg(i.firing_order.length),
        pairs: ignition.companionPairs(i.firing_order),
      }),
    ],
    [
      /^dwell/,
      (i) => ({
        ms: ignition.dwellMs(i.dwell_distributor_deg, i.rpm),
        percent: ignition.dwellPct(i.dwell_distributor_deg, i.cylinders),
      }),
    ],
    [
      /^charge/,
      (i) => {
        const c = ignition.coilCharge(i.L_H, i.R_ohm, i.U_V, i.I_A);
        return { charge_ms: c.ms, energy_mJ: c.mJ };
      },
    ],
    [/^misfire-share/, (i) => ignition.misfireName(i.counts).name],
    [
      /^misfire-/,
      (i) => ({
        firings: (i.revolutions * i.cylinders) / 2,
        percent: ignition.misfirePct(i.misfires, i.revolutions, i.cylinders),
      }),
    ],
    [/^firing-interval/, (i) => ignition.firingIntervalMs(i.cylinders, i.rpm)],
    [/^compression-theory/, (i) => units.kpaToPsi(ignition.theoreticalCompressionKPa(i.CR, i.n, i.P_atm))],
    [
      /^compression-/,
      (i) => {
        const c = ignition.compressionSpread(i.psi, 100);
        return { ratio_pct: c.ratioPct, low_cylinders: c.lowCylinders, verdict: c.verdict };
      },
    ],
    [
      /^wet-/,
      (i) => {
        const w = ignition.wetGain(i.dry, i.wet);
        return { gain_pct: w.gainPct, points_to: w.pointsTo };
      },
    ],
    [
      /^leakdown-/,
      (i) => {
        const l = ignition.leakDown(i.supply, i.cylinder);
        return { leak_pct: l.leakPct, band: l.band };
      },
    ],
    [/^relative-/, (i) => ignition.relativeCompressionPct(i.peak_amps)],
    [/^aki-/, (i) => ignition.antiKnockIndex(i.RON, i.MON)],
    [/^ms-deg/, (i) => ignition.crankDegFromMs(i.ms, i.rpm)],
    [/^crank-teeth/, (i) => ignition.toothHz(i.teeth_per_turn, i.rpm)],
  ],
  "carburetted-engines": [
    [
      /^venturi/,
      (i) => {
        const v = ignition.venturi(i.MAF_gps, i.throat_mm, i.Cd, i.rho);
        return { velocity_m_s: v.speedMs, depression_Pa: v.depressionPa };
      },
    ],
    [
      /^altitude-rich/,
      (i) =>
        ignition.fixedJetLambda(
          i.base_lambda,
          air.airDensity(air.standardPressureKPa(i.altitude_m), air.standardTemperatureC(i.altitude_m)) /
            air.airDensity(101.325, 15),
        ),
    ],
    [/^jet-/, (i) => ignition.jetForLambda(i.jet_mm, i.lambda_now, i.lambda_target)],
    [/^cam-angle/, (i) => ({ degrees_per_cylinder: ignition.firingIntervalDeg(i.cylinders) / 2 })],
    [/^dwell-pct/, (i) => ignition.dwellPct(i.dwell_deg, i.cylinders)],
    [
      /^dwell-timing/,
      (i) => ({ ignition_change_crank_deg: ignition.timingShiftFromDwellDeg(i.dwell_change_distributor_deg) }),
    ],
  ],
  "fuel-economy": [
    [
      /^mpg-/,
      (i) => {
        const l = units.litresPer100KmFromMpgUs(i.mpg_us);
        return { L_per_100km: l, mpg_uk: units.mpgUkFromLitresPer100Km(l), km_per_L: 100 / l };
      },
    ],
    [/^l100-/, (i) => ({ mpg_us: units.mpgUsFromLitresPer100Km(i.L_per_100km) })],
    [/^const-us/, () => units.mpgUsFromLitresPer100Km(1)],
    [/^const-uk/, () => units.mpgUkFromLitresPer100Km(1)],
    [
      /^instant-/,
      (i) => {
        const lh = fuel.fuelLitresPerHour(i.MAF_gps, i.lambda_, i.AFR, i.density_g_L);
        const l100 = fuel.litresPer100Km(lh, i.speed_kmh);
        return { L_per_h: lh, L_per_100km: l100, mpg_us: l100 === null ? null : units.mpgUsFromLitresPer100Km(l100) };
      },
    ],
    [
      /^rate-/,
      (i) => {
        const l100 = fuel.litresPer100Km(i.FUEL_RATE_Lh, i.VSS_kmh);
        return { L_per_100km: l100, mpg_us: l100 === null ? null : units.mpgUsFromLitresPer100Km(l100) };
      },
    ],
    [
      /^trip$/,
      (i) => ({
        L_per_100km: fuel.averageLitresPer100Km(
          i.segments_km_L.map(([km, litres]: [number, number]) => ({ km, litres })),
        ),
        wrong_mean:
          i.segments_km_L.reduce((s: number, [km, l]: [number, number]) => s + (100 * l) / km, 0) /
          i.segments_km_L.length,
      }),
    ],
    [/^fill-/, (i) => fuel.averageLitresPer100Km([{ km: i.odo_end_km - i.odo_start_km, litres: i.litres }])],
    [/^co2-epa$/, () => fuel.CO2_G_PER_US_GALLON],
    [/^co2-epa-L/, () => fuel.CO2_G_PER_LITRE],
    [/^co2-carbon/, (i) => fuel.co2GPerLitreFromCarbon(i.carbon_mass_fraction, i.density_g_L)],
    [/^co2-km/, (i) => fuel.co2GPerKm(i.L_per_100km)],
    [/^rich-fuel/, (i) => mixture.extraFuelPct(i.lambda_)],
    [
      /^cost-/,
      (i) => {
        const litres = fuel.extraFuelLitres(i.km_year, i.base_L_100km, i.extra_pct);
        return { extra_L: litres, cost: litres * i.price_per_L };
      },
    ],
  ],
  "tests-and-procedures": [
    [/^ethanol-/, (i) => fuel.ethanolByWaterPct(i.fuel_ml, i.water_added_ml, i.lower_layer_ml)],
    [
      /^balance-/,
      (i) => {
        const b = ignition.injectorBalance(i.drops_kPa);
        return { mean: b.mean, deviation_pct: b.deviationPct, out: b.out };
      },
    ],
  ],
};

for (const [name, handlers] of Object.entries(HANDLERS)) {
  describe(`published check values: ${name}`, () => {
    for (const row of table(name)) {
      const handler = handlers.find(([rows]) => rows.test(row.id));
      if (handler) it(`${row.id} (${row.source})`, () => compare(handler[1](row.input, row), row));
    }
  });
}

it("covers at least 420 rows of the check tables", () => {
  const covered = Object.entries(HANDLERS).flatMap(([name, handlers]) =>
    table(name).filter((r) => handlers.some(([rows]) => rows.test(r.id))),
  );
  expect(covered.length).toBeGreaterThanOrEqual(420);
});
