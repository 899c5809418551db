"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import type { QuestionView } from "@/components/approve/model";
import { QuestionsBox, RecordApproval } from "@/components/quote/counter-acts";
import type { CatalogueChoice, JobFields, QuoteJobView, SaveResult } from "@/components/quote/model";
import { QuotePart, type QuotePartProps } from "@/components/quote/quote-part";
import type { RevisionSnapshot } from "@/lib/cases/quote-schema";
import { type Answer, act, fieldErrorsOf, sentenceOf } from "../../../_client/act";

type Callbacks =
  | "onSaveJob"
  | "onAddJob"
  | "onAddSetJob"
  | "onRemoveJob"
  | "onSaveDraft"
  | "onSend"
  | "onWithdraw"
  | "findInCatalogue"
  | "aside";

export type QuoteClientProps = Omit<QuotePartProps, Callbacks> & {
  caseId: string;
  catalogue: readonly CatalogueChoice[];
  questions: readonly QuestionView[];
  /** The revision that stands and waits for an answer: for a yes by phone or in person. */
  standing: { revisionId: string; snapshot: RevisionSnapshot } | null;
  mayRecord: boolean;
  mayReply: boolean;
};

const MOST_FOUND = 12;

function resultOf<T>(answer: Answer<T>): SaveResult<T> {
  if (answer.ok) return { ok: true, data: answer.data };
  const { problem } = answer;
  const current =
    problem.code === "conflict" ? (problem.current as (QuoteJobView & { lines?: unknown }) | undefined) : undefined;
  return {
    ok: false,
    message: sentenceOf(problem),
    fieldErrors: fieldErrorsOf(problem),
    conflict: current && Array.isArray(current.lines) ? { job: current } : undefined,
  };
}

export function QuoteClient({
  caseId,
  catalogue,
  questions,
  standing,
  mayRecord,
  mayReply,
  ...props
}: QuoteClientProps) {
  const router = useRouter();
  // a quote without an address leaves by hand: its private link is shown once
  const [handOver, setHandOver] = useState<string | null>(null);

  async function done<T = unknown>(verb: string, input: Record<string, unknown>): Promise<SaveResult<T>> {
    const answer = await act<T>(verb, { caseId, ...input });
    if (answer.ok) router.refresh();
    return resultOf(answer);
  }
  const newest = questions.at(-1);
  const revisionForReply = props.revisions[0]?.id;

  return (
    <QuotePart
      {...props}
      findInCatalogue={async (query) => {
        const words = query.toLowerCase().split(/\s+/).filter(Boolean);
        return catalogue
          .filter((choice) =>
            words.every((word) => `${choice.label} ${choice.note ?? ""}`.toLowerCase().includes(word)),
          )
          .slice(0, MOST_FOUND);
      }}
      onSaveJob={async (jobId, version, fields: JobFields) => {
        const answer = await act<{ version: number }>("quote.saveJob", { caseId, jobId, version, ...fields });
        if (answer.ok) router.refresh();
        return resultOf(answer);
      }}
      onAddJob={(fields) => done("quote.addJob", { ...fields })}
      onAddSetJob={(setJobId) => done("quote.addSetJob", { setJobId })}
      onRemoveJob={(jobId, version) => done("quote.removeJob", { jobId, version })}
      onSaveDraft={(draft, version) => done<{ version: number }>("quote.saveDraft", { ...draft, version })}
      onSend={async (to) => {
        const result = await done<{ url: string | null }>("quote.send", { to });
        if (result.ok && result.data?.url) setHandOver(result.data.url);
        return result;
      }}
      onWithdraw={(revisionId, reason) => done("quote.withdraw", { revisionId, reason })}
      aside={
        <>
          {handOver && (
            <section className="sec" role="status">
              <h2>Hand this link over</h2>
              <p className="note">There is no e-mail address. Give it by text or on paper; it is shown only now.</p>
              <p className="num wrap">{handOver}</p>
            </section>
          )}
          {standing && mayRecord && (
            <RecordApproval
              snapshot={standing.snapshot}
              onRecord={(answers) => done("approval.record", { revisionId: standing.revisionId, ...answers })}
            />
          )}
          {questions.length > 0 && mayReply && revisionForReply && (
            <QuestionsBox
              key={newest?.id}
              questions={questions}
              onReply={(text) => done("quote.reply", { revisionId: revisionForReply, text })}
            />
          )}
        </>
      }
    />
  );
}
