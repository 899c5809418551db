import "server-only";
import { eq } from "drizzle-orm";
import type { z } from "zod";
import { inShop } from "@/db/client";
import { labourRates, shops } from "@/db/schema";
import { auth } from "@/lib/auth/auth";
import { asShopId, type Ctx } from "@/lib/auth/context";
import { signUpInput } from "@/lib/auth/sign-up-schema";
import { AppError } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { shopSettings } from "@/lib/shops/schema";

export interface OpenedShop {
  shopId: string;
  userId: string;
}

/** Signing up makes a person and their shop, with a general and a diagnosis rate to start from. */
export async function openShop(
  raw: z.input<typeof signUpInput>,
  facts: Pick<Ctx, "requestId">,
  now = new Date(),
): Promise<OpenedShop> {
  const input = signUpInput.parse(raw);
  const user = await makeUser(input);
  const slug = `${input.shopName
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, "-")
    .slice(0, 40)}-${newId("s").slice(-6)}`;
  const shop = await auth().api.createOrganization({ body: { name: input.shopName, slug, userId: user.id } });
  if (!shop) throw new AppError("internal", "The shop could not be made. Try again.");
  const ctx: Ctx = { shopId: asShopId(shop.id), actor: { id: user.id, name: user.name, role: "owner" }, now, ...facts };
  await inShop(
    ctx,
    async (tx) => {
      const parsed = shopSettings.safeParse({ email: input.email, timeZone: input.timeZone });
      const settings = parsed.success ? parsed.data : shopSettings.parse({ email: input.email });
      await tx.update(shops).set({ settings }).where(eq(shops.shopId, ctx.shopId));
      await tx.insert(labourRates).values([
        { shopId: ctx.shopId, id: newId("rate"), name: "General", purpose: "general", perHourMinor: 12_000 },
        { shopId: ctx.shopId, id: newId("rate"), name: "Diagnosis", purpose: "diagnosis", perHourMinor: 14_000 },
        { shopId: ctx.shopId, id: newId("rate"), name: "Warranty", purpose: "warranty", perHourMinor: 9_000 },
      ]);
    },
    { verb: "shop.open" },
  );
  return { shopId: shop.id, userId: user.id };
}

async function makeUser({
  email,
  password,
  name,
}: z.output<typeof signUpInput>): Promise<{ id: string; name: string }> {
  try {
    const { user } = await auth().api.signUpEmail({ body: { email, password, name } });
    return user;
  } catch (error) {
    const code = (error as { body?: { code?: string } }).body?.code ?? "";
    if (code.startsWith("USER_ALREADY_EXISTS")) {
      throw new AppError(
        "conflict",
        "There is an account with that e-mail already. Sign in, or ask for a link to set a new password.",
        {
          fields: [{ pointer: "/email", detail: "There is an account with that e-mail already." }],
        },
      );
    }
    throw error;
  }
}
