import { readdirSync } from "node:fs";
import { join, relative, sep } from "node:path";
import { type APIRequestContext, expect, test } from "@playwright/test";
import { apiAs, BASE, signInOf } from "./people";

const ROOT = join(import.meta.dirname, "../..");

type Answer = number | readonly number[];
/** Each route of the file tree with what it answers to: nobody, technician, writer, owner. A new route without a row fails. */
const ROUTES: Record<
  string,
  {
    method: "GET" | "POST";
    path: string;
    data?: unknown;
    nobody: Answer;
    technician: Answer;
    writer: Answer;
    owner: Answer;
  }
> = {
  "api/assess": {
    method: "POST",
    path: "/api/assess",
    data: { version: 1, vehicle: {} },
    nobody: 401,
    technician: 200,
    writer: 200,
    owner: 200,
  },
  "api/audit/export": {
    method: "GET",
    path: "/api/audit/export",
    nobody: 401,
    technician: 403,
    writer: 403,
    owner: 200,
  },
  "api/auth/[...all]": {
    method: "GET",
    path: "/api/auth/get-session",
    nobody: 200,
    technician: 200,
    writer: 200,
    owner: 200,
  },
  "api/customers": { method: "GET", path: "/api/customers?q=j", nobody: 401, technician: 200, writer: 200, owner: 200 },
  "api/do/[verb]": {
    method: "POST",
    path: "/api/do/shop.saveSettings",
    data: {},
    nobody: 401,
    technician: 403,
    writer: 403,
    owner: 400,
  },
  "api/events": { method: "GET", path: "/api/events", nobody: 401, technician: 200, writer: 200, owner: 200 },
  "api/files/[id]": {
    method: "GET",
    path: "/api/files/file_unknown",
    nobody: 401,
    technician: 404,
    writer: 404,
    owner: 404,
  },
  "api/health": { method: "GET", path: "/api/health", nobody: 200, technician: 200, writer: 200, owner: 200 },
  "api/openapi.json": {
    method: "GET",
    path: "/api/openapi.json",
    nobody: 200,
    technician: 200,
    writer: 200,
    owner: 200,
  },
  "api/papers/[id]": {
    method: "GET",
    path: "/api/papers/pap_unknown",
    nobody: 401,
    technician: 404,
    writer: 404,
    owner: 404,
  },
  "api/sign-up": {
    method: "POST",
    path: "/api/sign-up",
    data: {},
    nobody: 400,
    technician: 400,
    writer: 400,
    owner: 400,
  },
  "api/uploadthing": {
    method: "POST",
    path: "/api/uploadthing?actionType=upload&slug=photo",
    data: {
      files: [{ name: "a.jpg", size: 10, type: "image/jpeg", lastModified: 1 }],
      input: { caseId: "case_unknown" },
    },
    nobody: 403,
    technician: 200,
    writer: 200,
    owner: 200,
  },
  "(customer)/i/[secret]/paper": {
    method: "GET",
    path: `/i/${"A".repeat(43)}/paper`,
    nobody: 404,
    technician: 404,
    writer: 404,
    owner: 404,
  },
  "(customer)/q/[secret]/answer": {
    method: "POST",
    path: `/q/${"A".repeat(43)}/answer`,
    nobody: 404,
    technician: 404,
    writer: 404,
    owner: 404,
  },
  "(customer)/q/[secret]/ask": {
    method: "POST",
    path: `/q/${"A".repeat(43)}/ask`,
    nobody: 404,
    technician: 404,
    writer: 404,
    owner: 404,
  },
  "(customer)/q/[secret]/paper": {
    method: "GET",
    path: `/q/${"A".repeat(43)}/paper`,
    nobody: 404,
    technician: 404,
    writer: 404,
    owner: 404,
  },
  "(customer)/q/[secret]/photo/[id]": {
    method: "GET",
    path: `/q/${"A".repeat(43)}/photo/file_x`,
    nobody: 404,
    technician: 404,
    writer: 404,
    owner: 404,
  },
};

function routesOfTheTree(): string[] {
  return readdirSync(join(ROOT, "app"), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && entry.name === "route.ts")
    .map((entry) => relative(join(ROOT, "app"), entry.parentPath).split(sep).join("/"))
    .sort();
}

