import "server-only";
import { type SQL, sql } from "drizzle-orm";
import type { Tx } from "@/db/client";
import type { Ctx } from "@/lib/auth/context";
import { newId } from "@/lib/ids";
import { readIn } from "../verb";

export interface Span {
  from: Date;
  to: Date;
  timeZone: string;
}

/**
 * Cases something may have happened to in a span: those still open, and those that ended in it. A case that ended
 * before is frozen, so nothing of it can lie in the span; both halves are found by an index, whatever the shop's age.
 */
const touched = (ctx: Ctx, span: Span): SQL => sql`touched as (
  select id from cases where shop_id = ${ctx.shopId} and stage not in ('closed', 'released')
  union all
  select id from cases where shop_id = ${ctx.shopId} and stage in ('closed', 'released') and stage_since >= ${span.from.toISOString()}::timestamptz
)`;

const instant = (at: Date): SQL => sql`${at.toISOString()}::timestamptz`;
/** The Monday of an instant in the shop's time zone, as a date. */
const weekOf = (column: SQL, span: Span): SQL =>
  sql`to_char(date_trunc('week', ${column} at time zone ${span.timeZone}), 'YYYY-MM-DD')`;

/** Every stay in a stage of the cases touched: when it began, and when it ended if it has. */
const stays = (ctx: Ctx): SQL => sql`stays as (
  select e.case_id, e.to_stage as stage, e.at as began,
    lead(e.at) over (partition by e.case_id order by e.at, e.id) as ended
  from touched t join stage_events e on e.shop_id = ${ctx.shopId} and e.case_id = t.id
)`;

async function rowsOf<T extends Record<string, unknown>>(tx: Tx, query: SQL): Promise<T[]> {
  return (await tx.execute<T>(query)).rows as T[];
}

export interface StageTime {
  stage: string;
  cases: number;
  lowerH: number;
  medianH: number;
  upperH: number;
}

/** Hours a case spent in each stage it left in the span: quartiles over the cases. */
async function stageTimes(tx: Tx, ctx: Ctx, span: Span): Promise<StageTime[]> {
  const rows = await rowsOf<{ stage: string; cases: number; hours: number[] }>(
    tx,
    sql`with ${touched(ctx, span)}, ${stays(ctx)}, sums as (
      select case_id, stage, sum(extract(epoch from ended - began)) / 3600 as hours
      from stays where ended is not null and stage not in ('closed', 'released')
      group by case_id, stage having max(ended) >= ${instant(span.from)}
    )
    select stage, count(*)::int as cases,
      percentile_cont(array[0.25, 0.5, 0.75]) within group (order by hours::float8) as hours
    from sums group by stage`,
  );
  return rows.map(({ stage, cases, hours }) => ({
    stage,
    cases,
    lowerH: hours[0] ?? 0,
    medianH: hours[1] ?? 0,
    upperH: hours[2] ?? 0,
  }));
}

export interface WaitingWeek {
  week: string;
  party: "counter" | "technician" | "customer" | "hold";
  hours: number;
}

/**
 * Open hours by week and by whose hands the case was in, as its stage says: the counter takes in and quotes, the
 * technician tests, repairs and proves, the customer has it until the answer. On hold stands by itself.
 */
async function waitingHours(tx: Tx, ctx: Ctx, span: Span): Promise<WaitingWeek[]> {
  return rowsOf<{ week: string; party: WaitingWeek["party"]; hours: number }>(
    tx,
    sql`with ${touched(ctx, span)}, ${stays(ctx)}, answered as (
      select s.*, coalesce(s.ended, ${instant(span.to)}) as until, (
        select min(a.at) from approvals a where a.shop_id = ${ctx.shopId} and a.case_id = s.case_id
          and s.stage = 'waiting' and a.at >= s.began and a.at <= coalesce(s.ended, ${instant(span.to)})
      ) as answer
      from stays s
      where s.stage not in ('closed', 'released') and coalesce(s.ended, ${instant(span.to)}) >= ${instant(span.from)}
    ), parts as (
      select case stage when 'waiting' then 'customer' when 'parked' then 'hold' when 'intake' then 'counter'
        when 'quoting' then 'counter' else 'technician' end as party,
        greatest(began, ${instant(span.from)}) as began, coalesce(answer, until) as until
      from answered
      union all
      select 'counter', greatest(answer, ${instant(span.from)}), until from answered where answer is not null
    ), weeks as (
      select w at time zone ${span.timeZone} as starts, (w + interval '1 week') at time zone ${span.timeZone} as ends,
        to_char(w, 'YYYY-MM-DD') as week
      from generate_series(date_trunc('week', ${instant(span.from)} at time zone ${span.timeZone}),
        ${instant(span.to)} at time zone ${span.timeZone}, interval '1 week') w
    )
    select weeks.week, parts.party,
      (sum(extract(epoch from least(parts.until, weeks.ends) - greatest(parts.began, weeks.starts))) / 3600)::float8 as hours
    from weeks join parts on parts.began < weeks.ends and parts.until > weeks.starts
    group by 1, 2 order by 1`,
  );
}

