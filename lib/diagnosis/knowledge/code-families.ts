/**
 * Codes that say the same thing, however the maker numbers them. Ranges from SAE J2012 / ISO 15031-6. `base` is the
 * percent of unrelated cases that store one.
 */
export const CODE_FAMILIES = {
  lean: { base: 5, match: /^P(0171|0174|2187|2189|2177|2179|2191|2193|2096|2098)$/, says: "mixture lean" },
  rich: { base: 3, match: /^P(0172|0175|2188|2190|2178|2180|2192|2194|2097|2099)$/, says: "mixture rich" },
  "trim-fault": { base: 1, match: /^P(0170|0173)$/, says: "mixture control at fault" },
  "maf-range": { base: 1, match: /^P(0100|0101|0104|010[A-F])$/, says: "air-flow meter signal implausible" },
  "maf-low": { base: 0.8, match: /^P0102$/, says: "air-flow meter signal low" },
  "maf-high": { base: 0.6, match: /^P0103$/, says: "air-flow meter signal high" },
  "map-range": {
    base: 1,
    match: /^P(0105|0106|0109|0068|0069|2227|2228|2229)$/,
    says: "manifold pressure implausible",
  },
  "map-low": { base: 0.7, match: /^P0107$/, says: "manifold pressure signal low" },
  "map-high": { base: 0.7, match: /^P0108$/, says: "manifold pressure signal high" },
  iat: {
    base: 0.8,
    match: /^P(0095|0096|0097|0098|0099|0110|0111|0112|0113|0114|0127)$/,
    says: "intake air temperature signal",
  },
  "ect-range": { base: 0.8, match: /^P(0115|0116|0119)$/, says: "coolant temperature implausible" },
  "ect-hot": { base: 0.5, match: /^P0117$/, says: "coolant signal low voltage, reads hot" },
  "ect-cold": { base: 0.5, match: /^P0118$/, says: "coolant signal high voltage, reads cold" },
  "coolant-cool": { base: 1.5, match: /^P(0125|0126|0128)$/, says: "coolant stays too cool" },
  overheat: { base: 0.5, match: /^P(0217|0118F|0298)$/, says: "engine too hot" },
  "throttle-signal": {
    base: 1,
    match: /^P(012[0-4]|022[0-9]|212[0-9]|213[0-9]|2140)$/,
    says: "throttle or pedal signal",
  },
  "throttle-actuator": {
    base: 0.7,
    match: /^P(210[0-9]|211[0-9]|0638|0639|2176|1516)$/,
    says: "throttle does not follow",
  },
  "o2-front-low": { base: 1, match: /^P(0131|0151|2195|2197|2A01)$/, says: "front O2 sensor stuck lean" },
  "o2-front-high": { base: 1, match: /^P(0132|0152|2196|2198)$/, says: "front O2 sensor stuck rich" },
  "o2-front-slow": { base: 1, match: /^P(0133|0153|014[C-F]|015[A-D]|2A00|2A03)$/, says: "front O2 sensor slow" },
  "o2-front-dead": {
    base: 1,
    match: /^P(0130|0134|0150|0154|223[1-9]|224[0-9]|225[0-9])$/,
    says: "front O2 sensor circuit or no activity",
  },
  "o2-heater": { base: 1.2, match: /^P(0135|0141|0155|0161|003[0-9]|005[0-9]|006[0-4])$/, says: "O2 sensor heater" },
  "o2-rear": { base: 1.2, match: /^P(013[6-9]|0140|013[A-F]|014[AB]|015[6-9]|0160|227[0-9])$/, says: "rear O2 sensor" },
  catalyst: { base: 2.5, match: /^P(042[0-4]|043[0-4])$/, says: "catalyst below efficiency" },
  "egr-low": { base: 0.8, match: /^P(0401|0404|040[AB])$/, says: "EGR flow too low" },
  "egr-high": { base: 0.8, match: /^P0402$/, says: "EGR flow too high" },
  egr: { base: 0.8, match: /^P(0400|0403|040[5-9]|048[6-9])$/, says: "EGR circuit or flow" },
  "secondary-air": { base: 0.6, match: /^P(041[0-9]|0491|0492|244[0-9])$/, says: "secondary air" },
  "evap-leak": { base: 2, match: /^P(0440|0442|0455|0456|0457|0450|0451|0452|0453|0454)$/, says: "vapour system leak" },
  purge: { base: 1, match: /^P(0441|0443|0444|0445|0458|0459|0496|0497)$/, says: "purge flow" },
  "evap-vent": { base: 0.7, match: /^P(044[6-9]|0498|0499)$/, says: "vapour system vent" },
  "boost-low": { base: 0.8, match: /^P(0299|2263)$/, says: "boost too low" },
  "boost-high": { base: 0.4, match: /^P0234$/, says: "boost too high" },
  boost: {
    base: 0.5,
    match: /^P(023[5-9]|024[0-9]|0033|0034|0035|0045|0046|256[2-5]|226[1-2])$/,
    says: "boost control or sensor",
  },
  "pump-circuit": { base: 0.5, match: /^P(023[0-3]|025[A-D]|062[7-9]|2632|2635)$/, says: "fuel pump circuit" },
  "fuel-pressure-low": { base: 0.6, match: /^P(0087|0093|228[AC]|2291|2293)$/, says: "fuel pressure too low" },
  "fuel-pressure-high": { base: 0.4, match: /^P(0088|228[BD])$/, says: "fuel pressure too high" },
  "fuel-pressure-sensor": { base: 0.5, match: /^P(019[0-4]|018[A-E])$/, says: "fuel pressure sensor" },
  "fuel-regulator": {
    base: 0.4,
    match: /^P(000[1-4]|008[9A-F]|009[0-2]|2294|2295|2296)$/,
    says: "fuel pressure regulator",
  },
  "injector-circuit": {
    base: 0.8,
    match:
      /^P(020[0-9]|021[0-2]|026[1-2]|026[4-5]|0267|0268|027[0-1]|027[3-4]|027[6-7]|0279|0280|028[2-3]|214[6-9]|21[5-6][0-9])$/,
    says: "injector circuit",
  },
  "injector-flow": {
    base: 0.6,
    match: /^P(0263|0266|0269|0272|0275|0278|0281|0284|029[A-F]|02A[0-9A-F]|02B[0-9A-F]|219[A-F]|02C[C-F]|02D[0-9])$/,
    says: "cylinder mixture or injector balance",
  },
  alcohol: { base: 0.3, match: /^P(017[6-9]|0169|2269)$/, says: "fuel composition" },
  knock: { base: 0.7, match: /^P(032[4-9]|033[0-4])$/, says: "knock sensor" },
  crank: { base: 0.8, match: /^P(033[5-9]|038[5-9]|032[0-3]|0315)$/, says: "crankshaft signal" },
  cam: { base: 0.8, match: /^P(034[0-9]|036[5-9]|039[0-4])$/, says: "camshaft signal" },
  "cam-crank": { base: 0.6, match: /^P001[6-9]$/, says: "cam and crank disagree" },
  "cam-phaser": { base: 0.8, match: /^P(001[0-5]|002[0-9]|208[89]|209[0-5]|052[1-4]|000[A-D])$/, says: "cam phaser" },
  coil: { base: 0.7, match: /^P(035[0-9]|036[0-2]|230[0-9]|231[0-9])$/, says: "ignition coil circuit" },
  "idle-high": { base: 0.8, match: /^P0507$/, says: "idle higher than expected" },
  "idle-low": { base: 0.6, match: /^P0506$/, says: "idle lower than expected" },
  idle: { base: 0.6, match: /^P(0505|0508|0509|050[A-F]|0511|0518|0519)$/, says: "idle control" },
  voltage: { base: 0.8, match: /^P(056[0-3]|0615|0616|0617|0620|0621|0622)$/, says: "system voltage" },
  "control-unit": { base: 0.4, match: /^P(060[0-9A-F]|061[0-9A-F]|U0100)$/, says: "control unit" },
  "reference-voltage": { base: 0.4, match: /^P(064[1-3]|065[1-3]|069[7-9])$/, says: "sensor reference voltage" },
  immobiliser: { base: 0.3, match: /^(P0513|P0633|P161[0-9]|B1600|U0167|U0426)$/, says: "immobiliser" },
  "low-tank": { base: 0.3, match: /^P(0313|046[0-4]|1250)$/, says: "fuel level" },
  /** Present, they are read with the counters; what counts here is that none is stored. */
  misfire: { base: 9, match: /^P03(0\d|1[0-24])$/, says: "misfire" },
  network: { base: 0.6, match: /^U0/, says: "network" },
} as const satisfies Record<string, { base: number; match: RegExp; says: string }>;
export type CodeFamily = keyof typeof CODE_FAMILIES;

const FAMILY_IDS = Object.keys(CODE_FAMILIES) as CodeFamily[];

/** The family a code belongs to, or null for codes that say nothing here. */
export function codeFamily(code: string): CodeFamily | null {
  return FAMILY_IDS.find((id) => CODE_FAMILIES[id].match.test(code)) ?? null;
}

/** 0 for P0300, the cylinder for P0301 and up, null for other codes. */
export function misfireCylinder(code: string): number | null {
  const m = /^P03(0\d|1[0-2])$/.exec(code);
  return m ? Number(m[1]) : null;
}
