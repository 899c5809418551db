import { and, eq, getTableColumns, getTableName, sql } from "drizzle-orm";
import type { PgTable } from "drizzle-orm/pg-core";
import type { Tx } from "@/db/client";
import * as t from "@/db/schema";

export type CaseRow = typeof t.cases.$inferSelect;
export type SampleRow = typeof t.samples.$inferSelect;
export type CodeRow = typeof t.caseCodes.$inferSelect;
export type TestRow = typeof t.testOutcomes.$inferSelect;
export type MarkRow = typeof t.causeMarks.$inferSelect;
export type StageEventRow = typeof t.stageEvents.$inferSelect;
export type AuthorizationRow = typeof t.authorizations.$inferSelect;
export type RevisionRow = typeof t.quoteRevisions.$inferSelect;
export type ApprovalRow = typeof t.approvals.$inferSelect;
export type WorkJobRow = typeof t.workJobs.$inferSelect;
export type ClockRow = typeof t.clockEntries.$inferSelect;
export type PartUsedRow = typeof t.partsUsed.$inferSelect;
export type NoteRow = typeof t.caseNotes.$inferSelect;
export type FileRow = typeof t.files.$inferSelect;
export type CustomerRow = typeof t.customers.$inferSelect;
export type VehicleRow = typeof t.vehicles.$inferSelect;
export type QuoteDraftRow = typeof t.quoteDrafts.$inferSelect;
export type QuoteJobRow = typeof t.quoteJobs.$inferSelect;
export type QuestionRow = typeof t.questions.$inferSelect;
export type PaymentRow = typeof t.payments.$inferSelect;
export type PersonRow = typeof t.people.$inferSelect;

export async function caseByNumber(tx: Tx, shopId: string, number: number): Promise<CaseRow | undefined> {
  const [row] = await tx
    .select()
    .from(t.cases)
    .where(and(eq(t.cases.shopId, shopId), eq(t.cases.number, number)));
  return row;
}

export async function caseById(tx: Tx, shopId: string, id: string): Promise<CaseRow | undefined> {
  const [row] = await tx
    .select()
    .from(t.cases)
    .where(and(eq(t.cases.shopId, shopId), eq(t.cases.id, id)));
  return row;
}

/** The case row locked until the transaction ends: writes to one case take turns. */
export async function lockCase(tx: Tx, shopId: string, id: string): Promise<CaseRow | undefined> {
  const [row] = await tx
    .select()
    .from(t.cases)
    .where(and(eq(t.cases.shopId, shopId), eq(t.cases.id, id)))
    .for("update");
  return row;
}

/** The tables of a case, each with the order its rows are read in. */
const OF_CASE = {
  stageEvents: [t.stageEvents, "at, id"],
  authorizations: [t.authorizations, "at, id"],
  samples: [t.samples, "position, id"],
  codes: [t.caseCodes, "at, id"],
  tests: [t.testOutcomes, "at, id", "undone_at is null"],
  marks: [t.causeMarks, "at, id", "withdrawn_at is null"],
  drafts: [t.quoteDrafts, "case_id"],
  quoteJobs: [t.quoteJobs, "position, id"],
  revisions: [t.quoteRevisions, "number desc"],
  approvals: [t.approvals, "at, id"],
  questions: [t.questions, "at, id"],
  workJobs: [t.workJobs, "position, id"],
  clocks: [t.clockEntries, "started_at, id"],
  partsUsed: [t.partsUsed, "at, id"],
  notes: [t.caseNotes, "at, id"],
  files: [t.files, "at, id"],
  payments: [t.payments, "at, id"],
} as const;

type OfCase = { [K in keyof typeof OF_CASE]: (typeof OF_CASE)[K][0]["$inferSelect"][] };

/** A row as JSON gave it, as the table's own type has it: names in camel case, instants as dates. */
function fromJson<T extends PgTable>(table: T, json: Record<string, unknown>): T["$inferSelect"] {
  const row: Record<string, unknown> = {};
  for (const [key, column] of Object.entries(getTableColumns(table))) {
    const value = json[column.name];
    row[key] = value !== null && value !== undefined && column.dataType === "date" ? new Date(value as string) : value;
  }
  return row as T["$inferSelect"];
}

