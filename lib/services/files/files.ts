import "server-only";
import { and, eq } from "drizzle-orm";
import { z } from "zod";
import { enqueue } from "@/db/client";
import { files } from "@/db/schema";
import { idText, line } from "@/lib/cases/schema";
import { notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { lockOpenCase } from "../cases/refresh";
import { defineVerb } from "../verb";

export const FILE_KINDS = ["photo", "log", "document"] as const;

export const registerFileInput = z.object({
  caseId: idText,
  kind: z.enum(FILE_KINDS),
  name: line("The file's name", 200),
  bytes: z.number().int().min(1).max(260_000_000),
  contentType: line("The type", 120),
  storageKey: line("The key", 300),
  workJobId: idText.nullish(),
});

/** Notes a stored upload and has a worker look into it. The original stays as it came. */
export const registerFile = defineVerb({
  name: "file.register",
  summary: "Note an uploaded file",
  action: "reading.write",
  input: registerFileInput,
  async run(tx, ctx, { caseId, workJobId, ...file }) {
    await lockOpenCase(tx, ctx, caseId);
    const id = newId("file", ctx.now.getTime());
    await tx.insert(files).values({
      shopId: ctx.shopId,
      id,
      caseId,
      ...file,
      workJobId: workJobId ?? null,
      state: "processing",
      byId: ctx.actor.id,
      byName: ctx.actor.name,
      at: ctx.now,
    });
    await enqueue(tx, "process_file", { shopId: ctx.shopId, fileId: id }, { key: `file:${id}` });
    return { fileId: id };
  },
});

export const describeFile = defineVerb({
  name: "file.describe",
  summary: "Caption a photo, or choose whether the customer sees it",
  action: "reading.write",
  input: z.object({
    caseId: idText,
    fileId: idText,
    caption: line("The caption", 200).nullish(),
    forCustomer: z.boolean(),
  }),
  async run(tx, ctx, { caseId, fileId, caption, forCustomer }) {
    await lockOpenCase(tx, ctx, caseId);
    const changed = await tx
      .update(files)
      .set({ caption: caption ?? null, forCustomer })
      .where(and(eq(files.shopId, ctx.shopId), eq(files.caseId, caseId), eq(files.id, fileId)))
      .returning({ id: files.id });
    if (changed.length === 0) throw notFound("The file");
    return { saved: true };
  },
});

/** What the worker found in a file. */
export const processFile = defineVerb({
  name: "file.process",
  summary: "Keep what the worker made of a file",
  action: "file.process",
  input: z.object({
    fileId: idText,
    state: z.enum(["ready", "refused"]),
    reason: z.string().max(300).nullish(),
    sha256: z.string().length(64).nullish(),
    contentType: z.string().max(120).optional(),
    displayKey: z.string().max(300).nullish(),
    thumbKey: z.string().max(300).nullish(),
    width: z.number().int().nullish(),
    height: z.number().int().nullish(),
  }),
  async run(tx, ctx, { fileId, ...found }) {
    await tx
      .update(files)
      .set(found)
      .where(and(eq(files.shopId, ctx.shopId), eq(files.id, fileId)));
    return { saved: true };
  },
});
