/**
 * How figures, times and spans are written. Locale and time zone are always passed in: the server and the
 * browser must print the same text.
 */

const MINUS = "−";

/** A number with fixed decimals, a real minus, grouping, and a plus where the sign carries meaning. */
export function formatNumber(value: number, decimals = 0, options: { signed?: boolean; locale?: string } = {}): string {
  const rounded = Number(value.toFixed(decimals));
  const digits = new Intl.NumberFormat(options.locale ?? "en-US", {
    minimumFractionDigits: decimals,
    maximumFractionDigits: decimals,
  }).format(Math.abs(rounded));
  if (rounded < 0) return MINUS + digits;
  return options.signed && rounded > 0 ? `+${digits}` : digits;
}

/** An amount in minor units as a price. The currency's own number of decimals applies. */
export function formatPrice(amountMinor: number, currency: string, locale = "en-US"): string {
  const format = new Intl.NumberFormat(locale, { style: "currency", currency, currencyDisplay: "narrowSymbol" });
  const decimals = format.resolvedOptions().maximumFractionDigits ?? 2;
  const text = format.format(Math.abs(amountMinor) / 10 ** decimals);
  return amountMinor < 0 ? MINUS + text : text;
}

/** Decimals of a currency's minor unit. */
export function currencyDecimals(currency: string): number {
  return new Intl.NumberFormat("en-US", { style: "currency", currency }).resolvedOptions().maximumFractionDigits ?? 2;
}

/** Thousandths as a plain quantity: 2400 → "2.4", 1000 → "1". */
export function formatQuantity(milli: number): string {
  return String(Number((milli / 1000).toFixed(3)));
}

/** Minutes as people say them: "35 min", "2 h 26", "1 d 3 h". */
export function formatSpan(minutes: number): string {
  const whole = Math.max(0, Math.round(minutes));
  if (whole < 60) return `${whole} min`;
  const hours = Math.floor(whole / 60);
  if (hours < 24) {
    const rest = whole % 60;
    return rest === 0 ? `${hours} h` : `${hours} h ${String(rest).padStart(2, "0")}`;
  }
  const days = Math.floor(hours / 24);
  return hours % 24 === 0 ? `${days} d` : `${days} d ${hours % 24} h`;
}

function parts(iso: string, timeZone: string, options: Intl.DateTimeFormatOptions): Record<string, string> {
  const list = new Intl.DateTimeFormat("en-GB", { timeZone, ...options }).formatToParts(new Date(iso));
  return Object.fromEntries(list.map((part) => [part.type, part.value]));
}

/** "13:02" in the shop's time zone. */
export function formatClock(iso: string, timeZone: string): string {
  const p = parts(iso, timeZone, { hour: "2-digit", minute: "2-digit", hourCycle: "h23" });
  return `${p.hour}:${p.minute}`;
}

/** "13:02:41". */
export function formatClockSeconds(iso: string, timeZone: string): string {
  const p = parts(iso, timeZone, { hour: "2-digit", minute: "2-digit", second: "2-digit", hourCycle: "h23" });
  return `${p.hour}:${p.minute}:${p.second}`;
}

/** "1 December 2026", or "1 December" when the year goes without saying. */
export function formatDate(iso: string, timeZone: string, withYear = true): string {
  const p = parts(iso, timeZone, { day: "numeric", month: "long", year: "numeric" });
  return withYear ? `${p.day} ${p.month} ${p.year}` : `${p.day} ${p.month}`;
}

/** "1 Dec". */
export function formatShortDate(iso: string, timeZone: string): string {
  const p = parts(iso, timeZone, { day: "numeric", month: "short" });
  return `${p.day} ${p.month}`;
}

function dayKey(iso: string, timeZone: string): string {
  const p = parts(iso, timeZone, { day: "2-digit", month: "2-digit", year: "numeric" });
  return `${p.year}-${p.month}-${p.day}`;
}

/** "16:30" today, "tomorrow 11:00", "Thu 10:00" within the week, else "9 Dec 10:00". */
export function formatWhen(iso: string, nowIso: string, timeZone: string): string {
  const clock = formatClock(iso, timeZone);
  const day = Date.parse(`${dayKey(iso, timeZone)}T00:00:00Z`);
  const today = Date.parse(`${dayKey(nowIso, timeZone)}T00:00:00Z`);
  const ahead = Math.round((day - today) / 86_400_000);
  if (ahead === 0) return clock;
  if (ahead === 1) return `tomorrow ${clock}`;
  if (ahead === -1) return `yesterday ${clock}`;
  if (ahead > 1 && ahead < 7) return `${parts(iso, timeZone, { weekday: "short" }).weekday} ${clock}`;
  return `${formatShortDate(iso, timeZone)} ${clock}`;
}

/** Minutes since midnight in the shop's time zone. */
export function minuteOfDay(iso: string, timeZone: string): number {
  const p = parts(iso, timeZone, { hour: "2-digit", minute: "2-digit", hourCycle: "h23" });
  return Number(p.hour) * 60 + Number(p.minute);
}

export function isSameDay(a: string, b: string, timeZone: string): boolean {
  return dayKey(a, timeZone) === dayKey(b, timeZone);
}

/** A file's size: "412 kB". */
export function formatBytes(bytes: number): string {
  if (bytes < 1000) return `${bytes} B`;
  if (bytes < 1_000_000) return `${Math.round(bytes / 1000)} kB`;
  return `${(bytes / 1_000_000).toFixed(1)} MB`;
}

const COUNTS = [
  "no",
  "one",
  "two",
  "three",
  "four",
  "five",
  "six",
  "seven",
  "eight",
  "nine",
  "ten",
  "eleven",
  "twelve",
];

/** "three jobs", "1 job" style counts for headings: words up to twelve. */
export function countWord(count: number): string {
  return COUNTS[count] ?? String(count);
}

export function capitalise(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/** A percentage as the screens write it: never 0 or 100 for something that is only likely. */
export function formatShare(share: number): string {
  const percent = Math.round(share * 100);
  if (share > 0 && share < 0.01) return "under 1 %";
  if (percent >= 100 && share < 1) return "over 99 %";
  return `${percent} %`;
}
