import { proofModesFrom, proofTestsFrom } from "@/components/proof/from-proof";
import { formatWhen } from "@/components/ui/format";
import { describeCode } from "@/lib/obd/trouble-codes";
import type { CaseView } from "@/lib/services/cases/view";

const MONITOR_WORDS: Record<string, string> = {
  misfire: "Misfire",
  "fuel-system": "Fuel system",
  components: "Components",
  catalyst: "Catalyst",
  "heated-catalyst": "Heated catalyst",
  evap: "Evaporative system",
  "secondary-air": "Secondary air",
  "o2-sensor": "O2 sensors",
  "o2-heater": "O2 heaters",
  egr: "EGR",
};
export const MONITORS = Object.keys(MONITOR_WORDS);

const STATE_WORDS: Record<string, string> = {
  complete: "complete",
  incomplete: "not complete",
  unsupported: "not fitted",
};

export function proofTitle(view: CaseView): { title: string; sub?: string } {
  const { verdict, rows } = view.proof;
  if (view.parts.row.waiver) return { title: "Proof was waived by the owner", sub: view.parts.row.waiver.reason };
  const failing = rows.filter((row) => row.verdict === "fails").length;
  switch (verdict) {
    case "passes":
      return {
        title: "The repair is proven where it showed the fault",
        sub: "Every reading that was outside is back, and nothing new has appeared.",
      };
    case "fails":
      return {
        title: failing === 1 ? "One reading still shows the fault" : "The fault still shows",
        sub: "The case can’t close on this. Send it back to testing, or have the owner waive the proof with a reason.",
      };
    case "still-inside":
      return { title: "Nothing was outside before, and nothing is now" };
    case "incomplete":
      return { title: "Not proven yet", sub: view.proof.missing[0]?.message };
  }
}

export function proofView(view: CaseView) {
  const { proof, caseFile, settings, parts, now } = view;
  return {
    ...proofTitle(view),
    modes: proofModesFrom(proof, caseFile, { units: settings.units }),
    tests: proofTestsFrom(proof),
    missing: proof.missing.map((each) => each.message),
    codes: proof.codes.map((each) => ({
      code: each.code,
      words: each.message || (describeCode(each.code)?.meaning ?? ""),
      isBad: each.state === "returned" || each.state === "new",
    })),
    codesRead: parts.row.afterCodesRead ? "read after the repair" : undefined,
    monitors: proof.monitors.map((each) => ({
      name: MONITOR_WORDS[each.monitor] ?? each.monitor,
      isComplete: each.state === "complete",
      words: STATE_WORDS[each.state] ?? each.state,
    })),
    monitorNote: proof.monitors.some((each) => each.state === "incomplete")
      ? "Monitors that are not complete are told to the customer if an inspection is near."
      : undefined,
    waiver: parts.row.waiver
      ? {
          by: parts.row.waiver.by,
          when: formatWhen(parts.row.waiver.at, now.toISOString(), settings.timeZone),
          reason: parts.row.waiver.reason,
        }
      : null,
  };
}
