import Link from "next/link";
import { ButtonLink } from "@/components/ui/button";
import type { OwnedVehicleView } from "./model";

/** A customer's vehicles, each with a way to take it in. */
export function OwnedVehicles({ vehicles }: { vehicles: readonly OwnedVehicleView[] }) {
  return (
    <ul className="rec-vehicles">
      {vehicles.map((vehicle) => (
        <li key={vehicle.id}>
          <div>
            <Link className="link" href={vehicle.href}>
              {vehicle.label}
            </Link>{" "}
            {vehicle.plate && <span className="num faint">{vehicle.plate}</span>}
            <p className="note">
              {vehicle.engine || "Nothing is known of its engine yet"}
              {vehicle.vin && (
                <>
                  , VIN <span className="num">{vehicle.vin}</span>
                </>
              )}
            </p>
          </div>
          <ButtonLink
            href={vehicle.newCaseHref}
            look="quiet"
            small
            aria-label={`New case for ${vehicle.label}${vehicle.plate ? `, ${vehicle.plate}` : ""}`}
          >
            New case
          </ButtonLink>
        </li>
      ))}
    </ul>
  );
}
