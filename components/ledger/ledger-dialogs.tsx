"use client";

import { type FormEvent, useState } from "react";
import { Button } from "@/components/ui/button";
import { Caution } from "@/components/ui/caution";
import { Combobox } from "@/components/ui/combobox";
import { FieldError } from "@/components/ui/field";
import { Select, TextArea, TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import { NEUTRAL_OUTCOME_LABELS, NEUTRAL_OUTCOMES } from "@/lib/diagnosis/vocabulary";
import type { ActResult, LedgerCauseView, RecordOutcome, TestChoice } from "./model";

export interface RecordTestFormProps {
  tests: readonly TestChoice[];
  initialTestId?: string;
  cylinders?: number;
  banks?: number;
  onRecord: (outcome: RecordOutcome) => Promise<ActResult>;
  onDone: () => void;
}

export function RecordTestForm({ tests, initialTestId, cylinders, banks, onRecord, onDone }: RecordTestFormProps) {
  const [testId, setTestId] = useState(initialTestId ?? "");
  const [outcome, setOutcome] = useState("");
  const [cylinder, setCylinder] = useState("");
  const [bank, setBank] = useState("");
  const [note, setNote] = useState("");
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  const test = tests.find((choice) => choice.id === testId);

  async function submit(event: FormEvent) {
    event.preventDefault();
    if (!test) return setError("Choose the test.");
    if (!outcome) return setError("Choose what was seen.");
    setBusy(true);
    const result = await onRecord({
      testId,
      outcome,
      cylinder: cylinder ? Number(cylinder) : undefined,
      bank: bank ? Number(bank) : undefined,
      note: note.trim() || undefined,
    });
    setBusy(false);
    if (result.ok) onDone();
    else setError(result.message);
  }

  const numbers = (count: number) =>
    Array.from({ length: count }, (_, i) => ({ value: String(i + 1), label: String(i + 1) }));
  return (
    <form onSubmit={submit}>
      <div className="field">
        <label htmlFor="which-test">Test</label>
        <Combobox
          id="which-test"
          label="Test"
          keepText
          defaultText={test?.title}
          placeholder="Smoke, fuel pressure, compression"
          options={tests.map((choice) => ({
            value: choice.id,
            label: choice.title,
            note: `${choice.minutes} min`,
            also: choice.id.replaceAll("-", " "),
          }))}
          onChoose={(option) => {
            setTestId(option.value);
            setOutcome("");
          }}
        />
      </div>
      {test && (
        <>
          <Options
            legend="What was seen"
            showLegend
            name="outcome"
            value={outcome}
            onChange={setOutcome}
            options={[
              ...test.outcomes.map((o) => ({ value: o.id, label: o.label })),
              ...NEUTRAL_OUTCOMES.map((id) => ({ value: id as string, label: NEUTRAL_OUTCOME_LABELS[id] })),
            ]}
          />
          {(cylinders ?? 0) > 1 && (
            <Select
              id="which-cylinder"
              label="Cylinder"
              optional
              placeholder="none in particular"
              options={numbers(cylinders ?? 0)}
              value={cylinder}
              onChange={(e) => setCylinder(e.target.value)}
            />
          )}
          {banks === 2 && (
            <Select
              id="which-bank"
              label="Bank"
              optional
              placeholder="none in particular"
              options={numbers(2)}
              value={bank}
              onChange={(e) => setBank(e.target.value)}
            />
          )}
          <TextInput
            id="test-note"
            label="Note"
            optional
            maxLength={500}
            value={note}
            onChange={(e) => setNote(e.target.value)}
          />
          {test.cautions.map((caution) => (
            <Caution key={caution}>{caution}</Caution>
          ))}
        </>
      )}
      <FieldError id="record-why">{error}</FieldError>
      <div className="acts">
        <Button type="submit" busy={isBusy} busyLabel="Recording">
          Record the outcome
        </Button>
      </div>
    </form>
  );
}

export interface MarkFormProps {
  cause: LedgerCauseView;
  kind: "proven" | "suspected";
  onMark: (input: {
    causeId: string;
    mark: "proven" | "suspected";
    reason: string;
    provenByTestId?: string;
  }) => Promise<ActResult>;
  onDone: () => void;
}

export function MarkForm({ cause, kind, onMark, onDone }: MarkFormProps) {
  const [reason, setReason] = useState(kind === "proven" ? (cause.provenBy[0]?.label ?? "") : "");
  const [testId, setTestId] = useState(cause.provenBy[0]?.id ?? "");
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);

  async function submit(event: FormEvent) {
    event.preventDefault();
    if (reason.trim() === "") return setError(kind === "proven" ? "Say what proves it." : "Say why you suspect it.");
    setBusy(true);
    const result = await onMark({
      causeId: cause.id,
      mark: kind,
      reason: reason.trim(),
      provenByTestId: kind === "proven" ? testId || undefined : undefined,
    });
    setBusy(false);
    if (result.ok) onDone();
    else setError(result.message);
  }

  return (
    <form onSubmit={submit}>
      <p className="soft">{cause.title}</p>
      {kind === "proven" && (
        <Options
          legend="Proven by"
          showLegend
          name="proven-by"
          value={testId}
          onChange={(value) => {
            setTestId(value);
            setReason(cause.provenBy.find((proof) => proof.id === value)?.label ?? reason);
          }}
          options={cause.provenBy.map((proof) => ({ value: proof.id, label: proof.label }))}
        />
      )}
      <TextArea
        id="mark-reason"
        label={kind === "proven" ? "What proves it" : "Why it is suspected"}
        maxLength={500}
        rows={3}
        value={reason}
        error={error}
        onChange={(event) => setReason(event.target.value)}
      />
      <div className="acts">
        <Button type="submit" busy={isBusy} busyLabel="Marking">
          {kind === "proven" ? "Mark as proven" : "Mark as suspected"}
        </Button>
      </div>
    </form>
  );
}
