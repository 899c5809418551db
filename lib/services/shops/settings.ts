import "server-only";
import { eq } from "drizzle-orm";
import { shops } from "@/db/schema";
import { AppError, notFound } from "@/lib/errors";
import { shopSettingsInput } from "@/lib/shops/schema";
import { defineVerb } from "../verb";

export const saveSettings = defineVerb({
  name: "shop.saveSettings",
  summary: "Save the shop's settings",
  action: "settings.edit",
  input: shopSettingsInput,
  async run(tx, ctx, { name, version, settings }) {
    const [before] = await tx.select().from(shops).where(eq(shops.shopId, ctx.shopId)).for("update");
    if (!before) throw notFound("The shop");
    if (before.version !== version)
      throw new AppError("conflict", "Someone else changed the settings meanwhile.", { current: before });
    await tx
      .update(shops)
      .set({ name, settings, version: version + 1 })
      .where(eq(shops.shopId, ctx.shopId));
    return { version: version + 1 };
  },
});
