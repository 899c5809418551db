import type { Metadata } from "next";
import { cookies } from "next/headers";
import { mayDo } from "@/lib/auth/permissions";
import { isOver, type Stage } from "@/lib/cases/stages";
import { CausesClient } from "../_client/causes-client";
import { CaseShell } from "../_views/case-shell";
import { allTests, causesTitle, ledgerView, nextTestViews, recordedTests, remarks } from "../_views/causes-view";
import { CaseGate } from "../_views/gate-view";
import { loadCase, type PartParams } from "../_views/load";

export const metadata: Metadata = { title: "Causes" };

export default async function CausesPage({ params }: PartParams) {
  const { ctx, view } = await loadCase((await params).number);
  const { row } = view.parts;
  const { vehicle } = view.caseFile;
  const density = (await cookies()).get("fd-density")?.value === "bay" ? "bay" : "counter";
  return (
    <CaseShell ctx={ctx} view={view} part="causes">
      <CausesClient
        caseId={row.id}
        mayMark={mayDo(ctx.actor.role, "cause.mark")}
        {...causesTitle(view)}
        ledger={ledgerView(view)}
        nextTests={nextTestViews(view)}
        tests={allTests()}
        recorded={recordedTests(view)}
        cylinders={vehicle.cylinders}
        banks={vehicle.banks}
        cautions={view.assessment.cautions}
        remarks={remarks(view)}
        gate={<CaseGate ctx={ctx} view={view} only="quoting" />}
        density={density}
        readOnly={isOver(row.stage as Stage) || !mayDo(ctx.actor.role, "test.record")}
      />
    </CaseShell>
  );
}
