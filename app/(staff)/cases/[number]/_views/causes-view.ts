import { allTests, ledgerFrom, nextTestsFrom } from "@/components/ledger/from-assessment";
import type { RecordedTestView } from "@/components/ledger/model";
import { formatWhen } from "@/components/ui/format";
import { CAUSES } from "@/lib/diagnosis/causes";
import { PROVING } from "@/lib/diagnosis/knowledge/proving";
import { TESTS } from "@/lib/diagnosis/tests";
import type { CaseView } from "@/lib/services/cases/view";

const outcomeWords = (testId: string, outcome: string) =>
  TESTS[testId as keyof typeof TESTS]?.outcomes.find((each) => each.id === outcome)?.label.toLowerCase() ??
  outcome.replaceAll("-", " ");

const when = (view: CaseView, at: Date) => formatWhen(at.toISOString(), view.now.toISOString(), view.settings.timeZone);

export function recordedTests(view: CaseView, phase: "before" | "after" = "before"): RecordedTestView[] {
  return view.parts.tests
    .filter((test) => test.phase === phase)
    .map((test) => ({
      id: test.id,
      title: TESTS[test.testId as keyof typeof TESTS]?.title ?? test.testId,
      outcome: outcomeWords(test.testId, test.outcome),
      when: when(view, test.at),
      by: test.byName,
      note: test.note ?? undefined,
    }));
}

/** Recorded outcomes that prove a cause on their own. */
function proofsOf(view: CaseView) {
  return view.parts.tests.map((test) => ({
    id: test.id,
    label: `${TESTS[test.testId as keyof typeof TESTS]?.title ?? test.testId}: ${outcomeWords(test.testId, test.outcome)}`,
    causes: Object.entries(PROVING).flatMap(([cause, tests]) =>
      (tests as Record<string, readonly string[]>)[test.testId]?.includes(test.outcome) ? [cause] : [],
    ),
  }));
}

export function ledgerView(view: CaseView) {
  const marks = view.parts.marks.map((mark) => ({
    id: mark.id,
    causeId: mark.causeId,
    kind: mark.mark as "proven" | "suspected",
    by: mark.byName,
    when: when(view, mark.at),
    reason: mark.reason,
  }));
  return ledgerFrom(view.assessment, view.caseFile, { marks, proofs: proofsOf(view) });
}

/** Minutes of diagnosis that what was agreed still pays for. */
export function minutesLeft(view: CaseView): number | null {
  const { price, minutes } = view.diagnosis;
  if (!price || price.perHourMinor === 0 || price.ceilingMinor === null) return null;
  const rule = view.settings;
  const withTax = rule.taxKinds.includes("diagnosis") ? 1 + rule.taxBasisPoints / 10_000 : 1;
  return Math.max(0, (price.ceilingMinor / withTax / price.perHourMinor) * 60 - minutes);
}

export const nextTestViews = (view: CaseView) =>
  nextTestsFrom(view.assessment, { minutesLeft: minutesLeft(view), top: 6 });
export { allTests };

const lower = (text: string) => text.charAt(0).toLowerCase() + text.slice(1);

export function causesTitle(view: CaseView): { title: string; sub?: string } {
  const lead = view.assessment.causes[0];
  const marked = view.parts.marks.findLast((mark) => mark.mark === "proven") ?? view.parts.marks.at(-1);
  if (marked) {
    const cause = CAUSES[marked.causeId as keyof typeof CAUSES];
    return { title: `${cause?.title ?? marked.causeId}, ${marked.mark} by ${marked.byName}`, sub: marked.reason };
  }
  const hasAny =
    view.parts.samples.some((sample) => Object.keys(sample.values).length > 0) ||
    view.parts.codes.length > 0 ||
    view.parts.tests.length > 0;
  if (!lead || !hasAny)
    return { title: "Nothing is measured yet", sub: "The complaint alone says little; the first readings will." };
  const next = view.assessment.nextTests[0];
  const percent = Math.round(lead.probability * 100);
  const sub = next
    ? `${next.minutes} minutes for “${lower(next.title)}” would tell the most next. Press an outcome to record it.`
    : undefined;
  if (percent < 20) return { title: `Not settled: ${lower(lead.title)} leads with ${percent} %`, sub };
  return { title: `${lead.title} is most likely, ${percent} %`, sub };
}

/** A second fault, and what this shop's own closed cases say. */
export function remarks(view: CaseView): string[] {
  const { secondFault, memory } = view.assessment;
  const found: string[] = [];
  if (secondFault) {
    const [first, second] = secondFault.causes.map((id) => CAUSES[id].title.toLowerCase());
    found.push(`Perhaps two faults at once: ${first} and ${second} together explain what neither does alone.`);
  }
  if (memory && memory.similar > 0 && memory.ended.length > 0) {
    const ended = memory.ended
      .slice(0, 2)
      .map(({ id, count }) => `${count} ended as ${CAUSES[id].title.toLowerCase()}`);
    found.push(`Of ${memory.similar} similar cases here, ${ended.join(", ")}.`);
  }
  return found;
}
