import Link from "next/link";
import type { ReactNode } from "react";
import { ScrollX } from "@/components/ui/scroll-x";
import { EmptyState } from "@/components/ui/states";

export interface CustomerRowView {
  id: string;
  href: string;
  name: string;
  contact: string;
  visits: number;
  /** "1 December 2026". */
  lastVisit: string | null;
}

export interface VehicleRowView {
  id: string;
  href: string;
  label: string;
  plate: string | null;
  vin: string | null;
  customer: string;
  odometer: string | null;
}

interface ListPageProps {
  title: string;
  sub?: string;
  acts?: ReactNode;
  more?: { label: string; href: string };
}

/** Customers by name; one row is one link. */
export function CustomersPage({ title, sub, acts, more, rows }: ListPageProps & { rows: readonly CustomerRowView[] }) {
  return (
    <ListPage
      title={title}
      sub={sub}
      acts={acts}
      more={more}
      isEmpty={rows.length === 0}
      emptyTitle="No customer yet"
      emptyText="They come with their first case."
    >
      <table className="tbl">
        <caption className="vh">Customers</caption>
        <thead>
          <tr>
            <th scope="col">Name</th>
            <th scope="col">Phone and e-mail</th>
            <th scope="col" className="r">
              Cases
            </th>
            <th scope="col">Last here</th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.id} className="row">
              <th scope="row" className="first">
                <Link href={row.href}>{row.name}</Link>
              </th>
              <td className="soft">{row.contact}</td>
              <td className="r num">{row.visits}</td>
              <td>{row.lastVisit ?? <span className="faint">never</span>}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ListPage>
  );
}

export function VehiclesPage({ title, sub, acts, more, rows }: ListPageProps & { rows: readonly VehicleRowView[] }) {
  return (
    <ListPage
      title={title}
      sub={sub}
      acts={acts}
      more={more}
      isEmpty={rows.length === 0}
      emptyTitle="No vehicle yet"
      emptyText="They come with their first case."
    >
      <table className="tbl">
        <caption className="vh">Vehicles</caption>
        <thead>
          <tr>
            <th scope="col">Vehicle</th>
            <th scope="col">Plate</th>
            <th scope="col">VIN</th>
            <th scope="col">Customer</th>
            <th scope="col" className="r">
              Odometer
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.id} className="row">
              <th scope="row" className="first">
                <Link href={row.href}>{row.label}</Link>
              </th>
              <td className="num faint">{row.plate}</td>
              <td className="num faint">{row.vin}</td>
              <td>{row.customer}</td>
              <td className="r num">{row.odometer}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ListPage>
  );
}

interface FrameProps extends ListPageProps {
  isEmpty: boolean;
  emptyTitle: string;
  emptyText: string;
  children: ReactNode;
}

function ListPage({ title, sub, acts, more, isEmpty, emptyTitle, emptyText, children }: FrameProps) {
  return (
    <main id="main" className="page cases listpage">
      <div className="mainhead">
        <div>
          <h1>{title}</h1>
          {sub && <p>{sub}</p>}
        </div>
        {acts && <div className="acts">{acts}</div>}
      </div>
      {isEmpty ? <EmptyState title={emptyTitle}>{emptyText}</EmptyState> : <ScrollX label="List">{children}</ScrollX>}
      {more && (
        <p className="showmore">
          <Link className="btn quiet" href={more.href} scroll={false}>
            {more.label}
          </Link>
        </p>
      )}
    </main>
  );
}
