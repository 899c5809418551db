"use client";

import { type FormEvent, useState } from "react";
import { Button, WhyOff } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import { ScrollX } from "@/components/ui/scroll-x";

export type Role = "owner" | "writer" | "technician";
export const ROLE_WORDS: Record<Role, string> = { owner: "owner", writer: "service writer", technician: "technician" };
const ROLES = (["technician", "writer", "owner"] as const).map((role) => ({
  value: role,
  label: ROLE_WORDS[role].charAt(0).toUpperCase() + ROLE_WORDS[role].slice(1),
}));

export interface MemberView {
  id: string;
  name: string;
  email: string;
  role: Role;
  isActive: boolean;
  isMe: boolean;
  /** "signed in today 07:52". */
  seen?: string;
  /** Why neither role nor membership can change: the last owner. */
  fixedWhy?: string;
}

export type PeopleResult = { ok: true } | { ok: false; message: string };

export interface PeoplePageProps {
  members: readonly MemberView[];
  invitations: readonly { id: string; email: string; role: Role; expires: string }[];
  onInvite?: (email: string, role: Role) => Promise<PeopleResult>;
  onRole?: (memberId: string, role: Role, reason: string) => Promise<PeopleResult>;
  onRemove?: (memberId: string, reason: string) => Promise<PeopleResult>;
  onCancelInvitation?: (id: string) => Promise<PeopleResult>;
}

/** Who works here and in which role; invitations by e-mail. */
export function PeoplePage({ members, invitations, onInvite, onRole, onRemove, onCancelInvitation }: PeoplePageProps) {
  const [isInviting, setInviting] = useState(false);
  const [changing, setChanging] = useState<MemberView | null>(null);
  const active = members.filter((member) => member.isActive);
  return (
    <section className="people" aria-labelledby="people-head">
      <div className="edithead">
        <h2 id="people-head">
          {active.length} {active.length === 1 ? "person works" : "people work"} here
        </h2>
        {onInvite && (
          <Button look="quiet" small onClick={() => setInviting(true)}>
            Invite someone
          </Button>
        )}
      </div>
      <ScrollX label="People">
        <table className="tbl">
          <caption className="vh">People</caption>
          <thead>
            <tr>
              <th scope="col">Name</th>
              <th scope="col">E-mail</th>
              <th scope="col">Role</th>
              <th scope="col">Seen</th>
              <th scope="col">
                <span className="vh">Change</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {members.map((member) => (
              <tr key={member.id} className={member.isActive ? undefined : "retired"}>
                <th scope="row">
                  {member.name}
                  {member.isMe && <span className="faint"> you</span>}
                </th>
                <td className="soft">{member.email}</td>
                <td>{member.isActive ? ROLE_WORDS[member.role] : "no longer"}</td>
                <td className="faint">{member.seen}</td>
                <td className="r">
                  {onRole && member.isActive && (
                    <Button look="link" onClick={() => setChanging(member)}>
                      Change<span className="vh"> {member.name}</span>
                    </Button>
                  )}
                </td>
              </tr>
            ))}
            {invitations.map((invitation) => (
              <tr key={invitation.id}>
                <th scope="row" className="faint">
                  invited
                </th>
                <td className="soft">{invitation.email}</td>
                <td>{ROLE_WORDS[invitation.role]}</td>
                <td className="faint">until {invitation.expires}</td>
                <td className="r">
                  {onCancelInvitation && (
                    <Button look="link" onClick={() => void onCancelInvitation(invitation.id)}>
                      Take back<span className="vh"> the invitation of {invitation.email}</span>
                    </Button>
                  )}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollX>
      <Dialog open={isInviting} onClose={() => setInviting(false)} title="Invite someone">
        {onInvite && <InviteForm onInvite={onInvite} onDone={() => setInviting(false)} />}
      </Dialog>
      <Dialog open={changing !== null} onClose={() => setChanging(null)} title={changing?.name ?? ""}>
        {changing && onRole && (
          <ChangeForm member={changing} onRole={onRole} onRemove={onRemove} onDone={() => setChanging(null)} />
        )}
      </Dialog>
    </section>
  );
}

function InviteForm({ onInvite, onDone }: { onInvite: NonNullable<PeoplePageProps["onInvite"]>; onDone: () => void }) {
  const [role, setRole] = useState<Role>("technician");
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  async function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const email = String(new FormData(event.currentTarget).get("email") ?? "").trim();
    if (!/^\S+@\S+\.\S+$/.test(email)) return setError("That is not an e-mail address.");
    setBusy(true);
    const result = await onInvite(email, role);
    setBusy(false);
    if (result.ok) onDone();
    else setError(result.message);
  }
  return (
    <form onSubmit={submit} noValidate>
      <TextInput
        id="invite-email"
        name="email"
        type="email"
        label="E-mail"
        autoFocus
        autoComplete="off"
        error={error}
      />
      <Options
        legend="Role"
        showLegend
        name="invite-role"
        value={role}
        onChange={(value) => setRole(value as Role)}
        options={ROLES}
      />
      <div className="acts">
        <Button type="submit" busy={isBusy} busyLabel="Inviting">
          Send the invitation
        </Button>
      </div>
    </form>
  );
}

interface ChangeFormProps {
  member: MemberView;
  onRole: NonNullable<PeoplePageProps["onRole"]>;
  onRemove?: PeoplePageProps["onRemove"];
  onDone: () => void;
}

function ChangeForm({ member, onRole, onRemove, onDone }: ChangeFormProps) {
  const [role, setRole] = useState<Role>(member.role);
  const [reason, setReason] = useState("");
  const [error, setError] = useState<string>();
  const [busy, setBusy] = useState<"role" | "remove" | null>(null);
  async function run(what: "role" | "remove") {
    if (reason.trim() === "") return setError("Say why.");
    setBusy(what);
    const result =
      what === "role" ? await onRole(member.id, role, reason.trim()) : await onRemove!(member.id, reason.trim());
    setBusy(null);
    if (result.ok) onDone();
    else setError(result.message);
  }
  return (
    <div className="stack">
      {member.fixedWhy && <p className="soft">{member.fixedWhy}</p>}
      <Options
        legend="Role"
        showLegend
        name="member-role"
        value={role}
        onChange={(value) => setRole(value as Role)}
        options={ROLES.map((option) => ({ ...option, disabled: Boolean(member.fixedWhy) }))}
      />
      <TextInput
        id="role-why"
        label="Reason"
        maxLength={300}
        value={reason}
        error={error}
        onChange={(event) => setReason(event.target.value)}
      />
      <div className="acts wrap">
        <Button
          disabled={Boolean(member.fixedWhy) || role === member.role}
          busy={busy === "role"}
          busyLabel="Changing"
          onClick={() => void run("role")}
        >
          Change the role
        </Button>
        {onRemove && (
          <Button
            look="ink"
            disabled={Boolean(member.fixedWhy)}
            busy={busy === "remove"}
            busyLabel="Ending"
            onClick={() => void run("remove")}
          >
            End the membership
          </Button>
        )}
        {role === member.role && !member.fixedWhy && <WhyOff id="same-role">the role is the same</WhyOff>}
      </div>
      <p className="note">Both sign the person out everywhere. What they did keeps their name.</p>
    </div>
  );
}