export interface QuotedWeek {
  week: string;
  /** Jobs answered, and those of them said yes to. */
  jobs: number;
  yesJobs: number;
  quotedMinor: number;
  approvedMinor: number;
  /** Asked and not answered yet. */
  openMinor: number;
}

/** Jobs of the quotes sent in the span and of what was said yes to, by the week of the asking. */
async function quotedAndApproved(tx: Tx, ctx: Ctx, span: Span): Promise<QuotedWeek[]> {
  const rows = await rowsOf<Record<keyof QuotedWeek, string>>(
    tx,
    sql`with ${touched(ctx, span)}, asked as (
      select ${weekOf(sql`r.sent_at`, span)} as week, (job.value->>'totalMinor')::bigint as minor,
        a.id is null as is_open,
        coalesce(a.answers @> jsonb_build_array(jsonb_build_object('jobId', job.value->>'id', 'answer', 'yes')), false) as is_yes
      from touched t
      join quote_revisions r on r.shop_id = ${ctx.shopId} and r.case_id = t.id
      left join approvals a on a.shop_id = ${ctx.shopId} and a.revision_id = r.id
      cross join lateral jsonb_array_elements(r.snapshot->'jobs') job
      where r.sent_at >= ${instant(span.from)} and r.sent_at <= ${instant(span.to)}
        and r.withdrawn_at is null and (r.superseded_at is null or a.id is not null)
    )
    select week, count(*) filter (where not is_open) as jobs, count(*) filter (where is_yes) as "yesJobs", sum(minor) as "quotedMinor",
      coalesce(sum(minor) filter (where is_yes), 0) as "approvedMinor", coalesce(sum(minor) filter (where is_open), 0) as "openMinor"
    from asked group by week order by week`,
  );
  return rows.map((row) => ({
    week: row.week,
    jobs: Number(row.jobs),
    yesJobs: Number(row.yesJobs),
    quotedMinor: Number(row.quotedMinor),
    approvedMinor: Number(row.approvedMinor),
    openMinor: Number(row.openMinor),
  }));
}

export interface PersonHours {
  personId: string;
  name: string;
  soldH: number;
  workedH: number;
}

/** Hours sold of the jobs finished in the span against the time clocked on them, shared by who clocked how much. */
async function hoursSold(tx: Tx, ctx: Ctx, span: Span): Promise<PersonHours[]> {
  return rowsOf<{ personId: string; name: string; soldH: number; workedH: number }>(
    tx,
    sql`with ${touched(ctx, span)}, done as (
      select w.case_id, w.id, w.sold_minutes from touched t
      join work_jobs w on w.shop_id = ${ctx.shopId} and w.case_id = t.id
      where w.state = 'done' and w.done_at >= ${instant(span.from)} and w.done_at <= ${instant(span.to)}
    ), clocked as (
      select d.id, d.sold_minutes, c.person_id, max(c.person_name) as name,
        sum(extract(epoch from c.ended_at - c.started_at)) / 60 as minutes
      from done d join clock_entries c on c.shop_id = ${ctx.shopId} and c.case_id = d.case_id and c.work_job_id = d.id
      where c.ended_at is not null group by d.id, d.sold_minutes, c.person_id
    ), shared as (
      select *, sum(minutes) over (partition by id) as total from clocked
    )
    select person_id as "personId", max(name) as name,
      (sum(sold_minutes * minutes / nullif(total, 0)) / 60)::float8 as "soldH", (sum(minutes) / 60)::float8 as "workedH"
    from shared group by person_id having sum(minutes) > 0 order by max(name)`,
  );
}

/** Hours clocked on diagnosis in the span; they are sold under a ceiling, not by the job. */
async function diagnosisHours(tx: Tx, ctx: Ctx, span: Span): Promise<number> {
  const [row] = await rowsOf<{ hours: number | null }>(
    tx,
    sql`with ${touched(ctx, span)}
    select (sum(extract(epoch from c.ended_at - c.started_at)) / 3600)::float8 as hours
    from touched t join clock_entries c on c.shop_id = ${ctx.shopId} and c.case_id = t.id
    where c.work_job_id is null and c.ended_at is not null and c.started_at >= ${instant(span.from)}`,
  );
  return row?.hours ?? 0;
}

export interface Comeback {
  number: number;
  openedAt: Date;
  firstNumber: number;
  family: string | null;
}

