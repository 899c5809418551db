"use client";

import { type CellValue, EditableTable, type EditableTableProps, type EditRow } from "@/components/ui/editable-table";
import { formatPrice, formatQuantity } from "@/components/ui/format";

type OnSave = EditableTableProps["onSave"];

export interface PricesPageProps {
  currency: string;
  locale: string;
  /** values: name, purpose, perHourMinor. */
  rates: readonly EditRow[];
  /** values: name, hoursMilli, rateId. */
  operations: readonly EditRow[];
  /** values: number, name, costMinor, priceMinor, condition. */
  parts: readonly EditRow[];
  setJobs: readonly {
    id: string;
    name: string;
    customerTitle: string;
    lines: number;
    totalMinor: number;
    href?: string;
  }[];
  maySeeCost: boolean;
  /** Left out where the person may only read. */
  onSaveRate?: OnSave;
  onSaveOperation?: OnSave;
  onSavePart?: OnSave;
  /** Who may: "Hester Quillon changes rates". */
  readOnlyWhy?: string;
}

const CONDITIONS = [
  { value: "new", label: "new" },
  { value: "rebuilt", label: "rebuilt" },
  { value: "used", label: "used" },
];
const PURPOSES = [
  { value: "general", label: "Repair" },
  { value: "diagnosis", label: "Diagnosis" },
  { value: "warranty", label: "Warranty" },
];

/** Rates, operations, parts and set jobs: what a line of a quote is made from. */
export function PricesPage(props: PricesPageProps) {
  const { currency, locale, rates } = props;
  const rateOptions = rates.map((rate) => ({ value: rate.id, label: String(rate.values.name) }));
  const perHour = (rateId: unknown) => Number(rates.find((rate) => rate.id === rateId)?.values.perHourMinor ?? 0);
  const common = { currency, locale, readOnlyWhy: props.readOnlyWhy };
  return (
    <main id="main" className="page pricelist">
      <div className="mainhead">
        <div>
          <h1>
            {[counted(rates, "rate"), counted(props.operations, "operation"), counted(props.parts, "part")].join(", ")}
          </h1>
          <p>
            Prices before tax. A change holds for new lines; sent quotes and cases with an agreed ceiling keep theirs.
          </p>
        </div>
      </div>
      <EditableTable
        {...common}
        caption="Labour rates"
        addLabel="Add a rate"
        rows={rates}
        onSave={props.onSaveRate}
        columns={[
          { key: "name", label: "Rate", kind: "text" },
          { key: "purpose", label: "For", kind: "choice", options: PURPOSES },
          { key: "perHourMinor", label: "An hour", kind: "money" },
        ]}
      />
      <EditableTable
        {...common}
        caption="Operations"
        addLabel="Add an operation"
        needsReason={false}
        rows={props.operations}
        onSave={props.onSaveOperation}
        columns={[
          { key: "name", label: "Operation", kind: "text" },
          { key: "rateId", label: "Rate", kind: "choice", options: rateOptions },
          { key: "hoursMilli", label: "Hours", kind: "milli" },
          {
            key: "price",
            label: "Price",
            kind: "computed",
            show: (v) =>
              formatPrice(Math.round((perHour(v.rateId) * Number(v.hoursMilli ?? 0)) / 1000), currency, locale),
          },
        ]}
      />
      <EditableTable
        {...common}
        caption="Parts"
        addLabel="Add a part"
        needsReason={false}
        rows={props.parts}
        onSave={props.onSavePart}
        columns={[
          { key: "name", label: "Part", kind: "text" },
          { key: "number", label: "Number", kind: "text", mono: true },
          { key: "condition", label: "Condition", kind: "choice", options: CONDITIONS },
          ...(props.maySeeCost
            ? ([
                { key: "costMinor", label: "Cost", kind: "money" },
                {
                  key: "markup",
                  label: "Markup",
                  kind: "computed",
                  show: (v: Record<string, CellValue>) =>
                    Number(v.costMinor) > 0 ? `×${(Number(v.priceMinor) / Number(v.costMinor)).toFixed(2)}` : "",
                },
              ] as const)
            : []),
          { key: "priceMinor", label: "Price", kind: "money" },
        ]}
      />
      <section className="edittable" aria-labelledby="sj-head">
        <div className="edithead">
          <h2 id="sj-head">Set jobs</h2>
        </div>
        {props.setJobs.length === 0 ? (
          <p className="soft">None yet. A job of a quote can be kept as one.</p>
        ) : (
          <table className="tbl">
            <caption className="vh">Set jobs</caption>
            <thead>
              <tr>
                <th scope="col">Job</th>
                <th scope="col">For the customer</th>
                <th scope="col" className="r">
                  Lines
                </th>
                <th scope="col" className="r">
                  Price
                </th>
              </tr>
            </thead>
            <tbody>
              {props.setJobs.map((job) => (
                <tr key={job.id}>
                  <th scope="row">
                    {job.href ? (
                      <a className="link" href={job.href}>
                        {job.name}
                      </a>
                    ) : (
                      job.name
                    )}
                  </th>
                  <td className="soft">{job.customerTitle}</td>
                  <td className="r num">{formatQuantity(job.lines * 1000)}</td>
                  <td className="r num">{formatPrice(job.totalMinor, currency, locale)}</td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
      </section>
    </main>
  );
}

function counted(rows: readonly EditRow[], word: string): string {
  const count = rows.filter((row) => row.isActive !== false).length;
  return `${count} ${word}${count === 1 ? "" : "s"}`;
}
