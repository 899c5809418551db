"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { act, sentenceOf } from "../../../_client/act";

const MOST_BYTES = 2_000_000;
const MOST_FAULTS = 12;

interface Faults {
  head: string;
  lines: string[];
}

/** Takes a case file (JSON, version 1) and adds its samples, codes and tests to the case. */
export function ImportReadings({ caseId }: { caseId: string }) {
  const router = useRouter();
  const [isOpen, setOpen] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [faults, setFaults] = useState<Faults | null>(null);

  async function take(file: File | undefined) {
    if (!file) return;
    setFaults(null);
    if (file.size > MOST_BYTES)
      return setFaults({ head: "That file is larger than 2 MB, which no case file is.", lines: [] });
    let content: unknown;
    try {
      content = JSON.parse(await file.text());
    } catch {
      return setFaults({ head: `“${file.name}” is not JSON.`, lines: [] });
    }
    // the example files wrap the case; a bare case file is taken as it is
    const body =
      typeof content === "object" && content !== null && "case" in content
        ? (content as { case: unknown }).case
        : content;
    setBusy(true);
    const answer = await act("readings.import", { caseId, file: body });
    setBusy(false);
    if (!answer.ok) {
      const lines = answer.problem.errors
        .slice(0, MOST_FAULTS)
        .map((error) => `${error.pointer.replace(/^\/file\//, "")}: ${error.detail}`);
      return setFaults({
        head: lines.length > 0 ? "The file does not fit; nothing was taken from it." : sentenceOf(answer.problem),
        lines,
      });
    }
    setOpen(false);
    router.refresh();
  }

  return (
    <>
      <Button look="link" onClick={() => setOpen(true)}>
        Import readings
      </Button>
      <Dialog open={isOpen} onClose={() => setOpen(false)} title="Import readings">
        <div className="stack">
          <p className="soft">
            A case file, version 1: its samples, codes and test outcomes join this case. Nothing that is here is
            changed.
          </p>
          <Field id="case-file" label="Case file (JSON)">
            {(ids) => (
              <input
                {...ids}
                className="input file"
                type="file"
                accept=".json,application/json"
                disabled={isBusy}
                onChange={(event) => void take(event.target.files?.[0])}
              />
            )}
          </Field>
          {isBusy && <p role="status">Reading the file</p>}
          {faults && (
            <div className="why" role="alert">
              <span className="bang" aria-hidden="true">
                !
              </span>
              <div>
                <p>{faults.head}</p>
                <ul>
                  {faults.lines.map((line) => (
                    <li key={line}>{line}</li>
                  ))}
                </ul>
              </div>
            </div>
          )}
        </div>
      </Dialog>
    </>
  );
}
