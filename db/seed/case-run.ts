import type { z } from "zod";
import type { Ctx } from "@/lib/auth/context";
import { type CaseFile, parseCaseFile } from "@/lib/diagnosis/case-file";
import { CAUSES } from "@/lib/diagnosis/causes";
import { PROVING, SOUND_OUTCOMES } from "@/lib/diagnosis/knowledge/proving";
import type { CauseId } from "@/lib/diagnosis/vocabulary";
import { assignTechnician, authorizeDiagnosis } from "@/lib/services/cases/intake";
import { openCase } from "@/lib/services/cases/open";
import { readCase } from "@/lib/services/cases/read";
import { advanceCase, parkCase, waiveProof } from "@/lib/services/cases/stage";
import { markCause, recordTest } from "@/lib/services/causes/causes";
import { closeCase, recordPayment, releaseCase } from "@/lib/services/papers/close";
import { recordApproval } from "@/lib/services/quotes/approve";
import { addQuoteJob, saveDraft } from "@/lib/services/quotes/draft";
import { sendQuote } from "@/lib/services/quotes/send";
import { importReadings, setReadiness } from "@/lib/services/readings/codes";
import { addSample } from "@/lib/services/readings/samples";
import { perform, type Verb } from "@/lib/services/verb";
import { clockOff, clockOn } from "@/lib/services/work/clock";
import { finishJob, usePart } from "@/lib/services/work/jobs";
import { healedValues } from "./heal";
import { DEMO_JOBS, EXTRA_JOBS, GENERAL_JOB, linesOf } from "./jobs";
import type { Story, StoryEnd } from "./stories";

export interface Staff {
  hester: Ctx["actor"];
  odile: Ctx["actor"];
  bram: Ctx["actor"];
  dov: Ctx["actor"];
  sela: Ctx["actor"];
}

export interface CaseRun {
  shop: Pick<Ctx, "shopId">;
  staff: Staff;
  story: Story;
  fixture: { case: unknown; expected: { top: string[] }; why: string };
  seededAt: Date;
  generalRate: { id: string; perHourMinor: number };
  random: () => number;
  /** Called where a case wants photos, with the shop's actor at that moment. */
  addPhotos?: (ctx: Ctx, caseId: string, cause: string | undefined) => Promise<void>;
  comebackOf?: { customerId: string; vehicleId: string; caseId: string };
}

const ORDER: StoryEnd[] = [
  "intake",
  "testing",
  "marked",
  "quoting",
  "waiting",
  "repair",
  "half-repaired",
  "proof",
  "closed",
];
const HOUR = 3_600_000;
const MINUTE = 60_000;

