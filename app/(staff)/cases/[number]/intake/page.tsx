import type { Metadata } from "next";
import { IntakePart } from "@/components/intake/intake-view";
import { Main } from "@/components/ui/case-frame";
import { CaseActs } from "../_views/case-acts";
import { CaseShell } from "../_views/case-shell";
import { CaseGate } from "../_views/gate-view";
import { intakeView } from "../_views/intake-view";
import { loadCase, type PartParams } from "../_views/load";

export const metadata: Metadata = { title: "Intake" };

export default async function IntakePage({ params }: PartParams) {
  const { ctx, view } = await loadCase((await params).number);
  const intake = intakeView(view);
  const agreed = intake.authorizations[0];
  const title = agreed ? `Diagnosis agreed up to ${agreed.amount}` : "Diagnosis is not agreed yet";
  return (
    <CaseShell ctx={ctx} view={view} part="intake">
      <Main
        title={title}
        sub={
          agreed
            ? `${agreed.givenBy}, ${agreed.how.toLowerCase()}, ${agreed.when}, taken by ${agreed.takenBy}.`
            : "No reading may be charged before the customer has said yes."
        }
      >
        <IntakePart
          intake={intake}
          acts={<CaseActs ctx={ctx} view={view} />}
          gate={<CaseGate ctx={ctx} view={view} only="testing" />}
        />
      </Main>
    </CaseShell>
  );
}
