"use client";

import { type ReactNode, useCallback, useEffect, useMemo, useRef, useState } from "react";
import type { CustomerPhoto, RevisionSnapshot } from "@/components/approve/model";
import { Button, WhyOff } from "@/components/ui/button";
import { Main } from "@/components/ui/case-frame";
import { Dialog } from "@/components/ui/dialog";
import { capitalise, countWord, formatNumber, formatPrice, formatQuantity } from "@/components/ui/format";
import { TextArea, TextInput } from "@/components/ui/inputs";
import { moneyEntry, parseMoney } from "@/components/ui/parse-entry";
import { SaveState, type SaveStateView } from "@/components/ui/save-state";
import { ConflictView } from "@/components/ui/states";
import { isoToZoned, zonedToIso } from "@/components/ui/zoned-time";
import { priceJob } from "@/lib/quote/job";
import { JobEditor } from "./job-editor";
import { jobCost } from "./line-price";
import type {
  CatalogueChoice,
  CauseChoice,
  JobFields,
  QuoteJobView,
  QuoteMoney,
  RateChoice,
  RevisionRowView,
  SaveResult,
} from "./model";
import { QuotePreview } from "./quote-preview";
import { RevisionList } from "./revisions";

export interface QuoteDraftView {
  version: number;
  headline: string;
  finding: string;
  warranty: string;
  readyAt: string | null;
  diagnosisNetMinor: number | null;
}

export interface QuotePartProps {
  /** Number of the revision being written. */
  number: number;
  customerName: string;
  jobs: readonly QuoteJobView[];
  draft: QuoteDraftView;
  /** What the customer's page would hold now (`snapshotOf`), edits laid over it as they are typed. */
  snapshot: RevisionSnapshot;
  photos: readonly CustomerPhoto[];
  money: QuoteMoney;
  timeZone: string;
  diagnosis: { words: string; hoursMilli: number; netMinor: number } | null;
  causes: readonly CauseChoice[];
  rates: readonly RateChoice[];
  setJobs: readonly { id: string; title: string; note: string }[];
  findInCatalogue?: (query: string) => Promise<CatalogueChoice[]>;
  revisions: readonly RevisionRowView[];
  maySeeCost: boolean;
  /** Technicians draft jobs and hours without prices. */
  mayPrice: boolean;
  maySend: boolean;
  /** The address it goes to; null: the link is handed over by hand. */
  sendTo: string | null;
  /** "Friday 4 December". */
  validUntilWords: string;
  /** Why it cannot be sent yet. */
  cannotSend?: string;
  onSaveJob: (jobId: string, version: number, fields: JobFields) => Promise<SaveResult<{ version: number }>>;
  onAddJob: (fields: JobFields) => Promise<SaveResult>;
  onAddSetJob: (setJobId: string) => Promise<SaveResult>;
  onRemoveJob: (jobId: string, version: number) => Promise<SaveResult>;
  onSaveDraft: (draft: Omit<QuoteDraftView, "version">, version: number) => Promise<SaveResult<{ version: number }>>;
  onSend: (to: string | null) => Promise<SaveResult>;
  onWithdraw?: (revisionId: string, reason: string) => Promise<SaveResult>;
  /** Questions of the customer, the recorded yes: below the preview. */
  aside?: ReactNode;
  readOnly?: boolean;
}

const BLANK: JobFields = {
  title: "",
  customerTitle: "",
  urgency: "now",
  ifWaits: "",
  causeId: null,
  dependsOnId: null,
  isSafety: false,
  lines: [],
};
const PAUSE_MS = 700;

