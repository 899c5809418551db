import { existsSync } from "node:fs";
import { mkdir, rename, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { type Attachment, simpleParser } from "mailparser";
import { SMTPServer } from "smtp-server";

/** A message as it lies in the folder, one JSON file each, named so that names sort by time of arrival. */
export interface StoredMail {
  id: string;
  receivedAt: string;
  messageId: string | null;
  from: string;
  to: string[];
  subject: string;
  text: string;
  html: string;
  attachments: { filename: string; contentType: string; size: number; base64: string }[];
}

let sequence = 0;

const stored = (attachment: Attachment) => ({
  filename: attachment.filename ?? "attachment",
  contentType: attachment.contentType,
  size: attachment.size,
  base64: attachment.content.toString("base64"),
});

/**
 * An SMTP server that keeps every message instead of delivering it.
 *
 * @param downFile while this file exists every connection is refused with 421, as a server under maintenance does
 * @returns what closes it
 */
export async function mailSink(options: {
  folder: string;
  port: number;
  downFile?: string;
}): Promise<() => Promise<void>> {
  await mkdir(options.folder, { recursive: true });
  const isDown = () => options.downFile !== undefined && existsSync(options.downFile);
  const refusal = () => Object.assign(new Error("Service not available, try again later"), { responseCode: 421 });
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ["STARTTLS"],
    disableReverseLookup: true,
    onConnect: (_session, done) => done(isDown() ? refusal() : undefined),
    onMailFrom: (_address, _session, done) => done(isDown() ? refusal() : undefined),
    onData: (stream, session, done) => {
      keep(
        options.folder,
        simpleParser(stream),
        session.envelope.rcptTo.map((each) => each.address),
      ).then(
        () => done(),
        (error: Error) => done(error),
      );
    },
  });
  server.on("error", (error) => console.error(error));
  await new Promise<void>((resolve, reject) => {
    server.once("error", reject);
    server.listen(options.port, "127.0.0.1", resolve);
  });
  return () => new Promise((resolve) => server.close(() => resolve()));
}

async function keep(folder: string, parsing: ReturnType<typeof simpleParser>, to: string[]): Promise<void> {
  const parsed = await parsing;
  const now = new Date();
  sequence += 1;
  const id = `${now.toISOString().replace(/\D/g, "")}-${String(sequence).padStart(6, "0")}-${process.pid}`;
  const mail: StoredMail = {
    id,
    receivedAt: now.toISOString(),
    messageId: parsed.messageId ?? null,
    from: parsed.from?.text ?? "",
    to,
    subject: parsed.subject ?? "",
    text: parsed.text ?? "",
    html: typeof parsed.html === "string" ? parsed.html : "",
    attachments: parsed.attachments.map(stored),
  };
  // written beside and renamed, so that a reader never meets half a message
  const path = join(folder, `${id}.json`);
  await writeFile(`${path}.part`, JSON.stringify(mail));
  await rename(`${path}.part`, path);
}
