import "server-only";
import { createUploadthing, type FileRouter, UploadThingError } from "uploadthing/server";
import { z } from "zod";
import { authorize } from "@/lib/auth/context";
import { staffCtx } from "@/lib/auth/session";
import { toAppError } from "@/lib/http/problem";
import { registerFile } from "@/lib/services/files/files";
import { perform } from "@/lib/services/verb";

const f = createUploadthing();

const input = z.object({ caseId: z.string().min(3).max(60), workJobId: z.string().max(60).optional() });

async function gate(call: { input: z.output<typeof input> }) {
  try {
    const ctx = await staffCtx();
    authorize(ctx, "reading.write");
    return {
      ...call.input,
      shopId: ctx.shopId as string,
      actorId: ctx.actor.id,
      actorName: ctx.actor.name,
      role: ctx.actor.role,
    };
  } catch (error) {
    const refused = toAppError(error);
    throw new UploadThingError({ code: "FORBIDDEN", message: refused.message });
  }
}

type Gate = Awaited<ReturnType<typeof gate>>;

/** The store calls back with the scope that was checked when the upload began; it is signed, so it can't be altered. */
function register(kind: "photo" | "log" | "document") {
  return async ({
    metadata,
    file,
  }: {
    metadata: Gate;
    file: { key: string; name: string; size: number; type: string };
  }) => {
    const ctx = {
      shopId: metadata.shopId as never,
      actor: { id: metadata.actorId, name: metadata.actorName, role: metadata.role },
      requestId: `upload-${file.key.slice(0, 12)}`,
      now: new Date(),
    };
    const { fileId } = await perform(
      registerFile,
      ctx,
      {
        caseId: metadata.caseId,
        workJobId: metadata.workJobId,
        kind,
        name: file.name.slice(0, 200),
        bytes: file.size,
        contentType: file.type || "application/octet-stream",
        storageKey: file.key,
      },
      { idempotencyKey: `upload:${file.key}` },
    );
    return { fileId };
  };
}

/** What may be uploaded: one profile a kind, read by the form and the server alike. All files are private. */
export const uploads = {
  photo: f({ image: { maxFileSize: "32MB", maxFileCount: 12, acl: "private" } }, { awaitServerData: true })
    .input(input)
    .middleware(gate)
    .onUploadComplete(register("photo")),
  document: f({ pdf: { maxFileSize: "32MB", maxFileCount: 4, acl: "private" } }, { awaitServerData: true })
    .input(input)
    .middleware(gate)
    .onUploadComplete(register("document")),
  log: f({ blob: { maxFileSize: "256MB", maxFileCount: 1, acl: "private" } }, { awaitServerData: true })
    .input(input)
    .middleware(gate)
    .onUploadComplete(register("log")),
} satisfies FileRouter;

export type Uploads = typeof uploads;
