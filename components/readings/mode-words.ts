import type { Mode } from "@/lib/diagnosis/vocabulary";

/** Modes as column heads and tabs: short, since the sheet is narrow. */
export const MODE_WORDS: Record<Mode, string> = {
  "key-on": "Key on",
  starting: "Starting",
  idling: "Idling",
  "raised-idle": "Raised idle",
  accelerating: "Accelerating",
  cruising: "Cruising",
  decelerating: "Decelerating",
};

export const LOOP_WORDS = {
  CL: "closed",
  OL: "open",
  "OL-Drive": "open, by load",
  "OL-Fault": "open, fault",
  "CL-Fault": "closed, fault",
} as const;
