import "server-only";
import { and, asc, eq } from "drizzle-orm";
import { people, shops } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { notFound } from "@/lib/errors";
import { shopSettings } from "@/lib/shops/schema";
import { readIn } from "../verb";

/** The shop, its settings and the people who work there. */
export async function readShop(ctx: Ctx) {
  return readIn(ctx, "case.read", async (tx) => {
    const [shop] = await tx.select().from(shops).where(eq(shops.shopId, ctx.shopId));
    if (!shop) throw notFound("The shop");
    const staff = await tx
      .select()
      .from(people)
      .where(and(eq(people.shopId, ctx.shopId), eq(people.isActive, true)))
      .orderBy(asc(people.name));
    return { shop, settings: shopSettings.parse(shop.settings), staff };
  });
}
