import {
  celsiusToFahrenheit,
  fahrenheitToCelsius,
  inHgToKpa,
  kmToMiles,
  kpaToInHg,
  kpaToPsi,
  milesToKm,
  psiToKpa,
} from "@/lib/engine/units";
import type { ParameterId } from "@/lib/obd/parameters";
import { PARAMETERS } from "@/lib/obd/parameters";

/** What the shop types and reads. Inside, everything stays in the units of the parameter table. */
export interface UnitPrefs {
  pressure: "kPa" | "psi" | "inHg";
  temperature: "C" | "F";
  distance: "km" | "mi";
}
export const METRIC: UnitPrefs = { pressure: "kPa", temperature: "C", distance: "km" };

export interface ShownUnit {
  /** As it is written beside the number. */
  unit: string;
  decimals: number;
  toShown: (internal: number) => number;
  toInternal: (shown: number) => number;
}

const same = (n: number) => n;
/** A shop on psi reads these by a vacuum gauge all the same. */
const VACUUM_LIKE = new Set<ParameterId>(["MAP", "BARO", "manifoldVacuumKPa", "boostCommandedKPa"]);

export function shownUnit(parameter: ParameterId, prefs: UnitPrefs): ShownUnit {
  const { unit, decimals } = PARAMETERS[parameter];
  if (unit === "kPa" && prefs.pressure !== "kPa") {
    return prefs.pressure === "inHg" || VACUUM_LIKE.has(parameter)
      ? { unit: "inHg", decimals: 1, toShown: kpaToInHg, toInternal: inHgToKpa }
      : { unit: "psi", decimals: 1, toShown: kpaToPsi, toInternal: psiToKpa };
  }
  if (unit === "°C" && prefs.temperature === "F") {
    return { unit: "°F", decimals: 0, toShown: celsiusToFahrenheit, toInternal: fahrenheitToCelsius };
  }
  if ((unit === "km/h" || unit === "km") && prefs.distance === "mi") {
    return { unit: unit === "km" ? "mi" : "mph", decimals, toShown: kmToMiles, toInternal: milesToKm };
  }
  return { unit: unit === "° before TDC" ? "° BTDC" : unit, decimals, toShown: same, toInternal: same };
}

export function kmShown(km: number, prefs: UnitPrefs): number {
  return Math.round(prefs.distance === "mi" ? kmToMiles(km) : km);
}

export function kmInternal(shown: number, prefs: UnitPrefs): number {
  return Math.round(prefs.distance === "mi" ? milesToKm(shown) : shown);
}
