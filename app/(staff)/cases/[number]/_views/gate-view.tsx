import type { ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { Gate } from "@/components/ui/gate";
import type { Ctx } from "@/lib/auth/context";
import { mayDo } from "@/lib/auth/permissions";
import type { PathStage } from "@/lib/cases/stages";
import type { CaseView } from "@/lib/services/cases/view";
import { ActButton } from "../../../_client/act-button";

const NEXT_PART: Partial<Record<PathStage, string>> = {
  testing: "readings",
  quoting: "quote",
  repair: "repair",
  proof: "proof",
};

const WHO: Record<string, string> = {
  counter: "the counter",
  technician: "the technician",
  customer: "the customer",
  owner: "the owner",
};

/** The gate to the next stage: pressed where everything is there, explained where it is not. */
export function CaseGate({ ctx, view, only }: { ctx: Ctx; view: CaseView; only: PathStage }): ReactNode {
  const { gate, technician, parts } = view;
  if (!gate || gate.next !== only || !NEXT_PART[only]) return null;
  const nameOf = (who: string) =>
    who === "technician"
      ? (technician?.name ?? "a technician")
      : who === "customer"
        ? parts.customer.name
        : (WHO[who] ?? who);
  return (
    <Gate
      items={gate.demands.map((demand) => ({
        label: demand.text,
        isMet: demand.met,
        note: demand.met ? undefined : `waiting on ${nameOf(demand.who)}`,
      }))}
      action={
        gate.open && mayDo(ctx.actor.role, "case.advance") ? (
          <ActButton
            label={gate.label}
            busyLabel="Moving"
            verb="case.advance"
            input={{ caseId: parts.row.id, to: only }}
            goTo={`/cases/${parts.row.number}/${NEXT_PART[only]}`}
          />
        ) : (
          <Button disabled>{gate.label}</Button>
        )
      }
    />
  );
}
