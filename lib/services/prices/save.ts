import "server-only";
import { and, eq } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { labourRates, operations, parts, setJobs, shops } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { saveOperationInput, savePartInput, saveRateInput, saveSetJobInput } from "@/lib/cases/price-schema";
import { AppError, invalidField, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { shopSettings } from "@/lib/shops/schema";
import { defineVerb } from "../verb";

type PriceTable = typeof labourRates | typeof operations | typeof parts | typeof setJobs;

/** Writes a row of a price table: a new one without an id, else the one whose version the writer saw. */
async function saveRow(
  tx: Tx,
  ctx: Ctx,
  table: PriceTable,
  kind: string,
  input: { id?: string | null; version?: number | null },
  values: Record<string, unknown>,
): Promise<{ id: string; version: number }> {
  if (!input.id) {
    const id = newId(kind, ctx.now.getTime());
    // biome-ignore lint/suspicious/noExplicitAny: the four tables share these columns; the schema of each verb types the rest
    await tx.insert(table).values({ shopId: ctx.shopId, id, ...values } as any);
    return { id, version: 1 };
  }
  const here = and(eq(table.shopId, ctx.shopId), eq(table.id, input.id));
  const [before] = await tx.select().from(table).where(here).for("update");
  if (!before) throw notFound("The row");
  if (before.version !== input.version)
    throw new AppError("conflict", "Someone else changed this row meanwhile.", { current: before });
  await tx
    .update(table)
    // biome-ignore lint/suspicious/noExplicitAny: as above
    .set({ ...values, version: before.version + 1 } as any)
    .where(here);
  return { id: input.id, version: before.version + 1 };
}

export const saveRate = defineVerb({
  name: "price.saveRate",
  summary: "Save a labour rate",
  action: "price.rates",
  input: saveRateInput,
  async run(tx, ctx, { id, version, name, perHourMinor, purpose, isActive }) {
    if (ctx.actor.role === "writer") {
      const [shop] = await tx.select({ settings: shops.settings }).from(shops).where(eq(shops.shopId, ctx.shopId));
      if (!shopSettings.parse(shop?.settings ?? {}).writersMaySetRates)
        throw new AppError(
          "forbidden",
          "Only the owner may change rates, unless the shop's settings let writers do it.",
        );
    }
    return saveRow(tx, ctx, labourRates, "rate", { id, version }, { name, perHourMinor, purpose, isActive });
  },
});

export const saveOperation = defineVerb({
  name: "price.saveOperation",
  summary: "Save a labour operation",
  action: "price.parts",
  input: saveOperationInput,
  async run(tx, ctx, { id, version, name, hoursMilli, rateId, isActive }) {
    const [rate] = await tx
      .select({ id: labourRates.id })
      .from(labourRates)
      .where(and(eq(labourRates.shopId, ctx.shopId), eq(labourRates.id, rateId)));
    if (!rate) throw invalidField("/rateId", "That labour rate does not exist.");
    return saveRow(tx, ctx, operations, "op", { id, version }, { name, hoursMilli, rateId, isActive });
  },
});

export const savePart = defineVerb({
  name: "price.savePart",
  summary: "Save a part of the price list",
  action: "price.parts",
  input: savePartInput,
  async run(tx, ctx, { id, version, ...values }) {
    return saveRow(tx, ctx, parts, "part", { id, version }, values);
  },
});

export const saveSetJob = defineVerb({
  name: "price.saveSetJob",
  summary: "Save a set job",
  action: "price.setJobs",
  input: saveSetJobInput,
  async run(tx, ctx, { id, version, causeId, ...values }) {
    return saveRow(tx, ctx, setJobs, "set", { id, version }, { ...values, causeId: causeId ?? null });
  },
});