/** The quote part of a case: jobs and lines edited in place, the customer's page beside them, and the sending. */
export function QuotePart(props: QuotePartProps) {
  const { money, readOnly, mayPrice } = props;
  const editor = useJobs(props.jobs, props.onSaveJob);
  const [isAdding, setAdding] = useState<"job" | "set" | null>(null);
  const [isWording, setWording] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const [isSending, setSending] = useState(false);
  const price = (minor: number) => formatPrice(minor, money.currency, money.locale);
  const jobs = editor.jobs;
  const priced = jobs.map((job) => priceJob(job.lines, money.tax));
  const sum = (of: (index: number) => number) => priced.reduce((total, _, index) => total + of(index), 0);
  const diagnosisTax = props.diagnosis && props.snapshot.diagnosis ? props.snapshot.diagnosis.taxMinor : 0;
  const net = (props.diagnosis?.netMinor ?? 0) + sum((i) => priced[i]!.netMinor);
  const taxMinor = diagnosisTax + sum((i) => priced[i]!.taxMinor);
  const start = props.snapshot.totals.startsAtMinor;
  const all = start + sum((i) => priced[i]!.totalMinor);
  const nowOnly = start + sum((i) => (jobs[i]!.urgency === "now" ? priced[i]!.totalMinor : 0));
  const hours = jobs
    .flatMap((job) => job.lines)
    .reduce((total, line) => (line.kind === "labour" ? total + line.quantityMilli : total), 0);
  const first = props.customerName.split(" ")[0];
  const cannotSend =
    props.cannotSend ?? (jobs.length === 0 ? "Add a job first: there is nothing to ask yet." : undefined);
  const title =
    jobs.length === 0
      ? "No job to ask about yet"
      : mayPrice
        ? `${capitalise(countWord(jobs.length))} ${jobs.length === 1 ? "job" : "jobs"}, ${price(all)} if ${first} agrees to ${jobs.length === 1 ? "it" : "all"}`
        : `${capitalise(countWord(jobs.length))} ${jobs.length === 1 ? "job" : "jobs"}, ${formatQuantity(hours)} h of work`;

  // The customer's page as it would be with what is typed here.
  const preview: RevisionSnapshot = useMemo(
    () => ({
      ...props.snapshot,
      jobs: jobs.map((job) => {
        const p = priceJob(job.lines, money.tax);
        return {
          ...job,
          ...p,
          lines: job.lines.map((line) => ({
            ...line,
            netMinor: 0,
            partNumber: line.partNumber ?? null,
            condition: line.condition ?? null,
          })),
        };
      }),
    }),
    [props.snapshot, jobs, money.tax],
  );

  async function run(act: Promise<SaveResult>, done?: () => void) {
    setFault(null);
    const result = await act;
    if (result.ok) done?.();
    else setFault(result.message);
    return result;
  }

  async function send() {
    setSending(true);
    await editor.flush();
    // what is sent is what the server holds: never while the screen shows something else
    if (editor.isUnsaved()) setFault("Not sent: a change to a job is not saved yet. Put it right, then send.");
    else await run(props.onSend(props.sendTo));
    setSending(false);
  }

  return (
    <Main
      className="quoting"
      title={title}
      sub={
        <>
          Revision {props.number}, not sent. {first} answers each job on its own.
        </>
      }
      acts={
        !readOnly && (
          <>
            {editor.state.kind !== "saved" && <SaveState state={editor.state} />}
            {props.setJobs.length > 0 && (
              <Button look="link" onClick={() => setAdding("set")}>
                Add from set jobs
              </Button>
            )}
            <Button look="quiet" onClick={() => setAdding("job")}>
              Add a job
            </Button>
          </>
        )
      }
    >
      {fault && (
        <p className="why" role="alert">
          <span className="bang" aria-hidden="true">
            !
          </span>
          <span>{fault}</span>
        </p>
      )}
      <div className="q">
        <div>
          {props.diagnosis && (
            <div className="agreed">
              <span>{props.diagnosis.words}</span>
              <span className="num">{formatQuantity(props.diagnosis.hoursMilli)} h</span>
              <b className="num">{mayPrice ? price(props.diagnosis.netMinor) : ""}</b>
            </div>
          )}
          {props.snapshot.agreed.map((job) => (
            <div className="agreed" key={job.title}>
              <span>{job.title}, agreed before</span>
              <span />
              <b className="num">{mayPrice ? price(job.totalMinor) : ""}</b>
            </div>
          ))}
          {editor.conflict && (
            <ConflictView
              who={editor.conflict.by ?? "Someone else"}
              theirsHead="Theirs"
              subject={editor.conflict.mine.title}
              fields={conflictFields(editor.conflict.mine, editor.conflict.theirs, money)}
              keepTheirsLabel="Keep theirs"
              onKeepTheirs={() => editor.settle("theirs")}
              onKeepMine={() => editor.settle("mine")}
            />
          )}
          {jobs.map((job, index) => (
            <JobEditor
              key={job.id}
              job={job}
              number={index + 1}
              causes={props.causes}
              others={jobs.filter((other) => other.id !== job.id).map(({ id, title: name }) => ({ id, title: name }))}
              money={money}
              rates={props.rates}
              findInCatalogue={props.findInCatalogue}
              maySeeCost={props.maySeeCost}
              mayPrice={mayPrice}
              errors={editor.errors[job.id]}
              newLineId={newLineId}
              onChange={editor.change}
              onRemove={() => void run(props.onRemoveJob(job.id, editor.versionOf(job.id)))}
              readOnly={readOnly}
            />
          ))}
          {jobs.length === 0 && (
            <p className="soft nojobs">
              {props.causes.length > 0
                ? `Start with ${props.causes[0]!.title.toLowerCase()}: “Add a job” takes its cause along.`
                : "A quote opens once a cause is marked proven or suspected; maintenance can be added without one."}
            </p>
          )}
          {mayPrice && jobs.length > 0 && (
            <div className="totals">
              <dl>
                <div>
                  <dt>
                    {props.diagnosis ? "Diagnosis and " : ""}
                    {jobs.length === 1 ? "the job" : `all ${countWord(jobs.length)} jobs`}, before tax
                  </dt>
                  <dd className="num">{price(net)}</dd>
                </div>
                <div>
                  <dt>
                    {money.tax.name},{" "}
                    {formatNumber(money.tax.basisPoints / 100, money.tax.basisPoints % 100 === 0 ? 0 : 2, {
                      locale: money.locale,
                    })}{" "}
                    %
                  </dt>
                  <dd className="num">{price(taxMinor)}</dd>
                </div>
                <div className="big">
                  <dt>If {first} agrees to everything</dt>
                  <dd className="num">{price(all)}</dd>
                </div>
                <div>
                  <dt>If only what is needed now</dt>
                  <dd className="num">{price(nowOnly)}</dd>
                </div>
              </dl>
              <div className="own">
                <p>
                  <span className="faint">For the shop</span>
                  {props.maySeeCost && (
                    <>
                      parts cost{" "}
                      <span className="num">{price(jobs.reduce((total, job) => total + jobCost(job.lines), 0))}</span>,{" "}
                    </>
                  )}
                  labour {formatQuantity(hours)} h.
                </p>
              </div>
            </div>
          )}
          {props.revisions.length > 0 && (
            <RevisionList revisions={props.revisions} money={money} onWithdraw={props.onWithdraw} />
          )}
        </div>
        <aside className="prev" aria-label="As the customer sees it">
          {mayPrice && <QuotePreview snapshot={preview} photos={props.photos} customerName={props.customerName} />}
          {!readOnly && mayPrice && (
            <Button look="link" onClick={() => setWording(true)}>
              Edit what it says
            </Button>
          )}
          {props.maySend && !readOnly && (
            <div className="send">
              <p>
                {props.sendTo ? (
                  <>
                    Goes to <b>{props.sendTo}</b> with a link that works until {props.validUntilWords}.
                  </>
                ) : (
                  <>
                    No e-mail is known: the link is shown here, to be printed or sent by hand. It works until{" "}
                    {props.validUntilWords}.
                  </>
                )}{" "}
                Once sent, this revision cannot be changed.
              </p>
              <Button
                disabled={Boolean(cannotSend)}
                aria-describedby={cannotSend ? "why-not-sent" : undefined}
                busy={isSending}
                busyLabel="Sending"
                onClick={() => void send()}
              >
                Send revision {props.number} to {first}
              </Button>
              {cannotSend && <WhyOff id="why-not-sent">{cannotSend}</WhyOff>}
            </div>
          )}
          {props.aside}
        </aside>
      </div>
      <Dialog open={isAdding === "job"} onClose={() => setAdding(null)} title="Add a job">
        <AddJobForm
          causes={props.causes}
          onAdd={async (fields) => {
            const result = await props.onAddJob(fields);
            if (result.ok) {
              setAdding(null);
              setFault(null);
            }
            return result;
          }}
        />
      </Dialog>
      <Dialog open={isAdding === "set"} onClose={() => setAdding(null)} title="Add from set jobs">
        <ul className="setjobs">
          {props.setJobs.map((job) => (
            <li key={job.id}>
              <button
                type="button"
                className="link"
                onClick={() => void run(props.onAddSetJob(job.id), () => setAdding(null))}
              >
                {job.title}
              </button>
              <span className="faint">{job.note}</span>
            </li>
          ))}
        </ul>
      </Dialog>
      <Dialog open={isWording} onClose={() => setWording(false)} title="What it says to the customer">
        <WordingForm
          draft={props.draft}
          money={money}
          timeZone={props.timeZone}
          hasDiagnosis={props.diagnosis !== null}
          onSave={props.onSaveDraft}
          onDone={() => setWording(false)}
        />
      </Dialog>
    </Main>
  );
}

