import { existsSync, writeFileSync } from "node:fs";
import { mkdir, readFile } from "node:fs/promises";
import { join } from "node:path";
import { parseArgs } from "node:util";
import { endLeftovers } from "./children.mjs";
import { startCluster } from "./cluster.mjs";
import { ensureDebian } from "./debian.mjs";
import { ensurePackages } from "./packages.mjs";
import { localDir } from "./paths.mjs";
import { birthOf, whenOrphaned } from "./processes.mjs";
import { endRunning } from "./run.mjs";
import { Plain, report, say } from "./say.mjs";
import { secretsIn } from "./secrets.mjs";
import { settings } from "./settings.mjs";
import { startStack } from "./stack.mjs";

const HELP = `Starts Firedeck on this machine.

  npm start                  everything, on a production build
  npm run dev                the same with hot reload
  npm start -- --no-demo     without the demo shop
  npm start -- --demo        with it, even on your own DATABASE_URL

PORT, LISTEN_HOST, DATABASE_URL, SMTP_URL, UPLOADTHING_TOKEN and the rest of the environment replace what is started by default.`;

const toStop = [];
let stopping;

/** Ends everything that was started here, newest first. */
function stop(code) {
  stopping ??= (async () => {
    endRunning();
    for (const end of toStop.reverse()) await end().catch(report);
    process.exit(code);
  })();
  return stopping;
}

for (const name of ["SIGINT", "SIGTERM", "SIGHUP"]) {
  process.on(name, () => {
    if (!stopping && name === "SIGINT") say("\n  Stopping …");
    void stop(0);
  });
}

whenOrphaned(() => void stop(0));

async function cluster(secrets) {
  if (process.env.DATABASE_URL) return undefined;
  await ensureDebian(["postgresql"]);
  const started = await startCluster({ dataDir: join(localDir, "pg"), secrets });
  toStop.push(started.stop);
  return started;
}

async function main() {
  const { values: flags } = parseArgs({
    options: {
      dev: { type: "boolean" },
      demo: { type: "boolean" },
      "no-demo": { type: "boolean" },
      help: { type: "boolean", short: "h" },
    },
  });
  if (flags.help) return say(HELP);
  await mkdir(localDir, { recursive: true });
  const other = await endLeftovers(localDir);
  if (other) throw new Plain(`Firedeck already runs from this folder (process ${other}). Stop that one first.`);
  // claimed before the slow part, so that a second start notices
  writeFileSync(join(localDir, "running.json"), JSON.stringify(await claim()));

  // an ordinary user has to fetch somebody for this: said at once, not after minutes of installing
  if (!process.env.DATABASE_URL && process.getuid?.() !== 0) await ensureDebian(["postgresql"]);
  const secrets = await secretsIn(localDir);
  const outcomes = await Promise.allSettled([cluster(secrets), ensurePackages()]);
  const fault = outcomes.find((outcome) => outcome.status === "rejected");
  if (fault) throw fault.reason;
  if (stopping) return;
  const ready = await settings({ folder: localDir, secrets, cluster: outcomes[0].value, dev: flags.dev });
  const seed = flags.demo || (!flags["no-demo"] && !process.env.DATABASE_URL);
  const onGivingUp = (name) => {
    report(new Plain(`${name} keeps ending; see ${join(localDir, "logs", `${name}.log`)}.`));
    void stop(1);
  };
  await startStack({
    settings: ready,
    folder: localDir,
    dev: flags.dev ?? false,
    seed,
    onGivingUp,
    onStop: (end) => toStop.push(end),
  });
  await welcome(ready.env, seed);
}

async function claim() {
  return { driver: process.pid, birth: await birthOf(process.pid), children: [] };
}

async function welcome(env, seeded) {
  const line = (label, value) => say(`  ${label.padEnd(16)}${value}`);
  say();
  line("Firedeck", env.APP_URL);
  const demo = seeded && existsSync(env.DEMO_FILE) ? JSON.parse(await readFile(env.DEMO_FILE, "utf8")) : undefined;
  for (const { role, name, email, password } of demo?.signIns ?? []) line(role, `${email}   ${password}   (${name})`);
  if (demo?.customerLink) line("customer link", demo.customerLink);
  if (env.MAILBOX_URL) line("mailbox", env.MAILBOX_URL);
  say("\n  Ctrl-C stops it.\n");
}

main().catch(async (error) => {
  if (!stopping) report(error);
  await stop(1);
});
