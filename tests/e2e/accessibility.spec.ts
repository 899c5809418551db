import AxeBuilder from "@axe-core/playwright";
import { type Browser, expect, type Page, test } from "@playwright/test";
import { apiAs, BASE, demo, pageAs, signInOf } from "./people";
import { CASE_PARTS, SCREENS } from "./screens";

/** The numbers of one case in each of these stages, read from the list as a person would. */
async function caseNumbers(): Promise<Record<string, string>> {
  const api = await apiAs(signInOf("technician"));
  const html = await (await api.get("/cases?show=all")).text();
  const closed = await (await api.get("/cases?show=closed")).text();
  const numbers = [...html.matchAll(/\/cases\/(\d+)"/g)].map((match) => match[1]!);
  return {
    open: numbers[0] ?? "",
    repair: numbers[numbers.length - 1] ?? "",
    closed: /\/cases\/(\d+)"/.exec(closed)?.[1] ?? "",
  };
}

async function visitor(browser: Browser, as: string, options: Parameters<Browser["newContext"]>[0]): Promise<Page> {
  if (as === "nobody") return (await browser.newContext({ baseURL: BASE, ...options })).newPage();
  return pageAs(browser, signInOf(as as "owner"), options);
}

async function seriousFaults(page: Page, path: string) {
  await page.goto(path, { waitUntil: "load" });
  await page.waitForTimeout(250);
  const { violations } = await new AxeBuilder({ page })
    .withTags(["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"])
    .analyze();
  return violations
    .filter((violation) => violation.impact === "serious" || violation.impact === "critical")
    .map(
      (violation) =>
        `${path}: ${violation.id} at ${violation.nodes
          .slice(0, 3)
          .map((node) => node.target.join(" "))
          .join(" | ")}`,
    );
}

for (const [label, options, bay] of [
  ["desktop by day", { viewport: { width: 1440, height: 900 }, colorScheme: "light" }, false],
  ["phone by night", { viewport: { width: 390, height: 844 }, colorScheme: "dark" }, false],
  ["tablet in the bay", { viewport: { width: 1180, height: 820 }, colorScheme: "dark" }, true],
] as const) {
  test(`axe finds nothing serious on any screen: ${label}`, async ({ browser }) => {
    test.setTimeout(300_000);
    const numbers = await caseNumbers();
    const faults: string[] = [];
    const pages = new Map<string, Page>();
    const open = async (as: string) => {
      const known = pages.get(as);
      if (known) return known;
      const page = await visitor(browser, as, options);
      if (bay) await page.addInitScript(() => localStorage.setItem("fd-density", "bay"));
      pages.set(as, page);
      return page;
    };
    for (const screen of SCREENS) faults.push(...(await seriousFaults(await open(screen.as), screen.path)));
    for (const number of new Set(Object.values(numbers).filter(Boolean))) {
      for (const part of CASE_PARTS)
        faults.push(...(await seriousFaults(await open("technician"), `/cases/${number}/${part}`)));
    }
    faults.push(...(await seriousFaults(await open("nobody"), new URL(demo().customerLink).pathname)));
    for (const page of pages.values()) await page.context().close();
    expect(faults).toEqual([]);
  });
}
