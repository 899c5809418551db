import type { Metadata } from "next";
import { PageHead } from "@/components/records/page-head";
import { SearchForm } from "@/components/records/search-form";
import { FilterTabs } from "@/components/ui/filter-tabs";
import { pageCtx } from "@/lib/auth/session";
import { readPriceHead } from "@/lib/services/prices/read";
import { readShop } from "@/lib/services/shops/read";
import { address, one, readPlace, type Search, typed } from "../_views/address";
import { StaffTop } from "../_views/staff-top";
import { LabourSection, PartsSection, SetJobsSection, TaxSection } from "./_views/sections";
import "../records.css";

export const metadata: Metadata = { title: "Prices" };

const LISTS = ["labour", "parts", "jobs", "tax"] as const;
const PLACEHOLDERS = { labour: "Operation", parts: "Part or number", jobs: "Set job", tax: "" } as const;

export default async function PricesPage({ searchParams }: { searchParams: Promise<Search> }) {
  const ctx = await pageCtx();
  const search = await searchParams;
  const list = LISTS.find((each) => each === one(search.list)) ?? "labour";
  const after = readPlace(search.after);
  const query = { query: typed(search.q), after: after ? { id: after.id, name: after.text } : null };
  const { shop, settings } = await readShop(ctx);
  const { rates, counts } = await readPriceHead(ctx);
  const section = { ctx, settings, rates, query };
  const tab = (value: (typeof LISTS)[number], label: string, count?: number) => ({
    label,
    href: address("/prices", { list: value }),
    count,
    current: list === value,
  });
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current="prices" />
      <main id="main" className="page rec">
        <PageHead
          title="Prices,"
          titleNote="before tax"
          sub="A change holds for new lines. What is sent or agreed keeps its price."
        />
        <div className="rec-bar tabs">
          <FilterTabs
            label="Which prices"
            tabs={[
              tab("labour", "Labour", counts.operations),
              tab("parts", "Parts", counts.parts),
              tab("jobs", "Set jobs", counts.setJobs),
              tab("tax", "Tax"),
            ]}
          />
          {list !== "tax" && (
            <SearchForm
              key={list}
              action="/prices"
              label={`Find in ${list === "jobs" ? "set jobs" : list}`}
              placeholder={PLACEHOLDERS[list]}
              query={query.query}
              keep={{ list }}
              clearHref={address("/prices", { list })}
            />
          )}
        </div>
        {list === "labour" && <LabourSection {...section} />}
        {list === "parts" && <PartsSection {...section} />}
        {list === "jobs" && <SetJobsSection {...section} />}
        {list === "tax" && <TaxSection ctx={ctx} settings={settings} shop={shop} />}
      </main>
    </>
  );
}
