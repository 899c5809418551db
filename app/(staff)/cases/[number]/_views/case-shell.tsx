import type { ReactNode } from "react";
import { CaseFrame } from "@/components/ui/case-frame";
import { formatPrice, formatWhen } from "@/components/ui/format";
import type { Ctx } from "@/lib/auth/context";
import type { CaseView } from "@/lib/services/cases/view";
import { LiveRefresh } from "../../../_client/live-refresh";
import { LiveSaveState } from "../../../_client/live-save-state";
import { partLinks, stageView, stripView } from "../../../_views/case-head";
import { StaffTop } from "../../../_views/staff-top";

export interface CaseShellProps {
  ctx: Ctx;
  view: CaseView;
  part: string;
  children: ReactNode;
}

/** The frame around each of the seven parts of a case. */
export function CaseShell({ ctx, view, part, children }: CaseShellProps) {
  const { row, shop } = view.parts;
  const { settings, diagnosis } = view;
  const money = (minor: number) => formatPrice(minor, settings.currency, settings.locale);
  return (
    <>
      <LiveRefresh caseId={row.id} />
      <CaseFrame
        top={<StaffTop ctx={ctx} shop={shop.name} current="cases" />}
        strip={stripView(view)}
        stage={stageView(view, ctx)}
        parts={partLinks(view, part)}
        dueWords={
          row.promisedAt
            ? `due ${formatWhen(row.promisedAt.toISOString(), view.now.toISOString(), settings.timeZone)}`
            : undefined
        }
        agreed={
          diagnosis.ceilingMinor === null
            ? undefined
            : `${money(diagnosis.price?.totalMinor ?? 0)} of ${money(diagnosis.ceilingMinor)} agreed for the diagnosis`
        }
        save={<LiveSaveState />}
      >
        {children}
      </CaseFrame>
    </>
  );
}
