"use client";

import { type ReactNode, useEffect, useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { formatClock, formatNumber, formatQuantity } from "@/components/ui/format";
import { Glyph } from "@/components/ui/glyph";
import { TextArea, TextInput } from "@/components/ui/inputs";
import { Words } from "@/components/ui/words";
import { ClockBar } from "./clock-bar";
import type { UsePart, WorkJobView, WorkPartView, WorkResult } from "./model";

export interface WorkJobProps {
  job: WorkJobView;
  now: string;
  timeZone: string;
  onClockOn: (workJobId: string) => Promise<WorkResult>;
  onClockOff: () => Promise<WorkResult>;
  onUsePart: (part: UsePart) => Promise<WorkResult>;
  onRemovePart: (recordId: string) => Promise<WorkResult>;
  onSetPart: (
    recordId: string,
    change: { status?: "ordered" | "arrived" | "fitted"; oldPart?: "kept-for-customer" | "discarded" },
  ) => Promise<WorkResult>;
  onNote: (workJobId: string, text: string) => Promise<WorkResult>;
  onDone: (workJobId: string, correction: string) => Promise<WorkResult>;
  onStrike: (workJobId: string, reason: string) => Promise<WorkResult>;
  /** A technician proposes; the counter strikes. */
  mayStrike: boolean;
  /** A photo button of the page's own. */
  photoSlot?: ReactNode;
  readOnly?: boolean;
}

/** A job a section: clock, parts with steppers, note, photos; done or struck with a reason. */
export function WorkJob(props: WorkJobProps) {
  const { job, timeZone, readOnly } = props;
  const [dialog, setDialog] = useState<"done" | "strike" | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState<string | null>(null);
  const isOpen = job.state === "approved";
  // A job nobody has begun is one line, until it is begun or opened.
  const [isUnfolded, setUnfolded] = useState(false);
  const isBegun =
    job.running.length > 0 ||
    job.workedMinutes > 0 ||
    job.notes.length > 0 ||
    job.parts.some((part) => part.records.length > 0);
  const isWide = !isOpen || isBegun || isUnfolded;
  const mine = job.running.find((clock) => clock.isMe);
  const elapsed = useElapsed(job, props.now);
  const headId = `work-${job.id}`;

  async function run(what: string, act: () => Promise<WorkResult>) {
    if (busy) return;
    setFault(null);
    setBusy(what);
    const result = await act();
    setBusy(null);
    if (!result.ok) setFault(result.message);
  }

  return (
    <section className={mine ? "rj run" : "rj"} aria-labelledby={headId}>
      <header>
        <div>
          <h2 id={headId}>{job.title}</h2>
          <p>
            {job.cause ? (
              <>
                <Glyph family={job.cause.family} /> <Words>{job.cause.words}</Words>
              </>
            ) : (
              job.note
            )}
          </p>
        </div>
        {isOpen ? (
          <>
            <div className="tm">
              {(job.running.length > 0 || elapsed > 0) && (
                <>
                  <span className="num big">{hoursMinutes(elapsed)}</span>
                  <span className="label">
                    {mine
                      ? `on the clock since ${formatClock(mine.since, timeZone)}`
                      : job.running.length > 0
                        ? `${job.running.map((clock) => clock.personName).join(", ")} on the clock`
                        : `of ${formatNumber(job.soldMinutes / 60, 1)} h sold`}
                  </span>
                </>
              )}
            </div>
            {!readOnly &&
              (mine ? (
                <Button
                  busy={busy === "clock"}
                  busyLabel="Clocking off"
                  onClick={() => void run("clock", props.onClockOff)}
                >
                  Clock off
                </Button>
              ) : (
                <Button
                  look="quiet"
                  busy={busy === "clock"}
                  busyLabel="Clocking on"
                  onClick={() => void run("clock", () => props.onClockOn(job.id))}
                >
                  Clock on
                </Button>
              ))}
          </>
        ) : (
          <div className="tm">
            <b>{job.state === "done" ? "Done" : "Struck"}</b>
            <span className="label">{hoursMinutes(elapsed)} on the clock</span>
          </div>
        )}
      </header>
      {job.outcome && <p className="soft outcome">{job.outcome}</p>}
      {isOpen && (elapsed > 0 || job.running.length > 0) && (
        <ClockBar soldMinutes={job.soldMinutes} workedMinutes={elapsed} />
      )}
      {fault && (
        <p className="why" role="alert">
          <span className="bang" aria-hidden="true">
            !
          </span>
          <span>{fault}</span>
        </p>
      )}
      {isWide && job.parts.length > 0 && (
        <ul className="parts">
          {job.parts.map((part) => (
            <Part
              key={part.lineId}
              {...props}
              part={part}
              isFixed={!isOpen || Boolean(readOnly)}
              busy={busy !== null}
              run={run}
            />
          ))}
        </ul>
      )}
      {isOpen && !readOnly && !isWide && (
        <button type="button" className="link unfold" onClick={() => setUnfolded(true)}>
          Parts, note, done or struck<span className="vh">: {job.title}</span>
        </button>
      )}
      {isOpen && !readOnly && isWide && (
        <>
          <div className="notes">
            <NoteBox job={job} onNote={props.onNote} />
            <div className="ph">
              {job.photos.map((photo) => (
                <figure key={photo.id}>
                  {/* biome-ignore lint/performance/noImgElement: signed addresses of private files */}
                  <img src={photo.src} alt={photo.alt} width={145} height={92} loading="lazy" />
                </figure>
              ))}
              {props.photoSlot}
            </div>
          </div>
          <div className="rjf">
            <Button look="quiet" onClick={() => setDialog("done")}>
              Job done
            </Button>
            <Button look="ink" onClick={() => setDialog("strike")}>
              {props.mayStrike ? "Strike the job, with a reason" : "Propose to strike it, with a reason"}
            </Button>
          </div>
        </>
      )}
      <Dialog open={dialog === "done"} onClose={() => setDialog(null)} title={`${job.title}: done`}>
        <ReasonForm
          label="What was done, for the paper"
          initial={job.notes.at(-1)?.text}
          empty="Say what was done."
          act="Job done"
          busyLabel="Saving"
          onSend={(text) => props.onDone(job.id, text)}
          onDone={() => setDialog(null)}
        />
      </Dialog>
      <Dialog
        open={dialog === "strike"}
        onClose={() => setDialog(null)}
        title={props.mayStrike ? `Strike: ${job.title}` : `Propose to strike: ${job.title}`}
      >
        <ReasonForm
          label="Reason"
          empty="Say why."
          act={props.mayStrike ? "Strike the job" : "Send the proposal"}
          busyLabel="Saving"
          onSend={(text) => props.onStrike(job.id, text)}
          onDone={() => setDialog(null)}
        />
      </Dialog>
    </section>
  );
}

/** Minutes worked, ticking while a clock runs. */
function useElapsed(job: WorkJobView, now: string): number {
  const [at, setAt] = useState(() => Date.parse(now));
  const runs = job.running.length > 0;
  useEffect(() => {
    if (!runs) return;
    setAt(Date.now());
    const timer = setInterval(() => setAt(Date.now()), 20_000);
    return () => clearInterval(timer);
  }, [runs]);
  const live = job.running.reduce((sum, clock) => sum + Math.max(0, at - Date.parse(clock.since)) / 60_000, 0);
  return job.workedMinutes + live;
}

function hoursMinutes(minutes: number): string {
  const whole = Math.floor(minutes);
  return `${Math.floor(whole / 60)}:${String(whole % 60).padStart(2, "0")}`;
}

interface PartProps extends WorkJobProps {
  part: WorkPartView;
  isFixed: boolean;
  busy: boolean;
  run: (what: string, act: () => Promise<WorkResult>) => Promise<void>;
}

function Part({ part, job, isFixed, busy, run, onUsePart, onRemovePart, onSetPart }: PartProps) {
  const fitted = part.records.filter((record) => record.status === "fitted");
  const pending = part.records.filter((record) => record.status !== "fitted");
  const used = fitted.reduce((sum, record) => sum + record.quantityMilli, 0);
  const left = part.agreedMilli - used;
  const isKept = part.records.length > 0 && part.records.every((record) => record.oldPart === "kept-for-customer");
  const last = fitted.at(-1);
  const use = (quantityMilli: number, status: "ordered" | "fitted") => () =>
    onUsePart({
      workJobId: job.id,
      lineId: part.lineId,
      description: part.description,
      quantityMilli,
      condition: part.condition,
      oldPart: part.hasOldPart ? (isKept ? "kept-for-customer" : "discarded") : "none",
      status,
    });
  return (
    <li>
      <span className="pn">
        {part.description}
        {part.partNumber && <span className="num faint"> {part.partNumber}</span>}
        {pending.length > 0 && (
          <span className="faint pending">
            {pending.map((record) => (
              <span key={record.id}>
                {formatQuantity(record.quantityMilli)} {record.status}
                {record.note && `, ${record.note}`}
                {!isFixed && (
                  <button
                    type="button"
                    className="link"
                    onClick={() =>
                      void run("part", () =>
                        onSetPart(record.id, { status: record.status === "ordered" ? "arrived" : "fitted" }),
                      )
                    }
                  >
                    {record.status === "ordered" ? "It is here" : "Fitted"}
                  </button>
                )}
              </span>
            ))}
          </span>
        )}
      </span>
      {isFixed ? (
        <b className="num used">{formatQuantity(used)}</b>
      ) : (
        <span className="stp">
          <button
            type="button"
            aria-label={`One fewer, ${part.description}`}
            disabled={busy || !last}
            onClick={() => last && void run("part", () => onRemovePart(last.id))}
          >
            −
          </button>
          <b className="num">{formatQuantity(used)}</b>
          <button
            type="button"
            aria-label={`One more, ${part.description}`}
            disabled={busy || left <= 0}
            onClick={() => void run("part", use(Math.min(1000, left), "fitted"))}
          >
            +
          </button>
        </span>
      )}
      <span className="faint of">
        of {formatQuantity(part.agreedMilli)} agreed{" "}
        {!isFixed && used === 0 && part.agreedMilli > 1000 && (
          <button
            type="button"
            className="link"
            disabled={busy}
            onClick={() => void run("part", use(part.agreedMilli, "fitted"))}
          >
            All fitted
          </button>
        )}
        {!isFixed && used === 0 && pending.length === 0 && (
          <button
            type="button"
            className="link"
            disabled={busy}
            onClick={() => void run("part", use(part.agreedMilli, "ordered"))}
          >
            On order
          </button>
        )}
      </span>
      {part.hasOldPart ? (
        <label className="check">
          <input
            type="checkbox"
            checked={isKept}
            disabled={isFixed || busy || part.records.length === 0}
            onChange={(event) => {
              const oldPart = event.target.checked ? "kept-for-customer" : "discarded";
              void run("part", async () => {
                let result: WorkResult = { ok: true };
                for (const record of part.records) {
                  result = await onSetPart(record.id, { oldPart });
                  if (!result.ok) return result;
                }
                return result;
              });
            }}
          />
          <span>old part kept</span>
        </label>
      ) : (
        <span />
      )}
    </li>
  );
}

function NoteBox({ job, onNote }: { job: WorkJobView; onNote: WorkJobProps["onNote"] }) {
  const [text, setText] = useState("");
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  return (
    <form
      className="notebox"
      onSubmit={async (event) => {
        event.preventDefault();
        if (text.trim() === "") return;
        setBusy(true);
        const result = await onNote(job.id, text.trim());
        setBusy(false);
        if (result.ok) {
          setText("");
          setError(undefined);
        } else setError(result.message);
      }}
    >
      {job.notes.map((note) => (
        <p key={note.id} className="soft">
          {note.text} <span className="faint">{note.words}</span>
        </p>
      ))}
      <TextArea
        id={`note-${job.id}`}
        label="Note for the paper"
        maxLength={2000}
        value={text}
        error={error}
        onChange={(event) => setText(event.target.value)}
      />
      {text.trim() !== "" && (
        <Button look="quiet" type="submit" busy={isBusy} busyLabel="Keeping">
          Keep the note
        </Button>
      )}
    </form>
  );
}

export interface ReasonFormProps {
  label: string;
  initial?: string;
  empty: string;
  act: string;
  busyLabel: string;
  onSend: (text: string) => Promise<WorkResult>;
  onDone: () => void;
  /** Above the field. */
  children?: ReactNode;
  isShort?: boolean;
}

/** One text and one button: reasons, corrections, requests. */
export function ReasonForm({
  label,
  initial = "",
  empty,
  act,
  busyLabel,
  onSend,
  onDone,
  children,
  isShort,
}: ReasonFormProps) {
  const [text, setText] = useState(initial);
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  return (
    <form
      onSubmit={async (event) => {
        event.preventDefault();
        if (text.trim() === "") return setError(empty);
        setBusy(true);
        const result = await onSend(text.trim());
        setBusy(false);
        if (result.ok) onDone();
        else setError(result.message);
      }}
    >
      {children}
      {isShort ? (
        <TextInput
          id="reason-text"
          label={label}
          autoFocus
          maxLength={500}
          value={text}
          error={error}
          onChange={(event) => setText(event.target.value)}
        />
      ) : (
        <TextArea
          id="reason-text"
          label={label}
          autoFocus
          rows={3}
          maxLength={600}
          value={text}
          error={error}
          onChange={(event) => setText(event.target.value)}
        />
      )}
      <div className="acts">
        <Button type="submit" busy={isBusy} busyLabel={busyLabel}>
          {act}
        </Button>
      </div>
    </form>
  );
}
