import { KIND_WORDS, type PartRowView, type SetJobView, URGENCY_WORDS } from "@/components/prices/model";
import { OperationsTable, PartsTable, RatesTable, SetJobsList } from "@/components/prices/price-tables";
import { Facts } from "@/components/records/facts";
import { MoreLink } from "@/components/records/search-form";
import { formatPrice, formatQuantity } from "@/components/ui/format";
import { EmptyState } from "@/components/ui/states";
import type { Ctx } from "@/lib/auth/context";
import { mayDo } from "@/lib/auth/permissions";
import { CAUSES } from "@/lib/diagnosis/causes";
import {
  listOperations,
  listParts,
  listSetJobs,
  type PriceQuery,
  type readPriceHead,
} from "@/lib/services/prices/read";
import type { ShopSettings } from "@/lib/shops/schema";
import { EditDialog } from "../../_client/edit-dialog";
import { address, placeOf } from "../../_views/address";
import { SetJobDialog } from "../_client/set-job-dialog";
import {
  CONDITION_WORDS,
  KIND_LABELS,
  operationFields,
  PURPOSE_WORDS,
  partFields,
  rateFields,
  taxFields,
} from "./fields";
import { marginWords, sumOf } from "./margin";

export interface SectionProps {
  ctx: Ctx;
  settings: ShopSettings;
  rates: Awaited<ReturnType<typeof readPriceHead>>["rates"];
  query: PriceQuery;
}

export const CAUSE_OPTIONS = Object.values(CAUSES)
  .map(({ id, title }) => ({ value: id as string, label: title }))
  .sort((a, b) => a.label.localeCompare(b.label));

export const mayRate = (ctx: Ctx, settings: ShopSettings) =>
  mayDo(ctx.actor.role, "price.rates") && (ctx.actor.role === "owner" || settings.writersMaySetRates);

function Nothing({ query, what }: { query: string; what: string }) {
  return (
    <div className="rec-none">
      {query ? (
        <EmptyState title={`Nothing matches “${query}”`}>Any part of a name or a number finds it.</EmptyState>
      ) : (
        <EmptyState title={`No ${what} yet`}>What is kept here is offered by name while a quote is written.</EmptyState>
      )}
    </div>
  );
}

function More({
  list,
  query,
  last,
  isMore,
}: {
  list: string;
  query: PriceQuery;
  last?: { id: string; name: string };
  isMore: boolean;
}) {
  const first = address("/prices", { list, q: query.query });
  return (
    <MoreLink
      href={isMore && last ? address("/prices", { list, q: query.query, after: placeOf(last.id, last.name) }) : null}
      firstHref={query.after ? first : null}
    />
  );
}

