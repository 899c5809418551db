import "server-only";
import { and, eq } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { labourRates } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";

/** The shop's labour rates as they stand, by id: a case keeps them from the moment its diagnosis is agreed. */
export async function currentRates(tx: Tx, ctx: Ctx): Promise<Record<string, number>> {
  const rows = await tx
    .select({ id: labourRates.id, purpose: labourRates.purpose, perHourMinor: labourRates.perHourMinor })
    .from(labourRates)
    .where(and(eq(labourRates.shopId, ctx.shopId), eq(labourRates.isActive, true)));
  const rates: Record<string, number> = {};
  for (const row of rows) {
    rates[row.id] = row.perHourMinor;
    rates[row.purpose] ??= row.perHourMinor;
  }
  return rates;
}
