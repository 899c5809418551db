const seconds = (sinceMs) => `${Math.max(1, Math.round((Date.now() - sinceMs) / 1000))} s`;

export const say = (line = "") => process.stdout.write(`${line}\n`);

/**
 * Runs `work` and keeps whoever waits informed: nothing for quick work, a line once it has taken more than a second and a
 * half, one more every fifteen seconds, and how long it took.
 *
 * @template T
 * @param {string} label what is being done, as "Installing npm packages"
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function step(label, work) {
  const since = Date.now();
  let shown = false;
  const first = setTimeout(() => {
    shown = true;
    say(`  ${label} …`);
  }, 1500);
  const again = setInterval(() => say(`  ${label}: still at it after ${seconds(since)}`), 15_000);
  try {
    const result = await work();
    if (shown) say(`  ${label}: done in ${seconds(since)}`);
    return result;
  } finally {
    clearTimeout(first);
    clearInterval(again);
  }
}

/** A failure whose message is all that the person at the terminal needs: no stack is printed. */
export class Plain extends Error {}

export function report(error) {
  process.stderr.write(`\n${error instanceof Plain ? error.message : (error?.stack ?? String(error))}\n`);
}