function newLineId(): string {
  return `ln_${crypto.randomUUID().replaceAll("-", "").slice(0, 16)}`;
}

interface JobConflict {
  by?: string;
  mine: QuoteJobView;
  theirs: QuoteJobView;
}

/** Jobs as they are typed, each saved after a pause with the version the writer saw. */
function useJobs(jobs: readonly QuoteJobView[], save: QuotePartProps["onSaveJob"]) {
  const [edits, setEdits] = useState<Record<string, QuoteJobView>>({});
  const [errors, setErrors] = useState<Record<string, Record<string, string>>>({});
  const [state, setState] = useState<SaveStateView>({ kind: "saved" });
  const [conflict, setConflict] = useState<JobConflict | null>(null);
  const versions = useRef<Record<string, number>>({});
  const pending = useRef<Record<string, QuoteJobView>>({});
  /** Jobs whose last change the server did not take. */
  const refused = useRef(new Set<string>());
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const chain = useRef<Promise<void>>(Promise.resolve());
  const saveRef = useRef(save);
  useEffect(() => {
    saveRef.current = save;
  });
  useEffect(() => {
    for (const job of jobs) versions.current[job.id] = Math.max(job.version, versions.current[job.id] ?? 0);
    // A saved edit gives way to what the server now sends.
    setEdits((was) =>
      Object.fromEntries(
        Object.entries(was).filter(
          ([id]) =>
            pending.current[id] || jobs.every((job) => job.id !== id || job.version < (versions.current[id] ?? 0)),
        ),
      ),
    );
  }, [jobs]);

  const flush = useCallback((): Promise<void> => {
    clearTimeout(timer.current);
    chain.current = chain.current.then(async () => {
      for (const [id, job] of Object.entries(pending.current)) {
        delete pending.current[id];
        setState({ kind: "saving" });
        const { id: _, version: __, ...fields } = job;
        try {
          const result = await saveRef.current(id, versions.current[id] ?? job.version, fields);
          if (result.ok) {
            refused.current.delete(id);
            versions.current[id] = result.data?.version ?? (versions.current[id] ?? job.version) + 1;
            setErrors((was) => ({ ...was, [id]: {} }));
            setState({ kind: "saved" });
          } else {
            refused.current.add(id);
            if (result.conflict) setConflict({ by: result.conflict.by, mine: job, theirs: result.conflict.job });
            setErrors((was) => ({ ...was, [id]: result.fieldErrors ?? {} }));
            setState({ kind: "failed", reason: result.message });
          }
        } catch {
          pending.current[id] ??= job;
          setState({ kind: "failed", reason: "no answer came" });
          return;
        }
      }
    });
    return chain.current;
  }, []);

  const change = useCallback(
    (job: QuoteJobView) => {
      setEdits((was) => ({ ...was, [job.id]: job }));
      pending.current[job.id] = job;
      setState({ kind: "saving" });
      clearTimeout(timer.current);
      timer.current = setTimeout(() => void flush(), PAUSE_MS);
    },
    [flush],
  );

  const settle = useCallback(
    (whose: "mine" | "theirs") => {
      if (!conflict) return;
      versions.current[conflict.theirs.id] = conflict.theirs.version;
      setConflict(null);
      if (whose === "mine") change({ ...conflict.mine, version: conflict.theirs.version });
      else {
        refused.current.delete(conflict.theirs.id);
        setEdits((was) => ({ ...was, [conflict.theirs.id]: conflict.theirs }));
        setState({ kind: "saved" });
      }
    },
    [conflict, change],
  );

  useEffect(
    () => () => {
      void flush();
    },
    [flush],
  );
  const merged = useMemo(() => jobs.map((job) => edits[job.id] ?? job), [jobs, edits]);
  return {
    jobs: merged,
    change,
    flush,
    isUnsaved: () => jobs.some((job) => refused.current.has(job.id) || pending.current[job.id]),
    state,
    errors,
    conflict,
    settle,
    versionOf: (id: string) => versions.current[id] ?? 0,
  };
}

