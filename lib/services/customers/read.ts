import "server-only";
import { and, asc, desc, eq, gt, inArray, lt, or, sql } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { LIST_PAGE, listColumns } from "@/db/queries/case-list";
import { cases, customers, people, samples, vehicles } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { notFound } from "@/lib/errors";
import { readIn } from "../verb";

const PAGE = 50;
const literal = (text: string) => text.replaceAll(/[\\%_]/g, (sign) => `\\${sign}`);

/** Customers by name, phone, e-mail, or the plate or VIN of a vehicle; with their vehicles and how often they came. */
export async function findCustomers(ctx: Ctx, query: string, limit = 12) {
  return readIn(ctx, "case.read", async (tx) => {
    const like = `%${literal(query.toLowerCase())}%`;
    const plate = `%${literal(query.toUpperCase())}%`;
    const byVehicle = tx
      .select({ id: vehicles.customerId })
      .from(vehicles)
      .where(
        and(
          eq(vehicles.shopId, ctx.shopId),
          or(sql`${vehicles.plate} like ${plate}`, sql`${vehicles.vin} like ${plate}`),
        ),
      )
      .limit(limit);
    const found = await tx
      .select()
      .from(customers)
      .where(
        and(
          eq(customers.shopId, ctx.shopId),
          or(
            sql`lower(${customers.name}) like ${like}`,
            sql`lower(${customers.email}) like ${like}`,
            sql`${customers.phone} like ${like}`,
            inArray(customers.id, byVehicle),
          ),
        ),
      )
      .orderBy(asc(customers.name), asc(customers.id))
      .limit(limit);
    if (found.length === 0) return [];
    const ids = found.map((customer) => customer.id);
    const owned = await tx
      .select()
      .from(vehicles)
      .where(and(eq(vehicles.shopId, ctx.shopId), inArray(vehicles.customerId, ids)))
      .orderBy(asc(vehicles.label));
    const visits = await tx
      .select({
        id: cases.id,
        number: cases.number,
        customerId: cases.customerId,
        vehicleId: cases.vehicleId,
        words: cases.words,
        openedAt: cases.openedAt,
        odometerInKm: cases.odometerInKm,
      })
      .from(cases)
      .where(and(eq(cases.shopId, ctx.shopId), inArray(cases.customerId, ids)))
      .orderBy(desc(cases.number))
      .limit(200);
    return found.map((customer) => ({
      customer,
      vehicles: owned.filter((vehicle) => vehicle.customerId === customer.id),
      visits: visits.filter((visit) => visit.customerId === customer.id),
    }));
  });
}

export type FoundCustomer = Awaited<ReturnType<typeof findCustomers>>[number];

/** One page of customers by name. `after` is the last row's name and id. */
export async function listCustomers(ctx: Ctx, after: { name: string; id: string } | null) {
  return readIn(ctx, "case.read", async (tx) => {
    const conditions = [eq(customers.shopId, ctx.shopId)];
    if (after)
      conditions.push(
        or(gt(customers.name, after.name), and(eq(customers.name, after.name), gt(customers.id, after.id)))!,
      );
    const rows = await tx
      .select()
      .from(customers)
      .where(and(...conditions))
      .orderBy(asc(customers.name), asc(customers.id))
      .limit(PAGE + 1);
    const shown = rows.slice(0, PAGE);
    const ids = shown.map((row) => row.id);
    const counts = ids.length
      ? await tx
          .select({
            id: cases.customerId,
            visits: sql<number>`count(*)::int`,
            last: sql<string>`max(${cases.openedAt})`,
          })
          .from(cases)
          .where(and(eq(cases.shopId, ctx.shopId), inArray(cases.customerId, ids)))
          .groupBy(cases.customerId)
      : [];
    return {
      rows: shown.map((row) => {
        const count = counts.find((each) => each.id === row.id);
        return { ...row, visits: count?.visits ?? 0, lastVisit: count?.last ? new Date(count.last) : null };
      }),
      isMore: rows.length > PAGE,
    };
  });
}

export async function readCustomer(ctx: Ctx, id: string) {
  return readIn(ctx, "case.read", async (tx) => {
    const [customer] = await tx
      .select()
      .from(customers)
      .where(and(eq(customers.shopId, ctx.shopId), eq(customers.id, id)));
    if (!customer) throw notFound("The customer");
    const owned = await tx
      .select()
      .from(vehicles)
      .where(and(eq(vehicles.shopId, ctx.shopId), eq(vehicles.customerId, id)))
      .orderBy(asc(vehicles.label));
    const visits = await tx
      .select()
      .from(cases)
      .where(and(eq(cases.shopId, ctx.shopId), eq(cases.customerId, id)))
      .orderBy(desc(cases.number))
      .limit(100);
    return { customer, vehicles: owned, visits };
  });
}

export async function listVehicles(ctx: Ctx, after: { label: string; id: string } | null) {
  return readIn(ctx, "case.read", async (tx) => {
    const conditions = [eq(vehicles.shopId, ctx.shopId)];
    if (after)
      conditions.push(
        or(gt(vehicles.label, after.label), and(eq(vehicles.label, after.label), gt(vehicles.id, after.id)))!,
      );
    const rows = await tx
      .select({ vehicle: vehicles, customerName: customers.name })
      .from(vehicles)
      .innerJoin(customers, and(eq(customers.shopId, vehicles.shopId), eq(customers.id, vehicles.customerId)))
      .where(and(...conditions))
      .orderBy(asc(vehicles.label), asc(vehicles.id))
      .limit(PAGE + 1);
    return { rows: rows.slice(0, PAGE), isMore: rows.length > PAGE };
  });
}

