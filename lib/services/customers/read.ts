import "server-only";
import { and, asc, desc, eq, gt, inArray, or, sql } from "drizzle-orm";
import { cases, customers, samples, vehicles } from "@/db/schema";
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
