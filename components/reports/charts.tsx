"use client";

import { FamilyEnd } from "@/components/ui/band-mark";
import { cx } from "@/components/ui/cx";
import { FAMILY_WORDS } from "@/components/ui/family";
import { capitalise, formatNumber, formatPrice, formatSpan } from "@/components/ui/format";
import { useWidth } from "@/components/ui/use-width";
import type { ComebackRowView, HoursView, QuotedWeekView, RankView, StageTimeView, WaitingShareView } from "./model";
import { ReportCell } from "./report-cell";

const LABEL = 64;
const round = (n: number) => Math.round(n * 10) / 10;
const percent = (share: number) => `${Math.round(share * 100)} %`;

/** Time in each stage on a square-root axis, marked as such by its ticks: median as a bar, the middle half as a band. */
export function StageTimes({ title, rows }: { title: string; rows: readonly StageTimeView[] }) {
  const [ref, width] = useWidth(424);
  const end = width - 60;
  const most = Math.max(24, ...rows.map((row) => row.upperH));
  const x = (hours: number) => round(LABEL + Math.sqrt(hours / most) * (end - LABEL));
  const longest = rows.reduce<StageTimeView | null>(
    (best, row) => (row.medianH > (best?.medianH ?? -1) ? row : best),
    null,
  );
  const ticks = [1, 4, 8, 16, 24, 48, 96, 168].filter((hours) => hours <= most);
  const height = rows.length * 36 + 6;
  const span = (hours: number) => formatSpan(hours * 60);
  return (
    <ReportCell
      title={title}
      note="Time in stage: median, and the middle half of cases. Square-root axis"
      table={{
        heads: ["Stage", "Median", "A quarter under", "A quarter over"],
        rows: rows.map((row) => [row.label, span(row.medianH), span(row.lowerH), span(row.upperH)]),
      }}
    >
      <div ref={ref}>
        <svg
          className="chart"
          width={width}
          height={height + 24}
          viewBox={`0 0 ${width} ${height + 24}`}
          role="img"
          aria-label={`Median time in each stage; ${longest ? `${longest.label} has ${span(longest.medianH)}` : ""}`}
        >
          {ticks.map((hours) => (
            <g key={hours}>
              <path className="hair" d={`M${x(hours)} 4V${height}`} />
              <text x={x(hours)} y={height + 18} textAnchor="middle">
                {hours < 48 ? `${hours} h` : `${hours / 24} d`}
              </text>
            </g>
          ))}
          {rows.map((row, index) => {
            const y = index * 36;
            const isLongest = row === longest;
            return (
              <g key={row.label}>
                <text className={isLongest ? "heavy name" : "name"} x="0" y={y + 26}>
                  {row.label}
                </text>
                <rect
                  className="bandfill"
                  x={x(row.lowerH)}
                  y={y + 18}
                  width={round(Math.max(2, x(row.upperH) - x(row.lowerH)))}
                  height="8"
                />
                <rect className="inkfill" x={x(row.medianH) - 1.5} y={y + 14} width="3" height="16" />
                <text className={isLongest ? "m heavy" : "m"} x={width} y={y + 26} textAnchor="end">
                  {span(row.medianH)}
                </text>
              </g>
            );
          })}
        </svg>
      </div>
    </ReportCell>
  );
}

