"use client";

import { useRouter } from "next/navigation";
import { useEffect } from "react";
import type { SaveReadings } from "@/components/readings/model";
import { ReadingsPart, type ReadingsPartProps } from "@/components/readings/readings-part";
import { type Answer, act, sentenceOf } from "../../../_client/act";
import { ImportReadings } from "./import-readings";

export type ReadingsClientProps = Omit<
  ReadingsPartProps,
  "save" | "onAddSample" | "onDescribeSample" | "onRemoveSample" | "onAddCode" | "onRemoveCode" | "imports"
> & { caseId: string };

interface CellConflict {
  by: string;
  cells: { parameter: string; yours: unknown; theirs: unknown }[];
}

const plain = (answer: Answer<unknown>) =>
  answer.ok ? ({ ok: true } as const) : ({ ok: false, message: sentenceOf(answer.problem) } as const);

export function ReadingsClient({ caseId, ...props }: ReadingsClientProps) {
  const router = useRouter();

  useEffect(() => {
    document.documentElement.dataset.ready = "readings";
    return () => {
      delete document.documentElement.dataset.ready;
    };
  }, []);

  const save: SaveReadings = async (sampleId, changes) => {
    const answer = await act("readings.set", { caseId, sampleId, changes });
    if (answer.ok) {
      router.refresh();
      return { ok: true };
    }
    const { problem } = answer;
    return {
      ok: false,
      message: sentenceOf(problem),
      conflict: problem.code === "conflict" && problem.current ? (problem.current as CellConflict) : undefined,
    };
  };

  async function refreshed<T>(answer: Promise<Answer<T>>): Promise<Answer<T>> {
    const result = await answer;
    if (result.ok) router.refresh();
    return result;
  }

  return (
    <ReadingsPart
      {...props}
      save={save}
      imports={<ImportReadings caseId={caseId} />}
      onAddSample={async (input) => {
        const answer = await refreshed(act<{ id: string }>("readings.addSample", { caseId, ...input }));
        return answer.ok ? { ok: true, sampleId: answer.data.id } : { ok: false, message: sentenceOf(answer.problem) };
      }}
      onDescribeSample={async (sampleId, input) =>
        plain(await refreshed(act("readings.describe", { caseId, sampleId, ...input })))
      }
      onRemoveSample={async (sampleId, reason) =>
        plain(await refreshed(act("readings.removeSample", { caseId, sampleId, reason })))
      }
      onAddCode={async (input) => plain(await refreshed(act("readings.addCode", { caseId, ...input })))}
      onRemoveCode={async (codeId) => plain(await refreshed(act("readings.removeCode", { caseId, codeId })))}
    />
  );
}
