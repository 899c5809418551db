import { formatMoney } from "@/lib/quote/money";
import { formatQuantity } from "@/lib/quote/quantity";
import type { PaperBase, PaperLine } from "./models";
import type { Words } from "./words";

const MILE_KM = 1.609344; // exact by definition, US NIST Handbook 44, appendix C

export interface Formats {
  money(minor: number): string;
  /** "1 December 2026, 16:52" in the shop's zone. */
  instant(iso: string): string;
  day(iso: string): string;
  quantity(line: Pick<PaperLine, "kind" | "quantityMilli">): string;
  distance(km: number): string;
}

/** How one paper writes amounts, times, quantities and distances. */
export function formatsFor(
  paper: Pick<PaperBase, "language" | "locale" | "timeZone" | "currency" | "vehicle">,
  words: Words,
): Formats {
  const { timeZone, currency } = paper;
  // the language of the paper leads; day before month in English everywhere, so that no date is read two ways
  const locale = paper.locale.startsWith(paper.language) ? paper.locale : paper.language;
  const dateLocale = paper.language === "en" ? "en-GB" : locale;
  const date = new Intl.DateTimeFormat(dateLocale, { timeZone, day: "numeric", month: "long", year: "numeric" });
  const time = new Intl.DateTimeFormat("en-GB", { timeZone, hour: "2-digit", minute: "2-digit", hourCycle: "h23" });
  const whole = new Intl.NumberFormat(locale, { maximumFractionDigits: 0 });
  const day = (iso: string) => date.format(new Date(iso));
  return {
    money: (minor) => plainSpaces(formatMoney(minor, currency, locale)),
    day,
    instant: (iso) => `${day(iso)}, ${time.format(new Date(iso))}`,
    quantity: ({ kind, quantityMilli }) =>
      `${plainSpaces(formatQuantity(quantityMilli, locale))}${kind === "labour" || kind === "diagnosis" ? ` ${words.hours}` : ""}`,
    distance: (km) => `${plainSpaces(whole.format(paper.vehicle.distanceUnit === "mi" ? km / MILE_KM : km))}`,
  };
}

/** Narrow and non-breaking spaces are not in the fonts' tables; a text reader would lose them. */
const plainSpaces = (text: string) => text.replace(/[\u202f\u00a0\u2009]/g, " ");

/** 64 hexadecimal digits in groups of eight. */
export const groupedHash = (sha256: string): string => sha256.match(/.{1,8}/g)?.join(" ") ?? "";
