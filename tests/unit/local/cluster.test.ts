import { chmodSync, existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import pg from "pg";
import { afterAll, describe, expect, it, vi } from "vitest";
import { removeCluster, startCluster } from "@/lib/local/cluster.mjs";
import { postgresBin } from "@/lib/local/debian.mjs";
import { gone } from "@/lib/local/processes.mjs";
import { secretsIn } from "@/lib/local/secrets.mjs";

// papers, servers and pictures take their time on a busy machine
vi.setConfig({ testTimeout: 180_000, hookTimeout: 60_000 });

const folder = mkdtempSync("/var/tmp/firedeck-cluster-");
// as root the server runs under another account, which must be able to walk down to its data
const isRoot = process.getuid?.() === 0;
const dataDir = join(folder, "pg");
afterAll(() => removeCluster(dataDir).then(() => rmSync(folder, { recursive: true, force: true })));

async function ask(url: string, sql: string): Promise<unknown[]> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  const { rows } = await client.query(sql).finally(() => client.end());
  return rows;
}

const listening = async (url: string) => {
  const [row] = (await ask(url, "select current_setting('listen_addresses') as addresses")) as { addresses: string }[];
  return row;
};

describe.skipIf(!(await postgresBin()))("the private cluster", () => {
  it("starts, keeps its data, is taken over while it runs, and comes back after a crash and a lost password", async () => {
    if (isRoot) chmodSync(folder, 0o755);
    const start = async () => startCluster({ dataDir, secrets: await secretsIn(folder), preferredPort: 5633 });
    const first = await start();
    expect((await listening(first.url))?.addresses).toBe("127.0.0.1");
    await ask(first.url, "create table kept as select 42 as answer");

    const postmaster = () => Number(readFileSync(join(first.dataDir, "postmaster.pid"), "utf8").split("\n")[0]);
    const pid = postmaster();
    const again = await start();
    expect(postmaster()).toBe(pid);
    expect(again.url).toBe(first.url);

    // no chance to tidy up: the lock file stays behind
    process.kill(pid, "SIGKILL");
    await gone(pid, 5000);
    expect(existsSync(join(first.dataDir, "postmaster.pid"))).toBe(true);
    const revived = await start();
    expect(await ask(revived.url, "select answer from kept")).toEqual([{ answer: 42 }]);

    await revived.stop();
    rmSync(join(folder, "secrets.json"));
    const renewed = await start();
    expect(renewed.url).not.toBe(revived.url);
    expect(await ask(renewed.url, "select answer from kept")).toEqual([{ answer: 42 }]);
    await expect(ask(renewed.url.replace(/:[0-9a-f]{48}@/, ":wrong@"), "select 1")).rejects.toThrow(
      "password authentication failed",
    );
    await renewed.stop();

    // a lock file that names a living process which is not ours
    writeFileSync(join(renewed.dataDir, "postmaster.pid"), `${process.pid}\n${renewed.dataDir}\n0\n5633\n`);
    const last = await start();
    expect(await ask(last.url, "select answer from kept")).toEqual([{ answer: 42 }]);
    await last.stop();
  });
});
