import { capitalise, countWord, formatDate, formatWhen } from "@/components/ui/format";
import type { Ctx } from "@/lib/auth/context";
import { ROLE_WORDS } from "@/lib/auth/role-words";
import { listInvitations } from "@/lib/services/people/invitations";
import { listMembers } from "@/lib/services/people/members";
import { PeopleClient } from "../_client/people-client";

/** The people of the shop, their roles, and who is invited. */
export async function PeopleSection({ ctx, timeZone }: { ctx: Ctx; timeZone: string }) {
  const [members, invitations] = await Promise.all([listMembers(ctx), listInvitations(ctx)]);
  const now = ctx.now.toISOString();
  return (
    <section className="rec-section" aria-labelledby="people">
      <header>
        <h2 id="people">
          {members.length === 1 ? "One person works here" : `${capitalise(countWord(members.length))} people work here`}
        </h2>
      </header>
      <PeopleClient
        shopId={ctx.shopId}
        members={members.map((member) => ({
          id: member.id,
          name: member.name,
          email: member.email,
          role: member.role,
          roleWords: ROLE_WORDS[member.role] ?? member.role,
          since: formatDate(member.since.toISOString(), timeZone),
          isMe: member.userId === ctx.actor.id,
        }))}
        invitations={invitations.map((invitation) => {
          const isOver = invitation.expiresAt < ctx.now;
          const when = formatWhen(invitation.expiresAt.toISOString(), now, timeZone);
          return {
            id: invitation.id,
            email: invitation.email,
            roleWords: ROLE_WORDS[invitation.role ?? "technician"] ?? "technician",
            holds: isOver ? `ran out ${when}` : `until ${when}`,
            isOver,
          };
        })}
      />
    </section>
  );
}
