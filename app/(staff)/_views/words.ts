import type { CustomerChoice } from "@/components/intake/model";
import { formatShortDate } from "@/components/ui/format";
import { vehicleSchema } from "@/lib/diagnosis/case-file";
import { AIR_METERING_LABELS, FUEL_SYSTEM_LABELS, IGNITION_LABELS } from "@/lib/diagnosis/vocabulary";
import type { FoundCustomer } from "@/lib/services/customers/read";

/** An engine in a line: "2.4 L, four cylinders, port injection, air-flow meter, coil on plug, E10". */
export function engineWords(engine: Record<string, unknown>): string {
  const parsed = vehicleSchema.safeParse(engine);
  if (!parsed.success) return "";
  const { displacementL, cylinders, banks, fuelSystem, airMetering, aspiration, ignition, fuel } = parsed.data;
  return [
    displacementL ? `${displacementL.toFixed(1)} L` : null,
    cylinders ? `${cylinders} cylinders${banks === 2 ? " in two banks" : ""}` : null,
    fuelSystem ? FUEL_SYSTEM_LABELS[fuelSystem].toLowerCase() : null,
    airMetering ? AIR_METERING_LABELS[airMetering].toLowerCase() : null,
    aspiration === "boosted" ? "boosted" : null,
    ignition ? IGNITION_LABELS[ignition].toLowerCase() : null,
    fuel ?? null,
  ]
    .filter(Boolean)
    .join(", ");
}

export const contactWords = (customer: { phone: string | null; email: string | null }) =>
  [customer.phone, customer.email].filter(Boolean).join(", ");

/** A customer as the intake form offers them. */
export function customerChoice({ customer, vehicles, visits }: FoundCustomer, timeZone: string): CustomerChoice {
  const count = visits.length;
  return {
    id: customer.id,
    name: customer.name,
    note: `customer since ${customer.createdAt.getUTCFullYear()}, ${count} ${count === 1 ? "case" : "cases"}`,
    contact: contactWords(customer),
    vehicles: vehicles.map((vehicle) => {
      const here = visits.filter((visit) => visit.vehicleId === vehicle.id);
      const last = here.find((visit) => visit.odometerInKm !== null);
      const parsed = vehicleSchema.safeParse(vehicle.engine);
      return {
        id: vehicle.id,
        label: vehicle.modelYear ? `${vehicle.label}, ${vehicle.modelYear}` : vehicle.label,
        plate: vehicle.plate,
        vin: vehicle.vin,
        engine: parsed.success ? parsed.data : {},
        engineWords: engineWords(vehicle.engine),
        lastOdometer: last?.odometerInKm
          ? { km: last.odometerInKm, on: formatShortDate(last.openedAt.toISOString(), timeZone) }
          : null,
        earlier: here
          .slice(0, 3)
          .map((visit) => ({ number: String(visit.number), what: visit.words, href: `/cases/${visit.number}` })),
      };
    }),
  };
}
