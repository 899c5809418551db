import type { QuoteLineDraft } from "@/lib/cases/quote-schema";

/** What a demo repair is made of: hours of labour, parts as [name, number, cost, price] in cents, and what waits. */
export interface DemoJob {
  title: string;
  customerTitle: string;
  hours: number;
  parts: readonly [name: string, number: string, costMinor: number, priceMinor: number, quantity?: number][];
  ifWaits: string;
}

const job = (
  title: string,
  customerTitle: string,
  hours: number,
  parts: DemoJob["parts"],
  ifWaits: string,
): DemoJob => ({ title, customerTitle, hours, parts, ifWaits });

export const DEMO_JOBS: Readonly<Record<string, DemoJob>> = {
  "intake-air-leak": job(
    "Reseal the intake manifold",
    "New seal where the intake meets the engine",
    2.4,
    [
      ["Manifold gasket set", "MG-2410", 4280, 6420],
      ["Injector seal", "IS-118", 400, 680, 4],
    ],
    "It will keep shaking at a standstill and may stall; unburnt fuel can ruin the catalytic converter within months.",
  ),
  "crankcase-vent-fault": job(
    "Renew the crankcase vent valve",
    "New breather valve and hose",
    0.8,
    [
      ["Vent valve", "CV-330", 1900, 2850],
      ["Vent hose, formed", "CV-331", 1450, 2180],
    ],
    "The idle stays unsteady and oil is drawn into the intake.",
  ),
  "brake-booster-leak": job(
    "Renew the brake booster",
    "New brake booster",
    2.1,
    [["Brake booster", "BB-702", 16800, 23520]],
    "Braking needs more and more force. This concerns safety.",
  ),
  "air-duct-leak": job(
    "Renew the intake duct",
    "New air duct",
    0.7,
    [["Intake duct", "ID-540", 5200, 7540]],
    "It keeps losing strength and the engine runs on too little fuel.",
  ),
  "maf-under-reads": job(
    "Renew the air-flow meter",
    "New sensor for the incoming air",
    0.4,
    [["Air-flow meter", "AF-900", 11200, 15680]],
    "The engine keeps running lean under load, which is hard on it.",
  ),
  "fuel-pump-weak": job(
    "Renew the fuel pump",
    "New fuel pump",
    1.9,
    [["Fuel pump module", "FP-611", 14600, 20440]],
    "It will lose strength more often and can stop on the road.",
  ),
  "fuel-check-valve-leaking": job(
    "Renew the pump module",
    "New fuel pump unit that holds its pressure",
    1.9,
    [["Fuel pump module", "FP-612", 15200, 21280]],
    "Starting takes longer every month and wears the starter.",
  ),
  "fuel-pressure-high": job(
    "Renew the pressure regulator",
    "New fuel pressure regulator",
    0.6,
    [["Pressure regulator", "PR-204", 3900, 5850]],
    "It burns far too much fuel and ruins the catalytic converter.",
  ),
  "injector-leaking": job(
    "Renew injector and seals",
    "New injector for the cylinder that gets too much fuel",
    1.3,
    [
      ["Injector", "IN-420", 6800, 9860],
      ["Seal kit", "IN-421", 900, 1530],
    ],
    "Fuel washes the oil off the cylinder and wears it.",
  ),
  "injector-restricted": job(
    "Clean and flow the injectors",
    "Injectors cleaned and measured",
    1.6,
    [["Seal kit", "IN-421", 900, 1530, 4]],
    "The weak cylinder keeps shaking the engine.",
  ),
  "purge-valve-stuck-open": job(
    "Renew the purge valve",
    "New valve for the fuel vapours",
    0.5,
    [["Purge valve", "PV-118", 3300, 4950]],
    "Starting after filling up stays hard and the light stays on.",
  ),
  "o2-sensor-slow": job(
    "Renew the front O2 sensor",
    "New exhaust sensor",
    0.6,
    [["Front O2 sensor", "OX-310", 7400, 10730]],
    "The mixture keeps swinging; fuel use and emissions stay high.",
  ),
  "o2-sensor-reads-rich": job(
    "Renew the front O2 sensor",
    "New exhaust sensor",
    0.6,
    [["Front O2 sensor", "OX-310", 7400, 10730]],
    "The engine runs on too little fuel and hesitates.",
  ),
  "o2-heater-fault": job(
    "Renew the front O2 sensor",
    "New exhaust sensor",
    0.6,
    [["Front O2 sensor", "OX-312", 7900, 11450]],
    "The light stays on and it uses more fuel when cold.",
  ),
  "ect-reads-cold": job(
    "Renew the coolant sensor",
    "New coolant temperature sensor",
    0.4,
    [["Coolant sensor", "CT-101", 1400, 2240]],
    "It keeps getting too much fuel when warm.",
  ),
  "thermostat-stuck-open": job(
    "Renew the thermostat",
    "New thermostat",
    1.1,
    [
      ["Thermostat with housing", "TH-208", 3600, 5400],
      ["Coolant, litre", "CL-1", 550, 880, 4],
    ],
    "The engine never warms through and wears faster.",
  ),
  "ignition-coil-failing": job(
    "Renew the ignition coil",
    "New ignition coil",
    0.5,
    [["Ignition coil", "IC-510", 4700, 7050]],
    "The missing cylinder sends fuel into the catalytic converter, which can overheat.",
  ),
  "throttle-deposits": job(
    "Clean the throttle and relearn",
    "Throttle cleaned and set again",
    0.8,
    [["Throttle gasket", "TG-77", 650, 1110]],
    "It may stall when you roll to a stop.",
  ),
  "egr-stuck-open": job(
    "Renew the exhaust return valve",
    "New exhaust return valve",
    1.0,
    [
      ["EGR valve", "EG-404", 9200, 12880],
      ["EGR gasket", "EG-405", 480, 820],
    ],
    "It keeps stalling at a standstill.",
  ),
  "exhaust-restricted": job(
    "Renew the front catalyst",
    "New catalytic converter",
    1.8,
    [
      ["Catalyst, front", "CA-220", 38500, 50050],
      ["Gasket set", "CA-221", 1500, 2400],
    ],
    "Strength keeps falling, and the heat can damage the engine.",
  ),
  "catalyst-degraded": job(
    "Renew the catalyst, bank 2",
    "New catalytic converter",
    1.6,
    [
      ["Catalyst, bank 2", "CA-222", 36800, 47840],
      ["Gasket set", "CA-221", 1500, 2400],
    ],
    "It will not pass its emissions test.",
  ),
  "low-compression": job(
    "Overhaul one cylinder",
    "Repair of the cylinder that no longer seals",
    14.5,
    [
      ["Ring set", "RS-305", 5400, 7830],
      ["Head gasket set", "HG-306", 9800, 13720],
    ],
    "Oil use and shaking get worse until it will not pass a test.",
  ),
  "idle-mixture-misset": job(
    "Set the idle mixture",
    "Idle mixture set with a gas analyser",
    0.6,
    [],
    "It keeps shaking and may stall.",
  ),
  "crank-sensor-fault": job(
    "Renew the crank sensor",
    "New crankshaft sensor",
    0.9,
    [["Crank sensor", "CS-140", 3100, 4650]],
    "It can stop without warning. This concerns safety.",
  ),
  "air-filter-restricted": job(
    "Renew the air filter",
    "New air filter",
    0.2,
    [["Air filter", "AF-12", 1250, 2130]],
    "It stays slow and uses more fuel.",
  ),
  "float-level-high": job(
    "Set the float and renew the needle",
    "Carburettor float set, new needle",
    1.2,
    [["Needle and seat", "NS-09", 1700, 2720]],
    "It keeps flooding and smells of fuel.",
  ),
  "fuel-vapour-lock": job(
    "Shield and reroute the fuel line",
    "Fuel line moved away from the heat",
    1.1,
    [["Heat shield sleeve", "HS-30", 1900, 3040]],
    "It will strand you in traffic on hot days.",
  ),
  "timing-retarded": job("Set the base timing", "Ignition timing set", 0.7, [], "It runs hot and without strength."),
  "map-reads-high": job(
    "Renew the manifold pressure sensor",
    "New pressure sensor at the intake",
    0.4,
    [["Pressure sensor", "MP-210", 4100, 6150]],
    "It keeps getting too much fuel and ruins the catalytic converter.",
  ),
  "knock-sensor-fault": job(
    "Renew the knock sensor",
    "New knock sensor",
    1.8,
    [["Knock sensor", "KS-61", 3800, 5700]],
    "The engine holds its timing back and pulls less.",
  ),
};

