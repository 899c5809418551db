import Link from "next/link";
import type { ReactNode } from "react";
import { BandMark } from "@/components/ui/band-mark";
import type { Band } from "@/components/ui/band-scale";
import { cx } from "@/components/ui/cx";
import type { Family } from "@/components/ui/family";
import { ScrollX } from "@/components/ui/scroll-x";
import { Words } from "@/components/ui/words";

export interface VisitRowView {
  number: string;
  href: string;
  /** "1 December 2026". */
  when: string;
  vehicle?: string;
  complaint: string;
  outcome: string;
}

/** One reading over the visits: a band mark a visit. */
export interface OverTimeView {
  label: string;
  unit: string;
  visits: readonly {
    when: string;
    number: string;
    value: number;
    text: string;
    band: Band;
    family: Family | null;
    isQuiet?: boolean;
  }[];
}

export interface RecordPageProps {
  /** "Juniper Tock, three cases" or "Corvid Marlin 2.4, 2012". */
  title: string;
  sub?: string;
  acts?: ReactNode;
  facts: readonly { label: string; value: ReactNode }[];
  visits: readonly VisitRowView[];
  /** Vehicles of a customer, the customer of a vehicle. */
  related?: { title: string; links: readonly { href: string; label: string; note?: string }[] };
  overTime?: readonly OverTimeView[];
  children?: ReactNode;
}

/** A customer's or a vehicle's page: visits, what is on file, readings over time. */
export function RecordPage({ title, sub, acts, facts, visits, related, overTime = [], children }: RecordPageProps) {
  return (
    <main id="main" className="page">
      <div className="mainhead">
        <div>
          <h1>{title}</h1>
          {sub && <p>{sub}</p>}
        </div>
        {acts && <div className="acts">{acts}</div>}
      </div>
      <div className="record">
        <div>
          <section aria-labelledby="visits-head" className="sec">
            <header>
              <h2 id="visits-head">Cases</h2>
            </header>
            {visits.length === 0 ? (
              <p className="soft">None yet.</p>
            ) : (
              <ScrollX label="Cases">
                <table className="tbl">
                  <caption className="vh">Cases</caption>
                  <thead>
                    <tr>
                      <th scope="col">No.</th>
                      <th scope="col">Opened</th>
                      {visits.some((visit) => visit.vehicle) && <th scope="col">Vehicle</th>}
                      <th scope="col">Complaint</th>
                      <th scope="col">How it ended</th>
                    </tr>
                  </thead>
                  <tbody>
                    {visits.map((visit) => (
                      <tr key={visit.number}>
                        <td className="num">
                          <Link className="link" href={visit.href}>
                            {visit.number}
                          </Link>
                        </td>
                        <td className="nowrap">{visit.when}</td>
                        {visits.some((other) => other.vehicle) && <td>{visit.vehicle}</td>}
                        <td className="cut soft" title={visit.complaint}>
                          {visit.complaint}
                        </td>
                        <td>
                          <Words>{visit.outcome}</Words>
                        </td>
                      </tr>
                    ))}
                  </tbody>
                </table>
              </ScrollX>
            )}
          </section>
          {overTime.length > 0 && <OverTime rows={overTime} />}
          {children}
        </div>
        <aside aria-label="On file">
          <section className="sec">
            <header>
              <h2>On file</h2>
            </header>
            <dl className="kv">
              {facts.map((fact) => (
                <div key={fact.label}>
                  <dt>{fact.label}</dt>
                  <dd>{fact.value}</dd>
                </div>
              ))}
            </dl>
          </section>
          {related && (
            <section className="sec">
              <header>
                <h2>{related.title}</h2>
              </header>
              <ul>
                {related.links.map((link) => (
                  <li key={link.href}>
                    <Link className="link" href={link.href}>
                      {link.label}
                    </Link>{" "}
                    <span className="faint">{link.note}</span>
                  </li>
                ))}
              </ul>
            </section>
          )}
        </aside>
      </div>
    </main>
  );
}

function OverTime({ rows }: { rows: readonly OverTimeView[] }) {
  return (
    <section className="sec" aria-labelledby="time-head">
      <header>
        <h2 id="time-head">Readings over time</h2>
        <span className="label">idling, as found, one mark a visit</span>
      </header>
      <table className="tbl overtime">
        <caption className="vh">Readings over time</caption>
        <thead className="vh">
          <tr>
            <th scope="col">Reading</th>
            <th scope="col">Visits</th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.label}>
              <th scope="row">
                <Words>{row.label}</Words> <span className="faint">{row.unit}</span>
              </th>
              <td className="marks">
                {row.visits.map((visit) => (
                  <span className={cx("visit", visit.family)} key={`${visit.number}-${visit.when}`}>
                    <span className="label">
                      {visit.when}, {visit.number}
                    </span>
                    <span>
                      <BandMark value={visit.value} band={visit.band} family={visit.family} isQuiet={visit.isQuiet} />
                      <b className={cx("num", visit.family && "dev")}>{visit.text}</b>
                    </span>
                  </span>
                ))}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
