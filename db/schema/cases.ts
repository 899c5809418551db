import { sql } from "drizzle-orm";
import {
  boolean,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  real,
  text,
  uniqueIndex,
} from "drizzle-orm/pg-core";
import { id, instant, minor, shopId, version } from "./columns";
import { customers, people, vehicles } from "./shops";

/** One vehicle's visit. `searchText` and `waitingOn` are kept by the verbs so that the list is one indexed query. */
export const cases = pgTable(
  "cases",
  {
    shopId: shopId(),
    id: id(),
    number: integer("number").notNull(),
    customerId: text("customer_id").notNull(),
    vehicleId: text("vehicle_id").notNull(),
    stage: text("stage").notNull(),
    stageSince: instant("stage_since").notNull(),
    /** Where a parked case came from and goes back to. */
    parkedFrom: text("parked_from"),
    parkedFor: text("parked_for"),
    /** counter | technician | customer | parts | owner | nobody */
    waitingOn: text("waiting_on").notNull(),
    waitingFor: text("waiting_for").notNull(),
    complaints: text("complaints").array().notNull(),
    words: text("words").notNull(),
    circumstances: text("circumstances").array().notNull(),
    history: text("history").array().notNull(),
    conditionNote: text("condition_note"),
    arrival: text("arrival").notNull(),
    odometerInKm: integer("odometer_in_km"),
    odometerUnreadable: text("odometer_unreadable"),
    odometerOutKm: integer("odometer_out_km"),
    keepParts: boolean("keep_parts").notNull(),
    roadTestAllowed: boolean("road_test_allowed").notNull(),
    technicianId: text("technician_id"),
    promisedAt: instant("promised_at"),
    promiseMoves: integer("promise_moves").notNull().default(0),
    ceilingMinor: minor("ceiling_minor"),
    /** Rates as they stood when the diagnosis was authorized; later price changes do not touch the case. */
    rates: jsonb("rates").$type<Record<string, number>>(),
    site: jsonb("site").$type<{ baroKPa?: number; ambientC?: number }>().notNull(),
    readiness: jsonb("readiness").$type<Record<string, string>>().notNull(),
    /** The codes were read after the repair, even if none was found. */
    afterCodesRead: boolean("after_codes_read").notNull().default(false),
    leadCause: text("lead_cause"),
    leadFamily: text("lead_family"),
    leadProbability: real("lead_probability"),
    leadMark: text("lead_mark"),
    comebackOfId: text("comeback_of_id"),
    safetyNote: text("safety_note"),
    waiver: jsonb("waiver").$type<{ reason: string; by: string; at: string }>(),
    outcome: text("outcome"),
    searchText: text("search_text").notNull(),
    openedAt: instant("opened_at").notNull(),
    closedAt: instant("closed_at"),
    version: version(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    uniqueIndex("cases_number").on(t.shopId, t.number),
    foreignKey({
      name: "cases_customer",
      columns: [t.shopId, t.customerId],
      foreignColumns: [customers.shopId, customers.id],
    }).onDelete("restrict"),
    foreignKey({
      name: "cases_vehicle",
      columns: [t.shopId, t.vehicleId],
      foreignColumns: [vehicles.shopId, vehicles.id],
    }).onDelete("restrict"),
    foreignKey({
      name: "cases_technician",
      columns: [t.shopId, t.technicianId],
      foreignColumns: [people.shopId, people.id],
    }).onDelete("restrict"),
    foreignKey({
      name: "cases_comeback",
      columns: [t.shopId, t.comebackOfId],
      foreignColumns: [t.shopId, t.id],
    }).onDelete("restrict"),
    // the cases list: open work of a shop by whom it waits on
    index("cases_open").on(t.shopId, t.waitingOn, t.number).where(sql`stage not in ('closed', 'released')`),
    // the cases list, everyone's: the open cases alone, however many are closed
    index("cases_open_by_number").on(t.shopId, t.number).where(sql`stage not in ('closed', 'released')`),
    // the cases list by stage (parked, closed this week)
    index("cases_stage").on(t.shopId, t.stage, t.stageSince),
    // "mine": a technician's work
    index("cases_technician_work").on(t.shopId, t.technicianId, t.stage),
    // today's promise line
    index("cases_promised").on(t.shopId, t.promisedAt),
    // history of a customer, of a vehicle, of a comeback
    index("cases_of_customer").on(t.shopId, t.customerId, t.number),
    index("cases_of_vehicle").on(t.shopId, t.vehicleId, t.number),
    index("cases_of_comeback").on(t.shopId, t.comebackOfId),
  ],
);

const ofCase = () => ({ shopId: shopId(), id: id(), caseId: text("case_id").notNull() });
// biome-ignore lint/suspicious/noExplicitAny: the table type is circular here; drizzle checks the columns by name
const caseKey = (name: string, t: any) =>
  foreignKey({ name, columns: [t.shopId, t.caseId], foreignColumns: [cases.shopId, cases.id] }).onDelete("restrict");

/** When a case entered each stage, who moved it and why: time in stage is read from here. */
export const stageEvents = pgTable(
  "stage_events",
  {
    ...ofCase(),
    fromStage: text("from_stage"),
    toStage: text("to_stage").notNull(),
    reason: text("reason"),
    byId: text("by_id").notNull(),
    byName: text("by_name").notNull(),
    at: instant("at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("stage_events_case", t),
    index("stage_events_of_case").on(t.shopId, t.caseId, t.at),
  ],
);

/** A yes to diagnosis, or to a higher ceiling: who gave it, how, in which words, up to how much. */
export const authorizations = pgTable(
  "authorizations",
  {
    ...ofCase(),
    amountMinor: minor("amount_minor").notNull(),
    currency: text("currency").notNull(),
    givenBy: text("given_by").notNull(),
    how: text("how").notNull(),
    contact: text("contact"),
    words: text("words"),
    takenById: text("taken_by_id").notNull(),
    takenByName: text("taken_by_name").notNull(),
    at: instant("at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("authorizations_case", t),
    index("authorizations_of_case").on(t.shopId, t.caseId, t.at),
  ],
);

/** One column of the readings sheet. `values` is what was typed, in internal units, impossible ones too. */
export const samples = pgTable(
  "samples",
  {
    ...ofCase(),
    position: integer("position").notNull(),
    mode: text("mode").notNull(),
    phase: text("phase").notNull(),
    how: text("how"),
    values: jsonb("values").$type<Record<string, unknown>>().notNull(),
    takenAt: instant("taken_at").notNull(),
    takenById: text("taken_by_id").notNull(),
    takenByName: text("taken_by_name").notNull(),
    beforeConsent: boolean("before_consent").notNull().default(false),
    version: version(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("samples_case", t),
    index("samples_of_case").on(t.shopId, t.caseId, t.position),
  ],
);

export const caseCodes = pgTable(
  "case_codes",
  {
    ...ofCase(),
    code: text("code").notNull(),
    status: text("status").notNull(),
    phase: text("phase").notNull(),
    freezeFrame: jsonb("freeze_frame").$type<Record<string, unknown>>(),
    version: version(),
    at: instant("at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("case_codes_case", t),
    uniqueIndex("case_codes_once").on(t.shopId, t.caseId, t.phase, t.code, t.status),
  ],
);

export const testOutcomes = pgTable(
  "test_outcomes",
  {
    ...ofCase(),
    testId: text("test_id").notNull(),
    outcome: text("outcome").notNull(),
    phase: text("phase").notNull(),
    cylinder: integer("cylinder"),
    bank: integer("bank"),
    note: text("note"),
    byId: text("by_id").notNull(),
    byName: text("by_name").notNull(),
    at: instant("at").notNull(),
    undoneAt: instant("undone_at"),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("test_outcomes_case", t),
    index("test_outcomes_of_case").on(t.shopId, t.caseId, t.at),
  ],
);

/** A technician's word on a cause: suspected with a reason, or proven by a test or a reading. */
export const causeMarks = pgTable(
  "cause_marks",
  {
    ...ofCase(),
    causeId: text("cause_id").notNull(),
    mark: text("mark").notNull(),
    reason: text("reason").notNull(),
    provenByTestId: text("proven_by_test_id"),
    /** Rank and probability the assessment gave it at that moment, for the owner's report. */
    rank: integer("rank"),
    probability: real("probability"),
    location: jsonb("location").$type<{ bank: number | null; cylinder: number | null }>(),
    byId: text("by_id").notNull(),
    byName: text("by_name").notNull(),
    at: instant("at").notNull(),
    withdrawnAt: instant("withdrawn_at"),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("cause_marks_case", t),
    index("cause_marks_of_case").on(t.shopId, t.caseId, t.at),
  ],
);

export const caseNotes = pgTable(
  "case_notes",
  {
    ...ofCase(),
    workJobId: text("work_job_id"),
    kind: text("kind").notNull(),
    text: text("text").notNull(),
    byId: text("by_id").notNull(),
    byName: text("by_name").notNull(),
    at: instant("at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("case_notes_case", t),
    index("case_notes_of_case").on(t.shopId, t.caseId, t.at),
  ],
);

/** A stored file of a case. The original stays untouched; `display` and `thumb` are what a worker made of it. */
export const files = pgTable(
  "files",
  {
    ...ofCase(),
    kind: text("kind").notNull(),
    name: text("name").notNull(),
    bytes: integer("bytes").notNull(),
    sha256: text("sha256"),
    contentType: text("content_type").notNull(),
    storageKey: text("storage_key").notNull(),
    displayKey: text("display_key"),
    thumbKey: text("thumb_key"),
    width: integer("width"),
    height: integer("height"),
    state: text("state").notNull(),
    reason: text("reason"),
    caption: text("caption"),
    forCustomer: boolean("for_customer").notNull().default(true),
    workJobId: text("work_job_id"),
    byId: text("by_id").notNull(),
    byName: text("by_name").notNull(),
    at: instant("at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    caseKey("files_case", t),
    index("files_of_case").on(t.shopId, t.caseId, t.at),
  ],
);