export async function readVehicle(ctx: Ctx, id: string) {
  return readIn(ctx, "case.read", async (tx) => {
    const [row] = await tx
      .select({ vehicle: vehicles, customer: customers })
      .from(vehicles)
      .innerJoin(customers, and(eq(customers.shopId, vehicles.shopId), eq(customers.id, vehicles.customerId)))
      .where(and(eq(vehicles.shopId, ctx.shopId), eq(vehicles.id, id)));
    if (!row) throw notFound("The vehicle");
    const visits = await tx
      .select()
      .from(cases)
      .where(and(eq(cases.shopId, ctx.shopId), eq(cases.vehicleId, id)))
      .orderBy(desc(cases.number))
      .limit(100);
    const ids = visits.map((visit) => visit.id);
    const readings = ids.length
      ? await tx
          .select()
          .from(samples)
          .where(and(eq(samples.shopId, ctx.shopId), inArray(samples.caseId, ids)))
          .orderBy(asc(samples.takenAt))
          .limit(400)
      : [];
    return { ...row, visits, readings };
  });
}

export interface VisitCount {
  visits: number;
  last: Date | null;
}

async function countBy(
  tx: Tx,
  ctx: Ctx,
  column: typeof cases.customerId | typeof cases.vehicleId,
  ids: readonly string[],
): Promise<Map<string, VisitCount>> {
  if (ids.length === 0) return new Map();
  const rows = await tx
    .select({ id: column, visits: sql<number>`count(*)::int`, last: sql<string>`max(${cases.openedAt})` })
    .from(cases)
    .where(and(eq(cases.shopId, ctx.shopId), inArray(column, [...ids])))
    .groupBy(column);
  return new Map(rows.map(({ id, visits, last }) => [id, { visits, last: last ? new Date(last) : null }]));
}

/** How often each customer came, and when last. */
export async function customerVisits(ctx: Ctx, ids: readonly string[]) {
  return readIn(ctx, "case.read", (tx) => countBy(tx, ctx, cases.customerId, ids));
}

/** How often each vehicle came, and when last. */
export async function vehicleVisits(ctx: Ctx, ids: readonly string[]) {
  return readIn(ctx, "case.read", (tx) => countBy(tx, ctx, cases.vehicleId, ids));
}

/** Vehicles by label, plate, VIN or their customer's name. */
export async function findVehicles(ctx: Ctx, query: string, limit = PAGE) {
  return readIn(ctx, "case.read", async (tx) => {
    const like = `%${literal(query.toLowerCase())}%`;
    const plain = `%${literal(query.toUpperCase().replaceAll(/[\s-]+/g, ""))}%`;
    const plate = `%${literal(query.toUpperCase())}%`;
    return tx
      .select({ vehicle: vehicles, customerName: customers.name })
      .from(vehicles)
      .innerJoin(customers, and(eq(customers.shopId, vehicles.shopId), eq(customers.id, vehicles.customerId)))
      .where(
        and(
          eq(vehicles.shopId, ctx.shopId),
          or(
            sql`lower(${vehicles.label}) like ${like}`,
            sql`${vehicles.plate} like ${plate}`,
            sql`replace(${vehicles.plate}, ' ', '') like ${plain}`,
            sql`${vehicles.vin} like ${plain}`,
            sql`lower(${customers.name}) like ${like}`,
          ),
        ),
      )
      .orderBy(asc(vehicles.label), asc(vehicles.id))
      .limit(limit);
  });
}

/** One page of the cases of a customer or of a vehicle, newest first, as the cases list shows them. */
export async function listHistory(ctx: Ctx, of: { customerId: string } | { vehicleId: string }, before: number | null) {
  return readIn(ctx, "case.read", async (tx) => {
    const conditions = [eq(cases.shopId, ctx.shopId)];
    conditions.push("customerId" in of ? eq(cases.customerId, of.customerId) : eq(cases.vehicleId, of.vehicleId));
    if (before) conditions.push(lt(cases.number, before));
    const rows = await tx
      .select({ ...listColumns, openedAt: cases.openedAt })
      .from(cases)
      .innerJoin(customers, and(eq(customers.shopId, cases.shopId), eq(customers.id, cases.customerId)))
      .innerJoin(vehicles, and(eq(vehicles.shopId, cases.shopId), eq(vehicles.id, cases.vehicleId)))
      .leftJoin(people, and(eq(people.shopId, cases.shopId), eq(people.id, cases.technicianId)))
      .where(and(...conditions))
      .orderBy(desc(cases.number))
      .limit(LIST_PAGE + 1);
    const shown = rows.slice(0, LIST_PAGE);
    return { rows: shown, next: rows.length > LIST_PAGE ? (shown.at(-1)?.number ?? null) : null };
  });
}

export type HistoryRow = Awaited<ReturnType<typeof listHistory>>["rows"][number];
