import { readFileSync } from "node:fs";
import {
  type APIRequestContext,
  type Browser,
  type BrowserContext,
  expect,
  type Page,
  request,
} from "@playwright/test";

export const BASE = process.env.E2E_BASE_URL ?? "http://localhost:3000";

export interface SignIn {
  role: "owner" | "writer" | "technician";
  name: string;
  email: string;
  password: string;
}

export function demo(): { signIns: SignIn[]; customerLink: string } {
  const file = process.env.DEMO_FILE;
  if (!file) throw new Error("DEMO_FILE is not set: run `npm test -- e2e`.");
  return JSON.parse(readFileSync(file, "utf8"));
}

export function signInOf(role: SignIn["role"]): SignIn {
  const found = demo().signIns.find((each) => each.role === role);
  if (!found) throw new Error(`no demo sign-in for ${role}`);
  return found;
}

const kept = new Map<string, Awaited<ReturnType<BrowserContext["storageState"]>>>();

/** A signed-in API context; sessions are kept for the run, so that signing in often does not meet its rate limit. */
export async function apiAs(who: { email: string; password: string } | null): Promise<APIRequestContext> {
  const headers = { origin: BASE };
  if (!who) return request.newContext({ baseURL: BASE, extraHTTPHeaders: headers });
  const state = kept.get(who.email);
  if (state) return request.newContext({ baseURL: BASE, extraHTTPHeaders: headers, storageState: state });
  const api = await request.newContext({ baseURL: BASE, extraHTTPHeaders: headers });
  const answer = await api.post("/api/auth/sign-in/email", { data: { email: who.email, password: who.password } });
  expect(answer.status(), await answer.text()).toBe(200);
  kept.set(who.email, await api.storageState());
  return api;
}

export async function pageAs(
  browser: Browser,
  who: { email: string; password: string },
  options: Parameters<Browser["newContext"]>[0] = {},
): Promise<Page> {
  await (await apiAs(who)).dispose();
  const context = await browser.newContext({ baseURL: BASE, storageState: kept.get(who.email), ...options });
  return context.newPage();
}

/** Writes as the screens do; the answer is parsed, and a refusal fails the test with its words. */
export async function act<T = Record<string, unknown>>(
  api: APIRequestContext,
  verb: string,
  data: unknown,
): Promise<T> {
  const answer = await api.post(`/api/do/${verb}`, { data });
  const body = await answer.json();
  expect(answer.status(), JSON.stringify(body)).toBe(200);
  return body as T;
}

interface Mail {
  to: string;
  subject: string;
  text: string;
  html: string;
  attachments?: { filename: string; href?: string; url?: string }[];
}

/** The newest message to an address whose subject has these words; waits for the worker. */
export async function mailTo(address: string, words: RegExp): Promise<Mail & Record<string, unknown>> {
  const box = process.env.MAILBOX_URL;
  const api = await request.newContext();
  const until = Date.now() + 30_000;
  for (;;) {
    const found = (await (await api.get(`${box}/mailbox.json?to=${encodeURIComponent(address)}`)).json()) as (Mail &
      Record<string, unknown>)[];
    const list = Array.isArray(found)
      ? found
      : ((found as { messages?: (Mail & Record<string, unknown>)[] }).messages ?? []);
    const hit = list.find((mail) => words.test(mail.subject));
    if (hit) {
      await api.dispose();
      return hit;
    }
    if (Date.now() > until)
      throw new Error(
        `no mail to ${address} about ${words}; there is: ${list.map((mail) => mail.subject).join(" | ")}`,
      );
    await new Promise((resolve) => setTimeout(resolve, 400));
  }
}
