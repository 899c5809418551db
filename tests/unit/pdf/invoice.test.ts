import { createHash } from "node:crypto";
import { describe, expect, it, vi } from "vitest";
import { renderInvoice } from "@/lib/pdf/render";
import { invoice, longInvoice } from "./papers";
import { extentOf, fontsOf, infoOf, pagesOf } from "./read-pdf";

// papers, servers and pictures take their time on a busy machine
vi.setConfig({ testTimeout: 180_000, hookTimeout: 60_000 });

const squeeze = (text: string) => text.replace(/\s+/g, " ");

describe("the invoice", () => {
  it("shows the three Cs, the jobs, the record and the sums as they are in the model", async () => {
    const text = squeeze((await pagesOf(await renderInvoice(invoice))).join(" "));
    for (const part of [
      "What you told us",
      "What it was",
      "What was done",
      "Reseal the intake manifold",
      "agreed $484.22, billed $484.22, tax included",
      "Manifold gasket set (No. GK-2204, new)",
      "Vent hose, formed (rebuilt)",
      "2.4 h",
      "Old parts: Manifold gasket set: kept for the customer",
      "Before tax $681.70",
      "Sales tax, 10 % $68.17",
      "Total $749.87",
      "−$749.87",
      "Owing $0.00",
      "182,000 km in,",
      "182,014 km out",
      "1 December 2026, 16:52",
      "Spark plugs. Not now.",
      "Parts and labour: 12 months",
      "+24.3 %",
      "+3.1 %",
      "You may ask for the parts we take out.",
    ])
      expect(text).toContain(part);
  });

  it("carries number, case, VIN, the whole SHA-256 and the page count on every page", async () => {
    const pages = pagesOf(await renderInvoice(longInvoice(12)));
    expect(pages.length).toBeGreaterThan(2);
    for (const [index, page] of pages.entries()) {
      const text = squeeze(page);
      expect(text).toContain("Invoice 2026-0417 · Case 2431 · VIN U8ZCM24F3CP018264");
      expect(text).toContain(`Page ${index + 1} of ${pages.length}`);
      expect(text.replaceAll(" ", "")).toContain(`SHA-256${invoice.sha256}`);
    }
  });

  it("gives the same bytes for the same data, and others for other data", async () => {
    const digest = async (model: typeof invoice) =>
      createHash("sha256")
        .update(await renderInvoice(model))
        .digest("hex");
    const first = await digest(invoice);
    expect(await digest(structuredClone(invoice))).toBe(first);
    expect(await digest({ ...invoice, correction: "Another." })).not.toBe(first);
  });

  it("names itself, its language and its size, and embeds every font", async () => {
    const a4 = await renderInvoice(invoice);
    expect(infoOf(a4).Title).toBe("Invoice 2026-0417, Quillon Yard Motor Works");
    expect(infoOf(a4)["Page size"]).toContain("A4");
    expect(Buffer.from(a4).toString("latin1")).toContain("/Lang (en)");
    expect(fontsOf(a4).length).toBeGreaterThan(3);
    expect(fontsOf(a4).filter((font) => !font.embedded)).toEqual([]);
    expect(infoOf(await renderInvoice({ ...invoice, paper: "Letter" }))["Page size"]).toContain("letter");
  });

  it("keeps the total on the page of its last line, whatever the number of lines", async () => {
    // one line more each time, so that the block passes over every place a page can end at
    for (let lines = 1; lines <= 34; lines++) {
      const pages = pagesOf(await renderInvoice(longInvoice(1, lines)));
      const withTotal = pages.findIndex((page) => /Total\s+\$110\.00/.test(page));
      const withLast = pages.findIndex((page) => page.includes(`Part 1.${lines} `));
      expect(withTotal, `${lines} lines`).toBe(withLast);
      // a page that begins with the total alone would be the same fault
      expect(pages[withTotal]).toMatch(/Part 1\.\d+ [\s\S]*Total/);
    }
  });

  it("never leaves the name of a job alone at the foot of a page", async () => {
    const pages = pagesOf(await renderInvoice(longInvoice(30, 2)));
    for (let job = 1; job <= 30; job++) {
      const page = pages.find((each) => each.includes(`Job ${job} of the list`));
      expect(page).toContain(`Part ${job}.1 `);
    }
  });

  it("sets sixty jobs of ten lines without losing one", async () => {
    const model = longInvoice(60, 10);
    const text = pagesOf(await renderInvoice(model)).join("\n");
    for (const job of model.jobs) for (const line of job.lines) expect(text).toContain(`${line.description} (new)`);
    expect(text).toMatch(/Before tax\s+\$6,000\.00/);
    expect(text).toMatch(/Total\s+\$6,600\.00/);
  });

  it("keeps overlong words and many-line texts inside the margins", async () => {
    const word = "Donaudampfschifffahrtselektrizitaetenhauptbetriebswerkbauunterbeamtengesellschaft".repeat(3);
    const long = {
      ...invoice,
      complaint: word,
      cause: `First line.\nSecond line.\r\nThird ${word}`,
      jobs: invoice.jobs.map((job) => ({ ...job, title: `${job.title} ${word}` })),
    };
    const bytes = await renderInvoice(long);
    // 56 px at 96 to the inch are 42 points
    for (const { right, width } of extentOf(bytes)) expect(right).toBeLessThanOrEqual(width - 42 + 1);
    expect(fontsOf(bytes).filter((font) => !font.embedded)).toEqual([]);
    expect(squeeze(pagesOf(bytes).join(" "))).toContain("Second line.");
  });

  it("moves a long record of authorizations below the sums", async () => {
    const entry = invoice.authorizations[1]!;
    const many = Array.from({ length: 30 }, (_, index) => ({
      ...entry,
      what: `Revision ${index + 1}, total`,
      words: "Yes, go ahead with it. ".repeat(12),
      at: `2026-12-01T20:${String(index).padStart(2, "0")}:00Z`,
    }));
    const text = squeeze(pagesOf(await renderInvoice({ ...invoice, authorizations: many })).join(" "));
    for (let index = 1; index <= 30; index++) expect(text).toContain(`Revision ${index}, total $749.87`);
  });
});
