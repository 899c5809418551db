import { cx } from "@/components/ui/cx";
import type { Family } from "@/components/ui/family";

export interface DeckProps {
  /** Cylinder numbers in the order they stand. */
  cylinders: readonly number[];
  /** Cylinders that deviate, and in which family. */
  deviant: Readonly<Record<number, Family>>;
  /** What the picture shows, in words. */
  label: string;
}

/** Width of the drawing and of the label column of the table beneath: the bores stand over its columns. */
export const DECK_WIDTH = 416;
export const DECK_LABEL = 76;

/** The fire deck in plan: bores, valves, plugs. A cylinder that deviates gets its family's stroke and tint. */
export function Deck({ cylinders, deviant, label }: DeckProps) {
  const column = (DECK_WIDTH - DECK_LABEL) / Math.max(1, cylinders.length);
  const r = Math.min(29, column / 2 - 5);
  const k = r / 29;
  const height = Math.round(2 * r + 26);
  const middle = height / 2;
  const left = DECK_LABEL - 1;
  const edges = [0, ...cylinders.map((_, i) => i + 1)];
  return (
    <svg
      className="deck"
      viewBox={`0 0 ${DECK_WIDTH} ${height}`}
      width={DECK_WIDTH}
      height={height}
      role="img"
      aria-label={label}
    >
      <rect className="ln" x={left} y={4} width={DECK_WIDTH - left - 1} height={height - 8} rx={7} />
      {edges.map((edge) => {
        const x = edge === 0 ? left + 10 : edge === cylinders.length ? DECK_WIDTH - 11 : DECK_LABEL + edge * column;
        return (
          <g key={edge}>
            <circle className="ln" cx={x} cy={14} r={3.5} />
            <circle className="ln" cx={x} cy={height - 14} r={3.5} />
          </g>
        );
      })}
      {cylinders.map((cylinder, index) => {
        const x = DECK_LABEL + column * (index + 0.5);
        const family = deviant[cylinder];
        return (
          <g key={cylinder} className={family}>
            {family && <circle className="tint" cx={x} cy={middle} r={r} />}
            <circle className={cx("bore", family && "dev")} cx={x} cy={middle} r={r} />
            <circle className="ln" cx={x - 10.5 * k} cy={middle - 10.5 * k} r={9 * k} />
            <circle className="ln" cx={x + 10.5 * k} cy={middle - 10.5 * k} r={9 * k} />
            <circle className="ln" cx={x - 9.5 * k} cy={middle + 11 * k} r={7.5 * k} />
            <circle className="ln" cx={x + 9.5 * k} cy={middle + 11 * k} r={7.5 * k} />
            <circle className={cx("plug", family && "dev")} cx={x} cy={middle} r={2.5} />
          </g>
        );
      })}
    </svg>
  );
}
