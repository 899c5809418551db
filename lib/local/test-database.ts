import pg from "pg";
import { migrateDatabase } from "@/db/migrate";
import { type DatabaseUrls, databaseUrls } from "@/db/urls";

const TEMPLATE = "firedeck_template";

/** The three addresses of one database of the server that `ownerUrl` names. */
export function urlsFor(ownerUrl: string, name: string): DatabaseUrls {
  const url = new URL(ownerUrl);
  url.pathname = `/${name}`;
  return databaseUrls({ DATABASE_URL: url.toString(), BETTER_AUTH_SECRET: process.env.BETTER_AUTH_SECRET });
}

async function asOwner<T>(ownerUrl: string, work: (client: pg.Client) => Promise<T>): Promise<T> {
  const client = new pg.Client({ connectionString: ownerUrl });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

/**
 * Makes the migrated template once, before the workers start (vitest's globalSetup).
 *
 * @param ownerUrl TEST_DATABASE_URL: a role that may create databases and roles
 */
export async function createTemplate(ownerUrl: string): Promise<void> {
  await asOwner(ownerUrl, async (client) => {
    await client.query(`drop database if exists ${TEMPLATE} with (force)`).catch(() => undefined);
    const left = await client.query("select 1 from pg_database where datname = $1", [TEMPLATE]);
    if (left.rowCount) {
      await client.query(`alter database ${TEMPLATE} is_template false allow_connections true`);
      await client.query(`drop database ${TEMPLATE} with (force)`);
    }
    await client.query(`create database ${TEMPLATE}`);
    await migrateDatabase(urlsFor(ownerUrl, TEMPLATE));
    await client.query(`alter database ${TEMPLATE} is_template true allow_connections false`);
  });
}

/**
 * A fresh copy of the template, dropped and made again when it exists.
 *
 * @param name lower-case letters, digits and underscores; one a worker, as `worker_${process.env.VITEST_POOL_ID}`
 */
export async function cloneTemplate(ownerUrl: string, name: string): Promise<DatabaseUrls> {
  if (!/^[a-z][a-z0-9_]{0,50}$/.test(name)) throw new RangeError(`not a database name: ${name}`);
  await asOwner(ownerUrl, async (client) => {
    await client.query(`drop database if exists ${name} with (force)`);
    await client.query(`create database ${name} template ${TEMPLATE} strategy file_copy`);
  });
  return urlsFor(ownerUrl, name);
}

export async function dropDatabase(ownerUrl: string, name: string): Promise<void> {
  await asOwner(ownerUrl, (client) =>
    client.query(`drop database if exists ${pg.escapeIdentifier(name)} with (force)`),
  );
}
