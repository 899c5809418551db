"use client";

import { formatPrice } from "@/components/ui/format";
import { useWidth } from "@/components/ui/use-width";
import { niceTop } from "./charts";
import type { ClosedWeekView } from "./model";
import { ReportCell } from "./report-cell";

const round = (n: number) => Math.round(n * 10) / 10;

/** Invoiced as outline, paid as solid, a week a bar; under each week how many cases closed. */
export function ClosedWeeks({
  title,
  weeks,
  currency,
  locale,
}: {
  title: string;
  weeks: readonly ClosedWeekView[];
  currency: string;
  locale: string;
}) {
  const [ref, width] = useWidth(424);
  const left = 58;
  const bottom = 186;
  const most = niceTop(Math.max(1, ...weeks.flatMap((week) => [week.invoicedMinor, week.paidMinor])));
  const y = (minor: number) => round(bottom - (minor / most) * (bottom - 10));
  const step = (width - left) / Math.max(1, weeks.length);
  const whole = (minor: number) => formatPrice(minor, currency, locale).replace(/[.,]00$/, "");
  const every = Math.max(1, Math.ceil(weeks.length / 4));
  return (
    <ReportCell
      title={title}
      note="Invoiced (outline) and paid (solid), a week; below, cases closed"
      table={{
        heads: ["Week", "Closed", "Left unrepaired", "Invoiced", "Paid"],
        rows: weeks.map((week) => [
          week.label,
          String(week.closed),
          String(week.released),
          formatPrice(week.invoicedMinor, currency, locale),
          formatPrice(week.paidMinor, currency, locale),
        ]),
      }}
    >
      <div ref={ref}>
        <svg className="chart" width={width} height="240" viewBox={`0 0 ${width} 240`} role="img" aria-label={title}>
          {[0, 0.5, 1].map((part) => (
            <g key={part}>
              <path className="hair" d={`M${left - 6} ${y(most * part)}H${width}`} />
              <text className="m" x={left - 10} y={y(most * part) + 4} textAnchor="end">
                {part === 0 ? "0" : whole(most * part)}
              </text>
            </g>
          ))}
          <text x="0" y="204">
            closed
          </text>
          {weeks.map((week, index) => {
            const x = round(left + index * step + step * 0.08);
            const w = round(step * 0.84);
            return (
              <g key={week.label}>
                <rect
                  className="quoted"
                  x={x + 0.5}
                  y={y(week.invoicedMinor)}
                  width={Math.max(1, round(w - 1))}
                  height={round(bottom - y(week.invoicedMinor))}
                />
                <rect
                  className="steel"
                  x={x}
                  y={y(week.paidMinor)}
                  width={w}
                  height={round(bottom - y(week.paidMinor))}
                />
                <text className="m" x={round(x + w / 2)} y="204" textAnchor="middle">
                  {week.closed}
                </text>
                {index % every === 0 && (
                  <text x={x} y="226">
                    {week.label}
                  </text>
                )}
              </g>
            );
          })}
        </svg>
      </div>
    </ReportCell>
  );
}
