import "server-only";
import { and, asc, eq } from "drizzle-orm";
import { authDb } from "@/db/client";
import { invitation, organization, user } from "@/db/schema/auth";
import { authorize, type Ctx } from "@/lib/auth/context";

export interface InvitationView {
  id: string;
  email: string;
  role: string;
  shopName: string;
  inviterName: string;
  state: "pending" | "expired" | "over";
  /** Whether an account with that address exists already. */
  hasAccount: boolean;
}

/** What a person who holds an invitation's address may see of it. */
export async function readInvitation(id: string, now = new Date()): Promise<InvitationView | null> {
  const [row] = await authDb()
    .select({
      id: invitation.id,
      email: invitation.email,
      role: invitation.role,
      status: invitation.status,
      expiresAt: invitation.expiresAt,
      shopName: organization.name,
      inviterName: user.name,
    })
    .from(invitation)
    .innerJoin(organization, eq(organization.id, invitation.organizationId))
    .innerJoin(user, eq(user.id, invitation.inviterId))
    .where(eq(invitation.id, id));
  if (!row) return null;
  const [account] = await authDb().select({ id: user.id }).from(user).where(eq(user.email, row.email.toLowerCase()));
  const state = row.status !== "pending" ? "over" : row.expiresAt < now ? "expired" : "pending";
  return {
    id: row.id,
    email: row.email,
    role: row.role ?? "technician",
    shopName: row.shopName,
    inviterName: row.inviterName,
    state,
    hasAccount: Boolean(account),
  };
}

export async function listInvitations(ctx: Ctx) {
  authorize(ctx, "people.manage");
  return authDb()
    .select({
      id: invitation.id,
      email: invitation.email,
      role: invitation.role,
      status: invitation.status,
      expiresAt: invitation.expiresAt,
    })
    .from(invitation)
    .where(and(eq(invitation.organizationId, ctx.shopId), eq(invitation.status, "pending")))
    .orderBy(asc(invitation.createdAt));
}
