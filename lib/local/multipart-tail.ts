import { open } from "node:fs/promises";
import type { Readable } from "node:stream";

/**
 * Writes the one file of a multipart body to disk as it arrives, from byte `from` on. What came before a broken
 * connection stays, so that the sender can go on from there; the last few bytes are held back until it is sure that
 * they are not the closing delimiter.
 *
 * @returns whether the closing delimiter was seen
 */
export async function appendMultipartFile(
  body: Readable,
  contentType: string,
  path: string,
  from: number,
): Promise<boolean> {
  const boundary = /boundary="?([^";]+)"?/.exec(contentType)?.[1];
  if (!boundary) throw new Error("not a multipart body");
  const closing = Buffer.from(`\r\n--${boundary}`);
  const file = await open(path, from === 0 ? "w" : "r+");
  let at = from;
  let pending: Buffer = Buffer.alloc(0);
  let inFile = false;
  let complete = false;
  const write = async (bytes: Buffer) => {
    if (bytes.length === 0) return;
    await file.write(bytes, 0, bytes.length, at);
    at += bytes.length;
  };
  try {
    await file.truncate(from);
    for await (const chunk of body) {
      if (complete) continue;
      pending = Buffer.concat([pending, chunk as Buffer]);
      if (!inFile) {
        const end = pending.indexOf("\r\n\r\n");
        if (end < 0) continue;
        inFile = true;
        pending = pending.subarray(end + 4);
      }
      const end = pending.indexOf(closing);
      complete = end >= 0;
      const sure = complete ? end : Math.max(0, pending.length - closing.length);
      await write(pending.subarray(0, sure));
      pending = pending.subarray(sure);
    }
  } catch (error) {
    if (!body.destroyed) throw error; // a broken connection is the sender's affair
  } finally {
    await file.close();
  }
  return complete;
}
