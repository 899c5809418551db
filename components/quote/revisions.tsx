"use client";

import Link from "next/link";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { formatPrice } from "@/components/ui/format";
import { TextInput } from "@/components/ui/inputs";
import type { QuoteMoney, RevisionRowView, SaveResult } from "./model";

const STATE_WORDS: Record<RevisionRowView["state"], string> = {
  stands: "stands",
  answered: "answered",
  withdrawn: "withdrawn",
  superseded: "replaced by a later one",
  expired: "run out",
};

export interface RevisionListProps {
  revisions: readonly RevisionRowView[];
  money: QuoteMoney;
  onWithdraw?: (revisionId: string, reason: string) => Promise<SaveResult>;
}

/** Sent revisions, newest first, each as it was sent. */
export function RevisionList({ revisions, money, onWithdraw }: RevisionListProps) {
  const [withdrawing, setWithdrawing] = useState<RevisionRowView | null>(null);
  return (
    <section className="sec revisions" aria-labelledby="rev-head">
      <header>
        <h2 id="rev-head">Sent</h2>
      </header>
      <table className="tbl">
        <caption className="vh">Revisions sent</caption>
        <thead>
          <tr>
            <th scope="col">Revision</th>
            <th scope="col">When</th>
            <th scope="col">Standing</th>
            <th scope="col" className="r">
              Total, tax included
            </th>
            <th scope="col">
              <span className="vh">Act</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {revisions.map((revision) => (
            <tr key={revision.id}>
              <th scope="row">
                {revision.href ? (
                  <Link className="link" href={revision.href}>
                    Revision {revision.number}
                  </Link>
                ) : (
                  `Revision ${revision.number}`
                )}
              </th>
              <td className="soft">{revision.words}</td>
              <td>{revision.answer ?? STATE_WORDS[revision.state]}</td>
              <td className="r num">{formatPrice(revision.totalMinor, money.currency, money.locale)}</td>
              <td className="r">
                {onWithdraw && revision.state === "stands" && (
                  <Button look="link" onClick={() => setWithdrawing(revision)}>
                    Withdraw
                  </Button>
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <Dialog
        open={withdrawing !== null}
        onClose={() => setWithdrawing(null)}
        title={`Withdraw revision ${withdrawing?.number ?? ""}`}
      >
        {withdrawing && onWithdraw && (
          <WithdrawForm
            onWithdraw={(reason) => onWithdraw(withdrawing.id, reason)}
            onDone={() => setWithdrawing(null)}
          />
        )}
      </Dialog>
    </section>
  );
}

function WithdrawForm({
  onWithdraw,
  onDone,
}: {
  onWithdraw: (reason: string) => Promise<SaveResult>;
  onDone: () => void;
}) {
  const [reason, setReason] = useState("");
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  return (
    <form
      onSubmit={async (event) => {
        event.preventDefault();
        if (reason.trim() === "") return setError("Give a reason.");
        setBusy(true);
        const result = await onWithdraw(reason.trim());
        setBusy(false);
        if (result.ok) onDone();
        else setError(result.message);
      }}
    >
      <p className="soft">Its link stops at once; who opens it is told to call.</p>
      <TextInput
        id="withdraw-why"
        label="Reason"
        maxLength={500}
        value={reason}
        error={error}
        onChange={(e) => setReason(e.target.value)}
      />
      <div className="acts">
        <Button type="submit" busy={isBusy} busyLabel="Withdrawing">
          Withdraw it
        </Button>
      </div>
    </form>
  );
}
