import Link from "next/link";
import type { VehicleRowView } from "./model";

/** The vehicles by make and model; a row is one link. */
export function VehiclesTable({ rows }: { rows: readonly VehicleRowView[] }) {
  return (
    <table className="tbl rec-list rec-cars">
      <caption className="vh">Vehicles by make and model</caption>
      <thead>
        <tr>
          <th scope="col">Vehicle</th>
          <th scope="col">Plate</th>
          <th scope="col">Customer</th>
          <th scope="col">Engine</th>
          <th scope="col" className="r">
            Visits
          </th>
          <th scope="col">Last visit</th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.id} className="rec-row">
            <td className="nowrap rec-name">
              <Link href={row.href}>{row.label}</Link>
            </td>
            <td className="num faint rec-plate">{row.plate}</td>
            <td className="nowrap rec-who">{row.customer}</td>
            <td className="cut soft rec-rest" title={row.engine}>
              {row.engine || <span className="faint">nothing known yet</span>}
            </td>
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
