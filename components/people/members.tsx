"use client";

import { type FormEvent, useId, useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Bang } from "@/components/ui/icons";
import { TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import type { InvitationRow, MemberRow, PeopleAct } from "./model";

const ROLES = [
  { value: "technician", label: "Technician" },
  { value: "writer", label: "Service writer" },
  { value: "owner", label: "Owner" },
];
const ROLE_SAYS: Record<string, string> = {
  technician: "Reads, tests, marks causes and repairs; sees no costs.",
  writer: "Takes in, quotes, records approvals and payments, and sees costs.",
  owner: "May do all of that, and has the audit, the reports, the people and the settings.",
};

export interface MembersProps {
  members: readonly MemberRow[];
  invitations: readonly InvitationRow[];
  invite: (email: string, role: string) => PeopleAct;
  cancelInvitation: (id: string) => PeopleAct;
  setRole: (id: string, role: string) => PeopleAct;
  remove: (id: string) => PeopleAct;
}

/** Who works here and in which role, and who is asked to. */
export function Members(props: MembersProps) {
  const { members, invitations } = props;
  return (
    <>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a table wider than its place scrolls, and must be reached by keyboard */}
      <section className="scrollx" tabIndex={0} aria-label="People of the shop">
        <table className="tbl rec-people">
          <caption className="vh">People of the shop by name</caption>
          <thead>
            <tr>
              <th scope="col">Name</th>
              <th scope="col">Role</th>
              <th scope="col">E-mail</th>
              <th scope="col">Since</th>
              <th scope="col">
                <span className="vh">Change</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {members.map((member) => (
              <tr key={member.id}>
                <th scope="row">
                  {member.name} {member.isMe && <span className="faint">you</span>}
                </th>
                <td>{member.roleWords}</td>
                <td className="soft">{member.email}</td>
                <td className="soft nowrap">{member.since}</td>
                <td className="rec-act">
                  <RoleDialog member={member} setRole={props.setRole} />
                  <RemoveDialog member={member} remove={props.remove} />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </section>
      <div className="rec-section">
        <header>
          <h3>Invitations</h3>
          <InviteDialog invite={props.invite} />
        </header>
        {invitations.length === 0 ? (
          <p className="soft">None is open. An invitation goes by mail and holds for two days.</p>
        ) : (
          <table className="tbl">
            <caption className="vh">Open invitations</caption>
            <thead>
              <tr>
                <th scope="col">E-mail</th>
                <th scope="col">As</th>
                <th scope="col">Holds</th>
                <th scope="col">
                  <span className="vh">Take back</span>
                </th>
              </tr>
            </thead>
            <tbody>
              {invitations.map((invitation) => (
                <tr key={invitation.id}>
                  <th scope="row">{invitation.email}</th>
                  <td>{invitation.roleWords}</td>
                  <td className={invitation.isOver ? "faint" : undefined}>{invitation.holds}</td>
                  <td className="rec-act">
                    <Once
                      label="Take back"
                      spoken={`Take back the invitation to ${invitation.email}`}
                      busyLabel="Taking back"
                      run={() => props.cancelInvitation(invitation.id)}
                    />
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
      </div>
    </>
  );
}

function Refusal({ children }: { children: string }) {
  if (!children) return null;
  return (
    <p className="why" role="alert">
      <Bang />
      <span>{children}</span>
    </p>
  );
}

/** A button that does one thing, with its refusal beside it. */
function Once({
  label,
  spoken,
  busyLabel,
  run,
}: {
  label: string;
  spoken: string;
  busyLabel: string;
  run: () => PeopleAct;
}) {
  const [isBusy, setBusy] = useState(false);
  const [refusal, setRefusal] = useState("");
  return (
    <>
      <Button
        look="link"
        aria-label={spoken}
        busy={isBusy}
        busyLabel={busyLabel}
        onClick={async () => {
          setBusy(true);
          setRefusal((await run()) ?? "");
          setBusy(false);
        }}
      >
        {label}
      </Button>
      <Refusal>{refusal}</Refusal>
    </>
  );
}

interface SmallFormProps {
  label: string;
  spoken?: string;
  look?: "link" | "quiet";
  title: string;
  sendLabel: string;
  busyLabel: string;
  send: (data: FormData) => PeopleAct;
  children: React.ReactNode;
}

function SmallForm({ label, spoken, look = "link", title, sendLabel, busyLabel, send, children }: SmallFormProps) {
  const [isOpen, setOpen] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [refusal, setRefusal] = useState("");
  async function onSubmit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    if (isBusy) return;
    const data = new FormData(event.currentTarget);
    setBusy(true);
    const refused = await send(data);
    setBusy(false);
    if (refused) setRefusal(refused);
    else setOpen(false);
  }
  return (
    <>
      <Button
        look={look}
        small={look === "quiet"}
        aria-label={spoken}
        onClick={() => {
          setRefusal("");
          setOpen(true);
        }}
      >
        {label}
      </Button>
      <Dialog open={isOpen} onClose={() => setOpen(false)} title={title}>
        <form className="stack" onSubmit={onSubmit}>
          {children}
          <Refusal>{refusal}</Refusal>
          <div className="acts">
            <Button type="submit" busy={isBusy} busyLabel={busyLabel}>
              {sendLabel}
            </Button>
            <Button look="quiet" onClick={() => setOpen(false)}>
              Leave it
            </Button>
          </div>
        </form>
      </Dialog>
    </>
  );
}

function RoleChoice({ initial }: { initial: string }) {
  const [chosen, setChosen] = useState(initial);
  return (
    <>
      <Options legend="Role" showLegend name="role" options={ROLES} value={chosen} onChange={setChosen} />
      <p className="soft">{ROLE_SAYS[chosen]}</p>
    </>
  );
}

function RoleDialog({ member, setRole }: { member: MemberRow; setRole: MembersProps["setRole"] }) {
  return (
    <SmallForm
      label="Role"
      spoken={`Change the role of ${member.name}`}
      title={`Role of ${member.name}`}
      sendLabel="Change the role"
      busyLabel="Changing"
      send={(data) => setRole(member.id, String(data.get("role") ?? member.role))}
    >
      <RoleChoice initial={member.role} />
    </SmallForm>
  );
}

function RemoveDialog({ member, remove }: { member: MemberRow; remove: MembersProps["remove"] }) {
  return (
    <SmallForm
      label="Remove"
      spoken={`Remove ${member.name} from the shop`}
      title={`Remove ${member.name}`}
      sendLabel={`Remove ${member.name.split(" ")[0]}`}
      busyLabel="Removing"
      send={() => remove(member.id)}
    >
      <p className="soft">
        {member.isMe ? "You lose" : `${member.name} loses`} access at once. What {member.isMe ? "you" : "they"} wrote,
        measured and approved stays, under {member.isMe ? "your" : "their"} name.
      </p>
    </SmallForm>
  );
}

function InviteDialog({ invite }: { invite: MembersProps["invite"] }) {
  const id = useId();
  return (
    <SmallForm
      label="Invite someone"
      look="quiet"
      title="Invite someone"
      sendLabel="Send the invitation"
      busyLabel="Sending"
      send={async (data) => {
        const email = String(data.get("email") ?? "").trim();
        if (!/^\S+@\S+\.\S+$/.test(email)) return "That is not an e-mail address.";
        return invite(email, String(data.get("role") ?? "technician"));
      }}
    >
      <TextInput id={`${id}-email`} name="email" type="email" label="E-mail" maxLength={200} required />
      <RoleChoice initial="technician" />
    </SmallForm>
  );
}
