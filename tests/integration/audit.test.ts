import { sql } from "drizzle-orm";
import pg from "pg";
import { describe, expect, it } from "vitest";
import { inShop } from "@/db/client";
import { movePromise } from "@/lib/services/cases/intake";
import { openCase } from "@/lib/services/cases/open";
import { asDatabaseOwner, INTAKE, makeTestShop, type TestShop } from "../helpers/shop";

const verify = (shop: TestShop) =>
  inShop(
    shop.as("owner"),
    async (tx) => (await tx.execute<{ seq: string; fault: string }>(sql`select * from verify_audit()`)).rows,
  );

async function shopWithHistory() {
  const shop = await makeTestShop();
  const { id } = await shop.do(openCase, "writer", INTAKE);
  await shop.do(movePromise, "writer", { caseId: id, promisedAt: "2026-12-01T16:30:00Z", reason: "Part is late" });
  return { shop, caseId: id };
}

describe("the audit", () => {
  it("records who changed what, before and after, in the write's own transaction", async () => {
    const { shop, caseId } = await shopWithHistory();
    const rows = await inShop(
      shop.as("owner"),
      async (tx) =>
        (
          await tx.execute<Record<string, never>>(
            sql`select actor_name, role, verb, reason, action, before->>'promised_at' as before, after->>'promised_at' as after from audit where entity = 'cases' and entity_id = ${caseId} order by seq desc limit 1`,
          )
        ).rows,
    );
    expect(rows[0]).toMatchObject({
      actor_name: "Test writer",
      role: "writer",
      verb: "case.promise",
      reason: "Part is late",
      action: "update",
      before: null,
    });
    expect(String(rows[0]?.after)).toContain("2026-12-01");
  });

  it("leaves no entry when the write fails", async () => {
    const { shop, caseId } = await shopWithHistory();
    const count = () =>
      inShop(shop.as("owner"), async (tx) =>
        Number((await tx.execute<{ n: string }>(sql`select count(*) as n from audit`)).rows[0]?.n),
      );
    const before = await count();
    await expect(
      shop.do(movePromise, "writer", { caseId: `${caseId}x`, promisedAt: "2026-12-01T16:30:00Z" }),
    ).rejects.toMatchObject({ code: "not_found" });
    expect(await count()).toBe(before);
  });

  it("holds while nobody touches it", async () => {
    const { shop } = await shopWithHistory();
    expect(await verify(shop)).toEqual([]);
  });

  it("names the row in which the database's owner changed one byte", async () => {
    const { shop } = await shopWithHistory();
    await asDatabaseOwner((client) =>
      client.query(`update audit set actor_name = 'Test writes' where shop_id = $1 and seq = 3`, [shop.shopId]),
    );
    const [fault] = await verify(shop);
    expect(fault).toMatchObject({ fault: "changed after it was written" });
    expect(Number(fault?.seq)).toBe(3);
  });

  it("notices a removed entry, in the middle and at the end", async () => {
    const { shop } = await shopWithHistory();
    await asDatabaseOwner((client) => client.query(`delete from audit where shop_id = $1 and seq = 2`, [shop.shopId]));
    expect(Number((await verify(shop))[0]?.seq)).toBe(3);
    const other = (await shopWithHistory()).shop;
    await asDatabaseOwner((client) =>
      client.query(`delete from audit where shop_id = $1 and seq = (select max(seq) from audit where shop_id = $1)`, [
        other.shopId,
      ]),
    );
    expect((await verify(other))[0]?.fault).toBe("the newest entries are missing");
  });

  it("can't be written or altered by the app's role", async () => {
    const { shop } = await shopWithHistory();
    const client = new pg.Client({ connectionString: process.env.APP_DATABASE_URL });
    await client.connect();
    try {
      await client.query("select set_config('app.shop_id', $1, false)", [shop.shopId]);
      await expect(client.query("update audit set reason = 'x'")).rejects.toThrow(/permission denied/);
      await expect(client.query("delete from audit")).rejects.toThrow(/permission denied/);
      await expect(client.query("insert into audit select * from audit")).rejects.toThrow(/permission denied/);
    } finally {
      await client.end();
    }
  });
});
