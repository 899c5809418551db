import type {
  ClosedWeekView,
  ComebackRowView,
  HoursView,
  QuotedWeekView,
  StageTimeView,
  WaitingShareView,
} from "@/components/reports/model";
import type { Family } from "@/components/ui/family";
import { capitalise, countWord, formatPrice, formatSpan } from "@/components/ui/format";
import { PATH, STAGE_LABELS, type Stage } from "@/lib/cases/stages";
import type { Reports, Span } from "@/lib/services/reports/read";

const DAY_MS = 86_400_000;
const percent = (share: number) => `${Math.round(share * 100)} %`;
const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);

/** The Mondays of a span in the shop's time zone, as "2026-11-30". */
export function weeksOf(span: Span): string[] {
  const dayIn = (at: Date) =>
    new Intl.DateTimeFormat("en-CA", {
      timeZone: span.timeZone,
      year: "numeric",
      month: "2-digit",
      day: "2-digit",
    }).format(at);
  const first = new Date(`${dayIn(span.from)}T12:00:00Z`);
  const last = dayIn(span.to);
  // Monday is the first day of a week, as in ISO 8601
  let day = new Date(first.getTime() - ((first.getUTCDay() + 6) % 7) * DAY_MS);
  const weeks: string[] = [];
  while (day.toISOString().slice(0, 10) <= last) {
    weeks.push(day.toISOString().slice(0, 10));
    day = new Date(day.getTime() + 7 * DAY_MS);
  }
  return weeks;
}

export function weekLabel(week: string): string {
  const date = new Date(`${week}T12:00:00Z`);
  return `${date.getUTCDate()} ${date.toLocaleString("en-GB", { month: "short", timeZone: "UTC" })}`;
}

export interface Finding<T> {
  title: string;
  rows: T[];
}

export function stageFinding(stages: Reports["stages"]): Finding<StageTimeView> {
  const order: readonly Stage[] = [...PATH.slice(0, -1), "parked"];
  const rows = order.flatMap((stage) => {
    const found = stages.find((each) => each.stage === stage);
    return found ? [{ ...found, label: STAGE_LABELS[stage] }] : [];
  });
  const longest = rows.reduce<(typeof rows)[number] | null>(
    (best, row) => (row.medianH > (best?.medianH ?? -1) ? row : best),
    null,
  );
  return {
    title: longest ? `${longest.label} takes longest, ${formatSpan(longest.medianH * 60)}` : "No case has moved yet",
    rows: rows.map(({ label, medianH, lowerH, upperH }) => ({ label, medianH, lowerH, upperH })),
  };
}

const PARTY_LABELS = { counter: "Counter", technician: "Technician", customer: "Customer", hold: "On hold" } as const;
const PARTY_SAYS = {
  counter: "The counter has cases for",
  technician: "Technicians have cases for",
  customer: "Customers have cases for",
  hold: "Cases are on hold for",
} as const;

export function waitingFinding(waiting: Reports["waiting"], weeks: readonly string[]): Finding<WaitingShareView> {
  const all = sum(waiting.map((each) => each.hours));
  const parties = (Object.keys(PARTY_LABELS) as (keyof typeof PARTY_LABELS)[])
    .map((party) => ({ party, hours: sum(waiting.filter((each) => each.party === party).map((each) => each.hours)) }))
    .filter(({ hours }) => hours > 0)
    .sort((a, b) => b.hours - a.hours);
  const [most] = parties;
  const totalOf = new Map(
    weeks.map((week) => [week, sum(waiting.filter((each) => each.week === week).map((each) => each.hours))]),
  );
  return {
    title: most ? `${PARTY_SAYS[most.party]} ${percent(most.hours / all)} of the time` : "No case was open",
    rows: parties.map(({ party }) => ({
      label: PARTY_LABELS[party],
      weeks: weeks.map((week) => {
        const own = waiting.find((each) => each.week === week && each.party === party)?.hours ?? 0;
        const total = totalOf.get(week) ?? 0;
        return total > 0 ? own / total : 0;
      }),
    })),
  };
}

