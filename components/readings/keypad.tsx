"use client";

import { cx } from "@/components/ui/cx";

export interface KeypadProps {
  /** "0"–"9", ".", "±" or "clear". */
  onKey: (key: string) => void;
  onNext: () => void;
  onBack: () => void;
  onNotTaken: () => void;
}

/** Sixteen keys of 88 px, for gloves. */
export function Keypad({ onKey, onNext, onBack, onNotTaken }: KeypadProps) {
  const key = (label: string, run: () => void, kind?: string, name?: string) => (
    <button type="button" className={cx("key", kind)} onClick={run} aria-label={name}>
      {label}
    </button>
  );
  const digit = (d: string) => key(d, () => onKey(d));
  return (
    <div className="keys">
      {digit("7")}
      {digit("8")}
      {digit("9")}
      {key("Clear", () => onKey("clear"), "word")}
      {digit("4")}
      {digit("5")}
      {digit("6")}
      {key("Not taken", onNotTaken, "word")}
      {digit("1")}
      {digit("2")}
      {digit("3")}
      {key("Back", onBack, "word", "Back, or the reading above")}
      {key("±", () => onKey("±"), undefined, "Sign")}
      {digit("0")}
      {key(".", () => onKey("."), undefined, "Decimal point")}
      {key("Next", onNext, "go word")}
    </div>
  );
}
