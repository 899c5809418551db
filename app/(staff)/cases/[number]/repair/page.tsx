import type { Metadata } from "next";
import { Button } from "@/components/ui/button";
import { mayDo } from "@/lib/auth/permissions";
import { demandsFor } from "@/lib/cases/stages";
import { ActButton } from "../../../_client/act-button";
import { RepairClient } from "../_client/repair-client";
import { CaseShell } from "../_views/case-shell";
import { loadCase, type PartParams } from "../_views/load";
import { agreedRows, repairCautions, repairTitle, workJobViews } from "../_views/repair-view";

export const metadata: Metadata = { title: "Repair" };

export default async function RepairPage({ params }: PartParams) {
  const { ctx, view } = await loadCase((await params).number);
  const { row } = view.parts;
  const isOpen = row.stage === "repair";
  const demands = view.parts.workJobs.length > 0 ? demandsFor("proof", view.facts) : demandsFor("repair", view.facts);
  const isReady = isOpen && demands.every((demand) => demand.met);
  return (
    <CaseShell ctx={ctx} view={view} part="repair">
      <RepairClient
        caseId={row.id}
        title={repairTitle(view)}
        jobs={workJobViews(view, ctx)}
        agreed={agreedRows(view)}
        cautions={repairCautions(view)}
        gate={demands.map((demand) => ({ label: demand.text, isMet: demand.met }))}
        gateAction={
          isReady ? (
            <ActButton
              label="Go to proof"
              busyLabel="Moving"
              verb="case.advance"
              input={{ caseId: row.id, to: "proof" }}
              goTo={`/cases/${row.number}/proof`}
            />
          ) : isOpen ? (
            <Button disabled>Go to proof</Button>
          ) : undefined
        }
        mayStrike={mayDo(ctx.actor.role, "work.strike")}
        isOpen={isOpen}
        now={ctx.now.toISOString()}
        timeZone={view.settings.timeZone}
        readOnly={!isOpen}
      />
    </CaseShell>
  );
}
