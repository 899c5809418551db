import type { ReactNode } from "react";
import { BayBar } from "./bay-bar";
import type { PartLink, StageView, StripView } from "./nav-model";
import { STAGE_WORDS } from "./nav-model";
import { Spine } from "./spine";
import { MiniStage, StageLine, Strip } from "./strip";

export interface CaseFrameProps {
  /** The counter's `TopBar`. */
  top: ReactNode;
  strip: StripView;
  stage: StageView;
  parts: readonly PartLink[];
  /** "due 16:30", for the bay bar. */
  dueWords?: string;
  agreed?: string;
  save?: ReactNode;
  menu?: ReactNode;
  /** The page's own `<main>`. */
  children: ReactNode;
}

/**
 * The frame of a case in both densities. Which of the two heads shows is the stylesheet's doing, so that a tablet
 * switched to the bay needs no reload.
 */
export function CaseFrame({ top, strip, stage, parts, dueWords, agreed, save, menu, children }: CaseFrameProps) {
  const late = strip.facts.find((fact) => fact.alarm)?.value;
  const words = [stage.held ? "On hold" : STAGE_WORDS[stage.now], !late && dueWords].filter(Boolean).join(", ");
  return (
    <>
      <a className="skip" href="#main">
        Skip to the finding
      </a>
      <div className="counter-only">
        {top}
        <Strip strip={strip} />
        <StageLine stage={stage} />
      </div>
      <div className="bay-only">
        <BayBar
          strip={strip}
          stateWords={words}
          late={late}
          mini={<MiniStage now={stage.now} held={stage.held} />}
          parts={parts}
          save={save}
          menu={menu}
          agreed={agreed}
        />
      </div>
      <div className="case">
        <Spine parts={parts} />
        {children}
      </div>
    </>
  );
}

export interface MainProps {
  /** A sentence that says what is the case. */
  title: ReactNode;
  sub?: ReactNode;
  acts?: ReactNode;
  className?: string;
  children: ReactNode;
}

/** The main part of a case page: it opens with its finding. */
export function Main({ title, sub, acts, className, children }: MainProps) {
  return (
    <main id="main" className={className ? `main ${className}` : "main"}>
      <div className="mainhead">
        <div>
          <h1>{title}</h1>
          {sub && <p>{sub}</p>}
        </div>
        {acts && <div className="acts">{acts}</div>}
      </div>
      {children}
    </main>
  );
}
