import { formatPrice } from "@/components/ui/format";
import { answerName, reasonName, riskName } from "./form-names";
import { quantityWords } from "./measured";
import type { GivenAnswers, RevisionSnapshot } from "./model";

type Job = RevisionSnapshot["jobs"][number];
const NEED = {
  now: { className: "need now", words: "Needed now", height: 7, y: 1 },
  soon: { className: "need soon", words: "Soon", height: 3, y: 3 },
  optional: { className: "need choice", words: "Your choice", height: 1, y: 4 },
} as const;
const KIND: Record<string, string> = {
  labour: "Work",
  part: "Part",
  sublet: "Done elsewhere",
  fee: "Fee",
  diagnosis: "Finding the fault",
};

export interface JobAnswerProps {
  job: Job;
  snapshot: RevisionSnapshot;
  given?: GivenAnswers;
  error?: string;
  /** The preview shows the page, but answers nothing. */
  isPreview?: boolean;
}

/** One job: how soon, the price with tax, what happens if it waits, what it is made of, yes or not now. */
export function JobAnswer({ job, snapshot, given, error, isPreview }: JobAnswerProps) {
  const { currency, locale } = snapshot;
  const title = job.customerTitle || job.title;
  const total = formatPrice(job.totalMinor, currency, locale);
  const needs = job.dependsOnId ? snapshot.jobs.find((other) => other.id === job.dependsOnId) : undefined;
  const need = NEED[job.urgency];
  const errorId = `why-${job.id}`;
  const noteId = `needs-${job.id}`;
  return (
    <li className="cj" data-job={job.id}>
      <div className="cjh">
        <span className={need.className}>
          <svg className="in" width="16" height="9" viewBox="0 0 16 9" aria-hidden="true">
            <rect y={need.y} width="16" height={need.height} fill="currentColor" />
          </svg>
          {need.words}
        </span>
        <span className="price">{total}</span>
      </div>
      <h3>{title}</h3>
      {job.ifWaits && (
        <p className="wait">
          <b>If it waits:</b> {job.ifWaits}
        </p>
      )}
      <details className="det">
        <summary className="link">What the {total} is made of</summary>
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
                  <span className="faint">
                    {" "}
                    {KIND[line.kind] ?? line.kind}
                    {line.condition && `, ${line.condition}`}
                  </span>
                </th>
                <td>{quantityWords(line.quantityMilli, line.kind, locale)}</td>
                <td>{formatPrice(line.netMinor, currency, locale)}</td>
              </tr>
            ))}
            <tr>
              <th scope="row">{snapshot.tax.name}</th>
              <td />
              <td>{formatPrice(job.taxMinor, currency, locale)}</td>
            </tr>
          </tbody>
        </table>
      </details>
      {needs && (
        <p className="needs" id={noteId}>
          Priced together with “{needs.customerTitle || needs.title}”. It can’t be done alone at this price.
        </p>
      )}
      <fieldset
        className="yn"
        disabled={isPreview}
        aria-describedby={[error && errorId, needs && noteId].filter(Boolean).join(" ") || undefined}
      >
        <legend className="vh">{title}</legend>
        <label>
          <input
            type="radio"
            name={answerName(job.id)}
            value="yes"
            required
            defaultChecked={given?.answers[job.id] === "yes"}
            data-price={job.totalMinor}
            data-needs={job.dependsOnId ?? undefined}
          />
          Yes, do it
        </label>
        <label>
          <input
            type="radio"
            name={answerName(job.id)}
            value="not-now"
            required
            defaultChecked={given?.answers[job.id] === "not-now"}
          />
          Not now
        </label>
      </fieldset>
      {error && (
        <p className="why" id={errorId}>
          <span className="bang" aria-hidden="true">
            !
          </span>
          <span>{error}</span>
        </p>
      )}
      {!isPreview && (
        <div className="ifno">
          {job.isSafety && (
            <label className="check">
              <input type="checkbox" name={riskName(job.id)} />
              <span>
                I have read what may happen. This job concerns safety; without it the vehicle may not be safe to drive.
              </span>
            </label>
          )}
          <div className="field">
            <label htmlFor={`r-${job.id}`}>
              Why not now? <span className="opt">optional</span>
            </label>
            <input
              className="input"
              id={`r-${job.id}`}
              name={reasonName(job.id)}
              maxLength={260}
              defaultValue={given?.reasons[job.id]}
            />
          </div>
        </div>
      )}
    </li>
  );
}
