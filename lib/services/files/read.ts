import "server-only";
import { and, eq } from "drizzle-orm";
import { inShop } from "@/db/client";
import { files, quoteRevisions } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { AppError, notFound } from "@/lib/errors";
import { storage } from "@/lib/storage/storage";
import { readIn } from "../verb";

export type FileSize = "thumb" | "display" | "original";

interface FoundFile {
  key: string;
  contentType: string;
  name: string;
}

function keyOf(row: typeof files.$inferSelect, size: FileSize): FoundFile {
  if (row.state === "refused") throw new AppError("precondition", row.reason ?? "The file was refused.");
  const key = size === "thumb" ? row.thumbKey : size === "display" ? row.displayKey : row.storageKey;
  if (!key) throw new AppError("precondition", "The file is still being looked at. Try again in a moment.");
  return { key, contentType: size === "original" ? "application/octet-stream" : row.contentType, name: row.name };
}

export async function readFile(ctx: Ctx, fileId: string, size: FileSize): Promise<FoundFile> {
  return readIn(ctx, "case.read", async (tx) => {
    const [row] = await tx
      .select()
      .from(files)
      .where(and(eq(files.shopId, ctx.shopId), eq(files.id, fileId)));
    if (!row) throw notFound("The file");
    return keyOf(row, size);
  });
}

/** A photo as a customer may see it: one that the sent revision names, and never the original. */
export async function readCustomerPhoto(ctx: Ctx, fileId: string, size: "thumb" | "display"): Promise<FoundFile> {
  return inShop(
    ctx,
    async (tx) => {
      if (ctx.link?.kind !== "quote") throw notFound("The photo");
      const [revision] = await tx
        .select({ snapshot: quoteRevisions.snapshot })
        .from(quoteRevisions)
        .where(and(eq(quoteRevisions.shopId, ctx.shopId), eq(quoteRevisions.id, ctx.link.targetId)));
      if (!revision?.snapshot.photoIds.includes(fileId)) throw notFound("The photo");
      const [row] = await tx
        .select()
        .from(files)
        .where(and(eq(files.shopId, ctx.shopId), eq(files.caseId, ctx.link.caseId), eq(files.id, fileId)));
      if (!row) throw notFound("The photo");
      return keyOf(row, size);
    },
    { readOnly: true },
  );
}

/** The bytes of a stored file as a response; the store's own address stays inside. */
export async function fileResponse({ key, contentType, name }: FoundFile): Promise<Response> {
  const bytes = await storage().read(key);
  return new Response(new Uint8Array(bytes), {
    headers: {
      "content-type": contentType,
      "content-disposition": `${contentType.startsWith("image/") ? "inline" : "attachment"}; filename="${name.replaceAll(/[^\w.-]/g, "-")}"`,
      "cache-control": "private, max-age=3600, immutable",
      "x-content-type-options": "nosniff",
    },
  });
}
