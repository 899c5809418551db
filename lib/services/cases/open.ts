import "server-only";
import { and, eq, sql } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { caseById } from "@/db/queries/cases";
import { authorizations, cases, counters, customers, people, shops, stageEvents, vehicles } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { mayDo } from "@/lib/auth/permissions";
import { openCaseInput } from "@/lib/cases/schema";
import { AppError, invalidField, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { checkVin } from "@/lib/obd/vin";
import { shopSettings } from "@/lib/shops/schema";
import { currentRates } from "../prices/rates";
import { defineVerb } from "../verb";
import { refreshCase } from "./refresh";

/** The next number of a gapless series: the counter row stays locked until the transaction ends. */
export async function takeNumber(tx: Tx, ctx: Ctx, series: string, first = 1): Promise<number> {
  const [row] = await tx
    .insert(counters)
    .values({ shopId: ctx.shopId, series, next: first + 1 })
    .onConflictDoUpdate({ target: [counters.shopId, counters.series], set: { next: sql`${counters.next} + 1` } })
    .returning({ next: counters.next });
  return row!.next - 1;
}

export function normalPlate(plate: string | undefined): string | null {
  return plate?.trim().toUpperCase().replaceAll(/\s+/g, " ") || null;
}

/** A VIN is kept as typed; only a wrong check digit of a US or Canada form blocks, since there it binds. */
export function acceptVin(vin: string | undefined): string | null {
  if (!vin) return null;
  const result = checkVin(vin);
  if (result.state === "bad_check_digit" && result.binding) {
    throw invalidField(
      "/vehicle/vin",
      `The VIN's check digit does not fit: position 9 should be ${result.expectedCheckDigit ?? "another"}. Read it again.`,
    );
  }
  return result.normalized;
}

/** The model year a VIN names, where it names one: it tells the assessment what the vehicle can't have. */
export function modelYearOf(vin: string | undefined, stated: number | undefined): number | null {
  if (stated) return stated;
  if (!vin) return null;
  const { state, binding, modelYears } = checkVin(vin, { lightVehicle: true });
  return state === "valid" && binding && modelYears.length === 1 ? (modelYears[0] ?? null) : null;
}

export async function requireTechnician(tx: Tx, ctx: Ctx, technicianId: string): Promise<void> {
  const [person] = await tx
    .select({ role: people.role, isActive: people.isActive })
    .from(people)
    .where(and(eq(people.shopId, ctx.shopId), eq(people.id, technicianId)));
  if (!person?.isActive) throw invalidField("/technicianId", "That person does not work here.");
}

export const openCase = defineVerb({
  name: "case.open",
  summary: "Open a case for a vehicle's visit",
  action: "case.open",
  input: openCaseInput,
  async run(tx, ctx, input) {
    const [shop] = await tx.select({ settings: shops.settings }).from(shops).where(eq(shops.shopId, ctx.shopId));
    const settings = shopSettings.parse(shop?.settings ?? {});
    const customerId = await resolveCustomer(tx, ctx, input.customer);
    const vehicleId = await resolveVehicle(tx, ctx, customerId, input.vehicle);
    if (input.technicianId) await requireTechnician(tx, ctx, input.technicianId);
    if (input.authorization && !mayDo(ctx.actor.role, "diagnosis.authorize")) {
      throw new AppError("forbidden", "Only the owner or a service writer may record the yes to the diagnosis.");
    }
    if (input.comebackOf) {
      const first = await caseById(tx, ctx.shopId, input.comebackOf);
      if (!first) throw notFound("The case it comes back from");
      if (first.stage !== "closed" && first.stage !== "released")
        throw new AppError("precondition", `Case ${first.number} is still open; work on in it.`);
    }
    const number = await takeNumber(tx, ctx, "case", 2401);
    const id = newId("case", ctx.now.getTime());
    await tx.insert(cases).values({
      shopId: ctx.shopId,
      id,
      number,
      customerId,
      vehicleId,
      stage: "intake",
      stageSince: ctx.now,
      waitingOn: "counter",
      waitingFor: "",
      complaints: input.complaints,
      words: input.words,
      circumstances: input.circumstances,
      history: input.history,
      conditionNote: input.conditionNote ?? null,
      arrival: input.arrival,
      odometerInKm: input.odometerInKm ?? null,
      odometerUnreadable: input.odometerUnreadable ?? null,
      keepParts: input.keepParts,
      roadTestAllowed: input.roadTestAllowed,
      technicianId: input.technicianId ?? (ctx.actor.role === "technician" ? ctx.actor.id : null),
      promisedAt: input.promisedAt ? new Date(input.promisedAt) : null,
      ceilingMinor: input.authorization?.amountMinor ?? null,
      rates: input.authorization ? await currentRates(tx, ctx) : null,
      site: {},
      readiness: {},
      comebackOfId: input.comebackOf ?? null,
      searchText: "",
      openedAt: ctx.now,
    });
    await tx.insert(stageEvents).values({
      shopId: ctx.shopId,
      id: newId("stg"),
      caseId: id,
      fromStage: null,
      toStage: "intake",
      reason: null,
      byId: ctx.actor.id,
      byName: ctx.actor.name,
      at: ctx.now,
    });
    if (input.authorization) {
      const { amountMinor, givenBy, how, contact, words } = input.authorization;
      await tx.insert(authorizations).values({
        shopId: ctx.shopId,
        id: newId("auth"),
        caseId: id,
        amountMinor,
        currency: settings.currency,
        givenBy,
        how,
        contact: contact ?? null,
        words: words ?? null,
        takenById: ctx.actor.id,
        takenByName: ctx.actor.name,
        at: ctx.now,
      });
    }
    if (input.odometerInKm) {
      await tx
        .update(vehicles)
        .set({ odometerKm: input.odometerInKm })
        .where(and(eq(vehicles.shopId, ctx.shopId), eq(vehicles.id, vehicleId)));
    }
    await refreshCase(tx, ctx, id);
    return { id, number };
  },
});

async function resolveCustomer(
  tx: Tx,
  ctx: Ctx,
  input: ReturnType<typeof openCaseInput.parse>["customer"],
): Promise<string> {
  if ("id" in input) {
    const [found] = await tx
      .select({ id: customers.id })
      .from(customers)
      .where(and(eq(customers.shopId, ctx.shopId), eq(customers.id, input.id)));
    if (!found) throw notFound("The customer");
    return found.id;
  }
  const id = newId("cust", ctx.now.getTime());
  await tx.insert(customers).values({
    shopId: ctx.shopId,
    id,
    name: input.name,
    email: input.email ?? null,
    phone: input.phone ?? null,
    address: input.address ?? null,
    note: input.note ?? null,
    createdAt: ctx.now,
  });
  return id;
}

async function resolveVehicle(
  tx: Tx,
  ctx: Ctx,
  customerId: string,
  input: ReturnType<typeof openCaseInput.parse>["vehicle"],
): Promise<string> {
  if ("id" in input) {
    const here = and(eq(vehicles.shopId, ctx.shopId), eq(vehicles.id, input.id));
    const [found] = await tx.select({ id: vehicles.id, customerId: vehicles.customerId }).from(vehicles).where(here);
    if (!found) throw notFound("The vehicle");
    if (found.customerId !== customerId)
      await tx
        .update(vehicles)
        .set({ customerId, version: sql`${vehicles.version} + 1` })
        .where(here);
    if (input.engine)
      await tx
        .update(vehicles)
        .set({ engine: input.engine, version: sql`${vehicles.version} + 1` })
        .where(here);
    return found.id;
  }
  const id = newId("veh", ctx.now.getTime());
  await tx.insert(vehicles).values({
    shopId: ctx.shopId,
    id,
    customerId,
    label: input.label,
    plate: normalPlate(input.plate),
    vin: acceptVin(input.vin),
    modelYear: modelYearOf(input.vin, input.modelYear),
    engine: input.engine,
    note: input.note ?? null,
    createdAt: ctx.now,
  });
  return id;
}
