import { type ChildProcess, spawn } from "node:child_process";
import { existsSync, rmSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import { join } from "node:path";
import { expect, request, test } from "@playwright/test";
import pg from "pg";
import { act, apiAs, mailTo, signInOf } from "./people";

const ROOT = join(import.meta.dirname, "../..");
const WRITES = 200;
const KILL_AFTER = [50, 120];

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen(0, "127.0.0.1", () => {
      const { port } = server.address() as { port: number };
      server.close(() => resolve(port));
    });
  });
}

/** A second web server of the same build and database, for this test to end as it likes. */
async function startWeb(port: number): Promise<ChildProcess> {
  const env = { ...process.env, NODE_ENV: "production" as const, APP_URL: `http://localhost:${port}` };
  const child = spawn(
    process.execPath,
    [join(ROOT, "node_modules/next/dist/bin/next"), "start", "-p", String(port), "-H", "localhost"],
    { cwd: ROOT, env, stdio: "ignore" },
  );
  const until = Date.now() + 30_000;
  while (Date.now() < until) {
    const isUp = await fetch(`http://localhost:${port}/api/health`).then(
      (answer) => answer.ok,
      () => false,
    );
    if (isUp) return child;
    await new Promise((resolve) => setTimeout(resolve, 150));
  }
  child.kill("SIGKILL");
  throw new Error("the second server did not start");
}

async function countNotes(caseId: string): Promise<Map<string, number>> {
  const client = new pg.Client({ connectionString: process.env.DATABASE_URL });
  await client.connect();
  const rows = await client.query<{ text: string; n: number }>(
    "select text, count(*)::int as n from case_notes where case_id = $1 group by text",
    [caseId],
  );
  await client.end();
  return new Map(rows.rows.map((row) => [row.text, row.n]));
}

test("a server killed twice during 200 writes loses no acknowledged one and writes none twice", async () => {
  const port = await freePort();
  const base = `http://localhost:${port}`;
  let server = await startWeb(port);
  try {
    const who = signInOf("writer");
    const api = await request.newContext({ baseURL: base, extraHTTPHeaders: { origin: base } });
    expect(
      (await api.post("/api/auth/sign-in/email", { data: { email: who.email, password: who.password } })).status(),
    ).toBe(200);
    const { id: caseId } = await act<{ id: string }>(api, "case.open", {
      customer: { name: "Fault Test" },
      vehicle: { label: "Corvid Marlin 2.4", engine: {} },
      words: "Nothing",
      odometerUnreadable: "dark",
    });
    const acknowledged = new Set<number>();
    const kills = [...KILL_AFTER];
    let restarting: Promise<void> | null = null;
    const killWhenDue = () => {
      if (restarting || kills[0] === undefined || acknowledged.size < kills[0]) return;
      kills.shift();
      server.kill("SIGKILL");
      restarting = startWeb(port).then((next) => {
        server = next;
        restarting = null;
      });
    };
    const write = async (n: number) => {
      const headers = { "idempotency-key": `fault-${caseId}-${n}` };
      for (let attempt = 0; attempt < 60; attempt++) {
        if (restarting) await restarting;
        const status = await api.post("/api/do/case.note", { data: { caseId, text: `note ${n}` }, headers }).then(
          (answer) => answer.status(),
          () => 0,
        );
        if (status === 200) {
          acknowledged.add(n);
          killWhenDue();
          return;
        }
        await new Promise((resolve) => setTimeout(resolve, 100));
      }
    };
    const queue = Array.from({ length: WRITES }, (_, index) => index);
    await Promise.all(
      Array.from({ length: 4 }, async () => {
        for (let n = queue.shift(); n !== undefined; n = queue.shift()) await write(n);
      }),
    );
    if (restarting) await restarting;
    expect(kills).toEqual([]);
    expect(acknowledged.size).toBe(WRITES);
    const found = await countNotes(caseId);
    expect(found.size).toBe(WRITES);
    expect([...found.values()].every((n) => n === 1)).toBe(true);
    await api.dispose();
  } finally {
    server.kill("SIGKILL");
  }
});

test("mail waits for the mail server and then goes out once", async () => {
  const downFile = process.env.MAIL_SINK_DOWN_FILE;
  expect(downFile).toBeTruthy();
  const api = await apiAs(signInOf("writer"));
  const address = `mail-test-${Date.now()}@post.example`;
  writeFileSync(downFile!, "");
  try {
    const { id: caseId } = await act<{ id: string }>(api, "case.open", {
      customer: { name: "Mail Test", email: address },
      vehicle: { label: "Corvid Marlin 2.4", engine: {} },
      words: "Nothing",
      odometerUnreadable: "dark",
      authorization: { amountMinor: 18_000, givenBy: "Mail Test", how: "in-person" },
    });
    await act(api, "case.release", { caseId, reason: "Changed their mind", chargeDiagnosis: false });
    await new Promise((resolve) => setTimeout(resolve, 2500));
    const box = await request.newContext();
    const read = async () =>
      (await (
        await box.get(`${process.env.MAILBOX_URL}/mailbox.json?to=${encodeURIComponent(address)}`)
      ).json()) as unknown[];
    expect(await read()).toEqual([]);
    rmSync(downFile!);
    const mail = await mailTo(address, /leaves unrepaired/);
    expect(mail.subject).toContain("leaves unrepaired");
    await new Promise((resolve) => setTimeout(resolve, 6000));
    expect((await read()).length).toBe(1);
    await box.dispose();
  } finally {
    if (existsSync(downFile!)) rmSync(downFile!);
  }
});
