import { mkdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { chromium } from "playwright-core";
import { CASE_PARTS, SCREENS } from "../e2e/screens.ts";

/**
 * Pictures of every screen at three widths in both themes, into the git-ignored `screenshots/`. Needs `npm start`
 * running; reads its address and sign-ins from `.local/demo.json` (or BASE_URL and DEMO_FILE).
 */
const base = process.env.BASE_URL ?? "http://localhost:3000";
const root = fileURLToPath(new URL("../..", import.meta.url));
const demo = JSON.parse(readFileSync(process.env.DEMO_FILE ?? `${root}/.local/demo.json`, "utf8"));
const WIDTHS = [
  [390, 844],
  [1180, 820],
  [1440, 900],
] as const;

const browser = await chromium.launch({ executablePath: "/usr/bin/chromium" });
mkdirSync(`${root}/screenshots`, { recursive: true });
let count = 0;

for (const theme of ["day", "night"] as const) {
  for (const [width, height] of WIDTHS) {
    const pages = new Map<string, Awaited<ReturnType<typeof browser.newPage>>>();
    const open = async (as: string) => {
      const known = pages.get(as);
      if (known) return known;
      const context = await browser.newContext({
        viewport: { width, height },
        colorScheme: theme === "night" ? "dark" : "light",
      });
      if (width === 1180) await context.addInitScript(() => localStorage.setItem("fd-density", "bay"));
      const who = demo.signIns.find((each: { role: string }) => each.role === as);
      if (who)
        await context.request.post(`${base}/api/auth/sign-in/email`, {
          data: { email: who.email, password: who.password },
          headers: { origin: base },
        });
      const page = await context.newPage();
      pages.set(as, page);
      return page;
    };
    const shoot = async (as: string, path: string, name: string) => {
      const page = await open(as);
      await page.goto(`${base}${path}`, { waitUntil: "load" });
      await page.waitForTimeout(300);
      await page.screenshot({ path: `${root}/screenshots/${name}-${width}-${theme}.png`, fullPage: true });
      count += 1;
    };
    for (const screen of SCREENS) await shoot(screen.as, screen.path, screen.name);
    const list = await (await open("technician")).context().request.get(`${base}/cases?show=all`);
    const numbers = [...new Set([...(await list.text()).matchAll(/\/cases\/(\d+)"/g)].map((match) => match[1]))];
    const [number = ""] = numbers;
    for (const part of CASE_PARTS) await shoot("technician", `/cases/${number}/${part}`, `case-${part}`);
    await shoot("nobody", new URL(demo.customerLink).pathname, "approve");
    for (const page of pages.values()) await page.context().close();
    process.stderr.write(`${count} pictures, ${width} px ${theme} done\n`);
  }
}
await browser.close();
