import { describe, expect, it } from "vitest";
import { readCase, readCaseHistory, readPriceList } from "@/lib/services/cases/read";
import { savePart } from "@/lib/services/prices/save";
import { saveQuoteJob } from "@/lib/services/quotes/draft";
import { caseAsked, LINES, makeTestShop } from "../helpers/shop";

describe("what a thing costs the shop", () => {
  it("reaches the owner and the writer, and a technician by no way", async () => {
    const shop = await makeTestShop();
    const asked = await caseAsked(shop);
    await shop.do(savePart, "writer", { number: "MG-1", name: "Gasket", costMinor: 4280, priceMinor: 6420 });
    for (const role of ["owner", "writer"] as const) {
      expect(JSON.stringify(await readCaseHistory(shop.as(role), asked.caseId))).toContain("4280");
    }
    const technician = shop.as("technician");
    const seen = [
      (await readCase(technician, asked.number)).parts.quoteJobs,
      (await readCase(technician, asked.number)).parts.revisions,
      await readCaseHistory(technician, asked.caseId),
      await readPriceList(technician),
    ];
    expect(JSON.stringify(seen)).not.toMatch(/4280|1181/);
    const conflict = await shop
      .do(saveQuoteJob, "technician", {
        caseId: asked.caseId,
        jobId: asked.jobIds[0],
        version: 99,
        title: "x",
        lines: LINES,
      })
      .catch((error: { current?: unknown }) => error.current);
    expect(JSON.stringify(conflict)).not.toContain("4280");
  });

  it("is not in what was sent to the customer", async () => {
    const shop = await makeTestShop();
    const asked = await caseAsked(shop);
    const { parts } = await readCase(shop.as("owner"), asked.number);
    expect(JSON.stringify(parts.revisions[0]?.snapshot)).not.toMatch(/cost|4280|1181/i);
  });

  it("keeps prices out of a technician's hand: a new line takes the shop's rate, a known one keeps its price", async () => {
    const shop = await makeTestShop();
    const asked = await caseAsked(shop);
    const lines = [
      { ...LINES[0]!, unitPriceMinor: 1 },
      { ...LINES[1]!, unitPriceMinor: 1, costMinor: 1 },
      { id: "ln_new", kind: "labour" as const, description: "More", quantityMilli: 500, unitPriceMinor: 1 },
    ];
    await shop.do(saveQuoteJob, "technician", {
      caseId: asked.caseId,
      jobId: asked.jobIds[0],
      version: 1,
      title: "Reseal",
      lines,
    });
    const { parts } = await readCase(shop.as("owner"), asked.number);
    const saved = parts.quoteJobs.find((job) => job.id === asked.jobIds[0])?.lines ?? [];
    expect(saved.map((line) => line.unitPriceMinor)).toEqual([14_200, 6420, 14_200]);
    expect(saved[1]?.costMinor).toBe(4280);
  });
});
