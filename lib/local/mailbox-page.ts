import type { StoredMail } from "./mail-sink";

const ENTITIES: Record<string, string> = { "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;", "'": "&#39;" };
const escapeHtml = (text: string) => text.replace(/[&<>"']/g, (sign) => ENTITIES[sign]!);

const STYLE = `
:root { color-scheme: light dark; --ground: #f4f7f8; --sheet: #fcfdfd; --sunk: #e9eff1; --rule: #d2dbdf; --rule-2: #a9b5bb; --ink: #14191c; --ink-3: #57646b; --action: #0b5963; }
@media (prefers-color-scheme: dark) { :root { --ground: #0f1416; --sheet: #171e21; --sunk: #1d2629; --rule: #2a3539; --rule-2: #4a585e; --ink: #ecf1f2; --ink-3: #98a6ac; --action: #62c4cb; } }
* { box-sizing: border-box; } body { margin: 0; background: var(--ground); color: var(--ink); font: 420 14px/20px Archivo, system-ui, sans-serif; }
main { max-width: 60rem; margin: 0 auto; padding: 24px; } h1 { font-size: 22px; line-height: 28px; font-weight: 600; margin: 0 0 4px; }
p { margin: 0 0 16px; } .note, time, dt { color: var(--ink-3); font-size: 12px; line-height: 16px; }
a { color: var(--action); font-weight: 560; text-underline-offset: 3px; } a:hover { text-decoration-thickness: 2px; } :focus-visible { outline: 2px solid var(--action); outline-offset: 2px; }
ol { list-style: none; margin: 24px 0 0; padding: 0; border-top: 1px solid var(--ink); } li { border-bottom: 1px solid var(--rule); display: grid; grid-template-columns: 11rem 1fr auto; gap: 4px 28px; padding: 8px 0; }
li:hover { background: var(--sunk); } li span { color: var(--ink-3); } dl { display: grid; grid-template-columns: auto 1fr; gap: 4px 20px; margin: 16px 0; border-top: 1px solid var(--ink); padding-top: 12px; } dd { margin: 0; overflow-wrap: anywhere; }
iframe { width: 100%; height: 70vh; border: 1px solid var(--rule-2); background: #fff; } pre { white-space: pre-wrap; overflow-wrap: anywhere; background: var(--sheet); border: 1px solid var(--rule); padding: 16px; font: 13px/20px ui-monospace, monospace; }
@media (max-width: 40rem) { li { grid-template-columns: 1fr; } }`;

const shell = (title: string, body: string) =>
  `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><title>${escapeHtml(title)}</title><style>${STYLE}</style></head><body><main>${body}</main></body></html>`;

const when = (iso: string) => `<time datetime="${iso}">${iso.slice(0, 10)} ${iso.slice(11, 19)} UTC</time>`;

/** Addresses in the plain text become links; everything else is shown as it is. */
const linked = (text: string) =>
  escapeHtml(text).replace(
    /https?:\/\/[^\s<>"&]+(?:&amp;[^\s<>"&]+)*/g,
    (url) => `<a href="${url}" target="_blank" rel="noopener">${url}</a>`,
  );

export function listPage(mails: StoredMail[], to: string | null): string {
  const rows = mails.map(
    (mail) =>
      `<li><span>${escapeHtml(mail.to.join(", "))}</span><a href="/mail/${mail.id}">${escapeHtml(mail.subject || "(no subject)")}</a>${when(mail.receivedAt)}${mail.attachments.length ? `<span></span><span>${mail.attachments.map((each) => escapeHtml(each.filename)).join(", ")}</span>` : ""}</li>`,
  );
  const whose = to ? ` to ${escapeHtml(to)}` : "";
  const count = mails.length === 1 ? "1 message" : `${mails.length} messages`;
  const list = mails.length
    ? `<ol>${rows.join("")}</ol>`
    : `<p>Nothing has been sent${whose} yet. Send a quote, or ask for a new password on the sign-in page, and the message appears here.</p>`;
  return shell(
    "Mailbox",
    `<h1>${count} sent${whose}</h1><p class="note">This machine keeps mail instead of delivering it.${to ? ' <a href="/">Show all</a>' : ""}</p>${list}`,
  );
}

export function messagePage(mail: StoredMail): string {
  const files = mail.attachments.map(
    (each, index) =>
      `<a href="/mail/${mail.id}/attachment/${index}">${escapeHtml(each.filename)}</a> (${Math.ceil(each.size / 1024)} KB)`,
  );
  const facts = [
    ["To", escapeHtml(mail.to.join(", "))],
    ["From", escapeHtml(mail.from)],
    ["Sent", when(mail.receivedAt)],
    ...(files.length ? [["Files", files.join(", ")]] : []),
  ];
  const html = mail.html
    ? `<iframe src="/mail/${mail.id}/body" sandbox="allow-popups allow-popups-to-escape-sandbox" title="The message as mail programs show it"></iframe>`
    : "";
  return shell(
    mail.subject || "Message",
    `<p><a href="/">All messages</a></p><h1>${escapeHtml(mail.subject || "(no subject)")}</h1><dl>${facts.map(([name, value]) => `<dt>${name}</dt><dd>${value}</dd>`).join("")}</dl>${html}<h2 class="note">As plain text</h2><pre>${linked(mail.text)}</pre>`,
  );
}

export const missingPage = () =>
  shell("Not here", `<h1>There is no such message</h1><p><a href="/">All messages</a></p>`);
