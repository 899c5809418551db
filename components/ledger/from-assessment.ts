import { MODE_WORDS } from "@/components/readings/mode-words";
import { type RowGroup, rowLabel } from "@/components/readings/rows";
import type { AssessedCause, Assessment } from "@/lib/diagnosis/answer";
import type { CaseFile } from "@/lib/diagnosis/case-file";
import { TESTS } from "@/lib/diagnosis/tests";
import { isParameterId } from "@/lib/obd/parameters";
import type { LedgerCauseView, LedgerView, MarkView, NextTestView, TestChoice } from "./model";

export type { RowGroup };

export interface LedgerOptions {
  /** How many causes stand one by one. */
  top?: number;
  marks?: readonly (MarkView & { causeId: string })[];
  /** Recorded tests with what they prove: id of the record, label, causes. */
  proofs?: readonly { id: string; label: string; causes: readonly string[] }[];
}

/** The assessment as the ledger shows it. A marked cause always stands by itself. */
export function ledgerFrom(assessment: Assessment, caseFile: CaseFile, options: LedgerOptions = {}): LedgerView {
  const { top = 8, marks = [], proofs = [] } = options;
  const isShown = (cause: AssessedCause, index: number) =>
    (index < top && (index < 2 || cause.probability >= 0.001)) || marks.some((m) => m.causeId === cause.id);
  const shown = assessment.causes.filter(isShown);
  const rest = assessment.causes.filter((cause, index) => !isShown(cause, index));
  return {
    causes: shown.map((cause, index) => toView(cause, index === 0, assessment, caseFile, marks, proofs)),
    rest: { count: rest.length, probability: rest.reduce((sum, cause) => sum + cause.probability, 0) },
  };
}

function toView(
  cause: AssessedCause,
  isLeader: boolean,
  assessment: Assessment,
  caseFile: CaseFile,
  marks: NonNullable<LedgerOptions["marks"]>,
  proofs: NonNullable<LedgerOptions["proofs"]>,
): LedgerCauseView {
  const finding = (id: string) => assessment.findings.find((f) => f.id === id);
  return {
    id: cause.id,
    title: titleAt(cause),
    family: cause.family,
    probability: cause.probability,
    priorBits: cause.priorBits,
    evidence: cause.evidence.map(({ finding: id, weight }) => ({
      id,
      weight,
      statement: finding(id)?.statement ?? id,
      source: sourceWords(finding(id)?.from ?? [], caseFile),
    })),
    unexplained: isLeader ? assessment.unexplained.map((id) => finding(id)?.statement ?? id) : null,
    where: whereWords(cause.location),
    mark: marks.find((m) => m.causeId === cause.id) ?? null,
    provenBy: proofs.filter((proof) => proof.causes.includes(cause.id)).map(({ id, label }) => ({ id, label })),
  };
}

function titleAt(cause: AssessedCause): string {
  return cause.location.cylinder === null ? cause.title : `${cause.title}, cylinder ${cause.location.cylinder}`;
}

function whereWords({ bank, cylinder }: AssessedCause["location"]): string | null {
  const parts = [bank === null ? null : `bank ${bank}`, cylinder === null ? null : `cylinder ${cylinder}`]
    .filter(Boolean)
    .join(", ");
  return parts ? `${parts.charAt(0).toUpperCase()}${parts.slice(1)}.` : null;
}

/** `samples[1].values.SHRTFT1` → "Raised idle: short trim, bank 1"; several of one sample are gathered. */
export function sourceWords(paths: readonly string[], caseFile: CaseFile): string {
  const bySource = new Map<string, Set<string>>();
  const put = (source: string, what: string) => bySource.set(source, (bySource.get(source) ?? new Set()).add(what));
  for (const path of paths) {
    const sample = /^samples\[(\d+)\](?:\.values\.(\w+))?/.exec(path);
    const code = /^codes\[(\d+)\]/.exec(path);
    const test = /^tests\[(\d+)\]/.exec(path);
    if (sample) {
      const mode = caseFile.samples?.[Number(sample[1])]?.mode;
      const parameter = sample[2];
      put(
        mode ? MODE_WORDS[mode] : "Readings",
        parameter && isParameterId(parameter) ? lowerFirst(rowLabel(parameter, caseFile.vehicle.banks)) : "",
      );
    } else if (code) put("Code", caseFile.codes?.[Number(code[1])]?.code ?? "");
    else if (test) {
      const record = caseFile.tests?.[Number(test[1])];
      put("Test", record ? lowerFirst(TESTS[record.id].title) : "");
    } else if (path.startsWith("complaints")) put("Complaint", "");
    else if (path.startsWith("circumstances")) put("When it happens", "");
    else if (path.startsWith("history")) put("What came before", "");
    else if (path.startsWith("vehicle")) put("The vehicle", "");
    else if (path.startsWith("readiness")) put("Monitors", "");
  }
  return [...bySource]
    .map(([source, what]) => [source, [...what].filter(Boolean).join(", ")].filter(Boolean).join(": "))
    .join("; ");
}

function lowerFirst(text: string): string {
  return /^[A-Z][a-z]/.test(text) ? text.charAt(0).toLowerCase() + text.slice(1) : text;
}

/** Next tests as forks, most learned per minute first. `minutesLeft` is what of the agreed diagnosis is unspent. */
export function nextTestsFrom(
  assessment: Assessment,
  options: { minutesLeft?: number | null; top?: number } = {},
): NextTestView[] {
  const { minutesLeft = null, top = 6 } = options;
  const titles = new Map(assessment.causes.map((cause) => [cause.id as string, cause.title]));
  return assessment.nextTests.slice(0, top).map((test) => ({
    id: test.id,
    title: test.title,
    minutes: test.minutes,
    bits: test.expectedInformationBits,
    tools: test.tools.join(", ") || undefined,
    cautions: test.cautions,
    outcomes: Object.entries(test.ifOutcome).map(([outcome, after]) => {
      const [leader] = Object.entries(after).sort(([, a], [, b]) => (b ?? 0) - (a ?? 0));
      return {
        id: outcome,
        label: lowerFirst(TESTS[test.id].outcomes.find((o) => o.id === outcome)?.label ?? outcome.replaceAll("-", " ")),
        leader: leader ? { title: titles.get(leader[0]) ?? leader[0], probability: leader[1] ?? 0 } : null,
      };
    }),
    overCeiling:
      minutesLeft !== null && test.minutes > minutesLeft
        ? `Takes ${test.minutes} min; ${Math.max(0, Math.floor(minutesLeft))} min of what was agreed are left.`
        : undefined,
  }));
}

/** Every test with its outcomes, for recording one that was not proposed. */
export function allTests(): TestChoice[] {
  return Object.values(TESTS).map(({ id, title, minutes, outcomes, cautions }) => ({
    id,
    title,
    minutes,
    outcomes,
    cautions,
  }));
}
