import type { IntakeView } from "@/components/intake/model";
import { formatNumber, formatPrice, formatWhen } from "@/components/ui/format";
import { kmShown } from "@/components/ui/units";
import { ARRIVAL_LABELS, AUTHORIZATION_LABELS } from "@/lib/cases/schema";
import { CIRCUMSTANCE_LABELS, COMPLAINT_LABELS, HISTORY_LABELS } from "@/lib/diagnosis/vocabulary";
import type { CaseView } from "@/lib/services/cases/view";
import { contactWords, engineWords } from "../../../_views/words";

const labels = (ids: readonly string[], of: Record<string, string>) => ids.map((id) => of[id] ?? id);

/** Usual cautions for how a vehicle comes in; they defer to the maker's procedure and block nothing. */
function cautionsOf(view: CaseView): IntakeView["cautions"] {
  const { complaints } = view.parts.row;
  const cautions: { title: string; text: string }[] = [];
  if (complaints.includes("fuel-leak-seen") || complaints.includes("fuel-smell")) {
    cautions.push({
      title: "Fuel leak or strong smell:",
      text: "it stays outside. Do not start it, no charger, no flame; extinguisher at hand.",
    });
  }
  if (complaints.includes("mil-flashing")) {
    cautions.push({
      title: "Flashing engine light:",
      text: "do not drive it. The catalyst may be very hot; not over grass.",
    });
  }
  if (view.caseFile.vehicle.hybrid) {
    cautions.push({
      title: "Hybrid:",
      text: "it may start itself. Out of ready mode, key away, before hands go in; orange cables are for trained people.",
    });
  }
  return cautions;
}

export function intakeView(view: CaseView): IntakeView {
  const { row, customer, vehicle, authorizations, files } = view.parts;
  const { settings, now } = view;
  const when = (at: Date) => formatWhen(at.toISOString(), now.toISOString(), settings.timeZone);
  return {
    words: row.words,
    complaints: labels(row.complaints, COMPLAINT_LABELS),
    circumstances: labels(row.circumstances, CIRCUMSTANCE_LABELS),
    history: labels(row.history, HISTORY_LABELS),
    conditionNote: row.conditionNote,
    arrival: ARRIVAL_LABELS[row.arrival as keyof typeof ARRIVAL_LABELS] ?? row.arrival,
    odometer:
      row.odometerInKm === null
        ? `Not readable: ${row.odometerUnreadable ?? "not said"}`
        : `${formatNumber(kmShown(row.odometerInKm, settings.units))} ${settings.units.distance}`,
    keepParts: row.keepParts,
    roadTestAllowed: row.roadTestAllowed,
    customer: { name: customer.name, contact: contactWords(customer), href: `/customers/${customer.id}` },
    vehicle: {
      label: vehicle.modelYear ? `${vehicle.label}, ${vehicle.modelYear}` : vehicle.label,
      plate: vehicle.plate,
      vin: vehicle.vin,
      engineWords: engineWords(vehicle.engine),
      href: `/vehicles/${vehicle.id}`,
    },
    promise: row.promisedAt
      ? {
          words: when(row.promisedAt),
          note:
            row.promiseMoves > 0 ? `moved ${row.promiseMoves === 1 ? "once" : `${row.promiseMoves} times`}` : undefined,
        }
      : null,
    technician: view.technician?.name ?? null,
    authorizations: authorizations.toReversed().map((each) => ({
      amount: formatPrice(each.amountMinor, each.currency, settings.locale),
      givenBy: each.givenBy,
      how: AUTHORIZATION_LABELS[each.how as keyof typeof AUTHORIZATION_LABELS] ?? each.how,
      when: when(each.at),
      takenBy: each.takenByName,
      words: each.words ?? undefined,
    })),
    photos: files
      .filter((file) => file.kind === "photo" && file.state === "ready")
      .map((file) => ({
        id: file.id,
        src: `/api/files/${file.id}?size=thumb`,
        alt: file.caption ?? `Photo by ${file.byName}`,
        width: file.width ?? 320,
        height: file.height ?? 240,
      })),
    cautions: cautionsOf(view),
  };
}
