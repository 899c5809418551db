import { describe, expect, it } from "vitest";
import { type CaseFacts, demandsFor, gateOf, mayGoBack, nextStage, PATH, waitingOn } from "@/lib/cases/stages";

/** A case that has everything; each test takes one thing away. */
const whole: CaseFacts = {
  stage: "intake",
  parkedFrom: null,
  hasVehicle: true,
  complaintCount: 1,
  odometerKnown: true,
  diagnosisCeilingMinor: 18_000,
  technicianName: "Bram Ferrule",
  marks: [{ causeId: "intake-air-leak", mark: "proven" }],
  standingRevision: { number: 1, answered: true, yesCount: 1 },
  workJobs: [{ title: "Reseal", state: "done", partsOpen: 0, minutesWorked: 40 }],
  openClocks: [],
  afterSampleCount: 1,
  proof: { verdict: "passes", sentence: "The after readings pass" },
  waiver: false,
  invoiceIssued: false,
};

const missing = (to: (typeof PATH)[number], change: Partial<CaseFacts>) =>
  demandsFor(to, { ...whole, ...change })
    .filter((demand) => !demand.met)
    .map((demand) => demand.text);

describe("what a stage demands before the next may begin", () => {
  it("lets a whole case through every gate, one after the other", () => {
    for (const to of PATH) expect(missing(to, {})).toEqual([]);
    expect(PATH.map((stage) => nextStage(stage))).toEqual([
      "testing",
      "quoting",
      "waiting",
      "repair",
      "proof",
      "closed",
      null,
    ]);
  });

  it.each([
    ["testing", { hasVehicle: false }, "The vehicle"],
    ["testing", { complaintCount: 0 }, "The complaint"],
    ["testing", { odometerKnown: false }, "The odometer, or why it can't be read"],
    ["testing", { diagnosisCeilingMinor: null }, "A recorded yes to the diagnosis, with its ceiling"],
    ["quoting", { marks: [] }, "A cause marked proven, or suspected with a reason"],
    ["waiting", { standingRevision: null }, "A sent quote"],
    [
      "repair",
      { standingRevision: { number: 1, answered: true, yesCount: 0 }, workJobs: [] },
      "A yes to at least one job",
    ],
    ["proof", { openClocks: [{ personName: "Dov Lantern" }] }, "Clock off: Dov Lantern"],
    ["closed", { proof: { verdict: "fails", sentence: "It fails" } }, "It fails"],
  ] as const)("refuses %s without what it needs", (to, change, text) => {
    expect(missing(to, change as unknown as Partial<CaseFacts>)).toEqual([text]);
  });

  it("ticks neither time nor parts while a job is still open", () => {
    const open = { workJobs: [{ title: "Reseal", state: "approved" as const, partsOpen: 1, minutesWorked: 0 }] };
    expect(demandsFor("proof", { ...whole, ...open }).map((demand) => demand.met)).toEqual([false, false, false, true]);
  });

  it("closes on the owner's waiver where the proof fails", () => {
    expect(missing("closed", { proof: { verdict: "fails", sentence: "It fails" }, waiver: true })).toEqual([]);
  });

  it("stands before no gate when on hold, closed or let go", () => {
    for (const stage of ["parked", "closed", "released"] as const) expect(gateOf({ ...whole, stage })).toBeNull();
  });

  it("goes back only where nothing is lost", () => {
    expect(mayGoBack("proof", "testing")).toBe(true);
    expect(mayGoBack("closed", "testing")).toBe(false);
    expect(mayGoBack("testing", "intake")).toBe(false);
  });
});

describe("on whom a case waits", () => {
  it.each([
    ["intake", { diagnosisCeilingMinor: null }, "counter"],
    ["intake", {}, "technician"],
    ["intake", { technicianName: null }, "counter"],
    ["testing", {}, "technician"],
    ["quoting", {}, "counter"],
    ["waiting", { standingRevision: { number: 2, answered: false, yesCount: 0 } }, "customer"],
    ["waiting", { standingRevision: { number: 2, answered: true, yesCount: 0 } }, "counter"],
    ["repair", {}, "technician"],
    ["proof", { proof: { verdict: "incomplete", sentence: "" } }, "technician"],
    ["proof", {}, "counter"],
    ["closed", {}, "nobody"],
  ] as const)("in %s", (stage, change, party) => {
    expect(waitingOn({ ...whole, ...(change as unknown as Partial<CaseFacts>), stage }).party).toBe(party);
  });

  it("names what a case on hold waits for", () => {
    expect(waitingOn({ ...whole, stage: "parked" }, "parts").party).toBe("parts");
    expect(waitingOn({ ...whole, stage: "parked" }, "customer").party).toBe("customer");
  });
});
