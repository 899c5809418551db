"use client";

import { formatNumber } from "@/components/ui/format";
import { useWidth } from "@/components/ui/use-width";

/** Hours sold as the band and hours worked as the bar, zero-based. */
export function ClockBar({ soldMinutes, workedMinutes }: { soldMinutes: number; workedMinutes: number }) {
  const [ref, width] = useWidth(788);
  const sold = soldMinutes / 60;
  const worked = workedMinutes / 60;
  const most = Math.max(0.5, Math.ceil(Math.max(sold * 1.2, worked * 1.05) * 2) / 2);
  const step = most > 8 ? 2 : most > 4 ? 1 : most > 1 ? 0.5 : 0.25;
  const x = (hours: number) => Math.round((hours / most) * width * 10) / 10;
  const ticks = Array.from({ length: Math.floor(most / step) + 1 }, (_, i) => i * step);
  return (
    <div className="ckwrap" ref={ref}>
      <svg
        className="chart ck"
        width={width}
        height="44"
        viewBox={`0 0 ${width} 44`}
        role="img"
        aria-label={`${formatNumber(worked, 1)} hours worked of ${formatNumber(sold, 1)} hours sold`}
      >
        <path className="ax" d={`M0 18.5H${width}`} />
        <rect className="bandfill" x="0" y="12" width={x(sold)} height="13" />
        <rect className="inkfill" x="0" y="15" width={x(worked)} height="7" />
        {ticks.map((hours, index) => (
          <g key={hours}>
            <path className="ax" d={`M${Math.min(width - 0.5, Math.max(0.5, x(hours)))} 26v4`} />
            <text
              x={x(hours)}
              y="43"
              textAnchor={index === 0 ? "start" : index === ticks.length - 1 ? "end" : "middle"}
            >
              {index === 0 ? "0 h" : formatNumber(hours, Number.isInteger(hours) ? 0 : step < 0.5 ? 2 : 1)}
            </text>
          </g>
        ))}
        {sold > 0 && (
          <>
            <path className="inkline w15" d={`M${x(sold)} 6V30`} />
            <text
              className="inktext"
              x={x(sold) > width - 80 ? x(sold) - 6 : x(sold) + 6}
              y="10"
              textAnchor={x(sold) > width - 80 ? "end" : "start"}
            >
              sold, {formatNumber(sold, 1)} h
            </text>
          </>
        )}
      </svg>
    </div>
  );
}
