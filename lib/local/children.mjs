import { spawn } from "node:child_process";
import { mkdirSync, openSync } from "node:fs";
import { readFile, rename, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { root } from "./paths.mjs";
import { birthOf, gone, signal } from "./processes.mjs";
import { say } from "./say.mjs";

const QUICK_DEATH_MS = 5000;

/**
 * Starts processes, starts them again when they die, and ends exactly those.
 *
 * @param {{ folder: string, onGivingUp: (name: string) => void }} options `folder` keeps the logs and the list of
 *   what runs, by which the next start ends what a killed driver left behind
 */
export function childrenIn({ folder, onGivingUp }) {
  const logs = join(folder, "logs");
  const listFile = join(folder, "running.json");
  mkdirSync(logs, { recursive: true });
  const children = new Map();
  let ending = false;
  // one write after the other: the last one tells the truth
  let written = Promise.resolve();

  const writeList = () => {
    written = written.then(async () => {
      const list = [];
      for (const [name, { child }] of children) {
        const birth = child.pid && (await birthOf(child.pid));
        if (birth) list.push({ name, pid: child.pid, birth });
      }
      const text = JSON.stringify({ driver: process.pid, birth: await birthOf(process.pid), children: list });
      await writeFile(`${listFile}.part`, text);
      await rename(`${listFile}.part`, listFile);
    });
    return written;
  };

  /**
   * @param {string} name for the log file and messages
   * @param {string} command
   * @param {string[]} args
   * @param {NodeJS.ProcessEnv} env
   * @param {{ show?: boolean }} [options] `show` passes the output through to the terminal
   */
  function start(name, command, args, env, { show = false } = {}) {
    const launch = () => {
      if (ending) return;
      const since = Date.now();
      const log = show ? "inherit" : openSync(join(logs, `${name}.log`), "a");
      // a group of its own: Ctrl-C reaches the driver alone, which ends them in order
      const child = spawn(command, args, { cwd: root, env, detached: true, stdio: ["ignore", log, log] });
      const entry = children.get(name) ?? { quickDeaths: 0 };
      children.set(name, { ...entry, child });
      child.on("error", () => undefined);
      child.once("close", (code, how) => {
        if (ending) return;
        const current = children.get(name);
        current.quickDeaths = Date.now() - since < QUICK_DEATH_MS ? current.quickDeaths + 1 : 0;
        if (current.quickDeaths > 5) return onGivingUp(name);
        say(
          `  ${name} ended (${how ?? `code ${code}`}); starting it again${show ? "" : `. Its log: ${join(logs, `${name}.log`)}`}`,
        );
        setTimeout(launch, Math.min(2000, 300 * 2 ** current.quickDeaths));
      });
      void writeList();
    };
    launch();
  }

  /** Ends them in the reverse order of starting. */
  async function stop() {
    ending = true;
    for (const { child } of [...children.values()].reverse()) await endGroup(child.pid);
    children.clear();
    await writeList();
  }

  return { start, stop, pidOf: (name) => children.get(name)?.child.pid, logOf: (name) => join(logs, `${name}.log`) };
}

async function endGroup(pid) {
  if (!pid) return;
  // the group, since a command may have helpers of its own
  signal(-pid, "SIGTERM");
  if (!(await gone(pid, 8000))) signal(-pid, "SIGKILL");
}

/**
 * What an earlier driver of this folder left: its own id when it still runs; otherwise its children are ended.
 *
 * @returns {Promise<number | undefined>}
 */
export async function endLeftovers(folder) {
  const list = await readFile(join(folder, "running.json"), "utf8")
    .then(JSON.parse)
    .catch(() => undefined);
  if (!list) return undefined;
  const isSame = async ({ pid, birth }) => birth !== undefined && (await birthOf(pid)) === birth;
  if (list.driver !== process.pid && (await isSame({ pid: list.driver, birth: list.birth }))) return list.driver;
  for (const child of list.children) if (await isSame(child)) await endGroup(child.pid);
  return undefined;
}
