import {
  boolean,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
} from "drizzle-orm/pg-core";
import type { QuoteLineDraft, RevisionSnapshot } from "@/lib/cases/quote-schema";
import { cases } from "./cases";
import { bytea, id, instant, minor, shopId, version } from "./columns";

const ofCase = () => ({ shopId: shopId(), id: id(), caseId: text("case_id").notNull() });
// biome-ignore lint/suspicious/noExplicitAny: the table type is circular here; drizzle checks the columns by name
const caseKey = (name: string, t: any) =>
  foreignKey({ name, columns: [t.shopId, t.caseId], foreignColumns: [cases.shopId, cases.id] }).onDelete("restrict");

/** What the next revision will say to the customer; one draft a case. */
export const quoteDrafts = pgTable(
  "quote_drafts",
  {
    shopId: shopId(),
    caseId: text("case_id").notNull(),
    headline: text("headline").notNull(),
    finding: text("finding").notNull(),
    readyAt: instant("ready_at"),
    warranty: text("warranty").notNull(),
    /** What the diagnosis costs, when the writer asks less than the clock says; never above the agreed ceiling. */
    diagnosisNetMinor: minor("diagnosis_net_minor"),
    version: version(),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.caseId] }), caseKey("quote_drafts_case", t)],
);

export const quoteJobs = pgTable(
  "quote_jobs",
  {
    ...ofCase(),
    position: integer("position").notNull(),
    causeId: text("cause_id"),
    title: text("title").notNull(),
    customerTitle: text("customer_title").notNull(),
    urgency: text("urgency").notNull(),
    ifWaits: text("if_waits").notNull(),
    dependsOnId: text("depends_on_id"),
    isSafety: boolean("is_safety").notNull().default(false),
    lines: jsonb("lines").$type<QuoteLineDraft[]>().notNull(),
    version: version(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("quote_jobs_case", t),
    index("quote_jobs_of_case").on(t.shopId, t.caseId, t.position),
  ],
);

/** A sent quote, word for word and cent for cent. Only its standing (withdrawn, superseded, first opened) may change. */
export const quoteRevisions = pgTable(
  "quote_revisions",
  {
    ...ofCase(),
    number: integer("number").notNull(),
    snapshot: jsonb("snapshot").$type<RevisionSnapshot>().notNull(),
    sha256: text("sha256").notNull(),
    currency: text("currency").notNull(),
    totalMinor: minor("total_minor").notNull(),
    sentAt: instant("sent_at").notNull(),
    sentById: text("sent_by_id").notNull(),
    sentByName: text("sent_by_name").notNull(),
    expiresAt: instant("expires_at").notNull(),
    firstOpenedAt: instant("first_opened_at"),
    withdrawnAt: instant("withdrawn_at"),
    supersededAt: instant("superseded_at"),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("quote_revisions_case", t),
    uniqueIndex("quote_revisions_number").on(t.shopId, t.caseId, t.number),
  ],
);

/** A private address sent to a customer. Only the hash of its secret is kept. */
export const customerLinks = pgTable(
  "customer_links",
  {
    ...ofCase(),
    kind: text("kind").notNull(),
    targetId: text("target_id").notNull(),
    secretHash: text("secret_hash").notNull(),
    sentTo: text("sent_to"),
    expiresAt: instant("expires_at").notNull(),
    revokedAt: instant("revoked_at"),
    createdAt: instant("created_at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("customer_links_case", t),
    uniqueIndex("customer_links_hash").on(t.shopId, t.secretHash),
    index("customer_links_target").on(t.shopId, t.targetId),
  ],
);

/** The one answer to a revision: job by job, by whom, how, when. */
export const approvals = pgTable(
  "approvals",
  {
    ...ofCase(),
    revisionId: text("revision_id").notNull(),
    revisionSha256: text("revision_sha256").notNull(),
    how: text("how").notNull(),
    givenBy: text("given_by").notNull(),
    contact: text("contact"),
    words: text("words"),
    answers: jsonb("answers").$type<{ jobId: string; answer: "yes" | "not-now"; reason?: string }[]>().notNull(),
    keepParts: boolean("keep_parts").notNull(),
    totalMinor: minor("total_minor").notNull(),
    currency: text("currency").notNull(),
    address: text("address"),
    userAgent: text("user_agent"),
    takenById: text("taken_by_id").notNull(),
    takenByName: text("taken_by_name").notNull(),
    at: instant("at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("approvals_case", t),
    // double taps and two open phones meet here
    uniqueIndex("approvals_once").on(t.shopId, t.revisionId),
    index("approvals_of_case").on(t.shopId, t.caseId, t.at),
  ],
);

export const questions = pgTable(
  "questions",
  {
    ...ofCase(),
    revisionId: text("revision_id").notNull(),
    fromCustomer: boolean("from_customer").notNull(),
    text: text("text").notNull(),
    byName: text("by_name").notNull(),
    at: instant("at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("questions_case", t),
    index("questions_of_case").on(t.shopId, t.caseId, t.at),
  ],
);

/** A job the customer said yes to, with the price it may not exceed. */
export const workJobs = pgTable(
  "work_jobs",
  {
    ...ofCase(),
    revisionId: text("revision_id").notNull(),
    quoteJobId: text("quote_job_id").notNull(),
    position: integer("position").notNull(),
    causeId: text("cause_id"),
    title: text("title").notNull(),
    approvedMinor: minor("approved_minor").notNull(),
    soldMinutes: integer("sold_minutes").notNull(),
    lines: jsonb("lines").$type<QuoteLineDraft[]>().notNull(),
    state: text("state").notNull(),
    strikeReason: text("strike_reason"),
    correction: text("correction"),
    doneAt: instant("done_at"),
    doneByName: text("done_by_name"),
    version: version(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("work_jobs_case", t),
    uniqueIndex("work_jobs_once").on(t.shopId, t.revisionId, t.quoteJobId),
    index("work_jobs_of_case").on(t.shopId, t.caseId, t.position),
  ],
);

export const clockEntries = pgTable(
  "clock_entries",
  {
    ...ofCase(),
    workJobId: text("work_job_id"),
    personId: text("person_id").notNull(),
    personName: text("person_name").notNull(),
    startedAt: instant("started_at").notNull(),
    endedAt: instant("ended_at"),
    correctedReason: text("corrected_reason"),
    version: version(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("clock_entries_case", t),
    index("clock_entries_of_case").on(t.shopId, t.caseId, t.startedAt),
    // who is on the clock now; hours of a week for the owner's report
    index("clock_entries_of_person").on(t.shopId, t.personId, t.startedAt),
  ],
);

export const partsUsed = pgTable(
  "parts_used",
  {
    ...ofCase(),
    workJobId: text("work_job_id").notNull(),
    lineId: text("line_id"),
    description: text("description").notNull(),
    partNumber: text("part_number"),
    quantityMilli: integer("quantity_milli").notNull(),
    condition: text("condition").notNull(),
    oldPart: text("old_part").notNull(),
    status: text("status").notNull(),
    arrivesOn: text("arrives_on"),
    byName: text("by_name").notNull(),
    at: instant("at").notNull(),
    version: version(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("parts_used_case", t),
    index("parts_used_of_job").on(t.shopId, t.caseId, t.workJobId),
  ],
);

/** An issued paper: its data, its bytes, its sum. Never changed; a mistake is answered by another paper. */
export const papers = pgTable(
  "papers",
  {
    ...ofCase(),
    kind: text("kind").notNull(),
    number: text("number").notNull(),
    title: text("title").notNull(),
    snapshot: jsonb("snapshot").notNull(),
    bytes: bytea("bytes").notNull(),
    sha256: text("sha256").notNull(),
    currency: text("currency").notNull(),
    totalMinor: minor("total_minor").notNull(),
    issuedAt: instant("issued_at").notNull(),
    issuedByName: text("issued_by_name").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("papers_case", t),
    uniqueIndex("papers_number").on(t.shopId, t.kind, t.number),
    index("papers_of_case").on(t.shopId, t.caseId, t.issuedAt),
  ],
);

export const payments = pgTable(
  "payments",
  {
    ...ofCase(),
    paperId: text("paper_id").notNull(),
    how: text("how").notNull(),
    amountMinor: minor("amount_minor").notNull(),
    currency: text("currency").notNull(),
    reference: text("reference"),
    takenByName: text("taken_by_name").notNull(),
    at: instant("at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("payments_case", t),
    index("payments_of_paper").on(t.shopId, t.paperId, t.at),
  ],
);

/** Mail to go out, one row a message; the job carries only its id, and `sentAt` makes a second delivery a no-op. */
export const mails = pgTable(
  "mails",
  {
    shopId: shopId(),
    id: id(),
    caseId: text("case_id"),
    kind: text("kind").notNull(),
    toAddress: text("to_address").notNull(),
    subject: text("subject").notNull(),
    text: text("text").notNull(),
    html: text("html").notNull(),
    paperId: text("paper_id"),
    createdAt: instant("created_at").notNull(),
    sentAt: instant("sent_at"),
    lastError: text("last_error"),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.id] }), index("mails_of_case").on(t.shopId, t.caseId, t.createdAt)],
);