export async function LabourSection({ ctx, settings, rates, query }: SectionProps) {
  const { currency, locale } = settings;
  const price = (minor: number) => formatPrice(minor, currency, locale);
  const { rows, isMore } = await listOperations(ctx, query);
  const isRateEditor = mayRate(ctx, settings);
  const isOperationEditor = mayDo(ctx.actor.role, "price.parts");
  const active = rates.filter((rate) => rate.isActive);
  return (
    <>
      {!query.query && !query.after && (
        <section aria-labelledby="rates" className="rec-section">
          <header>
            <h2 id="rates">Labour rates</h2>
            {isRateEditor && (
              <EditDialog
                label="New rate"
                small
                title="New labour rate"
                verb="price.saveRate"
                input={{}}
                fields={rateFields(currency)}
                sendLabel="Save the rate"
              />
            )}
          </header>
          <RatesTable
            rows={rates.map((rate) => ({
              id: rate.id,
              name: rate.name,
              purpose: PURPOSE_WORDS[rate.purpose] ?? rate.purpose,
              perHour: price(rate.perHourMinor),
              isActive: rate.isActive,
              act: isRateEditor && (
                <EditDialog
                  label="Change"
                  spoken={`Change the rate ${rate.name}`}
                  look="link"
                  title={`Change the rate ${rate.name}`}
                  verb="price.saveRate"
                  input={{ id: rate.id, version: rate.version }}
                  fields={rateFields(currency, rate)}
                  sendLabel="Save the rate"
                />
              ),
            }))}
          />
          {!isRateEditor && (
            <p className="note">
              {ctx.actor.role === "writer"
                ? "Rates are the owner’s to change, unless the shop’s settings let service writers do it."
                : "Rates are the owner’s to change."}
            </p>
          )}
        </section>
      )}
      <section aria-labelledby="operations" className="rec-section">
        <header>
          <h2 id="operations">Labour operations</h2>
          {isOperationEditor && active.length > 0 && (
            <EditDialog
              label="New operation"
              small
              title="New labour operation"
              verb="price.saveOperation"
              input={{}}
              fields={operationFields(active)}
              sendLabel="Save the operation"
            />
          )}
        </header>
        {rows.length > 0 ? (
          <OperationsTable
            rows={rows.map((row) => {
              const rate = rates.find((each) => each.id === row.rateId);
              return {
                id: row.id,
                name: row.name,
                hours: formatQuantity(row.hoursMilli),
                rate: rate ? `${rate.name}, ${price(rate.perHourMinor)}` : "",
                price: rate ? price(sumOf(row.hoursMilli, rate.perHourMinor)) : "",
                isActive: row.isActive,
                act: isOperationEditor && (
                  <EditDialog
                    label="Change"
                    spoken={`Change ${row.name}`}
                    look="link"
                    title={`Change ${row.name}`}
                    verb="price.saveOperation"
                    input={{ id: row.id, version: row.version }}
                    fields={operationFields(rates, row)}
                    sendLabel="Save the operation"
                  />
                ),
              };
            })}
          />
        ) : (
          <Nothing query={query.query} what="labour operation" />
        )}
        <More list="labour" query={query} last={rows.at(-1)} isMore={isMore} />
      </section>
    </>
  );
}

export async function PartsSection({ ctx, settings, query }: SectionProps) {
  const { currency, locale } = settings;
  const price = (minor: number) => formatPrice(minor, currency, locale);
  const { rows, isMore } = await listParts(ctx, query);
  const maySeeCost = mayDo(ctx.actor.role, "cost.see");
  const isEditor = mayDo(ctx.actor.role, "price.parts");
  const views = rows.map(
    (row): PartRowView => ({
      id: row.id,
      name: row.name,
      number: row.number,
      condition: CONDITION_WORDS[row.condition] ?? row.condition,
      ...(row.costMinor === null
        ? {}
        : {
            cost: price(row.costMinor),
            margin: marginWords(row.costMinor, row.priceMinor),
            isLoss: row.costMinor > row.priceMinor,
          }),
      price: price(row.priceMinor),
      isActive: row.isActive,
      act: isEditor && (
        <EditDialog
          label="Change"
          spoken={`Change ${row.name}, ${row.number}`}
          look="link"
          title={`Change ${row.name}`}
          verb="price.savePart"
          input={{ id: row.id, version: row.version }}
          fields={partFields(currency, row)}
          isWide
          sendLabel="Save the part"
        />
      ),
    }),
  );
  return (
    <section aria-labelledby="parts" className="rec-section">
      <header>
        <h2 id="parts">Parts</h2>
        {isEditor && (
          <EditDialog
            label="New part"
            small
            title="New part"
            verb="price.savePart"
            input={{}}
            fields={partFields(currency)}
            isWide
            sendLabel="Save the part"
          />
        )}
      </header>
      {maySeeCost && <p className="note">Margin is what is left of the price after the cost, in parts of the price.</p>}
      {views.length > 0 ? (
        <PartsTable rows={views} maySeeCost={maySeeCost} />
      ) : (
        <Nothing query={query.query} what="part" />
      )}
      <More list="parts" query={query} last={rows.at(-1)} isMore={isMore} />
    </section>
  );
}

