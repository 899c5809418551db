"use client";

import { type FormEvent, useState } from "react";
import { Thread } from "@/components/approve/approve-page";
import type { QuestionView, RevisionSnapshot } from "@/components/approve/model";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { formatPrice } from "@/components/ui/format";
import { Checkbox, TextArea, TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import type { SaveResult } from "./model";

export interface QuestionsBoxProps {
  questions: readonly QuestionView[];
  onReply: (text: string) => Promise<SaveResult>;
}

/** The customer's questions and the shop's answers. */
export function QuestionsBox({ questions, onReply }: QuestionsBoxProps) {
  const [text, setText] = useState("");
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  if (questions.length === 0) return null;
  return (
    <section className="sec" aria-labelledby="ques-head">
      <header>
        <h2 id="ques-head">Questions</h2>
      </header>
      <Thread questions={questions} />
      <form
        className="stack reply"
        onSubmit={async (event) => {
          event.preventDefault();
          if (text.trim() === "") return setError("Write the answer.");
          setBusy(true);
          const result = await onReply(text.trim());
          setBusy(false);
          if (result.ok) {
            setText("");
            setError(undefined);
          } else setError(result.message);
        }}
      >
        <TextArea
          id="reply"
          label="Answer"
          maxLength={1000}
          value={text}
          error={error}
          onChange={(e) => setText(e.target.value)}
        />
        <Button look="quiet" type="submit" busy={isBusy} busyLabel="Sending">
          Send the answer
        </Button>
      </form>
    </section>
  );
}

export interface RecordedAnswers {
  answers: { jobId: string; answer: "yes" | "not-now"; reason?: string }[];
  givenBy: string;
  keepParts: boolean;
  how: "phone" | "in-person";
  contact?: string;
  words: string;
}

export interface RecordApprovalProps {
  snapshot: RevisionSnapshot;
  onRecord: (answers: RecordedAnswers) => Promise<SaveResult>;
}

/** A yes by phone or in person, recorded with who, how and the words. */
export function RecordApproval({ snapshot, onRecord }: RecordApprovalProps) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button look="quiet" onClick={() => setOpen(true)}>
        Record an answer
      </Button>
      <Dialog open={isOpen} onClose={() => setOpen(false)} title={`Record the answer to revision ${snapshot.number}`}>
        <RecordForm snapshot={snapshot} onRecord={onRecord} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function RecordForm({ snapshot, onRecord, onDone }: RecordApprovalProps & { onDone: () => void }) {
  const [answers, setAnswers] = useState<Record<string, "yes" | "not-now">>({});
  const [how, setHow] = useState<"phone" | "in-person">("phone");
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  const price = (minor: number) => formatPrice(minor, snapshot.currency, snapshot.locale);
  const total =
    snapshot.totals.startsAtMinor +
    snapshot.jobs.reduce((sum, job) => (answers[job.id] === "yes" ? sum + job.totalMinor : sum), 0);

  async function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const text = (name: string) => String(form.get(name) ?? "").trim();
    const open = snapshot.jobs.find((job) => !answers[job.id]);
    if (open) return setError(`Say yes or not now to “${open.customerTitle || open.title}”.`);
    if (text("by").length < 2) return setError("Write who answered.");
    if (text("said") === "") return setError("Write the words that were said.");
    setBusy(true);
    const result = await onRecord({
      answers: snapshot.jobs.map((job) => ({ jobId: job.id, answer: answers[job.id]! })),
      givenBy: text("by"),
      keepParts: form.get("keep") !== null,
      how,
      contact: text("contact") || undefined,
      words: text("said"),
    });
    setBusy(false);
    if (result.ok) onDone();
    else setError(result.message);
  }

  return (
    <form onSubmit={submit} noValidate>
      {snapshot.jobs.map((job) => (
        <Options
          key={job.id}
          legend={`${job.customerTitle || job.title}, ${price(job.totalMinor)}`}
          showLegend
          name={`rec-${job.id}`}
          value={answers[job.id] ?? null}
          onChange={(value) => setAnswers({ ...answers, [job.id]: value as "yes" | "not-now" })}
          options={[
            { value: "yes", label: "Yes" },
            { value: "not-now", label: "Not now" },
          ]}
        />
      ))}
      <p>
        Total with these answers, tax included: <b className="num">{price(total)}</b>
      </p>
      <TextInput id="by" name="by" label="Who answered" maxLength={120} defaultValue={snapshot.customer.name} />
      <Options
        legend="How"
        showLegend
        name="rec-how"
        value={how}
        onChange={(value) => setHow(value as "phone" | "in-person")}
        options={[
          { value: "phone", label: "By phone" },
          { value: "in-person", label: "In person" },
        ]}
      />
      {how === "phone" && (
        <TextInput
          id="contact"
          name="contact"
          label="Number"
          mono
          inputMode="tel"
          optional
          maxLength={200}
          defaultValue={snapshot.customer.phone ?? ""}
        />
      )}
      <TextArea id="said" name="said" label="The words that were said" maxLength={600} rows={3} error={error} />
      <Checkbox name="keep" defaultChecked={snapshot.keepParts}>
        Keep the replaced parts
      </Checkbox>
      <div className="acts">
        <Button type="submit" busy={isBusy} busyLabel="Recording">
          Record the answer
        </Button>
      </div>
    </form>
  );
}
