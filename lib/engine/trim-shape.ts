/** The three-point trim test as the trade reads it: idle, cruise or 2,500 r/min, load. Common practice. */
export type TrimShape =
  | "normal"
  | "watch"
  | "mixed"
  | "lean-falls-with-flow"
  | "lean-rises-with-flow"
  | "lean-everywhere"
  | "lean-partly"
  | "rich-falls-with-flow"
  | "rich-rises-with-flow"
  | "rich-everywhere"
  | "rich-partly";

export interface ThreePoints {
  idle: number;
  cruise: number;
  load: number;
}

const LIMIT = 10;
const WATCH = 5;
const RATIO = 1.5;

/** Shape of total trims in percent. Beyond ±10 deviates; a ratio of 1.5 between idle and load gives the direction. */
export function trimShape({ idle, cruise, load }: ThreePoints): TrimShape {
  const all = [idle, cruise, load];
  const lean = all.some((t) => t > LIMIT);
  const rich = all.some((t) => t < -LIMIT);
  if (lean && rich) return "mixed";
  if (!lean && !rich) return all.some((t) => Math.abs(t) > WATCH) ? "watch" : "normal";
  const word = lean ? "lean" : "rich";
  const beyond = (t: number) => Math.abs(t) > LIMIT && t > 0 === lean;
  const everywhere = all.every(beyond);
  const [a, b] = [Math.abs(idle), Math.abs(load)];
  if (beyond(idle) && a >= RATIO * b && (!beyond(load) || everywhere)) return `${word}-falls-with-flow`;
  if (beyond(load) && b >= RATIO * a && (!beyond(idle) || everywhere)) return `${word}-rises-with-flow`;
  return everywhere ? `${word}-everywhere` : `${word}-partly`;
}

/** Which banks deviate. */
export function trimScope(bank1: TrimShape, bank2: TrimShape): "none" | "both banks" | "bank 1 only" | "bank 2 only" {
  const off = (s: TrimShape) => s !== "normal" && s !== "watch";
  if (off(bank1) && off(bank2)) return "both banks";
  return off(bank1) ? "bank 1 only" : off(bank2) ? "bank 2 only" : "none";
}

/** Band of a total trim: quiet to 5, watch to 10, fault to 25, code level from there. */
export function trimBand(totalPct: number): "normal" | "watch" | "fault" | "code level" {
  const size = Math.abs(totalPct);
  return size <= WATCH ? "normal" : size <= LIMIT ? "watch" : size < 25 ? "fault" : "code level";
}
