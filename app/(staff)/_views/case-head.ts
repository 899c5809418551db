import { formatNumber, formatPrice, formatSpan, formatWhen, isSameDay } from "@/components/ui/format";
import type { PartLink, StageView, StripView } from "@/components/ui/nav-model";
import { kmShown } from "@/components/ui/units";
import type { Ctx } from "@/lib/auth/context";
import { isOver, PATH, type PathStage, type Stage } from "@/lib/cases/stages";
import { CAUSES } from "@/lib/diagnosis/causes";
import type { CaseView } from "@/lib/services/cases/view";
import { promiseView } from "./cases-list";

const minutes = (from: Date, to: Date) => Math.max(0, Math.round((to.getTime() - from.getTime()) / 60_000));

const PARTY_WORDS: Record<string, string> = {
  counter: "the counter",
  customer: "the customer",
  parts: "parts",
  bay: "a free bay",
  owner: "the owner",
  nobody: "nobody",
};

/** The person or party a case waits on, by name where one is known; "you" for the reader. */
export function partyName(view: CaseView, ctx: Ctx): string {
  const { waitingOn } = view.parts.row;
  if (waitingOn === "technician") {
    if (!view.technician) return "a technician";
    return view.technician.id === ctx.actor.id ? "you" : view.technician.name;
  }
  if (waitingOn === "customer") return view.parts.customer.name;
  if (waitingOn === "counter" && ctx.actor.role === "writer") return "you";
  return PARTY_WORDS[waitingOn] ?? waitingOn;
}

/** Minutes spent in each stage so far: each event ends the stage before it. */
export function timeInStages(view: CaseView): Partial<Record<Stage, number>> {
  const spent: Partial<Record<Stage, number>> = {};
  const { stageEvents } = view.parts;
  for (const [index, event] of stageEvents.entries()) {
    const stage = event.toStage as Stage;
    const end = stageEvents[index + 1]?.at ?? (isOver(stage) ? event.at : view.now);
    spent[stage] = (spent[stage] ?? 0) + minutes(event.at, end);
  }
  return spent;
}

export function stageView(view: CaseView, ctx: Ctx): StageView {
  const { row } = view.parts;
  const held = row.stage === "parked";
  const released = row.stage === "released";
  const before = view.parts.stageEvents.at(-1)?.fromStage as PathStage | undefined;
  const now = (held ? row.parkedFrom : released ? before : row.stage) as PathStage;
  const spent = timeInStages(view);
  const passed: StageView["passed"] = {};
  for (const stage of PATH) {
    const time = spent[stage];
    if (time !== undefined && stage !== now) passed[stage] = formatSpan(time);
  }
  return {
    now,
    since: formatSpan(minutes(row.stageSince, view.now)),
    waitingOn: partyName(view, ctx),
    waitingFor: row.waitingFor,
    passed,
    held,
    released,
  };
}

export const vehicleWords = (view: CaseView) => {
  const { vehicle } = view.parts;
  return vehicle.modelYear ? `${vehicle.label}, ${vehicle.modelYear}` : vehicle.label;
};

export function stripView(view: CaseView): StripView {
  const { row, customer, vehicle, comebackOf } = view.parts;
  const { settings, now } = view;
  const money = (minor: number) => formatPrice(minor, settings.currency, settings.locale);
  const promise = promiseView(row.promisedAt, row.stage, now, settings.timeZone);
  const odometer =
    row.odometerInKm === null
      ? null
      : `${formatNumber(kmShown(row.odometerInKm, settings.units))} ${settings.units.distance}`;
  const { price, ceilingMinor } = view.diagnosis;
  return {
    number: String(row.number),
    vehicle: vehicleWords(view),
    complaint: row.words,
    comeback: comebackOf
      ? {
          label: `Came back from ${comebackOf.number}`,
          href: `/cases/${comebackOf.number}`,
          isFresh: isSameDay(row.openedAt.toISOString(), now.toISOString(), settings.timeZone),
        }
      : undefined,
    facts: [
      { label: "Customer", value: customer.name },
      { label: "Vehicle", value: vehicle.plate ?? "no plate", note: odometer ?? row.odometerUnreadable ?? undefined },
      promise
        ? {
            label: "Promised",
            value: promise.words,
            alarm: promise.isLate,
            note:
              row.promiseMoves > 0
                ? `moved ${row.promiseMoves === 1 ? "once" : `${row.promiseMoves} times`}`
                : undefined,
          }
        : { label: "Promised", value: "nothing yet" },
      ceilingMinor === null
        ? { label: "Diagnosis", value: "not agreed yet" }
        : {
            label: "Diagnosis, with tax",
            value: money(price?.totalMinor ?? 0),
            note: `of ${money(ceilingMinor)} agreed`,
          },
    ],
  };
}

/** The seven parts, each with one line that tells its state. */
export function partLinks(view: CaseView, current: string): PartLink[] {
  const { parts, settings } = view;
  const { row } = parts;
  const money = (minor: number) => formatPrice(minor, settings.currency, settings.locale);
  const lead = row.leadCause ? CAUSES[row.leadCause as keyof typeof CAUSES]?.title.toLowerCase() : null;
  const agreed = parts.authorizations.at(-1);
  const outOfBand = view.assessment.findings.length;
  const done = parts.workJobs.filter((job) => job.state !== "approved").length;
  const base = `/cases/${row.number}`;
  const count = (n: number, word: string) => `${n} ${word}${n === 1 ? "" : "s"}`;
  const revision = parts.revisions[0];
  const answered = revision ? parts.approvals.find((approval) => approval.revisionId === revision.id) : undefined;
  const states: [string, string, string][] = [
    [
      "intake",
      "Intake",
      agreed
        ? `agreed ${formatWhen(agreed.at.toISOString(), view.now.toISOString(), settings.timeZone)}, ceiling ${money(view.diagnosis.ceilingMinor ?? 0)}`
        : "diagnosis not agreed yet",
    ],
    [
      "readings",
      "Readings",
      parts.samples.length === 0
        ? "none yet"
        : `${count(parts.samples.length, "sample")}, ${count(outOfBand, "finding")}`,
    ],
    [
      "causes",
      "Causes",
      lead ? `${lead} ${row.leadMark ?? `${Math.round((row.leadProbability ?? 0) * 100)} %`}` : "no readings yet",
    ],
    [
      "quote",
      "Quote",
      revision
        ? revision.withdrawnAt
          ? `revision ${revision.number} withdrawn`
          : answered
            ? `revision ${revision.number}, answered`
            : `revision ${revision.number}, sent`
        : parts.marks.length === 0
          ? "opens once a cause is marked"
          : `${count(parts.quoteJobs.length, "job")}, not sent`,
    ],
    [
      "repair",
      "Repair",
      parts.workJobs.length === 0 ? "not started" : `${done} of ${count(parts.workJobs.length, "job")} finished`,
    ],
    [
      "proof",
      "Proof",
      row.waiver
        ? "waived by the owner"
        : view.facts.afterSampleCount === 0
          ? "needs readings after the repair"
          : view.proof.verdict === "passes"
            ? "passes"
            : view.proof.verdict === "fails"
              ? "fails"
              : "not complete",
    ],
    ["papers", "Papers and history", `${count(parts.papers.length, "paper")}`],
  ];
  return states.map(([part, label, state]) => ({ href: `${base}/${part}`, label, state, current: part === current }));
}
