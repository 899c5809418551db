import { type RenderedMail, renderLetter } from "./letter";

const ROLES: Record<string, string> = { owner: "an owner", writer: "a service writer", technician: "a technician" };

export function invitationMail(model: {
  to: string;
  shopName: string;
  inviterName: string;
  role: string;
  url: string;
}): RenderedMail {
  return renderLetter({
    to: model.to,
    subject: `${model.inviterName} invites you to ${model.shopName}`,
    sender: model.shopName,
    heading: `Join ${model.shopName}`,
    blocks: [
      {
        kind: "text",
        text: `${model.inviterName} has invited you to work in ${model.shopName} as ${ROLES[model.role] ?? model.role}.`,
      },
      { kind: "button", label: "Accept the invitation", url: model.url },
      {
        kind: "note",
        text: "The invitation stands for two days. If you did not expect it, you can leave it unanswered.",
      },
    ],
  });
}

export function passwordResetMail(model: { to: string; name: string; url: string }): RenderedMail {
  return renderLetter({
    to: model.to,
    subject: "Choose a new password",
    sender: "Firedeck",
    heading: "Choose a new password",
    blocks: [
      { kind: "text", text: `${model.name}, somebody asked for a new password for this address. If it was you:` },
      { kind: "button", label: "Choose a new password", url: model.url },
      {
        kind: "note",
        text: "The address works for one hour, once. If it was not you, nothing has changed and nothing needs to be done.",
      },
    ],
  });
}
