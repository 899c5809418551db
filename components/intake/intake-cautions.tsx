import { Caution } from "@/components/ui/caution";
import type { ComplaintId } from "@/lib/diagnosis/vocabulary";

/** Dangers that show at the counter already. They warn; they never block the record. */
export function IntakeCautions({ complaints }: { complaints: readonly ComplaintId[] }) {
  const leaks = complaints.includes("fuel-leak-seen") || complaints.includes("fuel-smell");
  const flashes = complaints.includes("mil-flashing");
  if (!leaks && !flashes) return null;
  return (
    <div className="cautions">
      {leaks && (
        <Caution title={complaints.includes("fuel-leak-seen") ? "Fuel leak seen." : "Smell of fuel."}>
          The vehicle stays outside, away from drains and sparks: no start, no battery charger, no lamp that is not
          sealed. The maker’s procedure comes first.
        </Caution>
      )}
      {flashes && (
        <Caution title="Warning lamp flashing.">
          Misfiring is overheating the catalyst. Do not drive it in; do not park it over grass or anything that burns.
        </Caution>
      )}
    </div>
  );
}
