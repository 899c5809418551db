"use client";

import { type ReactNode, useEffect, useRef, useState } from "react";
import { useAnnounce } from "@/components/ui/announcer";
import { Button, WhyOff } from "@/components/ui/button";
import { Main } from "@/components/ui/case-frame";
import { Caution } from "@/components/ui/caution";
import { type Density, useDensity } from "@/components/ui/device";
import { Dialog } from "@/components/ui/dialog";
import { formatShare } from "@/components/ui/format";
import { Words } from "@/components/ui/words";
import { CausesLedger } from "./causes-ledger";
import { MarkForm, type MarkFormProps, RecordTestForm } from "./ledger-dialogs";
import type {
  ActResult,
  LedgerCauseView,
  LedgerView,
  NextTestView,
  RecordedTestView,
  RecordOutcome,
  TestChoice,
} from "./model";
import { NextTests } from "./next-tests";

export interface CausesPartProps {
  /** "An air leak at the intake is most likely, 74 %". */
  title: string;
  sub?: string;
  ledger: LedgerView;
  nextTests: readonly NextTestView[];
  tests: readonly TestChoice[];
  recorded: readonly RecordedTestView[];
  cylinders?: number;
  banks?: number;
  /** Dangers of the case itself. */
  cautions?: readonly string[];
  /** Two faults at once, or what this shop's closed cases say, in a sentence each. */
  remarks?: readonly string[];
  onRecord: (outcome: RecordOutcome) => Promise<ActResult>;
  onUndo: (recordedId: string) => Promise<ActResult>;
  onMark?: MarkFormProps["onMark"];
  onUnmark?: (markId: string, reason: string) => Promise<ActResult>;
  /** The gate to quoting. */
  gate?: ReactNode;
  density?: Density;
  readOnly?: boolean;
}

