import Link from "next/link";
import type { ReactNode } from "react";
import { ButtonLink } from "@/components/ui/button";
import { FilterTabs, type TabView } from "@/components/ui/filter-tabs";
import { DownKey, UpKey } from "@/components/ui/icons";
import { PromiseLine, type PromiseLineProps } from "@/components/ui/promise-line";
import { EmptyState } from "@/components/ui/states";
import { CasesTable } from "./cases-table";
import type { CaseGroupView } from "./model";

export interface CasesViewProps {
  /** "16 cases open," and the second voice, "4 of them wait on you". */
  title: string;
  titleNote?: string;
  newHref?: string;
  /** Left out when a search or a closed list is shown. */
  promises?: PromiseLineProps;
  filters: readonly TabView[];
  orders?: readonly TabView[];
  groups: readonly CaseGroupView[];
  /** "Show 50 more". */
  more?: { label: string; href: string };
  /** Shown instead of the table when there is nothing: by default that no case is open. */
  empty?: ReactNode;
}

export function CasesView(props: CasesViewProps) {
  const { title, titleNote, newHref = "/cases/new", promises, filters, orders, groups, more, empty } = props;
  const isEmpty = groups.every((group) => group.rows.length === 0);
  return (
    <>
      <main id="main" className="cases">
        <div className="head">
          <h1>
            {title} {titleNote && <span>{titleNote}</span>}
          </h1>
          <div className="acts">
            <ButtonLink href={newHref}>New case</ButtonLink>
          </div>
        </div>
        {promises && <PromiseLine {...promises} />}
        <div className="bar">
          <FilterTabs label="Which cases" tabs={filters} />
          {orders && <FilterTabs label="Order" lead="Grouped by" tabs={orders} />}
        </div>
        {isEmpty ? (
          <div className="nothing">
            {empty ?? (
              <EmptyState
                title="No case is open"
                acts={
                  <>
                    <ButtonLink href={newHref}>New case</ButtonLink>
                    <ButtonLink look="quiet" href="/cases?show=closed">
                      Closed this week
                    </ButtonLink>
                  </>
                }
              >
                Take the next vehicle in, or look at what was closed this week.
              </EmptyState>
            )}
          </div>
        ) : (
          <CasesTable groups={groups} />
        )}
        {more && (
          <p className="showmore">
            <Link className="btn quiet" href={more.href} scroll={false}>
              {more.label}
            </Link>
          </p>
        )}
      </main>
      <footer className="foot counter-only">
        <span>
          <kbd>
            <UpKey />
          </kbd>
          <kbd>
            <DownKey />
          </kbd>
          choose
        </span>
        <span>
          <kbd>Enter</kbd> open
        </span>
        <span>
          <kbd>N</kbd> new case
        </span>
        <span>
          <kbd>/</kbd> find
        </span>
        <span>
          <kbd>?</kbd> all keys
        </span>
      </footer>
    </>
  );
}

/** Nothing matches a search, with the closest hits. */
export function NothingFound({
  query,
  close,
  hint,
}: {
  query: string;
  close: readonly { label: string; href: string }[];
  hint?: string;
}) {
  return (
    <EmptyState title={`Nothing matches “${query}”`}>
      {close.length > 0 && (
        <>
          Close to it:{" "}
          {close.map((hit, index) => (
            <span key={hit.href}>
              {index > 0 && ", "}
              <Link className="link" href={hit.href}>
                {hit.label}
              </Link>
            </span>
          ))}
          .{" "}
        </>
      )}
      {hint ?? "A VIN needs at least its last 6 characters."}
    </EmptyState>
  );
}
