import type { Band } from "@/components/ui/band-scale";

export interface TraceScale {
  /** Seconds to x. */
  x: (seconds: number) => number;
  /** Value to y. */
  y: (value: number) => number;
  fromS: number;
  toS: number;
  stepS: number;
}

const r = (n: number) => Math.round(n * 10) / 10;

/**
 * The path of a trace. Gaps stay gaps. Where there are more points than pixels, each pixel column keeps its lowest and
 * highest value, so that no spike is lost.
 */
export function tracePath(points: readonly (number | null)[], scale: TraceScale): string {
  const first = Math.max(0, Math.floor(scale.fromS / scale.stepS));
  const last = Math.min(points.length - 1, Math.ceil(scale.toS / scale.stepS));
  const width = Math.max(1, scale.x(scale.toS) - scale.x(scale.fromS));
  const per = Math.max(1, Math.floor((last - first + 1) / width));
  let path = "";
  let isDown = false;
  const go = (index: number, value: number) => {
    path += `${isDown ? "L" : "M"}${r(scale.x(index * scale.stepS))} ${r(scale.y(value))}`;
    isDown = true;
  };
  for (let index = first; index <= last; index += per) {
    if (per === 1) {
      const value = points[index];
      if (value === null || value === undefined) isDown = false;
      else go(index, value);
      continue;
    }
    let low: number | null = null;
    let high: number | null = null;
    let lowAt = index;
    let highAt = index;
    for (let i = index; i < Math.min(index + per, last + 1); i++) {
      const value = points[i];
      if (value === null || value === undefined) continue;
      if (low === null || value < low) [low, lowAt] = [value, i];
      if (high === null || value > high) [high, highAt] = [value, i];
    }
    if (low === null || high === null) isDown = false;
    else if (lowAt <= highAt) {
      go(index, low);
      if (high !== low) go(index, high);
    } else {
      go(index, high);
      go(index, low);
    }
  }
  return path;
}

/** Only what lies outside the band, below or above, as its own path. */
export function outsidePath(
  points: readonly (number | null)[],
  band: Band,
  side: "low" | "high",
  scale: TraceScale,
): string {
  const isOut = (value: number) =>
    side === "low" ? band.low !== null && value < band.low : band.high !== null && value > band.high;
  const only = points.map((value) => (value !== null && isOut(value) ? value : null));
  return tracePath(only, scale);
}

/** Lowest, highest and mean of a stretch; null where nothing was logged. */
export function stretch(
  points: readonly (number | null)[],
  fromS: number,
  toS: number,
  stepS: number,
): { low: number; high: number; mean: number } | null {
  let low = Infinity;
  let high = -Infinity;
  let sum = 0;
  let count = 0;
  for (let i = Math.max(0, Math.floor(fromS / stepS)); i <= Math.min(points.length - 1, Math.floor(toS / stepS)); i++) {
    const value = points[i];
    if (value === null || value === undefined) continue;
    low = Math.min(low, value);
    high = Math.max(high, value);
    sum += value;
    count++;
  }
  return count === 0 ? null : { low, high, mean: sum / count };
}
