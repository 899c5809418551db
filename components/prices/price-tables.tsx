import { Glyph } from "@/components/ui/glyph";
import type { OperationRowView, PartRowView, RateRowView, SetJobView } from "./model";

const retired = (isActive: boolean) => (isActive ? undefined : "rec-retired");

function Retired({ isActive }: { isActive: boolean }) {
  return isActive ? null : <span className="faint"> no longer offered</span>;
}

export function RatesTable({ rows }: { rows: readonly RateRowView[] }) {
  const mayChange = rows.some((row) => row.act);
  return (
    <table className="tbl rec-prices">
      <caption className="vh">Labour rates, before tax</caption>
      <thead>
        <tr>
          <th scope="col">Rate</th>
          <th scope="col">For</th>
          <th scope="col" className="r">
            An hour
          </th>
          {mayChange && <ActHead />}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.id} className={retired(row.isActive)}>
            <th scope="row">
              {row.name}
              <Retired isActive={row.isActive} />
            </th>
            <td className="soft">{row.purpose}</td>
            <td className="num r">{row.perHour}</td>
            {mayChange && <td className="rec-act">{row.act}</td>}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

export function OperationsTable({ rows }: { rows: readonly OperationRowView[] }) {
  const mayChange = rows.some((row) => row.act);
  return (
    <table className="tbl rec-prices">
      <caption className="vh">Labour operations by name, before tax</caption>
      <thead>
        <tr>
          <th scope="col">Operation</th>
          <th scope="col" className="r">
            Hours
          </th>
          <th scope="col" className="rec-fold">
            At the rate
          </th>
          <th scope="col" className="r">
            Price
          </th>
          {mayChange && <ActHead />}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.id} className={retired(row.isActive)}>
            <th scope="row">
              {row.name}
              <Retired isActive={row.isActive} />
            </th>
            <td className="num r">{row.hours}</td>
            <td className="soft rec-fold">{row.rate}</td>
            <td className="num r">{row.price}</td>
            {mayChange && <td className="rec-act">{row.act}</td>}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

export function PartsTable({ rows, maySeeCost }: { rows: readonly PartRowView[]; maySeeCost: boolean }) {
  const mayChange = rows.some((row) => row.act);
  return (
    <table className="tbl rec-prices">
      <caption className="vh">Parts by name, before tax</caption>
      <thead>
        <tr>
          <th scope="col">Part</th>
          <th scope="col" className="rec-fold">
            Number
          </th>
          <th scope="col" className="rec-fold">
            Condition
          </th>
          {maySeeCost && (
            <>
              <th scope="col" className="r rec-fold">
                Cost
              </th>
              <th scope="col" className="r">
                Margin
              </th>
            </>
          )}
          <th scope="col" className="r">
            Price
          </th>
          {mayChange && <ActHead />}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.id} className={retired(row.isActive)}>
            <th scope="row">
              {row.name}
              <Retired isActive={row.isActive} />
            </th>
            <td className="num faint rec-fold">{row.number}</td>
            <td className="soft rec-fold">{row.condition}</td>
            {maySeeCost && (
              <>
                <td className="num faint r rec-fold">{row.cost}</td>
                <td className="num r">{row.isLoss ? <span className="alarm">{row.margin}</span> : row.margin}</td>
              </>
            )}
            <td className="num r">{row.price}</td>
            {mayChange && <td className="rec-act">{row.act}</td>}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function ActHead() {
  return (
    <th scope="col">
      <span className="vh">Change</span>
    </th>
  );
}

/** Set jobs as they are quoted: a rule, a title, the cause they answer, their lines. */
export function SetJobsList({ jobs, maySeeCost }: { jobs: readonly SetJobView[]; maySeeCost: boolean }) {
  return (
    <div className="rec-jobs">
      {jobs.map((job) => (
        <details key={job.id} className={retired(job.isActive)}>
          <summary>
            <span className="rec-jobname">
              {job.name}
              <Retired isActive={job.isActive} />
            </span>
            <span className="soft rec-jobcause">
              {job.cause ? (
                <>
                  <Glyph family={job.cause.family} /> {job.cause.title}
                </>
              ) : (
                "asked for, without a cause"
              )}
            </span>
            <span className="faint rec-joburgency">{job.urgency}</span>
            <span className="num r">{job.net}</span>
          </summary>
          <div className="rec-job">
            <p>
              The customer reads <span className="said">{job.customerTitle}</span>
              {job.ifWaits && (
                <>
                  , and if it waits <span className="said">{job.ifWaits}</span>
                </>
              )}
            </p>
            {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a table wider than its place scrolls, and must be reached by keyboard */}
            <section className="scrollx" tabIndex={0} aria-label={`Lines of ${job.name}`}>
              <table className="tbl">
                <caption className="vh">Lines of {job.name}, before tax</caption>
                <thead>
                  <tr>
                    <th scope="col">Kind</th>
                    <th scope="col">What</th>
                    <th scope="col" className="r">
                      Quantity
                    </th>
                    {maySeeCost && (
                      <th scope="col" className="r">
                        Cost
                      </th>
                    )}
                    <th scope="col" className="r">
                      Each
                    </th>
                    <th scope="col" className="r">
                      Sum
                    </th>
                  </tr>
                </thead>
                <tbody>
                  {job.lines.map((line) => (
                    <tr key={line.id}>
                      <td className="soft">{line.kind}</td>
                      <th scope="row">
                        {line.description} {line.partNumber && <span className="num faint">{line.partNumber}</span>}
                      </th>
                      <td className="num r">{line.quantity}</td>
                      {maySeeCost && <td className="num faint r">{line.cost}</td>}
                      <td className="num r">{line.each}</td>
                      <td className="num r">{line.sum}</td>
                    </tr>
                  ))}
                </tbody>
              </table>
            </section>
            {job.act}
          </div>
        </details>
      ))}
    </div>
  );
}
