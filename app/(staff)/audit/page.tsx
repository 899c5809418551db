import type { Metadata } from "next";
import { AuditFilter } from "@/components/audit/audit-filter";
import { AuditTable } from "@/components/audit/audit-table";
import { ChainDots } from "@/components/audit/chain-dots";
import { PageHead } from "@/components/records/page-head";
import { MoreLink } from "@/components/records/search-form";
import { formatClock, formatNumber } from "@/components/ui/format";
import { Bang } from "@/components/ui/icons";
import { EmptyState } from "@/components/ui/states";
import { mayDo } from "@/lib/auth/permissions";
import { ROLE_WORDS } from "@/lib/auth/role-words";
import { pageCtx } from "@/lib/auth/session";
import { type AuditQuery, readAudit, readAuditContext } from "@/lib/services/audit/read";
import { readShop } from "@/lib/services/shops/read";
import { address, one, type Search, typed, wholeNumber } from "../_views/address";
import { entryView } from "../_views/audit/entries";
import { SUBJECTS } from "../_views/audit/words";
import { OwnersOnly } from "../_views/owners-only";
import { StaffTop } from "../_views/staff-top";
import { chainDays, dayBounds, dayOf } from "./_views/days";
import "../records.css";

export const metadata: Metadata = { title: "Audit" };

const OTHERS = ["customer", "system"];

export default async function AuditPage({ searchParams }: { searchParams: Promise<Search> }) {
  const ctx = await pageCtx();
  if (!mayDo(ctx.actor.role, "audit.read"))
    return (
      <OwnersOnly
        ctx={ctx}
        current="audit"
        title="The audit is the owner’s to read"
        what="It tells who changed what, and when. What you do yourself is in it."
      />
    );
  const search = await searchParams;
  const { shop, settings } = await readShop(ctx);
  const { timeZone, locale, currency } = settings;
  const who = typed(search.who);
  const kind = one(search.kind) in SUBJECTS ? one(search.kind) : "";
  const bounds = dayBounds(one(search.day), timeZone);
  const day = bounds ? one(search.day) : "";
  const before = wholeNumber(search.before);
  const query: AuditQuery = {
    ...(kind && { entity: kind }),
    ...(who && (OTHERS.includes(who) ? { role: who } : { actorId: who })),
    ...(bounds ?? {}),
    ...(before && { beforeSeq: before }),
  };
  const { rows, isMore, days, total, fault } = await readAudit(ctx, query, timeZone);
  const found = await readAuditContext(ctx, rows);
  const context = { ...found, currency, locale, timeZone, isOneDay: day !== "" };
  const last = rows.at(-1);
  const count = `${formatNumber(total, 0, { locale })} ${total === 1 ? "entry" : "entries"}`;
  const now = ctx.now.toISOString();
  const path = (change: Record<string, string | number | null>) => address("/audit", { who, kind, day, ...change });
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current="audit" />
      <main id="main" className="page rec">
        <PageHead
          title={
            fault ? `The chain breaks at entry ${formatNumber(fault.seq, 0, { locale })}` : `The chain holds, ${count}`
          }
          sub={
            fault ? (
              <span className="why">
                <Bang />
                <span>
                  It was {fault.fault}. Entries before it can be relied on; export the audit and ask who had the
                  database in hand.
                </span>
              </span>
            ) : (
              `Checked from the first entry to the last at ${formatClock(now, timeZone)}: each holds the hash of the one before it.`
            )
          }
          acts={
            <a className="btn quiet" href="/api/audit/export" download>
              Export the whole audit
            </a>
          }
        />
        <ChainDots days={chainDays(days, fault, ctx.now, timeZone)} />
        <AuditFilter
          action="/audit"
          people={[
            ...found.staff.map((person) => ({
              value: person.id,
              label: `${person.name}, ${person.isActive ? (ROLE_WORDS[person.role] ?? person.role) : "no longer here"}`,
            })),
            { value: "customer", label: "Customers, by link" },
            { value: "system", label: "Firedeck itself" },
          ]}
          kinds={Object.entries(SUBJECTS)
            .map(([value, label]) => ({ value, label }))
            .sort((a, b) => a.label.localeCompare(b.label))}
          values={{ who, kind, day }}
          today={dayOf(ctx.now, timeZone)}
        />
        {rows.length > 0 ? (
          // biome-ignore lint/a11y/noNoninteractiveTabindex: it scrolls, so it must be reachable by keyboard
          <section className="scrollx" tabIndex={0} aria-label="Entries, newest first">
            <AuditTable
              key={path({ before })}
              entries={rows.map((row) => entryView(row, context))}
              caption="Entries, newest first; each opens in place"
            />
          </section>
        ) : (
          <div className="rec-none">
            <EmptyState title="No entry fits">
              Choose another day, anyone, or anything. Every change in the shop leaves an entry.
            </EmptyState>
          </div>
        )}
        <MoreLink
          href={isMore && last ? path({ before: last.seq }) : null}
          firstHref={before ? path({ before: null }) : null}
        />
      </main>
    </>
  );
}
