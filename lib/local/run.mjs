import { spawn } from "node:child_process";
import { createInterface } from "node:readline";
import { root } from "./paths.mjs";
import { Plain } from "./say.mjs";

const active = new Set();

/** Ends whatever `run` is still waiting for. */
export function endRunning() {
  for (const child of active) child.kill("SIGTERM");
}

/**
 * Runs a command to its end and returns what it wrote to standard output.
 *
 * @param {string} command
 * @param {string[]} args
 * @param {{ env?: NodeJS.ProcessEnv, uid?: number, gid?: number, cwd?: string, input?: string, show?: boolean, onLine?: (line: string) => void }} [options]
 *   `show` passes the output through instead of keeping it; `onLine` gets each line of standard output as it comes.
 * @throws {Plain} with the last lines of the output when the command fails
 */
export function run(command, args, options = {}) {
  const { input, show, onLine, ...rest } = options;
  return new Promise((resolve, reject) => {
    // stdin is closed unless there is something to say: nothing may wait for an answer nobody can give
    const child = spawn(command, args, {
      cwd: root,
      ...rest,
      stdio: [input === undefined ? "ignore" : "pipe", show ? "inherit" : "pipe", show ? "inherit" : "pipe"],
    });
    active.add(child);
    let out = "";
    let all = "";
    child.stdout?.on("data", (chunk) => {
      out += chunk;
      all += chunk;
    });
    if (onLine) createInterface({ input: child.stdout }).on("line", onLine);
    child.stderr?.on("data", (chunk) => {
      all += chunk;
    });
    child.on("error", (error) => {
      active.delete(child);
      reject(error);
    });
    child.on("close", (code, signal) => {
      active.delete(child);
      if (code === 0) return resolve(out);
      const tail = all.trimEnd().split("\n").slice(-30).join("\n");
      reject(
        Object.assign(
          new Plain(
            `${[command, ...args].join(" ")}\nended with ${signal ?? `code ${code}`}${tail ? `:\n${tail}` : "."}`,
          ),
          { output: all, code },
        ),
      );
    });
    if (input !== undefined) child.stdin.end(input);
  });
}

/** Like `run`, but only tells whether the command succeeded. */
export const succeeds = (command, args, options) =>
  run(command, args, options).then(
    () => true,
    () => false,
  );
