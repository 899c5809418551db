import { createHash, randomBytes } from "node:crypto";
import { mkdtempSync, rmSync } from "node:fs";
import { request } from "node:http";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { UTApi } from "uploadthing/server";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { fileServer } from "@/lib/local/file-server";
import { freePort } from "@/lib/local/ports.mjs";
import { type Storage, StorageError, uploadthingStorage } from "@/lib/storage/storage";

// papers, servers and pictures take their time on a busy machine
vi.setConfig({ testTimeout: 180_000, hookTimeout: 60_000 });

const folder = mkdtempSync(join(tmpdir(), "firedeck-files-"));
const apiKey = "sk_live_0123456789abcdef";
let base = "";
let close: () => Promise<void>;
let storage: Storage;

beforeAll(async () => {
  const port = await freePort(4727);
  base = `http://localhost:${port}`;
  Object.assign(process.env, {
    UPLOADTHING_TOKEN: Buffer.from(JSON.stringify({ apiKey, appId: "firedeck-test", regions: ["local"] })).toString(
      "base64",
    ),
    UPLOADTHING_INGEST_URL: base,
    UPLOADTHING_API_URL: base,
    UPLOADTHING_UFS_HOST: `localhost:${port}`,
    UPLOADTHING_UFS_APP_ID_LOCATION: "path",
    UPLOADTHING_LOG_LEVEL: "Warning",
  });
  close = await fileServer({ folder, url: base, appUrl: "http://localhost:3000", apiKey, appId: "firedeck-test" });
  storage = uploadthingStorage();
});
afterAll(async () => {
  await close();
  rmSync(folder, { recursive: true });
});

/** An address signed as the service's client library signs uploads, written out from its documented form. */
async function uploadUrl(name: string, size: number): Promise<string> {
  const { createHmac } = await import("node:crypto");
  const value = (text: string) => encodeURIComponent(encodeURIComponent(text));
  const unsigned = `${base}/key-${name}?expires=${Date.now() + 60_000}&x-ut-identifier=firedeck-test&x-ut-file-name=${value(name)}&x-ut-file-size=${size}&x-ut-file-type=${value("image/png")}&x-ut-acl=private`;
  return `${unsigned}&signature=${encodeURIComponent(`hmac-sha256=${createHmac("sha256", apiKey).update(unsigned).digest("hex")}`)}`;
}

/** Sends part of a multipart upload; `cutAt` breaks the connection after so many bytes of the file. */
function put(url: string, bytes: Buffer, from: number, cutAt?: number): Promise<number | "broken"> {
  const head = Buffer.from(
    '--BOUNDARY\r\nContent-Disposition: form-data; name="file"; filename="x"\r\nContent-Type: image/png\r\n\r\n',
  );
  const body = bytes.subarray(from);
  return new Promise((resolve) => {
    const sending = request(
      url,
      { method: "PUT", headers: { range: `bytes=${from}-`, "content-type": "multipart/form-data; boundary=BOUNDARY" } },
      (reply) => {
        reply.resume();
        reply.on("end", () => resolve(reply.statusCode!));
      },
    );
    sending.on("error", () => resolve("broken"));
    sending.write(head);
    if (cutAt === undefined) sending.end(Buffer.concat([body, Buffer.from("\r\n--BOUNDARY--\r\n")]));
    else sending.write(body.subarray(0, cutAt), () => setTimeout(() => sending.destroy(), 150));
  });
}

describe("stored files", () => {
  it("come back byte by byte, whatever they are", async () => {
    const bytes = new Uint8Array(randomBytes(300_000));
    const key = await storage.put(bytes, { name: "Bild 50% – ä.png", contentType: "image/png" });
    expect(Buffer.from(await storage.read(key)).equals(Buffer.from(bytes))).toBe(true);
    const reply = await fetch(await storage.signedUrl(key));
    expect(reply.headers.get("content-type")).toBe("image/png");
    expect(decodeURIComponent(reply.headers.get("content-disposition")!)).toContain("Bild 50% – ä.png");
  });

  it("are private: no address, an altered one or one that ran out gives nothing", async () => {
    const key = await storage.put(new Uint8Array([1, 2, 3]), { name: "a.png", contentType: "image/png" });
    const url = await storage.signedUrl(key, 1);
    expect((await fetch(url)).status).toBe(200);
    expect((await fetch(url.split("?")[0]!)).status).toBe(403);
    expect((await fetch(url.replace(/expires=\d+/, "expires=9999999999999"))).status).toBe(403);
    await new Promise((resolve) => setTimeout(resolve, 1100));
    expect((await fetch(url)).status).toBe(403);
  });

  it("give a part when a part is asked for", async () => {
    const key = await storage.put(new TextEncoder().encode("0123456789"), { name: "a.txt", contentType: "text/plain" });
    const url = await storage.signedUrl(key);
    const part = await fetch(url, { headers: { range: "bytes=2-4" } });
    expect([part.status, part.headers.get("content-range"), await part.text()]).toEqual([206, "bytes 2-4/10", "234"]);
    expect(await (await fetch(url, { headers: { range: "bytes=-2" } })).text()).toBe("89");
    expect((await fetch(url, { headers: { range: "bytes=20-" } })).status).toBe(416);
  });

  it("are gone once removed, and can be listed until then", async () => {
    const key = await storage.put(new Uint8Array([9]), { name: "gone.png", contentType: "image/png" });
    const listed = async () => (await new UTApi().listFiles({})).files.map((file) => file.key);
    expect(await listed()).toContain(key);
    await storage.remove([key, "never-was-there"]);
    expect(await listed()).not.toContain(key);
    await expect(storage.read(key)).rejects.toThrow(StorageError);
  });

  it("are not read beyond what was allowed", async () => {
    const key = await storage.put(new Uint8Array(5000), { name: "big.bin", contentType: "application/octet-stream" });
    await expect(storage.read(key, { maxBytes: 4999 })).rejects.toThrow("4999");
  });

  it("go on where a broken upload stopped", async () => {
    const bytes = randomBytes(400_000);
    const url = await uploadUrl("resumed", bytes.length);
    expect(await put(url, bytes, 0, 150_000)).toBe("broken");
    const held = Number((await fetch(url, { method: "HEAD" })).headers.get("x-ut-range-start"));
    expect(held).toBeGreaterThan(100_000);
    expect(held).toBeLessThanOrEqual(150_000);
    expect(await put(url, bytes, held)).toBe(200);
    const got = await storage.read("key-resumed");
    expect(createHash("sha256").update(got).digest("hex")).toBe(createHash("sha256").update(bytes).digest("hex"));
  });

  it("refuses an upload without a signature, a call without the key, and a short body", async () => {
    expect((await fetch(`${base}/key-x?x-ut-file-size=1`, { method: "PUT", body: "x" })).status).toBe(403);
    expect((await fetch(`${base}/v6/listFiles`, { method: "POST", body: "{}" })).status).toBe(401);
    expect(await put(await uploadUrl("short", 10), Buffer.from("12345"), 0)).toBe(400);
    await expect(storage.read("key-short")).rejects.toThrow("404");
  });
});
