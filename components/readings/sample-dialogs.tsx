"use client";

import { type FormEvent, useState } from "react";
import { Button } from "@/components/ui/button";
import { TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import { MODES, type Mode, type Phase } from "@/lib/diagnosis/vocabulary";
import { MODE_WORDS } from "./mode-words";
import type { AddSample, SampleView } from "./model";

const MODE_OPTIONS = MODES.map((mode) => ({ value: mode, label: MODE_WORDS[mode] }));

export interface AddSampleFormProps {
  onAdd: AddSample;
  onDone: (sampleId: string) => void;
  initialMode?: Mode;
  initialPhase?: Phase;
}

export function AddSampleForm({ onAdd, onDone, initialMode = "idling", initialPhase = "before" }: AddSampleFormProps) {
  const [mode, setMode] = useState<Mode>(initialMode);
  const [phase, setPhase] = useState<Phase>(initialPhase);
  const [how, setHow] = useState("");
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);

  async function submit(event: FormEvent) {
    event.preventDefault();
    setBusy(true);
    const result = await onAdd({ mode, phase, how: how.trim() || undefined });
    setBusy(false);
    if (result.ok) onDone(result.sampleId);
    else setError(result.message);
  }

  return (
    <form onSubmit={submit}>
      <Options
        legend="Mode"
        showLegend
        name="sample-mode"
        value={mode}
        onChange={(value) => setMode(value as Mode)}
        options={MODE_OPTIONS}
      />
      <Options
        legend="When"
        showLegend
        name="sample-phase"
        value={phase}
        onChange={(value) => setPhase(value as Phase)}
        options={[
          { value: "before", label: "As found" },
          { value: "after", label: "After the repair" },
        ]}
      />
      <TextInput
        id="sample-how"
        label="How it was taken"
        optional
        placeholder="warm, held 90 s"
        maxLength={80}
        value={how}
        error={error}
        onChange={(event) => setHow(event.target.value)}
      />
      {mode === "accelerating" && (
        <p className="note">Lambda above 1 at full load: stop, and do not repeat the run. It destroys pistons.</p>
      )}
      <div className="acts">
        <Button type="submit" busy={isBusy} busyLabel="Adding">
          Add the sample
        </Button>
      </div>
    </form>
  );
}

export interface EditSampleFormProps {
  sample: SampleView;
  onDescribe: (input: { mode: Mode; how?: string }) => Promise<{ ok: true } | { ok: false; message: string }>;
  onRemove: (reason: string) => Promise<{ ok: true } | { ok: false; message: string }>;
  onDone: () => void;
}

export function EditSampleForm({ sample, onDescribe, onRemove, onDone }: EditSampleFormProps) {
  const [mode, setMode] = useState<Mode>(sample.mode);
  const [how, setHow] = useState(sample.how ?? "");
  const [reason, setReason] = useState("");
  const [error, setError] = useState<string>();
  const [busy, setBusy] = useState<"describe" | "remove" | null>(null);
  const holds = Object.keys(sample.values).length;

  async function run(what: "describe" | "remove") {
    if (what === "remove" && holds > 0 && reason.trim() === "") return setError("Say why the readings are taken out.");
    setBusy(what);
    const result =
      what === "describe" ? await onDescribe({ mode, how: how.trim() || undefined }) : await onRemove(reason.trim());
    setBusy(null);
    if (result.ok) onDone();
    else setError(result.message);
  }

  return (
    <div className="stack">
      <Options
        legend="Mode"
        showLegend
        name="edit-mode"
        value={mode}
        onChange={(value) => setMode(value as Mode)}
        options={MODE_OPTIONS}
      />
      <TextInput
        id="edit-how"
        label="How it was taken"
        optional
        maxLength={80}
        value={how}
        onChange={(event) => setHow(event.target.value)}
      />
      <div className="acts">
        <Button busy={busy === "describe"} busyLabel="Saving" onClick={() => void run("describe")}>
          Save
        </Button>
      </div>
      <div className="sec stack">
        <TextInput
          id="remove-why"
          label={`Take out its ${holds} readings, with a reason`}
          value={reason}
          error={error}
          onChange={(event) => setReason(event.target.value)}
        />
        <div className="acts">
          <Button look="ink" busy={busy === "remove"} busyLabel="Taking out" onClick={() => void run("remove")}>
            Take the sample out
          </Button>
        </div>
      </div>
    </div>
  );
}
