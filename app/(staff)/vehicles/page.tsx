import type { Metadata } from "next";
import { PageHead } from "@/components/records/page-head";
import { MoreLink, SearchForm } from "@/components/records/search-form";
import { ButtonLink } from "@/components/ui/button";
import { formatDate } from "@/components/ui/format";
import { EmptyState } from "@/components/ui/states";
import { VehiclesTable } from "@/components/vehicles/vehicles-table";
import { pageCtx } from "@/lib/auth/session";
import { findVehicles, listVehicles, vehicleVisits } from "@/lib/services/customers/read";
import { readShop } from "@/lib/services/shops/read";
import { address, placeOf, readPlace, type Search, typed } from "../_views/address";
import { StaffTop } from "../_views/staff-top";
import { engineWords } from "../_views/words";
import "../records.css";

export const metadata: Metadata = { title: "Vehicles" };

const FOUND = 50;

export default async function VehiclesPage({ searchParams }: { searchParams: Promise<Search> }) {
  const ctx = await pageCtx();
  const search = await searchParams;
  const query = typed(search.q);
  const after = readPlace(search.after);
  const { shop, settings } = await readShop(ctx);
  const list = query
    ? { rows: await findVehicles(ctx, query, FOUND), isMore: false }
    : await listVehicles(ctx, after ? { label: after.text, id: after.id } : null);
  const visits = await vehicleVisits(
    ctx,
    list.rows.map(({ vehicle }) => vehicle.id),
  );
  const rows = list.rows.map(({ vehicle, customerName }) => {
    const count = visits.get(vehicle.id);
    return {
      id: vehicle.id,
      href: `/vehicles/${vehicle.id}`,
      label: vehicle.modelYear ? `${vehicle.label}, ${vehicle.modelYear}` : vehicle.label,
      plate: vehicle.plate,
      vin: vehicle.vin,
      customer: customerName,
      engine: engineWords(vehicle.engine),
      visits: count?.visits ?? 0,
      lastVisit: count?.last ? formatDate(count.last.toISOString(), settings.timeZone) : null,
    };
  });
  const last = list.rows.at(-1)?.vehicle;
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current="vehicles" />
      <main id="main" className="page rec">
        <PageHead
          title={query ? `${rows.length}${rows.length === FOUND ? " or more" : ""} found` : "Vehicles,"}
          titleNote={query ? `for “${query}”` : "by make and model"}
          acts={<ButtonLink href="/cases/new">New case</ButtonLink>}
        />
        <div className="rec-bar">
          <SearchForm
            action="/vehicles"
            label="Find a vehicle"
            placeholder="Make, model, plate, VIN or customer"
            query={query}
            clearHref="/vehicles"
          />
        </div>
        {rows.length > 0 ? (
          <VehiclesTable rows={rows} />
        ) : (
          <div className="rec-none">
            {query ? (
              <EmptyState title={`Nothing matches “${query}”`}>
                A make, a model, a plate, part of a VIN or the customer’s name finds the vehicle.
              </EmptyState>
            ) : (
              <EmptyState title="No vehicle yet" acts={<ButtonLink href="/cases/new">New case</ButtonLink>}>
                A vehicle is kept with its first case. Take the first one in.
              </EmptyState>
            )}
          </div>
        )}
        <MoreLink
          href={list.isMore && last ? address("/vehicles", { after: placeOf(last.id, last.label) }) : null}
          firstHref={after ? "/vehicles" : null}
        />
      </main>
    </>
  );
}
