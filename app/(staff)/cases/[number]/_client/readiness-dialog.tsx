"use client";

import { useRouter } from "next/navigation";
import { type FormEvent, useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Checkbox, Select } from "@/components/ui/inputs";
import { act, sentenceOf } from "../../../_client/act";

const STATES = [
  { value: "complete", label: "complete" },
  { value: "incomplete", label: "not complete" },
  { value: "unsupported", label: "not fitted" },
];

export interface ReadinessDialogProps {
  caseId: string;
  monitors: readonly string[];
  readiness: Record<string, string>;
  codesRead: boolean;
}

const title = (monitor: string) => `${monitor.charAt(0).toUpperCase()}${monitor.slice(1).replaceAll("-", " ")}`;

/** Which self-tests have run, and that the codes were read after the repair. */
export function ReadinessDialog({ caseId, monitors, readiness, codesRead }: ReadinessDialogProps) {
  const router = useRouter();
  const [isOpen, setOpen] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState("");

  async function send(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const chosen = Object.fromEntries(
      monitors.flatMap((monitor) => (form.get(monitor) ? [[monitor, String(form.get(monitor))]] : [])),
    );
    setBusy(true);
    const answer = await act("readings.readiness", {
      caseId,
      readiness: chosen,
      afterCodesRead: form.get("codesRead") === "on",
    });
    setBusy(false);
    if (!answer.ok) return setFailure(sentenceOf(answer.problem));
    setOpen(false);
    router.refresh();
  }

  return (
    <>
      <Button look="quiet" onClick={() => setOpen(true)}>
        Codes and monitors
      </Button>
      <Dialog open={isOpen} onClose={() => setOpen(false)} title="Codes and monitors after the repair">
        <form className="stack" onSubmit={send}>
          <Checkbox name="codesRead" defaultChecked={codesRead} note="Add any that came back on the readings page.">
            The codes were read again after the repair
          </Checkbox>
          {monitors.map((monitor) => (
            <Select
              key={monitor}
              id={`monitor-${monitor}`}
              name={monitor}
              label={title(monitor)}
              placeholder="not read"
              options={STATES}
              defaultValue={readiness[monitor] ?? ""}
            />
          ))}
          {failure && (
            <p className="why" role="alert">
              {failure}
            </p>
          )}
          <div className="acts">
            <Button type="submit" busy={isBusy} busyLabel="Saving">
              Save
            </Button>
          </div>
        </form>
      </Dialog>
    </>
  );
}
