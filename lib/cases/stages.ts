export const STAGES = [
  "intake",
  "testing",
  "quoting",
  "waiting",
  "repair",
  "proof",
  "closed",
  "parked",
  "released",
] as const;
export type Stage = (typeof STAGES)[number];
/** The path in order; parking and release lie beside it. */
export const PATH = ["intake", "testing", "quoting", "waiting", "repair", "proof", "closed"] as const;
export type PathStage = (typeof PATH)[number];

export const STAGE_LABELS: Record<Stage, string> = {
  intake: "Intake",
  testing: "Testing",
  quoting: "Quoting",
  waiting: "Asked",
  repair: "Repair",
  proof: "Proof",
  closed: "Closed",
  parked: "On hold",
  released: "Left unrepaired",
};

export const PARTIES = ["counter", "technician", "customer", "parts", "bay", "owner", "nobody"] as const;
export type Party = (typeof PARTIES)[number];

export const PARK_REASONS = ["parts", "customer", "bay"] as const;
export type ParkReason = (typeof PARK_REASONS)[number];

export const isOver = (stage: Stage) => stage === "closed" || stage === "released";
/** Readings, tests and marks may change while the case is open; a closed case is frozen. */
export const isOpen = (stage: Stage) => !isOver(stage);

/** What a case holds, as far as its next stage depends on it. */
export interface CaseFacts {
  stage: Stage;
  parkedFrom: PathStage | null;
  hasVehicle: boolean;
  complaintCount: number;
  odometerKnown: boolean;
  diagnosisCeilingMinor: number | null;
  technicianName: string | null;
  marks: { causeId: string; mark: "proven" | "suspected" }[];
  /** The newest sent revision that still stands. */
  standingRevision: { number: number; answered: boolean; yesCount: number } | null;
  workJobs: { title: string; state: "approved" | "done" | "struck"; partsOpen: number; minutesWorked: number }[];
  openClocks: { personName: string }[];
  afterSampleCount: number;
  proof: { verdict: "passes" | "still-inside" | "fails" | "incomplete"; sentence: string };
  waiver: boolean;
  invoiceIssued: boolean;
}

export interface Demand {
  met: boolean;
  text: string;
  /** Who has it in hand when it is not met. */
  who: Party;
}

export interface Gate {
  next: PathStage;
  label: string;
  open: boolean;
  demands: Demand[];
}

const GATE_LABELS: Record<PathStage, string> = {
  intake: "Take it in",
  testing: "Start testing",
  quoting: "Hand over for the quote",
  waiting: "Send the quote",
  repair: "Start the repair",
  proof: "Go to proof",
  closed: "Close and invoice",
};

/** What must be there before a case may enter `next`. The server refuses with the unmet ones; the screen lists them all. */
export function demandsFor(next: PathStage, facts: CaseFacts): Demand[] {
  switch (next) {
    case "intake":
      return [];
    case "testing":
      return [
        { met: facts.hasVehicle, text: "The vehicle", who: "counter" },
        { met: facts.complaintCount > 0, text: "The complaint", who: "counter" },
        { met: facts.odometerKnown, text: "The odometer, or why it can't be read", who: "counter" },
        {
          met: facts.diagnosisCeilingMinor !== null,
          text: "A recorded yes to the diagnosis, with its ceiling",
          who: "counter",
        },
      ];
    case "quoting":
      return [
        { met: facts.marks.length > 0, text: "A cause marked proven, or suspected with a reason", who: "technician" },
      ];
    case "waiting":
      return [{ met: facts.standingRevision !== null, text: "A sent quote", who: "counter" }];
    case "repair":
      return [
        {
          met: (facts.standingRevision?.yesCount ?? 0) > 0 || facts.workJobs.some((job) => job.state !== "struck"),
          text: "A yes to at least one job",
          who: "customer",
        },
      ];
    case "proof": {
      const open = facts.workJobs.filter((job) => job.state === "approved");
      const untimed = facts.workJobs.filter((job) => job.state === "done" && job.minutesWorked === 0);
      const parts = facts.workJobs.filter((job) => job.state === "done" && job.partsOpen > 0);
      return [
        {
          met: open.length === 0,
          text:
            open.length === 0
              ? "Every agreed job done or struck"
              : `Done or struck with a reason: ${open.map((job) => job.title).join(", ")}`,
          who: "technician",
        },
        {
          // a job that is still open has neither its time nor its parts yet
          met: open.length === 0 && untimed.length === 0,
          text: untimed.length === 0 ? "Time recorded" : `Time on: ${untimed.map((job) => job.title).join(", ")}`,
          who: "technician",
        },
        {
          met: open.length === 0 && parts.length === 0,
          text:
            parts.length === 0 ? "Parts recorded" : `Parts recorded for: ${parts.map((job) => job.title).join(", ")}`,
          who: "technician",
        },
        {
          met: facts.openClocks.length === 0,
          text:
            facts.openClocks.length === 0
              ? "Clocks off"
              : `Clock off: ${facts.openClocks.map((clock) => clock.personName).join(", ")}`,
          who: "technician",
        },
      ];
    }
    case "closed":
      return [
        {
          met: facts.proof.verdict === "passes" || facts.waiver,
          text: facts.waiver ? "Proof waived by the owner" : facts.proof.sentence,
          who: facts.proof.verdict === "fails" ? "owner" : "technician",
        },
      ];
  }
}

