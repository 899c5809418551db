"use client";

import { useRouter } from "next/navigation";
import { type ReactNode, useId, useRef, useState } from "react";
import { Button, type ButtonProps } from "@/components/ui/button";
import { Caution } from "@/components/ui/caution";
import { Dialog } from "@/components/ui/dialog";
import { Checkbox, Select, TextArea, TextInput } from "@/components/ui/inputs";
import { parseMoney, parseNumber } from "@/components/ui/parse-entry";
import { kmInternal, type UnitPrefs } from "@/components/ui/units";
import { zonedToIso } from "@/components/ui/zoned-time";
import { act, fieldErrorsOf, sentenceOf } from "./act";

interface FieldBase {
  name: string;
  label: string;
  hint?: string;
  optional?: boolean;
}

/** One field of an act's dialog, and how its text becomes the verb's input. */
export type ActField = FieldBase &
  (
    | { kind: "text" | "area"; value?: string; placeholder?: string; type?: "email" | "tel" | "text" | "date" }
    | { kind: "money"; value?: string; currency: string }
    | { kind: "number"; value?: string; unit?: string; scale?: number }
    | { kind: "odometer"; value?: string; units: UnitPrefs }
    | { kind: "time"; value?: string; timeZone: string }
    | { kind: "choice"; value?: string; options: readonly { value: string; label: string }[]; placeholder?: string }
    | { kind: "check"; value?: boolean }
  );

export interface ActDialogProps {
  /** The button that opens it. */
  label: string;
  look?: ButtonProps["look"];
  title?: string;
  /** What the dialog explains before it asks. */
  intro?: ReactNode;
  caution?: { title: string; text: string };
  verb: string;
  /** What the verb needs besides the fields. */
  input: Record<string, unknown>;
  fields: readonly ActField[];
  sendLabel: string;
  busyLabel?: string;
  /** Where to go afterwards; by default the page is read anew. */
  goTo?: string;
  disabled?: boolean;
}

class EntryError extends Error {}

function entryOf(field: ActField, form: FormData): unknown {
  if (field.kind === "check") return form.get(field.name) === "on";
  const text = String(form.get(field.name) ?? "").trim();
  if (text === "") {
    if (field.optional) return undefined;
    throw new EntryError(`${field.label} is missing.`);
  }
  switch (field.kind) {
    case "money": {
      const minor = parseMoney(text, field.currency);
      if (minor === null) throw new EntryError("That is not an amount of money.");
      return minor;
    }
    case "number": {
      const number = parseNumber(text);
      if (number === null) throw new EntryError("That is not a number.");
      return Math.round(number * (field.scale ?? 1) * 1000) / 1000;
    }
    case "odometer": {
      const number = parseNumber(text);
      if (number === null) throw new EntryError("That is not a number.");
      return kmInternal(number, field.units);
    }
    case "time": {
      const iso = zonedToIso(text, field.timeZone);
      if (!iso) throw new EntryError("That is not a date and time.");
      return iso;
    }
    default:
      return text;
  }
}

/** A button that opens a dialog, asks what a verb needs, and does it; refusals stand at their field and nothing typed is lost. */
export function ActDialog(props: ActDialogProps) {
  const {
    label,
    look = "quiet",
    title = label,
    intro,
    caution,
    verb,
    input,
    fields,
    sendLabel,
    busyLabel = "Saving",
    goTo,
    disabled,
  } = props;
  const router = useRouter();
  const formId = useId();
  const form = useRef<HTMLFormElement>(null);
  // a repeated press sends the same request, not a second one
  const key = useRef("");
  const [isOpen, setOpen] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState("");

  function open() {
    key.current = crypto.randomUUID();
    setErrors({});
    setFailure("");
    setOpen(true);
  }

  async function send() {
    if (!form.current || isBusy) return;
    const data = new FormData(form.current);
    const found: Record<string, string> = {};
    const values: Record<string, unknown> = {};
    for (const field of fields) {
      try {
        values[field.name] = entryOf(field, data);
      } catch (error) {
        if (!(error instanceof EntryError)) throw error;
        found[field.name] = error.message;
      }
    }
    setErrors(found);
    setFailure("");
    const firstBad = fields.find((field) => found[field.name]);
    if (firstBad) return form.current.querySelector<HTMLElement>(`[name="${firstBad.name}"]`)?.focus();
    setBusy(true);
    const answer = await act(verb, { ...input, ...values }, key.current);
    setBusy(false);
    if (answer.ok) {
      setOpen(false);
      if (goTo) router.push(goTo);
      router.refresh();
      return;
    }
    key.current = crypto.randomUUID();
    const byPointer = fieldErrorsOf(answer.problem);
    const refused = Object.fromEntries(
      fields.flatMap((field) => (byPointer[`/${field.name}`] ? [[field.name, byPointer[`/${field.name}`]!]] : [])),
    );
    setErrors(refused);
    if (Object.keys(refused).length === 0) setFailure(sentenceOf(answer.problem));
    else form.current.querySelector<HTMLElement>(`[name="${Object.keys(refused)[0]}"]`)?.focus();
  }

  return (
    <>
      <Button look={look} onClick={open} disabled={disabled}>
        {label}
      </Button>
      <Dialog open={isOpen} onClose={() => setOpen(false)} title={title}>
        <form
          ref={form}
          className="stack"
          noValidate
          onSubmit={(event) => {
            event.preventDefault();
            void send();
          }}
        >
          {caution && <Caution title={caution.title}>{caution.text}</Caution>}
          {intro && <p className="soft">{intro}</p>}
          {fields.map((field) => (
            <DialogField key={field.name} field={field} id={`${formId}-${field.name}`} error={errors[field.name]} />
          ))}
          {failure && (
            <p className="why" role="alert">
              <span className="bang" aria-hidden="true">
                !
              </span>
              <span>{failure}</span>
            </p>
          )}
          <div className="acts">
            <Button type="submit" busy={isBusy} busyLabel={busyLabel}>
              {sendLabel}
            </Button>
            <Button look="quiet" onClick={() => setOpen(false)}>
              Leave it
            </Button>
          </div>
        </form>
      </Dialog>
    </>
  );
}

function DialogField({ field, id, error }: { field: ActField; id: string; error?: string }) {
  const common = { id, name: field.name, label: field.label, hint: field.hint, optional: field.optional, error };
  switch (field.kind) {
    case "area":
      return <TextArea {...common} rows={3} defaultValue={field.value} placeholder={field.placeholder} />;
    case "money":
      return <TextInput {...common} mono inputMode="decimal" defaultValue={field.value} unit={field.currency} />;
    case "number":
      return <TextInput {...common} mono inputMode="decimal" defaultValue={field.value} unit={field.unit} />;
    case "odometer":
      return <TextInput {...common} mono inputMode="numeric" defaultValue={field.value} unit={field.units.distance} />;
    case "time":
      return <TextInput {...common} mono type="datetime-local" defaultValue={field.value} />;
    case "choice":
      return <Select {...common} options={field.options} placeholder={field.placeholder} defaultValue={field.value} />;
    case "check":
      return (
        <Checkbox id={id} name={field.name} defaultChecked={field.value} note={field.hint} error={error}>
          {field.label}
        </Checkbox>
      );
    default:
      return (
        <TextInput {...common} type={field.type ?? "text"} defaultValue={field.value} placeholder={field.placeholder} />
      );
  }
}
