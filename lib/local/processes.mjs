import { readFile, readlink } from "node:fs/promises";
import { setTimeout as sleep } from "node:timers/promises";

export function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === "EPERM";
  }
}

/** A number that tells a process from a later one with the same id; undefined when there is none (any more). */
export async function birthOf(pid) {
  const stat = await readFile(`/proc/${pid}/stat`, "utf8").catch(() => undefined);
  if (!stat) return undefined;
  // the name in brackets may hold spaces; the state is the third field, the start time the twenty-second
  const fields = stat.slice(stat.lastIndexOf(")") + 2).split(" ");
  return fields[0] === "Z" ? undefined : fields[19];
}

export const workingFolderOf = (pid) => readlink(`/proc/${pid}/cwd`).catch(() => undefined);

/** Waits until the process is gone; false when it is still there after `timeoutMs`. */
export async function gone(pid, timeoutMs) {
  const until = Date.now() + timeoutMs;
  while (
    (await birthOf(pid)) !== undefined ||
    (!(await readFile("/proc/self/stat").catch(() => null)) && isAlive(pid))
  ) {
    if (Date.now() > until) return false;
    await sleep(50);
  }
  return true;
}

/** Sends a signal; a process that has gone meanwhile is no error. */
export function signal(pid, name) {
  try {
    process.kill(pid, name);
  } catch (error) {
    if (error.code !== "ESRCH") throw error;
  }
}

/**
 * Calls back when npm, or the shell it puts in between, has ended: that shell does not pass a SIGTERM on, so the driver
 * would stay behind. Started without npm it may outlive whoever started it.
 */
export function whenOrphaned(callback) {
  if (!process.env.npm_lifecycle_event) return;
  const parent = process.ppid;
  const timer = setInterval(() => {
    if (process.ppid === parent) return;
    clearInterval(timer);
    callback();
  }, 300);
  timer.unref();
}
