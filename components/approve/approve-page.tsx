import type { ReactNode } from "react";
import { formatDate } from "@/components/ui/format";
import { kmShown } from "@/components/ui/units";
import { AgreeButton, AnswerBar, AnswerLive, AnswerSummary, OfflineNotice } from "./answer-live";
import { JobAnswer } from "./job-answer";
import { Measured } from "./measured";
import type { ApproveView, CustomerPhoto, FormTarget, GivenAnswers, QuestionView, RevisionSnapshot } from "./model";

export interface ApprovePageProps extends ApproveView {
  /** Takes the answers: an address for a POST, or a server action. */
  answerAction: FormTarget;
  /** Takes a question. */
  questionAction: FormTarget;
  /** What was typed, when the page comes back with a fault. */
  given?: GivenAnswers;
  /** Faults by field: a job's id, "givenBy", "mayDecide", "form", "question". */
  errors?: Record<string, string>;
  /** Keeps answers on the phone until sent; the revision's id does. */
  keepKey: string;
}

const FORM_ID = "answers";
const ASK_ID = "question-form";

/** The customer's page. It works as one plain form; scripts add the running total. Day only. */
export function ApprovePage({
  snapshot,
  photos,
  questions,
  answerAction,
  questionAction,
  given,
  errors = {},
  keepKey,
}: ApprovePageProps) {
  return (
    <CustomerFrame snapshot={snapshot}>
      <AnswerLive snapshot={snapshot} formId={FORM_ID} keepKey={`fd-answers-${keepKey}`}>
        <OfflineNotice />
        <main className="custmain" id="main">
          <div className="tell">
            <p className="for">
              For {snapshot.customer.name}. {vehicleWords(snapshot)}
            </p>
            <Tell snapshot={snapshot} photos={photos} />
          </div>
          <div className="decide">
            <h2 className="dh">Your decision</h2>
            <p className="dsub">
              Say yes or no to each. Nothing is done that you have not agreed to, and the price cannot rise without
              asking you again.
            </p>
            {errors.form && <Fault id="form-fault">{errors.form}</Fault>}
            <form
              id={ASK_ID}
              action={questionAction}
              method={typeof questionAction === "string" ? "post" : undefined}
            />
            <form id={FORM_ID} action={answerAction} method={typeof answerAction === "string" ? "post" : undefined}>
              <ol>
                {snapshot.jobs.map((job) => (
                  <JobAnswer key={job.id} job={job} snapshot={snapshot} given={given} error={errors[job.id]} />
                ))}
              </ol>
              <Questions questions={questions} error={errors.question} />
              <section className="sign" id="sign" aria-labelledby="sign-head">
                <h2 id="sign-head">Agree</h2>
                <AnswerSummary snapshot={snapshot} />
                <div className="field">
                  <label htmlFor="givenBy">Your full name</label>
                  <input
                    className="input"
                    id="givenBy"
                    name="givenBy"
                    autoComplete="name"
                    required
                    minLength={2}
                    maxLength={120}
                    defaultValue={given?.givenBy}
                    aria-invalid={errors.givenBy ? true : undefined}
                    aria-describedby={errors.givenBy ? "givenBy-why" : undefined}
                  />
                  {errors.givenBy && <Fault id="givenBy-why">{errors.givenBy}</Fault>}
                </div>
                <label className="check">
                  <input type="checkbox" name="mayDecide" required />
                  <span>I am the owner of this vehicle or may decide for its owner.</span>
                </label>
                <label className="check">
                  <input type="checkbox" name="keepParts" defaultChecked={given?.keepParts ?? snapshot.keepParts} />
                  <span>Keep the replaced parts for me.</span>
                </label>
                <label className="check">
                  <input type="checkbox" name="byMail" defaultChecked={snapshot.customer.email !== null} />
                  <span>Papers may come by e-mail instead of on paper.</span>
                </label>
                <AgreeButton snapshot={snapshot} />
                <Small snapshot={snapshot} />
              </section>
            </form>
          </div>
        </main>
        <AnswerBar snapshot={snapshot} targetId="sign" />
      </AnswerLive>
    </CustomerFrame>
  );
}

