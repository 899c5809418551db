import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { CasesTable } from "@/components/cases/cases-table";
import { Facts } from "@/components/records/facts";
import { PageHead } from "@/components/records/page-head";
import { MoreLink } from "@/components/records/search-form";
import { ButtonLink } from "@/components/ui/button";
import { formatNumber } from "@/components/ui/format";
import { Bang, Tick } from "@/components/ui/icons";
import { EmptyMark, EmptyState } from "@/components/ui/states";
import { kmShown } from "@/components/ui/units";
import { ReadingsOverTime } from "@/components/vehicles/readings-over-time";
import { mayDo } from "@/lib/auth/permissions";
import { pageCtx } from "@/lib/auth/session";
import { vehicleSchema } from "@/lib/diagnosis/case-file";
import { AppError } from "@/lib/errors";
import { listHistory, readVehicle, vehicleVisits } from "@/lib/services/customers/read";
import { readShop } from "@/lib/services/shops/read";
import { EditDialog } from "../../_client/edit-dialog";
import { LiveRefresh } from "../../_client/live-refresh";
import { address, type Search, wholeNumber } from "../../_views/address";
import { historyGroups, visitsWords } from "../../_views/history";
import { StaffTop } from "../../_views/staff-top";
import { engineWords } from "../../_views/words";
import { engineFields, vehicleFields } from "../_views/fields";
import { readingsOverTime } from "../_views/over-time";
import { vinView } from "../_views/vin-words";
import "../../records.css";

export const metadata: Metadata = { title: "Vehicle" };

interface Props {
  params: Promise<{ id: string }>;
  searchParams: Promise<Search>;
}

export default async function VehiclePage({ params, searchParams }: Props) {
  const ctx = await pageCtx();
  const { id } = await params;
  const before = wholeNumber((await searchParams).before);
  const { vehicle, customer, visits, readings } = await readVehicle(ctx, id).catch((error) => {
    if (error instanceof AppError && error.code === "not_found") notFound();
    throw error;
  });
  const { shop, settings } = await readShop(ctx);
  const { timeZone, units, locale } = settings;
  const history = await listHistory(ctx, { vehicleId: id }, before);
  const count = (await vehicleVisits(ctx, [id])).get(id);
  const path = `/vehicles/${id}`;
  const title = vehicle.modelYear ? `${vehicle.label}, ${vehicle.modelYear}` : vehicle.label;
  const newCase = address("/cases/new", { customer: customer.id, vehicle: id });
  const vin = vehicle.vin ? vinView(vehicle.vin) : null;
  const parsed = vehicleSchema.safeParse(vehicle.engine);
  const engine = parsed.success ? parsed.data : vehicleSchema.parse({});
  const mayEdit = mayDo(ctx.actor.role, "vehicle.edit");
  const kept = {
    id,
    version: vehicle.version,
    customerId: customer.id,
    label: vehicle.label,
    plate: vehicle.plate ?? undefined,
    vin: vehicle.vin ?? undefined,
    modelYear: vehicle.modelYear ?? undefined,
    engine: vehicle.engine,
    note: vehicle.note ?? undefined,
  };
  const time = readingsOverTime(visits, readings, {
    engine: vehicle.engine,
    modelYear: vehicle.modelYear,
    units,
    timeZone,
    locale,
  });
  const words = engineWords(vehicle.engine);
  const odometer = visits.map((visit) => visit.odometerOutKm ?? visit.odometerInKm).find((km) => km !== null);
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current="vehicles" />
      <LiveRefresh />
      <main id="main" className="page rec">
        <PageHead
          title={title}
          sub={
            <>
              {visitsWords(count?.visits ?? 0, count?.last ?? null, timeZone)}. Belongs to{" "}
              <Link className="link" href={`/customers/${customer.id}`}>
                {customer.name}
              </Link>
              .
            </>
          }
          acts={<ButtonLink href={newCase}>New case</ButtonLink>}
        />
        <div className="rec-two">
          <section className="sec" aria-labelledby="known">
            <header>
              <h2 id="known">Known by</h2>
              {mayEdit && (
                <EditDialog
                  label="Change"
                  spoken={`Change what ${title} is known by`}
                  look="link"
                  title={`Change ${title}`}
                  verb="vehicle.save"
                  input={kept}
                  fields={vehicleFields(vehicle)}
                  sendLabel="Save the vehicle"
                />
              )}
            </header>
            <Facts
              facts={[
                { label: "Plate", value: vehicle.plate ?? "", isMono: true },
                { label: "VIN", value: vehicle.vin ?? "", isMono: true },
                {
                  label: "Odometer",
                  value:
                    odometer == null
                      ? ""
                      : `${formatNumber(kmShown(odometer, units), 0, { locale })} ${units.distance} at the last visit`,
                },
                { label: "Note", value: vehicle.note ?? "" },
              ]}
            />
            {vin && (
              <p className={vin.state === "fits" ? "note rec-vin" : "why rec-vin"}>
                {vin.state === "fits" ? <Tick /> : <Bang />} <span>{vin.words}</span>
              </p>
            )}
          </section>
          <section className="sec" aria-labelledby="engine">
            <header>
              <h2 id="engine">Engine</h2>
              {mayEdit && (
                <EditDialog
                  label="Change"
                  spoken={`Change the engine facts of ${title}`}
                  look="link"
                  title={`Engine of ${title}`}
                  intro="The assessment reads these: what an engine does not have can’t be at fault. Open cases are judged by them from now on."
                  verb="vehicle.save"
                  input={kept}
                  fields={engineFields(engine)}
                  isWide
                  sendLabel="Save the engine facts"
                />
              )}
            </header>
            {words ? (
              <p className="rec-engine">{words}.</p>
            ) : (
              <p className="soft">
                Nothing is known of the engine yet. Say at least how fuel and air get in: it rules causes out before the
                first test.
              </p>
            )}
          </section>
        </div>
        <section className="sec rec-over" aria-labelledby="over-time">
          <header>
            <h2 id="over-time">Readings over time</h2>
          </header>
          {time.visits.length > 0 ? (
            <ReadingsOverTime
              caption={`Readings of ${title}, a line a visit, newest first`}
              columns={time.columns}
              visits={time.visits}
            />
          ) : (
            <EmptyState title="No readings yet" level={3} mark={<EmptyMark />}>
              Readings of each visit will stand under one another here, so that a slow change is seen.
            </EmptyState>
          )}
        </section>
        <section className="cases rec-history" aria-labelledby="history">
          <h2 id="history">Cases</h2>
          {history.rows.length > 0 ? (
            <CasesTable
              groups={historyGroups(history.rows, ctx.now, timeZone)}
              caption={`Cases of ${title}, newest first`}
            />
          ) : (
            <EmptyState title="No case yet" level={3} acts={<ButtonLink href={newCase}>New case</ButtonLink>}>
              What was found and done at each visit will stand here.
            </EmptyState>
          )}
          <MoreLink
            href={history.next ? address(path, { before: history.next }) : null}
            firstHref={before ? path : null}
          />
        </section>
      </main>
    </>
  );
}