export async function SetJobsSection({ ctx, settings, rates, query }: SectionProps) {
  const { currency, locale } = settings;
  const price = (minor: number) => formatPrice(minor, currency, locale);
  const { rows, isMore } = await listSetJobs(ctx, query);
  const maySeeCost = mayDo(ctx.actor.role, "cost.see");
  const isEditor = mayDo(ctx.actor.role, "price.setJobs");
  const common = {
    causes: CAUSE_OPTIONS,
    rates: rates.filter((rate) => rate.isActive).map(({ id, name, perHourMinor }) => ({ id, name, perHourMinor })),
    currency,
    locale,
    maySeeCost,
  };
  const views = rows.map((row): SetJobView => {
    const cause = row.causeId ? CAUSES[row.causeId as keyof typeof CAUSES] : null;
    const urgency = row.urgency as keyof typeof URGENCY_WORDS;
    return {
      id: row.id,
      name: row.name,
      customerTitle: row.customerTitle,
      cause: cause ? { family: cause.family, title: cause.title } : null,
      urgency: URGENCY_WORDS[urgency] ?? row.urgency,
      ifWaits: row.ifWaits,
      net: price(row.lines.reduce((sum, line) => sum + sumOf(line.quantityMilli, line.unitPriceMinor), 0)),
      isActive: row.isActive,
      lines: row.lines.map((line) => ({
        id: line.id,
        kind: KIND_WORDS[line.kind].toLowerCase(),
        description: line.description,
        partNumber: line.partNumber ?? undefined,
        quantity: `${formatQuantity(line.quantityMilli)}${line.kind === "labour" || line.kind === "diagnosis" ? " h" : ""}`,
        each: price(line.unitPriceMinor),
        sum: price(sumOf(line.quantityMilli, line.unitPriceMinor)),
        cost: line.costMinor == null ? undefined : price(line.costMinor),
      })),
      act: isEditor && (
        <SetJobDialog
          {...common}
          label="Change this set job"
          spoken={`Change ${row.name}`}
          job={{
            id: row.id,
            version: row.version,
            name: row.name,
            customerTitle: row.customerTitle,
            causeId: row.causeId,
            urgency,
            ifWaits: row.ifWaits,
            lines: row.lines,
            isActive: row.isActive,
          }}
        />
      ),
    };
  });
  return (
    <section aria-labelledby="set-jobs" className="rec-section">
      <header>
        <h2 id="set-jobs">Set jobs</h2>
        {isEditor && (
          <SetJobDialog
            {...common}
            label="New set job"
            job={{
              name: "",
              customerTitle: "",
              causeId: null,
              urgency: "now",
              ifWaits: "",
              lines: [],
              isActive: true,
            }}
          />
        )}
      </header>
      {views.length > 0 ? (
        <SetJobsList jobs={views} maySeeCost={maySeeCost} />
      ) : (
        <Nothing query={query.query} what="set job" />
      )}
      <More list="jobs" query={query} last={rows.at(-1)} isMore={isMore} />
    </section>
  );
}

export function TaxSection({
  ctx,
  settings,
  shop,
}: Pick<SectionProps, "ctx" | "settings"> & { shop: { name: string; version: number } }) {
  const isEditor = mayDo(ctx.actor.role, "price.taxes") && mayDo(ctx.actor.role, "settings.edit");
  const kinds = settings.taxKinds.map((kind) => KIND_LABELS[kind].toLowerCase());
  return (
    <section aria-labelledby="tax" className="rec-section rec-narrow">
      <header>
        <h2 id="tax">Tax</h2>
        {isEditor && (
          <EditDialog
            label="Change"
            spoken="Change the tax"
            look="link"
            title="Change the tax"
            intro="Quotes already sent and papers already issued keep the tax they were made with."
            verb="shop.saveSettings"
            input={{ name: shop.name, version: shop.version, settings }}
            fields={taxFields(settings)}
            sendLabel="Save the tax"
          />
        )}
      </header>
      <Facts
        facts={[
          { label: "Name", value: settings.taxName },
          { label: "Rate", value: `${settings.taxBasisPoints / 100} %`, isMono: true },
          { label: "Charged on", value: kinds.join(", ") || "nothing" },
          {
            label: "Rounded",
            value: settings.rounding === "sum-then-tax" ? "once, on the tax of the sum" : "line by line, then summed",
          },
          { label: "Currency", value: settings.currency, isMono: true },
        ]}
      />
      {!isEditor && <p className="note">Tax is the owner’s to change.</p>}
    </section>
  );
}