const childrenSql = Object.entries(OF_CASE)
  .map(([key, [table, order, only]]) => {
    const where = `x.shop_id = $1 and x.case_id = $2${only ? ` and x.${only}` : ""}`;
    return `'${key}', (select coalesce(json_agg(row_to_json(x) order by ${order}), '[]') from ${getTableName(table)} x where ${where})`;
  })
  .join(",\n");

interface FoundPaper {
  id: string;
  caseId: string;
  kind: string;
  number: string;
  title: string;
  sha256: string;
  currency: string;
  totalMinor: number;
  issuedAt: string;
  issuedByName: string;
  bytes: number;
}

type Json = Record<string, unknown>;

/** One statement for the case and everything that hangs on it: a page or a verb costs one round trip, not two dozen. */
function partsQuery(row: CaseRow) {
  const papers = `(select coalesce(json_agg(json_build_object('id', p.id, 'caseId', p.case_id, 'kind', p.kind, 'number', p.number, 'title', p.title,
    'sha256', p.sha256, 'currency', p.currency, 'totalMinor', p.total_minor, 'issuedAt', p.issued_at, 'issuedByName', p.issued_by_name,
    'bytes', octet_length(p.bytes)) order by p.issued_at, p.id), '[]') from papers p where p.shop_id = $1 and p.case_id = $2)`;
  const text = `select json_build_object(${childrenSql},
    'papers', ${papers},
    'people', (select coalesce(json_agg(row_to_json(x)), '[]') from people x where x.shop_id = $1),
    'shop', (select row_to_json(x) from shops x where x.shop_id = $1),
    'customer', (select row_to_json(x) from customers x where x.shop_id = $1 and x.id = $3),
    'vehicle', (select row_to_json(x) from vehicles x where x.shop_id = $1 and x.id = $4),
    'comebackOf', (select json_build_object('id', x.id, 'number', x.number, 'closedAt', x.closed_at) from cases x where x.shop_id = $1 and x.id = $5)) as parts`;
  const values = [row.shopId, row.id, row.customerId, row.vehicleId, row.comebackOfId];
  const chunks = text
    .split(/(\$\d)/)
    .map((piece) => (/^\$\d$/.test(piece) ? sql`${values[Number(piece[1]) - 1]}::text` : sql.raw(piece)));
  return sql.join(chunks, sql.raw(""));
}

/** Everything a case's pages and rules need. */
export async function loadCaseParts(tx: Tx, row: CaseRow) {
  const answer = await tx.execute<{ parts: Record<string, Json & Json[]> }>(partsQuery(row));
  const parts = answer.rows[0]?.parts;
  if (!parts) throw new Error("the case's parts did not load");
  const children = Object.fromEntries(
    Object.entries(OF_CASE).map(([key, [table]]) => [
      key,
      (parts[key] ?? []).map((each: Json) => fromJson(table, each)),
    ]),
  ) as unknown as OfCase;
  const { drafts, ...lists } = children;
  const papers = (parts.papers as unknown as FoundPaper[]).map((paper) => ({
    ...paper,
    issuedAt: new Date(paper.issuedAt),
  }));
  const linked = parts.comebackOf as { id: string; number: number; closedAt: string | null } | null | undefined;
  return {
    row,
    ...lists,
    draft: drafts[0] ?? null,
    papers,
    people: (parts.people as Json[]).map((each) => fromJson(t.people, each)),
    shop: fromJson(t.shops, parts.shop as Json),
    customer: fromJson(t.customers, parts.customer as Json),
    vehicle: fromJson(t.vehicles, parts.vehicle as Json),
    comebackOf: linked ? { ...linked, closedAt: linked.closedAt ? new Date(linked.closedAt) : null } : null,
  };
}

export type CaseParts = Awaited<ReturnType<typeof loadCaseParts>>;
