import { mkdtempSync, rmSync } from "node:fs";
import { createServer, type Server } from "node:http";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { fileServer } from "@/lib/local/file-server";
import { freePort } from "@/lib/local/ports.mjs";

// papers, servers and pictures take their time on a busy machine
vi.setConfig({ testTimeout: 180_000, hookTimeout: 60_000 });

const folder = mkdtempSync(join(tmpdir(), "firedeck-flow-"));
const apiKey = "sk_live_0123456789abcdef";
const token = Buffer.from(JSON.stringify({ apiKey, appId: "firedeck-test", regions: ["local"] })).toString("base64");
let files = "";
let app = "";
let server: Server;
let close: () => Promise<void>;
const reported: { name: string; key: string; by: string }[] = [];

/** An app with a file route of the real library, served as the web server would. */
async function appWith(isDev: boolean): Promise<(request: Request) => Promise<Response>> {
  const { createRouteHandler, createUploadthing } = await import("uploadthing/server");
  const f = createUploadthing();
  const photo = f({ image: { maxFileSize: "4MB", maxFileCount: 5, acl: "private" } })
    .middleware(() => ({ by: "bram" }))
    .onUploadComplete(({ metadata, file }) => {
      reported.push({ name: file.name, key: file.key, by: metadata.by });
      return { stored: file.key };
    });
  return createRouteHandler({
    router: { photo },
    config: { token, isDev, ingestUrl: files, logLevel: "None", callbackUrl: `${app}/api/uploadthing` } as never,
  });
}

let handle: (request: Request) => Promise<Response>;

beforeAll(async () => {
  const [appPort, filesPort] = [await freePort(4730), await freePort(4731)];
  app = `http://localhost:${appPort}`;
  files = `http://localhost:${filesPort}`;
  close = await fileServer({ folder, url: files, appUrl: app, apiKey, appId: "firedeck-test" });
  server = createServer(async (incoming, outgoing) => {
    const chunks: Buffer[] = [];
    for await (const chunk of incoming) chunks.push(chunk as Buffer);
    const body = chunks.length > 0 ? Buffer.concat(chunks) : undefined;
    const reply = await handle(
      new Request(`${app}${incoming.url}`, {
        method: incoming.method,
        headers: incoming.headers as Record<string, string>,
        body,
      }),
    );
    outgoing.writeHead(reply.status, Object.fromEntries(reply.headers));
    outgoing.end(Buffer.from(await reply.arrayBuffer()));
  });
  await new Promise<void>((resolve) => server.listen(appPort, "127.0.0.1", resolve));
});
afterAll(async () => {
  server.close();
  server.closeAllConnections();
  await close();
  rmSync(folder, { recursive: true });
});

describe.each([
  ["production", false],
  ["development", true],
])("an upload from a browser, in %s", (_, isDev) => {
  it("is stored, reported to the app with what its middleware said, and answered with what the app returned", async () => {
    handle = await appWith(isDev);
    const given = ["one.png", "two.png"].map(
      (name) => new File([new Uint8Array(60_000).fill(7)], name, { type: "image/png" }),
    );
    reported.length = 0;
    // the three steps of the library's browser side, which itself wants a window
    const asked = await fetch(`${app}/api/uploadthing?actionType=upload&slug=photo`, {
      method: "POST",
      headers: {
        "content-type": "application/json",
        "x-uploadthing-package": "test",
        "x-uploadthing-version": "7.7.4",
      },
      body: JSON.stringify({
        files: given.map(({ name, size, type, lastModified }) => ({ name, size, type, lastModified })),
      }),
    });
    expect(asked.status).toBe(200);
    const places = (await asked.json()) as { url: string; key: string }[];
    const uploaded = await Promise.all(
      places.map(async ({ url, key }, index) => {
        const preflight = await fetch(url, {
          method: "OPTIONS",
          headers: { origin: app, "access-control-request-method": "PUT" },
        });
        expect(preflight.headers.get("access-control-allow-origin")).toBe(app);
        expect((await fetch(url, { method: "HEAD" })).headers.get("x-ut-range-start")).toBe("0");
        const body = new FormData();
        body.append("file", given[index]!);
        const reply = await fetch(url, { method: "PUT", body, headers: { range: "bytes=0-" } });
        return { key, ...((await reply.json()) as { serverData: unknown }) };
      }),
    );
    expect(uploaded).toHaveLength(2);
    expect(reported.map(({ name, by }) => `${name} ${by}`).sort()).toEqual(["one.png bram", "two.png bram"]);
    for (const each of uploaded) expect(each.serverData).toEqual({ stored: each.key });
  });
});
