import "server-only";
import { eq, inArray, or, type SQL } from "drizzle-orm";
import { countCases, LIST_PAGE, listOpen, listOver, promisesBetween, searchCases } from "@/db/queries/case-list";
import { cases, shops } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { shopSettings } from "@/lib/shops/schema";
import { readIn } from "../verb";

export interface ListQuery {
  show: "mine" | "all" | "parked" | "closed";
  order: "waiting" | "technician" | "promise";
  query: string;
  after: string | null;
}

const WEEK_MS = 7 * 86_400_000;
const DAY_MS = 86_400_000;

/** What "mine" means: a technician's own cases, or what waits on the counter. */
function mineOf(ctx: Ctx): SQL | undefined {
  if (ctx.actor.role === "technician") return eq(cases.technicianId, ctx.actor.id);
  return or(inArray(cases.waitingOn, ["counter", "owner"]), eq(cases.technicianId, ctx.actor.id));
}

function readCursor(after: string | null): [string, number] | null {
  const [first, number] = (after ?? "").split("|");
  return first !== undefined && number && /^\d{1,9}$/.test(number) ? [first, Number(number)] : null;
}

/** One page of the cases list, its counts and today's promises. Keyset-paged: `after` is the last row's place. */
export async function listCases(ctx: Ctx, query: ListQuery) {
  return readIn(ctx, "case.read", async (tx) => {
    const [shop] = await tx
      .select({ name: shops.name, settings: shops.settings })
      .from(shops)
      .where(eq(shops.shopId, ctx.shopId));
    const settings = shopSettings.parse(shop?.settings ?? {});
    const mine = mineOf(ctx);
    const weekAgo = new Date(ctx.now.getTime() - WEEK_MS);
    const counts = await countCases(tx, ctx.shopId, mine, weekAgo);
    const cursor = readCursor(query.after);
    const rows = await page();
    const more = rows.length > LIST_PAGE;
    const shown = rows.slice(0, LIST_PAGE);
    const last = shown.at(-1);
    const next = more && last ? cursorOf(last) : null;
    const promises = query.query
      ? []
      : await promisesBetween(
          tx,
          ctx.shopId,
          new Date(ctx.now.getTime() - DAY_MS),
          new Date(ctx.now.getTime() + DAY_MS),
        );
    return { shopName: shop?.name ?? "", settings, counts, rows: shown, next, promises };

    async function page() {
      if (query.query) return searchCases(tx, ctx.shopId, query.query, cursor?.[1]);
      if (query.show === "closed")
        return listOver(tx, ctx.shopId, weekAgo, cursor ? { at: new Date(cursor[0]), number: cursor[1] } : undefined);
      const me = { id: ctx.actor.id, isTechnician: ctx.actor.role === "technician" };
      return listOpen(tx, ctx.shopId, {
        show: query.show,
        mine,
        order: query.order,
        me,
        after: cursor ? { group: cursor[0], number: cursor[1] } : undefined,
      });
    }
    function cursorOf(row: (typeof shown)[number]): string {
      if (query.query) return `|${row.number}`;
      if (query.show === "closed") return `${row.stageSince.toISOString()}|${row.number}`;
      return `${"group" in row ? row.group : ""}|${row.number}`;
    }
  });
}

export type CaseList = Awaited<ReturnType<typeof listCases>>;
