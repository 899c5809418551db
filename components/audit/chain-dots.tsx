"use client";

import { formatNumber } from "@/components/ui/format";
import { useWidth } from "@/components/ui/use-width";
import type { ChainDayView } from "./model";

/** A dot a day on one line, bars for entries above it. A break is an inverse segment with its entry number. */
export function ChainDots({
  days,
  checkedDay,
}: {
  days: readonly ChainDayView[] /** Days up to this one are verified. */;
  checkedDay?: string;
}) {
  const [ref, width] = useWidth(1392);
  const shown = days.slice(-Math.max(7, Math.min(days.length, Math.floor(width / 20))));
  const step = width / Math.max(1, shown.length);
  const most = Math.max(1, ...shown.map((day) => day.entries));
  const height = (n: number) => (n === 0 ? 0 : Math.max(2, Math.sqrt(n / most) * 38));
  const round = (n: number) => Math.round(n * 10) / 10;
  const broken = shown.find((day) => day.breakAt !== undefined);
  const every = Math.max(1, Math.ceil(shown.length / 4));
  const last = shown.at(-1);
  return (
    <div className="chainwrap" ref={ref}>
      <svg
        className="chart"
        width={width}
        height="72"
        viewBox={`0 0 ${width} 72`}
        role="img"
        aria-label={`Entries a day over ${shown.length} days; ${broken ? `the chain breaks at entry ${broken.breakAt}` : "every day’s chain verified"}`}
      >
        {shown.map((day, index) => {
          const isToday = index === shown.length - 1;
          const h = height(day.entries);
          return (
            <rect
              key={day.day}
              className={isToday ? "inkline w15" : "bandfill"}
              x={round(index * step + step * 0.13)}
              y={round(46 - h)}
              width={round(step * 0.74)}
              height={round(h)}
            />
          );
        })}
        <path className="inkline" d={`M0 50.5H${width}`} />
        {shown.map((day, index) => {
          const x = round((index + 0.5) * step);
          if (day.breakAt !== undefined) {
            return (
              <g key={day.day}>
                <rect
                  className="alarmbox"
                  x={Math.min(width - 92, Math.max(0, x - 46))}
                  y="43"
                  width="92"
                  height="15"
                  rx="2"
                />
                <text className="onalarm" x={Math.min(width - 46, Math.max(46, x))} y="54" textAnchor="middle">
                  breaks at {formatNumber(day.breakAt)}
                </text>
              </g>
            );
          }
          const isChecked = !checkedDay || day.day <= checkedDay;
          return (
            <circle
              key={day.day}
              className={isChecked ? "inkfill" : "opendot"}
              cx={x}
              cy="50.5"
              r={day.entries === 0 ? 1.2 : 2.5}
            />
          );
        })}
        {shown.map((day, index) =>
          index % every === 0 && index < shown.length - 2 ? (
            <text
              key={day.day}
              x={index === 0 ? 3 : round((index + 0.5) * step)}
              y="68"
              textAnchor={index === 0 ? "start" : "middle"}
            >
              {day.label}
            </text>
          ) : null,
        )}
        {last && (
          <text className="heavy" x={width} y="68" textAnchor="end">
            {`today, ${formatNumber(last.entries)} so far`}
          </text>
        )}
      </svg>
    </div>
  );
}
