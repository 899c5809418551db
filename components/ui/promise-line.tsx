"use client";

import Link from "next/link";
import { formatClock, minuteOfDay } from "./format";
import { useWidth } from "./use-width";

export interface PromiseMark {
  number: string;
  href: string;
  /** ISO time, today in the shop's zone. */
  at: string;
  isMine: boolean;
  isLate: boolean;
}

export interface PromiseLineProps {
  promises: readonly PromiseMark[];
  now: string;
  timeZone: string;
  /** "08:00" and "18:00". */
  opens: string;
  closes: string;
}

function minutes(clock: string): number {
  const [hour, minute] = clock.split(":").map(Number);
  return (hour ?? 0) * 60 + (minute ?? 0);
}

/** The day from opening to closing: the past solid, a tick a promise, mine bold, late inverse. */
export function PromiseLine({ promises, now, timeZone, opens, closes }: PromiseLineProps) {
  const [ref, width] = useWidth(1392);
  const from = Math.floor(minutes(opens) / 60) * 60;
  const to = Math.max(from + 60, Math.ceil(minutes(closes) / 60) * 60);
  const start = width < 700 ? 4 : 96;
  const end = width - 20;
  const x = (minute: number) => Math.round((start + ((minute - from) / (to - from)) * (end - start)) * 10) / 10;
  const clampX = (minute: number) => Math.min(end, Math.max(start, x(minute)));
  const nowX = clampX(minuteOfDay(now, timeZone));
  const step = (end - start) / ((to - from) / 60) < 54 ? 120 : 60;
  const hours = Array.from({ length: Math.floor((to - from) / step) + 1 }, (_, i) => from + i * step);
  const late = promises.filter((promise) => promise.isLate);
  const spoken =
    promises.length === 0
      ? "Nothing is promised for today"
      : `Promises today: ${promises.length}, ${late.length === 0 ? "none late" : `late: ${late.map((p) => p.number).join(", ")}`}`;
  return (
    <div className="dayline" ref={ref}>
      {/* biome-ignore lint/a11y/useSemanticElements: a drawing that holds links; no HTML element groups inside SVG */}
      <svg className="chart" width={width} height="62" viewBox={`0 0 ${width} 62`} role="group" aria-label={spoken}>
        {start > 10 && (
          <text x="0" y="44" className="t">
            Promised today
          </text>
        )}
        {hours.map((minute) => (
          <g key={minute}>
            <path className="hair" d={`M${x(minute)} 40v7`} />
            <text x={x(minute)} y="60" textAnchor={minute === from && start < 10 ? "start" : "middle"}>
              {String(Math.floor(minute / 60)).padStart(2, "0")}:00
            </text>
          </g>
        ))}
        <path className="ax" d={`M${start} 40H${end}`} />
        <path className="inkline w3" d={`M${start} 40H${nowX}`} />
        <path className="inkline" d={`M${nowX} 4V50`} />
        <text x={nowX < 90 ? nowX + 7 : nowX - 7} y="12" textAnchor={nowX < 90 ? "start" : "end"} className="heavy">
          Now {formatClock(now, timeZone)}
        </text>
        {placed(promises, (promise) => clampX(minuteOfDay(promise.at, timeZone))).map(({ promise, at, row }) => {
          const y = 34 - (row ?? 0) * 13;
          return (
            <g key={promise.number}>
              <path className={promise.isLate ? "inkline w3" : "inkline w15"} d={`M${at} ${y - 8}V40`} />
              {row !== null && (
                <Link href={promise.href} aria-label={`Case ${promise.number}${promise.isLate ? ", late" : ""}`}>
                  {promise.isLate && <rect className="alarmbox" x={at + 3} y={y - 11} width={62} height={15} rx={2} />}
                  <text className={promise.isLate ? "m onalarm" : promise.isMine ? "m heavy" : "m"} x={at + 7} y={y}>
                    {promise.number}
                  </text>
                  {promise.isLate && (
                    <text className="onalarm" x={at + 38} y={y}>
                      late
                    </text>
                  )}
                </Link>
              )}
            </g>
          );
        })}
      </svg>
    </div>
  );
}

/**
 * A label that would touch another goes up a row; where both rows are taken it is left out and the tick stays. Late
 * ones choose first, then mine.
 */
function placed(promises: readonly PromiseMark[], place: (promise: PromiseMark) => number) {
  const taken: { row: number; from: number; to: number }[] = [];
  const rank = (promise: PromiseMark) => (promise.isLate ? 0 : promise.isMine ? 1 : 2);
  return [...promises]
    .sort((a, b) => rank(a) - rank(b) || a.at.localeCompare(b.at))
    .map((promise) => {
      const at = place(promise);
      const to = at + (promise.isLate ? 70 : 42);
      const row = [0, 1].find((r) => taken.every((t) => t.row !== r || to <= t.from || at >= t.to)) ?? null;
      if (row !== null) taken.push({ row, from: at, to });
      return { promise, at, row };
    })
    .sort((a, b) => a.at - b.at);
}
