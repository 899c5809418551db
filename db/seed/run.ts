import "server-only";
import { randomBytes } from "node:crypto";
import { readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { and, eq, inArray } from "drizzle-orm";
import { authDb, closePools, inShop } from "@/db/client";
import { cases, labourRates, operations, parts, quoteRevisions, setJobs, shops } from "@/db/schema";
import { member, organization, user } from "@/db/schema/auth";
import { auth } from "@/lib/auth/auth";
import { asShopId, type Ctx } from "@/lib/auth/context";
import { env } from "@/lib/env";
import { newId } from "@/lib/ids";
import { makeLink } from "@/lib/services/quotes/links";
import { openShop } from "@/lib/services/shops/open-shop";
import { shopSettings } from "@/lib/shops/schema";
import { runStory, type Staff } from "./case-run";
import { DEMO_JOBS, linesOf } from "./jobs";
import { photosFor } from "./photos";
import { STORIES } from "./stories";

const PEOPLE = [
  { key: "hester", name: "Hester Quillon", email: "hester@quillonyard.example", role: "owner" },
  { key: "odile", name: "Odile Tansy", email: "odile@quillonyard.example", role: "writer" },
  { key: "bram", name: "Bram Ferrule", email: "bram@quillonyard.example", role: "technician" },
  { key: "dov", name: "Dov Lantern", email: "dov@quillonyard.example", role: "technician" },
  { key: "sela", name: "Sela Moth", email: "sela@quillonyard.example", role: "technician" },
] as const;

/** The demo's password: random for each machine, kept in the demo file that the start command reads. */
const PASSWORD = `bench-${randomBytes(6).toString("hex")}`;

/** A small seeded generator (mulberry32), so that every fresh demo tells the same story. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

function fixturesByName(): Map<string, string> {
  const root = fileURLToPath(new URL("../../fixtures/cases", import.meta.url));
  const found = new Map<string, string>();
  for (const entry of readdirSync(root, { recursive: true, withFileTypes: true })) {
    if (entry.isFile() && entry.name.endsWith(".json"))
      found.set(entry.name.replace(/\.json$/, ""), join(entry.parentPath, entry.name));
  }
  return found;
}

async function makeShop(): Promise<{ ctx: Omit<Ctx, "actor" | "now">; staff: Staff }> {
  const owner = PEOPLE[0];
  const { shopId } = await openShop(
    { shopName: "Quillon Yard Motor Works", name: owner.name, email: owner.email, password: PASSWORD },
    { requestId: "seed" },
  );
  for (const { name, email, role } of PEOPLE.slice(1)) {
    const made = await auth().api.signUpEmail({ body: { name, email, password: PASSWORD } });
    // biome-ignore lint/suspicious/noExplicitAny: the plugin types only its own default roles
    await auth().api.addMember({ body: { userId: made.user.id, organizationId: shopId, role: role as any } });
  }
  const rows = await authDb()
    .select({ id: user.id, email: user.email, role: member.role })
    .from(user)
    .innerJoin(member, eq(member.userId, user.id))
    .where(
      inArray(
        user.email,
        PEOPLE.map((person) => person.email),
      ),
    );
  const staff = Object.fromEntries(
    PEOPLE.map(({ key, name, email }) => {
      const row = rows.find((each) => each.email === email);
      return [key, { id: row?.id ?? "", name, role: row?.role ?? "technician" }];
    }),
  ) as unknown as Staff;
  return { ctx: { shopId: asShopId(shopId), requestId: "seed" }, staff };
}

async function setPrices(ctx: Ctx): Promise<{ id: string; perHourMinor: number }> {
  return inShop(
    ctx,
    async (tx) => {
      const settings = shopSettings.parse({
        address: "12 Quillon Yard, Lower Pellam",
        phone: "555 0140",
        email: "desk@quillonyard.example",
        registration: "Repair registration LP-20417",
        timeZone: "America/New_York",
        taxBasisPoints: 1000,
        legalText:
          "Parts are new unless marked otherwise. Replaced parts are returned if asked for when the work is ordered.",
        units: { pressure: "kPa", temperature: "C", distance: "km" },
      });
      await tx.update(shops).set({ settings }).where(eq(shops.shopId, ctx.shopId));
      await tx
        .update(labourRates)
        .set({ perHourMinor: 14_200 })
        .where(and(eq(labourRates.shopId, ctx.shopId), inArray(labourRates.purpose, ["general", "diagnosis"])));
      const [general] = await tx
        .select()
        .from(labourRates)
        .where(and(eq(labourRates.shopId, ctx.shopId), eq(labourRates.purpose, "general")));
      const rate = { id: general!.id, perHourMinor: general!.perHourMinor };
      const listed = new Map(
        Object.values(DEMO_JOBS).flatMap((job) => job.parts.map((part) => [part[1], part] as const)),
      );
      for (const [name, number, costMinor, priceMinor] of listed.values()) {
        await tx
          .insert(parts)
          .values({ shopId: ctx.shopId, id: newId("part"), number, name, costMinor, priceMinor, condition: "new" });
      }
      for (const [causeId, job] of Object.entries(DEMO_JOBS)) {
        await tx
          .insert(operations)
          .values({
            shopId: ctx.shopId,
            id: newId("op"),
            name: job.title,
            hoursMilli: Math.round(job.hours * 1000),
            rateId: rate.id,
          })
          .onConflictDoNothing();
        await tx
          .insert(setJobs)
          .values({
            shopId: ctx.shopId,
            id: newId("set"),
            name: job.title,
            customerTitle: job.customerTitle,
            causeId,
            urgency: "now",
            ifWaits: job.ifWaits,
            lines: linesOf(job, rate),
          })
          .onConflictDoNothing();
      }
      return rate;
    },
    { verb: "seed" },
  );
}

async function main(): Promise<void> {
  env();
  const [there] = await authDb()
    .select({ id: organization.id })
    .from(organization)
    .where(eq(organization.name, "Quillon Yard Motor Works"));
  if (there) return;
  const seededAt = new Date();
  const { ctx: shop, staff } = await makeShop();
  const generalRate = await setPrices({ ...shop, actor: staff.hester, now: seededAt });
  const fixtures = fixturesByName();
  const random = seeded(20_417);
  const numbers = new Map<string, { caseId: string; number: number }>();
  let done = 0;
  for (const story of STORIES) {
    const path = fixtures.get(story.fixture);
    if (!path) throw new Error(`No case file named ${story.fixture} in fixtures/cases.`);
    const comebackOf = story.comebackOf
      ? await firstVisit(shop, staff, numbers.get(story.comebackOf)?.caseId)
      : undefined;
    const run = await runStory({
      shop,
      staff,
      story,
      fixture: JSON.parse(readFileSync(path, "utf8")),
      seededAt,
      generalRate,
      random,
      addPhotos: photosFor(random),
      comebackOf,
    });
    numbers.set(story.plate, run);
    done += 1;
    if (done % 10 === 0) console.log(`${done} of ${STORIES.length} demo cases`);
  }
  const customerLink = await waitingLink({ ...shop, actor: staff.odile, now: new Date() });
  const signIns = PEOPLE.filter(({ key }) => ["hester", "odile", "bram"].includes(key)).map(
    ({ name, email, role }) => ({ role, name, email, password: PASSWORD }),
  );
  const file = process.env.DEMO_FILE;
  if (file) writeFileSync(file, `${JSON.stringify({ signIns, customerLink }, null, 2)}\n`, { mode: 0o600 });
}

async function firstVisit(shop: Omit<Ctx, "actor" | "now">, staff: Staff, caseId: string | undefined) {
  if (!caseId) return undefined;
  const [row] = await inShop({ ...shop, actor: staff.odile, now: new Date() }, (tx) =>
    tx
      .select()
      .from(cases)
      .where(and(eq(cases.shopId, shop.shopId), eq(cases.id, caseId))),
  );
  return row ? { customerId: row.customerId, vehicleId: row.vehicleId, caseId } : undefined;
}

/** A fresh link to a quote that nobody has answered yet, to try the customer's page with. */
async function waitingLink(ctx: Ctx): Promise<string | undefined> {
  return inShop(
    ctx,
    async (tx) => {
      const [row] = await tx
        .select({ id: quoteRevisions.id, caseId: quoteRevisions.caseId, expiresAt: quoteRevisions.expiresAt })
        .from(quoteRevisions)
        .innerJoin(cases, and(eq(cases.shopId, quoteRevisions.shopId), eq(cases.id, quoteRevisions.caseId)))
        .where(and(eq(quoteRevisions.shopId, ctx.shopId), eq(cases.stage, "waiting")))
        .limit(1);
      if (!row) return undefined;
      const link = await makeLink(tx, ctx, {
        caseId: row.caseId,
        kind: "quote",
        targetId: row.id,
        sentTo: null,
        expiresAt: row.expiresAt,
      });
      return `${env().APP_URL}/q/${link.secret}`;
    },
    { verb: "seed" },
  );
}

main()
  .catch((error: unknown) => {
    console.error(error);
    process.exitCode = 1;
  })
  .finally(closePools);
