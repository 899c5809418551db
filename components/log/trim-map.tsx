import { MODE_WORDS } from "@/components/readings/mode-words";
import { cx } from "@/components/ui/cx";
import { formatNumber } from "@/components/ui/format";
import { Glyph } from "@/components/ui/glyph";
import { ScrollX } from "@/components/ui/scroll-x";
import type { TrimCellView, TrimRowView } from "./model";

const WIDTH = 236;
const ZERO = WIDTH / 2;
/** Pixels a percent: 16 % either way. */
const PER = ZERO / 16;

/** Mode down, bank across; rich to the left, lean to the right. Long trim solid, short outlined, usual band shaded. */
export function TrimMap({ rows, bandPct = 8 }: { rows: readonly TrimRowView[]; bandPct?: number }) {
  const banks = rows.some((row) => row.banks.some((cell) => cell.bank === 2)) ? ([1, 2] as const) : ([1] as const);
  return (
    <>
      <ScrollX label="Trim map, scrolls">
        <table className="tmap">
          <thead>
            <tr>
              <td />
              {banks.map((bank) => (
                <th key={bank} scope="col" colSpan={2}>
                  Bank {bank}
                </th>
              ))}
            </tr>
            <tr className="dir">
              <td />
              {banks.flatMap((bank) => [
                <td key={`${bank}-dir`}>
                  <span>
                    <Glyph family="rich" silent /> rich, fuel taken away
                  </span>
                  <span>
                    lean, fuel added <Glyph family="lean" silent />
                  </span>
                </td>,
                <td key={`${bank}-gap`} />,
              ])}
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <tr key={row.mode}>
                <th scope="row">{MODE_WORDS[row.mode]}</th>
                {banks.map((bank) => (
                  <TrimCell
                    key={bank}
                    cell={
                      row.banks.find((cell) => cell.bank === bank) ?? {
                        bank,
                        short: null,
                        long: null,
                        why: "not logged",
                      }
                    }
                    bandPct={bandPct}
                  />
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollX>
      <p className="note">
        Solid: long trim. Outlined: short trim. Shaded: usual band, −{bandPct} to +{bandPct} %. Accelerating counts
        closed-loop seconds only.
      </p>
    </>
  );
}

function TrimCell({ cell, bandPct }: { cell: TrimCellView; bandPct: number }) {
  const { short, long } = cell;
  const has = short !== null || long !== null;
  const total = (short ?? 0) + (long ?? 0);
  const isOut = has && Math.abs(total) > bandPct;
  const family = total > 0 ? "lean" : "rich";
  const clamp = (pct: number) => Math.max(-15.6, Math.min(15.6, pct)) * PER;
  const longEnd = clamp(long ?? 0);
  const end = clamp(total);
  return (
    <>
      <td className={cx(isOut && family)}>
        <svg
          className="chart tm"
          width={WIDTH}
          height="34"
          viewBox={`0 0 ${WIDTH} 34`}
          role="img"
          aria-label={has ? `${formatNumber(total, 1, { signed: true })} percent` : (cell.why ?? "none")}
        >
          <rect className="laneband" x={ZERO - bandPct * PER} y="0" width={2 * bandPct * PER} height="34" />
          {has && (
            <>
              <rect
                className={isOut ? "fam" : "steel"}
                x={ZERO + Math.min(0, longEnd)}
                y="10"
                width={Math.abs(longEnd)}
                height="14"
              />
              {Math.abs(end - longEnd) > 1.5 && (
                <rect
                  className={isOut ? "shorttrim out" : "shorttrim"}
                  x={ZERO + Math.min(longEnd, end) + 0.75}
                  y="10.75"
                  width={Math.max(0.5, Math.abs(end - longEnd) - 1.5)}
                  height="12.5"
                />
              )}
            </>
          )}
          <path className="zero" d={`M${ZERO} 0V34`} />
        </svg>
      </td>
      <td className={cx(has ? "tv" : "tv why0", isOut && family)}>
        {has ? (
          <>
            <span className={cx("num", isOut && "dev")}>{formatNumber(total, 1, { signed: true })}</span>
            {isOut && <span className="w"> {family}</span>}
          </>
        ) : (
          cell.why
        )}
      </td>
    </>
  );
}
