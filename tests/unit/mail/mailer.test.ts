import { existsSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { mailSink, type StoredMail } from "@/lib/local/mail-sink";
import { mailboxServer } from "@/lib/local/mailbox";
import { freePort } from "@/lib/local/ports.mjs";
import { messageIdFor, smtpMailer } from "@/lib/mail/mailer";

// papers, servers and pictures take their time on a busy machine
vi.setConfig({ testTimeout: 180_000, hookTimeout: 60_000 });

const folder = mkdtempSync(join(tmpdir(), "firedeck-mail-"));
const downFile = join(folder, "down");
let smtp = 0;
let page = "";
const closers: (() => Promise<void>)[] = [];

beforeAll(async () => {
  smtp = await freePort(4725);
  const pagePort = await freePort(4726);
  closers.push(await mailSink({ folder: join(folder, "mail"), port: smtp, downFile }));
  closers.push(await mailboxServer({ folder: join(folder, "mail"), port: pagePort }));
  page = `http://localhost:${pagePort}`;
});
afterAll(async () => {
  for (const close of closers) await close();
  rmSync(folder, { recursive: true });
});

const mailer = () => smtpMailer({ url: `smtp://127.0.0.1:${smtp}`, from: "Quillon Yard <desk@quillonyard.example>" });
const mail = {
  to: "juniper@example.net",
  subject: "Kostenvoranschlag für Ihren Wagen",
  text: "See https://firedeck.example/q/1?a=1&b=2",
  html: '<p>Grüße <a href="https://firedeck.example/q/1">here</a></p>',
};
const inbox = async (to: string) => (await (await fetch(`${page}/mailbox.json?to=${to}`)).json()) as StoredMail[];

describe("mail, sent and read back", () => {
  it("arrives whole: subject, both forms, attachment, sender", async () => {
    const content = new Uint8Array([37, 80, 68, 70, 0, 255]);
    await mailer().send({
      ...mail,
      attachments: [{ filename: "Rechnung 1.pdf", contentType: "application/pdf", content }],
    });
    const [got] = await inbox("juniper@example.net");
    expect(got).toMatchObject({
      subject: mail.subject,
      to: ["juniper@example.net"],
      from: '"Quillon Yard" <desk@quillonyard.example>',
    });
    expect(got!.text).toContain(mail.text);
    expect(got!.html).toContain("Grüße");
    expect(Buffer.from(got!.attachments[0]!.base64, "base64")).toEqual(Buffer.from(content));
    const file = await fetch(`${page}/mail/${got!.id}/attachment/0`);
    expect(new Uint8Array(await file.arrayBuffer())).toEqual(content);
    expect(file.headers.get("content-disposition")).toContain("Rechnung%201.pdf");
  });

  it("carries the same Message-ID whenever the same message is sent", async () => {
    for (const _ of [1, 2]) await mailer().send({ ...mail, to: "twice@example.net", once: "mail_42" });
    const ids = (await inbox("twice@example.net")).map((each) => each.messageId);
    expect(ids).toEqual([
      messageIdFor("mail_42", "desk@quillonyard.example"),
      messageIdFor("mail_42", "desk@quillonyard.example"),
    ]);
    expect(messageIdFor("mail_43", "desk@quillonyard.example")).not.toBe(ids[0]);
  });

  it("starts no other header from a line break in a subject", async () => {
    await mailer().send({ ...mail, to: "subject@example.net", subject: "One\r\nBcc: other@example.net" });
    const [got] = await inbox("subject@example.net");
    expect(got!.subject).toBe("One Bcc: other@example.net");
    expect(await inbox("other@example.net")).toEqual([]);
  });

  it("fails while the server is away, and works once it is back", async () => {
    writeFileSync(downFile, "");
    await expect(mailer().send({ ...mail, to: "away@example.net" })).rejects.toThrow();
    expect(await inbox("away@example.net")).toEqual([]);
    rmSync(downFile);
    await mailer().send({ ...mail, to: "away@example.net" });
    expect(await inbox("away@example.net")).toHaveLength(1);
    expect(existsSync(downFile)).toBe(false);
  });
});

describe("the mailbox page", () => {
  it("lists newest first, and shows a message in a frame in which nothing runs", async () => {
    await mailer().send({ ...mail, to: "page@example.net", subject: "First <b>" });
    await mailer().send({ ...mail, to: "page@example.net", subject: "Second" });
    const list = await (await fetch(`${page}/?to=page@example.net`)).text();
    expect(list.indexOf("Second")).toBeLessThan(list.indexOf("First &lt;b&gt;"));
    const [newest] = await inbox("page@example.net");
    const shown = await (await fetch(`${page}/mail/${newest!.id}`)).text();
    expect(shown).toContain(`sandbox="allow-popups allow-popups-to-escape-sandbox"`);
    expect(shown).toContain('href="https://firedeck.example/q/1?a=1&amp;b=2"');
    const body = await fetch(`${page}/mail/${newest!.id}/body`);
    expect(body.headers.get("content-security-policy")).toContain("default-src 'none'");
    expect(await body.text()).toContain('<base target="_blank">');
  });

  it("answers 404 to what it does not have, outside its folder too", async () => {
    for (const path of ["/mail/none", "/mail/..%2f..%2fsecrets", "/elsewhere"])
      expect((await fetch(page + path)).status).toBe(404);
  });
});
