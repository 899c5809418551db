"use client";

import { useRouter } from "next/navigation";
import { CausesPart, type CausesPartProps } from "@/components/ledger/causes-part";
import { type Answer, act, sentenceOf } from "../../../_client/act";

export type CausesClientProps = Omit<CausesPartProps, "onRecord" | "onUndo" | "onMark" | "onUnmark"> & {
  caseId: string;
  mayMark: boolean;
};

const plain = (answer: Answer<unknown>) =>
  answer.ok ? ({ ok: true } as const) : ({ ok: false, message: sentenceOf(answer.problem) } as const);

export function CausesClient({ caseId, mayMark, ...props }: CausesClientProps) {
  const router = useRouter();
  const done = async (verb: string, input: Record<string, unknown>) => {
    const answer = await act(verb, { caseId, ...input });
    if (answer.ok) router.refresh();
    return plain(answer);
  };
  return (
    <CausesPart
      {...props}
      onRecord={(outcome) => done("test.record", { ...outcome })}
      onUndo={(outcomeId) => done("test.undo", { outcomeId })}
      onMark={mayMark ? (input) => done("cause.mark", { ...input }) : undefined}
      onUnmark={mayMark ? (markId, reason) => done("cause.unmark", { markId, reason }) : undefined}
    />
  );
}
