import { mkdir, readdir, readFile, rm } from "node:fs/promises";
import { join } from "node:path";
import { endLeftovers } from "./children.mjs";
import { removeCluster, startCluster } from "./cluster.mjs";
import { ensureDebian } from "./debian.mjs";
import { ensurePackages } from "./packages.mjs";
import { bin, localDir } from "./paths.mjs";
import { isAlive, whenOrphaned } from "./processes.mjs";
import { endRunning, run } from "./run.mjs";
import { Plain, report, say } from "./say.mjs";
import { secretsIn } from "./secrets.mjs";
import { settings } from "./settings.mjs";
import { startStack } from "./stack.mjs";

const PARTS = ["unit", "integration", "e2e"];
const HELP = `Runs the tests; what they need is installed first.

  npm test                       all of them
  npm test -- unit               one part or several: ${PARTS.join(", ")}
  npm test -- e2e -- -g approve  what follows a second -- goes to the runner`;

const folder = join(localDir, `test-${process.pid}`);
const toStop = [];
let stopping;

function stop(code) {
  stopping ??= (async () => {
    endRunning();
    for (const end of toStop.reverse()) await end().catch(report);
    await rm(folder, { recursive: true, force: true });
    process.exit(code);
  })();
  return stopping;
}

for (const name of ["SIGINT", "SIGTERM", "SIGHUP"]) process.on(name, () => void stop(130));

whenOrphaned(() => void stop(130));

const readJson = (path) =>
  readFile(path, "utf8")
    .then(JSON.parse)
    .catch(() => undefined);

/** Runs a test runner that writes its counts to a file; a runner that wrote none has failed once. */
async function counted(title, command, args, env, resultFile, count) {
  say(`\n${title}`);
  const ended = await run(command, args, { env, show: true }).then(
    () => true,
    () => false,
  );
  if (stopping) return { passed: 0, failed: 0 };
  const result = await readJson(resultFile);
  const counts = result ? count(result) : { passed: 0, failed: 0 };
  // a file that could not even be loaded has no failed test of its own
  if (!ended && counts.failed === 0) counts.failed = 1;
  if (counts.passed + counts.failed === 0) say(`${title}: no test ran.`);
  return counts;
}

function vitest(title, extra, env, rest) {
  const resultFile = join(folder, `${title.split(" ")[0].toLowerCase()}.json`);
  const args = ["run", ...extra, "--reporter=default", "--reporter=json", `--outputFile.json=${resultFile}`, ...rest];
  return counted(title, bin("vitest"), args, env, resultFile, (result) => ({
    passed: result.numPassedTests,
    failed: Math.max(result.numFailedTests, result.testResults.filter((file) => file.status === "failed").length),
  }));
}

async function database() {
  const secrets = await secretsIn(folder);
  const cluster = await startCluster({
    dataDir: join(localDir, `test-pg-${process.pid}`),
    secrets,
    preferredPort: 5533,
    throwaway: true,
  });
  toStop.push(cluster.stop);
  return { secrets, cluster };
}

async function browserTests({ secrets, cluster }, rest) {
  const ready = await settings({ folder, secrets, cluster, test: true });
  const onGivingUp = (name) => report(new Plain(`${name} keeps ending; see ${join(folder, "logs", `${name}.log`)}.`));
  await startStack({ settings: ready, folder, dev: false, seed: true, onGivingUp, onStop: (end) => toStop.push(end) });
  const resultFile = join(folder, "e2e.json");
  const env = {
    ...ready.env,
    NODE_ENV: "test",
    E2E_BASE_URL: ready.env.APP_URL,
    PLAYWRIGHT_JSON_OUTPUT_FILE: resultFile,
    FORCE_COLOR: "0",
  };
  const args = ["test", "--config", "tests/e2e/playwright.config.ts", "--reporter=list,json", ...rest];
  return counted("Browser tests", bin("playwright"), args, env, resultFile, ({ stats, errors }) => ({
    passed: stats.expected + stats.flaky,
    failed: stats.unexpected + (stats.expected + stats.unexpected + stats.flaky === 0 ? errors.length : 0),
  }));
}

/** Clusters and folders of runs that were killed. */
async function removeLeftovers() {
  for (const name of await readdir(localDir)) {
    const [, cluster, id] = /^test-(pg-)?(\d+)/.exec(name) ?? [];
    if (!id || isAlive(Number(id))) continue;
    if (cluster) {
      await removeCluster(join(localDir, `test-pg-${id}`));
    } else {
      await endLeftovers(join(localDir, name));
      await rm(join(localDir, name), { recursive: true, force: true });
    }
  }
}

async function main() {
  const split = process.argv.indexOf("--");
  const asked = process.argv.slice(2, split < 0 ? undefined : split);
  const rest = split < 0 ? [] : process.argv.slice(split + 1);
  const unknown = asked.filter((part) => !PARTS.includes(part));
  if (unknown.length > 0) {
    say(HELP);
    if (!unknown.every((flag) => flag === "--help" || flag === "-h")) process.exitCode = 1;
    return;
  }
  const has = (part) => asked.length === 0 || asked.includes(part);
  await mkdir(folder, { recursive: true });
  await removeLeftovers();
  await ensureDebian([
    ...(has("integration") || has("e2e") ? ["postgresql"] : []),
    ...(has("e2e") ? ["chromium"] : []),
    "poppler-utils",
  ]);
  await ensurePackages();

  const counts = [];
  const attempt = async (work) => {
    if (stopping) return;
    const outcome = await work().catch((error) => {
      if (!stopping) report(error);
      return { passed: 0, failed: 1 };
    });
    counts.push(outcome);
  };
  const env = { ...process.env, NODE_ENV: "test", NEXT_TELEMETRY_DISABLED: "1" };
  if (has("unit")) await attempt(() => vitest("Unit tests", [], env, rest));
  if (has("integration") || has("e2e")) {
    const server = await database();
    const url = server.cluster.url;
    const integrationEnv = { ...env, TEST_DATABASE_URL: url, BETTER_AUTH_SECRET: server.secrets.authSecret };
    for (const name of ["DATABASE_URL", "APP_DATABASE_URL", "AUTH_DATABASE_URL"]) delete integrationEnv[name];
    if (has("integration")) {
      await attempt(() =>
        vitest("Integration tests", ["--config", "tests/integration/vitest.config.mts"], integrationEnv, rest),
      );
    }
    if (has("e2e")) await attempt(() => browserTests(server, rest));
  }
  if (stopping) return;
  const sum = (what) => counts.reduce((total, each) => total + each[what], 0);
  const [passed, failed] = [sum("passed"), sum("failed")];
  for (const end of toStop.reverse()) await end().catch(report);
  toStop.length = 0;
  say(`\n${passed} passed, ${failed} failed`);
  await stop(failed > 0 || counts.some((each) => each.passed + each.failed === 0) || passed === 0 ? 1 : 0);
}

main().catch(async (error) => {
  if (!stopping) report(error);
  await stop(1);
});