export function quotedFinding(
  quoted: Reports["quoted"],
  weeks: readonly string[],
  money: { currency: string; locale: string },
): Finding<QuotedWeekView> {
  const total = sum(quoted.map((week) => week.quotedMinor));
  const open = sum(quoted.map((week) => week.openMinor));
  const yes = sum(quoted.map((week) => week.approvedMinor));
  const answered = total - open;
  const jobs = `${sum(quoted.map((week) => week.yesJobs))} of ${sum(quoted.map((week) => week.jobs))} jobs`;
  const asked = open > 0 ? `, ${formatPrice(open, money.currency, money.locale)} still asked` : "";
  return {
    title:
      total === 0
        ? "Nothing was quoted"
        : answered === 0
          ? `Nothing is answered yet${asked}`
          : `${percent(yes / answered)} of what was answered is agreed: ${jobs}${asked}`,
    rows: weeks.map((week) => {
      const found = quoted.find((each) => each.week === week);
      return {
        label: weekLabel(week),
        quotedMinor: found?.quotedMinor ?? 0,
        approvedMinor: found?.approvedMinor ?? 0,
      };
    }),
  };
}

export function hoursFinding(hours: Reports["hours"]): Finding<HoursView> {
  const sold = sum(hours.map((person) => person.soldH));
  const worked = sum(hours.map((person) => person.workedH));
  const rows = hours.map(({ name, soldH, workedH }) => ({ label: name, soldH, workedH }));
  return {
    title: worked === 0 ? "No agreed job was finished" : `${percent(sold / worked)} of the hours worked are sold`,
    rows: rows.length > 1 ? [...rows, { label: `All ${countWord(rows.length)}`, soldH: sold, workedH: worked }] : rows,
  };
}

const FAMILIES: readonly Family[] = ["lean", "rich", "spark", "mech"];

export function comebackFinding(reports: Pick<Reports, "comebacks" | "ended">, span: Span): Finding<ComebackRowView> {
  const length = Math.max(1, span.to.getTime() - span.from.getTime());
  const closed = sum(reports.ended.map((week) => week.closed));
  const { comebacks } = reports;
  const count = comebacks.length;
  return {
    title:
      count === 0
        ? "None came back"
        : `${capitalise(countWord(count))} came back${closed > 0 ? `, ${percent(count / closed)} of cases closed` : ""}`,
    rows: FAMILIES.map((family) => ({
      family,
      closed: sum(reports.ended.filter((week) => week.family === family).map((week) => week.closed)),
      cases: comebacks
        .filter((comeback) => (comeback.family ?? "mech") === family)
        .map((comeback) => ({
          number: String(comeback.number),
          href: `/cases/${comeback.number}`,
          at: Math.min(1, Math.max(0, (comeback.openedAt.getTime() - span.from.getTime()) / length)),
        })),
    })),
  };
}

export function rankFinding(ranks: Reports["ranks"]): string {
  const all = ranks.first + ranks.second + ranks.third + ranks.lower;
  return all === 0 ? "No cause was proven" : `The proven cause was ranked first in ${percent(ranks.first / all)}`;
}

export function takingsFinding(
  reports: Pick<Reports, "ended" | "money">,
  weeks: readonly string[],
  money: { currency: string; locale: string },
): Finding<ClosedWeekView> {
  const paid = sum(reports.money.map((week) => week.paidMinor));
  const closed = sum(reports.ended.map((week) => week.closed));
  const cases = closed === 1 ? "one case closed" : `${countWord(closed)} cases closed`;
  return {
    title: `${formatPrice(paid, money.currency, money.locale)} taken, ${cases}`,
    rows: weeks.map((week) => {
      const own = reports.ended.filter((each) => each.week === week);
      const sums = reports.money.find((each) => each.week === week);
      return {
        label: weekLabel(week),
        closed: sum(own.map((each) => each.closed)),
        released: sum(own.map((each) => each.released)),
        invoicedMinor: sums?.invoicedMinor ?? 0,
        paidMinor: sums?.paidMinor ?? 0,
      };
    }),
  };
}
