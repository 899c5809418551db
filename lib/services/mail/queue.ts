import "server-only";
import { enqueue, type Tx } from "@/db/client";
import { mails } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { newId } from "@/lib/ids";

export interface QueuedMail {
  caseId?: string;
  kind: string;
  to: string;
  subject: string;
  text: string;
  html: string;
  paperId?: string;
}

/** Writes a message and the job that sends it, in the transaction it belongs to. */
export async function queueMail(tx: Tx, ctx: Ctx, mail: QueuedMail): Promise<string> {
  const id = newId("mail", ctx.now.getTime());
  await tx.insert(mails).values({
    shopId: ctx.shopId,
    id,
    caseId: mail.caseId ?? null,
    kind: mail.kind,
    toAddress: mail.to,
    subject: mail.subject,
    text: mail.text,
    html: mail.html,
    paperId: mail.paperId ?? null,
    createdAt: ctx.now,
  });
  await enqueue(tx, "send_mail", { shopId: ctx.shopId, mailId: id }, { key: `mail:${id}` });
  return id;
}