/** Cases opened in the span because an earlier one came back, with the family that one was closed on. */
async function comebacks(tx: Tx, ctx: Ctx, span: Span): Promise<Comeback[]> {
  const rows = await rowsOf<{ number: number; openedAt: string; firstNumber: number; family: string | null }>(
    tx,
    sql`with ${touched(ctx, span)}
    select c.number, c.opened_at as "openedAt", f.number as "firstNumber", f.lead_family as family
    from touched t join cases c on c.shop_id = ${ctx.shopId} and c.id = t.id
    join cases f on f.shop_id = ${ctx.shopId} and f.id = c.comeback_of_id
    where c.opened_at >= ${instant(span.from)} order by c.opened_at`,
  );
  return rows.map((row) => ({ ...row, openedAt: new Date(row.openedAt) }));
}

export interface EndedWeek {
  week: string;
  family: string | null;
  closed: number;
  released: number;
}

/** Cases that ended in the span, by week and by the family of their leading cause. */
async function ended(tx: Tx, ctx: Ctx, span: Span): Promise<EndedWeek[]> {
  return rowsOf<{ week: string; family: string | null; closed: number; released: number }>(
    tx,
    sql`select ${weekOf(sql`stage_since`, span)} as week, lead_family as family,
      (count(*) filter (where stage = 'closed'))::int as closed, (count(*) filter (where stage = 'released'))::int as released
    from cases where shop_id = ${ctx.shopId} and stage in ('closed', 'released') and stage_since >= ${instant(span.from)}
    group by 1, 2 order by 1`,
  );
}

export interface MoneyWeek {
  week: string;
  invoicedMinor: number;
  paidMinor: number;
}

/** Invoiced and paid by week. A payment may belong to an older case, so it is found by its id, which counts time. */
async function takings(tx: Tx, ctx: Ctx, span: Span): Promise<MoneyWeek[]> {
  const firstPayment = newId("pay", span.from.getTime()).slice(0, "pay_".length + 10);
  const rows = await rowsOf<Record<keyof MoneyWeek, string>>(
    tx,
    sql`with ${touched(ctx, span)}, money as (
      select ${weekOf(sql`p.issued_at`, span)} as week, p.total_minor as invoiced, 0 as paid
      from touched t join papers p on p.shop_id = ${ctx.shopId} and p.case_id = t.id
      where p.kind = 'invoice' and p.issued_at >= ${instant(span.from)}
      union all
      select ${weekOf(sql`at`, span)}, 0, amount_minor from payments
      where shop_id = ${ctx.shopId} and id >= ${firstPayment} and at >= ${instant(span.from)}
    )
    select week, sum(invoiced) as "invoicedMinor", sum(paid) as "paidMinor" from money group by week order by week`,
  );
  return rows.map((row) => ({
    week: row.week,
    invoicedMinor: Number(row.invoicedMinor),
    paidMinor: Number(row.paidMinor),
  }));
}

export interface Ranks {
  first: number;
  second: number;
  third: number;
  lower: number;
}

/** Where the assessment had the cause at the moment it was marked proven: the last standing mark of each case. */
async function ranksOfProven(tx: Tx, ctx: Ctx, span: Span): Promise<Ranks> {
  const rows = await rowsOf<{ rank: number | null; cases: number }>(
    tx,
    sql`with ${touched(ctx, span)}, marks as (
      select distinct on (m.case_id) m.rank from touched t
      join cause_marks m on m.shop_id = ${ctx.shopId} and m.case_id = t.id
      where m.mark = 'proven' and m.withdrawn_at is null and m.at >= ${instant(span.from)}
      order by m.case_id, m.at desc
    )
    select rank, count(*)::int as cases from marks group by rank`,
  );
  const of = (fits: (rank: number) => boolean) =>
    rows.filter((row) => fits(row.rank ?? Number.POSITIVE_INFINITY)).reduce((sum, row) => sum + row.cases, 0);
  return {
    first: of((rank) => rank === 1),
    second: of((rank) => rank === 2),
    third: of((rank) => rank === 3),
    lower: of((rank) => rank > 3),
  };
}

/** The owner's figures over a span; nine reads in one transaction, none of them a row at a time. */
export async function readReports(ctx: Ctx, span: Span) {
  return readIn(ctx, "report.read", async (tx) => ({
    stages: await stageTimes(tx, ctx, span),
    waiting: await waitingHours(tx, ctx, span),
    quoted: await quotedAndApproved(tx, ctx, span),
    hours: await hoursSold(tx, ctx, span),
    diagnosisH: await diagnosisHours(tx, ctx, span),
    comebacks: await comebacks(tx, ctx, span),
    ended: await ended(tx, ctx, span),
    money: await takings(tx, ctx, span),
    ranks: await ranksOfProven(tx, ctx, span),
  }));
}

export type Reports = Awaited<ReturnType<typeof readReports>>;
