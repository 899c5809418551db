/** The usual band of a reading. One end may be open; the mark is then mirrored about the closed end. */
export interface Band {
  low: number | null;
  high: number | null;
}

export interface BandScale {
  left: number;
  right: number;
  /** Place of a value, kept inside the mark. */
  at(value: number): number;
  /** −1 below the band, 0 inside, 1 above. */
  side(value: number): -1 | 0 | 1;
}

function ends(band: Band): [number, number] {
  if (band.low !== null && band.high !== null && band.high > band.low) return [band.low, band.high];
  if (band.high !== null) return [band.high === 0 ? -1 : -Math.abs(band.high), band.high];
  if (band.low !== null) return [band.low, band.low + (Math.abs(band.low) || 1)];
  return [-1, 1];
}

/** The band takes the middle third of `width`; `pad` is kept free at both edges for the shape. */
export function bandScale(band: Band, width: number, pad: number): BandScale {
  const [low, high] = ends(band);
  const left = width / 3;
  const right = (2 * width) / 3;
  const side = (value: number) => {
    if (band.low !== null && value < band.low) return -1 as const;
    if (band.high !== null && value > band.high) return 1 as const;
    return 0 as const;
  };
  const at = (value: number) => {
    const raw = left + ((value - low) / (high - low)) * (right - left);
    const [from, to] = side(value) === 0 ? [left + 1, right - 1] : [pad, width - pad];
    return Math.round(Math.min(to, Math.max(from, raw)) * 10) / 10;
  };
  return { left, right, at, side };
}

/** "above the usual band −8 to 8": what the mark says to a reader who does not see it. */
export function markSense(value: number, band: Band, decimals = 2, unit?: string): string {
  const round = (n: number) => String(Number(n.toFixed(decimals))).replace("-", "−");
  const words =
    band.low === null
      ? `up to ${round(band.high ?? 0)}`
      : band.high === null
        ? `${round(band.low)} or more`
        : `${round(band.low)} to ${round(band.high)}`;
  const where =
    band.low !== null && value < band.low ? "below" : band.high !== null && value > band.high ? "above" : "inside";
  return `${where} the usual band ${words}${unit ? ` ${unit}` : ""}`;
}
