import { type ChildProcess, spawn } from "node:child_process";
import { existsSync, mkdirSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import pg from "pg";
import { migrateDatabase } from "../../db/migrate.ts";
import { databaseUrls } from "../../db/urls.ts";
import { removeCluster, startCluster } from "../../lib/local/cluster.mjs";
import { secretsIn } from "../../lib/local/secrets.mjs";
import type { BenchResult } from "./run.mts";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));
const CASES = 100_000;
const OPEN = 400;
const ROUNDS = 60;
const LIMIT = 3;
const SHOP = "shop_bench";
const WHO = { email: "bench@works.example", password: "bench-password-long" };

const freePort = () =>
  new Promise<number>((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen(0, "127.0.0.1", () => {
      const { port } = server.address() as { port: number };
      server.close(() => resolve(port));
    });
  });

/** The value that 95 of 100 measurements stay under. */
function p95(times: number[]): number {
  const sorted = [...times].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.ceil(sorted.length * 0.95) - 1)] ?? 0;
}

async function timed(work: () => Promise<unknown>): Promise<number> {
  const from = performance.now();
  await work();
  return performance.now() - from;
}

/** Rows by SQL with the audit off: what is measured is reading, not writing. */
async function fill(owner: pg.Client, ownerId: string): Promise<void> {
  await owner.query("insert into auth.organization (id, name, slug) values ($1, 'Bench Works', $1)", [SHOP]);
  await owner.query(
    "insert into auth.member (id, organization_id, user_id, role) values ('member_bench', $1, $2, 'owner')",
    [SHOP, ownerId],
  );
  for (const table of ["customers", "vehicles", "cases", "samples"])
    await owner.query(`alter table ${table} disable trigger user`);
  await owner.query(
    `insert into customers (shop_id, id, name, email) select '${SHOP}', 'cust_' || n, 'Customer ' || md5(n::text), 'c' || n || '@post.example' from generate_series(1, ${CASES}) n`,
  );
  await owner.query(
    `insert into vehicles (shop_id, id, customer_id, label, plate, model_year, engine) select '${SHOP}', 'veh_' || n, 'cust_' || n, 'Corvid Marlin 2.4', 'P' || n, 2012, '{"displacementL":2.4,"cylinders":4,"banks":1,"fuelSystem":"port","airMetering":"maf","o2Sensing":"switching"}' from generate_series(1, ${CASES}) n`,
  );
  await owner.query(`insert into cases (shop_id, id, number, customer_id, vehicle_id, stage, stage_since, waiting_on, waiting_for, complaints, words, circumstances, history, arrival, odometer_in_km, keep_parts, road_test_allowed, site, readiness, search_text, opened_at, technician_id)
    select '${SHOP}', 'case_' || n, n, 'cust_' || n, 'veh_' || n, case when n > ${CASES - OPEN} then 'testing' else 'closed' end, now() - (${CASES} - n) * interval '20 minutes',
      case when n > ${CASES - OPEN} then 'technician' else 'nobody' end, '', '{rough-idle}', 'Shakes at idle', '{}', '{}', 'drop-off', 100000, false, true, '{}', '{}',
      n || ' customer ' || md5(n::text) || ' corvid marlin 2.4 p' || n, now() - (${CASES} - n) * interval '20 minutes', null from generate_series(1, ${CASES}) n`);
  await owner.query(
    `insert into samples (shop_id, id, case_id, position, mode, phase, values, taken_at, taken_by_id, taken_by_name) select '${SHOP}', 'smp_' || n, 'case_' || n, 1, 'idling', 'before', '{"RPM":780,"ECT":91,"SHRTFT1":14.1,"LONGFT1":10.2,"FUELSYS1":"CL"}', now(), 'x', 'x' from generate_series(1, ${CASES}) n`,
  );
  for (const table of ["customers", "vehicles", "cases", "samples"])
    await owner.query(`alter table ${table} enable trigger user`);
  await owner.query("analyze");
}

