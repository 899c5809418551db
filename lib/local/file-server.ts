import { createHmac, timingSafeEqual } from "node:crypto";
import { createReadStream } from "node:fs";
import type { IncomingMessage, ServerResponse } from "node:http";
import { type FileRecord, fileStore } from "./file-store";
import { onLoopback, safely } from "./loopback";
import { appendMultipartFile } from "./multipart-tail";

export interface FileServerOptions {
  folder: string;
  /** The address by which the app and browsers reach it; part of every signature. */
  url: string;
  appUrl: string;
  apiKey: string;
  appId: string;
}

/** What the app registers for an upload: where to report it, and with what. */
interface Registration {
  metadata: unknown;
  callbackUrl: string;
  callbackSlug: string;
  awaitServerData: boolean;
  /** The open reply through which a development server gets its reports, and how many are still to come. */
  stream: { response: ServerResponse; open: number } | undefined;
}

const REGISTRATION_WAIT_MS = 10_000;
const CALLBACK_WAIT_MS = 30_000;

/** Things that arrive by key, perhaps after somebody already waits for them. */
function awaitable<T>() {
  const known = new Map<string, T>();
  const waiting = new Map<string, (value: T) => void>();
  return {
    put(key: string, value: T) {
      const taker = waiting.get(key);
      waiting.delete(key);
      if (taker) taker(value);
      else known.set(key, value);
    },
    async take(key: string, timeoutMs: number): Promise<T | undefined> {
      const value = known.get(key);
      known.delete(key);
      if (value !== undefined) return value;
      return new Promise((resolve) => {
        const timer = setTimeout(() => {
          waiting.delete(key);
          resolve(undefined);
        }, timeoutMs);
        waiting.set(key, (late) => {
          clearTimeout(timer);
          resolve(late);
        });
      });
    },
  };
}

async function jsonBody(request: IncomingMessage): Promise<Record<string, unknown>> {
  const chunks: Buffer[] = [];
  for await (const chunk of request) chunks.push(chunk as Buffer);
  return JSON.parse(Buffer.concat(chunks).toString("utf8") || "{}");
}

const strings = (value: unknown): string[] =>
  Array.isArray(value) ? value.filter((each): each is string => typeof each === "string") : [];

/**
 * A file store that speaks what the uploadthing libraries ask of their service: signed uploads that can be resumed,
 * private files behind signed addresses, signed reports to the app, and the calls to list and delete.
 *
 * @returns what closes it
 */
