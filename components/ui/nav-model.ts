import type { PathStage } from "@/lib/cases/stages";
import type { Density } from "./device";

export interface NavItem {
  href: string;
  label: string;
  current?: boolean;
}

export interface PersonView {
  name: string;
  /** "technician", "service writer", "owner": in words. */
  role: string;
}

export { PATH as STAGES, STAGE_LABELS as STAGE_WORDS } from "@/lib/cases/stages";
export type StageId = PathStage;

/** Where a case stands. `held` is a case on hold (it remembers the stage it came from). */
export interface StageView {
  now: StageId;
  /** Time in the stage, in words: "2 h 26". */
  since: string;
  /** The person or party waited on, and what for: "Bram Ferrule", "for the next test". */
  waitingOn: string;
  waitingFor: string;
  /** Times spent in the stages passed, in words. */
  passed: Partial<Record<StageId, string>>;
  held?: boolean;
  released?: boolean;
}

/** What every page of a case shows at its head. */
export interface StripView {
  number: string;
  vehicle: string;
  /** The customer's own words. */
  complaint: string;
  /** "Came back from 2404", inverse on the first day. */
  comeback?: { label: string; href: string; isFresh: boolean };
  facts: readonly { label: string; value: string; note?: string; alarm?: boolean }[];
}

export interface PartLink {
  href: string;
  label: string;
  /** One line that tells its state: "revision 1, not sent". */
  state: string;
  current?: boolean;
}

export type { Density };
