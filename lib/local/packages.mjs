import { readFile } from "node:fs/promises";
import { join } from "node:path";
import { root } from "./paths.mjs";
import { run } from "./run.mjs";
import { Plain, step } from "./say.mjs";

const readJson = async (path) => JSON.parse(await readFile(path, "utf8"));

/**
 * Whether node_modules holds what package-lock.json asks for. npm writes node_modules/.package-lock.json as the last act
 * of an install, so an interrupted one counts as missing; packages of other platforms are optional and may be absent.
 */
export async function packagesAreCurrent() {
  try {
    const [wanted, present] = await Promise.all([
      readJson(join(root, "package-lock.json")),
      readJson(join(root, "node_modules/.package-lock.json")),
    ]);
    return Object.entries(wanted.packages).every(([path, entry]) => {
      if (path === "") return true;
      const found = present.packages[path];
      return found ? found.version === entry.version && found.integrity === entry.integrity : entry.optional === true;
    });
  } catch {
    return false;
  }
}

/** Installs the npm packages of the lock file when they are missing or of another lock file. */
export async function ensurePackages() {
  const [major] = process.versions.node.split(".").map(Number);
  if (major < 20) throw new Plain(`Node.js 20 or newer is needed; this is ${process.version}.`);
  if (await packagesAreCurrent()) return false;
  // NODE_ENV=production would leave out what the build and the stand-ins need
  await step("Installing npm packages", () =>
    run("npm", ["ci", "--include=dev", "--no-audit", "--no-fund", "--loglevel=error"]),
  );
  return true;
}
