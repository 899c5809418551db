import "server-only";
import { createHash, randomBytes } from "node:crypto";
import { and, eq, sql } from "drizzle-orm";
import { drizzle } from "drizzle-orm/node-postgres";
import { appPool, inShop, type Tx } from "@/db/client";
import { cases, customerLinks, customers, shops } from "@/db/schema";
import { asShopId, type Ctx } from "@/lib/auth/context";
import { newId } from "@/lib/ids";
import { shopSettings } from "@/lib/shops/schema";

const hashOf = (secret: string) => createHash("sha256").update(secret).digest("hex");

export interface LinkTarget {
  caseId: string;
  kind: "quote" | "invoice";
  targetId: string;
  sentTo: string | null;
  expiresAt: Date;
}

/** Makes a private address: 256 random bits, of which only the hash is kept. */
export async function makeLink(tx: Tx, ctx: Ctx, target: LinkTarget): Promise<{ id: string; secret: string }> {
  const secret = randomBytes(32).toString("base64url");
  const id = newId("lnk", ctx.now.getTime());
  await tx
    .insert(customerLinks)
    .values({ shopId: ctx.shopId, id, secretHash: hashOf(secret), createdAt: ctx.now, ...target });
  return { id, secret };
}

export type LinkState = "open" | "expired" | "revoked";
export interface OpenedLink {
  ctx: Ctx;
  state: LinkState;
  shop: { name: string; phone: string; email: string };
}

/** Looks a secret up by its hash; everything after runs in that shop's scope as the customer. Null when there is no such link. */
export async function openLink(
  secret: string,
  facts: Pick<Ctx, "requestId" | "address" | "userAgent">,
  now = new Date(),
): Promise<OpenedLink | null> {
  if (!/^[A-Za-z0-9_-]{43}$/.test(secret)) return null;
  const hash = hashOf(secret);
  const found = await drizzle(appPool()).execute<{ shop_id: string; link_id: string }>(
    sql`select shop_id, link_id from find_link(${hash})`,
  );
  const routed = found.rows[0];
  if (!routed) return null;
  const scope: Ctx = {
    shopId: asShopId(routed.shop_id),
    actor: { id: routed.link_id, name: "Customer", role: "customer" },
    now,
    ...facts,
  };
  return inShop(
    scope,
    async (tx) => {
      const [row] = await tx
        .select({ link: customerLinks, customerName: customers.name, shopName: shops.name, settings: shops.settings })
        .from(customerLinks)
        .innerJoin(cases, and(eq(cases.shopId, customerLinks.shopId), eq(cases.id, customerLinks.caseId)))
        .innerJoin(customers, and(eq(customers.shopId, cases.shopId), eq(customers.id, cases.customerId)))
        .innerJoin(shops, eq(shops.shopId, customerLinks.shopId))
        .where(and(eq(customerLinks.shopId, scope.shopId), eq(customerLinks.id, routed.link_id)));
      if (!row) return null;
      const { link } = row;
      const settings = shopSettings.parse(row.settings);
      const state: LinkState = link.revokedAt ? "revoked" : link.expiresAt < now ? "expired" : "open";
      return {
        ctx: {
          ...scope,
          actor: { id: link.id, name: row.customerName, role: "customer" as const },
          link: { id: link.id, kind: link.kind as "quote" | "invoice", caseId: link.caseId, targetId: link.targetId },
        },
        state,
        shop: { name: row.shopName, phone: settings.phone, email: settings.email },
      };
    },
    { readOnly: true },
  );
}
