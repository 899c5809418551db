import Link from "next/link";
import type { CustomerRowView } from "./model";

/** The customers by name; a row is one link. */
export function CustomersTable({ rows }: { rows: readonly CustomerRowView[] }) {
  return (
    <table className="tbl rec-list">
      <caption className="vh">Customers by name</caption>
      <thead>
        <tr>
          <th scope="col">Name</th>
          <th scope="col">Reached at</th>
          <th scope="col" className="r">
            Visits
          </th>
          <th scope="col">Last visit</th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.id} className="rec-row">
            <td className="rec-name">
              <Link href={row.href}>{row.name}</Link>
            </td>
            <td className="soft rec-rest">{row.contact || <span className="faint">no phone or e-mail</span>}</td>
            <td className="num r rec-count">
              {row.visits}
              <span className="rec-small"> {row.visits === 1 ? "visit" : "visits"}</span>
            </td>
            <td className="nowrap rec-last">{row.lastVisit ?? <span className="faint">none yet</span>}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
