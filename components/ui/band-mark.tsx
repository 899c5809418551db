import { type Band, bandScale, markSense } from "./band-scale";
import { cx } from "./cx";
import type { Family } from "./family";

const SIZES = { counter: [60, 14], bay: [216, 22], row: [150, 20], states: [110, 14], pad: [400, 34] } as const;

export interface BandMarkProps {
  value: number;
  band: Band;
  /** Only used outside the band. */
  family?: Family | null;
  size?: keyof typeof SIZES;
  /** Decimals and sign for the spoken band. */
  decimals?: number;
  unit?: string;
  /** Outside, but not to be flagged (watched): the tick stands where it is, without colour. */
  isQuiet?: boolean;
  className?: string;
}

/**
 * Baseline, usual band, reading. The band always takes the middle third, so marks in a column compare whatever the
 * unit. Inside: a tick. Outside: a bar from the band's edge to the family's shape, which stays at the edge when the
 * reading runs off the scale. A band with one end only is mirrored about it.
 */
export function BandMark({
  value,
  band,
  family,
  size = "counter",
  decimals = 2,
  unit,
  isQuiet,
  className,
}: BandMarkProps) {
  const [width, height] = SIZES[size];
  const k = 1 + (height - 14) / 16;
  const pad = 4 * k;
  const middle = height / 2;
  const scale = bandScale(band, width, pad);
  const x = scale.at(value);
  const side = scale.side(value);
  const fam = family ?? "mech";
  const from = side < 0 ? x : scale.right;
  const length = side < 0 ? scale.left - x : x - scale.right;
  return (
    <svg
      className={cx("bm", className)}
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={markSense(value, band, decimals, unit)}
    >
      <path className="base" d={`M0 ${middle}H${width}`} />
      <rect className="band" x={scale.left} y={middle - 2.5 * k} width={scale.right - scale.left} height={5 * k} />
      {side === 0 || isQuiet ? (
        <rect className="at" x={x - k} y={middle - 5.5 * k} width={2 * k} height={11 * k} />
      ) : (
        <g className={fam}>
          <rect className="over" x={from} y={middle - 1.25 * k} width={Math.max(0, length)} height={2.5 * k} />
          <FamilyEnd family={fam} x={x} y={middle} k={k} />
        </g>
      )}
    </svg>
  );
}

/** The family's shape at the end of a bar; also used by the proof pairs. */
export function FamilyEnd({ family, x, y, k }: { family: Family; x: number; y: number; k: number }) {
  if (family === "lean") return <circle className="end hollow" cx={x} cy={y} r={3.8 * k - 0.6} />;
  if (family === "rich") return <circle className="end" cx={x} cy={y} r={3.8 * k} />;
  if (family === "spark") {
    const d = 4.8 * k;
    return <path className="end" d={`M${x} ${y - d}l${d} ${d}-${d} ${d}-${d}-${d}z`} />;
  }
  const half = 3.8 * k - 0.4;
  return <rect className="end" x={x - half} y={y - half} width={2 * half} height={2 * half} />;
}

export interface PairMarkProps {
  before: number | null;
  after: number | null;
  band: Band;
  /** The family of the value before, when it was outside. */
  family?: Family | null;
  decimals?: number;
}

/** Proof: before as a hollow ring or family shape, after as a solid bar, a dotted path between. */
export function PairMark({ before, after, band, family, decimals = 2 }: PairMarkProps) {
  const width = 300;
  const height = 26;
  const middle = height / 2;
  const scale = bandScale(band, width, 6);
  const was = before === null ? null : scale.at(before);
  const now = after === null ? null : scale.at(after);
  const wasOut = before !== null && scale.side(before) !== 0;
  const spoken = [
    before === null ? "before not taken" : `before ${Number(before.toFixed(decimals))}`,
    after === null ? "after not taken" : `after ${Number(after.toFixed(decimals))}`,
    `usual ${markBand(band)}`,
  ].join(", ");
  const gap = was !== null && now !== null ? now - was : 0;
  return (
    <svg className="bm" width={width} height={height} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={spoken}>
      <path className="base" d={`M0 ${middle}H${width}`} />
      <rect className="band" x={scale.left} y={9} width={scale.right - scale.left} height={8} />
      {was !== null && now !== null && Math.abs(gap) > 9 && (
        <path className="path" d={`M${was} ${middle}H${now - Math.sign(gap) * 3}`} />
      )}
      {was !== null &&
        (wasOut ? (
          <g className={family ?? "mech"}>
            <FamilyEnd family={family ?? "mech"} x={was} y={middle} k={1.3} />
          </g>
        ) : (
          <circle className="was" cx={was} cy={middle} r={4} />
        ))}
      {now !== null && <rect className="now" x={now - 1.75} y={3} width={3.5} height={20} />}
    </svg>
  );
}

function markBand(band: Band): string {
  if (band.low === null) return `up to ${band.high}`;
  if (band.high === null) return `${band.low} or more`;
  return `${band.low} to ${band.high}`;
}
