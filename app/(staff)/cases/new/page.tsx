import type { Metadata } from "next";
import { mayDo } from "@/lib/auth/permissions";
import { pageCtx } from "@/lib/auth/session";
import { findCustomers, readCustomer } from "@/lib/services/customers/read";
import { readShop } from "@/lib/services/shops/read";
import { StaffTop } from "../../_views/staff-top";
import { customerChoice } from "../../_views/words";
import { NewCaseClient } from "./_client/new-case-client";

export const metadata: Metadata = { title: "New case" };

export default async function NewCasePage({
  searchParams,
}: {
  searchParams: Promise<{ customer?: string; vehicle?: string; comeback?: string }>;
}) {
  const ctx = await pageCtx();
  const { shop, settings, staff } = await readShop(ctx);
  const { customer: customerId, vehicle, comeback } = await searchParams;
  const known = customerId ? await readCustomer(ctx, customerId).catch(() => null) : null;
  const choice = known
    ? (await findCustomers(ctx, known.customer.name)).find((each) => each.customer.id === known.customer.id)
    : undefined;
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current="cases" />
      <NewCaseClient
        customer={choice ? customerChoice(choice, settings.timeZone) : undefined}
        vehicleId={vehicle}
        comebackOf={comeback}
        technicians={staff
          .filter((person) => person.role === "technician" || person.role === "owner")
          .map(({ id, name }) => ({ id, name }))}
        currency={settings.currency}
        locale={settings.locale}
        timeZone={settings.timeZone}
        now={ctx.now.toISOString()}
        units={settings.units}
        defaultCeilingMinor={settings.defaultCeilingMinor}
        mayAuthorize={mayDo(ctx.actor.role, "diagnosis.authorize")}
        draftKey={ctx.shopId}
      />
    </>
  );
}
