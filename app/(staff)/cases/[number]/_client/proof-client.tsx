"use client";

import { useRouter } from "next/navigation";
import { ProofPart, type ProofPartProps } from "@/components/proof/proof-part";
import { act, sentenceOf } from "../../../_client/act";

export type ProofClientProps = Omit<ProofPartProps, "onWaive"> & { caseId: string; mayWaive: boolean };

export function ProofClient({ caseId, mayWaive, ...props }: ProofClientProps) {
  const router = useRouter();
  return (
    <ProofPart
      {...props}
      onWaive={
        mayWaive
          ? async (reason) => {
              const answer = await act("case.waiveProof", { caseId, reason });
              if (answer.ok) router.refresh();
              return answer.ok ? { ok: true } : { ok: false, message: sentenceOf(answer.problem) };
            }
          : undefined
      }
    />
  );
}
