"use client";

import { useRef, useState } from "react";
import { cx } from "@/components/ui/cx";
import { formatPrice, formatQuantity } from "@/components/ui/format";
import { moneyEntry, parseMoney, parseNumber } from "@/components/ui/parse-entry";

interface Common {
  label: string;
  readOnly?: boolean;
  className?: string;
  error?: string;
}

export interface MoneyCellProps extends Common {
  value: number | null;
  currency: string;
  locale: string;
  onCommit: (minor: number | null) => void;
  /** May be emptied (cost). */
  isOptional?: boolean;
}

/** An amount in a table: written with its sign, edited as a plain figure, kept when it is one. */
export function MoneyCell({
  label,
  value,
  currency,
  locale,
  onCommit,
  readOnly,
  isOptional,
  className,
  error,
}: MoneyCellProps) {
  const [draft, setDraft] = useState<string | null>(null);
  const isLeaving = useRef(false);
  const [refused, setRefused] = useState<string | null>(null);
  const parsed = draft === null ? value : parseMoney(draft, currency);
  const isBad = draft !== null && draft.trim() !== "" && (parsed === null || parsed < 0);
  return (
    <>
      <input
        className={cx("num cellin", className)}
        inputMode="decimal"
        autoComplete="off"
        aria-label={label}
        aria-invalid={isBad || error ? true : undefined}
        title={error ?? (isBad ? "That is not an amount." : undefined)}
        readOnly={readOnly}
        value={draft ?? (value === null ? "" : formatPrice(value, currency, locale))}
        onFocus={(event) => {
          if (readOnly) return;
          setRefused(null);
          setDraft(value === null ? "" : moneyEntry(value, currency));
          const field = event.currentTarget;
          requestAnimationFrame(() => field.select());
        }}
        onChange={(event) => setDraft(event.target.value)}
        onBlur={() => {
          if (isLeaving.current) {
            isLeaving.current = false;
            return setDraft(null);
          }
          if (draft !== null && isBad) setRefused(`“${draft.trim()}” is not an amount.`);
          if (draft !== null && !isBad) {
            if (draft.trim() === "") {
              if (isOptional && value !== null) onCommit(null);
            } else if (parsed !== null && parsed !== value) onCommit(parsed);
          }
          setDraft(null);
        }}
        onKeyDown={(event) => {
          if (event.key === "Escape") {
            isLeaving.current = true;
            event.currentTarget.blur();
          }
          if (event.key === "Enter") event.currentTarget.blur();
        }}
      />
      {refused && <Refused why={refused} />}
    </>
  );
}

/** What was typed did not fit: the cell went back to what it held, and says so. */
function Refused({ why }: { why: string }) {
  return (
    <span className="cellwhy" role="alert">
      {why} Left as it was.
    </span>
  );
}

export interface QuantityCellProps extends Common {
  /** Thousandths; hours too. */
  milli: number;
  isHours: boolean;
  onCommit: (milli: number) => void;
}

export function QuantityCell({ label, milli, isHours, onCommit, readOnly, className, error }: QuantityCellProps) {
  const [draft, setDraft] = useState<string | null>(null);
  const isLeaving = useRef(false);
  const [refused, setRefused] = useState<string | null>(null);
  const n = draft === null ? null : parseNumber(draft.replace(/h$/i, ""));
  const next = n === null ? null : Math.round(n * 1000);
  const isBad = draft !== null && (next === null || next < 1 || next > 10_000_000);
  return (
    <>
      <input
        className={cx("num cellin", className)}
        inputMode="decimal"
        autoComplete="off"
        aria-label={label}
        aria-invalid={isBad || error ? true : undefined}
        title={error}
        readOnly={readOnly}
        value={draft ?? `${formatQuantity(milli)}${isHours ? " h" : ""}`}
        onFocus={(event) => {
          if (readOnly) return;
          setRefused(null);
          setDraft(formatQuantity(milli));
          const field = event.currentTarget;
          requestAnimationFrame(() => field.select());
        }}
        onChange={(event) => setDraft(event.target.value)}
        onBlur={() => {
          if (isLeaving.current) {
            isLeaving.current = false;
            return setDraft(null);
          }
          if (draft !== null && draft.trim() !== "" && isBad)
            setRefused(next === null ? `“${draft.trim()}” is not a number.` : "It goes from 0.001 to 10,000.");
          if (next !== null && !isBad && next !== milli) onCommit(next);
          setDraft(null);
        }}
        onKeyDown={(event) => {
          if (event.key === "Escape") {
            isLeaving.current = true;
            event.currentTarget.blur();
          }
          if (event.key === "Enter") event.currentTarget.blur();
        }}
      />
      {refused && <Refused why={refused} />}
    </>
  );
}

export interface TextCellProps extends Common {
  value: string;
  onCommit: (text: string) => void;
  placeholder?: string;
  maxLength?: number;
}

export function TextCell({
  label,
  value,
  onCommit,
  readOnly,
  className,
  placeholder,
  maxLength = 200,
  error,
}: TextCellProps) {
  const [draft, setDraft] = useState<string | null>(null);
  const isLeaving = useRef(false);
  return (
    <input
      className={cx("cellin text", className)}
      aria-label={label}
      aria-invalid={error ? true : undefined}
      title={error ?? value}
      readOnly={readOnly}
      placeholder={placeholder}
      maxLength={maxLength}
      value={draft ?? value}
      onChange={(event) => setDraft(event.target.value)}
      onBlur={() => {
        if (isLeaving.current) {
          isLeaving.current = false;
          return setDraft(null);
        }
        if (draft !== null && draft.trim() !== value) onCommit(draft.trim());
        setDraft(null);
      }}
      onKeyDown={(event) => {
        if (event.key === "Escape") {
          isLeaving.current = true;
          event.currentTarget.blur();
        }
        if (event.key === "Enter") event.currentTarget.blur();
      }}
    />
  );
}
