import { afterAll, beforeAll } from "vitest";
import { closePools } from "@/db/client";
import { cloneTemplate, dropDatabase } from "@/lib/local/test-database";

const server = process.env.TEST_DATABASE_URL ?? "";
const name = `worker_${process.env.VITEST_POOL_ID ?? "1"}_${process.pid}`;

beforeAll(async () => {
  const urls = await cloneTemplate(server, name);
  process.env.DATABASE_URL = urls.owner;
  process.env.APP_DATABASE_URL = urls.app;
  process.env.AUTH_DATABASE_URL = urls.auth;
  process.env.APP_URL = "http://localhost:3000";
  process.env.SMTP_URL = "smtp://127.0.0.1:1";
  process.env.MAIL_FROM = "Firedeck <desk@firedeck.example>";
  process.env.BETTER_AUTH_SECRET ??= "integration-tests-only-secret-of-enough-length";
});

afterAll(async () => {
  await closePools();
  // the whole cluster is thrown away afterwards; a copy that is still busy must not fail the tests that passed
  await dropDatabase(server, name).catch(() => undefined);
});
