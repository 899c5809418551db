import { createHash } from "node:crypto";
import { sql } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { inShop } from "@/db/client";
import { canonicalJson } from "@/lib/canonical";
import { addNote } from "@/lib/services/cases/intake";
import { openCase } from "@/lib/services/cases/open";
import { readCase } from "@/lib/services/cases/read";
import { recordApproval } from "@/lib/services/quotes/approve";
import { saveQuoteJob } from "@/lib/services/quotes/draft";
import { sendQuote } from "@/lib/services/quotes/send";
import { addSample, setReadings } from "@/lib/services/readings/samples";
import { clockOn } from "@/lib/services/work/clock";
import { asDatabaseOwner, caseAsked, caseInTesting, INTAKE, LINES, makeTestShop } from "../helpers/shop";

describe("writes", () => {
  it("happen once when repeated with their key, at the same time too", async () => {
    const shop = await makeTestShop();
    const answers = await Promise.all(Array.from({ length: 8 }, () => shop.do(openCase, "writer", INTAKE, "key-1")));
    expect(new Set(answers.map((answer) => answer.id)).size).toBe(1);
    const count = await inShop(
      shop.as("owner"),
      async (tx) => (await tx.execute<{ n: number }>(sql`select count(*)::int as n from cases`)).rows[0]?.n,
    );
    expect(count).toBe(1);
  });

  it("refuse a key that was used for something else", async () => {
    const shop = await makeTestShop();
    await shop.do(openCase, "writer", INTAKE, "key-2");
    await expect(shop.do(openCase, "writer", { ...INTAKE, words: "Something else" }, "key-2")).rejects.toMatchObject({
      code: "conflict",
    });
  });

  it("give case numbers without a gap or a double under concurrency", async () => {
    const shop = await makeTestShop();
    const opened = await Promise.all(Array.from({ length: 20 }, () => shop.do(openCase, "writer", INTAKE)));
    const numbers = opened.map((each) => each.number).sort((a, b) => a - b);
    expect(numbers).toEqual(Array.from({ length: 20 }, (_, index) => numbers[0]! + index));
  });

  it("let two people write different cells of one sheet, and show a conflict in the same cell", async () => {
    const shop = await makeTestShop();
    const { id: caseId, number } = await caseInTesting(shop);
    const { id: sampleId } = await shop.do(addSample, "technician", { caseId, mode: "idling", values: { RPM: 780 } });
    await Promise.all([
      shop.do(setReadings, "technician", { caseId, sampleId, changes: [{ parameter: "ECT", was: null, now: 91 }] }),
      shop.do(setReadings, "writer", { caseId, sampleId, changes: [{ parameter: "MAF", was: null, now: 3.1 }] }),
    ]);
    const { parts } = await readCase(shop.as("owner"), number);
    expect(parts.samples[0]?.values).toEqual({ RPM: 780, ECT: 91, MAF: 3.1 });
    await expect(
      shop.do(setReadings, "writer", { caseId, sampleId, changes: [{ parameter: "RPM", was: 700, now: 800 }] }),
    ).rejects.toMatchObject({
      code: "conflict",
      current: { cells: [{ parameter: "RPM", yours: 800, theirs: 780 }] },
    });
    const after = await readCase(shop.as("owner"), number);
    expect(after.parts.samples[0]?.values.RPM).toBe(780);
  });

  it("refuse a reading of a wrong type with its path, and keep an impossible number", async () => {
    const shop = await makeTestShop();
    const { id: caseId, number } = await caseInTesting(shop);
    await expect(
      shop.do(addSample, "technician", { caseId, mode: "idling", values: { RPM: "many" } }),
    ).rejects.toMatchObject({ code: "invalid", fields: [{ pointer: "/values/RPM" }] });
    await shop.do(addSample, "technician", { caseId, mode: "idling", values: { ECT: 910 } });
    expect((await readCase(shop.as("owner"), number)).parts.samples.at(-1)?.values.ECT).toBe(910);
  });

  it("show a conflict to the second of two writers of one quote job", async () => {
    const shop = await makeTestShop();
    const asked = await caseAsked(shop);
    const job = { caseId: asked.caseId, jobId: asked.jobIds[0], version: 1, title: "Reseal", lines: LINES };
    await shop.do(saveQuoteJob, "writer", job);
    await expect(shop.do(saveQuoteJob, "owner", { ...job, title: "Other" })).rejects.toMatchObject({
      code: "conflict",
      current: { title: "Reseal" },
    });
  });

  it("never let an approved job's price change, by any role or by SQL", async () => {
    const shop = await makeTestShop();
    const asked = await caseAsked(shop);
    const answers = [
      { jobId: asked.jobIds[0], answer: "yes" as const },
      { jobId: asked.jobIds[1], answer: "not-now" as const },
    ];
    await shop.do(recordApproval, "writer", {
      caseId: asked.caseId,
      revisionId: asked.revisionId,
      how: "phone",
      contact: "555 0167",
      givenBy: "Juniper Tock",
      words: "Yes to the seal",
      answers,
    });
    for (const role of ["owner", "writer", "technician"] as const) {
      await expect(
        shop.do(saveQuoteJob, role, {
          caseId: asked.caseId,
          jobId: asked.jobIds[0],
          version: 1,
          title: "Dearer",
          lines: [{ ...LINES[0]!, unitPriceMinor: 99_999 }],
        }),
      ).rejects.toMatchObject({ code: "precondition" });
    }
    await expect(
      asDatabaseOwner((client) =>
        client.query("update work_jobs set approved_minor = approved_minor + 1 where shop_id = $1", [shop.shopId]),
      ),
    ).rejects.toThrow(/keeps its price/);
    await expect(
      asDatabaseOwner((client) =>
        client.query("update quote_revisions set total_minor = 1 where shop_id = $1", [shop.shopId]),
      ),
    ).rejects.toThrow(/never changed/);
  });

  it("take one answer to a revision, whoever else gives another", async () => {
    const shop = await makeTestShop();
    const asked = await caseAsked(shop);
    const answer = (yes: boolean) => ({
      caseId: asked.caseId,
      revisionId: asked.revisionId,
      how: "in-person" as const,
      givenBy: "Juniper Tock",
      words: "Said at the counter",
      answers: [
        { jobId: asked.jobIds[0], answer: yes ? ("yes" as const) : ("not-now" as const) },
        { jobId: asked.jobIds[1], answer: "not-now" as const },
      ],
    });
    const given = await Promise.all(
      Array.from({ length: 12 }, (_, index) => shop.do(recordApproval, "writer", answer(index % 2 === 0))),
    );
    expect(new Set(given.map((each) => each.approvalId)).size).toBe(1);
    expect(given.filter((each) => !each.repeated).length).toBe(1);
  });

  it("do not send a second revision that says what the first one says", async () => {
    const shop = await makeTestShop();
    const asked = await caseAsked(shop);
    await expect(shop.do(sendQuote, "writer", { caseId: asked.caseId })).rejects.toMatchObject({
      code: "precondition",
    });
    await shop.do(saveQuoteJob, "writer", {
      caseId: asked.caseId,
      jobId: asked.jobIds[0],
      version: 1,
      title: "Reseal the intake manifold, both sides",
      lines: LINES,
    });
    const second = await shop.do(sendQuote, "writer", { caseId: asked.caseId });
    expect(second.number).toBe(2);
  });

  it("keep a paper's sum true to its stored data", async () => {
    const shop = await makeTestShop();
    const { caseId } = await caseAsked(shop);
    const { rows } = await asDatabaseOwner((client) =>
      client.query<{ snapshot: unknown; sha256: string }>("select snapshot, sha256 from papers where case_id = $1", [
        caseId,
      ]),
    );
    expect(rows).toHaveLength(1);
    expect(createHash("sha256").update(canonicalJson(rows[0]?.snapshot)).digest("hex")).toBe(rows[0]?.sha256);
  });

  it("allow nothing beyond what was approved", async () => {
    const shop = await makeTestShop();
    const asked = await caseAsked(shop);
    await expect(
      shop.do(clockOn, "technician", { caseId: asked.caseId, workJobId: "wrk_unknown" }),
    ).rejects.toMatchObject({ code: "not_found" });
  });

  it("refuse a NUL in a text with the field's name", async () => {
    const shop = await makeTestShop();
    const { id: caseId } = await caseInTesting(shop);
    await expect(shop.do(addNote, "technician", { caseId, text: "a\u0000b" })).rejects.toThrow(/NUL/);
  });
});
