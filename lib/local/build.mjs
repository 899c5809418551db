import { createHash } from "node:crypto";
import { mkdir, readdir, readFile, writeFile } from "node:fs/promises";
import { join, relative } from "node:path";
import { pathToFileURL } from "node:url";
import { ensurePackages } from "./packages.mjs";
import { bin, localDir, root } from "./paths.mjs";
import { run } from "./run.mjs";
import { report, step } from "./say.mjs";

const SOURCES = [
  "app",
  "components",
  "lib",
  "db",
  "public",
  "package-lock.json",
  "next.config.ts",
  "middleware.ts",
  "postcss.config.mjs",
  "tsconfig.json",
];
/** The drivers and the stand-ins are run as they are, never built. */
const LEFT_OUT = /^lib\/local\/(?!server-only)|^db\/seed\//;

async function* filesUnder(path) {
  const entries = await readdir(path, { withFileTypes: true }).catch((error) => {
    if (error.code === "ENOTDIR") return undefined;
    if (error.code === "ENOENT") return [];
    throw error;
  });
  if (!entries) {
    yield path;
    return;
  }
  for (const entry of entries.sort((a, b) => (a.name < b.name ? -1 : 1))) yield* filesUnder(join(path, entry.name));
}

/** SHA-256 over names and contents of all that the build reads. */
async function sourceHash() {
  const hash = createHash("sha256").update(process.version);
  for (const source of SOURCES) {
    for await (const path of filesUnder(join(root, source))) {
      const name = relative(root, path);
      if (LEFT_OUT.test(name)) continue;
      hash.update(`\n${name}\n`).update(await readFile(path));
    }
  }
  return hash.digest("hex");
}

const builtId = () => readFile(join(root, ".next/BUILD_ID"), "utf8").catch(() => undefined);

/**
 * Builds the pages when the sources differ from those of the last build, or when that build is gone or another's.
 *
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<boolean>} whether it built
 */
export async function ensureBuild(env) {
  const recordFile = join(localDir, "build.json");
  const [sources, id, record] = await Promise.all([
    sourceHash(),
    builtId(),
    readFile(recordFile, "utf8")
      .then(JSON.parse)
      .catch(() => ({})),
  ]);
  if (id && record.sources === sources && record.id === id) return false;
  await step("Building the pages", () =>
    run(bin("next"), ["build"], { env: { ...env, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1" } }),
  );
  await mkdir(localDir, { recursive: true });
  await writeFile(recordFile, JSON.stringify({ sources, id: await builtId() }));
  return true;
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href) {
  try {
    await ensurePackages();
    await ensureBuild(process.env);
  } catch (error) {
    report(error);
    process.exitCode = 1;
  }
}
