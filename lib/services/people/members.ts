import "server-only";
import { asc, eq } from "drizzle-orm";
import { authDb } from "@/db/client";
import { member, user } from "@/db/schema/auth";
import { authorize, type Ctx } from "@/lib/auth/context";

/** Who belongs to the shop, as the membership tables say: the id of the membership, the person and their role. */
export async function listMembers(ctx: Ctx) {
  authorize(ctx, "people.manage");
  return authDb()
    .select({
      id: member.id,
      userId: member.userId,
      name: user.name,
      email: user.email,
      role: member.role,
      since: member.createdAt,
    })
    .from(member)
    .innerJoin(user, eq(user.id, member.userId))
    .where(eq(member.organizationId, ctx.shopId))
    .orderBy(asc(user.name), asc(member.id));
}