export function nextStage(stage: Stage): PathStage | null {
  const at = PATH.indexOf(stage as PathStage);
  return at < 0 || at === PATH.length - 1 ? null : (PATH[at + 1] ?? null);
}

/** The gate a case stands before, or null where the path has ended or the case is on hold. */
export function gateOf(facts: CaseFacts): Gate | null {
  const next = nextStage(facts.stage);
  if (!next) return null;
  const demands = demandsFor(next, facts);
  return { next, label: GATE_LABELS[next], open: demands.every((demand) => demand.met), demands };
}

/** Moves back that lose nothing: a proof that fails or a doubt at the counter sends the case to the bay again. */
export const BACK: Partial<Record<PathStage, PathStage[]>> = {
  quoting: ["testing"],
  waiting: ["quoting", "testing"],
  repair: ["testing", "quoting"],
  proof: ["repair", "testing"],
};

export const mayGoBack = (from: Stage, to: Stage) => (BACK[from as PathStage] ?? []).includes(to as PathStage);

/** On whom the case waits, and for what: shown in every list and in the strip. */
export function waitingOn(facts: CaseFacts, parkedFor: ParkReason | null = null): { party: Party; for: string } {
  switch (facts.stage) {
    case "intake": {
      const missing = demandsFor("testing", facts).find((demand) => !demand.met);
      if (missing)
        return { party: "counter", for: `for ${missing.text.charAt(0).toLowerCase()}${missing.text.slice(1)}` };
      return facts.technicianName
        ? { party: "technician", for: "to start testing" }
        : { party: "counter", for: "to give it to a technician" };
    }
    case "testing":
      return { party: "technician", for: facts.marks.length > 0 ? "to hand it over" : "for the next test" };
    case "quoting":
      return { party: "counter", for: "to send the quote" };
    case "waiting": {
      const standing = facts.standingRevision;
      if (!standing) return { party: "counter", for: "to send the quote again" };
      if (!standing.answered) return { party: "customer", for: `to answer revision ${standing.number}` };
      return {
        party: "counter",
        for: standing.yesCount > 0 ? "to start the repair" : "to revise it or let the vehicle go",
      };
    }
    case "repair": {
      const open = facts.workJobs.filter((job) => job.state === "approved").length;
      return {
        party: "technician",
        for: open > 0 ? `to finish ${open === 1 ? "one job" : `${open} jobs`}` : "to go to proof",
      };
    }
    case "proof":
      if (facts.waiver || facts.proof.verdict === "passes") return { party: "counter", for: "to close and invoice" };
      return {
        party: "technician",
        for: facts.afterSampleCount === 0 ? "for the after readings" : "to make the proof pass",
      };
    case "parked":
      if (parkedFor === "customer") return { party: "customer", for: "to come back to us" };
      if (parkedFor === "bay") return { party: "bay", for: "to come free" };
      return { party: "parts", for: "to arrive" };
    case "closed":
    case "released":
      return { party: "nobody", for: "" };
  }
}
