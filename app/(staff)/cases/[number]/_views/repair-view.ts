import type { WorkJobView } from "@/components/repair/model";
import { capitalise, countWord, formatClock, formatPrice, formatWhen } from "@/components/ui/format";
import type { Ctx } from "@/lib/auth/context";
import { CAUSES } from "@/lib/diagnosis/causes";
import { minutesWorked } from "@/lib/services/cases/facts";
import type { CaseView } from "@/lib/services/cases/view";

const HOWS: Record<string, string> = { link: "by link", phone: "by phone", "in-person": "in person" };

export function workJobViews(view: CaseView, ctx: Ctx): WorkJobView[] {
  const { parts, settings, now } = view;
  const when = (at: Date) => formatWhen(at.toISOString(), now.toISOString(), settings.timeZone);
  return parts.workJobs.map((job) => {
    const cause = job.causeId ? CAUSES[job.causeId as keyof typeof CAUSES] : undefined;
    const mark = parts.marks.find((each) => each.causeId === job.causeId);
    const clocks = parts.clocks.filter((clock) => clock.workJobId === job.id);
    const records = (lineId: string) =>
      parts.partsUsed.filter((part) => part.workJobId === job.id && part.lineId === lineId);
    return {
      id: job.id,
      title: job.title,
      cause: cause ? { family: cause.family, words: mark ? `${cause.title}, ${mark.mark}` : cause.title } : null,
      soldMinutes: job.soldMinutes,
      workedMinutes: minutesWorked({ ...parts, clocks: clocks.filter((clock) => clock.endedAt) }, job.id, now),
      running: clocks
        .filter((clock) => !clock.endedAt)
        .map((clock) => ({
          personName: clock.personName,
          isMe: clock.personId === ctx.actor.id,
          since: clock.startedAt.toISOString(),
        })),
      state: job.state as WorkJobView["state"],
      outcome:
        job.state === "done"
          ? `${job.correction ?? ""} ${job.doneByName ?? ""}, ${job.doneAt ? when(job.doneAt) : ""}`.trim()
          : job.state === "struck"
            ? `Struck: ${job.strikeReason ?? ""}`
            : undefined,
      parts: job.lines
        .filter((line) => line.kind === "part")
        .map((line) => ({
          lineId: line.id,
          description: line.description,
          partNumber: line.partNumber ?? null,
          condition: line.condition ?? null,
          agreedMilli: line.quantityMilli,
          hasOldPart: true,
          records: records(line.id).map((part) => ({
            id: part.id,
            quantityMilli: part.quantityMilli,
            status: part.status as WorkJobView["parts"][number]["records"][number]["status"],
            oldPart: part.oldPart as WorkJobView["parts"][number]["records"][number]["oldPart"],
            note:
              part.status === "ordered" && part.arrivesOn
                ? `due ${part.arrivesOn}`
                : formatClock(part.at.toISOString(), settings.timeZone),
          })),
        })),
      notes: parts.notes
        .filter((note) => note.workJobId === job.id)
        .map((note) => ({ id: note.id, text: note.text, words: `${note.byName}, ${when(note.at)}` })),
      photos: parts.files
        .filter((file) => file.workJobId === job.id && file.state === "ready")
        .map((file) => ({
          id: file.id,
          src: `/api/files/${file.id}?size=thumb`,
          alt: file.caption ?? `Photo by ${file.byName}`,
        })),
    };
  });
}

export function repairTitle(view: CaseView): string {
  const jobs = view.parts.workJobs.filter((job) => job.state !== "struck");
  if (jobs.length === 0) return "Repair, nothing agreed yet";
  const open = jobs.filter((job) => job.state === "approved").length;
  const agreed = jobs.length === 1 ? "one job agreed" : `${countWord(jobs.length)} jobs agreed`;
  return capitalise(open === 0 ? `repair, ${agreed} and done` : `repair, ${agreed}`);
}

/** What the customer agreed to. */
export function agreedRows(view: CaseView) {
  const { approvals, workJobs } = view.parts;
  const { settings, now } = view;
  const total = workJobs.filter((job) => job.state !== "struck").reduce((sum, job) => sum + job.approvedMinor, 0);
  const rows: { label: string; value: string; isAmount?: boolean }[] = [];
  if (workJobs.length > 0)
    rows.push({
      label: workJobs.length === 1 ? "The job, tax included" : "All jobs, tax included",
      value: formatPrice(total, settings.currency, settings.locale),
      isAmount: true,
    });
  for (const approval of approvals) {
    rows.push({
      label: "By",
      value: `${approval.givenBy}, ${HOWS[approval.how] ?? approval.how}, ${formatWhen(approval.at.toISOString(), now.toISOString(), settings.timeZone)}`,
    });
  }
  const keep = approvals.some((approval) => approval.keepParts) || view.parts.row.keepParts;
  rows.push({ label: "Old parts", value: keep ? "keep them for the customer" : "need not be kept" });
  return rows;
}

/** Dangers of the work at hand; they defer to the maker's procedure and block nothing. */
export function repairCautions(view: CaseView): { title: string; text: string }[] {
  const causes = new Set(view.parts.workJobs.map((job) => job.causeId ?? ""));
  const has = (pattern: RegExp) => [...causes].some((cause) => pattern.test(cause));
  const cautions: { title: string; text: string }[] = [];
  if (has(/fuel|injector|regulator|purge|evap|tank/)) {
    const isDirect = view.caseFile.vehicle.fuelSystem?.includes("direct");
    cautions.push({
      title: "Fuel under pressure:",
      text: isDirect
        ? "confirm zero pressure before anything is opened; injectors are driven at 55 to 120 V, no unplugging while running. No flame, extinguisher at hand. The maker’s procedure comes first."
        : "relieve the pressure, catch the spill, no flame or hot lamp, extinguisher at hand. The maker’s procedure comes first.",
    });
  }
  if (has(/ignition|coil|plug|distributor|timing/))
    cautions.push({
      title: "Ignition high voltage:",
      text: "engine off before leads or coils are touched; keep clear with a pacemaker.",
    });
  if (has(/exhaust|catalyst|egr|o2/))
    cautions.push({
      title: "Hot exhaust:",
      text: "let it cool; extraction on while it runs indoors: carbon monoxide.",
    });
  if (has(/brake/))
    cautions.push({
      title: "Brake assist:",
      text: "it is lost while the booster is off. Do not move the vehicle under power until it is checked.",
    });
  if (cautions.length === 0)
    cautions.push({
      title: "Running engine:",
      text: "extraction on, hands clear of belts and fans. The maker’s procedure comes first.",
    });
  return cautions;
}
