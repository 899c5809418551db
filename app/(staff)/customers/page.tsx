import type { Metadata } from "next";
import { CustomersTable } from "@/components/customers/customers-table";
import { PageHead } from "@/components/records/page-head";
import { MoreLink, SearchForm } from "@/components/records/search-form";
import { ButtonLink } from "@/components/ui/button";
import { formatDate } from "@/components/ui/format";
import { EmptyState } from "@/components/ui/states";
import { mayDo } from "@/lib/auth/permissions";
import { pageCtx } from "@/lib/auth/session";
import { customerVisits, findCustomers, listCustomers } from "@/lib/services/customers/read";
import { readShop } from "@/lib/services/shops/read";
import { EditDialog } from "../_client/edit-dialog";
import { address, placeOf, readPlace, type Search, typed } from "../_views/address";
import { StaffTop } from "../_views/staff-top";
import { contactWords } from "../_views/words";
import { customerFields } from "./_views/fields";
import "../records.css";

export const metadata: Metadata = { title: "Customers" };

const FOUND = 50;

export default async function CustomersPage({ searchParams }: { searchParams: Promise<Search> }) {
  const ctx = await pageCtx();
  const search = await searchParams;
  const query = typed(search.q);
  const after = readPlace(search.after);
  const { shop, settings } = await readShop(ctx);
  const list = query
    ? { rows: (await findCustomers(ctx, query, FOUND)).map(({ customer }) => customer), isMore: false }
    : await listCustomers(ctx, after ? { name: after.text, id: after.id } : null);
  const visits = await customerVisits(
    ctx,
    list.rows.map((row) => row.id),
  );
  const rows = list.rows.map((row) => {
    const count = visits.get(row.id);
    return {
      id: row.id,
      name: row.name,
      href: `/customers/${row.id}`,
      contact: contactWords(row),
      visits: count?.visits ?? 0,
      lastVisit: count?.last ? formatDate(count.last.toISOString(), settings.timeZone) : null,
    };
  });
  const last = list.rows.at(-1);
  const mayEdit = mayDo(ctx.actor.role, "customer.edit");
  const newCustomer = mayEdit && (
    <EditDialog
      label="New customer"
      title="New customer"
      look="act"
      verb="customer.save"
      input={{}}
      fields={customerFields()}
      sendLabel="Save the customer"
      goTo="/customers/"
    />
  );
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current="customers" />
      <main id="main" className="page rec">
        <PageHead
          title={query ? `${rows.length}${rows.length === FOUND ? " or more" : ""} found` : "Customers,"}
          titleNote={query ? `for “${query}”` : "by name"}
          acts={newCustomer}
        />
        <div className="rec-bar">
          <SearchForm
            action="/customers"
            label="Find a customer"
            placeholder="Name, phone, e-mail, plate or VIN"
            query={query}
            clearHref="/customers"
          />
        </div>
        {rows.length > 0 ? (
          <CustomersTable rows={rows} />
        ) : (
          <div className="rec-none">
            {query ? (
              <EmptyState title={`Nothing matches “${query}”`}>
                A name, a phone number, an e-mail address, a plate or a VIN: any part of it finds the customer.
              </EmptyState>
            ) : (
              <EmptyState title="No customer yet" acts={<ButtonLink href="/cases/new">New case</ButtonLink>}>
                A customer is kept with their first case. Take the first vehicle in.
              </EmptyState>
            )}
          </div>
        )}
        <MoreLink
          href={list.isMore && last ? address("/customers", { after: placeOf(last.id, last.name) }) : null}
          firstHref={after ? "/customers" : null}
        />
      </main>
    </>
  );
}
