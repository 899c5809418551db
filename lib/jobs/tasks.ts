import "server-only";
import { createHash } from "node:crypto";
import { and, eq } from "drizzle-orm";
import { inShop } from "@/db/client";
import { files, mails, papers } from "@/db/schema";
import { asShopId, type Ctx } from "@/lib/auth/context";
import { sendMail } from "@/lib/mail/mailer";
import { processFile } from "@/lib/services/files/files";
import { perform } from "@/lib/services/verb";
import { processImage } from "@/lib/storage/images";
import { sniff } from "@/lib/storage/sniff";
import { storage } from "@/lib/storage/storage";

/** The worker acts as `system` inside the shop whose row it handles, in the same scoped transaction as everyone. */
function systemCtx(shopId: string, job: string): Ctx {
  return {
    shopId: asShopId(shopId),
    actor: { id: "system", name: "Firedeck", role: "system" },
    requestId: job,
    now: new Date(),
  };
}

/**
 * Sends one message. The row is locked while it goes out and `sentAt` is set with it, so a job that runs twice finds it
 * sent; the message id is the row's, so that even a copy after a crash between the two can be told by the receiver.
 */
export async function sendMailTask({ shopId, mailId }: { shopId: string; mailId: string }, job: string): Promise<void> {
  const ctx = systemCtx(shopId, job);
  await inShop(
    ctx,
    async (tx) => {
      const here = and(eq(mails.shopId, ctx.shopId), eq(mails.id, mailId));
      const [mail] = await tx.select().from(mails).where(here).for("update");
      if (!mail || mail.sentAt) return;
      const [paper] = mail.paperId
        ? await tx
            .select()
            .from(papers)
            .where(and(eq(papers.shopId, ctx.shopId), eq(papers.id, mail.paperId)))
        : [];
      const attachments = paper
        ? [
            {
              filename: `${paper.title.replaceAll(/[^\w ,-]/g, "")}.pdf`,
              content: paper.bytes,
              contentType: "application/pdf",
            },
          ]
        : undefined;
      await sendMail({
        to: mail.toAddress,
        subject: mail.subject,
        text: mail.text,
        html: mail.html,
        attachments,
        once: mail.id,
      });
      await tx.update(mails).set({ sentAt: new Date(), lastError: null }).where(here);
    },
    { verb: "mail.deliver" },
  );
}

/** Keeps why a message has not gone out, for the case's page; the job itself is tried again by the queue. */
export async function noteMailFailure(
  { shopId, mailId }: { shopId: string; mailId: string },
  reason: string,
  job: string,
): Promise<void> {
  const ctx = systemCtx(shopId, job);
  await inShop(
    ctx,
    (tx) =>
      tx
        .update(mails)
        .set({ lastError: reason.slice(0, 300) })
        .where(and(eq(mails.shopId, ctx.shopId), eq(mails.id, mailId))),
    { verb: "mail.deliver" },
  );
}

/** Looks into an uploaded file: what it is by its content, its sum, and for a photo its upright copies without location. */
export async function processFileTask(
  { shopId, fileId }: { shopId: string; fileId: string },
  job: string,
): Promise<void> {
  const ctx = systemCtx(shopId, job);
  const file = await inShop(
    ctx,
    async (tx) =>
      (
        await tx
          .select()
          .from(files)
          .where(and(eq(files.shopId, ctx.shopId), eq(files.id, fileId)))
      )[0],
    { readOnly: true },
  );
  if (file?.state !== "processing") return;
  const store = storage();
  const bytes = await store.read(file.storageKey);
  const sha256 = createHash("sha256").update(bytes).digest("hex");
  const kind = sniff(bytes);
  if (file.kind !== "photo") {
    const fits = file.kind === "document" ? kind === "application/pdf" : kind === "text/plain";
    const reason = fits ? null : "By its content this is not that kind of file.";
    await perform(processFile, ctx, { fileId, sha256, state: fits ? "ready" : "refused", reason });
    return;
  }
  const result = await processImage(bytes);
  if (!result.ok) {
    await perform(processFile, ctx, { fileId, sha256, state: "refused", reason: result.reason });
    return;
  }
  const { display, thumbnail, width, height } = result.image;
  const contentType = "image/webp";
  const displayKey = await store.put(display, { name: `${fileId}.webp`, contentType });
  const thumbKey = await store.put(thumbnail, { name: `${fileId}-small.webp`, contentType });
  await perform(processFile, ctx, { fileId, sha256, state: "ready", contentType, displayKey, thumbKey, width, height });
}