function conflictFields(mine: QuoteJobView, theirs: QuoteJobView, money: QuoteMoney) {
  const fields: { label: string; yours: string; theirs: string; numeric?: boolean }[] = [];
  const put = (label: string, a: string, b: string, numeric?: boolean) => {
    if (a !== b) fields.push({ label, yours: a, theirs: b, numeric });
  };
  put("Job", mine.title, theirs.title);
  put("For the customer", mine.customerTitle, theirs.customerTitle);
  put("How soon", mine.urgency, theirs.urgency);
  put("If it waits", mine.ifWaits, theirs.ifWaits);
  put("Lines", String(mine.lines.length), String(theirs.lines.length), true);
  for (const line of mine.lines) {
    const other = theirs.lines.find((l) => l.id === line.id);
    if (!other) continue;
    put(`${line.description}, quantity`, formatQuantity(line.quantityMilli), formatQuantity(other.quantityMilli), true);
    put(
      `${line.description}, each`,
      formatPrice(line.unitPriceMinor, money.currency, money.locale),
      formatPrice(other.unitPriceMinor, money.currency, money.locale),
      true,
    );
  }
  return fields;
}

function AddJobForm({
  causes,
  onAdd,
}: {
  causes: readonly CauseChoice[];
  onAdd: (fields: JobFields) => Promise<SaveResult>;
}) {
  const [title, setTitle] = useState("");
  const [causeId, setCauseId] = useState(causes[0]?.id ?? "");
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  return (
    <form
      onSubmit={async (event) => {
        event.preventDefault();
        if (title.trim() === "") return setError("Name the job.");
        setBusy(true);
        const result = await onAdd({ ...BLANK, title: title.trim(), causeId: causeId || null });
        setBusy(false);
        if (!result.ok) setError(result.message);
      }}
    >
      <TextInput
        id="new-job"
        label="Job"
        autoFocus
        maxLength={120}
        placeholder="Reseal the intake manifold"
        value={title}
        error={error}
        onChange={(e) => setTitle(e.target.value)}
      />
      <div className="field">
        <label htmlFor="new-job-cause">Cause</label>
        <select id="new-job-cause" className="input" value={causeId} onChange={(e) => setCauseId(e.target.value)}>
          <option value="">none: asked for, or maintenance</option>
          {causes.map((cause) => (
            <option key={cause.id} value={cause.id}>
              {cause.title}
            </option>
          ))}
        </select>
      </div>
      <div className="acts">
        <Button type="submit" busy={isBusy} busyLabel="Adding">
          Add the job
        </Button>
      </div>
    </form>
  );
}

