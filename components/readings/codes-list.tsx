"use client";

import { type FormEvent, useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import { CODE_STATUS_LABELS, CODE_STATUSES, type CodeStatus, type Phase } from "@/lib/diagnosis/vocabulary";
import type { CodeView } from "./model";

export type CodeResult = { ok: true } | { ok: false; message: string };

export interface CodesListProps {
  codes: readonly CodeView[];
  onAdd?: (input: { code: string; status: CodeStatus; phase: Phase }) => Promise<CodeResult>;
  onRemove?: (codeId: string) => Promise<CodeResult>;
  /** Which codes a new one joins: as found, or read after the repair. */
  phase?: Phase;
}

/** Codes with their meaning and what was frozen with them. They name circuits, not parts. */
export function CodesList({ codes, onAdd, onRemove, phase = "before" }: CodesListProps) {
  const [isOpen, setOpen] = useState(false);
  return (
    <section className="sec" aria-labelledby="codes-head">
      <header>
        <h2 id="codes-head">Codes</h2>
        {onAdd && (
          <Button look="link" onClick={() => setOpen(true)}>
            Add a code
          </Button>
        )}
      </header>
      {codes.length === 0 ? (
        <p className="note">None stored, none pending, or not read yet.</p>
      ) : (
        <dl className="codes">
          {codes.map((code) => (
            <div key={code.id}>
              <dt className="num">{code.code}</dt>
              <dd>
                <b>{code.title}</b>{" "}
                <span className="faint">
                  {CODE_STATUS_LABELS[code.status].toLowerCase()}
                  {code.phase === "after" && ", after the repair"}
                </span>
                {onRemove && (
                  <button type="button" className="link rm" onClick={() => void onRemove(code.id)}>
                    Remove<span className="vh"> {code.code}</span>
                  </button>
                )}
                {code.note && <p>{code.note}</p>}
              </dd>
            </div>
          ))}
        </dl>
      )}
      {onAdd && (
        <Dialog open={isOpen} onClose={() => setOpen(false)} title="Add a code">
          <AddCode phase={phase} onAdd={onAdd} onDone={() => setOpen(false)} />
        </Dialog>
      )}
    </section>
  );
}

function AddCode({
  phase,
  onAdd,
  onDone,
}: {
  phase: Phase;
  onAdd: NonNullable<CodesListProps["onAdd"]>;
  onDone: () => void;
}) {
  const [code, setCode] = useState("");
  const [status, setStatus] = useState<CodeStatus>("stored");
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);

  async function submit(event: FormEvent) {
    event.preventDefault();
    const clean = code.trim().toUpperCase();
    if (!/^[PCBU][0-3][0-9A-F]{3}$/.test(clean))
      return setError("A trouble code is a letter P, C, B or U and four characters, as P0171.");
    setBusy(true);
    const result = await onAdd({ code: clean, status, phase });
    setBusy(false);
    if (result.ok) onDone();
    else setError(result.message);
  }

  return (
    <form onSubmit={submit} noValidate>
      <TextInput
        id="new-code"
        label="Code"
        mono
        autoFocus
        autoCapitalize="characters"
        autoComplete="off"
        maxLength={8}
        value={code}
        error={error}
        onChange={(event) => setCode(event.target.value)}
      />
      <Options
        legend="Status"
        showLegend
        name="code-status"
        value={status}
        onChange={(value) => setStatus(value as CodeStatus)}
        options={CODE_STATUSES.map((value) => ({ value, label: CODE_STATUS_LABELS[value] }))}
      />
      <div className="acts">
        <Button type="submit" busy={isBusy} busyLabel="Adding">
          Add the code
        </Button>
      </div>
    </form>
  );
}
