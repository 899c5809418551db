import { access, mkdir, readdir, rm, writeFile } from "node:fs/promises";
import { delimiter, join } from "node:path";
import { run, succeeds } from "./run.mjs";
import { Plain, step } from "./say.mjs";

const exists = (path) =>
  access(path).then(
    () => true,
    () => false,
  );

/** The folder with initdb and postgres, version 15 or newer, or undefined. `PG_BIN` names another one. */
export async function postgresBin() {
  if (process.env.PG_BIN) return process.env.PG_BIN;
  const base = "/usr/lib/postgresql";
  const versions = (await readdir(base).catch(() => [])).map(Number).filter((version) => version >= 15);
  for (const version of versions.sort((a, b) => b - a)) {
    const folder = `${base}/${version}/bin`;
    if ((await exists(`${folder}/initdb`)) && (await exists(`${folder}/psql`))) return folder;
  }
  return undefined;
}

async function onPath(command) {
  const folders = (process.env.PATH ?? "").split(delimiter);
  for (const folder of [...folders, "/usr/bin"]) if (folder && (await exists(join(folder, command)))) return true;
  return false;
}

const NEEDS = {
  postgresql: { label: "PostgreSQL", isThere: async () => (await postgresBin()) !== undefined },
  chromium: { label: "Chromium", isThere: () => onPath("chromium") },
  "poppler-utils": { label: "the PDF reader of the tests", isThere: () => onPath("pdftotext") },
};

/**
 * Sees to it that the named Debian packages are there: installs them as root, otherwise says the one command to run.
 *
 * @param {(keyof typeof NEEDS)[]} names
 */
export async function ensureDebian(names) {
  const missing = [];
  for (const name of names) if (!(await NEEDS[name].isThere())) missing.push(name);
  if (missing.length === 0) return;
  const what = missing.map((name) => NEEDS[name].label).join(" and ");
  const command = `apt-get update && apt-get install --yes --no-install-recommends ${missing.join(" ")}`;
  if (process.getuid?.() !== 0 || !(await onPath("apt-get"))) {
    throw new Plain(`${what} is missing. Run this once, then start again:\n\n  sudo sh -c '${command}'\n`);
  }
  await step(`Installing ${what} from Debian's packages`, () => install(missing));
  for (const name of missing)
    if (!(await NEEDS[name].isThere()))
      throw new Plain(`${NEEDS[name].label} is still missing after:\n\n  ${command}\n`);
}

async function install(missing) {
  const env = { ...process.env, DEBIAN_FRONTEND: "noninteractive" };
  const apt = (...args) => run("apt-get", ["-o", "DPkg::Lock::Timeout=180", "-q", ...args], { env });
  const add = (...packages) =>
    apt("install", "--yes", "--no-install-recommends", "-o", "Dpkg::Options::=--force-confold", ...packages);
  if (!(await succeeds("apt-get", ["update", "-q"], { env }))) await apt("update");
  if (!missing.includes("postgresql")) return void (await add(...missing));
  // the package would register and start a cluster of its own; ours is private, so it is told not to for this one time
  await add("postgresql-common");
  const folder = "/etc/postgresql-common/createcluster.d";
  const file = `${folder}/firedeck-install.conf`;
  await mkdir(folder, { recursive: true });
  await writeFile(file, "create_main_cluster = false\n");
  try {
    await add(...missing);
  } finally {
    await rm(file, { force: true });
  }
}
