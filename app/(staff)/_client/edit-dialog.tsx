"use client";

import { useRouter } from "next/navigation";
import { type ReactNode, useId, useRef, useState } from "react";
import { EditFieldInput } from "@/components/records/edit-field-input";
import { differences, type EditField, EntryError, entryOf, valueAt, withValue } from "@/components/records/edit-fields";
import { Button, type ButtonProps } from "@/components/ui/button";
import { cx } from "@/components/ui/cx";
import { Dialog } from "@/components/ui/dialog";
import { Bang } from "@/components/ui/icons";
import { ConflictView } from "@/components/ui/states";
import { act, fieldErrorsOf, sentenceOf } from "./act";

export interface EditDialogProps {
  /** The button that opens it. */
  label: string;
  /** What the button says to a reader who does not see the row it stands in. */
  spoken?: string;
  look?: ButtonProps["look"];
  small?: boolean;
  title: string;
  intro?: ReactNode;
  verb: string;
  /** What the verb needs besides the fields: the id, the version, what stays as it is. */
  input: Record<string, unknown>;
  fields: readonly EditField[];
  /** Two columns of fields. */
  isWide?: boolean;
  sendLabel: string;
  busyLabel?: string;
  /** After a new record is made: the page of its kind, to which its id is added. */
  goTo?: string;
}

interface Conflict {
  current: Record<string, unknown>;
  yours: Record<string, unknown>;
}

/**
 * A button that opens a record's fields and saves them through a verb. Refusals stand at their field, nothing typed is
 * lost, and a record that someone else saved meanwhile is shown beside one's own.
 */
export function EditDialog(props: EditDialogProps) {
  const { label, spoken, look = "quiet", small, title, intro, verb, input, fields, isWide, sendLabel, goTo } = props;
  const router = useRouter();
  const formId = useId();
  const form = useRef<HTMLFormElement>(null);
  // a repeated press sends the same request, not a second one
  const key = useRef("");
  const [isOpen, setOpen] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState("");
  const [conflict, setConflict] = useState<Conflict | null>(null);

  function open() {
    key.current = crypto.randomUUID();
    setErrors({});
    setFailure("");
    setConflict(null);
    setOpen(true);
  }

  function done(id?: string) {
    setOpen(false);
    if (goTo && id) router.push(`${goTo}${id}`);
    router.refresh();
  }

  const focusOn = (name: string | undefined) =>
    form.current?.querySelector<HTMLElement>(`[name="${CSS.escape(name ?? "")}"]`)?.focus();

  /** What the form holds together with what stays, or null with the faults shown. */
  function read(): Record<string, unknown> | null {
    if (!form.current) return null;
    const data = new FormData(form.current);
    const found: Record<string, string> = {};
    let values = input;
    for (const field of fields) {
      try {
        values = withValue(values, field.name, entryOf(field, data));
      } catch (error) {
        if (!(error instanceof EntryError)) throw error;
        found[field.name] = error.message;
      }
    }
    setErrors(found);
    const first = fields.find((field) => found[field.name]);
    if (!first) return values;
    focusOn(first.name);
    return null;
  }

  async function send(values: Record<string, unknown> | null) {
    if (!values || isBusy) return;
    setFailure("");
    setBusy(true);
    const answer = await act<{ id?: string }>(verb, values, key.current);
    setBusy(false);
    if (answer.ok) return done(answer.data?.id);
    key.current = crypto.randomUUID();
    const { problem } = answer;
    if (problem.code === "conflict" && problem.current) {
      return setConflict({ current: problem.current as Record<string, unknown>, yours: values });
    }
    const refused = refusals(fieldErrorsOf(problem));
    setConflict(null);
    setErrors(refused);
    const first = Object.keys(refused)[0];
    if (first) focusOn(first);
    else setFailure(sentenceOf(problem));
  }

  /** Refusals by field; a pointer may lead with the part of the case it belongs to. */
  function refusals(byPointer: Record<string, string>): Record<string, string> {
    const found: Record<string, string> = {};
    for (const [pointer, detail] of Object.entries(byPointer)) {
      const field = fields.find((each) => pointer.endsWith(`/${each.name.replaceAll(".", "/")}`));
      if (field) found[field.name] = detail;
    }
    return found;
  }

  return (
    <>
      <Button look={look} small={small} onClick={open} aria-label={spoken}>
        {label}
      </Button>
      <Dialog open={isOpen} onClose={() => setOpen(false)} title={title} wide={isWide}>
        {conflict && (
          <ConflictView
            who="Someone else"
            theirsHead="Theirs, saved just now"
            subject="Field"
            fields={differences(fields, conflict.yours, conflict.current)}
            keepTheirsLabel="Keep theirs"
            busy={isBusy}
            onKeepTheirs={() => done()}
            onKeepMine={() => void send({ ...conflict.yours, version: valueAt(conflict.current, "version") })}
          />
        )}
        <form
          ref={form}
          className={cx("stack", isWide && "edit-wide")}
          hidden={conflict !== null}
          noValidate
          onSubmit={(event) => {
            event.preventDefault();
            void send(read());
          }}
        >
          {intro && <p className="soft edit-full">{intro}</p>}
          {fields.map((field) => (
            <EditFieldInput key={field.name} field={field} id={`${formId}-${field.name}`} error={errors[field.name]} />
          ))}
          {failure && (
            <p className="why edit-full" role="alert">
              <Bang />
              <span>{failure}</span>
            </p>
          )}
          <div className="acts edit-full">
            <Button type="submit" busy={isBusy} busyLabel={props.busyLabel ?? "Saving"}>
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
