import { CAUSE_IDS, type CauseId } from "../vocabulary";
import { AIR } from "./air";
import { CARBURETTOR } from "./carburettor";
import { ELECTRICAL } from "./electrical";
import { FUEL } from "./fuel";
import { IGNITION } from "./ignition";
import { MECHANICAL } from "./mechanical";
import { SENSORS } from "./sensors";
import type { CauseKnowledge } from "./shape";

/** Every cause and what it predicts. To read about one cause, open the file of its group. */
export const KNOWLEDGE = {
  ...AIR,
  ...FUEL,
  ...SENSORS,
  ...IGNITION,
  ...MECHANICAL,
  ...ELECTRICAL,
  ...CARBURETTOR,
} as Record<CauseId, CauseKnowledge>;

export const missingKnowledge = (): CauseId[] => CAUSE_IDS.filter((id) => !KNOWLEDGE[id]);
