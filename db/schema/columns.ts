import { bigint, customType, integer, text, timestamp } from "drizzle-orm/pg-core";

/** Every business row belongs to a shop; the column leads every key so that the data can be spread by it. */
export const shopId = () => text("shop_id").notNull();
export const id = () => text("id").notNull();
/** Counts writes of a row; a writer who saw an older number gets a conflict, not a silent overwrite. */
export const version = () => integer("version").notNull().default(1);
export const instant = (name: string) => timestamp(name, { withTimezone: true, mode: "date" });
export const createdAt = () => instant("created_at").notNull().defaultNow();
export const minor = (name: string) => bigint(name, { mode: "number" });
export const bytea = customType<{ data: Buffer }>({ dataType: () => "bytea" });
