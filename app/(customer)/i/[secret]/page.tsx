import type { Metadata } from "next";
import { LinkOver } from "@/components/approve/link-over";
import { Measured } from "@/components/approve/measured";
import { formatPrice, formatWhen } from "@/components/ui/format";
import { requestFacts } from "@/lib/auth/session";
import { readCustomerInvoice } from "@/lib/services/quotes/customer-read";
import { openLink } from "@/lib/services/quotes/links";

export const metadata: Metadata = { title: "Your invoice", robots: { index: false } };

export default async function InvoicePage({ params }: { params: Promise<{ secret: string }> }) {
  const { secret } = await params;
  const opened = await openLink(secret, await requestFacts());
  if (!opened || opened.ctx.link?.kind !== "invoice") return <LinkOver why="unknown" shop={null} />;
  const shop = { ...opened.shop, address: "", registration: "" };
  if (opened.state !== "open")
    return <LinkOver why={opened.state === "revoked" ? "withdrawn" : "expired"} shop={shop} />;
  const { snapshot, paidMinor, kind } = await readCustomerInvoice(opened.ctx);
  const money = (minor: number) => formatPrice(minor, snapshot.currency, snapshot.locale);
  const owed = snapshot.totals.totalMinor - paidMinor;
  const { release, vehicle } = snapshot;
  const before = snapshot.readings.flatMap((reading) => (reading.before ? [reading.before] : []));
  const after = snapshot.readings.flatMap((reading) => (reading.after ? [reading.after] : []));
  return (
    <>
      <header className="ch">
        <b>{snapshot.shop.name}</b>
        {snapshot.shop.phone && (
          <a className="link" href={`tel:${snapshot.shop.phone.replaceAll(/[^+\d]/g, "")}`}>
            Call us
          </a>
        )}
      </header>
      <main className="cust done" id="main">
        <div className="tell">
          <p className="for">
            {vehicle.label}
            {vehicle.plate && `, plate ${vehicle.plate}`}
          </p>
          <h1>{release ? "Your vehicle leaves as it came" : "Repaired, and measured again"}</h1>
          <p className="lede">{release ? release.reason : snapshot.correction}</p>
          {release?.notSafeToDrive && (
            <p>
              <span className="alarm">Not safe to drive.</span>{" "}
              {release.acknowledgedBy && `Told to ${release.acknowledgedBy}.`}
            </p>
          )}
          {release?.safetyNote && <p className="lede">{release.safetyNote}</p>}
          {before.length > 0 && (
            <section aria-labelledby="inv-before">
              <h2 id="inv-before">{after.length > 0 ? "Before" : "What we measured"}</h2>
              <Measured readings={before} />
            </section>
          )}
          {after.length > 0 && (
            <section aria-labelledby="inv-after">
              <h2 id="inv-after">After</h2>
              <Measured readings={after} />
              {snapshot.proof && <p className="by">{snapshot.proof}</p>}
            </section>
          )}
        </div>
        <div className="decide">
          <section className="sign" aria-labelledby="inv-sum">
            <h2 id="inv-sum">{kind === "release" ? "Nothing is owed" : `Invoice ${snapshot.number}`}</h2>
            <dl className="sum">
              {snapshot.diagnosis && (
                <div>
                  <dt>Finding the fault</dt>
                  <dd>{money(snapshot.diagnosis.totalMinor)}</dd>
                </div>
              )}
              {snapshot.jobs.map((job) => (
                <div key={job.title} className="yes">
                  <dt>{job.title}</dt>
                  <dd>{money(job.totalMinor)}</dd>
                </div>
              ))}
              {snapshot.notDone.map((job) => (
                <div key={job.title} className="no">
                  <dt>{job.title}</dt>
                  <dd>not done</dd>
                </div>
              ))}
              <div className="tot">
                <dt>Total, tax included</dt>
                <dd>{money(snapshot.totals.totalMinor)}</dd>
              </div>
              {paidMinor > 0 && (
                <div>
                  <dt>Paid</dt>
                  <dd>{money(paidMinor)}</dd>
                </div>
              )}
              {paidMinor > 0 && (
                <div>
                  <dt>Still owed</dt>
                  <dd>{money(owed)}</dd>
                </div>
              )}
            </dl>
            <a className="btn full" href={`/i/${secret}/paper`}>
              Get the paper, PDF
            </a>
            <p className="by">
              Issued {formatWhen(snapshot.issuedAt, opened.ctx.now.toISOString(), snapshot.timeZone)},{" "}
              {snapshot.timeZone} time. {snapshot.warranty}
            </p>
          </section>
        </div>
      </main>
    </>
  );
}
