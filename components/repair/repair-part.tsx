"use client";

import { type ReactNode, useState } from "react";
import { Button } from "@/components/ui/button";
import { Caution } from "@/components/ui/caution";
import { Dialog } from "@/components/ui/dialog";
import { type GateItem, TodoList } from "@/components/ui/gate";
import { EmptyState } from "@/components/ui/states";
import type { WorkJobView, WorkResult } from "./model";
import { ReasonForm, WorkJob, type WorkJobProps } from "./work-job";

export interface RepairPartProps extends Omit<WorkJobProps, "job" | "photoSlot"> {
  /** "Repair, two jobs agreed". */
  title: string;
  jobs: readonly WorkJobView[];
  /** "Both jobs, tax included", "$562.43"; "By", "Juniper Tock, by link, 14:20". Amounts are left out for those who don't see prices. */
  agreed: readonly { label: string; value: string; isAmount?: boolean }[];
  cautions: readonly { title: string; text: string }[];
  /** What proof demands. */
  gate: readonly GateItem[];
  /** The button for proof, or what stands in its place. */
  gateAction?: ReactNode;
  onAskMore?: (text: string) => Promise<WorkResult>;
  photoSlot?: (job: WorkJobView) => ReactNode;
}

/** The repair part of a case: the jobs, and at the side the caution, what is agreed and the gate. */
export function RepairPart({
  title,
  jobs,
  agreed,
  cautions,
  gate,
  gateAction,
  onAskMore,
  photoSlot,
  ...work
}: RepairPartProps) {
  const [isAsking, setAsking] = useState(false);
  return (
    <main id="main" className="rp">
      <div className="jobs">
        <h1 className="rph">{title}</h1>
        {jobs.length === 0 && (
          <EmptyState title="Nothing is agreed yet">
            Jobs stand here once the customer has said yes to at least one.
          </EmptyState>
        )}
        {jobs.map((job) => (
          <WorkJob key={job.id} job={job} {...work} photoSlot={photoSlot?.(job)} />
        ))}
      </div>
      <aside className="rs" aria-label="Caution, agreement and gate">
        {cautions.map((caution) => (
          <Caution key={caution.title} title={caution.title}>
            {caution.text}
          </Caution>
        ))}
        <section className="sec" aria-labelledby="agreed-head">
          <h2 id="agreed-head">Agreed</h2>
          <dl className="ag">
            {agreed.map((row) => (
              <div key={row.label}>
                <dt>{row.label}</dt>
                <dd className={row.isAmount ? "num" : undefined}>{row.value}</dd>
              </div>
            ))}
          </dl>
          {onAskMore && (
            <>
              <p className="soft">Found more? It needs a new yes before it is done.</p>
              <Button look="quiet" className="w" onClick={() => setAsking(true)}>
                Ask for more work
              </Button>
            </>
          )}
        </section>
        <section className="sec" aria-labelledby="gate-head">
          <h2 id="gate-head">Before proof</h2>
          <TodoList items={gate} />
          {gateAction && <div className="gateact">{gateAction}</div>}
        </section>
      </aside>
      <Dialog open={isAsking} onClose={() => setAsking(false)} title="Ask for more work">
        {onAskMore && (
          <ReasonForm
            label="What was found, and what it needs"
            empty="Say what was found."
            act="Send it to the counter"
            busyLabel="Sending"
            onSend={onAskMore}
            onDone={() => setAsking(false)}
          >
            <p className="soft">
              The counter prices it as a new revision. A changed part or method needs a yes even at the same price.
            </p>
          </ReasonForm>
        )}
      </Dialog>
    </main>
  );
}