export const GENERAL_JOB = job(
  "Repair as found",
  "Repair of what we found",
  1.2,
  [["Repair kit", "RK-1", 2600, 3900]],
  "The fault stays and may get worse.",
);

export const EXTRA_JOBS: readonly DemoJob[] = [
  job(
    "Spark plugs, full set",
    "New spark plugs",
    0.6,
    [["Spark plug", "SP-4", 1181, 1890, 4]],
    "Nothing sudden. Fuel use creeps up and cold starts get slower over the next year.",
  ),
  job("Air filter", "New air filter", 0.2, [["Air filter", "AF-12", 1250, 2130]], "Nothing sudden."),
];

let serial = 0;
function nextLineId(): string {
  serial += 1;
  return `ln_${serial}`;
}

export function linesOf(demo: DemoJob, rate: { id: string; perHourMinor: number }): QuoteLineDraft[] {
  const labour: QuoteLineDraft = {
    id: nextLineId(),
    kind: "labour",
    description: demo.title,
    quantityMilli: Math.round(demo.hours * 1000),
    unitPriceMinor: rate.perHourMinor,
    rateId: rate.id,
    costMinor: null,
    partNumber: null,
    condition: null,
  };
  return [
    labour,
    ...demo.parts.map(
      ([description, partNumber, costMinor, unitPriceMinor, quantity = 1]): QuoteLineDraft => ({
        id: nextLineId(),
        kind: "part",
        description,
        quantityMilli: quantity * 1000,
        unitPriceMinor,
        costMinor,
        partNumber,
        condition: "new",
        rateId: null,
      }),
    ),
  ];
}
