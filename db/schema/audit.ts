import { bigint, index, jsonb, pgTable, primaryKey, text } from "drizzle-orm/pg-core";
import { instant, shopId } from "./columns";

/**
 * Everything that changed. Written by database triggers only; the app's role may read it and no more.
 * No foreign keys: an entry outlives its subject. `hash` covers the entry and the hash before it.
 */
export const audit = pgTable(
  "audit",
  {
    shopId: shopId(),
    seq: bigint("seq", { mode: "number" }).notNull(),
    at: instant("at").notNull(),
    actorId: text("actor_id").notNull(),
    actorName: text("actor_name").notNull(),
    role: text("role").notNull(),
    requestId: text("request_id").notNull(),
    verb: text("verb").notNull(),
    reason: text("reason"),
    entity: text("entity").notNull(),
    entityId: text("entity_id").notNull(),
    caseId: text("case_id"),
    action: text("action").notNull(),
    before: jsonb("before").$type<Record<string, unknown>>(),
    after: jsonb("after").$type<Record<string, unknown>>(),
    previousHash: text("previous_hash").notNull(),
    hash: text("hash").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.seq] }),
    // the audit page by day
    index("audit_at").on(t.shopId, t.at),
    // the history of a case
    index("audit_of_case").on(t.shopId, t.caseId, t.seq),
    // the history of one row
    index("audit_of_entity").on(t.shopId, t.entity, t.entityId, t.seq),
  ],
);

/** The last entry of each shop's chain, locked while the next one is written. */
export const auditHeads = pgTable(
  "audit_heads",
  {
    shopId: shopId(),
    seq: bigint("seq", { mode: "number" }).notNull(),
    hash: text("hash").notNull(),
  },
  (t) => [primaryKey({ columns: [t.shopId] })],
);
