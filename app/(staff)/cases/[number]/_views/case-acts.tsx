import { moneyEntry } from "@/components/ui/parse-entry";
import { kmShown } from "@/components/ui/units";
import { isoToZoned } from "@/components/ui/zoned-time";
import type { Ctx } from "@/lib/auth/context";
import { mayDo } from "@/lib/auth/permissions";
import { AUTHORIZATION_LABELS, AUTHORIZATION_WAYS } from "@/lib/cases/schema";
import { BACK, isOver, type PathStage, STAGE_LABELS, type Stage } from "@/lib/cases/stages";
import type { CaseView } from "@/lib/services/cases/view";
import { ActButton } from "../../../_client/act-button";
import { ActDialog } from "../../../_client/act-dialog";
import { PhotoUpload } from "../_client/photo-upload";

const WAYS = AUTHORIZATION_WAYS.filter((way) => way !== "link").map((value) => ({
  value,
  label: AUTHORIZATION_LABELS[value],
}));

/** The acts on a case as a whole, at the foot of its intake part: what the reader's role allows in this stage. */
export function CaseActs({ ctx, view }: { ctx: Ctx; view: CaseView }) {
  const { row, customer, people } = view.parts;
  const { settings } = view;
  const { role } = ctx.actor;
  const caseId = row.id;
  const stage = row.stage as Stage;
  const staff = people.filter((person) => person.isActive && (person.role === "technician" || person.role === "owner"));
  const ownCase = role !== "technician" || row.technicianId === ctx.actor.id;
  if (isOver(stage)) {
    return (
      <div className="acts wrap">
        {mayDo(role, "case.comeback") && (
          <a
            className="btn quiet"
            href={`/cases/new?customer=${customer.id}&vehicle=${view.parts.vehicle.id}&comeback=${caseId}`}
          >
            It came back: open a linked case
          </a>
        )}
      </div>
    );
  }
  return (
    <div className="acts wrap">
      {mayDo(role, "case.editIntake") && (
        <ActDialog
          label="Change the intake"
          verb="case.editIntake"
          input={{ caseId, version: row.version }}
          fields={[
            { kind: "area", name: "words", label: "In the customer’s words", value: row.words },
            {
              kind: "text",
              name: "conditionNote",
              label: "More of when it happens",
              optional: true,
              value: row.conditionNote ?? "",
            },
            {
              kind: "odometer",
              name: "odometerInKm",
              label: "Odometer in",
              units: settings.units,
              optional: true,
              value: row.odometerInKm === null ? "" : String(kmShown(row.odometerInKm, settings.units)),
            },
            { kind: "check", name: "keepParts", label: "Keep the replaced parts", value: row.keepParts },
            { kind: "check", name: "roadTestAllowed", label: "May be driven on the road", value: row.roadTestAllowed },
            { kind: "text", name: "reason", label: "Why it changes", optional: true },
          ]}
          sendLabel="Change it"
        />
      )}
      <PhotoUpload caseId={caseId} />
      {mayDo(role, "diagnosis.authorize") && (
        <ActDialog
          label={view.diagnosis.ceilingMinor === null ? "Record the yes to the diagnosis" : "Record a higher ceiling"}
          verb="case.authorizeDiagnosis"
          input={{ caseId }}
          intro="The ceiling is agreed with tax included. Nothing is charged above it without another yes."
          fields={[
            {
              kind: "money",
              name: "amountMinor",
              label: "Ceiling, tax included",
              currency: settings.currency,
              value: moneyEntry(view.diagnosis.ceilingMinor ?? settings.defaultCeilingMinor, settings.currency),
            },
            { kind: "text", name: "givenBy", label: "Who said yes", value: customer.name },
            { kind: "choice", name: "how", label: "How", options: WAYS, value: "in-person" },
            {
              kind: "text",
              name: "contact",
              label: "Number or address used",
              optional: true,
              value: customer.phone ?? "",
            },
            { kind: "area", name: "words", label: "The words that were said", optional: true },
          ]}
          sendLabel="Record the yes"
        />
      )}
      {mayDo(role, "case.assign") && (
        <ActDialog
          label={row.technicianId ? "Give it to another technician" : "Give it to a technician"}
          verb="case.assign"
          input={{ caseId }}
          fields={[
            {
              kind: "choice",
              name: "technicianId",
              label: "Technician",
              options: staff.map(({ id, name }) => ({ value: id, label: name })),
              value: row.technicianId ?? undefined,
              placeholder: "Choose",
            },
          ]}
          sendLabel="Give it"
        />
      )}
      {mayDo(role, "case.promise") && (
        <ActDialog
          label={row.promisedAt ? "Move the promise" : "Promise a time"}
          verb="case.promise"
          input={{ caseId }}
          fields={[
            {
              kind: "time",
              name: "promisedAt",
              label: `Promised, ${settings.timeZone} time`,
              timeZone: settings.timeZone,
              value: row.promisedAt ? isoToZoned(row.promisedAt.toISOString(), settings.timeZone) : undefined,
            },
            { kind: "text", name: "reason", label: "Why it moves", optional: true },
          ]}
          sendLabel="Promise it"
        />
      )}
      {stage === "parked" && ownCase && (
        <ActButton look="quiet" label="Take it off hold" verb="case.unpark" input={{ caseId }} />
      )}
      {stage !== "parked" && ownCase && mayDo(role, "case.park") && (
        <ActDialog
          label="Put it on hold"
          verb="case.park"
          input={{ caseId }}
          fields={[
            {
              kind: "choice",
              name: "for",
              label: "Waiting for",
              value: "parts",
              options: [
                { value: "parts", label: "a part" },
                { value: "customer", label: "the customer" },
                { value: "bay", label: "a free bay" },
              ],
            },
            { kind: "text", name: "reason", label: "What exactly" },
          ]}
          sendLabel="Put it on hold"
        />
      )}
      {(BACK[stage as PathStage] ?? []).map((to) => (
        <ActDialog
          key={to}
          label={`Back to ${STAGE_LABELS[to].toLowerCase()}`}
          verb="case.back"
          input={{ caseId, to }}
          fields={[{ kind: "text", name: "reason", label: "Why" }]}
          sendLabel={`Send it back to ${STAGE_LABELS[to].toLowerCase()}`}
          goTo={`/cases/${row.number}`}
        />
      ))}
      {mayDo(role, "case.release") && (
        <ActDialog
          label="Let it go unrepaired"
          verb="case.release"
          input={{ caseId }}
          intro="The vehicle leaves as it came, with the findings and any safety advice on paper."
          fields={[
            { kind: "area", name: "reason", label: "Why it leaves unrepaired" },
            { kind: "area", name: "safetyNote", label: "Safety advice given", optional: true },
            { kind: "check", name: "notSafeToDrive", label: "Not safe to drive" },
            { kind: "text", name: "acknowledgedBy", label: "Who was told", optional: true, value: "" },
            { kind: "check", name: "chargeDiagnosis", label: "Charge the diagnosis, as agreed", value: true },
            { kind: "odometer", name: "odometerOutKm", label: "Odometer out", units: settings.units, optional: true },
          ]}
          sendLabel="Let it go"
          goTo={`/cases/${row.number}/papers`}
        />
      )}
    </div>
  );
}
