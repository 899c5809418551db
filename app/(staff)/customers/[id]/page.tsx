import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { CasesTable } from "@/components/cases/cases-table";
import { OwnedVehicles } from "@/components/customers/owned-vehicles";
import { Facts } from "@/components/records/facts";
import { PageHead } from "@/components/records/page-head";
import { MoreLink } from "@/components/records/search-form";
import { ButtonLink } from "@/components/ui/button";
import { formatDate } from "@/components/ui/format";
import { EmptyState } from "@/components/ui/states";
import { mayDo } from "@/lib/auth/permissions";
import { pageCtx } from "@/lib/auth/session";
import { AppError } from "@/lib/errors";
import { customerVisits, listHistory, readCustomer } from "@/lib/services/customers/read";
import { readShop } from "@/lib/services/shops/read";
import { EditDialog } from "../../_client/edit-dialog";
import { LiveRefresh } from "../../_client/live-refresh";
import { address, type Search, wholeNumber } from "../../_views/address";
import { historyGroups, visitsWords } from "../../_views/history";
import { StaffTop } from "../../_views/staff-top";
import { engineWords } from "../../_views/words";
import { customerFields } from "../_views/fields";
import "../../records.css";

export const metadata: Metadata = { title: "Customer" };

interface Props {
  params: Promise<{ id: string }>;
  searchParams: Promise<Search>;
}

export default async function CustomerPage({ params, searchParams }: Props) {
  const ctx = await pageCtx();
  const { id } = await params;
  const before = wholeNumber((await searchParams).before);
  const { customer, vehicles } = await readCustomer(ctx, id).catch((error) => {
    if (error instanceof AppError && error.code === "not_found") notFound();
    throw error;
  });
  const { shop, settings } = await readShop(ctx);
  const { timeZone } = settings;
  const history = await listHistory(ctx, { customerId: id }, before);
  const visits = (await customerVisits(ctx, [id])).get(id);
  const path = `/customers/${id}`;
  const [only] = vehicles;
  const newCase =
    vehicles.length === 1 && only ? { customer: id, vehicle: only.id } : ({ customer: id } as Record<string, string>);
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current="customers" />
      <LiveRefresh />
      <main id="main" className="page rec">
        <PageHead
          title={customer.name}
          sub={visitsWords(visits?.visits ?? 0, visits?.last ?? null, timeZone)}
          acts={
            <>
              {mayDo(ctx.actor.role, "customer.edit") && (
                <EditDialog
                  label="Change"
                  spoken={`Change ${customer.name}`}
                  title={`Change ${customer.name}`}
                  verb="customer.save"
                  input={{ id, version: customer.version }}
                  fields={customerFields(customer)}
                  sendLabel="Save the customer"
                />
              )}
              <ButtonLink href={address("/cases/new", newCase)}>New case</ButtonLink>
            </>
          }
        />
        <div className="rec-two">
          <section className="sec" aria-labelledby="reached">
            <header>
              <h2 id="reached">Reached at</h2>
            </header>
            <Facts
              facts={[
                {
                  label: "Phone",
                  value: customer.phone ?? "",
                  isMono: true,
                  href: customer.phone ? `tel:${customer.phone.replaceAll(/[^+\d]/g, "")}` : undefined,
                },
                {
                  label: "E-mail",
                  value: customer.email ?? "",
                  href: customer.email ? `mailto:${customer.email}` : undefined,
                },
                { label: "Address", value: customer.address ?? "" },
                { label: "Note", value: customer.note ?? "" },
                { label: "Known since", value: formatDate(customer.createdAt.toISOString(), timeZone) },
              ]}
            />
          </section>
          <section className="sec" aria-labelledby="vehicles">
            <header>
              <h2 id="vehicles">{vehicles.length === 1 ? "Vehicle" : "Vehicles"}</h2>
            </header>
            {vehicles.length > 0 ? (
              <OwnedVehicles
                vehicles={vehicles.map((vehicle) => ({
                  id: vehicle.id,
                  href: `/vehicles/${vehicle.id}`,
                  label: vehicle.modelYear ? `${vehicle.label}, ${vehicle.modelYear}` : vehicle.label,
                  plate: vehicle.plate,
                  vin: vehicle.vin,
                  engine: engineWords(vehicle.engine),
                  newCaseHref: address("/cases/new", { customer: id, vehicle: vehicle.id }),
                }))}
              />
            ) : (
              <p className="soft">None yet. A vehicle is kept with its first case.</p>
            )}
          </section>
        </div>
        <section className="cases rec-history" aria-labelledby="history">
          <h2 id="history">Cases</h2>
          {history.rows.length > 0 ? (
            <CasesTable
              groups={historyGroups(history.rows, ctx.now, timeZone)}
              caption={`Cases of ${customer.name}, newest first`}
            />
          ) : (
            <EmptyState
              title="No case yet"
              level={3}
              acts={<ButtonLink href={address("/cases/new", newCase)}>New case</ButtonLink>}
            >
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
