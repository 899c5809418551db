import { readFile } from "node:fs/promises";
import { get } from "node:http";
import { setTimeout as sleep } from "node:timers/promises";
import { ensureBuild } from "./build.mjs";
import { childrenIn } from "./children.mjs";
import { bin } from "./paths.mjs";
import { run } from "./run.mjs";
import { Plain, say, step } from "./say.mjs";

/** A TypeScript program, run in one process: the loader's own command would put another one in between. */
const program = (script) => [process.execPath, ["--import", "tsx", script]];
const programEnv = (env) => ({ ...env, TSX_TSCONFIG_PATH: "tsconfig.tools.json" });

const tail = (path) =>
  readFile(path, "utf8").then(
    (text) => text.trimEnd().split("\n").slice(-20).join("\n"),
    () => "",
  );

/** Whether the address answers anything at all; the connection is not kept, since a server waits for it when it ends. */
const answersNow = (url) =>
  new Promise((resolve) => {
    const request = get(url, { agent: false, timeout: 60_000 }, (response) => {
      response.resume();
      response.once("close", () => resolve(true));
    });
    request.once("timeout", () => request.destroy());
    request.once("error", () => resolve(false));
  });

async function answers(url, isOver) {
  while (!(await answersNow(url))) {
    if (isOver()) return false;
    await sleep(100);
  }
  return true;
}

/**
 * Brings up everything above the database: stand-ins, migrations, demo data, build, web, worker.
 *
 * @param {object} options
 * @param {Awaited<ReturnType<typeof import("./settings.mjs").settings>>} options.settings
 * @param {string} options.folder
 * @param {boolean} options.dev serve from the sources with hot reload
 * @param {boolean} options.seed
 * @param {(name: string) => void} options.onGivingUp called when a process keeps dying
 * @param {(stop: () => Promise<void>) => void} options.onStop takes what ends the processes, before any is started
 */
export async function startStack({ settings: { env, webPort, standIns }, folder, dev, seed, onGivingUp, onStop }) {
  let failed;
  const children = childrenIn({
    folder,
    onGivingUp: (name) => {
      failed = name;
      onGivingUp(name);
    },
  });
  onStop(children.stop);
  const up = async (name, url) => {
    if (await answers(url, () => failed === name)) return;
    throw new Plain(`${name} does not start. Its log (${children.logOf(name)}):\n${await tail(children.logOf(name))}`);
  };

  if (standIns.length > 0) {
    children.start("stand-ins", ...program("lib/local/stand-ins.ts"), programEnv(env));
    const health = env.STAND_INS.includes("mail") ? env.MAILBOX_URL : env.UPLOADTHING_INGEST_URL;
    await step("Starting the stand-ins for mail and files", () => up("stand-ins", `${health}/health`));
  }
  const data = async () => {
    await step("Bringing the database up to date", () => run(...program("db/migrate.ts"), { env: programEnv(env) }));
    if (seed)
      await step("Filling the demo shop", () =>
        run(...program("db/seed/run.ts"), { env: programEnv(env), onLine: (line) => say(`    ${line}`) }),
      );
  };
  // both must end before the caller cleans up, whichever fails
  const outcomes = await Promise.allSettled([data(), dev ? undefined : ensureBuild(env)]);
  const fault = outcomes.find((outcome) => outcome.status === "rejected");
  if (fault) throw fault.reason;

  children.start("worker", ...program("lib/jobs/worker.ts"), programEnv(env));
  // "localhost" and IPv4 first: reachable by either name, from this machine only, and redirects keep the name
  const webEnv = { ...env, NODE_OPTIONS: `${env.NODE_OPTIONS ?? ""} --dns-result-order=ipv4first`.trim() };
  const host = env.LISTEN_HOST || "localhost";
  children.start("web", bin("next"), [dev ? "dev" : "start", "-p", String(webPort), "-H", host], webEnv, { show: dev });
  await step("Starting the web server", () =>
    up("web", `http://${host === "0.0.0.0" ? "localhost" : host}:${webPort}/`),
  );
}
