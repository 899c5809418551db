import { describe, expect, it, vi } from "vitest";
import type { PaperLanguage } from "@/lib/pdf/models";
import { renderInvoice, renderQuote, renderRelease } from "@/lib/pdf/render";
import { invoice, quote, release } from "./papers";
import { extentOf, fontsOf, pagesOf } from "./read-pdf";

// papers, servers and pictures take their time on a busy machine
vi.setConfig({ testTimeout: 180_000, hookTimeout: 60_000 });

const read = (bytes: Uint8Array) => pagesOf(bytes).join(" ").replace(/\s+/g, " ");

describe("the quote on paper", () => {
  it("names how soon, what waiting risks, what needs what, and prices with tax", async () => {
    const text = read(await renderQuote(quote));
    for (const part of [
      "Estimate",
      "2431-1",
      "Air gets in past the intake seal",
      "24 % extra",
      "Needed now, tax included · Only together with: Reseal the intake manifold",
      "Soon, tax included",
      "If it waits: Starting gets harder within the year.",
      "$484.22",
      "Total $848.87",
      "Needed now, tax included $749.87",
      "Stands until 8 December 2026, 16:00",
      "Replaced parts are kept for you.",
      "Name, date, signature",
      "Not now",
    ])
      expect(text).toContain(part);
  });

  it("is called what the shop calls it", async () => {
    expect(read(await renderQuote({ ...quote, word: "quotation" }))).toContain("Quotation");
  });
});

describe("the paper of a vehicle left unrepaired", () => {
  it("says not safe to drive, who was told, what was refused at what risk, and what is owed", async () => {
    const text = read(await renderRelease(release));
    for (const part of [
      "Left unrepaired",
      "Not safe to drive",
      "Told to and understood by Juniper Tock",
      "The customer takes the car to another shop.",
      "Have it towed. Do not start the engine.",
      "Fuel hose at the rail. Safety. Not now. Fuel may spray on the hot exhaust.",
      "Total $187.44",
    ])
      expect(text).toContain(part);
  });

  it("says nothing of danger and shows no sums where there is none", async () => {
    const text = read(
      await renderRelease({ ...release, jobs: [], release: { ...release.release, notSafeToDrive: false } }),
    );
    expect(text).not.toContain("Not safe to drive");
    expect(text).not.toContain("Before tax");
  });
});

// how each language writes the amounts: Unicode CLDR, by the runtime's own tables, with spaces made plain
const WRITTEN: [PaperLanguage, string, string, string, string][] = [
  ["en", "en-US", "USD", "$749.87", "Invoice"],
  ["de", "de-DE", "EUR", "749,87 €", "Rechnung"],
  ["fr", "fr-FR", "EUR", "749,87 €", "Facture"],
  ["es", "es-ES", "EUR", "749,87 €", "Factura"],
  ["en", "en-US", "JPY", "¥74,987", "Invoice"],
  ["en", "en-US", "KWD", "KWD 74.987", "Invoice"],
];

describe("papers of one process", () => {
  // one that sets accented letters and hyphens first, then amounts below zero
  it("lose no sign to what was rendered before them, and give the same bytes in any order", async () => {
    const french = { language: "fr", locale: "fr-FR", currency: "EUR" } as const;
    await renderQuote({ ...quote, ...french });
    const first = await renderInvoice({ ...invoice, ...french });
    expect(read(first)).toContain("Paid by card, 16:58 −749,87 €");
    await renderRelease({ ...release, language: "es", locale: "es-ES", complaint: "Ruido al frenar\u00a0– ¿µ?" });
    expect(Buffer.compare(await renderInvoice({ ...invoice, ...french }), first)).toBe(0);
  });
});

describe("languages and currencies", () => {
  it.each(WRITTEN)("%s, %s, %s: %s", async (language, locale, currency, total, title) => {
    const bytes = await renderInvoice({ ...invoice, language, locale, currency });
    const text = read(bytes);
    expect(text).toContain(total);
    expect(text).toContain(title);
    expect(Buffer.from(bytes).toString("latin1")).toContain(`/Lang (${language})`);
    expect(fontsOf(bytes).filter((font) => !font.embedded)).toEqual([]);
  });

  it.each(["en", "es", "fr", "de"] as const)("keeps every paper inside its right margin in %s", async (language) => {
    const locale = { en: "en-US", es: "es-ES", fr: "fr-FR", de: "de-DE" }[language];
    const papers = [
      renderInvoice({ ...invoice, language, locale }),
      renderQuote({ ...quote, language, locale }),
      renderQuote({ ...quote, language, locale, word: "quotation", paper: "Letter" }),
      renderRelease({ ...release, language, locale }),
    ];
    // 56 px at 96 to the inch are 42 points
    for (const bytes of await Promise.all(papers))
      for (const { right, width } of extentOf(bytes)) expect(right).toBeLessThanOrEqual(width - 42 + 1);
  });

  it("sets names of the extended Latin alphabet", async () => {
    const text = read(
      await renderInvoice({ ...invoice, customer: { name: "Šárka Żółkiewska-Őry", address: "Łąkowa 7, Gdańsk" } }),
    );
    expect(text).toContain("Šárka Żółkiewska-Őry");
    expect(text).toContain("Łąkowa 7, Gdańsk");
  });
});
