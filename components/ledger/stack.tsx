import { cx } from "@/components/ui/cx";
import { formatNumber } from "@/components/ui/format";
import { type BitsScale, bitsAgainst, bitsFor, netBits } from "./bits-scale";
import type { LedgerCauseView } from "./model";

const GAP = 1.5;
const signed = (n: number) => formatNumber(n, 1, { signed: true });

/** Grid lines of the track, drawn at its full height. */
export function Grid({ scale }: { scale: BitsScale }) {
  return (
    <g>
      {scale.ticks.map((tick) => (
        <line key={tick.bits} className={tick.bits === 0 ? "zero" : "hair"} x1={tick.x} x2={tick.x} y1="0" y2="100%" />
      ))}
    </g>
  );
}

export interface StackProps {
  cause: LedgerCauseView;
  scale: BitsScale;
  /** Pieces that were not there before: they grow from their inner end. */
  fresh: ReadonlySet<string>;
}

/**
 * Leftwards from the centre line: the prior, then evidence against. Rightwards: evidence for, largest nearest the
 * centre. The heavy tick is the net.
 */
export function Stack({ cause, scale, fresh }: StackProps) {
  const { zero, perBit, width } = scale;
  const against = cause.evidence.filter((e) => e.weight < 0).sort((a, b) => a.weight - b.weight);
  const support = cause.evidence.filter((e) => e.weight > 0).sort((a, b) => b.weight - a.weight);
  let left = zero + cause.priorBits * perBit;
  const priorLeft = left;
  let isCutLeft = priorLeft < 0;
  const cons = against.map((e) => {
    const right = left;
    left += e.weight * perBit;
    if (left < 0) isCutLeft = true;
    const from = Math.max(0, left);
    return { id: e.id, x: from, w: right - GAP - from, weight: e.weight };
  });
  let right = zero + 1;
  let isCutRight = false;
  const pros = support.map((e) => {
    const from = right;
    right += e.weight * perBit;
    if (right > width + 12) isCutRight = true;
    return { id: e.id, x: from, w: Math.min(width + 10, right) - GAP - from, weight: e.weight };
  });
  const net = netBits(cause);
  const netX = Math.min(width, Math.max(0, scale.at(net)));
  const round = (n: number) => Math.round(n * 10) / 10;
  return (
    <svg
      className={`stack ${cause.family}`}
      width={width}
      height="34"
      viewBox={`0 0 ${width} 34`}
      role="img"
      aria-label={`Prior ${signed(cause.priorBits)}, evidence for ${signed(bitsFor(cause))}, against ${signed(bitsAgainst(cause))}, net ${signed(net)} bits`}
    >
      <rect
        className="prior"
        x={round(Math.max(0, priorLeft) + 0.5)}
        y="9.5"
        width={round(Math.max(0, zero - 1 - Math.max(0, priorLeft)))}
        height="15"
      />
      {cons.map((piece) =>
        piece.w > 0 ? (
          <rect
            key={piece.id}
            className={cx("con", fresh.has(`${cause.id}:${piece.id}`) && "fresh in-right")}
            x={round(piece.x)}
            y="9"
            width={round(piece.w)}
            height="16"
          >
            <title>{`${signed(piece.weight)} bits`}</title>
          </rect>
        ) : null,
      )}
      {isCutLeft && <path className="more" d="M6 13l-4 4 4 4" />}
      {pros.map((piece) =>
        piece.w > 0 ? (
          <rect
            key={piece.id}
            className={cx("pro", fresh.has(`${cause.id}:${piece.id}`) && "fresh")}
            x={round(piece.x)}
            y="9"
            width={round(Math.max(0.8, piece.w))}
            height="16"
          >
            <title>{`${signed(piece.weight)} bits`}</title>
          </rect>
        ) : null,
      )}
      {isCutRight && <path className="more" d={`M${width - 6} 13l4 4-4 4`} />}
      <path className="net" d={`M${netX} 4V30`} />
    </svg>
  );
}

export interface StepProps {
  scale: BitsScale;
  family: string;
  /** Where the running sum stood before this step; null for the prior itself. */
  from: number | null;
  to: number;
  isLast: boolean;
}

/** One step of the waterfall: the running sum moves from `from` to `to`, on the same axis. */
export function WaterfallStep({ scale, family, from, to, isLast }: StepProps) {
  const clamp = (x: number) => Math.round(Math.min(scale.width, Math.max(0, x)) * 10) / 10;
  const end = clamp(scale.at(to));
  const start = from === null ? scale.zero : clamp(scale.at(from));
  const x = Math.min(start, end);
  const width = Math.max(1, Math.abs(end - start));
  const isFor = from !== null && to >= from;
  return (
    <svg className={`stack wf ${family}`} width={scale.width} height="100%" aria-hidden="true">
      <Grid scale={scale} />
      {from !== null && <line className="link2" x1={start} x2={start} y1="0" y2="50%" />}
      {!isLast && <line className="link2" x1={end} x2={end} y1="50%" y2="100%" />}
      {from === null ? (
        <rect
          className="prior"
          x={x + 0.5}
          y="50%"
          transform="translate(0 -4.5)"
          width={Math.max(0, width - 1)}
          height="9"
        />
      ) : (
        <rect className={isFor ? "pro" : "con"} x={x} y="50%" transform="translate(0 -5)" width={width} height="10" />
      )}
      {isLast && <rect className="netbar" x={end - 1.25} y="50%" transform="translate(0 -9)" width="2.5" height="18" />}
    </svg>
  );
}