/** Plays one case through the same verbs the screens call, each at its own moment of the past. */
export async function runStory(run: CaseRun): Promise<{ caseId: string; number: number; customerLink?: string }> {
  const { story, staff, seededAt, random } = run;
  let now = new Date(seededAt.getTime() - story.age * HOUR);
  const minutes = (from: number, to: number) => {
    const next = now.getTime() + Math.round((from + random() * (to - from)) * MINUTE);
    // an open case's past ends before the present; a closed one may take as long as it takes
    now = new Date(Math.min(next, seededAt.getTime() - MINUTE));
  };
  const as = (actor: Ctx["actor"]): Ctx => ({ ...run.shop, actor, requestId: "seed", now });
  const doIt = <I extends z.ZodType, O>(verb: Verb<I, O>, actor: Ctx["actor"], input: z.input<I>) =>
    perform(verb, as(actor), input);
  const technician = staff[story.technician];
  const parsed = parseCaseFile(run.fixture.case);
  if (!parsed.ok) throw new Error(`${story.fixture}: ${parsed.errors[0]?.path} ${parsed.errors[0]?.reason}`);
  const file = parsed.caseFile;
  const pace = isCramped(story) ? 0.35 : 1;

  const { id: caseId, number } = await doIt(openCase, staff.odile, intakeOf(run, file));
  const reached = (end: StoryEnd) => {
    const target =
      story.end === "released" || story.end === "parked-testing"
        ? "marked"
        : story.end === "parked-repair"
          ? "repair"
          : story.end;
    return ORDER.indexOf(target) >= ORDER.indexOf(end);
  };
  const result = { caseId, number };
  if (story.end === "intake") return result;

  minutes(4 * pace, 12 * pace);
  await doIt(authorizeDiagnosis, staff.odile, {
    caseId,
    amountMinor: 18_000,
    givenBy: story.customer,
    how: "in-person",
    words: "Find out what it is, up to $180 with tax.",
  });
  await doIt(assignTechnician, staff.odile, { caseId, technicianId: technician.id });
  minutes(4 * pace, 20 * pace);
  await doIt(advanceCase, staff.odile, { caseId, to: "testing" });
  await doIt(clockOn, technician, { caseId });
  minutes(15 * pace, 35 * pace);
  await doIt(importReadings, technician, { caseId, file: { ...(run.fixture.case as object), tests: [] } });
  if (run.addPhotos && story.end !== "testing")
    await run.addPhotos(as(technician), caseId, run.fixture.expected.top[0]);
  for (const test of file.tests ?? []) {
    minutes(5 * pace, 12 * pace);
    if (story.end === "testing" && test === file.tests?.at(-1)) break;
    await doIt(recordTest, technician, {
      caseId,
      testId: test.id,
      outcome: test.outcome,
      cylinder: test.cylinder,
      bank: test.bank,
    });
  }
  if (!reached("marked")) return result;
  minutes(2 * pace, 6 * pace);
  await doIt(clockOff, technician, { caseId });
  if (story.end === "parked-testing") {
    await doIt(parkCase, technician, {
      caseId,
      for: "customer",
      reason: "Comes only now and then; the customer drives on and returns when it does",
    });
    return result;
  }
  const causeId = (run.fixture.expected.top[0] ?? "no-fault-found") as CauseId;
  const view = await readCase(as(technician), number);
  const proving = view.parts.tests.findLast((test) => PROVING[causeId]?.[test.testId as never] !== undefined);
  await doIt(markCause, technician, {
    caseId,
    causeId,
    mark: proving ? "proven" : "suspected",
    provenByTestId: proving?.id,
    reason: run.fixture.why || "The readings agree with it.",
  });
  if (story.end === "released") {
    minutes(20, 60);
    await doIt(releaseCase, staff.odile, {
      caseId,
      reason: "The customer wants to think about it",
      safetyNote: "Have it repaired before a long drive.",
      notSafeToDrive: false,
      chargeDiagnosis: true,
      odometerOutKm: file.vehicle.odometerKm,
    });
    return result;
  }
  if (!reached("quoting")) return result;
  minutes(3 * pace, 10 * pace);
  await doIt(advanceCase, technician, { caseId, to: "quoting" });
  const demo = DEMO_JOBS[causeId] ?? GENERAL_JOB;
  minutes(8 * pace, 20 * pace);
  const { jobId } = await doIt(addQuoteJob, staff.odile, {
    caseId,
    title: demo.title,
    customerTitle: demo.customerTitle,
    urgency: "now",
    ifWaits: demo.ifWaits,
    causeId,
    isSafety: demo.ifWaits.includes("safety"),
    lines: linesOf(demo, run.generalRate),
  });
  const extra = random() < 0.6 ? EXTRA_JOBS[random() < 0.6 ? 0 : 1] : undefined;
  const extraId = extra
    ? (
        await doIt(addQuoteJob, staff.odile, {
          caseId,
          title: extra.title,
          customerTitle: extra.customerTitle,
          urgency: random() < 0.5 ? "soon" : "optional",
          ifWaits: extra.ifWaits,
          causeId: null,
          lines: linesOf(extra, run.generalRate),
        })
      ).jobId
    : undefined;
  const draft = (await readCase(as(staff.odile), number)).parts.draft;
  await doIt(saveDraft, staff.odile, {
    caseId,
    version: draft?.version ?? 1,
    headline: headlineOf(causeId),
    finding: CAUSES[causeId].sentence,
    warranty: draft?.warranty ?? "",
    readyAt: new Date(now.getTime() + 24 * HOUR).toISOString(),
  });
  if (!reached("waiting")) return result;
  minutes(3 * pace, 10 * pace);
  const sent = await doIt(sendQuote, staff.odile, { caseId });
  if (!reached("repair")) return result;
  minutes(20 * pace, story.end === "closed" ? 300 : 60 * pace);
  await doIt(recordApproval, staff.odile, {
    caseId,
    revisionId: sent.revisionId,
    how: "phone",
    givenBy: story.customer,
    contact: `555 01${String(10 + Math.floor(random() * 89))}`,
    keepParts: random() < 0.2,
    words: "Yes, do what is needed now.",
    answers: [
      { jobId, answer: "yes" },
      ...(extraId ? [{ jobId: extraId, answer: random() < 0.4 ? ("yes" as const) : ("not-now" as const) }] : []),
    ],
  });
  const jobs = (await readCase(as(technician), number)).parts.workJobs;
  if (story.end === "parked-repair") {
    await doIt(parkCase, technician, { caseId, for: "parts", reason: "The part comes from the maker's store" });
    return result;
  }
  for (const work of jobs) {
    minutes(5 * pace, 15 * pace);
    await doIt(clockOn, technician, { caseId, workJobId: work.id });
    if (story.end === "repair") return result;
    minutes(
      work.soldMinutes * (story.end === "closed" ? 0.7 : 0.3),
      work.soldMinutes * (story.end === "closed" ? 1.2 : 0.5),
    );
    for (const line of work.lines.filter((each) => each.kind === "part")) {
      await doIt(usePart, technician, {
        caseId,
        workJobId: work.id,
        lineId: line.id,
        description: line.description,
        partNumber: line.partNumber,
        quantityMilli: line.quantityMilli,
        condition: "new",
        oldPart: "discarded",
      });
    }
    if (story.end === "half-repaired") return result;
    await doIt(finishJob, technician, {
      caseId,
      workJobId: work.id,
      correction: `${work.title}: done, engine run warm and checked.`,
    });
  }
  minutes(3, 10);
  await doIt(advanceCase, technician, { caseId, to: "proof" });
  if (story.end === "proof" && random() < 0.5) return result;
  minutes(10, 25);
  for (const sample of file.samples ?? []) {
    if (sample.phase === "before")
      await doIt(addSample, technician, {
        caseId,
        mode: sample.mode,
        phase: "after",
        how: "after the repair",
        values: healedValues(sample, file.vehicle),
      });
  }
  await doIt(setReadiness, technician, {
    caseId,
    afterCodesRead: true,
    readiness: {
      misfire: "complete",
      "fuel-system": "complete",
      components: "complete",
      catalyst: "complete",
      "o2-sensor": "complete",
    },
  });
  for (const test of file.tests ?? []) {
    const sound = SOUND_OUTCOMES[test.id as keyof typeof SOUND_OUTCOMES];
    const outcome = Array.isArray(sound) ? sound[0] : sound;
    if (outcome)
      await doIt(recordTest, technician, { caseId, testId: test.id, outcome: String(outcome), phase: "after" });
  }
  if (story.end === "proof") return result;
  const proof = (await readCase(as(staff.hester), number)).proof;
  if (proof.verdict !== "passes") {
    await doIt(waiveProof, staff.hester, { caseId, reason: "Driven for a day by the customer without the complaint" });
  }
  minutes(10, 40);
  const closed = await doIt(closeCase, staff.odile, {
    caseId,
    correction: `${demo.title}. Driven warm; the complaint is gone.`,
    odometerOutKm: file.vehicle.odometerKm === undefined ? undefined : Math.round(file.vehicle.odometerKm) + 8,
  });
  minutes(20, 180);
  await doIt(recordPayment, staff.odile, {
    caseId,
    paperId: closed.paperId,
    how: random() < 0.7 ? "card-terminal" : "cash",
    amountMinor: closed.totalMinor,
  });
  return result;
}

