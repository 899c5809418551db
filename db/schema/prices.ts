import { boolean, index, integer, jsonb, pgTable, primaryKey, text, uniqueIndex } from "drizzle-orm/pg-core";
import type { QuoteLineDraft } from "@/lib/cases/quote-schema";
import { id, minor, shopId, version } from "./columns";

export const labourRates = pgTable(
  "labour_rates",
  {
    shopId: shopId(),
    id: id(),
    name: text("name").notNull(),
    perHourMinor: minor("per_hour_minor").notNull(),
    purpose: text("purpose").notNull(),
    isActive: boolean("is_active").notNull().default(true),
    version: version(),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.id] }), uniqueIndex("labour_rates_name").on(t.shopId, t.name)],
);

export const operations = pgTable(
  "operations",
  {
    shopId: shopId(),
    id: id(),
    name: text("name").notNull(),
    hoursMilli: integer("hours_milli").notNull(),
    rateId: text("rate_id").notNull(),
    isActive: boolean("is_active").notNull().default(true),
    version: version(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    uniqueIndex("operations_name").on(t.shopId, t.name),
    index("operations_rate").on(t.shopId, t.rateId),
  ],
);

export const parts = pgTable(
  "parts",
  {
    shopId: shopId(),
    id: id(),
    number: text("number").notNull(),
    name: text("name").notNull(),
    costMinor: minor("cost_minor").notNull(),
    priceMinor: minor("price_minor").notNull(),
    condition: text("condition").notNull(),
    isActive: boolean("is_active").notNull().default(true),
    version: version(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    uniqueIndex("parts_number").on(t.shopId, t.number),
    index("parts_name").on(t.shopId, t.name),
  ],
);

/** A job that is quoted the same way every time, offered when its cause is marked. */
export const setJobs = pgTable(
  "set_jobs",
  {
    shopId: shopId(),
    id: id(),
    name: text("name").notNull(),
    customerTitle: text("customer_title").notNull(),
    causeId: text("cause_id"),
    urgency: text("urgency").notNull(),
    ifWaits: text("if_waits").notNull(),
    lines: jsonb("lines").$type<QuoteLineDraft[]>().notNull(),
    isActive: boolean("is_active").notNull().default(true),
    version: version(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    uniqueIndex("set_jobs_name").on(t.shopId, t.name),
    index("set_jobs_cause").on(t.shopId, t.causeId),
  ],
);
