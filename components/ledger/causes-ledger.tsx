"use client";

import { type ReactNode, useEffect, useLayoutEffect, useMemo, useRef, useState } from "react";
import { cx } from "@/components/ui/cx";
import { formatNumber, formatShare } from "@/components/ui/format";
import { Glyph } from "@/components/ui/glyph";
import { useWidth } from "@/components/ui/use-width";
import { Words } from "@/components/ui/words";
import { type BitsScale, bitsScale, netBits } from "./bits-scale";
import type { LedgerCauseView, LedgerView } from "./model";
import { Grid, Stack, WaterfallStep } from "./stack";

export interface CausesLedgerProps {
  ledger: LedgerView;
  /** Open at first; the leading cause by default, none in the bay. */
  initialOpen?: string | null;
  /** In the bay weights read "2.6 times likelier" unless bits are asked for. */
  inTimes?: boolean;
  /** The marks and their buttons, under an opened cause. */
  acts?: (cause: LedgerCauseView) => ReactNode;
}

const MOVE_MS = 180;

/**
 * Every cause on one axis in bits. One opens at a time: its stack unrolls into a waterfall, one row a finding. After an
 * outcome the rows slide to their new places and new pieces grow.
 */
export function CausesLedger({ ledger, initialOpen, inTimes = false, acts }: CausesLedgerProps) {
  const [open, setOpen] = useState<string | null>(
    initialOpen === undefined ? (ledger.causes[0]?.id ?? null) : initialOpen,
  );
  const [ref, width] = useWidth(816);
  const isNarrow = width < 620;
  const track = isNarrow ? Math.max(240, width) : width < 760 ? 300 : 416;
  const scale = useMemo(() => bitsScale(ledger.causes, track), [ledger.causes, track]);
  const list = useRef<HTMLOListElement>(null);
  const fresh = useFreshPieces(ledger);
  useFlip(list, ledger);
  const layout = isNarrow ? "narrow" : track === 300 ? "t300" : "t416";
  return (
    <div className={cx("lwrap", layout)} ref={ref}>
      <div className="laxis" aria-hidden="true">
        <span />
        <Axis scale={scale} />
        <span className="label r">{!inTimes && "net bits"}</span>
        <span className="label r">probability</span>
      </div>
      <ol className={cx("ledger", open && "has-open")} ref={list}>
        {ledger.causes.map((cause, index) => (
          <CauseRow
            key={cause.id}
            cause={cause}
            isLead={index === 0}
            isOpen={open === cause.id}
            inTimes={inTimes}
            scale={scale}
            fresh={fresh}
            onToggle={() => setOpen(open === cause.id ? null : cause.id)}
            acts={acts}
          />
        ))}
        {ledger.rest.count > 0 && (
          <li className="rest">
            <span>
              {ledger.rest.count} more {ledger.rest.count === 1 ? "cause applies" : "causes apply"} to this engine;
              together
            </span>
            <span className="pv">{formatShare(ledger.rest.probability)}</span>
          </li>
        )}
      </ol>
      <Key />
    </div>
  );
}

interface CauseRowProps {
  cause: LedgerCauseView;
  isLead: boolean;
  isOpen: boolean;
  inTimes: boolean;
  scale: BitsScale;
  fresh: ReadonlySet<string>;
  onToggle: () => void;
  acts?: (cause: LedgerCauseView) => ReactNode;
}

function CauseRow({ cause, isLead, isOpen, inTimes, scale, fresh, onToggle, acts }: CauseRowProps) {
  const isLow = cause.probability < 0.01;
  return (
    <li className={cx("lrow", isLead && "lead", isOpen && "open")} data-id={cause.id}>
      <button type="button" className="lhead" aria-expanded={isOpen} onClick={onToggle}>
        <span className="t">
          <Glyph family={cause.family} />
          <b>
            <Words>{cause.title}</Words>
            {cause.mark && <span className="faint"> {cause.mark.kind}</span>}
          </b>
        </span>
        <span className="track">
          <svg className="stack wf" width={scale.width} height="100%" aria-hidden="true">
            <Grid scale={scale} />
          </svg>
          <Stack cause={cause} scale={scale} fresh={fresh} />
        </span>
        <span className="num net">{!inTimes && formatNumber(netBits(cause), 1, { signed: true })}</span>
        <span className="pr">
          <span className={cx("pv", isLow && "low")}>
            {isLow ? "under 1" : formatShare(cause.probability).replace(" %", "")}
            <i> %</i>
          </span>
          <svg className="pb" width="84" height="3" viewBox="0 0 84 3" preserveAspectRatio="none" aria-hidden="true">
            <rect className="t" width="84" height="1" y="1" />
            <rect className="v" width={Math.round(cause.probability * 840) / 10} height="3" />
          </svg>
        </span>
      </button>
      {isOpen && <Detail cause={cause} scale={scale} inTimes={inTimes} acts={acts} />}
    </li>
  );
}

