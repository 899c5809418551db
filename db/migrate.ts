import { fileURLToPath } from "node:url";
import { drizzle } from "drizzle-orm/node-postgres";
import { migrate } from "drizzle-orm/node-postgres/migrator";
import { runMigrations } from "graphile-worker";
import pg from "pg";
import { databaseUrls } from "./urls";

/**
 * Brings a database to the present shape: login roles, the job queue's own schema, then the migrations of `drizzle/`.
 * Runs as the owner of the tables; safe to repeat.
 */
export async function migrateDatabase(urls = databaseUrls()): Promise<void> {
  const pool = new pg.Pool({ connectionString: urls.owner, max: 2 });
  try {
    for (const url of [urls.app, urls.auth]) await ensureRole(pool, url);
    await runMigrations({ connectionString: urls.owner });
    await migrate(drizzle(pool), { migrationsFolder: fileURLToPath(new URL("../drizzle", import.meta.url)) });
  } finally {
    await pool.end();
  }
}

/** The policies name the roles `firedeck_app` and `firedeck_auth`; the URLs carry the passwords they sign in with. */
async function ensureRole(pool: pg.Pool, url: string): Promise<void> {
  const { username, password } = new URL(url);
  const role = pg.escapeIdentifier(decodeURIComponent(username));
  const secret = pg.escapeLiteral(decodeURIComponent(password));
  const found = await pool.query("select 1 from pg_roles where rolname = $1", [decodeURIComponent(username)]);
  if (found.rowCount === 0) await pool.query(`create role ${role} login nosuperuser nobypassrls password ${secret}`);
  else await pool.query(`alter role ${role} password ${secret}`).catch(() => undefined); // not ours to change: keep it
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  migrateDatabase().catch((error: unknown) => {
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 1;
  });
}