/** The causes part of a case: the ledger, the next tests, the marks. */
export function CausesPart(props: CausesPartProps) {
  const { ledger, recorded, tests, readOnly } = props;
  const isBay = useDensity(props.density) === "bay";
  const announce = useAnnounce();
  const [recording, setRecording] = useState<string | null>(null);
  const [marking, setMarking] = useState<{ cause: LedgerCauseView; kind: "proven" | "suspected" } | null>(null);
  const [unmarking, setUnmarking] = useState<LedgerCauseView | null>(null);
  const [showBits, setShowBits] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  // The last outcome recorded here can be taken back until the next write.
  const [undoable, setUndoable] = useState<"waiting" | string | null>(null);
  const knownIds = useRef(new Set(recorded.map((r) => r.id)));
  useEffect(() => {
    const added = recorded.find((r) => !knownIds.current.has(r.id));
    knownIds.current = new Set(recorded.map((r) => r.id));
    if (added) setUndoable((was) => (was === "waiting" ? added.id : was));
  }, [recorded]);

  const leader = ledger.causes[0];
  const spoken = leader ? `${leader.title}, ${formatShare(leader.probability)}` : "";
  const lastSpoken = useRef(spoken);
  useEffect(() => {
    if (spoken && spoken !== lastSpoken.current) announce(`Most likely now: ${spoken}`);
    lastSpoken.current = spoken;
  }, [spoken, announce]);

  async function record(outcome: RecordOutcome): Promise<ActResult> {
    setFault(null);
    setUndoable("waiting");
    const result = await props.onRecord(outcome);
    if (!result.ok) {
      setUndoable(null);
      setFault(result.message);
    }
    return result;
  }

  async function undo(id: string) {
    setFault(null);
    const result = await props.onUndo(id);
    if (result.ok) setUndoable(null);
    else setFault(result.message);
  }

  const acts = (cause: LedgerCauseView) => {
    if (cause.mark) {
      return (
        <>
          <p>
            <b>Marked {cause.mark.kind}</b> by {cause.mark.by}, {cause.mark.when}:{" "}
            <span className="said">{cause.mark.reason}</span>
          </p>
          {props.onUnmark && !readOnly && (
            <Button look="link" onClick={() => setUnmarking(cause)}>
              Take the mark back
            </Button>
          )}
        </>
      );
    }
    if (!props.onMark || readOnly) return null;
    const canProve = cause.provenBy.length > 0;
    const whyId = `why-not-proven-${cause.id}`;
    return (
      <>
        <Button look="quiet" onClick={() => setMarking({ cause, kind: "suspected" })}>
          Mark as suspected, with a reason
        </Button>
        <Button
          look={canProve ? "act" : "quiet"}
          disabled={!canProve}
          aria-describedby={canProve ? undefined : whyId}
          onClick={() => setMarking({ cause, kind: "proven" })}
        >
          Mark as proven
        </Button>
        {!canProve && <WhyOff id={whyId}>needs a test that confirms it</WhyOff>}
      </>
    );
  };

  return (
    <Main
      className="causes"
      title={<Words>{props.title}</Words>}
      sub={props.sub && <Words>{props.sub}</Words>}
      acts={
        !readOnly && (
          <>
            {undoable && undoable !== "waiting" && (
              <Button look="link" onClick={() => void undo(undoable)}>
                Undo the outcome
              </Button>
            )}
            {isBay && (
              <Button look="link" onClick={() => setShowBits(!showBits)}>
                {showBits ? "Without bits" : "Show bits"}
              </Button>
            )}
            <Button look="quiet" onClick={() => setRecording("")}>
              Record another test
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
      {(props.cautions ?? []).map((caution) => (
        <Caution key={caution}>{caution}</Caution>
      ))}
      <div className="lcols">
        <CausesLedger ledger={ledger} initialOpen={isBay ? null : undefined} inTimes={isBay && !showBits} acts={acts} />
        <section className="next" aria-labelledby="next-head">
          <header>
            <h2 id="next-head">Next tests</h2>
            <span className="label">most learned per minute first</span>
          </header>
          <NextTests
            tests={isBay ? props.nextTests.slice(0, 3) : props.nextTests}
            isBay={isBay}
            showBits={!isBay || showBits}
            onRecord={readOnly ? undefined : async (outcome) => void (await record(outcome))}
            onMore={readOnly ? undefined : setRecording}
          />
          {(props.remarks ?? []).map((remark) => (
            <p className="note remark" key={remark}>
              <Words>{remark}</Words>
            </p>
          ))}
          {recorded.length > 0 && (
            <div className="recorded">
              <h2>Recorded</h2>
              <ul>
                {recorded.map((test) => (
                  <li key={test.id}>
                    <b>{test.title}</b>: {test.outcome}
                    <span className="faint">
                      {" "}
                      {test.when}, {test.by}
                      {test.note && `, “${test.note}”`}
                    </span>
                    {!readOnly && (
                      <button type="button" className="link" onClick={() => void undo(test.id)}>
                        Take back<span className="vh"> {test.title}</span>
                      </button>
                    )}
                  </li>
                ))}
              </ul>
            </div>
          )}
          {props.gate && <div className="recorded">{props.gate}</div>}
        </section>
      </div>
      <Dialog open={recording !== null} onClose={() => setRecording(null)} title="Record a test">
        <RecordTestForm
          tests={tests}
          initialTestId={recording || undefined}
          cylinders={props.cylinders}
          banks={props.banks}
          onRecord={record}
          onDone={() => setRecording(null)}
        />
      </Dialog>
      <Dialog
        open={marking !== null}
        onClose={() => setMarking(null)}
        title={marking?.kind === "proven" ? "Mark as proven" : "Mark as suspected"}
      >
        {marking && props.onMark && (
          <MarkForm
            cause={marking.cause}
            kind={marking.kind}
            onMark={(input) => {
              setUndoable(null);
              return props.onMark!(input);
            }}
            onDone={() => setMarking(null)}
          />
        )}
      </Dialog>
      <Dialog open={unmarking !== null} onClose={() => setUnmarking(null)} title="Take the mark back">
        {unmarking?.mark && props.onUnmark && (
          <UnmarkForm
            onUnmark={(reason) => props.onUnmark!(unmarking.mark!.id, reason)}
            onDone={() => setUnmarking(null)}
          />
        )}
      </Dialog>
    </Main>
  );
}

function UnmarkForm({ onUnmark, onDone }: { onUnmark: (reason: string) => Promise<ActResult>; onDone: () => void }) {
  const [reason, setReason] = useState("");
  const [error, setError] = useState<string>();
  return (
    <form
      onSubmit={async (event) => {
        event.preventDefault();
        if (reason.trim() === "") return setError("Say why.");
        const result = await onUnmark(reason.trim());
        if (result.ok) onDone();
        else setError(result.message);
      }}
    >
      <div className="field">
        <label htmlFor="unmark-why">Why</label>
        <input
          id="unmark-why"
          className="input"
          maxLength={500}
          value={reason}
          aria-invalid={error ? true : undefined}
          onChange={(event) => setReason(event.target.value)}
        />
        {error && <p className="why">{error}</p>}
      </div>
      <div className="acts">
        <Button type="submit">Take it back</Button>
      </div>
    </form>
  );
}