interface WordingFormProps {
  draft: QuoteDraftView;
  money: QuoteMoney;
  timeZone: string;
  hasDiagnosis: boolean;
  onSave: QuotePartProps["onSaveDraft"];
  onDone: () => void;
}

function WordingForm({ draft, money, timeZone, hasDiagnosis, onSave, onDone }: WordingFormProps) {
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  return (
    <form
      onSubmit={async (event) => {
        event.preventDefault();
        const form = new FormData(event.currentTarget);
        const text = (name: string) => String(form.get(name) ?? "").trim();
        const ready = text("readyAt");
        setBusy(true);
        const result = await onSave(
          {
            headline: text("headline"),
            finding: text("finding"),
            warranty: text("warranty"),
            readyAt: ready ? zonedToIso(ready, timeZone) : null,
            diagnosisNetMinor: text("diagnosis") ? parseMoney(text("diagnosis"), money.currency) : null,
          },
          draft.version,
        );
        setBusy(false);
        if (result.ok) onDone();
        else setError(result.message);
      }}
    >
      <TextInput
        id="headline"
        name="headline"
        label="What is wrong, in one sentence"
        maxLength={120}
        defaultValue={draft.headline}
        error={error}
      />
      <TextArea
        id="finding"
        name="finding"
        label="And why, in plain words"
        rows={5}
        maxLength={2000}
        defaultValue={draft.finding}
        hint="No code, no abbreviation."
      />
      <TextInput
        id="readyAt"
        name="readyAt"
        label="Ready by"
        optional
        type="datetime-local"
        mono
        defaultValue={draft.readyAt ? isoToZoned(draft.readyAt, timeZone) : ""}
      />
      {hasDiagnosis && (
        <TextInput
          id="diagnosis"
          name="diagnosis"
          label="Diagnosis, before tax"
          optional
          mono
          inputMode="decimal"
          hint="Empty: by the clock. Never above what was agreed."
          defaultValue={draft.diagnosisNetMinor === null ? "" : moneyEntry(draft.diagnosisNetMinor, money.currency)}
        />
      )}
      <TextArea
        id="warranty"
        name="warranty"
        label="Warranty"
        rows={2}
        maxLength={1000}
        defaultValue={draft.warranty}
      />
      <div className="acts">
        <Button type="submit" busy={isBusy} busyLabel="Saving">
          Save the words
        </Button>
      </div>
    </form>
  );
}
