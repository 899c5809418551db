import { and, asc, desc, eq, gte, inArray, lt, notInArray, or, type SQL, sql } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { cases, customers, people, vehicles } from "@/db/schema";

export const LIST_PAGE = 50;

const OVER = ["closed", "released"];

export const listColumns = {
  id: cases.id,
  number: cases.number,
  stage: cases.stage,
  stageSince: cases.stageSince,
  parkedFrom: cases.parkedFrom,
  waitingOn: cases.waitingOn,
  waitingFor: cases.waitingFor,
  words: cases.words,
  leadCause: cases.leadCause,
  leadFamily: cases.leadFamily,
  leadProbability: cases.leadProbability,
  leadMark: cases.leadMark,
  technicianId: cases.technicianId,
  promisedAt: cases.promisedAt,
  customerName: customers.name,
  vehicleLabel: vehicles.label,
  modelYear: vehicles.modelYear,
  plate: vehicles.plate,
  technicianName: people.name,
};

type Column<T> = T extends { _: { notNull: infer N; data: infer D } } ? (N extends true ? D : D | null) : never;
/** A row of the cases list; the technician comes by a left join, so their name may be absent. */
export type ListRow = Omit<{ [K in keyof typeof listColumns]: Column<(typeof listColumns)[K]> }, "technicianName"> & {
  technicianName: string | null;
};

function joined(tx: Tx) {
  return tx
    .select(listColumns)
    .from(cases)
    .innerJoin(customers, and(eq(customers.shopId, cases.shopId), eq(customers.id, cases.customerId)))
    .innerJoin(vehicles, and(eq(vehicles.shopId, cases.shopId), eq(vehicles.id, cases.vehicleId)))
    .leftJoin(people, and(eq(people.shopId, cases.shopId), eq(people.id, cases.technicianId)));
}

/** The literal form lets the planner match the partial indexes of open cases. */
const isOpen = sql`${cases.stage} not in ('closed', 'released')`;

export interface OpenFilter {
  show: "mine" | "all" | "parked";
  mine: SQL | undefined;
  order: "waiting" | "technician" | "promise";
  /** Who reads: their own group comes first. */
  me: { id: string; isTechnician: boolean };
  after?: { group: string; number: number };
}

/** One text that sorts the groups; the rows of a page come in its order, newest case first within it. */
function groupKey(filter: OpenFilter): SQL<string> {
  const { id, isTechnician } = filter.me;
  if (filter.order === "technician")
    return sql<string>`case when ${cases.technicianId} is null then '~' else coalesce(${people.name}, '~') end`;
  if (filter.order === "promise")
    return sql<string>`coalesce(to_char(${cases.promisedAt} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI'), '~')`;
  const technician = isTechnician ? sql`case when ${cases.technicianId} = ${id} then '0' else '4' end` : sql`'3'`;
  const counter = isTechnician ? sql`'1'` : sql`'0'`;
  return sql<string>`case ${cases.waitingOn} when 'technician' then ${technician} when 'counter' then ${counter} when 'customer' then '2'
    when 'parts' then '5' when 'bay' then '6' when 'owner' then '7' else '8' end`;
}

export async function listOpen(tx: Tx, shopId: string, filter: OpenFilter) {
  const key = groupKey(filter);
  const conditions = [eq(cases.shopId, shopId), isOpen];
  if (filter.show === "mine" && filter.mine) conditions.push(filter.mine);
  if (filter.show === "parked") conditions.push(eq(cases.stage, "parked"));
  if (filter.after)
    conditions.push(
      or(
        sql`${key} > ${filter.after.group}`,
        and(sql`${key} = ${filter.after.group}`, lt(cases.number, filter.after.number)),
      )!,
    );
  const rows = await tx
    .select({ ...listColumns, group: key })
    .from(cases)
    .innerJoin(customers, and(eq(customers.shopId, cases.shopId), eq(customers.id, cases.customerId)))
    .innerJoin(vehicles, and(eq(vehicles.shopId, cases.shopId), eq(vehicles.id, cases.vehicleId)))
    .leftJoin(people, and(eq(people.shopId, cases.shopId), eq(people.id, cases.technicianId)))
    .where(and(...conditions))
    .orderBy(asc(key), desc(cases.number))
    .limit(LIST_PAGE + 1);
  return rows;
}

/** Cases that ended, newest first. */
export async function listOver(tx: Tx, shopId: string, since: Date, before?: { at: Date; number: number }) {
  const conditions = [eq(cases.shopId, shopId), inArray(cases.stage, OVER), gte(cases.stageSince, since)];
  if (before)
    conditions.push(
      or(lt(cases.stageSince, before.at), and(eq(cases.stageSince, before.at), lt(cases.number, before.number)))!,
    );
  return joined(tx)
    .where(and(...conditions))
    .orderBy(desc(cases.stageSince), desc(cases.number))
    .limit(LIST_PAGE + 1);
}

const literal = (text: string) => text.replaceAll(/[\\%_]/g, (sign) => `\\${sign}`);

/** Every word of the query somewhere in the case's number, name, vehicle, plate, VIN or codes. */
export async function searchCases(tx: Tx, shopId: string, query: string, beforeNumber?: number) {
  const words = query.toLowerCase().split(/\s+/).filter(Boolean).slice(0, 6);
  const conditions = [
    eq(cases.shopId, shopId),
    ...words.map((word) => sql`${cases.searchText} like ${`%${literal(word)}%`}`),
  ];
  if (beforeNumber) conditions.push(lt(cases.number, beforeNumber));
  return joined(tx)
    .where(and(...conditions))
    .orderBy(desc(cases.number))
    .limit(LIST_PAGE + 1);
}

export async function countCases(tx: Tx, shopId: string, mine: SQL | undefined, weekAgo: Date) {
  const [open] = await tx
    .select({
      all: sql<number>`count(*)::int`,
      mine: mine ? sql<number>`(count(*) filter (where ${mine}))::int` : sql<number>`0`,
      parked: sql<number>`(count(*) filter (where ${cases.stage} = 'parked'))::int`,
    })
    .from(cases)
    .where(and(eq(cases.shopId, shopId), isOpen));
  const [over] = await tx
    .select({ closed: sql<number>`count(*)::int` })
    .from(cases)
    .where(and(eq(cases.shopId, shopId), inArray(cases.stage, OVER), gte(cases.stageSince, weekAgo)));
  return { all: open?.all ?? 0, mine: open?.mine ?? 0, parked: open?.parked ?? 0, closed: over?.closed ?? 0 };
}

/** Promises between two instants, of cases still open. */
export async function promisesBetween(tx: Tx, shopId: string, from: Date, to: Date) {
  return tx
    .select({
      number: cases.number,
      promisedAt: cases.promisedAt,
      technicianId: cases.technicianId,
      waitingOn: cases.waitingOn,
    })
    .from(cases)
    .where(
      and(
        eq(cases.shopId, shopId),
        gte(cases.promisedAt, from),
        lt(cases.promisedAt, to),
        notInArray(cases.stage, OVER),
      ),
    )
    .orderBy(asc(cases.promisedAt))
    .limit(60);
}
