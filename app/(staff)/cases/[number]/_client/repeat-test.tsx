"use client";

import { useRouter } from "next/navigation";
import { type FormEvent, useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Select } from "@/components/ui/inputs";
import { act, sentenceOf } from "../../../_client/act";

export interface RepeatTestProps {
  caseId: string;
  tests: readonly { id: string; title: string; outcomes: readonly { value: string; label: string }[] }[];
}

/** Records a test of before once more, after the repair: the proof of faults that readings can't show. */
export function RepeatTest({ caseId, tests }: RepeatTestProps) {
  const router = useRouter();
  const [isOpen, setOpen] = useState(false);
  const [chosen, setChosen] = useState(tests[0]?.id ?? "");
  const [failure, setFailure] = useState("");
  const test = tests.find((each) => each.id === chosen) ?? tests[0];

  async function send(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const outcome = String(new FormData(event.currentTarget).get("outcome") ?? "");
    if (!outcome) return setFailure("Choose the outcome.");
    const answer = await act("test.record", { caseId, testId: test?.id, outcome, phase: "after" });
    if (!answer.ok) return setFailure(sentenceOf(answer.problem));
    setOpen(false);
    router.refresh();
  }

  return (
    <>
      <Button look="quiet" onClick={() => setOpen(true)}>
        Repeat a test
      </Button>
      <Dialog open={isOpen} onClose={() => setOpen(false)} title="Repeat a test after the repair">
        <form className="stack" onSubmit={send}>
          <Select
            id="repeat-test"
            label="Test"
            options={tests.map(({ id, title }) => ({ value: id, label: title }))}
            value={chosen}
            onChange={(event) => setChosen(event.target.value)}
          />
          <Select
            key={test?.id}
            id="repeat-outcome"
            name="outcome"
            label="Outcome now"
            placeholder="Choose"
            options={test?.outcomes ?? []}
            defaultValue=""
          />
          {failure && (
            <p className="why" role="alert">
              {failure}
            </p>
          )}
          <div className="acts">
            <Button type="submit">Record it</Button>
          </div>
        </form>
      </Dialog>
    </>
  );
}
