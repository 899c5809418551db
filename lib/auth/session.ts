import "server-only";
import { eq } from "drizzle-orm";
import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { cache } from "react";
import { authDb } from "@/db/client";
import { member, organization } from "@/db/schema/auth";
import { AppError } from "@/lib/errors";
import { auth } from "./auth";
import { asShopId, type Ctx } from "./context";
import { isStaffRole } from "./permissions";

export interface Membership {
  shopId: string;
  shopName: string;
  role: string;
}

export interface Session {
  userId: string;
  name: string;
  email: string;
  activeShopId: string | null;
  memberships: Membership[];
}

/** Who is signed in and where they belong; asked once a request. Roles are read anew each time, so a change bites at once. */
export const currentSession = cache(async (): Promise<Session | null> => {
  const session = await auth().api.getSession({ headers: await headers() });
  if (!session) return null;
  const memberships = await authDb()
    .select({ shopId: member.organizationId, shopName: organization.name, role: member.role })
    .from(member)
    .innerJoin(organization, eq(organization.id, member.organizationId))
    .where(eq(member.userId, session.user.id))
    .orderBy(member.createdAt);
  return {
    userId: session.user.id,
    name: session.user.name,
    email: session.user.email,
    activeShopId: session.session.activeOrganizationId ?? null,
    memberships,
  };
});

export async function requestFacts(): Promise<{ requestId: string; address?: string; userAgent?: string }> {
  const list = await headers();
  const header = process.env.CLIENT_ADDRESS_HEADER;
  return {
    requestId: list.get("x-request-id") ?? crypto.randomUUID(),
    address: (header ? list.get(header) : null) ?? undefined,
    userAgent: list.get("user-agent")?.slice(0, 300),
  };
}

/** The scope of the signed-in person in their active shop; throws when nobody is signed in or no shop is theirs. */
export async function staffCtx(): Promise<Ctx> {
  const session = await currentSession();
  if (!session) throw new AppError("unauthenticated", "Sign in first.");
  const shop = session.memberships.find((each) => each.shopId === session.activeShopId) ?? session.memberships[0];
  if (!shop || !isStaffRole(shop.role))
    throw new AppError("forbidden", "You do not belong to a shop yet. Ask its owner for an invitation.");
  return {
    shopId: asShopId(shop.shopId),
    actor: { id: session.userId, name: session.name, role: shop.role },
    now: new Date(),
    ...(await requestFacts()),
  };
}

/** The same for a page: sends a visitor to the sign-in page. */
export async function pageCtx(): Promise<Ctx> {
  try {
    return await staffCtx();
  } catch (error) {
    if (error instanceof AppError && error.code === "unauthenticated") redirect("/sign-in");
    if (error instanceof AppError && error.code === "forbidden") redirect("/no-shop");
    throw error;
  }
}
