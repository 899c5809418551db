import type { AuditEntryView, AuditFieldView } from "@/components/audit/model";
import {
  formatClock,
  formatClockSeconds,
  formatNumber,
  formatPrice,
  formatQuantity,
  formatShortDate,
} from "@/components/ui/format";
import { ROLE_WORDS } from "@/lib/auth/role-words";
import { STAGE_LABELS } from "@/lib/cases/stages";
import { CAUSES } from "@/lib/diagnosis/causes";
import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import type { AuditContext, AuditRow } from "@/lib/services/audit/read";
import { didWords, fieldWords, HIDDEN, SUBJECTS } from "./words";

export interface EntryContext extends AuditContext {
  currency: string;
  locale: string;
  timeZone: string;
  /** The list shows one day only, so the time alone is enough. */
  isOneDay: boolean;
}

type Row = Record<string, unknown>;

const LONGEST = 240;
const UNCHANGED = 6;
const INSTANT = /^\d{4}-\d\d-\d\dT\d\d:\d\d/;

const isPlain = (value: unknown): value is Row => typeof value === "object" && value !== null && !Array.isArray(value);
const isEmpty = (value: unknown) =>
  value === null || value === undefined || value === "" || (Array.isArray(value) && value.length === 0);
const cut = (text: string) => (text.length > LONGEST ? `${text.slice(0, LONGEST)}…` : text);

/** A stored value as a person reads it. */
export function valueWords(name: string, value: unknown, context: EntryContext): string {
  if (isEmpty(value)) return "";
  if (typeof value === "boolean") return value ? "yes" : "no";
  if (typeof value === "number") {
    if (/(_minor|Minor)$/.test(name)) return formatPrice(value, context.currency, context.locale);
    if (/(_milli|Milli)$/.test(name)) return formatQuantity(value);
    if (/probability$/.test(name)) return `${Math.round(value * 100)} %`;
    if (/BasisPoints$/.test(name)) return `${value / 100} %`;
    return formatNumber(value, Number.isInteger(value) ? 0 : Math.min(3, (String(value).split(".")[1] ?? "").length));
  }
  if (typeof value === "string") {
    if (INSTANT.test(value) && !Number.isNaN(Date.parse(value))) {
      const iso = new Date(value).toISOString();
      return `${formatShortDate(iso, context.timeZone)} ${formatClock(iso, context.timeZone)}`;
    }
    if (/(^|_)(technician|person)_id$/.test(name))
      return context.staff.find((person) => person.id === value)?.name ?? value;
    if (/^(stage|to_stage|from_stage|parked_from)$/.test(name))
      return (STAGE_LABELS as Record<string, string>)[value]?.toLowerCase() ?? value;
    if (/^(lead_cause|cause_id)$/.test(name)) return CAUSES[value as keyof typeof CAUSES]?.title ?? value;
    if (name === "case_id") return String(context.caseNumbers.get(value) ?? value);
    return cut(value);
  }
  if (Array.isArray(value)) {
    if (value.every((each) => typeof each === "string" || typeof each === "number")) return cut(value.join(", "));
    return `${value.length} ${value.length === 1 ? "line" : "lines"}`;
  }
  return cut(JSON.stringify(value));
}

/** A row's fields; what holds readings or settings is opened one level, so that only what moved is shown. */
function flat(row: Row | null): Map<string, { label: string; name: string; value: unknown }> {
  const fields = new Map<string, { label: string; name: string; value: unknown }>();
  for (const [name, value] of Object.entries(row ?? {})) {
    if (HIDDEN.has(name)) continue;
    if (!isPlain(value)) {
      fields.set(name, { label: fieldWords(name), name, value });
      continue;
    }
    for (const [inner, each] of Object.entries(value)) {
      const parameter = PARAMETERS[inner as ParameterId];
      const label = parameter ? `${parameter.label}${parameter.unit ? `, ${parameter.unit}` : ""}` : fieldWords(inner);
      fields.set(`${name}.${inner}`, { label, name: inner, value: each });
    }
  }
  return fields;
}

