import { spawn } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { setTimeout as sleep } from "node:timers/promises";
import { afterAll, afterEach, describe, expect, it, vi } from "vitest";
import { childrenIn, endLeftovers } from "@/lib/local/children.mjs";
import { freePort } from "@/lib/local/ports.mjs";
import { birthOf } from "@/lib/local/processes.mjs";
import { secretsIn } from "@/lib/local/secrets.mjs";
import { settings } from "@/lib/local/settings.mjs";

// papers, servers and pictures take their time on a busy machine
vi.setConfig({ testTimeout: 180_000, hookTimeout: 60_000 });

const folder = mkdtempSync(join(tmpdir(), "firedeck-local-"));
afterAll(() => rmSync(folder, { recursive: true }));
afterEach(() => vi.unstubAllEnvs());

const until = async (isSo: () => Promise<boolean> | boolean) => {
  for (let tries = 0; tries < 100; tries++) {
    if (await isSo()) return;
    await sleep(50);
  }
  throw new Error("did not come about in five seconds");
};

describe("ports", () => {
  it("passes over a taken one, and never gives the same twice", async () => {
    const taken = createServer();
    const port = await freePort(4740);
    await new Promise<void>((resolve) => taken.listen(port + 1, "127.0.0.1", resolve));
    const next = await freePort(port);
    expect(next).toBeGreaterThan(port + 1);
    taken.close();
  });
});

describe("secrets", () => {
  it("are made once, kept, and readable by their owner alone", async () => {
    const place = join(folder, "secrets");
    const first = await secretsIn(place);
    const second = await secretsIn(place);
    expect(first.isNew).toBe(true);
    expect(second).toEqual({ ...first, isNew: false });
    expect(statSync(join(place, "secrets.json")).mode & 0o777).toBe(0o600);
    expect(first.authSecret.length).toBeGreaterThanOrEqual(32);
  });

  it("are made anew when their file is damaged", async () => {
    const place = join(folder, "damaged");
    const first = await secretsIn(place);
    writeFileSync(join(place, "secrets.json"), "{");
    expect((await secretsIn(place)).ownerPassword).not.toBe(first.ownerPassword);
  });
});

describe("settings", () => {
  const cluster = { url: "postgres://firedeck_owner:x@127.0.0.1:5433/firedeck" };
  const make = async (options: { test?: boolean } = {}) =>
    settings({ folder, secrets: await secretsIn(join(folder, "secrets")), cluster, ...options });

  it("stands in for what is not set, and says which", async () => {
    for (const name of ["SMTP_URL", "UPLOADTHING_TOKEN", "DATABASE_URL", "APP_URL"]) vi.stubEnv(name, "");
    const { env, standIns, webPort } = await make();
    expect(standIns).toEqual(["mail", "files"]);
    expect(env.STAND_INS).toBe("mail,files");
    expect(env.APP_URL).toBe(`http://localhost:${webPort}`);
    expect(new URL(env.APP_DATABASE_URL!).username).toBe("firedeck_app");
    expect(JSON.parse(Buffer.from(env.UPLOADTHING_TOKEN!, "base64").toString()).apiKey).toMatch(/^sk_/);
  });

  it("leaves alone what is set", async () => {
    vi.stubEnv("SMTP_URL", "smtps://mail.example:465");
    vi.stubEnv("APP_URL", "https://shop.example");
    const { env, standIns } = await make();
    expect(env.SMTP_URL).toBe("smtps://mail.example:465");
    expect(env.APP_URL).toBe("https://shop.example");
    expect(env.MAILBOX_URL).toBeUndefined();
    expect(standIns).not.toContain("mail");
  });

  it("lets no test reach a real database, mail server or file store", async () => {
    vi.stubEnv("DATABASE_URL", "postgres://real.example/real");
    vi.stubEnv("SMTP_URL", "smtps://mail.example:465");
    vi.stubEnv("UPLOADTHING_TOKEN", "real");
    const { env } = await make({ test: true });
    expect(env.DATABASE_URL).toBe(cluster.url);
    expect(env.SMTP_URL).toMatch(/^smtp:\/\/127\.0\.0\.1:/);
    expect(env.UPLOADTHING_TOKEN).not.toBe("real");
  });
});

describe("children", () => {
  const forever = ["-e", "setInterval(() => {}, 1000)"];

  it("starts one again that was killed, and ends all of its own and nothing else", async () => {
    const place = join(folder, "children");
    const stranger = spawn(process.execPath, forever, { stdio: "ignore" });
    const children = childrenIn({ folder: place, onGivingUp: () => undefined });
    children.start("one", process.execPath, forever, process.env);
    const first = children.pidOf("one")!;
    process.kill(first, "SIGKILL");
    await until(() => children.pidOf("one") !== first);
    const second = children.pidOf("one")!;
    await children.stop();
    expect(await birthOf(second)).toBeUndefined();
    expect(await birthOf(stranger.pid!)).toBeDefined();
    stranger.kill();
  });

  it("gives up on one that never stays", async () => {
    const gaveUp = new Promise<string>((resolve) => {
      const children = childrenIn({
        folder: join(folder, "dying"),
        onGivingUp: (name: string) => {
          void children.stop();
          resolve(name);
        },
      });
      children.start("dying", process.execPath, ["-e", "process.exit(3)"], process.env);
    });
    expect(await gaveUp).toBe("dying");
  });

  it("ends what a killed driver left, but not a process that has its number by now", async () => {
    const place = join(folder, "left");
    const left = spawn(process.execPath, forever, { stdio: "ignore", detached: true });
    const other = spawn(process.execPath, forever, { stdio: "ignore", detached: true });
    await until(async () => (await birthOf(other.pid)) !== undefined);
    const children = [
      { name: "left", pid: left.pid, birth: await birthOf(left.pid) },
      { name: "other", pid: other.pid, birth: "1" },
    ];
    childrenIn({ folder: place, onGivingUp: () => undefined });
    writeFileSync(join(place, "running.json"), JSON.stringify({ driver: 999_999_999, birth: "1", children }));
    expect(await endLeftovers(place)).toBeUndefined();
    expect(await birthOf(left.pid)).toBeUndefined();
    expect(await birthOf(other.pid)).toBeDefined();
    other.kill();
  });

  it("knows a driver that still runs", async () => {
    const place = join(folder, "left");
    const driver = spawn(process.execPath, forever, { stdio: "ignore" });
    await until(async () => (await birthOf(driver.pid)) !== undefined);
    writeFileSync(
      join(place, "running.json"),
      JSON.stringify({ driver: driver.pid, birth: await birthOf(driver.pid), children: [] }),
    );
    expect(await endLeftovers(place)).toBe(driver.pid);
    expect(readFileSync(join(place, "running.json"), "utf8")).toContain(String(driver.pid));
    driver.kill();
  });
});
