/** Unit conversions. Factors: NIST SP 811 and Handbook 44. Any finite number is accepted; NaN stays NaN. */

export const KPA_PER_PSI = 6.894757293168;
export const KPA_PER_INHG = 3.386389;
export const KM_PER_MILE = 1.609344;
export const L_PER_US_GALLON = 3.785411784;
export const L_PER_UK_GALLON = 4.54609;
export const GPS_PER_LB_MIN = 453.59237 / 60;

export const kpaToPsi = (kpa: number) => kpa / KPA_PER_PSI;
export const psiToKpa = (psi: number) => psi * KPA_PER_PSI;
export const kpaToInHg = (kpa: number) => kpa / KPA_PER_INHG;
export const inHgToKpa = (inHg: number) => inHg * KPA_PER_INHG;
export const barToKpa = (bar: number) => bar * 100;
export const kpaToBar = (kpa: number) => kpa / 100;
export const celsiusToFahrenheit = (c: number) => c * 1.8 + 32;
export const fahrenheitToCelsius = (f: number) => (f - 32) / 1.8;
export const kmToMiles = (km: number) => km / KM_PER_MILE;
export const milesToKm = (miles: number) => miles * KM_PER_MILE;
export const litresToUsGallons = (l: number) => l / L_PER_US_GALLON;
export const usGallonsToLitres = (gal: number) => gal * L_PER_US_GALLON;
export const litresToUkGallons = (l: number) => l / L_PER_UK_GALLON;
export const ukGallonsToLitres = (gal: number) => gal * L_PER_UK_GALLON;
export const gpsToLbMin = (gps: number) => gps / GPS_PER_LB_MIN;
export const lbMinToGps = (lbMin: number) => lbMin * GPS_PER_LB_MIN;
/** Litres per 100 km ↔ miles per US gallon; the same function both ways. Infinity at 0. */
export const mpgUsFromLitresPer100Km = (l: number) => (100 * L_PER_US_GALLON) / KM_PER_MILE / l;
export const litresPer100KmFromMpgUs = mpgUsFromLitresPer100Km;
export const mpgUkFromLitresPer100Km = (l: number) => (100 * L_PER_UK_GALLON) / KM_PER_MILE / l;
export const litresPer100KmFromMpgUk = mpgUkFromLitresPer100Km;
/** Pounds of fuel per hour → cubic centimetres per minute at a density in g/cc. */
export const lbHourToCcMin = (lbPerHour: number, densityGPerCc: number) => (lbPerHour * 453.59237) / 60 / densityGPerCc;
