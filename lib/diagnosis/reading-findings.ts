import { airFlow } from "./findings/air-flow";
import { camPosition } from "./findings/cam-position";
import { cylinders } from "./findings/cylinders";
import { electrics } from "./findings/electrics";
import { exhaustGas } from "./findings/exhaust-gas";
import { frontSensors } from "./findings/front-sensors";
import { fuelPressure } from "./findings/fuel-pressure";
import { fullLoad } from "./findings/full-load";
import { heat } from "./findings/heat";
import { idle } from "./findings/idle";
import { pressures } from "./findings/pressures";
import { rail } from "./findings/rail";
import { rearAgainstTrim, rearSensors } from "./findings/rear-sensors";
import { FindingSheet } from "./findings/sheet";
import { spark } from "./findings/spark";
import type { Observation } from "./observation";
import type { Readings } from "./readings";

/** In this order: later subjects look at what earlier ones wrote. */
const SUBJECTS = [
  idle,
  pressures,
  airFlow,
  frontSensors,
  rearSensors,
  exhaustGas,
  rearAgainstTrim,
  cylinders,
  fuelPressure,
  rail,
  heat,
  fullLoad,
  electrics,
  spark,
  camPosition,
];

/** Everything the readings say, apart from trims. */
export function readingFindings(readings: Readings): Observation[] {
  const sheet = new FindingSheet(readings);
  for (const subject of SUBJECTS) subject(sheet);
  return sheet.found;
}
