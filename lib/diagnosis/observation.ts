import type { CauseFamily } from "./causes";
import type { SignId } from "./knowledge/base-rates";
import type { CodeFamily } from "./knowledge/code-families";
import type { Circumstance, History, TestId } from "./vocabulary";

/**
 * Evidence that says much the same. Inside a theme a recorded test speaks for itself and what merely repeats it
 * (a code, a sign of the readings) counts half, so nothing is counted twice.
 */
export type Theme =
  | "mixture"
  | "front-o2"
  | "misfire"
  | "fuel-supply"
  | "coolant"
  | "boost"
  | "vacuum"
  | "catalyst"
  | "rail"
  | "map"
  | "throttle"
  | "idle"
  | "egr"
  | "crank"
  | "cam"
  | "evap"
  | "electrical"
  | "compression"
  | null;

interface Common {
  /** The finding's id. */
  id: string;
  statement: string;
  from: string[];
  abnormal: boolean;
  family: CauseFamily | null;
  theme: Theme;
  bank?: number;
  cylinder?: number;
}

export type Observation =
  | (Common & { kind: "test"; test: TestId; states: string[]; recorded: boolean })
  | (Common & { kind: "sign"; sign: SignId; states: string[] })
  | (Common & { kind: "code"; codeFamily: CodeFamily; present: true })
  | (Common & { kind: "codes-absent"; families: CodeFamily[] })
  | (Common & { kind: "circumstance"; circumstance: Circumstance })
  | (Common & { kind: "history"; history: History })
  | (Common & { kind: "trims"; trims: TrimReading[] });

export interface TrimReading {
  bank: 1 | 2;
  /** Index into the operating points: idling, raised idle, cruising, accelerating. */
  point: number;
  totalPct: number;
}
