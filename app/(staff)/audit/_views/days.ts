import type { ChainDayView } from "@/components/audit/model";
import { zonedToIso } from "@/components/ui/zoned-time";

interface CountedDay {
  day: string;
  entries: number;
  first: number;
  last: number;
}

const DAY_MS = 86_400_000;

/** The day of an instant in a time zone, as "2026-12-01". */
export function dayOf(at: Date, timeZone: string): string {
  return new Intl.DateTimeFormat("en-CA", { timeZone, year: "numeric", month: "2-digit", day: "2-digit" }).format(at);
}

const next = (day: string) => new Date(Date.parse(`${day}T12:00:00Z`) + DAY_MS).toISOString().slice(0, 10);

/** The instants a day begins and ends at in a time zone, or null for what is no day. */
export function dayBounds(day: string, timeZone: string): { from: Date; to: Date } | null {
  if (!/^\d{4}-\d\d-\d\d$/.test(day) || Number.isNaN(Date.parse(day))) return null;
  const from = zonedToIso(`${day}T00:00`, timeZone);
  const to = zonedToIso(`${next(day)}T00:00`, timeZone);
  return from && to ? { from: new Date(from), to: new Date(to) } : null;
}

/** Every day of the last month, those without an entry too, with the day a break lies on. */
export function chainDays(
  counted: readonly CountedDay[],
  fault: { seq: number } | null,
  now: Date,
  timeZone: string,
): ChainDayView[] {
  const today = dayOf(now, timeZone);
  const byDay = new Map(counted.map((day) => [day.day, day]));
  const days: ChainDayView[] = [];
  for (let day = dayOf(new Date(now.getTime() - 29 * DAY_MS), timeZone); day <= today; day = next(day)) {
    const found = byDay.get(day);
    const date = new Date(`${day}T12:00:00Z`);
    const isBroken = fault && found && fault.seq >= found.first && fault.seq <= found.last;
    days.push({
      day,
      label: `${date.getUTCDate()} ${date.toLocaleString("en-GB", { month: "short", timeZone: "UTC" })}`,
      entries: found?.entries ?? 0,
      ...(isBroken ? { breakAt: fault.seq } : {}),
    });
  }
  return days;
}
