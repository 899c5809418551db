import { sql } from "drizzle-orm";
import pg from "pg";
import { describe, expect, it } from "vitest";
import { inShop } from "@/db/client";
import { openCase } from "@/lib/services/cases/open";
import { readCase } from "@/lib/services/cases/read";
import { advanceCase } from "@/lib/services/cases/stage";
import { asDatabaseOwner, INTAKE, makeTestShop } from "../helpers/shop";

const BUSINESS = `select c.relname as name from pg_class c join pg_namespace n on n.oid = c.relnamespace
  where n.nspname = 'public' and c.relkind = 'r' order by 1`;

describe("many shops, one database", () => {
  it("leads every key and index of a business table with the shop", async () => {
    const rows = await asDatabaseOwner((client) =>
      client.query<{ table: string; index: string; first: string }>(
        `select t.relname as "table", i.relname as index, a.attname as first from pg_index x
         join pg_class i on i.oid = x.indexrelid join pg_class t on t.oid = x.indrelid join pg_namespace n on n.oid = t.relnamespace
         left join pg_attribute a on a.attrelid = t.oid and a.attnum = x.indkey[0] where n.nspname = 'public'`,
      ),
    );
    expect(rows.rows.length).toBeGreaterThan(50);
    expect(rows.rows.filter((row) => row.first !== "shop_id")).toEqual([]);
  });

  it("leads every foreign key with the shop on both sides", async () => {
    const rows = await asDatabaseOwner((client) =>
      client.query<{ name: string; own: string; other: string }>(
        `select k.conname as name, a.attname as own, b.attname as other from pg_constraint k join pg_namespace n on n.oid = k.connamespace
         join pg_attribute a on a.attrelid = k.conrelid and a.attnum = k.conkey[1] join pg_attribute b on b.attrelid = k.confrelid and b.attnum = k.confkey[1]
         where n.nspname = 'public' and k.contype = 'f'`,
      ),
    );
    expect(rows.rows.length).toBeGreaterThan(15);
    expect(rows.rows.filter((row) => row.own !== "shop_id" || row.other !== "shop_id")).toEqual([]);
  });

  it("has a row policy on every business table", async () => {
    const rows = await asDatabaseOwner((client) =>
      client.query<{ name: string }>(
        `select relname as name from pg_class c join pg_namespace n on n.oid = c.relnamespace where n.nspname = 'public' and relkind = 'r' and not relrowsecurity`,
      ),
    );
    expect(rows.rows).toEqual([]);
  });

  it("shows the app's role no row of any business table while no shop is set, and lets it write none", async () => {
    const shop = await makeTestShop();
    await shop.do(openCase, "writer", INTAKE);
    const tables = await asDatabaseOwner((client) => client.query<{ name: string }>(BUSINESS));
    const client = new pg.Client({ connectionString: process.env.APP_DATABASE_URL });
    await client.connect();
    try {
      for (const { name } of tables.rows) {
        const found = await client.query(`select count(*)::int as n from "${name}"`);
        expect([name, found.rows[0].n]).toEqual([name, 0]);
      }
      const changed = await client.query("update customers set name = 'x'");
      expect(changed.rowCount).toBe(0);
      await expect(
        client.query("insert into customers (shop_id, id, name) values ($1, 'cust_x', 'x')", [shop.shopId]),
      ).rejects.toThrow(/row-level security/);
      await expect(client.query("select * from auth.member")).rejects.toThrow(/permission denied/);
    } finally {
      await client.end();
    }
  });

  it("answers another shop's case as if it did not exist", async () => {
    const [mine, theirs] = [await makeTestShop(), await makeTestShop()];
    const opened = await theirs.do(openCase, "writer", INTAKE);
    await expect(readCase(mine.as("owner"), opened.number)).rejects.toMatchObject({ code: "not_found" });
    await expect(mine.do(advanceCase, "owner", { caseId: opened.id, to: "testing" })).rejects.toMatchObject({
      code: "not_found",
    });
  });

  it("refuses a reference to another shop's row", async () => {
    const [mine, theirs] = [await makeTestShop(), await makeTestShop()];
    const opened = await theirs.do(openCase, "writer", INTAKE);
    const customerId = await inShop(
      theirs.as("owner"),
      async (tx) =>
        (await tx.execute<{ customer_id: string }>(sql`select customer_id from cases where id = ${opened.id}`)).rows[0]
          ?.customer_id,
    );
    await expect(mine.do(openCase, "writer", { ...INTAKE, customer: { id: customerId ?? "" } })).rejects.toMatchObject({
      code: "not_found",
    });
  });
});