/** An open case of today has only a few hours in which to have happened. */
const isCramped = (story: Story) => story.age < 12;

function headlineOf(cause: CauseId): string {
  const { family } = CAUSES[cause];
  if (family === "lean") return "Your engine gets too much air or too little fuel";
  if (family === "rich") return "Your engine gets more fuel than it can burn";
  if (family === "spark") return "Your engine does not always ignite its fuel";
  return "A part of your engine no longer does its work";
}

function intakeOf(run: CaseRun, file: CaseFile) {
  const { story, seededAt, comebackOf } = run;
  const { modelYear, odometerKm, ...engine } = file.vehicle;
  const first = story.customer.toLowerCase().split(" ");
  const promised =
    story.promise === undefined
      ? new Date(seededAt.getTime() - story.age * HOUR + 8 * HOUR)
      : new Date(seededAt.getTime() + story.promise * HOUR);
  return {
    customer: comebackOf
      ? { id: comebackOf.customerId }
      : {
          name: story.customer,
          email: `${first[0]}@${first.at(-1)?.replaceAll(/[^a-z]/g, "")}.example`,
          phone: `555 0${100 + Math.floor(run.random() * 899)}`,
        },
    vehicle: comebackOf
      ? { id: comebackOf.vehicleId }
      : {
          label: `${story.model}${engine.displacementL ? ` ${engine.displacementL.toFixed(1)}` : ""}`,
          plate: story.plate,
          modelYear,
          engine,
        },
    complaints: file.complaints ?? [],
    words: story.words,
    circumstances: file.circumstances ?? [],
    history: file.history ?? [],
    arrival: "drop-off" as const,
    ...(odometerKm === undefined
      ? { odometerUnreadable: "Display is dark" }
      : { odometerInKm: Math.round(odometerKm) }),
    promisedAt: new Date(Math.round(promised.getTime() / (15 * MINUTE)) * 15 * MINUTE).toISOString(),
    comebackOf: comebackOf?.caseId,
  };
}
