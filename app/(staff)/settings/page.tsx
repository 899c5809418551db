import type { Metadata } from "next";
import { PageHead } from "@/components/records/page-head";
import { FilterTabs } from "@/components/ui/filter-tabs";
import { mayDo } from "@/lib/auth/permissions";
import { pageCtx } from "@/lib/auth/session";
import { readShop } from "@/lib/services/shops/read";
import { one, type Search } from "../_views/address";
import { OwnersOnly } from "../_views/owners-only";
import { StaffTop } from "../_views/staff-top";
import { ShopFormClient } from "./_client/shop-form-client";
import { PeopleSection } from "./_views/people-section";
import "../records.css";

export const metadata: Metadata = { title: "Settings" };

export default async function SettingsPage({ searchParams }: { searchParams: Promise<Search> }) {
  const ctx = await pageCtx();
  if (!mayDo(ctx.actor.role, "settings.edit"))
    return (
      <OwnersOnly
        ctx={ctx}
        current="settings"
        title="The settings are the owner’s to change"
        what="They hold the shop’s facts, its taxes, its texts and its people."
      />
    );
  const isPeople = one((await searchParams).part) === "people";
  const { shop, settings } = await readShop(ctx);
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current="settings" />
      <main id="main" className="page rec">
        <PageHead title="Settings," titleNote={shop.name} />
        <div className="rec-bar tabs">
          <FilterTabs
            label="Which settings"
            tabs={[
              { label: "Shop", href: "/settings", current: !isPeople },
              { label: "People", href: "/settings?part=people", current: isPeople },
            ]}
          />
        </div>
        {isPeople ? (
          <PeopleSection ctx={ctx} timeZone={settings.timeZone} />
        ) : (
          <ShopFormClient
            shop={{ name: shop.name, version: shop.version, settings }}
            timeZones={Intl.supportedValuesOf("timeZone")}
            currencies={Intl.supportedValuesOf("currency")}
          />
        )}
      </main>
    </>
  );
}
