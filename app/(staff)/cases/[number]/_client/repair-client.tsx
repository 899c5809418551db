"use client";

import { useRouter } from "next/navigation";
import type { UsePart, WorkResult } from "@/components/repair/model";
import { RepairPart, type RepairPartProps } from "@/components/repair/repair-part";
import { act, sentenceOf } from "../../../_client/act";
import { PhotoUpload } from "./photo-upload";

type Callbacks =
  | "onClockOn"
  | "onClockOff"
  | "onUsePart"
  | "onSetPart"
  | "onRemovePart"
  | "onNote"
  | "onDone"
  | "onStrike"
  | "onAskMore"
  | "photoSlot";

export type RepairClientProps = Omit<RepairPartProps, Callbacks> & { caseId: string; isOpen: boolean };

export function RepairClient({ caseId, isOpen, ...props }: RepairClientProps) {
  const router = useRouter();
  const done = async (verb: string, input: Record<string, unknown>): Promise<WorkResult> => {
    const answer = await act(verb, { caseId, ...input });
    if (answer.ok) router.refresh();
    return answer.ok ? { ok: true } : { ok: false, message: sentenceOf(answer.problem) };
  };
  return (
    <RepairPart
      {...props}
      onClockOn={(workJobId) => done("clock.on", { workJobId })}
      onClockOff={() => done("clock.off", {})}
      onUsePart={({ condition, ...part }: UsePart) => done("work.usePart", { ...part, condition: condition ?? "new" })}
      onSetPart={(partId, change) => done("work.setPart", { partId, ...change })}
      onRemovePart={(partId) => done("work.removePart", { partId })}
      onNote={(workJobId, text) => done("case.note", { workJobId, text })}
      onDone={(workJobId, correction) => done("work.finish", { workJobId, correction })}
      // the counter strikes; a technician's word goes to it as a note
      onStrike={(workJobId, reason) =>
        props.mayStrike
          ? done("work.strike", { workJobId, reason })
          : done("case.note", { workJobId, text: reason, kind: "strike-proposal" })
      }
      onAskMore={isOpen ? (text) => done("case.note", { text, kind: "more-work" }) : undefined}
      photoSlot={isOpen ? (job) => <PhotoUpload caseId={caseId} workJobId={job.id} /> : undefined}
    />
  );
}
