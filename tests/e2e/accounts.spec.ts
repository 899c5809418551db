import { expect, test } from "@playwright/test";
import { apiAs, BASE, mailTo } from "./people";

test("a forgotten password is set anew from the mail, and the old one no longer works", async ({ browser }) => {
  const who = { email: `reset-${Date.now()}@post.example`, password: "the-first-password" };
  const made = await (await apiAs(null)).post("/api/sign-up", {
    data: { shopName: "Reset Works", name: "Rue Setter", ...who },
  });
  expect(made.status(), await made.text()).toBe(201);
  const page = await (await browser.newContext({ baseURL: BASE })).newPage();
  await page.goto("/sign-in");
  await page.getByRole("link", { name: /set a new password/ }).click();
  await page.getByLabel("E-mail").fill(who.email);
  await page.getByRole("button", { name: "Send me a link" }).click();
  await expect(page.getByRole("heading", { name: "Look in your mail" })).toBeVisible();
  const mail = await mailTo(who.email, /new password/i);
  const link = /https?:\/\/\S+reset-password\S+/.exec(mail.text)?.[0];
  expect(link).toBeTruthy();
  await page.goto(link!);
  await page.getByLabel("New password").fill("the-second-password");
  await page.getByRole("button", { name: "Set the password" }).click();
  await page.waitForURL(/sign-in/);
  await page.getByLabel("E-mail").fill(who.email);
  await page.getByLabel("Password").fill(who.password);
  await page.getByRole("button", { name: "Sign in" }).click();
  await expect(page.getByText("That e-mail and password do not go together.")).toBeVisible();
  await page.getByLabel("Password").fill("the-second-password");
  await page.getByRole("button", { name: "Sign in" }).click();
  await page.waitForURL(/\/cases/);
  await expect(page.getByRole("heading", { level: 1 })).toContainText("No case is open");
  await page.context().close();
});

test("a visitor without a sign-in is sent to it and back to where they wanted", async ({ page }) => {
  await page.goto("/prices");
  await expect(page).toHaveURL(/\/sign-in\?to=%2Fprices/);
  const headers = (await page.request.get("/sign-in")).headers();
  expect(headers["content-security-policy"]).toMatch(/script-src 'self' 'nonce-[^']+' 'strict-dynamic'/);
  expect(headers["content-security-policy"]).not.toContain("unsafe-inline");
  expect(headers["x-content-type-options"]).toBe("nosniff");
});
