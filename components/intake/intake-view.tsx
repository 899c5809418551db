import Link from "next/link";
import type { ReactNode } from "react";
import { Caution } from "@/components/ui/caution";
import type { IntakeView } from "./model";

export interface IntakePartProps {
  intake: IntakeView;
  /** Buttons: edit, record a yes, raise the ceiling. */
  acts?: ReactNode;
  /** The gate to testing. */
  gate?: ReactNode;
}

/** What was said and agreed; read-only, with what was agreed at the right. */
export function IntakePart({ intake, acts, gate }: IntakePartProps) {
  const { customer, vehicle } = intake;
  return (
    <div className="g intakepart">
      <div>
        <section className="fs" aria-labelledby="in-said">
          <h2 id="in-said">Complaint</h2>
          <div className="stack">
            {intake.cautions.map((caution) => (
              <Caution key={caution.title} title={caution.title}>
                {caution.text}
              </Caution>
            ))}
            <p className="said big">{intake.words}</p>
            <dl className="kv">
              <Row label="What that is">{intake.complaints.join(", ") || <span className="faint">not said</span>}</Row>
              <Row label="When">
                {[...intake.circumstances, intake.conditionNote].filter(Boolean).join(", ") || (
                  <span className="faint">not said</span>
                )}
              </Row>
              <Row label="Before it came">
                {intake.history.join(", ") || <span className="faint">nothing told</span>}
              </Row>
              <Row label="How it came">{intake.arrival}</Row>
              <Row label="Odometer">{intake.odometer}</Row>
            </dl>
          </div>
        </section>
        <section className="fs" aria-labelledby="in-who">
          <h2 id="in-who">Customer and vehicle</h2>
          <dl className="kv">
            <Row label="Customer">
              {customer.href ? (
                <Link className="link" href={customer.href}>
                  {customer.name}
                </Link>
              ) : (
                customer.name
              )}{" "}
              <span className="faint">{customer.contact}</span>
            </Row>
            <Row label="Vehicle">
              {vehicle.href ? (
                <Link className="link" href={vehicle.href}>
                  {vehicle.label}
                </Link>
              ) : (
                vehicle.label
              )}{" "}
              {vehicle.plate && <span className="num faint">{vehicle.plate}</span>}
            </Row>
            <Row label="VIN">
              {vehicle.vin ? <span className="num">{vehicle.vin}</span> : <span className="faint">none</span>}
            </Row>
            <Row label="Engine">{vehicle.engineWords || <span className="faint">not known</span>}</Row>
          </dl>
        </section>
        {intake.photos.length > 0 && (
          <section className="fs" aria-labelledby="in-photos">
            <h2 id="in-photos">Photos</h2>
            <div className="photorow">
              {intake.photos.map((photo) => (
                // biome-ignore lint/performance/noImgElement: signed addresses of private files
                <img
                  key={photo.id}
                  className="photo"
                  src={photo.src}
                  alt={photo.alt}
                  width={photo.width}
                  height={photo.height}
                  loading="lazy"
                />
              ))}
            </div>
          </section>
        )}
      </div>
      <aside className="ready" aria-label="What was agreed">
        <h2>Agreed</h2>
        {intake.authorizations.length === 0 ? (
          <p className="soft">No yes to the diagnosis is recorded yet.</p>
        ) : (
          <ol>
            {intake.authorizations.map((yes) => (
              <li key={`${yes.when}-${yes.amount}`}>
                <b className="num">{yes.amount}</b>, tax included
                <br />
                <span className="faint">
                  {yes.givenBy}, {yes.how.toLowerCase()}, {yes.when}; taken by {yes.takenBy}
                </span>
                {yes.words && <p className="said">{yes.words}</p>}
              </li>
            ))}
          </ol>
        )}
        <dl className="kv">
          <Row label="Promised">{intake.promise ? intake.promise.words : <span className="faint">nothing</span>}</Row>
          <Row label="Technician">{intake.technician ?? <span className="faint">not yet given</span>}</Row>
          <Row label="Old parts">{intake.keepParts ? "kept for the customer" : "need not be kept"}</Row>
          <Row label="On the road">{intake.roadTestAllowed ? "allowed" : "not allowed"}</Row>
        </dl>
        {acts && <div className="acts wrap h2b">{acts}</div>}
        {gate && <div className="h2b">{gate}</div>}
      </aside>
    </div>
  );
}

function Row({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div>
      <dt>{label}</dt>
      <dd>{children}</dd>
    </div>
  );
}