export function fieldViews(row: Pick<AuditRow, "before" | "after">, context: EntryContext): AuditFieldView[] {
  const before = flat(row.before);
  const after = flat(row.after);
  const changed: AuditFieldView[] = [];
  const same: AuditFieldView[] = [];
  for (const key of new Set([...after.keys(), ...before.keys()])) {
    const was = before.get(key);
    const now = after.get(key);
    const field = (now ?? was)!;
    const isChanged = JSON.stringify(was?.value ?? null) !== JSON.stringify(now?.value ?? null);
    if (isEmpty(was?.value) && isEmpty(now?.value)) continue;
    const view: AuditFieldView = {
      name: field.label,
      before: valueWords(field.name, was?.value, context),
      after: valueWords(field.name, now?.value, context),
      isChanged,
      numeric: typeof field.value === "number" || (typeof field.value === "string" && INSTANT.test(field.value)),
    };
    (isChanged ? changed : same).push(view);
  }
  return [...changed, ...same.slice(0, UNCHANGED)];
}

/** What an entry is about, by the names its row carries. */
function nameOf(row: Row): string {
  for (const key of ["title", "name", "label", "description", "code", "text", "subject", "number"]) {
    const value = row[key];
    if (typeof value === "string" && value) return value;
  }
  return "";
}

function toWords(row: AuditRow, context: EntryContext): string {
  const subject = SUBJECTS[row.entity] ?? fieldWords(row.entity);
  const number = row.caseId ? context.caseNumbers.get(row.caseId) : undefined;
  if (row.entity === "cases") return number ? `Case ${number}` : subject;
  return number ? `${number} ${subject}` : subject;
}

function whatWords(row: AuditRow, fields: readonly AuditFieldView[], context: EntryContext): string {
  const whole = (row.after ?? row.before ?? {}) as Row;
  if (row.entity === "stage_events") return `to ${valueWords("to_stage", whole.to_stage, context)}`;
  if (row.action !== "update")
    return (
      cut(nameOf(whole)) ||
      fields
        .filter((field) => field.name !== "Case")
        .slice(0, 2)
        .map((f) => f.after || f.before)
        .join(", ")
    );
  const changed = fields.filter((field) => field.isChanged);
  const [first] = changed;
  if (!first) return "nothing a reader would see";
  const lead = first.before
    ? `${first.name.toLowerCase()} from ${first.before} to ${first.after || "nothing"}`
    : `${first.name.toLowerCase()} ${first.after}`;
  const more = changed.length - 1;
  return more > 0 ? `${lead}, and ${more} more` : lead;
}

const short = (hash: string) => (hash ? `${hash.slice(0, 4)} ${hash.slice(4, 8)}` : "the first");

const FROM: Record<string, string> = { customer: "by link", system: "the worker" };
const WHO: Record<string, string> = { customer: "customer, by link", system: "by itself" };

export function entryView(row: AuditRow, context: EntryContext): AuditEntryView {
  const fields = fieldViews(row, context);
  const previous = context.neighbours.get(row.seq - 1);
  const next = context.neighbours.get(row.seq + 1);
  const at = row.at.toISOString();
  const clock = formatClockSeconds(at, context.timeZone);
  return {
    seq: row.seq,
    time: context.isOneDay ? clock : `${formatShortDate(at, context.timeZone)} ${clock}`,
    who: row.actorName,
    role: WHO[row.role] ?? ROLE_WORDS[row.role] ?? row.role,
    did: didWords(row.verb, row.entity, row.action),
    to: toWords(row, context),
    what: cut(whatWords(row, fields, context)),
    fields,
    reason: row.reason ?? undefined,
    from: FROM[row.role] ?? "signed in",
    requestId: row.requestId === "-" ? undefined : row.requestId.slice(0, 8),
    hashes: {
      previous: previous ? { seq: previous.seq, hash: short(previous.hash) } : null,
      own: short(row.hash),
      next: next ? { seq: next.seq, hash: short(next.hash) } : null,
      agree:
        (previous ? previous.hash === row.previousHash : row.seq === 1 && row.previousHash === "") &&
        (!next || next.previousHash === row.hash),
    },
  };
}
