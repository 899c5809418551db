import Link from "next/link";
import { cx } from "./cx";
import { STAGE_WORDS, STAGES, type StageId, type StageView, type StripView } from "./nav-model";

/** The head of every page of a case: number, vehicle, the customer's words, four facts. */
export function Strip({ strip }: { strip: StripView }) {
  return (
    <section className="strip" aria-label={`Case ${strip.number}`}>
      <div>
        <div className="id">
          <span className="num">{strip.number}</span>
          <p className="vname">{strip.vehicle}</p>
          {strip.comeback && (
            <Link href={strip.comeback.href} className={strip.comeback.isFresh ? "alarm" : "link"}>
              {strip.comeback.label}
            </Link>
          )}
        </div>
        <div className="facts">
          <span className="said">{strip.complaint}</span>
        </div>
      </div>
      <dl>
        {strip.facts.map((fact) => (
          <div key={fact.label}>
            <dt>{fact.label}</dt>
            <dd>
              {fact.alarm ? <span className="alarm">{fact.value}</span> : fact.value}
              {fact.note && <span> {fact.note}</span>}
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}

/** Seven segments: done, now (with whom we wait on), to come. Never a control. */
export function StageLine({ stage }: { stage: StageView }) {
  const at = STAGES.indexOf(stage.now);
  return (
    <section aria-label="Stage">
      <ol className={`stage now-${at + 1}`} aria-label="Stages">
        {STAGES.map((id, index) => {
          if (index === at) {
            const head = stage.released
              ? "Left unrepaired"
              : stage.held
                ? `On hold, ${STAGE_WORDS[id].toLowerCase()}`
                : STAGE_WORDS[id];
            return (
              <li key={id} className={cx("now", stage.held && "held")} aria-current="step">
                <span>
                  <b>{head}</b> {stage.since}
                  {stage.waitingOn && (
                    <>
                      , waiting on <b>{stage.waitingOn}</b> {stage.waitingFor}
                    </>
                  )}
                </span>
              </li>
            );
          }
          return (
            <li key={id} className={index < at ? "done" : undefined}>
              <span>
                {STAGE_WORDS[id]} {index < at && stage.passed[id] && <span className="faint">{stage.passed[id]}</span>}
              </span>
            </li>
          );
        })}
      </ol>
    </section>
  );
}

/** The stage line of a table row: 7 × 9 px. The word stands beside it. */
export function MiniStage({ now, held }: { now: StageId; held?: boolean }) {
  const at = STAGES.indexOf(now);
  return (
    <span className={cx("mini", held && "parked")} aria-hidden="true">
      {STAGES.map((id, index) => (
        <i key={id} className={index < at ? "d" : index === at ? "n" : undefined} />
      ))}
    </span>
  );
}
