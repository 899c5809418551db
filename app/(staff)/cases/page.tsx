import type { Metadata } from "next";
import { CasesView, NothingFound } from "@/components/cases/cases-view";
import { pageCtx } from "@/lib/auth/session";
import { type ListQuery, listCases } from "@/lib/services/cases/list";
import { LiveRefresh } from "../_client/live-refresh";
import { caseGroups } from "../_views/cases-list";
import { StaffTop } from "../_views/staff-top";

export const metadata: Metadata = { title: "Cases" };

type Search = Record<string, string | string[] | undefined>;

const SHOWS = ["mine", "all", "parked", "closed"] as const;
const ORDERS = ["waiting", "technician", "promise"] as const;

const one = (value: string | string[] | undefined) => (Array.isArray(value) ? value[0] : value) ?? "";
const pick = <T extends string>(value: string, allowed: readonly T[], fallback: T) =>
  allowed.includes(value as T) ? (value as T) : fallback;

function address(query: ListQuery, change: Partial<ListQuery>): string {
  const next = { ...query, after: null, ...change };
  const params = new URLSearchParams();
  if (next.query) params.set("q", next.query);
  params.set("show", next.show);
  if (next.order !== "waiting") params.set("by", next.order);
  if (next.after) params.set("after", next.after);
  return `/cases?${params}`;
}

export default async function CasesPage({ searchParams }: { searchParams: Promise<Search> }) {
  const ctx = await pageCtx();
  const search = await searchParams;
  const query: ListQuery = {
    show: pick(one(search.show), SHOWS, "mine"),
    order: pick(one(search.by), ORDERS, "waiting"),
    query: one(search.q).replaceAll("\u0000", "").trim().slice(0, 100),
    after: one(search.after).slice(0, 80) || null,
  };
  let list = await listCases(ctx, query);
  // a list that opens empty on "mine" shows everyone's work instead
  if (!one(search.show) && !query.query && list.counts.mine === 0 && list.counts.all > 0) {
    query.show = "all";
    list = await listCases(ctx, query);
  }
  const { counts, settings } = list;
  const title = query.query
    ? `${list.rows.length}${list.next ? " and more" : ""} found`
    : counts.all === 0
      ? "No case is open"
      : `${counts.all} ${counts.all === 1 ? "case" : "cases"} open,`;
  const note = query.query
    ? `for “${query.query}”`
    : counts.all === 0
      ? undefined
      : counts.mine === 0
        ? "none of them waits on you"
        : `${counts.mine} of them ${counts.mine === 1 ? "is" : "are"} yours`;
  return (
    <>
      <StaffTop ctx={ctx} shop={list.shopName} current="cases" findText={query.query} />
      <LiveRefresh />
      <CasesView
        title={title}
        titleNote={note}
        promises={
          query.query
            ? undefined
            : {
                promises: list.promises.map((promise) => ({
                  number: String(promise.number),
                  href: `/cases/${promise.number}`,
                  at: promise.promisedAt?.toISOString() ?? "",
                  isMine: promise.technicianId === ctx.actor.id,
                  isLate: promise.promisedAt !== null && promise.promisedAt < ctx.now,
                })),
                now: ctx.now.toISOString(),
                timeZone: settings.timeZone,
                opens: settings.dayOpens,
                closes: settings.dayCloses,
              }
        }
        filters={[
          {
            label: "Mine",
            href: address(query, { show: "mine", query: "" }),
            count: counts.mine,
            current: !query.query && query.show === "mine",
          },
          {
            label: "Everyone’s",
            href: address(query, { show: "all", query: "" }),
            count: counts.all,
            current: !query.query && query.show === "all",
          },
          {
            label: "On hold",
            href: address(query, { show: "parked", query: "" }),
            count: counts.parked,
            current: !query.query && query.show === "parked",
          },
          {
            label: "Closed this week",
            href: address(query, { show: "closed", query: "" }),
            count: counts.closed,
            current: !query.query && query.show === "closed",
          },
        ]}
        orders={
          query.query || query.show === "closed"
            ? undefined
            : [
                { label: "waiting on", href: address(query, { order: "waiting" }), current: query.order === "waiting" },
                {
                  label: "technician",
                  href: address(query, { order: "technician" }),
                  current: query.order === "technician",
                },
                { label: "promise", href: address(query, { order: "promise" }), current: query.order === "promise" },
              ]
        }
        groups={caseGroups(list, ctx, query)}
        more={list.next ? { label: "Show 50 more", href: address(query, { after: list.next }) } : undefined}
        empty={
          query.query ? (
            <NothingFound
              query={query.query}
              close={[]}
              hint="A number, a name, a plate, a VIN or a code: any part of it finds the case."
            />
          ) : undefined
        }
      />
    </>
  );
}