/** Whom open cases waited on, week by week; each party on its own zero line. */
export function WaitingShares({
  title,
  rows,
  weekLabels,
}: {
  title: string;
  rows: readonly WaitingShareView[];
  weekLabels: readonly string[];
}) {
  const [ref, width] = useWidth(424);
  const end = width - 58;
  const count = weekLabels.length;
  const x = (week: number) => round(LABEL + (count < 2 ? 0 : (week / (count - 1)) * (end - LABEL)));
  const most = Math.max(0.2, ...rows.flatMap((row) => row.weeks));
  const lane = 53;
  const height = rows.length * lane;
  const every = Math.max(1, Math.ceil(count / 3));
  return (
    <ReportCell
      title={title}
      note="Share of open hours, by whose hands the case was in, as its stage says"
      table={{
        heads: ["Week", ...rows.map((row) => row.label)],
        rows: weekLabels.map((label, week) => [label, ...rows.map((row) => percent(row.weeks[week] ?? 0))]),
      }}
    >
      <div ref={ref}>
        <svg
          className="chart"
          width={width}
          height={height + 24}
          viewBox={`0 0 ${width} ${height + 24}`}
          role="img"
          aria-label={rows.map((row) => `${row.label} ${percent(row.weeks.at(-1) ?? 0)} now`).join(", ")}
        >
          {rows.map((row, index) => {
            const base = (index + 1) * lane - 2;
            const y = (share: number) => round(base - (share / most) * (lane - 12));
            const last = row.weeks.at(-1) ?? 0;
            return (
              <g key={row.label}>
                <path className="hair" d={`M${LABEL} ${base}H${end}`} />
                <text className={index === 0 ? "heavy name" : "name"} x="0" y={y(last) + 8}>
                  {row.label}
                </text>
                <path
                  className={cx("trend", index === 0 && "lead")}
                  d={row.weeks.map((share, week) => `${week === 0 ? "M" : "L"}${x(week)} ${y(share)}`).join("")}
                />
                <circle className="inkfill" cx={x(count - 1)} cy={y(last)} r="2.5" />
                <text className={index === 0 ? "m heavy" : "m"} x={width} y={y(last) + 4} textAnchor="end">
                  {percent(last)}
                </text>
              </g>
            );
          })}
          {weekLabels.map((label, week) =>
            (week % every === 0 && count - 1 - week >= every / 2) || week === count - 1 ? (
              <text
                key={label}
                x={x(week)}
                y={height + 18}
                textAnchor={week === 0 ? "start" : week === count - 1 ? "end" : "middle"}
              >
                {label}
              </text>
            ) : null,
          )}
        </svg>
      </div>
    </ReportCell>
  );
}

