import "server-only";
import { and, eq } from "drizzle-orm";
import { z } from "zod";
import { customers, vehicles } from "@/db/schema";
import { customerInput, idText, vehicleInput } from "@/lib/cases/schema";
import { AppError, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { acceptVin, normalPlate } from "../cases/open";
import { defineVerb } from "../verb";

export const saveCustomerInput = customerInput.extend({ id: idText.optional(), version: z.number().int().optional() });
export const saveVehicleInput = vehicleInput.extend({
  id: idText.optional(),
  version: z.number().int().optional(),
  customerId: idText,
});

export const saveCustomer = defineVerb({
  name: "customer.save",
  summary: "Save a customer",
  action: "customer.edit",
  input: saveCustomerInput,
  async run(tx, ctx, { id, version, name, email, phone, address, note }) {
    const values = { name, email: email ?? null, phone: phone ?? null, address: address ?? null, note: note ?? null };
    if (!id) {
      const made = newId("cust", ctx.now.getTime());
      await tx.insert(customers).values({ shopId: ctx.shopId, id: made, ...values, createdAt: ctx.now });
      return { id: made, version: 1 };
    }
    const here = and(eq(customers.shopId, ctx.shopId), eq(customers.id, id));
    const [before] = await tx.select().from(customers).where(here).for("update");
    if (!before) throw notFound("The customer");
    if (before.version !== version)
      throw new AppError("conflict", "Someone else changed this customer meanwhile.", { current: before });
    await tx
      .update(customers)
      .set({ ...values, version: before.version + 1 })
      .where(here);
    return { id, version: before.version + 1 };
  },
});

export const saveVehicle = defineVerb({
  name: "vehicle.save",
  summary: "Save a vehicle",
  action: "vehicle.edit",
  input: saveVehicleInput,
  async run(tx, ctx, { id, version, customerId, label, plate, vin, modelYear, engine, note }) {
    const values = {
      customerId,
      label,
      plate: normalPlate(plate),
      vin: acceptVin(vin),
      modelYear: modelYear ?? null,
      engine,
      note: note ?? null,
    };
    if (!id) {
      const made = newId("veh", ctx.now.getTime());
      await tx.insert(vehicles).values({ shopId: ctx.shopId, id: made, ...values, createdAt: ctx.now });
      return { id: made, version: 1 };
    }
    const here = and(eq(vehicles.shopId, ctx.shopId), eq(vehicles.id, id));
    const [before] = await tx.select().from(vehicles).where(here).for("update");
    if (!before) throw notFound("The vehicle");
    if (before.version !== version)
      throw new AppError("conflict", "Someone else changed this vehicle meanwhile.", { current: before });
    await tx
      .update(vehicles)
      .set({ ...values, version: before.version + 1 })
      .where(here);
    return { id, version: before.version + 1 };
  },
});
