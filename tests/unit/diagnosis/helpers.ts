import { readdirSync, readFileSync } from "node:fs";
import { type CaseFile, parseCaseFile } from "@/lib/diagnosis/case-file";

export interface FixtureCase {
  name: string;
  title: string;
  case: unknown;
  expected: { top: string[]; topThree: string[]; nextTest?: string[]; noneAbove?: number };
}

export function fixtureCases(set: "examples" | "tuning" | "holdout"): FixtureCase[] {
  const folder = new URL(`../../../fixtures/cases/${set}/`, import.meta.url);
  return readdirSync(folder)
    .filter((f) => f.endsWith(".json"))
    .sort()
    .map((f) => ({ name: f.replace(".json", ""), ...JSON.parse(readFileSync(new URL(f, folder), "utf8")) }));
}

export function caseOf(input: unknown): CaseFile {
  const parsed = parseCaseFile(input);
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.errors));
  return parsed.caseFile;
}

export const PORT_MAF = {
  modelYear: 2006,
  odometerKm: 150000,
  displacementL: 2,
  cylinders: 4,
  banks: 1,
  fuelSystem: "port",
  airMetering: "maf",
  aspiration: "natural",
  ignition: "coil-on-plug",
  o2Sensing: "switching",
  fuel: "E10",
} as const;
export const CARBURETTED = {
  modelYear: 1979,
  odometerKm: 90000,
  displacementL: 1.6,
  cylinders: 4,
  banks: 1,
  fuelSystem: "carburetted",
  airMetering: "none",
  aspiration: "natural",
  ignition: "points",
  o2Sensing: "none",
  fuel: "E5",
} as const;
export const BOOSTED_DIRECT = {
  modelYear: 2014,
  odometerKm: 120000,
  displacementL: 1.6,
  cylinders: 4,
  banks: 1,
  fuelSystem: "direct",
  airMetering: "maf+map",
  aspiration: "boosted",
  ignition: "coil-on-plug",
  o2Sensing: "wide-range",
  fuel: "E10",
} as const;
