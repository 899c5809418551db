"use client";

import { type ReactNode, useState } from "react";
import type { WorkResult } from "@/components/repair/model";
import { ReasonForm } from "@/components/repair/work-job";
import { PairMark } from "@/components/ui/band-mark";
import { Button } from "@/components/ui/button";
import { Main } from "@/components/ui/case-frame";
import { cx } from "@/components/ui/cx";
import { Dialog } from "@/components/ui/dialog";
import { formatNumber } from "@/components/ui/format";
import { type GateItem, TodoList } from "@/components/ui/gate";
import { Arrow } from "@/components/ui/icons";
import { EmptyMark, EmptyState } from "@/components/ui/states";
import { Words } from "@/components/ui/words";
import type { ProofModeView, ProofPairView, ProofTestView, ProofVerdict } from "./model";

const VERDICT_WORDS: Record<ProofVerdict, string> = {
  passes: "Passes",
  "still-inside": "Still inside",
  fails: "Fails",
  incomplete: "Not measured again",
};

export interface ProofPartProps {
  /** "The repair is proven in every mode that showed the fault". */
  title: string;
  sub?: string;
  modes: readonly ProofModeView[];
  tests: readonly ProofTestView[];
  /** What is still to be measured, in a sentence each. */
  missing: readonly string[];
  codes: readonly { code: string; words: string; isBad?: boolean }[];
  codesRead?: string;
  monitors: readonly { name: string; isComplete: boolean; words: string }[];
  monitorNote?: string;
  gate: readonly GateItem[];
  /** Add an after sample, hand over. */
  acts?: ReactNode;
  /** Buttons under the gate: close, back to testing. */
  gateActs?: ReactNode;
  /** An owner may waive proof with a reason. */
  onWaive?: (reason: string) => Promise<WorkResult>;
  waiver?: { by: string; when: string; reason: string } | null;
}

/** Before and after side by side, mode by mode, with the verdict and its rule. */
export function ProofPart(props: ProofPartProps) {
  const [isWaiving, setWaiving] = useState(false);
  const { modes, tests } = props;
  const isEmpty = modes.length === 0 && tests.length === 0;
  const complete = props.monitors.filter((monitor) => monitor.isComplete).length;
  return (
    <Main
      className="proving"
      title={<Words>{props.title}</Words>}
      sub={props.sub && <Words>{props.sub}</Words>}
      acts={props.acts}
    >
      <div className="pr2">
        <div>
          {isEmpty ? (
            <EmptyState title="Nothing to compare yet" mark={<EmptyMark />}>
              Proof takes the readings again in the modes that showed the fault, or repeats the test that showed it.
            </EmptyState>
          ) : (
            <>
              {modes.length > 0 && (
                <div className="heads label" aria-hidden="true">
                  <span />
                  <span className="r">Before</span>
                  <span className="mid">
                    <i>below</i>
                    <i>usual band</i>
                    <i>above</i>
                  </span>
                  <span className="r">After</span>
                </div>
              )}
              {modes.map((mode) => (
                <ModeRows key={mode.mode} mode={mode} />
              ))}
              {tests.map((test) => (
                <section className="pmode" key={test.id} aria-label={test.title}>
                  <header>
                    <h2>{test.title}</h2>
                    <Verdict verdict={test.verdict} rule={test.rule} />
                  </header>
                  <p className="ptest">
                    {test.before} <Arrow wide /> <b>{test.after ?? "not repeated"}</b>
                  </p>
                </section>
              ))}
              <p className="note legend">
                <span>
                  <svg className="bm lean" width="14" height="14" viewBox="0 0 14 14" aria-hidden="true">
                    <circle className="end hollow" cx="7" cy="7" r="4.4" />
                  </svg>
                  before, outside
                </span>
                <span>
                  <svg className="bm" width="14" height="14" viewBox="0 0 14 14" aria-hidden="true">
                    <circle className="was" cx="7" cy="7" r="4" />
                  </svg>
                  before, inside
                </span>
                <span>
                  <svg className="bm" width="6" height="16" viewBox="0 0 6 16" aria-hidden="true">
                    <rect className="now" x="1" width="3.5" height="16" />
                  </svg>
                  after
                </span>
              </p>
            </>
          )}
        </div>
        <aside className="side" aria-label="Codes, monitors and the gate">
          {props.missing.length > 0 && (
            <section className="sec">
              <header>
                <h2>Still to measure</h2>
              </header>
              <ul className="todo">
                {props.missing.map((what) => (
                  <li key={what}>
                    <i />
                    <Words>{what}</Words>
                  </li>
                ))}
              </ul>
            </section>
          )}
          <section className="sec">
            <header>
              <h2>Codes</h2>
              {props.codesRead && <span className="label">{props.codesRead}</span>}
            </header>
            {props.codes.length === 0 ? (
              <p className="soft">None as found, none now.</p>
            ) : (
              <dl className="kv">
                {props.codes.map((code) => (
                  <div key={code.code}>
                    <dt className="num">{code.code}</dt>
                    <dd>{code.isBad ? <span className="alarm">{code.words}</span> : code.words}</dd>
                  </div>
                ))}
              </dl>
            )}
          </section>
          {props.monitors.length > 0 && (
            <section className="sec">
              <header>
                <h2>Monitors</h2>
                <span className="label">
                  {complete} of {props.monitors.length} complete
                </span>
              </header>
              <ul className="mon">
                {props.monitors.map((monitor) => (
                  <li key={monitor.name} className={monitor.isComplete ? "ok" : undefined}>
                    <i />
                    <span>
                      <Words>{monitor.name}</Words>
                    </span>
                    <span className="faint">{monitor.words}</span>
                  </li>
                ))}
              </ul>
              {props.monitorNote && <p className="note">{props.monitorNote}</p>}
            </section>
          )}
          <section className="sec">
            <header>
              <h2>To close this case</h2>
            </header>
            <TodoList items={props.gate} />
            {props.waiver && (
              <p className="note">
                Proof waived by {props.waiver.by}, {props.waiver.when}:{" "}
                <span className="said">{props.waiver.reason}</span>
              </p>
            )}
            {(props.gateActs || (props.onWaive && !props.waiver)) && (
              <div className="acts wrap gateacts">
                {props.gateActs}
                {props.onWaive && !props.waiver && (
                  <Button look="link" onClick={() => setWaiving(true)}>
                    Waive proof, with a reason
                  </Button>
                )}
              </div>
            )}
          </section>
        </aside>
      </div>
      <Dialog open={isWaiving} onClose={() => setWaiving(false)} title="Waive proof">
        {props.onWaive && (
          <ReasonForm
            label="Reason"
            empty="Say why."
            act="Waive proof"
            busyLabel="Saving"
            onSend={props.onWaive}
            onDone={() => setWaiving(false)}
          >
            <p className="soft">
              The paper says that the repair was not measured again. The reason is kept with your name.
            </p>
          </ReasonForm>
        )}
      </Dialog>
    </Main>
  );
}