/** Quoted as outline, approved as solid, a week a bar; zero-based. */
export function QuotedApproved({
  title,
  weeks,
  currency,
  locale,
}: {
  title: string;
  weeks: readonly QuotedWeekView[];
  currency: string;
  locale: string;
}) {
  const [ref, width] = useWidth(424);
  const left = 58;
  const bottom = 206;
  const most = niceTop(Math.max(1, ...weeks.map((week) => week.quotedMinor)));
  const y = (minor: number) => round(bottom - (minor / most) * (bottom - 10));
  const step = (width - left) / Math.max(1, weeks.length);
  const whole = (minor: number) => formatPrice(minor, currency, locale).replace(/[.,]00$/, "");
  const every = Math.max(1, Math.ceil(weeks.length / 4));
  return (
    <ReportCell
      title={title}
      note="Quoted (outline) and approved (solid), a week"
      table={{
        heads: ["Week", "Quoted", "Approved"],
        rows: weeks.map((week) => [
          week.label,
          formatPrice(week.quotedMinor, currency, locale),
          formatPrice(week.approvedMinor, currency, locale),
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
          {weeks.map((week, index) => {
            const x = round(left + index * step + step * 0.08);
            const w = round(step * 0.84);
            return (
              <g key={week.label}>
                <rect
                  className="quoted"
                  x={x + 0.5}
                  y={y(week.quotedMinor)}
                  width={Math.max(1, w - 1)}
                  height={round(bottom - y(week.quotedMinor))}
                />
                <rect
                  className="steel"
                  x={x}
                  y={y(week.approvedMinor)}
                  width={w}
                  height={round(bottom - y(week.approvedMinor))}
                />
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

/** The round figure at the top of a money axis. */
export function niceTop(value: number): number {
  const base = 10 ** Math.floor(Math.log10(value));
  return [1, 2, 3, 4, 5, 6, 8, 10].map((n) => n * base).find((n) => n >= value) ?? value;
}

/** Hours billed of hours on the clock, zero-based to 100 %. */
export function HoursSold({ title, note, rows }: { title: string; note: string; rows: readonly HoursView[] }) {
  const [ref, width] = useWidth(424);
  const left = 96;
  const end = width - 58;
  const most = Math.max(1, ...rows.map((row) => (row.workedH > 0 ? row.soldH / row.workedH : 0)));
  const x = (share: number) => round(left + (share / most) * (end - left));
  const height = rows.length * 52 + 6;
  const hours = (n: number) => formatNumber(n, n < 100 ? 1 : 0);
  return (
    <ReportCell
      title={title}
      note={note}
      table={{
        heads: ["Who", "Billed", "On the clock", "Share"],
        rows: rows.map((row) => [
          row.label,
          `${hours(row.soldH)} h`,
          `${hours(row.workedH)} h`,
          row.workedH > 0 ? percent(row.soldH / row.workedH) : "–",
        ]),
      }}
    >
      <div ref={ref}>
        <svg
          className="chart"
          width={width}
          height={height + 24}
          viewBox={`0 0 ${width} ${height + 24}`}
          role="img"
          aria-label={title}
        >
          {[0.25, 0.5, 0.75, 1].map((part) => (
            <g key={part}>
              <path className="hair" d={`M${x(part)} 4V${height}`} />
              <text x={x(part)} y={height + 18} textAnchor="middle">
                {percent(part)}
              </text>
            </g>
          ))}
          {rows.map((row, index) => {
            const y = index * 52 + 18;
            const share = row.workedH > 0 ? row.soldH / row.workedH : 0;
            const isAll = index === rows.length - 1 && rows.length > 1;
            return (
              <g key={row.label}>
                <text className={isAll ? "heavy name" : "name"} x="0" y={y + 4}>
                  {row.label}
                </text>
                <path className="ax" d={`M${left} ${y}H${end}`} />
                <rect
                  className={isAll ? "inkfill" : "steel"}
                  x={left}
                  y={y - 5}
                  width={round(x(share) - left)}
                  height="10"
                />
                <text x={left} y={y + 20}>{`${hours(row.soldH)} h of ${hours(row.workedH)} h`}</text>
                <text className={isAll ? "m heavy" : "m"} x={width} y={y + 4} textAnchor="end">
                  {row.workedH > 0 ? percent(share) : "–"}
                </text>
              </g>
            );
          })}
        </svg>
      </div>
    </ReportCell>
  );
}

/** Each mark a case that came back; the row tells what was first proven. */
export function Comebacks({
  title,
  rows,
  from,
  to,
}: {
  title: string;
  rows: readonly ComebackRowView[];
  from: string;
  to: string;
}) {
  const [ref, width] = useWidth(424);
  const end = width - 62;
  const x = (at: number) => round(LABEL + at * (end - LABEL));
  const height = rows.length * 52 + 6;
  return (
    <ReportCell
      title={title}
      note="Each mark is a case; row: what was first proven"
      table={{
        heads: ["Kind", "Came back", "Closed", "Cases"],
        rows: rows.map((row) => [
          capitalise(FAMILY_WORDS[row.family]),
          String(row.cases.length),
          String(row.closed),
          row.cases.map((c) => c.number).join(", "),
        ]),
      }}
    >
      <div ref={ref}>
        {/* biome-ignore lint/a11y/useSemanticElements: a drawing that holds links; no HTML element groups inside SVG */}
        <svg
          className="chart"
          width={width}
          height={height + 24}
          viewBox={`0 0 ${width} ${height + 24}`}
          role="group"
          aria-label={title}
        >
          {rows.map((row, index) => {
            const y = index * 52 + 18;
            return (
              <g key={row.family} className={row.family}>
                <text className="name" x="0" y={y + 4}>
                  {capitalise(FAMILY_WORDS[row.family])}
                </text>
                <path className="hair" d={`M${LABEL} ${y}H${end}`} />
                {row.cases.map((comeback) => (
                  <a key={comeback.number} href={comeback.href} aria-label={`Case ${comeback.number} came back`}>
                    <g className="bm">
                      <FamilyEnd family={row.family} x={x(comeback.at)} y={y} k={1.4} />
                    </g>
                    <text className="m" x={x(comeback.at)} y={y + 20} textAnchor="middle">
                      {comeback.number}
                    </text>
                  </a>
                ))}
                <text className="m" x={width} y={y + 4} textAnchor="end">
                  {`${row.cases.length} of ${row.closed}`}
                </text>
              </g>
            );
          })}
          <text x={LABEL} y={height + 18}>
            {from}
          </text>
          <text x={end} y={height + 18} textAnchor="end">
            {to}
          </text>
        </svg>
      </div>
    </ReportCell>
  );
}

/** How often the proven cause was ranked first when it was marked: one cell a case. */
export function Ranks({ title, ranks }: { title: string; ranks: RankView }) {
  const [ref, width] = useWidth(424);
  const all = [
    ...Array.from({ length: ranks.first }, () => "first" as const),
    ...Array.from({ length: ranks.second }, () => "second" as const),
    ...Array.from({ length: ranks.third }, () => "third" as const),
    ...Array.from({ length: ranks.lower }, () => "lower" as const),
  ];
  const total = all.length;
  // Past six hundred cases a cell stands for several, so that the drawing keeps its size.
  const each = Math.max(1, Math.ceil(total / 600));
  const cells = all.filter((_, index) => index % each === 0);
  const columns = Math.max(8, Math.floor(width / 18));
  const lines = Math.ceil(cells.length / columns);
  const height = lines * 18;
  return (
    <ReportCell
      title={title}
      note={`Rank when it was marked proven, one cell ${each === 1 ? "a case" : `${each} cases`}`}
      table={{
        heads: ["Rank", "Cases"],
        rows: (["first", "second", "third", "lower"] as const).map((rank) => [capitalise(rank), String(ranks[rank])]),
      }}
    >
      <div ref={ref}>
        <svg
          className="chart"
          width={width}
          height={height + 52}
          viewBox={`0 0 ${width} ${height + 52}`}
          role="img"
          aria-label={`${title}: first ${ranks.first}, second ${ranks.second}, third ${ranks.third}, lower ${ranks.lower}`}
        >
          {cells.map((rank, index) => (
            <RankMark
              // biome-ignore lint/suspicious/noArrayIndexKey: a cell is its place
              key={index}
              rank={rank}
              x={(index % columns) * 18}
              y={Math.floor(index / columns) * 18}
              size={14}
            />
          ))}
          {(["first", "second", "third", "lower"] as const).map((rank, index) => (
            <g key={rank}>
              <RankMark rank={rank} x={index * 88} y={height + 12} size={12} />
              <text className="name" x={index * 88 + 18} y={height + 22}>
                {rank}
              </text>
              <text className="m" x={index * 88 + 18} y={height + 39}>
                {ranks[rank]}
              </text>
            </g>
          ))}
        </svg>
      </div>
    </ReportCell>
  );
}

function RankMark({ rank, x, y, size }: { rank: keyof RankView; x: number; y: number; size: number }) {
  if (rank === "first") return <rect className="inkfill" x={x} y={y} width={size} height={size} />;
  if (rank === "second") return <rect className="halfink" x={x} y={y} width={size} height={size} />;
  if (rank === "third")
    return <rect className="openink" x={x + 0.75} y={y + 0.75} width={size - 1.5} height={size - 1.5} />;
  return (
    <path
      className="inkline w15"
      d={`M${x + 2} ${y + 2}l${size - 4} ${size - 4}m0-${size - 4}l-${size - 4} ${size - 4}`}
    />
  );
}