function Detail({ cause, scale, inTimes, acts }: Pick<CauseRowProps, "cause" | "scale" | "inTimes" | "acts">) {
  const steps = [...cause.evidence].sort((a, b) => Math.abs(b.weight) - Math.abs(a.weight));
  let sum = cause.priorBits;
  return (
    <div className="detail">
      <ol className="ev">
        <li>
          <span className="t">
            How often this is the cause before any reading <span className="faint">prior, engines of this kind</span>
          </span>
          <span className="track">
            <WaterfallStep
              scale={scale}
              family={cause.family}
              from={null}
              to={cause.priorBits}
              isLast={steps.length === 0}
            />
          </span>
          <span className="num net">
            {inTimes
              ? `1 in ${formatNumber(2 ** -cause.priorBits, 0)}`
              : formatNumber(cause.priorBits, 1, { signed: true })}
          </span>
        </li>
        {steps.map((step, index) => {
          const from = sum;
          sum += step.weight;
          return (
            <li key={step.id}>
              <span className="t">
                <Words>{step.statement}</Words>{" "}
                <span className="faint">
                  <Words>{step.source}</Words>
                </span>
              </span>
              <span className="track">
                <WaterfallStep
                  scale={scale}
                  family={cause.family}
                  from={from}
                  to={sum}
                  isLast={index === steps.length - 1}
                />
              </span>
              <span className="num net">
                {inTimes ? timesWords(step.weight) : formatNumber(step.weight, 1, { signed: true })}
              </span>
            </li>
          );
        })}
      </ol>
      <div className="un">
        <div>
          <h2>Leaves unexplained</h2>
          {cause.unexplained === null ? (
            <p>Worked out for the leading cause only.</p>
          ) : cause.unexplained.length === 0 ? (
            <p>Nothing. Every finding out of its band follows from this cause.</p>
          ) : (
            <ul>
              {cause.unexplained.map((what) => (
                <li key={what}>
                  <Words>{what}</Words>
                </li>
              ))}
            </ul>
          )}
        </div>
        <div>
          <h2>Where</h2>
          <p>{cause.where ? <Words>{cause.where}</Words> : "The readings do not say."}</p>
        </div>
        {acts && <div className="acts wrap">{acts(cause)}</div>}
      </div>
    </div>
  );
}

/** +1.4 bits as "2.6 × likelier". */
export function timesWords(bits: number): string {
  const times = 2 ** Math.abs(bits);
  const figure = formatNumber(times, times < 10 ? 1 : 0);
  return bits >= 0 ? `${figure} × likelier` : `${figure} × less so`;
}

function Axis({ scale }: { scale: BitsScale }) {
  return (
    <svg className="chart" aria-hidden="true" width={scale.width} height="28" viewBox={`0 0 ${scale.width} 28`}>
      <text x={scale.zero - 10} y="11" textAnchor="end" className="t">
        speaks against
      </text>
      <text x={scale.zero + 10} y="11" className="t">
        speaks for
      </text>
      {scale.ticks.map((tick) => (
        <text key={tick.bits} className="m" x={tick.x} y="25" textAnchor="middle">
          {formatNumber(tick.bits, 0, { signed: true })}
        </text>
      ))}
    </svg>
  );
}

function Key() {
  return (
    <p className="note key">
      <span>
        <svg className="stack" width="26" height="14" viewBox="0 0 26 14" aria-hidden="true">
          <rect className="prior" x=".5" y=".5" width="25" height="13" />
        </svg>
        prior
      </span>
      <span>
        <svg className="stack mech" width="26" height="14" viewBox="0 0 26 14" aria-hidden="true">
          <rect className="con" x=".6" y=".6" width="24.8" height="12.8" />
        </svg>
        against
      </span>
      <span>
        <svg className="stack lean" width="26" height="14" viewBox="0 0 26 14" aria-hidden="true">
          <rect className="pro" width="26" height="14" />
        </svg>
        for, in the cause’s kind: <Glyph family="lean" silent /> lean <Glyph family="rich" silent /> rich{" "}
        <Glyph family="spark" silent /> ignition <Glyph family="mech" silent /> mechanical
      </span>
      <span>
        <svg className="stack" width="6" height="16" viewBox="0 0 6 16" aria-hidden="true">
          <path className="net" d="M3 0V16" />
        </svg>
        net; each 1 bit doubles the odds
      </span>
    </p>
  );
}

/** Which pieces came with the last change of the ledger. Empty at first sight. */
function useFreshPieces(ledger: LedgerView): ReadonlySet<string> {
  const known = useRef<Set<string> | null>(null);
  const [fresh, setFresh] = useState<ReadonlySet<string>>(new Set());
  useEffect(() => {
    const now = new Set(ledger.causes.flatMap((cause) => cause.evidence.map((e) => `${cause.id}:${e.id}`)));
    const before = known.current;
    known.current = now;
    if (before) setFresh(new Set([...now].filter((key) => !before.has(key))));
  }, [ledger]);
  return fresh;
}

/** Rows slide from where they stood to where they stand. Reduced motion: at once. */
function useFlip(list: React.RefObject<HTMLOListElement | null>, ledger: LedgerView) {
  const tops = useRef(new Map<string, number>());
  // biome-ignore lint/correctness/useExhaustiveDependencies: it must run after every change of the ledger
  useLayoutEffect(() => {
    const rows = [...(list.current?.querySelectorAll<HTMLElement>(".lrow") ?? [])];
    const base = list.current?.getBoundingClientRect().top ?? 0;
    const isStill = matchMedia("(prefers-reduced-motion: reduce)").matches;
    const next = new Map<string, number>();
    for (const row of rows) {
      const id = row.dataset.id ?? "";
      const top = row.getBoundingClientRect().top - base;
      next.set(id, top);
      const was = tops.current.get(id);
      if (was !== undefined && Math.abs(was - top) > 1 && !isStill && typeof row.animate === "function") {
        row.animate([{ transform: `translateY(${was - top}px)` }, { transform: "none" }], {
          duration: MOVE_MS,
          easing: "cubic-bezier(.2,0,0,1)",
        });
      }
    }
    tops.current = next;
  }, [ledger]);
}
