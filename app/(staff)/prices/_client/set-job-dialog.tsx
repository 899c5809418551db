"use client";

import { useRouter } from "next/navigation";
import { useRef, useState } from "react";
import { type SetJobDraft, URGENCY_WORDS } from "@/components/prices/model";
import { SetJobForm, type SetJobFormProps } from "@/components/prices/set-job-form";
import { Button, type ButtonProps } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { formatPrice } from "@/components/ui/format";
import { ConflictView } from "@/components/ui/states";
import { act, sentenceOf } from "../../_client/act";

export interface SetJobDialogProps
  extends Pick<SetJobFormProps, "job" | "causes" | "rates" | "currency" | "locale" | "maySeeCost"> {
  label: string;
  look?: ButtonProps["look"];
  spoken?: string;
}

/** Makes or changes a set job; when someone else saved it meanwhile, both versions stand side by side. */
export function SetJobDialog(props: SetJobDialogProps) {
  const { job, causes, currency, locale } = props;
  const router = useRouter();
  const key = useRef("");
  const [isOpen, setOpen] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState("");
  const [conflict, setConflict] = useState<{ yours: SetJobDraft; theirs: SetJobDraft } | null>(null);

  const close = () => {
    setOpen(false);
    router.refresh();
  };

  async function save(next: SetJobDraft) {
    if (isBusy) return;
    setBusy(true);
    setFailure("");
    const answer = await act("price.saveSetJob", next, key.current);
    setBusy(false);
    key.current = crypto.randomUUID();
    if (answer.ok) return close();
    if (answer.problem.code === "conflict" && answer.problem.current)
      return setConflict({ yours: next, theirs: answer.problem.current as SetJobDraft });
    setConflict(null);
    setFailure(sentenceOf(answer.problem));
  }

  const causeOf = (draft: SetJobDraft) => causes.find((cause) => cause.value === draft.causeId)?.label ?? "no cause";
  const linesOf = (draft: SetJobDraft) => {
    const net = draft.lines.reduce(
      (sum, line) => sum + Math.round((line.quantityMilli * line.unitPriceMinor) / 1000),
      0,
    );
    return `${draft.lines.length} ${draft.lines.length === 1 ? "line" : "lines"}, ${formatPrice(net, currency, locale)}`;
  };
  const compared = ({ yours, theirs }: { yours: SetJobDraft; theirs: SetJobDraft }) =>
    [
      { label: "Name", yours: yours.name, theirs: theirs.name },
      { label: "For the customer", yours: yours.customerTitle, theirs: theirs.customerTitle },
      { label: "Cause", yours: causeOf(yours), theirs: causeOf(theirs) },
      { label: "How soon", yours: URGENCY_WORDS[yours.urgency], theirs: URGENCY_WORDS[theirs.urgency] },
      { label: "If it waits", yours: yours.ifWaits || "empty", theirs: theirs.ifWaits || "empty" },
      { label: "Lines", yours: linesOf(yours), theirs: linesOf(theirs) },
      { label: "Offered", yours: yours.isActive ? "yes" : "no", theirs: theirs.isActive ? "yes" : "no" },
    ].filter((field) => field.yours !== field.theirs);

  return (
    <>
      <Button
        look={props.look ?? "quiet"}
        small={props.look !== "act"}
        aria-label={props.spoken}
        onClick={() => {
          key.current = crypto.randomUUID();
          setFailure("");
          setConflict(null);
          setOpen(true);
        }}
      >
        {props.label}
      </Button>
      <Dialog open={isOpen} onClose={() => setOpen(false)} title={job.id ? `Change ${job.name}` : "New set job"} wide>
        {conflict && (
          <ConflictView
            who="Someone else"
            theirsHead="Theirs, saved just now"
            subject={conflict.yours.name}
            fields={compared(conflict)}
            keepTheirsLabel="Keep theirs"
            busy={isBusy}
            onKeepTheirs={close}
            onKeepMine={() => void save({ ...conflict.yours, version: conflict.theirs.version })}
          />
        )}
        <div hidden={conflict !== null}>
          <SetJobForm
            job={job}
            causes={causes}
            rates={props.rates}
            currency={currency}
            locale={locale}
            maySeeCost={props.maySeeCost}
            busy={isBusy}
            failure={failure}
            onSave={(next) => void save(next)}
            onLeave={() => setOpen(false)}
          />
        </div>
      </Dialog>
    </>
  );
}
