import type { CodeView, FindingView, SampleView } from "@/components/readings/model";
import { formatNumber, formatShortDate } from "@/components/ui/format";
import type { Finding } from "@/lib/diagnosis/answer";
import type { CodeStatus, Mode, Phase } from "@/lib/diagnosis/vocabulary";
import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import { describeCode } from "@/lib/obd/trouble-codes";
import type { CaseView } from "@/lib/services/cases/view";

export function sampleViews(view: CaseView): SampleView[] {
  return view.parts.samples.map((sample) => ({
    id: sample.id,
    mode: sample.mode as Mode,
    phase: sample.phase as Phase,
    how: sample.how,
    takenAt: sample.takenAt.toISOString(),
    takenBy: sample.takenByName,
    values: sample.values as SampleView["values"],
    beforeConsent: sample.beforeConsent,
  }));
}

/** A statement cut where its first clause ends, so that the finding is read before its figures. */
function split(statement: string): { lead: string; rest?: string } {
  const at = statement.search(/[:;]\s|\.\s/);
  return at > 0 && at < statement.length - 2
    ? { lead: statement.slice(0, at + 1), rest: statement.slice(at + 1).trim() }
    : { lead: statement };
}

export function findingViews(findings: readonly Finding[]): FindingView[] {
  return findings
    .filter((finding) => finding.abnormal)
    .map((finding) => ({ id: finding.id, family: finding.family, ...split(finding.statement) }));
}

function freezeWords(freeze: Record<string, unknown> | null): string | undefined {
  if (!freeze) return undefined;
  const words = Object.entries(freeze).flatMap(([id, value]) => {
    const parameter = PARAMETERS[id as ParameterId];
    return parameter && typeof value === "number"
      ? [`${parameter.short} ${formatNumber(value, parameter.decimals)} ${parameter.unit}`.trim()]
      : [];
  });
  return words.length > 0 ? `Frozen at ${words.join(", ")}.` : undefined;
}

export function codeViews(view: CaseView): CodeView[] {
  return view.parts.codes.map((code) => ({
    id: code.id,
    code: code.code,
    title: describeCode(code.code)?.meaning ?? "The maker’s own code: see the maker’s information",
    status: code.status as CodeStatus,
    phase: code.phase as Phase,
    note: freezeWords(code.freezeFrame),
  }));
}

/** A code or an abbreviation keeps its capitals. */
const lower = (text: string) => (/^[A-Z][A-Z0-9]/.test(text) ? text : text.charAt(0).toLowerCase() + text.slice(1));

/** The finding a part opens with, as one sentence. */
export function readingsTitle(view: CaseView): string {
  if (view.parts.samples.length === 0 && view.parts.codes.length === 0) return "No readings yet";
  const found = view.assessment.findings.filter((finding) => finding.abnormal);
  if (found.length === 0) return "Every reading so far is inside its usual band";
  const [first, second] = found.map((finding) => split(finding.statement).lead.replace(/[:;.]$/, ""));
  return second && `${first}${second}`.length < 90 ? `${first}, and ${lower(second)}` : (first ?? "");
}

export function readingsSub(view: CaseView): string {
  const { samples } = view.parts;
  if (samples.length === 0) return "";
  const before = samples.filter((sample) => sample.phase === "before").length;
  const after = samples.length - before;
  const day = formatShortDate(samples[0]!.takenAt.toISOString(), view.settings.timeZone);
  return `${before} as found${after > 0 ? `, ${after} after the repair` : ""}, from ${day}.`;
}
