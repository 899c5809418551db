import { expect, test } from "@playwright/test";
import pg from "pg";
import { act, apiAs, BASE, freshQuote, signInOf } from "./people";

const LONG = "x".repeat(20_000);
/** What people and programs send by mistake or on purpose; each must be refused with a reason, never fail the server. */
const JUNK: readonly unknown[] = [
  null,
  [],
  "text",
  42,
  {},
  { caseId: null },
  { caseId: 7 },
  { caseId: "' or 1=1 --" },
  {
    caseId: "case_does_not_exist",
    sampleId: "smp_x",
    testId: "x",
    jobId: "job_x",
    revisionId: "rev_x",
    workJobId: "wrk_x",
    paperId: "pap_x",
  },
  { caseId: LONG, text: LONG, words: LONG, title: LONG, reason: LONG },
  { name: "\u0000", text: "a\u0000b", words: "\u0000", reason: "\u0000" },
  { amountMinor: -1, perHourMinor: -5, quantityMilli: -1, unitPriceMinor: 1e18 },
  { amountMinor: 1.5, version: "one", number: Number.MAX_SAFE_INTEGER },
  { promisedAt: "2026-13-45T99:99:99Z", startedAt: "never", endedAt: "0000-00-00" },
  { values: { RPM: "fast" }, mode: "flying", phase: "during" },
  {
    lines: [
      { id: "x", kind: "labour", description: "<script>alert(1)</script>", quantityMilli: 0, unitPriceMinor: -1 },
    ],
  },
  { settings: { timeZone: "Mars/Olympus", currency: "dollars" }, name: "", version: 1 },
];

test("no act answers junk with a fault of ours", async () => {
  test.setTimeout(240_000);
  const api = await apiAs(signInOf("owner"));
  const described = await (await api.get("/api/openapi.json")).json();
  for (const path of Object.keys(described.paths)) {
    for (const [index, data] of JUNK.entries()) {
      const answer = await api.fetch(path, {
        method: "POST",
        data: JSON.stringify(data),
        headers: { "content-type": "application/json" },
      });
      expect.soft(answer.status(), `${path} with junk ${index}`).toBeLessThan(500);
    }
    const torn = await api.fetch(path, {
      method: "POST",
      data: '{"caseId": "',
      headers: { "content-type": "application/json" },
    });
    expect.soft(torn.status(), `${path} with torn JSON`).toBe(400);
  }
});

test("a refusal is problem details that name the field and the reason", async () => {
  const api = await apiAs(signInOf("writer"));
  const answer = await api.post("/api/do/case.open", {
    data: { customer: { name: "" }, vehicle: { label: "x", engine: {} }, words: "", odometerInKm: -5 },
  });
  expect(answer.status()).toBe(400);
  expect(answer.headers()["content-type"]).toContain("application/problem+json");
  const problem = await answer.json();
  expect(problem).toMatchObject({
    status: 400,
    code: "invalid",
    title: expect.any(String),
    requestId: expect.any(String),
  });
  expect(problem.errors.map((each: { pointer: string }) => each.pointer)).toContain("/odometerInKm");
  expect(problem.errors.find((each: { pointer: string }) => each.pointer === "/odometerInKm").detail).toBe(
    "The odometer can't be below zero.",
  );
});

test("markup in what people type is shown as they typed it", async ({ browser }) => {
  const api = await apiAs(signInOf("writer"));
  const words = '<img src=x onerror="document.title=1"> & "quotes"';
  const { number } = await act<{ number: number }>(api, "case.open", {
    customer: { name: "<b>Bold</b>" },
    vehicle: { label: "Corvid <i>", engine: {} },
    words,
    odometerUnreadable: "dark",
  });
  const context = await browser.newContext({ baseURL: BASE, storageState: await api.storageState() });
  const page = await context.newPage();
  await page.goto(`/cases/${number}/intake`);
  await expect(page.getByText(words).first()).toBeVisible();
  expect(await page.title()).not.toBe("1");
  await context.close();
});

test("pages answer odd addresses kindly", async () => {
  const api = await apiAs(signInOf("technician"));
  for (const path of [
    "/cases/0",
    "/cases/99999999999",
    "/cases/abc/readings",
    "/cases?q=%00",
    "/cases?after=%7C%7C%7C&show=zzz&by=1",
    "/customers/none",
    "/vehicles/none",
    "/prices?list=zzz",
    `/cases?q=${"a".repeat(3000)}`,
  ]) {
    const status = (await api.get(path)).status();
    expect.soft(status, path).toBeLessThan(500);
  }
  const nobody = await apiAs(null);
  for (const path of ["/q/short", `/q/${"A".repeat(43)}`, "/i/%00", "/invitation/%F0%9F%92%A9", "/reset?token=zzz"]) {
    expect.soft((await nobody.get(path)).status(), path).toBeLessThan(500);
  }
});

test("the customer's form works without scripts, and comes back with what was typed when something is missing", async ({
  browser,
}) => {
  const { path, customer } = await freshQuote();
  const context = await browser.newContext({
    baseURL: BASE,
    javaScriptEnabled: false,
    viewport: { width: 390, height: 844 },
  });
  const page = await context.newPage();
  await page.goto(path);
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Air gets in");
  // an old browser does not check the form before it is sent: post it as it is
  const answer = await page.request.post(`${path}/answer`, { form: { givenBy: customer }, maxRedirects: 0 });
  expect(answer.status()).toBe(303);
  await page.goto(path);
  await expect(page.getByText(/Something is missing below/)).toBeVisible();
  await expect(page.getByLabel("Your full name")).toHaveValue(customer);
  await page.getByText("Yes, do it").click();
  await page.getByLabel(/I am the owner/).check();
  await page.getByRole("button", { name: "Send my answers" }).click();
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("You agreed to one job");
  await context.close();
});

test("200 answers to one link at once make one approval, and the rest get the same", async () => {
  const { path, caseId, customer } = await freshQuote();
  const api = await apiAs(null);
  const html = await (await api.get(path)).text();
  const jobId = /name="answer\.(job_[0-9a-z]+)"/.exec(html)?.[1];
  expect(jobId).toBeTruthy();
  const form = { [`answer.${jobId}`]: "yes", givenBy: customer, mayDecide: "on" };
  const answers = await Promise.all(
    Array.from({ length: 200 }, () =>
      api.post(`${path}/answer`, { form, maxRedirects: 0, timeout: 90_000 }).then((each) => each.status()),
    ),
  );
  expect(new Set(answers)).toEqual(new Set([303]));
  const client = new pg.Client({ connectionString: process.env.DATABASE_URL });
  await client.connect();
  const { rows } = await client.query(
    "select (select count(*)::int from approvals where case_id = $1) as approvals, (select count(*)::int from work_jobs where case_id = $1) as jobs",
    [caseId],
  );
  await client.end();
  expect(rows[0]).toEqual({ approvals: 1, jobs: 1 });
});
