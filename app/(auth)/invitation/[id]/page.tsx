import type { Metadata } from "next";
import Link from "next/link";
import { ROLE_WORDS } from "@/lib/auth/role-words";
import { currentSession } from "@/lib/auth/session";
import { readInvitation } from "@/lib/services/people/invitations";
import { InvitationForm } from "../../_components/invitation-form";

export const metadata: Metadata = { title: "Invitation" };

export default async function InvitationPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const invitation = await readInvitation(id);
  if (invitation?.state !== "pending") {
    return (
      <div className="form">
        <h1>This invitation no longer works</h1>
        <p>It was used, taken back, or older than two days. Ask the shop’s owner for a new one.</p>
        <p>
          <Link className="link" href="/sign-in">
            Sign in
          </Link>
        </p>
      </div>
    );
  }
  const session = await currentSession();
  const isThem = session?.email.toLowerCase() === invitation.email.toLowerCase();
  const need = isThem ? "nothing" : invitation.hasAccount ? "sign-in" : "account";
  return <InvitationForm {...invitation} need={need} roleWords={ROLE_WORDS[invitation.role] ?? invitation.role} />;
}
