import { formatNumber } from "@/components/ui/format";
import type { RevisionReading } from "./model";

const WIDTH = 340;
const ROW = 54;

export interface MeasuredProps {
  readings: readonly RevisionReading[];
  /** What a deviation means, at the far end of the scale: "more fuel added". */
  scaleNote?: string;
}

/** The reading on a band mark, with the usual range in words. No code, no abbreviation. */
export function Measured({ readings, scaleNote }: MeasuredProps) {
  if (readings.length === 0) return null;
  const isBelow = readings.some((r) => r.at < 0);
  const isAbove = readings.some((r) => r.at > 1);
  const [left, right] = isBelow && isAbove ? [113, 227] : isBelow ? [187, 323] : [17, 153];
  const x = (at: number) => Math.round(Math.min(WIDTH - 12, Math.max(12, left + at * (right - left))) * 10) / 10;
  const height = readings.length * ROW + 20;
  const spoken = readings
    .map((r) => `${r.label}: ${r.value}, ${r.inside ? "inside" : "outside"} the usual range`)
    .join(". ");
  return (
    <figure className="pm1">
      <svg className="chart measured" viewBox={`0 0 ${WIDTH} ${height}`} width="100%" role="img" aria-label={spoken}>
        {readings.map((reading, index) => {
          const top = index * ROW;
          const y = top + 36;
          const at = x(reading.at);
          const family = reading.family ?? "mech";
          return (
            <g key={reading.label} className={family}>
              <text x="0" y={top + 18} className="rl">
                {reading.label}
              </text>
              <text x={WIDTH} y={top + 18} textAnchor="end" className={reading.inside ? "rv" : "rv out"}>
                {reading.value}
              </text>
              <path className="ax" d={`M0 ${y}H${WIDTH}`} />
              <rect className="bandfill" x={left} y={y - 6} width={right - left} height="12" />
              {reading.inside ? (
                <rect
                  className="inkfill"
                  x={Math.min(right - 3, Math.max(left, at - 1.5))}
                  y={y - 10}
                  width="3"
                  height="20"
                />
              ) : (
                <>
                  <rect
                    className="fam"
                    x={reading.at > 1 ? right : at}
                    y={y - 2}
                    width={Math.abs(at - (reading.at > 1 ? right : left))}
                    height="4"
                  />
                  <End family={family} x={at} y={y} />
                </>
              )}
            </g>
          );
        })}
        <text x={(left + right) / 2} y={readings.length * ROW + 10} textAnchor="middle" className="rn">
          usual range
        </text>
        {scaleNote && !isBelow && (
          <text x={WIDTH} y={readings.length * ROW + 10} textAnchor="end" className="rn faint">
            {scaleNote}
          </text>
        )}
      </svg>
    </figure>
  );
}

function End({ family, x, y }: { family: string; x: number; y: number }) {
  if (family === "lean") return <circle className="hollowend" cx={x} cy={y} r="7" />;
  if (family === "rich") return <circle className="fam" cx={x} cy={y} r="8" />;
  if (family === "spark") return <path className="fam" d={`M${x} ${y - 9}l9 9-9 9-9-9z`} />;
  return <rect className="fam" x={x - 7} y={y - 7} width="14" height="14" />;
}

/** Units and decimals of the shop's own figures. */
export function quantityWords(milli: number, kind: string, locale: string): string {
  const figure = formatNumber(milli / 1000, milli % 1000 === 0 ? 0 : milli % 100 === 0 ? 1 : 2, { locale });
  return kind === "labour" || kind === "diagnosis" ? `${figure} h` : figure;
}
