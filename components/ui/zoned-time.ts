/** Wall-clock time of the shop ("2026-12-01T16:30", as a date field holds it) to an instant, and back. */

function wallClock(instant: number, timeZone: string): number {
  const parts = new Intl.DateTimeFormat("en-GB", {
    timeZone,
    year: "numeric",
    month: "2-digit",
    day: "2-digit",
    hour: "2-digit",
    minute: "2-digit",
    hourCycle: "h23",
  }).formatToParts(new Date(instant));
  const get = (type: string) => Number(parts.find((part) => part.type === type)?.value ?? 0);
  return Date.UTC(get("year"), get("month") - 1, get("day"), get("hour"), get("minute"));
}

export function zonedToIso(local: string, timeZone: string): string | null {
  if (!/^\d{4}-\d\d-\d\dT\d\d:\d\d/.test(local)) return null;
  const wanted = Date.parse(`${local.slice(0, 16)}:00Z`);
  if (Number.isNaN(wanted)) return null;
  let instant = wanted - (wallClock(wanted, timeZone) - wanted);
  // Once more, for the hours around a change of the clocks.
  instant -= wallClock(instant, timeZone) - wanted;
  return new Date(instant).toISOString();
}

export function isoToZoned(iso: string, timeZone: string): string {
  return new Date(wallClock(Date.parse(iso), timeZone)).toISOString().slice(0, 16);
}
