import type { AuditEntryView, AuditFieldView } from "@/components/audit/model";
import { formatClockSeconds, formatShortDate } from "@/components/ui/format";
import { ROLE_WORDS } from "@/lib/auth/role-words";

/** A row of the audit as it is stored. */
export interface AuditRow {
  seq: number;
  at: Date;
  actorId: string;
  actorName: string;
  role: string;
  requestId: string;
  verb: string;
  reason: string | null;
  entity: string;
  entityId: string;
  caseId: string | null;
  action: string;
  before: Record<string, unknown> | null;
  after: Record<string, unknown> | null;
  previousHash: string;
  hash: string;
}

const DID: Record<string, string> = { insert: "added", update: "changed", delete: "took out" };

const ENTITY_WORDS: Record<string, string> = {
  approvals: "Answer",
  authorizations: "Yes to diagnosis",
  case_codes: "Code",
  case_notes: "Note",
  cases: "Case",
  cause_marks: "Mark on a cause",
  clock_entries: "Clock",
  customer_links: "Link",
  customers: "Customer",
  files: "File",
  labour_rates: "Labour rate",
  mails: "Message",
  operations: "Operation",
  papers: "Paper",
  parts: "Part",
  parts_used: "Part used",
  payments: "Payment",
  people: "Person",
  questions: "Question",
  quote_drafts: "Quote",
  quote_jobs: "Job of the quote",
  quote_revisions: "Revision",
  samples: "Sample",
  set_jobs: "Set job",
  shops: "Settings",
  stage_events: "Stage",
  test_outcomes: "Test",
  vehicles: "Vehicle",
  work_jobs: "Agreed job",
};

/** Columns that say nothing to a reader, or stand elsewhere in the entry. */
const QUIET = new Set(["shop_id", "id", "case_id", "search_text", "version"]);

const fieldName = (column: string) => {
  const words = column
    .replace(/_minor$/, "")
    .replace(/_milli$/, "")
    .replaceAll("_", " ");
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}`;
};

function shown(value: unknown, column: string): string {
  if (value === null || value === undefined || value === "") return "nothing";
  if (typeof value === "boolean") return value ? "yes" : "no";
  if (typeof value === "number" && column.endsWith("_minor")) return (value / 100).toFixed(2);
  if (typeof value === "number" && column.endsWith("_milli")) return String(value / 1000);
  if (typeof value === "object") return JSON.stringify(value).slice(0, 300);
  return String(value).slice(0, 300);
}

function fieldsOf(row: AuditRow): AuditFieldView[] {
  const columns = [...new Set([...Object.keys(row.before ?? {}), ...Object.keys(row.after ?? {})])].filter(
    (column) => !QUIET.has(column),
  );
  return columns
    .map((column) => {
      const before = row.before ? shown(row.before[column], column) : "";
      const after = row.after ? shown(row.after[column], column) : "";
      return {
        name: fieldName(column),
        before,
        after,
        isChanged: before !== after,
        numeric: /_minor$|_milli$|_km$|count|number/.test(column),
      };
    })
    .filter((field) => field.isChanged || row.action === "update");
}

function whatOf(row: AuditRow, fields: AuditFieldView[]): string {
  if (row.action === "update")
    return fields
      .filter((field) => field.isChanged)
      .map((field) => field.name.toLowerCase())
      .slice(0, 4)
      .join(", ");
  const body = row.after ?? row.before ?? {};
  const telling = [
    "name",
    "title",
    "code",
    "text",
    "to_stage",
    "test_id",
    "cause_id",
    "mode",
    "subject",
    "label",
    "given_by",
    "description",
  ].find((key) => typeof body[key] === "string" && body[key]);
  return telling ? String(body[telling]).slice(0, 80) : "";
}

export interface EntryOptions {
  timeZone: string;
  withDay?: boolean;
  /** Case numbers by id, to name the case an entry belongs to. */
  caseNumbers?: ReadonlyMap<string, number>;
}

/** Entries as the audit table shows them; the neighbours in the chain are found in the same list. */
export function auditEntryViews(rows: readonly AuditRow[], options: EntryOptions): AuditEntryView[] {
  const bySeq = new Map(rows.map((row) => [row.seq, row]));
  return rows.map((row) => {
    const fields = fieldsOf(row);
    const next = bySeq.get(row.seq + 1);
    const previous = bySeq.get(row.seq - 1);
    const clock = formatClockSeconds(row.at.toISOString(), options.timeZone);
    const number = row.caseId ? options.caseNumbers?.get(row.caseId) : undefined;
    return {
      seq: row.seq,
      time: options.withDay ? `${formatShortDate(row.at.toISOString(), options.timeZone)}, ${clock}` : clock,
      who: row.actorName,
      role: row.role === "customer" ? "customer, by link" : (ROLE_WORDS[row.role] ?? row.role),
      did: DID[row.action] ?? row.action,
      to: [number, ENTITY_WORDS[row.entity] ?? row.entity].filter(Boolean).join(" "),
      what: whatOf(row, fields),
      fields,
      reason: row.reason ?? undefined,
      requestId: row.requestId,
      touches: row.verb,
      hashes: {
        previous: row.previousHash ? { seq: row.seq - 1, hash: row.previousHash.slice(0, 8) } : null,
        own: row.hash.slice(0, 8),
        next: next ? { seq: next.seq, hash: next.hash.slice(0, 8) } : null,
        agree: (!previous || previous.hash === row.previousHash) && (!next || next.previousHash === row.hash),
      },
    };
  });
}