export function fileServer(options: FileServerOptions): Promise<() => Promise<void>> {
  const { url: base, apiKey, appId } = options;
  const store = fileStore(options.folder);
  const registrations = awaitable<Registration>();
  const results = awaitable<unknown>();

  const sign = (text: string) => `hmac-sha256=${createHmac("sha256", apiKey).update(text).digest("hex")}`;

  /** The address was signed by the app with the shared key and has not run out. */
  function isSigned(request: IncomingMessage): boolean {
    const [unsigned, signature] = (request.url ?? "").split("&signature=");
    if (!unsigned || !signature) return false;
    const given = Buffer.from(decodeURIComponent(signature));
    const right = Buffer.from(sign(`${base}${unsigned}`));
    if (given.length !== right.length || !timingSafeEqual(given, right)) return false;
    const expires = Number(new URL(unsigned, base).searchParams.get("expires"));
    return expires > Date.now();
  }

  const json = (response: ServerResponse, status: number, body: unknown) => {
    response.writeHead(status, { "content-type": "application/json" });
    response.end(JSON.stringify(body));
  };

  const addressOf = (key: string) => `${base}/a/${appId}/${key}`;

  async function upload(request: IncomingMessage, response: ServerResponse, key: string, query: URLSearchParams) {
    const fact = (name: string) => {
      const value = query.get(`x-ut-${name}`);
      return value === null ? undefined : decodeURIComponent(value);
    };
    const from = Number(/bytes=(\d+)-/.exec(request.headers.range ?? "")?.[1] ?? 0);
    const held = await store.held(key);
    if (from > held) return json(response, 416, { error: `Only ${held} bytes are held.` });
    const isWhole = await appendMultipartFile(
      request,
      request.headers["content-type"] ?? "",
      store.bytesPath(key),
      from,
    );
    const size = await store.held(key);
    if (!isWhole || size !== Number(fact("file-size")))
      return json(response, 400, { error: `Upload incomplete: ${size} bytes held.` });
    const record = await store.complete({
      key,
      name: fact("file-name") ?? key,
      type: fact("file-type") || "application/octet-stream",
      size,
      customId: fact("custom-id") || null,
      acl: fact("acl") || "private",
      disposition: fact("content-disposition") || "inline",
      uploadedAt: Date.now(),
    });
    const serverData = fact("slug") ? await reportToApp(record) : null;
    const address = addressOf(key);
    json(response, 200, { url: address, appUrl: address, ufsUrl: address, fileHash: record.md5, serverData });
  }

  /** Tells the app that the file is there and returns what its handler answered. */
  async function reportToApp(record: FileRecord): Promise<unknown> {
    const registration = await registrations.take(record.key, REGISTRATION_WAIT_MS);
    if (!registration) throw new Error(`no registration for ${record.key}`);
    const address = addressOf(record.key);
    const { key, name, size, type, customId, md5 } = record;
    const file = { name, size, type, customId, key, url: address, appUrl: address, ufsUrl: address, fileHash: md5 };
    const payload = JSON.stringify({ status: "uploaded", metadata: registration.metadata, origin: base, file });
    const result = registration.awaitServerData ? results.take(key, CALLBACK_WAIT_MS) : Promise.resolve(null);
    if (registration.stream) {
      const { stream } = registration;
      stream.response.write(`${JSON.stringify({ payload, signature: sign(payload), hook: "callback" })}\n`);
      stream.open -= 1;
      if (stream.open === 0) stream.response.end();
    } else {
      const target = new URL(registration.callbackUrl);
      // the key signs what is sent; it goes to the app alone
      if (target.origin !== new URL(options.appUrl).origin)
        throw new Error(`callback to a foreign origin ${target.origin}`);
      target.searchParams.set("slug", registration.callbackSlug);
      const reply = await fetch(target, {
        method: "POST",
        headers: {
          "content-type": "application/json",
          "uploadthing-hook": "callback",
          "x-uploadthing-signature": sign(payload),
        },
        body: payload,
      });
      if (!reply.ok) throw new Error(`the app answered ${reply.status} to the report of ${key}`);
    }
    return (await result) ?? null;
  }

  async function download(request: IncomingMessage, response: ServerResponse, key: string) {
    const record = await store.record(key);
    if (!record) return json(response, 404, { error: "No such file." });
    if (record.acl !== "public-read" && !isSigned(request))
      return json(response, 403, { error: "A valid signature is needed." });
    const headers = {
      "content-type": record.type,
      "content-disposition": `${record.disposition}; filename*=UTF-8''${encodeURIComponent(record.name)}`,
      "accept-ranges": "bytes",
      "access-control-allow-origin": new URL(options.appUrl).origin,
      "x-content-type-options": "nosniff",
      etag: `"${record.md5}"`,
    };
    const range = /^bytes=(\d*)-(\d*)$/.exec(request.headers.range ?? "");
    let [first, last] = [0, record.size - 1];
    if (range && (range[1] || range[2])) {
      first = range[1] ? Number(range[1]) : Math.max(0, record.size - Number(range[2]));
      last = range[1] && range[2] ? Math.min(Number(range[2]), last) : last;
      if (first > last) {
        response.writeHead(416, { "content-range": `bytes */${record.size}` });
        response.end();
        return;
      }
      response.writeHead(206, {
        ...headers,
        "content-range": `bytes ${first}-${last}/${record.size}`,
        "content-length": last - first + 1,
      });
    } else {
      response.writeHead(200, { ...headers, "content-length": record.size });
    }
    if (request.method === "HEAD" || record.size === 0) return void response.end();
    createReadStream(store.bytesPath(key), { start: first, end: last }).pipe(response);
  }

  /** The keys a call means, whether it names them by key or by the app's own id. */
  async function keysOf(body: Record<string, unknown>): Promise<string[]> {
    const own = new Set(strings(body.customIds));
    if (own.size === 0) return strings(body.fileKeys);
    return (await store.list())
      .filter((record) => record.customId !== null && own.has(record.customId))
      .map((record) => record.key);
  }

  async function call(request: IncomingMessage, response: ServerResponse, path: string) {
    if (request.headers["x-uploadthing-api-key"] !== apiKey) return json(response, 401, { error: "Wrong key." });
    const body = await jsonBody(request);
    switch (path) {
      case "/route-metadata": {
        const registration = {
          metadata: body.metadata,
          callbackUrl: String(body.callbackUrl),
          callbackSlug: String(body.callbackSlug),
          awaitServerData: body.awaitServerData === true,
        };
        const isDev = body.isDev === true;
        if (isDev) response.writeHead(200, { "content-type": "application/jsonl" }).flushHeaders();
        const keys = strings(body.fileKeys);
        const stream = isDev ? { response, open: keys.length } : undefined;
        for (const key of keys) registrations.put(key, { ...registration, stream });
        if (!isDev) json(response, 200, { ok: true });
        return;
      }
      case "/callback-result":
        results.put(String(body.fileKey), body.callbackData ?? null);
        return json(response, 200, { ok: true });
      case "/v6/deleteFiles": {
        const removed = await Promise.all((await keysOf(body)).map((key) => store.remove(key)));
        return json(response, 200, { success: true, deletedCount: removed.filter(Boolean).length });
      }
      case "/v6/listFiles": {
        const [offset, limit] = [Number(body.offset ?? 0), Number(body.limit ?? 500)];
        const all = await store.list();
        const files = all.slice(offset, offset + limit).map(({ key, name, size, customId, uploadedAt }) => ({
          id: key,
          customId,
          key,
          name,
          size,
          status: "Uploaded",
          uploadedAt,
        }));
        return json(response, 200, { hasMore: all.length > offset + limit, files });
      }
      case "/v6/updateACL": {
        for (const update of Array.isArray(body.updates) ? body.updates : []) {
          const record = await store.record(String(update.fileKey));
          if (record) await store.save({ ...record, acl: String(update.acl) });
        }
        return json(response, 200, { success: true });
      }
      default:
        return json(response, 404, { error: "No such call." });
    }
  }

  return onLoopback(
    Number(new URL(base).port),
    safely(async (request, response) => {
      const { pathname, searchParams } = new URL(request.url ?? "/", base);
      if (pathname === "/health") return json(response, 200, { ok: true });
      if (request.method === "POST") return call(request, response, pathname);
      const stored = /^\/a\/([^/]+)\/([^/]+)$/.exec(pathname);
      if (stored && (request.method === "GET" || request.method === "HEAD")) {
        if (stored[1] !== appId) return json(response, 404, { error: "No such app." });
        return download(request, response, decodeURIComponent(stored[2]!));
      }
      const key = decodeURIComponent(pathname.slice(1));
      response.setHeader("access-control-allow-origin", new URL(options.appUrl).origin);
      response.setHeader("access-control-expose-headers", "x-ut-range-start");
      if (request.method === "OPTIONS") {
        response.writeHead(204, {
          "access-control-allow-methods": "HEAD, PUT",
          "access-control-allow-headers": "b3, traceparent, x-uploadthing-version, content-type, range",
        });
        return void response.end();
      }
      if (request.method !== "HEAD" && request.method !== "PUT") return json(response, 405, { error: "Not that way." });
      if (!isSigned(request)) return json(response, 403, { error: "A valid signature is needed." });
      if (request.method === "PUT") return upload(request, response, key, searchParams);
      response.writeHead(200, { "x-ut-range-start": String(await store.held(key)) });
      response.end();
    }),
  );
}
