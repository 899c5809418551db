"use client";

import { useState } from "react";
import { Caution } from "@/components/ui/caution";
import { formatNumber, formatShare } from "@/components/ui/format";
import { Arrow } from "@/components/ui/icons";
import { Words } from "@/components/ui/words";
import type { NextTestView, OutcomeView, RecordOutcome } from "./model";

export interface NextTestsProps {
  tests: readonly NextTestView[];
  /** A press on an outcome records it. */
  onRecord?: (outcome: RecordOutcome) => Promise<void>;
  /** "More outcomes": inconclusive, not reproduced, a cylinder, a note. */
  onMore?: (testId: string) => void;
  isBay?: boolean;
  showBits?: boolean;
}

/** Next tests as forks: each outcome is itself the button that records it, and names who would lead then. */
export function NextTests({ tests, onRecord, onMore, isBay = false, showBits = true }: NextTestsProps) {
  const [busy, setBusy] = useState<string | null>(null);
  if (tests.length === 0) {
    return (
      <p className="soft">
        No test would change the order by much. Look at what is unexplained, or take another sample.
      </p>
    );
  }
  async function press(test: NextTestView, outcome: OutcomeView) {
    if (!onRecord || busy) return;
    setBusy(`${test.id}:${outcome.id}`);
    try {
      await onRecord({ testId: test.id, outcome: outcome.id });
    } finally {
      setBusy(null);
    }
  }
  const cautions = [...new Set(tests.flatMap((test) => test.cautions))];
  return (
    <>
      <ol className="forks">
        {tests.map((test) => (
          <li className="fork" key={test.id}>
            <div className="fh">
              <b>
                <Words>{test.title}</Words>
              </b>
              <span className="num">{test.minutes} min</span>
              {showBits && <span className="num">{formatNumber(test.bits, 2)} bits</span>}
            </div>
            {test.overCeiling && <p className="over">{test.overCeiling}</p>}
            <div className="fb">
              <Tines count={test.outcomes.length} isBay={isBay} />
              <div>
                {test.outcomes.map((outcome) => {
                  const isThis = busy === `${test.id}:${outcome.id}`;
                  return (
                    <button
                      key={outcome.id}
                      type="button"
                      className="br"
                      disabled={!onRecord}
                      aria-busy={isThis || undefined}
                      onClick={() => void press(test, outcome)}
                    >
                      <span>
                        {isThis ? "Recording " : "If "}
                        <b>
                          <Words>{outcome.label}</Words>
                        </b>
                      </span>
                      {outcome.leader && (
                        <span className="to">
                          <Arrow /> <Words>{outcome.leader.title}</Words>{" "}
                          <span className="num">{formatShare(outcome.leader.probability)}</span>
                        </span>
                      )}
                    </button>
                  );
                })}
              </div>
            </div>
            {onMore && (
              <button type="button" className="link othr" onClick={() => onMore(test.id)}>
                Another outcome<span className="vh"> of {test.title}</span>
              </button>
            )}
          </li>
        ))}
      </ol>
      {cautions.length > 0 && (
        <div className="cautions">
          {cautions.slice(0, 4).map((caution) => (
            <Caution key={caution}>{caution}</Caution>
          ))}
          <p className="note">The maker’s procedure comes first.</p>
        </div>
      )}
    </>
  );
}

/** One handle, as many tines as outcomes, level with their buttons. */
function Tines({ count, isBay }: { count: number; isBay: boolean }) {
  const step = isBay ? 66 : 40;
  const first = isBay ? 33 : 20;
  const height = step * count;
  const y = Array.from({ length: count }, (_, i) => first + i * step);
  const top = y[0] ?? first;
  const bottom = y.at(-1) ?? first;
  const middle = (top + bottom) / 2;
  const arms =
    count === 1
      ? `M10 ${middle}H34`
      : `M34 ${top}H22Q10 ${top} 10 ${top + 12}V${bottom - 12}Q10 ${bottom} 22 ${bottom}H34${y
          .slice(1, -1)
          .map((at) => `M10 ${at}H34`)
          .join("")}`;
  return (
    <svg className="tine" width="34" height={height} viewBox={`0 0 34 ${height}`} aria-hidden="true">
      <path d={`M0 ${middle}H10${arms}`} />
      <circle cx="10" cy={middle} r="3" />
    </svg>
  );
}
