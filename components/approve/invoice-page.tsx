import { formatDate, formatPrice } from "@/components/ui/format";
import type { InvoiceSnapshot } from "@/lib/cases/paper-schema";
import { CustomerFrame } from "./approve-page";
import { Measured, quantityWords } from "./measured";
import type { FormTarget } from "./model";

export interface InvoicePageProps {
  invoice: InvoiceSnapshot;
  pdfHref: string;
  paidMinor: number;
  /** "paid by card, 16:58". */
  payments: readonly { words: string; amountMinor: number }[];
  /** Starts a card payment of what is owing: an address for a POST, or a server action. Absent: pay at the counter. */
  payAction?: FormTarget;
  /** Back from the card page: "Paid. Thank you." or why it was not. */
  notice?: { isFault: boolean; text: string };
}

/** What was done, measured before and after, the PDF, and paying. */
export function InvoicePage({ invoice, pdfHref, paidMinor, payments, payAction, notice }: InvoicePageProps) {
  const price = (minor: number) => formatPrice(minor, invoice.currency, invoice.locale);
  const owing = invoice.totals.totalMinor - paidMinor;
  const after = invoice.readings.flatMap((reading) =>
    reading.after ? [{ ...reading.after, label: `${reading.label}, now` }] : [],
  );
  const before = invoice.readings.flatMap((reading) =>
    reading.before ? [{ ...reading.before, label: `${reading.label}, before` }] : [],
  );
  const pairs = before.flatMap((reading, index) => (after[index] ? [reading, after[index]] : [reading]));
  return (
    <CustomerFrame snapshot={invoice}>
      <main className="custmain" id="main">
        <div className="tell">
          <p className="for">
            Invoice {invoice.number}, {formatDate(invoice.issuedAt, invoice.timeZone)}. {invoice.vehicle.label}
            {invoice.vehicle.plate && `, plate ${invoice.vehicle.plate}`}
          </p>
          <h1>{owing <= 0 ? "Paid, and done" : `${price(owing)} to pay`}</h1>
          {notice && (
            <p className={notice.isFault ? "alarm" : "lede"} role={notice.isFault ? "alert" : "status"}>
              {notice.text}
            </p>
          )}
          {invoice.release?.notSafeToDrive && (
            <p className="alarm" role="note">
              Not safe to drive. {invoice.release.safetyNote}
            </p>
          )}
          <p className="lede">{invoice.cause}</p>
          {invoice.correction && <p className="lede">{invoice.correction}</p>}
          {pairs.length > 0 && (
            <section aria-labelledby="inv-measured">
              <h2 id="inv-measured">Measured before and after</h2>
              <Measured readings={pairs} />
              {invoice.proof && <p className="by">{invoice.proof}</p>}
            </section>
          )}
        </div>
        <div className="decide">
          <h2 className="dh">What was done</h2>
          <div className="bill">
            {invoice.diagnosis && (
              <dl className="sum">
                <div>
                  <dt>Finding the fault, {quantityWords(invoice.diagnosis.hoursMilli, "diagnosis", invoice.locale)}</dt>
                  <dd>{price(invoice.diagnosis.netMinor)}</dd>
                </div>
              </dl>
            )}
            {invoice.jobs.map((job) => (
              <section key={job.title} className="cj">
                <div className="cjh">
                  <h3>{job.title}</h3>
                  <span className="price">{price(job.netMinor)}</span>
                </div>
                {job.correction && <p className="wait">{job.correction}</p>}
                <details className="det">
                  <summary className="link">Work and parts</summary>
                  <table className="made">
                    <thead className="vh">
                      <tr>
                        <th scope="col">What</th>
                        <th scope="col">Quantity</th>
                        <th scope="col">Price before tax</th>
                      </tr>
                    </thead>
                    <tbody>
                      {job.lines.map((line) => (
                        <tr key={line.id}>
                          <th scope="row">
                            {line.description}
                            {line.condition && <span className="faint"> {line.condition}</span>}
                          </th>
                          <td>{quantityWords(line.quantityMilli, line.kind, invoice.locale)}</td>
                          <td>{price(line.netMinor)}</td>
                        </tr>
                      ))}
                    </tbody>
                  </table>
                </details>
              </section>
            ))}
            {invoice.notDone.map((job) => (
              <p className="by" key={job.title}>
                {job.title}: {job.why}
              </p>
            ))}
          </div>
          <section className="sign" aria-labelledby="inv-total">
            <h2 id="inv-total">Total</h2>
            <dl className="sum">
              <div>
                <dt>Before tax</dt>
                <dd>{price(invoice.totals.netMinor)}</dd>
              </div>
              <div>
                <dt>{invoice.tax.name}</dt>
                <dd>{price(invoice.totals.taxMinor)}</dd>
              </div>
              <div className="tot">
                <dt>Total, tax included</dt>
                <dd>{price(invoice.totals.totalMinor)}</dd>
              </div>
              {payments.map((payment) => (
                <div key={payment.words}>
                  <dt>{payment.words}</dt>
                  <dd>{price(-payment.amountMinor)}</dd>
                </div>
              ))}
              <div>
                <dt>Owing</dt>
                <dd>{price(Math.max(0, owing))}</dd>
              </div>
            </dl>
            {owing > 0 &&
              (payAction ? (
                <form action={payAction} method={typeof payAction === "string" ? "post" : undefined}>
                  <button className="btn full" type="submit">
                    Pay {price(owing)} by card
                  </button>
                </form>
              ) : (
                <p>Pay at the counter, or call us.</p>
              ))}
            <a className="btn quiet full" href={pdfHref}>
              Get the paper, PDF
            </a>
            {invoice.partsReturned && <p className="by">{invoice.partsReturned}</p>}
            {invoice.warranty && <p className="by">{invoice.warranty}</p>}
            <p className="by">
              {[invoice.shop.name, invoice.shop.address, invoice.shop.registration].filter(Boolean).join(" · ")}
            </p>
          </section>
        </div>
      </main>
    </CustomerFrame>
  );
}
