import { boolean, foreignKey, integer, jsonb, pgTable, primaryKey, text, uniqueIndex } from "drizzle-orm/pg-core";
import type { ShopSettings } from "@/lib/shops/schema";
import { createdAt, id, instant, shopId, version } from "./columns";

/** A shop's own settings. The row appears when its organization is made (trigger `mirror_organization`). */
export const shops = pgTable(
  "shops",
  {
    shopId: shopId(),
    name: text("name").notNull(),
    settings: jsonb("settings").$type<ShopSettings>().notNull(),
    version: version(),
    createdAt: createdAt(),
  },
  (t) => [primaryKey({ columns: [t.shopId] })],
);

/** Who works here, as the membership tables say; rows stay when a person leaves so that old work keeps its name. */
export const people = pgTable(
  "people",
  {
    shopId: shopId(),
    id: id(),
    name: text("name").notNull(),
    email: text("email").notNull(),
    role: text("role").notNull(),
    isActive: boolean("is_active").notNull().default(true),
    createdAt: createdAt(),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.id] })],
);

/** Next number of each gapless series. Locked by the transaction that takes one, so a failure gives it back. */
export const counters = pgTable(
  "counters",
  {
    shopId: shopId(),
    series: text("series").notNull(),
    next: integer("next").notNull(),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.series] })],
);

/** First answer of every write that carried an idempotency key. */
export const idempotency = pgTable(
  "idempotency",
  {
    shopId: shopId(),
    key: text("key").notNull(),
    verb: text("verb").notNull(),
    actorId: text("actor_id").notNull(),
    inputHash: text("input_hash").notNull(),
    answer: jsonb("answer"),
    at: instant("at").notNull().defaultNow(),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.actorId, t.key] })],
);

export const customers = pgTable(
  "customers",
  {
    shopId: shopId(),
    id: id(),
    name: text("name").notNull(),
    email: text("email"),
    phone: text("phone"),
    address: text("address"),
    note: text("note"),
    version: version(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    // the customers page, sorted by name
    uniqueIndex("customers_by_name").on(t.shopId, t.name, t.id),
  ],
);

export const vehicles = pgTable(
  "vehicles",
  {
    shopId: shopId(),
    id: id(),
    customerId: text("customer_id").notNull(),
    label: text("label").notNull(),
    plate: text("plate"),
    vin: text("vin"),
    modelYear: integer("model_year"),
    /** What the assessment needs to know of the engine; the shape is `CaseVehicle` of the case file. */
    engine: jsonb("engine").$type<Record<string, unknown>>().notNull(),
    odometerKm: integer("odometer_km"),
    note: text("note"),
    version: version(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    foreignKey({
      name: "vehicles_customer",
      columns: [t.shopId, t.customerId],
      foreignColumns: [customers.shopId, customers.id],
    }).onDelete("restrict"),
    // a customer's vehicles
    uniqueIndex("vehicles_by_customer").on(t.shopId, t.customerId, t.id),
    // found by plate at the counter
    uniqueIndex("vehicles_by_plate").on(t.shopId, t.plate, t.id),
    // found by VIN at the counter
    uniqueIndex("vehicles_by_vin").on(t.shopId, t.vin, t.id),
    // the vehicles page, sorted by label
    uniqueIndex("vehicles_by_label").on(t.shopId, t.label, t.id),
  ],
);
