import type { Metadata } from "next";
import { cookies } from "next/headers";
import { mayDo } from "@/lib/auth/permissions";
import { isOver, type Stage } from "@/lib/cases/stages";
import { ReadingsClient } from "../_client/readings-client";
import { CaseShell } from "../_views/case-shell";
import { loadCase, type PartParams } from "../_views/load";
import { codeViews, findingViews, readingsSub, readingsTitle, sampleViews } from "../_views/readings-view";

export const metadata: Metadata = { title: "Readings" };

export default async function ReadingsPage({ params }: PartParams) {
  const { ctx, view } = await loadCase((await params).number);
  const { row } = view.parts;
  const density = (await cookies()).get("fd-density")?.value === "bay" ? "bay" : "counter";
  return (
    <CaseShell ctx={ctx} view={view} part="readings">
      <ReadingsClient
        caseId={row.id}
        title={readingsTitle(view)}
        sub={readingsSub(view)}
        samples={sampleViews(view)}
        context={{
          vehicle: view.caseFile.vehicle,
          site: view.caseFile.site,
          units: view.settings.units,
          timeZone: view.settings.timeZone,
          locale: view.settings.locale,
        }}
        findings={findingViews(view.assessment.findings)}
        notes={view.assessment.dataQuality.map((note) => note.message)}
        codes={codeViews(view)}
        density={density}
        readOnly={isOver(row.stage as Stage) || !mayDo(ctx.actor.role, "reading.write")}
        phase={row.stage === "proof" || row.stage === "closed" ? "after" : "before"}
      />
    </CaseShell>
  );
}