/** What is wrong in one sentence, the readings, the photos. Also the head of the preview. */
export function Tell({
  snapshot,
  photos,
  isPreview,
}: {
  snapshot: RevisionSnapshot;
  photos: readonly CustomerPhoto[];
  isPreview?: boolean;
}) {
  const Head = isPreview ? "h3" : "h1";
  return (
    <>
      <Head className={isPreview ? "hl" : undefined}>{snapshot.headline}</Head>
      <p className="lede">{snapshot.finding}</p>
      {snapshot.readings.length > 0 && (
        <section aria-label="What we measured">
          {!isPreview && <h2>What we measured</h2>}
          {!isPreview && snapshot.readingsTitle && <p>{snapshot.readingsTitle}</p>}
          <Measured
            readings={snapshot.readings}
            scaleNote={/fuel/i.test(snapshot.readingsTitle) ? "more fuel added" : undefined}
          />
          {!isPreview && snapshot.readingsNote && <p className="by">{snapshot.readingsNote}</p>}
        </section>
      )}
      {photos.length > 0 && (
        <section aria-label="What we saw">
          {!isPreview && <h2>What we saw</h2>}
          {photos.map((photo) => (
            <figure key={photo.id}>
              {/* biome-ignore lint/performance/noImgElement: signed addresses of private files */}
              <img className="photo" src={photo.src} alt={photo.alt} width={640} height={400} loading="lazy" />
              {photo.caption && <figcaption className="by">{photo.caption}</figcaption>}
            </figure>
          ))}
        </section>
      )}
    </>
  );
}

function Questions({ questions, error }: { questions: readonly QuestionView[]; error?: string }) {
  return (
    <section className="ask" aria-labelledby="ask-head">
      <h3 id="ask-head">A question first?</h3>
      {questions.length > 0 && <Thread questions={questions} />}
      <textarea
        className="input"
        form={ASK_ID}
        name="text"
        rows={2}
        required
        maxLength={1000}
        aria-label="Your question to the shop"
        placeholder="Read at the counter and answered by message"
        aria-invalid={error ? true : undefined}
      />
      {error && <Fault id="ask-why">{error}</Fault>}
      <button className="btn quiet" type="submit" form={ASK_ID}>
        Send the question
      </button>
    </section>
  );
}

/** Questions and answers in their order. */
export function Thread({ questions }: { questions: readonly QuestionView[] }) {
  return (
    <ol className="thread">
      {questions.map((question) => (
        <li key={question.id} className={question.from}>
          <p>{question.text}</p>
          <p className="by">
            {question.name}, {question.when}
          </p>
        </li>
      ))}
    </ol>
  );
}

function Fault({ id, children }: { id: string; children: ReactNode }) {
  return (
    <p className="why" id={id} role="alert">
      <span className="bang" aria-hidden="true">
        !
      </span>
      <span>{children}</span>
    </p>
  );
}

export function vehicleWords(snapshot: RevisionSnapshot): string {
  const { label, plate } = snapshot.vehicle;
  return plate ? `${label}, plate ${plate}` : label;
}

/** What the law of many places wants beside the price. */
function Small({ snapshot }: { snapshot: RevisionSnapshot }) {
  const { vehicle, shop } = snapshot;
  const units = { pressure: "kPa", temperature: "C", distance: vehicle.distanceUnit } as const;
  return (
    <div className="small">
      <p>
        {snapshot.customer.email ? "You get a copy by e-mail at once. " : ""}The link works until{" "}
        {formatDate(snapshot.validUntil, snapshot.timeZone)}. Times are those of the shop.
      </p>
      {snapshot.readyAt && (
        <p>
          Planned to be ready: {formatDate(snapshot.readyAt, snapshot.timeZone)},{" "}
          {clock(snapshot.readyAt, snapshot.timeZone)}.
        </p>
      )}
      {snapshot.warranty && <p>{snapshot.warranty}</p>}
      {snapshot.legal && <p>{snapshot.legal}</p>}
      <p>
        {snapshot.paperWord === "estimate" ? "Estimate" : "Quotation"} {snapshot.caseNumber}, revision {snapshot.number}
        .{vehicle.vin && ` VIN ${vehicle.vin}.`}
        {vehicle.odometerKm !== null &&
          ` Odometer ${kmShown(vehicle.odometerKm, units).toLocaleString(snapshot.locale)} ${vehicle.distanceUnit}.`}
      </p>
      <p>{[shop.name, shop.address, shop.registration].filter(Boolean).join(" · ")}</p>
    </div>
  );
}

function clock(iso: string, timeZone: string): string {
  return new Intl.DateTimeFormat("en-GB", { timeZone, hour: "2-digit", minute: "2-digit", hourCycle: "h23" }).format(
    new Date(iso),
  );
}

/** Shop and telephone at the head; day only whatever the device says. */
export function CustomerFrame({
  snapshot,
  children,
}: {
  snapshot: Pick<RevisionSnapshot, "shop">;
  children: ReactNode;
}) {
  const { name, phone } = snapshot.shop;
  return (
    <div className="custpage day-only">
      <header className="ch">
        <b>{name}</b>
        {phone && (
          <a className="link" href={`tel:${phone.replace(/[^+\d]/g, "")}`}>
            Call us
          </a>
        )}
      </header>
      {children}
    </div>
  );
}
