import Link from "next/link";
import type { ReactNode } from "react";
import { FilterTabs, type TabView } from "@/components/ui/filter-tabs";
import { ScrollX } from "@/components/ui/scroll-x";
import { EmptyState } from "@/components/ui/states";
import { AuditTable } from "./audit-table";
import { ChainDots } from "./chain-dots";
import type { AuditEntryView, ChainDayView } from "./model";

export interface AuditPageProps {
  /** "The chain is whole: 48,213 entries, no break". */
  title: string;
  sub?: ReactNode;
  days: readonly ChainDayView[];
  checkedDay?: string;
  entries: readonly AuditEntryView[];
  /** Choices and present values of the filter form, which is a plain GET. */
  filter: {
    action: string;
    people: readonly { value: string; label: string }[];
    acts: readonly { value: string; label: string }[];
    values: { who?: string; did?: string; what?: string; from?: string; to?: string };
  };
  tabs?: readonly TabView[];
  more?: { label: string; href: string };
  acts?: ReactNode;
}

/** Everything that changed, by whom, before and after; and whether the chain holds. */
export function AuditPage({ title, sub, days, checkedDay, entries, filter, tabs, more, acts }: AuditPageProps) {
  const { values } = filter;
  return (
    <main id="main" className="page">
      <div className="mainhead">
        <div>
          <h1>{title}</h1>
          {sub && <p>{sub}</p>}
        </div>
        {acts && <div className="acts">{acts}</div>}
      </div>
      <ChainDots days={days} checkedDay={checkedDay} />
      <div className="filters">
        <form action={filter.action} className="filterform">
          <div className="field">
            <label htmlFor="au-who">Who</label>
            <select id="au-who" name="who" className="input" defaultValue={values.who ?? ""}>
              <option value="">Anyone</option>
              {filter.people.map((person) => (
                <option key={person.value} value={person.value}>
                  {person.label}
                </option>
              ))}
            </select>
          </div>
          <div className="field">
            <label htmlFor="au-did">Did what</label>
            <select id="au-did" name="did" className="input" defaultValue={values.did ?? ""}>
              <option value="">Anything</option>
              {filter.acts.map((act) => (
                <option key={act.value} value={act.value}>
                  {act.label}
                </option>
              ))}
            </select>
          </div>
          <div className="field">
            <label htmlFor="au-what">To what</label>
            <input
              id="au-what"
              name="what"
              className="input"
              placeholder="Case, price, person"
              defaultValue={values.what}
            />
          </div>
          <div className="field">
            <label htmlFor="au-from">From</label>
            <input id="au-from" name="from" type="date" className="input" defaultValue={values.from} />
          </div>
          <div className="field">
            <label htmlFor="au-to">To</label>
            <input id="au-to" name="to" type="date" className="input" defaultValue={values.to} />
          </div>
          <button type="submit" className="btn quiet">
            Show
          </button>
        </form>
        {tabs && <FilterTabs label="Kind of entry" tabs={tabs} />}
      </div>
      {entries.length === 0 ? (
        <div className="nothing">
          <EmptyState title="No entry fits">Widen the dates, or choose anyone.</EmptyState>
        </div>
      ) : (
        <ScrollX label="Entries">
          <AuditTable entries={entries} />
        </ScrollX>
      )}
      {more && (
        <p className="showmore">
          <Link className="btn quiet" href={more.href} scroll={false}>
            {more.label}
          </Link>
        </p>
      )}
    </main>
  );
}
