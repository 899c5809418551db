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

/** A case whose quote of one job has just been sent; the path of the customer's link, from their mail. */
export async function freshQuote(): Promise<{ caseId: string; path: string; customer: string }> {
  const stamp = `${Date.now().toString(36)}${Math.floor(performance.now())}`;
  const customer = "Ambrose Fell";
  const email = `quote-${stamp}@post.example`;
  const writer = await apiAs(signInOf("writer"));
  const technician = await apiAs(signInOf("technician"));
  const { id: caseId } = await act<{ id: string }>(writer, "case.open", {
    customer: { name: customer, email },
    vehicle: { label: "Corvid Marlin 2.4", engine: {} },
    words: "Shakes at idle",
    odometerInKm: 100_000,
    authorization: { amountMinor: 18_000, givenBy: customer, how: "in-person" },
  });
  await act(writer, "case.advance", { caseId, to: "testing" });
  await act(technician, "cause.mark", {
    caseId,
    causeId: "intake-air-leak",
    mark: "suspected",
    reason: "Hisses at runner 3",
  });
  await act(technician, "case.advance", { caseId, to: "quoting" });
  await act(writer, "quote.addJob", {
    caseId,
    title: "Reseal the intake",
    lines: [{ id: "l1", kind: "labour", description: "Reseal", quantityMilli: 1000, unitPriceMinor: 14_200 }],
  });
  await act(writer, "quote.saveDraft", {
    caseId,
    version: 1,
    headline: "Air gets in",
    finding: "A seal.",
    warranty: "",
  });
  await act(writer, "quote.send", { caseId });
  const mail = await mailTo(email, /Estimate/);
  const link = /https?:\/\/\S+\/q\/[\w-]{43}/.exec(mail.text)?.[0] ?? "";
  return { caseId, path: new URL(link).pathname, customer };
}