/** The status alone: a stream of events stays open, so its body is never waited for. */
async function statusOf(api: APIRequestContext, { method, path, data }: (typeof ROUTES)[string]): Promise<number> {
  if (path === "/api/events") {
    const cookies = (await api.storageState()).cookies.map(({ name, value }) => `${name}=${value}`).join("; ");
    const stop = new AbortController();
    const answer = await fetch(`${BASE}${path}`, { headers: { cookie: cookies }, signal: stop.signal });
    stop.abort();
    return answer.status;
  }
  const answer = await api.fetch(path, { method, ...(data === undefined ? {} : { data }), maxRedirects: 0 });
  return answer.status();
}

test("every route of the file tree has a row here", () => {
  expect(routesOfTheTree()).toEqual(Object.keys(ROUTES).sort());
});

for (const who of ["nobody", "technician", "writer", "owner"] as const) {
  test(`each route answers ${who} as the table says`, async () => {
    const api = await apiAs(who === "nobody" ? null : signInOf(who));
    for (const [name, row] of Object.entries(ROUTES)) {
      const status = await statusOf(api, row);
      expect.soft(status, `${name} to ${who}`).toBe(row[who]);
    }
    await api.dispose();
  });
}

test("every act over HTTP is refused to nobody, and to the roles the table leaves out", async () => {
  const described = await (await (await apiAs(null)).get("/api/openapi.json")).json();
  const acts = Object.entries(described.paths as Record<string, { post: { description: string } }>);
  expect(acts.length).toBeGreaterThan(40);
  const apis = {
    nobody: await apiAs(null),
    technician: await apiAs(signInOf("technician")),
    writer: await apiAs(signInOf("writer")),
    owner: await apiAs(signInOf("owner")),
  };
  for (const [path, { post }] of acts) {
    for (const [who, api] of Object.entries(apis)) {
      const status = (await api.post(path, { data: {} })).status();
      const isAllowed = post.description.includes(who);
      if (who === "nobody") expect.soft(status, `${path} to nobody`).toBe(401);
      else if (isAllowed) expect.soft([401, 403], `${path} to ${who}`).not.toContain(status);
      else expect.soft(status, `${path} to ${who}`).toBe(403);
    }
  }
});

test("another shop's owner meets nothing of this one", async () => {
  const stranger = { email: `stranger-${Date.now()}@elsewhere.example`, password: "another-shop-entirely" };
  const nobody = await apiAs(null);
  const made = await nobody.post("/api/sign-up", {
    data: { shopName: "Elsewhere Works", name: "Cass Elsewhere", ...stranger },
  });
  expect(made.status(), await made.text()).toBe(201);
  const theirs = await apiAs(stranger);
  const mine = await apiAs(signInOf("writer"));
  const { id: caseId } = await (
    await mine.post("/api/do/case.open", {
      data: {
        customer: { name: "Tenant Test" },
        vehicle: { label: "Corvid Marlin 2.4", engine: {} },
        words: "Nothing",
        odometerUnreadable: "dark",
      },
    })
  ).json();
  expect(caseId).toMatch(/^case_/);
  for (const [verb, data] of Object.entries({
    "case.note": { caseId, text: "hello" },
    "case.advance": { caseId, to: "testing" },
    "readings.addSample": { caseId, mode: "idling" },
    "test.record": { caseId, testId: "intake-smoke", outcome: "leak-seen" },
    "quote.addJob": { caseId, title: "A job" },
    "case.release": { caseId, reason: "x" },
    "clock.on": { caseId },
  })) {
    expect.soft((await theirs.post(`/api/do/${verb}`, { data })).status(), verb).toBe(404);
  }
  expect((await theirs.get("/cases/2401")).status()).toBe(404);
  expect(await (await theirs.get("/api/customers?q=Juniper")).json()).toEqual([]);
});

test("a write from another site is refused, and so is one without an origin", async () => {
  const api = await apiAs(signInOf("owner"));
  const cookies = (await api.storageState()).cookies.map(({ name, value }) => `${name}=${value}`).join("; ");
  for (const origin of ["https://elsewhere.example", undefined]) {
    const answer = await fetch(`${BASE}/api/do/case.open`, {
      method: "POST",
      headers: { cookie: cookies, "content-type": "application/json", ...(origin ? { origin } : {}) },
      body: "{}",
    });
    expect(answer.status).toBe(403);
  }
});
