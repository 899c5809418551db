import { createHash } from "node:crypto";
import { createReadStream } from "node:fs";
import { mkdir, readdir, readFile, rename, rm, stat, writeFile } from "node:fs/promises";
import { join } from "node:path";

export interface FileRecord {
  key: string;
  name: string;
  type: string;
  size: number;
  customId: string | null;
  acl: string;
  disposition: string;
  uploadedAt: number;
  md5: string;
}

/** Bytes and records on disk: `NAME.bytes` (perhaps still growing) and, once complete, `NAME.json`. */
export function fileStore(folder: string) {
  // keys come from outside; as hex they cannot leave the folder
  const base = (key: string) => join(folder, createHash("sha256").update(key).digest("hex"));
  const bytesPath = (key: string) => `${base(key)}.bytes`;
  const ready = mkdir(folder, { recursive: true });

  return {
    bytesPath,
    async held(key: string): Promise<number> {
      await ready;
      return stat(bytesPath(key)).then(
        (found) => found.size,
        () => 0,
      );
    },
    async record(key: string): Promise<FileRecord | undefined> {
      return readFile(`${base(key)}.json`, "utf8").then(
        (text) => JSON.parse(text) as FileRecord,
        () => undefined,
      );
    },
    async complete(record: Omit<FileRecord, "md5">): Promise<FileRecord> {
      const hash = createHash("md5");
      for await (const chunk of createReadStream(bytesPath(record.key))) hash.update(chunk as Buffer);
      const whole = { ...record, md5: hash.digest("hex") };
      await writeFile(`${base(record.key)}.json.part`, JSON.stringify(whole));
      await rename(`${base(record.key)}.json.part`, `${base(record.key)}.json`);
      return whole;
    },
    async save(record: FileRecord): Promise<void> {
      await writeFile(`${base(record.key)}.json`, JSON.stringify(record));
    },
    async remove(key: string): Promise<boolean> {
      const had = (await this.record(key)) !== undefined;
      await Promise.all([rm(bytesPath(key), { force: true }), rm(`${base(key)}.json`, { force: true })]);
      return had;
    },
    /** Newest first. */
    async list(): Promise<FileRecord[]> {
      await ready;
      const names = (await readdir(folder)).filter((name) => name.endsWith(".json"));
      const all = await Promise.all(
        names.map(async (name) => JSON.parse(await readFile(join(folder, name), "utf8")) as FileRecord),
      );
      return all.sort((a, b) => b.uploadedAt - a.uploadedAt);
    },
  };
}

export type FileStore = ReturnType<typeof fileStore>;
