import type { DoneView, ProgressStep } from "@/components/approve/model";
import { formatSpan, formatWhen } from "@/components/ui/format";
import type { CustomerQuote } from "@/lib/services/quotes/customer-read";

const ORDER = ["repair", "proof", "closed"];

/** The line a customer follows after the yes: who does what, and when it is ready. */
export function progressSteps(quote: CustomerQuote, now: Date): ProgressStep[] {
  const { progress, snapshot, answer } = quote;
  if (!answer || answer.yesJobIds.length === 0) return [];
  const when = (iso: string) => formatWhen(iso, now.toISOString(), snapshot.timeZone);
  const at = Math.max(0, ORDER.indexOf(progress.stage));
  const minutes = progress.jobs.filter((job) => job.state !== "struck").reduce((sum, job) => sum + job.soldMinutes, 0);
  const waitsForParts = progress.partsOpen.length > 0;
  const state = (index: number): ProgressStep["state"] => (index < at ? "done" : index === at ? "now" : "to-come");
  const part = progress.partsOpen[0];
  return [
    {
      label: "Agreed",
      note: `${when(answer.at)}, ${answer.how === "link" ? "by you" : `by ${answer.givenBy}`}`,
      state: "done",
    },
    ...(waitsForParts && at === 0
      ? [
          {
            label: "Parts on the way",
            note: part ? `${part.description}${part.arrivesOn ? `, due ${part.arrivesOn}` : ""}` : "",
            state: "now" as const,
          },
        ]
      : []),
    {
      label: "Work",
      note: [progress.technician, minutes > 0 ? `about ${formatSpan(minutes)}` : null].filter(Boolean).join(", "),
      state: waitsForParts && at === 0 ? "to-come" : state(0),
    },
    { label: "Measured again", note: "the readings that showed the fault", state: state(1) },
    progress.closedAt
      ? { label: "Ready", note: when(progress.closedAt), state: "done" }
      : { label: "Ready", note: progress.readyAt ? `by ${when(progress.readyAt)}` : "we tell you", state: "to-come" },
  ];
}

export function doneView(quote: CustomerQuote, now: Date, papers: DoneView["papers"]): DoneView | null {
  const { answer, snapshot, progress } = quote;
  if (!answer) return null;
  const when = (iso: string) => formatWhen(iso, now.toISOString(), snapshot.timeZone);
  return {
    snapshot,
    yesJobIds: answer.yesJobIds,
    totalMinor: answer.totalMinor,
    givenBy: answer.givenBy,
    recordedWords: when(answer.at),
    readyWords:
      progress.readyAt && !progress.closedAt && answer.yesJobIds.length > 0
        ? `Ready by ${when(progress.readyAt)}`
        : undefined,
    steps: progressSteps(quote, now),
    papers,
  };
}
