import { randomUUID } from "node:crypto";
import pg from "pg";
import type { z } from "zod";
import { asShopId, type Ctx } from "@/lib/auth/context";
import type { Role } from "@/lib/auth/permissions";
import { openCase } from "@/lib/services/cases/open";
import { readCase } from "@/lib/services/cases/read";
import { advanceCase } from "@/lib/services/cases/stage";
import { markCause, recordTest } from "@/lib/services/causes/causes";
import { addQuoteJob, saveDraft } from "@/lib/services/quotes/draft";
import { sendQuote } from "@/lib/services/quotes/send";
import { addSample } from "@/lib/services/readings/samples";
import { perform, type Verb } from "@/lib/services/verb";

/** A connection as the owner of the tables, for what no role of the app may do. */
export async function asDatabaseOwner<T>(work: (client: pg.Client) => Promise<T>): Promise<T> {
  const client = new pg.Client({ connectionString: process.env.DATABASE_URL });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

export interface TestShop {
  shopId: string;
  as(role: Role, now?: Date): Ctx;
  do<I extends z.ZodType, O>(verb: Verb<I, O>, role: Role, input: z.input<I>, key?: string): Promise<O>;
}

let serial = 0;

/** A shop of its own with an owner, a writer and a technician. */
export async function makeTestShop(): Promise<TestShop> {
  serial += 1;
  const shopId = `shop_${serial}_${randomUUID().slice(0, 8)}`;
  const ids: Record<string, string> = {};
  await asDatabaseOwner(async (client) => {
    await client.query(`insert into auth.organization (id, name, slug) values ($1, $2, $1)`, [
      shopId,
      `Test Works ${serial}`,
    ]);
    for (const role of ["owner", "writer", "technician"]) {
      const id = `user_${role}_${shopId}`;
      ids[role] = id;
      await client.query(`insert into auth."user" (id, name, email) values ($1, $2, $3)`, [
        id,
        `Test ${role}`,
        `${role}@${shopId}.example`,
      ]);
      await client.query(`insert into auth.member (id, organization_id, user_id, role) values ($1, $2, $3, $4)`, [
        `member_${id}`,
        shopId,
        id,
        role,
      ]);
    }
    await client.query(
      `insert into labour_rates (shop_id, id, name, per_hour_minor, purpose) values ($1, 'rate_general', 'General', 14200, 'general'), ($1, 'rate_diagnosis', 'Diagnosis', 14200, 'diagnosis')`,
      [shopId],
    );
    await client.query(
      `update shops set settings = '{"taxBasisPoints": 1000, "email": "desk@works.example"}' where shop_id = $1`,
      [shopId],
    );
  });
  const as = (role: Role, now = new Date()): Ctx => ({
    shopId: asShopId(shopId),
    actor: { id: ids[role] ?? role, name: `Test ${role}`, role },
    requestId: randomUUID(),
    now,
  });
  return {
    shopId,
    as,
    do: (verb, role, input, key) => perform(verb, as(role), input, key ? { idempotencyKey: key } : {}),
  };
}

export const ENGINE = {
  displacementL: 2.4,
  cylinders: 4,
  banks: 1,
  fuelSystem: "port",
  airMetering: "maf",
  aspiration: "natural",
  ignition: "coil-on-plug",
  o2Sensing: "switching",
  fuel: "E10",
} as const;

export const INTAKE = {
  customer: { name: "Juniper Tock", email: "juniper@tock.example", phone: "555 0167" },
  vehicle: { label: "Corvid Marlin 2.4", plate: "QYR 431", modelYear: 2012, engine: ENGINE },
  complaints: ["rough-idle" as const],
  words: "Shakes at the lights",
  odometerInKm: 182_000,
};

/** A case in testing, its diagnosis agreed. */
export async function caseInTesting(shop: TestShop) {
  const opened = await shop.do(openCase, "writer", {
    ...INTAKE,
    authorization: { amountMinor: 18_000, givenBy: "Juniper Tock", how: "in-person" },
  });
  await shop.do(advanceCase, "writer", { caseId: opened.id, to: "testing" });
  return opened;
}

export const LINES = [
  {
    id: "ln_1",
    kind: "labour" as const,
    description: "Intake manifold, remove and refit",
    quantityMilli: 2400,
    unitPriceMinor: 14_200,
  },
  {
    id: "ln_2",
    kind: "part" as const,
    description: "Manifold gasket set",
    quantityMilli: 1000,
    unitPriceMinor: 6420,
    costMinor: 4280,
    partNumber: "MG-2410",
    condition: "new" as const,
  },
];

/** A case whose quote of two jobs has been sent. */
export async function caseAsked(shop: TestShop) {
  const opened = await caseInTesting(shop);
  const caseId = opened.id;
  await shop.do(addSample, "technician", {
    caseId,
    mode: "idling",
    values: { RPM: 780, ECT: 91, SHRTFT1: 14.1, LONGFT1: 10.2, FUELSYS1: "CL" },
  });
  await shop.do(addSample, "technician", {
    caseId,
    mode: "raised-idle",
    values: { RPM: 2500, ECT: 92, SHRTFT1: 2.3, LONGFT1: 3.1, FUELSYS1: "CL" },
  });
  const test = await shop.do(recordTest, "technician", { caseId, testId: "intake-smoke", outcome: "leak-seen" });
  await shop.do(markCause, "technician", {
    caseId,
    causeId: "intake-air-leak",
    mark: "proven",
    reason: "Smoke at runner 3",
    provenByTestId: test.id,
  });
  await shop.do(advanceCase, "technician", { caseId, to: "quoting" });
  const first = await shop.do(addQuoteJob, "writer", {
    caseId,
    title: "Reseal the intake manifold",
    urgency: "now",
    ifWaits: "It will keep shaking.",
    causeId: "intake-air-leak",
    lines: LINES,
  });
  const second = await shop.do(addQuoteJob, "writer", {
    caseId,
    title: "Spark plugs",
    urgency: "optional",
    ifWaits: "Nothing sudden.",
    lines: [
      {
        id: "ln_9",
        kind: "part",
        description: "Spark plug",
        quantityMilli: 4000,
        unitPriceMinor: 1890,
        costMinor: 1181,
      },
    ],
  });
  const { parts } = await readCase(shop.as("writer"), opened.number);
  await shop.do(saveDraft, "writer", {
    caseId,
    version: parts.draft?.version ?? 1,
    headline: "Your engine is drawing in air it should not",
    finding: "A seal has gone hard.",
    warranty: "Twelve months.",
  });
  const sent = await shop.do(sendQuote, "writer", { caseId });
  return { ...opened, caseId, revisionId: sent.revisionId, jobIds: [first.jobId, second.jobId] as const };
}
