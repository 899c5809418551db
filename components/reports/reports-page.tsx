import type { ReactNode } from "react";
import { FilterTabs, type TabView } from "@/components/ui/filter-tabs";
import { EmptyState } from "@/components/ui/states";

export interface ReportsPageProps {
  /** "Thirteen weeks, 7 September to 1 December". */
  title: string;
  sub?: string;
  spans: readonly TabView[];
  acts?: ReactNode;
  isEmpty?: boolean;
  /** The cells: `StageTimes`, `WaitingShares`, `QuotedApproved`, `HoursSold`, `Comebacks`, `Ranks`. */
  children: ReactNode;
}

export function ReportsPage({ title, sub, spans, acts, isEmpty, children }: ReportsPageProps) {
  return (
    <main id="main" className="page reports">
      <div className="mainhead">
        <div>
          <h1>{title}</h1>
          {sub && <p>{sub}</p>}
        </div>
        <div className="acts">
          <FilterTabs label="Span" tabs={spans} />
          {acts}
        </div>
      </div>
      {isEmpty ? (
        <EmptyState title="Nothing was closed in this span">
          Reports count cases from the day they close. Choose a longer span.
        </EmptyState>
      ) : (
        <div className="cells">{children}</div>
      )}
    </main>
  );
}
