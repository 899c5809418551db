import { UTApi, UTFile } from "uploadthing/server";

/** Where files lie. All are private: they are read through addresses that are signed and run out. */
export interface Storage {
  /** @returns the key under which the bytes are found again */
  put(bytes: Uint8Array, options: { name: string; contentType: string }): Promise<string>;
  /** An address that works for `expiresInS` seconds (at most seven days); making it asks nobody. */
  signedUrl(key: string, expiresInS?: number): Promise<string>;
  /** @throws StorageError when the file is gone or the store does not answer */
  read(key: string, options?: { maxBytes?: number }): Promise<Uint8Array>;
  /** Removing what is not there is no error. */
  remove(keys: readonly string[]): Promise<void>;
}

export class StorageError extends Error {
  readonly status: number | undefined;
  constructor(message: string, options: { status?: number; cause?: unknown } = {}) {
    super(message, { cause: options.cause });
    this.name = "StorageError";
    this.status = options.status;
  }
}

const FIVE_MINUTES_S = 300;

/** The store of UPLOADTHING_TOKEN, or the stand-in that the environment points at. */
export function uploadthingStorage(): Storage {
  const api = new UTApi();
  const signedUrl = async (key: string, expiresInS = FIVE_MINUTES_S) =>
    (await api.generateSignedURL(key, { expiresIn: expiresInS })).ufsUrl;
  return {
    signedUrl,
    async put(bytes, { name, contentType }) {
      const file = new UTFile([new Uint8Array(bytes)], name, { type: contentType });
      const { data, error } = await api.uploadFiles(file, { acl: "private" });
      if (error) throw new StorageError(`“${name}” could not be stored: ${error.message}`, { cause: error });
      return data.key;
    },
    async read(key, { maxBytes = Number.POSITIVE_INFINITY } = {}) {
      const reply = await fetch(await signedUrl(key)).catch((cause: unknown) => {
        throw new StorageError("The file store does not answer.", { cause });
      });
      if (!reply.ok || !reply.body)
        throw new StorageError(`The file store answered ${reply.status}.`, { status: reply.status });
      const chunks: Uint8Array[] = [];
      let size = 0;
      for await (const chunk of reply.body as unknown as AsyncIterable<Uint8Array>) {
        size += chunk.length;
        if (size > maxBytes) throw new StorageError(`The file has more than ${maxBytes} bytes.`);
        chunks.push(chunk);
      }
      return new Uint8Array(Buffer.concat(chunks));
    },
    async remove(keys) {
      if (keys.length > 0) await api.deleteFiles([...keys]);
    },
  };
}

let shared: Storage | undefined;
export const storage = (): Storage => {
  shared ??= uploadthingStorage();
  return shared;
};
