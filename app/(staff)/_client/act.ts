import type { Problem } from "@/lib/http/problem";

export type Answer<T> = { ok: true; data: T } | { ok: false; problem: Problem };

type Save = { kind: "saved" } | { kind: "saving" } | { kind: "failed"; reason: string };
let state: Save = { kind: "saved" };
let running = 0;
const listeners = new Set<() => void>();

function set(next: Save) {
  state = next;
  for (const listener of listeners) listener();
}

/** The state of saving, for the top bar. */
export const saving = {
  get: () => state,
  subscribe(listener: () => void) {
    listeners.add(listener);
    return () => {
      listeners.delete(listener);
    };
  },
};

const lost = (detail: string): Problem => ({
  type: "urn:firedeck:problem:offline",
  title: "No connection",
  status: 0,
  detail,
  instance: "",
  code: "internal",
  requestId: "",
  errors: [],
});

const TRIES = 3;
const wait = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

/**
 * Does one write. A lost connection is tried again with the same key, so that it happens once however often it is sent;
 * a refusal comes back as problem details for the form to show in place.
 */
export async function act<T = unknown>(
  verb: string,
  input: unknown,
  key: string = crypto.randomUUID(),
): Promise<Answer<T>> {
  running += 1;
  set({ kind: "saving" });
  let answer: Answer<T> = { ok: false, problem: lost("The server can't be reached. What you typed is still here.") };
  for (let attempt = 0; attempt < TRIES; attempt++) {
    if (attempt > 0) await wait(600 * attempt);
    try {
      const response = await fetch(`/api/do/${verb}`, {
        method: "POST",
        headers: { "content-type": "application/json", "idempotency-key": key },
        body: JSON.stringify(input),
      });
      const body = await response.json().catch(() => null);
      answer = response.ok
        ? { ok: true, data: body as T }
        : { ok: false, problem: (body as Problem) ?? lost("The server's answer can't be read. Try again.") };
      break;
    } catch {
      // the network failed: the same request goes out again
    }
  }
  running -= 1;
  if (!answer.ok && answer.problem.status === 0) set({ kind: "failed", reason: "no connection" });
  else if (running === 0) set({ kind: "saved" });
  return answer;
}

/** Field errors by pointer, as the forms take them. */
export function fieldErrorsOf(problem: Problem): Record<string, string> {
  return Object.fromEntries(problem.errors.map((error) => [error.pointer, error.detail]));
}

/** The sentence for a failed act; a fault of ours adds the request's number. */
export function sentenceOf(problem: Problem): string {
  return problem.code === "internal" && problem.requestId
    ? `${problem.detail} Request ${problem.requestId.slice(0, 8)}.`
    : problem.detail;
}