/** The statements each page stands on, as bare SQL in the app's role. */
const BARE: Record<string, string> = {
  list: `select c.id, c.number, c.stage, cu.name, v.label, v.plate from cases c join customers cu on cu.shop_id = c.shop_id and cu.id = c.customer_id
    join vehicles v on v.shop_id = c.shop_id and v.id = c.vehicle_id where c.shop_id = '${SHOP}' and c.stage not in ('closed', 'released') order by c.waiting_on, c.number desc limit 51;
    select count(*) from cases where shop_id = '${SHOP}' and stage not in ('closed', 'released');
    select count(*) from cases where shop_id = '${SHOP}' and stage in ('closed', 'released') and stage_since > now() - interval '7 days'`,
  case: `select * from cases where shop_id = '${SHOP}' and number = 99990; select * from samples where shop_id = '${SHOP}' and case_id = 'case_99990';
    select * from customers where shop_id = '${SHOP}' and id = 'cust_99990'; select * from vehicles where shop_id = '${SHOP}' and id = 'veh_99990'`,
  search: `select c.id, c.number, cu.name, v.label from cases c join customers cu on cu.shop_id = c.shop_id and cu.id = c.customer_id
    join vehicles v on v.shop_id = c.shop_id and v.id = c.vehicle_id where c.shop_id = '${SHOP}' and c.search_text like '%p4242%' order by c.number desc limit 51`,
};

const PATHS: Record<string, string> = {
  list: "/cases?show=all",
  case: "/cases/99990/readings",
  search: "/cases?q=p4242",
};

export default async function casesBench(): Promise<BenchResult> {
  if (!existsSync(join(ROOT, ".next/BUILD_ID")))
    return { lines: ["no production build; run `npm run build` first"], ok: false };
  const folder = join(ROOT, `.local/bench-${process.pid}`);
  mkdirSync(folder, { recursive: true });
  const secrets = await secretsIn(folder);
  const cluster = await startCluster({ dataDir: join(folder, "pg"), secrets, preferredPort: 5543, throwaway: true });
  let web: ChildProcess | undefined;
  try {
    process.env.DATABASE_URL = cluster.url;
    process.env.BETTER_AUTH_SECRET = secrets.authSecret;
    const urls = databaseUrls();
    await migrateDatabase(urls);
    const port = await freePort();
    const base = `http://localhost:${port}`;
    const env = {
      ...process.env,
      NODE_ENV: "production" as const,
      APP_URL: base,
      SMTP_URL: "smtp://127.0.0.1:1",
      MAIL_FROM: "Firedeck <bench@works.example>",
    };
    web = spawn(
      process.execPath,
      [join(ROOT, "node_modules/next/dist/bin/next"), "start", "-p", String(port), "-H", "localhost"],
      { cwd: ROOT, env, stdio: "ignore" },
    );
    for (let n = 0; n < 200; n++) {
      if (
        await fetch(`${base}/api/health`).then(
          (answer) => answer.ok,
          () => false,
        )
      )
        break;
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    const headers = { "content-type": "application/json", origin: base };
    const made = await fetch(`${base}/api/auth/sign-up/email`, {
      method: "POST",
      headers,
      body: JSON.stringify({ name: "Bench", ...WHO }),
    });
    const { user } = (await made.json()) as { user: { id: string } };
    const cookie = made.headers
      .getSetCookie()
      .map((each) => each.split(";")[0])
      .join("; ");
    const owner = new pg.Client({ connectionString: urls.owner });
    await owner.connect();
    await fill(owner, user.id);
    await owner.end();
    const app = new pg.Client({ connectionString: urls.app });
    await app.connect();
    await app.query(`select set_config('app.shop_id', '${SHOP}', false)`);
    const lines: string[] = [];
    let ok = true;
    for (const [name, path] of Object.entries(PATHS)) {
      const get = async () => {
        const answer = await fetch(base + path, { headers: { cookie } });
        if (answer.status !== 200) throw new Error(`${path} answered ${answer.status}`);
        await answer.text();
      };
      const bare = () => app.query(BARE[name]!);
      for (let n = 0; n < 8; n++) {
        await get();
        await bare();
      }
      const [pages, sql]: [number[], number[]] = [[], []];
      for (let n = 0; n < ROUNDS; n++) {
        sql.push(await timed(bare));
        pages.push(await timed(get));
      }
      const ratio = p95(pages) / p95(sql);
      if (ratio > LIMIT) ok = false;
      lines.push(
        `${name} page p95 ${p95(pages).toFixed(1)} ms, its bare SQL ${p95(sql).toFixed(1)} ms: ${ratio.toFixed(1)} × (limit ${LIMIT}), ${CASES} cases`,
      );
    }
    await app.end();
    return { lines, ok };
  } finally {
    web?.kill("SIGKILL");
    await cluster.stop();
    await removeCluster(join(folder, "pg"));
    rmSync(folder, { recursive: true, force: true });
  }
}
