import { createHash } from "node:crypto";
import { createTransport, type Transporter } from "nodemailer";

export interface Attachment {
  filename: string;
  contentType: string;
  content: Uint8Array;
}

export interface Mail {
  to: string;
  subject: string;
  text: string;
  html: string;
  attachments?: Attachment[];
  /**
   * What makes this message this one (a row's id): the Message-ID is made from it, so that a message sent twice because
   * the answer to the first try was lost is recognised as one by the receiving side.
   */
  once?: string;
}

/** Where mail leaves the house. Throws when the server did not take the message; the caller tries again later. */
export interface Mailer {
  send(mail: Mail): Promise<{ messageId: string }>;
}

const domainOf = (from: string) => /@([^\s>]+)/.exec(from)?.[1] ?? "localhost";

/** The Message-ID for a message known by `once`: the same text always gives the same id. */
export function messageIdFor(once: string, from: string): string {
  return `<${createHash("sha256").update(once).digest("hex").slice(0, 40)}@${domainOf(from)}>`;
}

/**
 * @param options.url `smtp://` or `smtps://`, with user and password where needed
 * @param options.from the sender, as `Name <address>`
 */
export function smtpMailer({ url, from }: { url: string; from: string }): Mailer {
  const { hostname } = new URL(url);
  const isLoopback = ["127.0.0.1", "localhost", "[::1]", "::1"].includes(hostname);
  // a stand-in on this machine speaks no TLS; anywhere else a refusal to encrypt is an error
  const transport: Transporter = createTransport({
    url,
    ...(isLoopback ? { ignoreTLS: true } : { requireTLS: !url.startsWith("smtps:") }),
  });
  return {
    async send({ once, attachments, ...mail }) {
      // a line break in a header field would start another one
      const subject = mail.subject.replace(/[\r\n]+/g, " ");
      const sent = await transport.sendMail({
        ...mail,
        subject,
        from,
        messageId: once ? messageIdFor(once, from) : undefined,
        attachments: attachments?.map((each) => ({ ...each, content: Buffer.from(each.content) })),
        // no file or address named in a message is ever opened
        disableFileAccess: true,
        disableUrlAccess: true,
      });
      return { messageId: sent.messageId };
    },
  };
}

let shared: Mailer | undefined;

/** Sends through the server that SMTP_URL names. */
export function sendMail(mail: Mail): Promise<{ messageId: string }> {
  const { SMTP_URL: url, MAIL_FROM: from } = process.env;
  if (!url || !from) throw new Error("SMTP_URL and MAIL_FROM must be set to send mail.");
  shared ??= smtpMailer({ url, from });
  return shared.send(mail);
}
