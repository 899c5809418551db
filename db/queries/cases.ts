import { and, asc, desc, eq, isNull, sql } from "drizzle-orm";
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

/** Papers without their bytes: lists and pages never need them. */
export const paperColumns = {
  id: t.papers.id,
  caseId: t.papers.caseId,
  kind: t.papers.kind,
  number: t.papers.number,
  title: t.papers.title,
  sha256: t.papers.sha256,
  currency: t.papers.currency,
  totalMinor: t.papers.totalMinor,
  issuedAt: t.papers.issuedAt,
  issuedByName: t.papers.issuedByName,
  bytes: sql<number>`octet_length(${t.papers.bytes})`,
};

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

/** Everything a case's pages and rules need, in one fixed number of queries whatever the case holds. */
export async function loadCaseParts(tx: Tx, row: CaseRow) {
  const { shopId, id: caseId } = row;
  const of = <T extends { shopId: never; caseId: never }>(table: T) =>
    and(eq(table.shopId, shopId), eq(table.caseId, caseId));
  // biome-ignore lint/suspicious/noExplicitAny: `of` takes any table with the two columns
  const own = of as any;
  const [customer] = await tx
    .select()
    .from(t.customers)
    .where(and(eq(t.customers.shopId, shopId), eq(t.customers.id, row.customerId)));
  const [vehicle] = await tx
    .select()
    .from(t.vehicles)
    .where(and(eq(t.vehicles.shopId, shopId), eq(t.vehicles.id, row.vehicleId)));
  const [shop] = await tx.select().from(t.shops).where(eq(t.shops.shopId, shopId));
  const people = await tx.select().from(t.people).where(eq(t.people.shopId, shopId));
  const stageEvents = await tx
    .select()
    .from(t.stageEvents)
    .where(own(t.stageEvents))
    .orderBy(asc(t.stageEvents.at), asc(t.stageEvents.id));
  const authorizations = await tx
    .select()
    .from(t.authorizations)
    .where(own(t.authorizations))
    .orderBy(asc(t.authorizations.at));
  const samples = await tx
    .select()
    .from(t.samples)
    .where(own(t.samples))
    .orderBy(asc(t.samples.position), asc(t.samples.id));
  const codes = await tx
    .select()
    .from(t.caseCodes)
    .where(own(t.caseCodes))
    .orderBy(asc(t.caseCodes.at), asc(t.caseCodes.id));
  const tests = await tx
    .select()
    .from(t.testOutcomes)
    .where(and(own(t.testOutcomes), isNull(t.testOutcomes.undoneAt)))
    .orderBy(asc(t.testOutcomes.at), asc(t.testOutcomes.id));
  const marks = await tx
    .select()
    .from(t.causeMarks)
    .where(and(own(t.causeMarks), isNull(t.causeMarks.withdrawnAt)))
    .orderBy(asc(t.causeMarks.at), asc(t.causeMarks.id));
  const [draft] = await tx.select().from(t.quoteDrafts).where(own(t.quoteDrafts));
  const quoteJobs = await tx
    .select()
    .from(t.quoteJobs)
    .where(own(t.quoteJobs))
    .orderBy(asc(t.quoteJobs.position), asc(t.quoteJobs.id));
  const revisions = await tx
    .select()
    .from(t.quoteRevisions)
    .where(own(t.quoteRevisions))
    .orderBy(desc(t.quoteRevisions.number));
  const approvals = await tx.select().from(t.approvals).where(own(t.approvals)).orderBy(asc(t.approvals.at));
  const questions = await tx.select().from(t.questions).where(own(t.questions)).orderBy(asc(t.questions.at));
  const workJobs = await tx
    .select()
    .from(t.workJobs)
    .where(own(t.workJobs))
    .orderBy(asc(t.workJobs.position), asc(t.workJobs.id));
  const clocks = await tx
    .select()
    .from(t.clockEntries)
    .where(own(t.clockEntries))
    .orderBy(asc(t.clockEntries.startedAt));
  const partsUsed = await tx.select().from(t.partsUsed).where(own(t.partsUsed)).orderBy(asc(t.partsUsed.at));
  const notes = await tx.select().from(t.caseNotes).where(own(t.caseNotes)).orderBy(asc(t.caseNotes.at));
  const files = await tx.select().from(t.files).where(own(t.files)).orderBy(asc(t.files.at));
  const papers = await tx.select(paperColumns).from(t.papers).where(own(t.papers)).orderBy(asc(t.papers.issuedAt));
  const payments = await tx.select().from(t.payments).where(own(t.payments)).orderBy(asc(t.payments.at));
  const linked = row.comebackOfId ? await caseById(tx, shopId, row.comebackOfId) : undefined;
  return {
    row,
    shop: shop!,
    customer: customer!,
    vehicle: vehicle!,
    people,
    stageEvents,
    authorizations,
    samples,
    codes,
    tests,
    marks,
    draft: draft ?? null,
    quoteJobs,
    revisions,
    approvals,
    questions,
    workJobs,
    clocks,
    partsUsed,
    notes,
    files,
    papers,
    payments,
    comebackOf: linked ? { number: linked.number, id: linked.id, closedAt: linked.closedAt } : null,
  };
}

export type CaseParts = Awaited<ReturnType<typeof loadCaseParts>>;
