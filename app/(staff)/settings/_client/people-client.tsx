"use client";

import { useRouter } from "next/navigation";
import { Members } from "@/components/people/members";
import type { InvitationRow, MemberRow } from "@/components/people/model";

/** What the membership plugin refuses, as a person can use it. */
const REFUSALS: Record<string, string> = {
  YOU_CANNOT_LEAVE_THE_ORGANIZATION_AS_THE_ONLY_OWNER:
    "A shop keeps at least one owner. Make someone else owner first.",
  YOU_CANNOT_LEAVE_THE_ORGANIZATION_WITHOUT_AN_OWNER: "A shop keeps at least one owner. Make someone else owner first.",
  USER_IS_ALREADY_A_MEMBER_OF_THIS_ORGANIZATION: "They work here already.",
  USER_IS_ALREADY_INVITED_TO_THIS_ORGANIZATION: "They are invited already.",
  INVITATION_NOT_FOUND: "That invitation is gone. It may have been answered meanwhile.",
  MEMBER_NOT_FOUND: "They no longer work here.",
  YOU_ARE_NOT_ALLOWED_TO_UPDATE_THIS_MEMBER: "Only an owner may change roles.",
  YOU_ARE_NOT_ALLOWED_TO_DELETE_THIS_MEMBER: "Only an owner may remove people.",
  INVITATION_LIMIT_REACHED: "Too many invitations are open. Take some back first.",
};

interface Refused {
  code?: string;
  message?: string;
}

async function post(path: string, body: Record<string, unknown>): Promise<string | null> {
  try {
    const response = await fetch(`/api/auth/organization/${path}`, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body: JSON.stringify(body),
    });
    if (response.ok) return null;
    if (response.status === 429) return "Too many at once. Wait a moment and try again.";
    const refused = (await response.json().catch(() => ({}))) as Refused;
    const known = REFUSALS[refused.code ?? ""];
    if (known) return known;
    // the database keeps a last owner too, when two of them leave at the same moment
    if (response.status >= 500)
      return "It did not go through, and nothing was changed. A shop keeps at least one owner.";
    return refused.message ?? "It did not go through, and nothing was changed.";
  } catch {
    return "The server can’t be reached. Nothing was changed.";
  }
}

export interface PeopleClientProps {
  shopId: string;
  members: readonly MemberRow[];
  invitations: readonly InvitationRow[];
}

export function PeopleClient({ shopId, members, invitations }: PeopleClientProps) {
  const router = useRouter();
  const then = async (refusal: Promise<string | null>) => {
    const said = await refusal;
    if (said === null) router.refresh();
    return said;
  };
  return (
    <Members
      members={members}
      invitations={invitations}
      invite={(email, role) => then(post("invite-member", { email, role, organizationId: shopId }))}
      cancelInvitation={(invitationId) => then(post("cancel-invitation", { invitationId }))}
      setRole={(memberId, role) => then(post("update-member-role", { memberId, role, organizationId: shopId }))}
      remove={(memberIdOrEmail) => then(post("remove-member", { memberIdOrEmail, organizationId: shopId }))}
    />
  );
}
