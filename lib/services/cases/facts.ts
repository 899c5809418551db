import "server-only";
import type { CaseParts } from "@/db/queries/cases";
import type { CaseFacts, ParkReason, PathStage, Stage } from "@/lib/cases/stages";
import { type CaseFile, parseCaseFile } from "@/lib/diagnosis/case-file";
import { judgeProof, type ProofResult } from "@/lib/diagnosis/proof";
import type { CauseId, CodeStatus, ReadinessState, TestId } from "@/lib/diagnosis/vocabulary";
import { shopSettings } from "@/lib/shops/schema";

/** The case file of `lib/diagnosis` as it stands in the database; what does not fit is left out rather than lost: it stays in its row. */
export function caseFileOf(parts: CaseParts): CaseFile {
  const { row, vehicle } = parts;
  const tests = parts.tests.map((test) => ({
    id: test.testId,
    outcome: test.outcome,
    ...(test.cylinder ? { cylinder: test.cylinder } : {}),
    ...(test.bank ? { bank: test.bank } : {}),
  }));
  const raw = {
    version: 1,
    vehicle: { ...vehicle.engine, modelYear: vehicle.modelYear, odometerKm: row.odometerInKm ?? vehicle.odometerKm },
    site: row.site,
    complaints: row.complaints,
    circumstances: row.circumstances,
    history: row.history,
    readiness: row.readiness,
    codes: parts.codes
      .filter((code) => code.phase === "before")
      .map((code) => ({
        code: code.code,
        status: code.status,
        ...(code.freezeFrame ? { freezeFrame: { values: code.freezeFrame } } : {}),
      })),
    samples: parts.samples.map((sample) => ({ mode: sample.mode, phase: sample.phase, values: sample.values })),
    tests: tests.filter((_, index) => parts.tests[index]?.phase === "before"),
  };
  const parsed = parseCaseFile(raw);
  if (parsed.ok) return parsed.caseFile;
  // every write is checked before it is stored, so this is a row from an older version: keep the rest usable
  const bare = parseCaseFile({ version: 1, vehicle: {}, complaints: [], samples: [] });
  if (!bare.ok)
    throw new Error(`case file: ${parsed.errors.map((error) => `${error.path}: ${error.reason}`).join("; ")}`);
  return bare.caseFile;
}

export function proofOf(parts: CaseParts, caseFile = caseFileOf(parts)): ProofResult {
  const after = parts.tests.filter((test) => test.phase === "after");
  const afterCodes = parts.codes.filter((code) => code.phase === "after");
  const wasRead = parts.row.afterCodesRead || afterCodes.length > 0;
  return judgeProof({
    caseFile,
    provenCauses: parts.marks.map((mark) => mark.causeId as CauseId),
    tests: [
      ...(caseFile.tests ?? []),
      ...after.map((test) => ({ id: test.testId as TestId, outcome: test.outcome, phase: "after" as const })),
    ],
    afterCodes: wasRead
      ? afterCodes.map((code) => ({ code: code.code, status: code.status as CodeStatus }))
      : undefined,
    readiness: parts.row.readiness as Record<string, ReadinessState>,
  });
}

export const settingsOf = (parts: Pick<CaseParts, "shop">) => shopSettings.parse(parts.shop.settings);

export function standingRevisionOf(parts: CaseParts) {
  return parts.revisions.find((revision) => !revision.withdrawnAt && !revision.supersededAt) ?? null;
}

const minutesBetween = (from: Date, to: Date) => Math.max(0, Math.round((to.getTime() - from.getTime()) / 60_000));

export function minutesWorked(parts: CaseParts, workJobId: string, now: Date): number {
  return parts.clocks
    .filter((clock) => clock.workJobId === workJobId)
    .reduce(
      (sum, clock) => sum + Math.max(clock.endedAt ? 1 : 0, minutesBetween(clock.startedAt, clock.endedAt ?? now)),
      0,
    );
}

/** Time booked on the diagnosis: clock entries that belong to no job. */
export function diagnosisMinutes(parts: CaseParts, now: Date): number {
  return parts.clocks
    .filter((clock) => !clock.workJobId)
    .reduce((sum, clock) => sum + minutesBetween(clock.startedAt, clock.endedAt ?? now), 0);
}

export function ceilingOf(parts: CaseParts): number | null {
  return parts.authorizations.reduce<number | null>((highest, each) => Math.max(highest ?? 0, each.amountMinor), null);
}

export function technicianOf(parts: CaseParts) {
  return parts.people.find((person) => person.id === parts.row.technicianId) ?? null;
}

export function factsOf(parts: CaseParts, now: Date, proof = proofOf(parts)): CaseFacts {
  const standing = standingRevisionOf(parts);
  const answer = standing ? parts.approvals.find((approval) => approval.revisionId === standing.id) : undefined;
  return {
    stage: parts.row.stage as Stage,
    parkedFrom: parts.row.parkedFrom as PathStage | null,
    hasVehicle: true,
    complaintCount: parts.row.complaints.length + (parts.row.words.trim() ? 1 : 0),
    odometerKnown: parts.row.odometerInKm !== null || parts.row.odometerUnreadable !== null,
    diagnosisCeilingMinor: ceilingOf(parts),
    technicianName: technicianOf(parts)?.name ?? null,
    marks: parts.marks.map((mark) => ({ causeId: mark.causeId, mark: mark.mark as "proven" | "suspected" })),
    standingRevision: standing
      ? {
          number: standing.number,
          answered: answer !== undefined,
          yesCount: answer?.answers.filter((each) => each.answer === "yes").length ?? 0,
        }
      : null,
    workJobs: parts.workJobs.map((job) => ({
      title: job.title,
      state: job.state as "approved" | "done" | "struck",
      minutesWorked: minutesWorked(parts, job.id, now),
      partsOpen: openParts(parts, job.id),
    })),
    openClocks: parts.clocks.filter((clock) => !clock.endedAt).map((clock) => ({ personName: clock.personName })),
    afterSampleCount: parts.samples.filter((sample) => sample.phase === "after").length,
    proof: { verdict: proof.verdict, sentence: proofSentence(proof) },
    waiver: parts.row.waiver !== null,
    invoiceIssued: parts.papers.some((paper) => paper.kind === "invoice"),
  };
}

/** Part lines of an agreed job that nobody has recorded as fitted. */
export function openParts(parts: CaseParts, workJobId: string): number {
  const job = parts.workJobs.find((each) => each.id === workJobId);
  const lines = job?.lines.filter((line) => line.kind === "part") ?? [];
  return lines.filter(
    (line) =>
      !parts.partsUsed.some(
        (part) => part.workJobId === workJobId && part.lineId === line.id && part.status === "fitted",
      ),
  ).length;
}

function proofSentence(proof: ProofResult): string {
  switch (proof.verdict) {
    case "passes":
      return "The after readings pass";
    case "still-inside":
      return "The after readings are still being judged";
    case "fails":
      return "The after readings fail; the owner may waive them with a reason";
    case "incomplete":
      return proof.missing[0]?.message ?? "The after readings, in the modes that showed the fault";
  }
}

export const parkReasonOf = (parts: CaseParts) => parts.row.parkedFor as ParkReason | null;
