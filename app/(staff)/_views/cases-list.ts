import type { CaseGroupView, CaseRowView } from "@/components/cases/model";
import { formatClock, formatSpan, formatWhen, isSameDay } from "@/components/ui/format";
import type { Ctx } from "@/lib/auth/context";
import { type PathStage, STAGE_LABELS, type Stage } from "@/lib/cases/stages";
import { CAUSES } from "@/lib/diagnosis/causes";
import type { CaseList, ListQuery } from "@/lib/services/cases/list";

type Row = CaseList["rows"][number];

const minutesSince = (at: Date, now: Date) => Math.max(0, Math.round((now.getTime() - at.getTime()) / 60_000));

export function promiseView(
  promisedAt: Date | null,
  stage: string,
  now: Date,
  timeZone: string,
): CaseRowView["promise"] {
  if (!promisedAt) return null;
  const isOver = stage === "closed" || stage === "released";
  const iso = promisedAt.toISOString();
  if (!isOver && promisedAt < now) {
    const when = isSameDay(iso, now.toISOString(), timeZone)
      ? formatClock(iso, timeZone)
      : formatWhen(iso, now.toISOString(), timeZone);
    return { words: `Late since ${when}`, isLate: true };
  }
  return { words: formatWhen(iso, now.toISOString(), timeZone), isLate: false };
}

export function causeView(
  row: Pick<Row, "leadCause" | "leadFamily" | "leadProbability" | "leadMark">,
): CaseRowView["cause"] {
  if (!row.leadCause) return null;
  const cause = CAUSES[row.leadCause as keyof typeof CAUSES];
  const note = row.leadMark ?? (row.leadProbability === null ? "" : `${Math.round(row.leadProbability * 100)} %`);
  return { family: cause?.family ?? "mech", label: cause?.title ?? row.leadCause, note };
}

export function caseRowView(row: Row, now: Date, timeZone: string): CaseRowView {
  const held = row.stage === "parked";
  const from = row.parkedFrom as PathStage | null;
  const stage = (held ? from : row.stage === "released" ? "closed" : row.stage) as PathStage;
  return {
    id: row.id,
    number: String(row.number),
    href: `/cases/${row.number}`,
    vehicle: row.modelYear ? `${row.vehicleLabel}, ${row.modelYear}` : row.vehicleLabel,
    plate: row.plate,
    customer: row.customerName,
    complaint: row.words,
    cause: causeView(row),
    stage,
    held,
    stageWords: held && from ? `On hold, ${STAGE_LABELS[from].toLowerCase()}` : STAGE_LABELS[row.stage as Stage],
    since: formatSpan(minutesSince(row.stageSince, now)),
    technician: row.technicianName,
    promise: promiseView(row.promisedAt, row.stage, now, timeZone),
  };
}

function groupTitle(
  row: Row,
  ctx: Ctx,
  order: ListQuery["order"],
  show: ListQuery["show"],
  now: Date,
  timeZone: string,
): string {
  const first = ctx.actor.name.split(" ")[0] ?? ctx.actor.name;
  if (show === "closed") return "Ended in the last seven days";
  if (order === "technician") return row.technicianName ?? "Not yet given";
  if (order === "promise") {
    if (!row.promisedAt) return "No promise";
    if (row.promisedAt < now) return "Late";
    return isSameDay(row.promisedAt.toISOString(), now.toISOString(), timeZone) ? "Today" : "Later";
  }
  switch (row.waitingOn) {
    case "technician":
      if (row.technicianId === ctx.actor.id) return `You, ${first}`;
      return ctx.actor.role === "technician" ? "Another technician" : "A technician";
    case "counter":
      return ctx.actor.role === "technician" ? "The counter" : "The counter: you";
    case "customer":
      return "The customer";
    case "parts":
      return "Parts";
    case "bay":
      return "A free bay";
    case "owner":
      return "The owner";
    default:
      return "Nobody";
  }
}

/** Rows arrive in the order of their groups; this cuts them where the group's title changes. */
export function caseGroups(list: CaseList, ctx: Ctx, query: ListQuery): CaseGroupView[] {
  const { timeZone } = list.settings;
  const groups: { id: string; title: string; rows: Row[] }[] = [];
  for (const row of list.rows) {
    const title = query.query ? "Found" : groupTitle(row, ctx, query.order, query.show, ctx.now, timeZone);
    const last = groups.at(-1);
    if (last?.title === title) last.rows.push(row);
    else groups.push({ id: `${title}-${groups.length}`, title, rows: [row] });
  }
  return groups.map(({ id, title, rows }) => {
    const oldest = Math.max(...rows.map((row) => minutesSince(row.stageSince, ctx.now)));
    const count = `${rows.length} ${rows.length === 1 ? "case" : "cases"}`;
    return {
      id,
      title,
      note: rows.length > 1 ? `${count}, oldest ${formatSpan(oldest)}` : count,
      rows: rows.map((row) => caseRowView(row, ctx.now, timeZone)),
    };
  });
}