function ModeRows({ mode }: { mode: ProofModeView }) {
  return (
    <section className="pmode" aria-label={mode.title}>
      <header>
        <h2>{mode.title}</h2>
        {mode.note && <p className="faint">{mode.note}</p>}
        {mode.figure && (
          <p className="fig">
            <span className="num">{mode.figure.before}</span>
            <Arrow wide />
            <span className="num">{mode.figure.after}</span>
            <i>{mode.figure.unit}</i>
          </p>
        )}
        <Verdict verdict={mode.verdict} rule={mode.rule} />
      </header>
      <div className="ptab">
        <table>
          <thead className="vh">
            <tr>
              <th scope="col">Reading</th>
              <th scope="col">Before</th>
              <th scope="col">Band</th>
              <th scope="col">After</th>
            </tr>
          </thead>
          <tbody>
            {mode.rows.map((row) => (
              <PairRow key={row.id} row={row} />
            ))}
          </tbody>
        </table>
      </div>
    </section>
  );
}

function PairRow({ row }: { row: ProofPairView }) {
  const write = (n: number | null) => (n === null ? "–" : formatNumber(n, row.decimals, { signed: row.signed }));
  return (
    <tr>
      <th scope="row">
        <Words>{row.label}</Words> <span>{row.unit}</span>
      </th>
      <td className={cx("b r", row.family)}>
        <span className={cx("num", row.family && "dev")}>{write(row.before)}</span>
      </td>
      <td className="mk">
        <PairMark before={row.before} after={row.after} band={row.band} family={row.family} decimals={row.decimals} />
      </td>
      <td className="a r">
        <span className={cx("num", row.verdict === "fails" && "alarm")}>{write(row.after)}</span>
      </td>
    </tr>
  );
}

function Verdict({ verdict, rule }: { verdict: ProofVerdict; rule: string }) {
  return (
    <div className="verdict">
      <b className={verdict === "fails" ? "alarm" : undefined}>{VERDICT_WORDS[verdict]}</b>
      <p>
        <Words>{rule}</Words>
      </p>
    </div>
  );
}
