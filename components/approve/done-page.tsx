import { capitalise, countWord, formatPrice } from "@/components/ui/format";
import { CustomerFrame, vehicleWords } from "./approve-page";
import type { DoneView, ProgressStep, RevisionSnapshot } from "./model";

/** After the answer: what was agreed, and the progress with who and when. */
export function DonePage({ done }: { done: DoneView }) {
  const { snapshot, yesJobIds } = done;
  const yes = snapshot.jobs.filter((job) => yesJobIds.includes(job.id));
  const no = snapshot.jobs.filter((job) => !yesJobIds.includes(job.id));
  const title =
    yes.length === 0
      ? "You said not now"
      : yes.length === 1
        ? "You agreed to one job"
        : `You agreed to ${countWord(yes.length)} jobs`;
  return (
    <CustomerFrame snapshot={snapshot}>
      <main className="custmain done" id="main">
        <div className="tell">
          <p className="for">{vehicleWords(snapshot)}</p>
          <h1>{title}</h1>
          <p className="lede">
            Recorded {done.recordedWords} under the name {done.givenBy}. {done.readyWords && `${done.readyWords}.`}
          </p>
          {done.steps.length > 0 && <Progress steps={done.steps} />}
        </div>
        <div className="decide">
          <section className="sign" aria-labelledby="done-head">
            <h2 id="done-head">{yes.length === 0 ? "What you answered" : "What you agreed to"}</h2>
            <AnsweredSummary snapshot={snapshot} yesJobIds={yesJobIds} totalMinor={done.totalMinor} />
            {done.payHref && (
              <a className="btn full" href={done.payHref}>
                Pay {formatPrice(done.totalMinor, snapshot.currency, snapshot.locale)}
              </a>
            )}
            {done.papers.map((paper) => (
              <a key={paper.href} className="btn quiet full" href={paper.href}>
                {paper.label}
              </a>
            ))}
            {no.length > 0 && (
              <p className="by">
                You said not now to {no.map((job) => `“${job.customerTitle || job.title}”`).join(" and ")}. We keep the
                note with your vehicle.
              </p>
            )}
          </section>
        </div>
      </main>
    </CustomerFrame>
  );
}

export function AnsweredSummary({
  snapshot,
  yesJobIds,
  totalMinor,
}: {
  snapshot: RevisionSnapshot;
  yesJobIds: readonly string[];
  totalMinor: number;
}) {
  const price = (minor: number) => formatPrice(minor, snapshot.currency, snapshot.locale);
  return (
    <dl className="sum">
      {snapshot.diagnosis && (
        <div>
          <dt>Finding the fault, agreed before</dt>
          <dd>{price(snapshot.diagnosis.totalMinor)}</dd>
        </div>
      )}
      {snapshot.agreed.map((job) => (
        <div key={job.title}>
          <dt>{job.title}, agreed before</dt>
          <dd>{price(job.totalMinor)}</dd>
        </div>
      ))}
      {snapshot.jobs.map((job) => {
        const isYes = yesJobIds.includes(job.id);
        return (
          <div key={job.id} className={isYes ? "yes" : "no"}>
            <dt>{job.customerTitle || job.title}</dt>
            <dd>{isYes ? price(job.totalMinor) : "not now"}</dd>
          </div>
        );
      })}
      <div className="tot">
        <dt>Total, tax included</dt>
        <dd>{price(totalMinor)}</dd>
      </div>
    </dl>
  );
}

/** A square line with who and when. */
export function Progress({ steps }: { steps: readonly ProgressStep[] }) {
  return (
    <ol className="prog" aria-label="Progress">
      {steps.map((step) => (
        <li
          key={step.label}
          className={step.state === "to-come" ? undefined : step.state}
          aria-current={step.state === "now" ? "step" : undefined}
        >
          <b>{capitalise(step.label)}</b>
          <span>{step.note}</span>
        </li>
      ))}
    </ol>
  );
}
