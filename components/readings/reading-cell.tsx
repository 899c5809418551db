"use client";

import { useId, useRef, useState } from "react";
import { useAnnounce } from "@/components/ui/announcer";
import { BandMark } from "@/components/ui/band-mark";
import { cx } from "@/components/ui/cx";
import { formatNumber } from "@/components/ui/format";
import { Bang } from "@/components/ui/icons";
import { parseNumber } from "@/components/ui/parse-entry";
import { shownUnit } from "@/components/ui/units";
import type { Mode } from "@/lib/diagnosis/vocabulary";
import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import { editText, formatReading, judgeReading, shownBand } from "./judging";
import type { SheetContext } from "./model";

export interface ReadingCellProps {
  parameter: ParameterId;
  mode: Mode;
  /** Read out: "Coolant, cruising". */
  label: string;
  value: number | null;
  context: SheetContext;
  row: number;
  column: number;
  onCommit: (value: number | null) => void;
  readOnly?: boolean;
  /** Decimals shared by the row. */
  places?: number;
}

/**
 * One cell: an input that is judged with every keystroke. Impossible turns it inverse and says why, with the likely
 * value one press away; it is kept as typed all the same. Outside colours value and mark; inside stays quiet.
 */
export function ReadingCell(props: ReadingCellProps) {
  const { parameter, mode, label, value, context, row, column, onCommit, readOnly, places } = props;
  const [draft, setDraft] = useState<string | null>(null);
  const [isFocused, setFocused] = useState(false);
  const input = useRef<HTMLInputElement>(null);
  const wasImpossible = useRef(false);
  const announce = useAnnounce();
  const whyId = useId();
  const unit = shownUnit(parameter, context.units);

  const typed = draft === null ? null : parseNumber(draft);
  const isUnreadable = draft !== null && draft.trim() !== "" && typed === null && !/^[-−+.,]$/.test(draft.trim());
  const current = draft === null ? value : draft.trim() === "" ? null : typed === null ? null : unit.toInternal(typed);
  const judged = current === null ? null : judgeReading(parameter, current, mode, context);
  const isImpossible = judged?.state === "impossible" || isUnreadable;
  const family = judged?.state === "outside" ? (judged.family ?? "mech") : null;
  const likely = judged?.likely;
  const likelyText = likely === undefined ? null : formatNumber(unit.toShown(likely), Math.max(1, unit.decimals));

  function onType(text: string) {
    setDraft(text);
    const n = parseNumber(text);
    const next = n === null ? null : judgeReading(parameter, unit.toInternal(n), mode, context);
    const isNow = next?.state === "impossible";
    if (isNow && !wasImpossible.current) announce(`Not possible. ${next.message}.`, "assertive");
    wasImpossible.current = isNow;
  }

  function commit() {
    if (draft === null) return;
    if (draft.trim() === "") onCommit(null);
    else if (typed !== null) onCommit(unit.toInternal(typed));
    // Text that is no number is not taken; the cell shows what it held.
    setDraft(null);
    wasImpossible.current = false;
  }

  const shown =
    draft ??
    (value === null
      ? ""
      : isFocused && !readOnly
        ? editText(parameter, value, context.units)
        : formatReading(parameter, value, context.units, context.locale, places));
  const isOpen = isFocused && isImpossible;
  return (
    <td className={cx("v", family, family && "is-dev", isImpossible && "editing")}>
      <span className={cx("cell", isImpossible && "ed")}>
        <input
          ref={input}
          className={cx("num", family && "dev")}
          inputMode="decimal"
          autoComplete="off"
          spellCheck={false}
          placeholder="–"
          aria-label={label}
          aria-invalid={isImpossible || undefined}
          aria-describedby={isOpen ? whyId : undefined}
          data-r={row}
          data-c={column}
          readOnly={readOnly}
          value={shown}
          onFocus={(event) => {
            setFocused(true);
            const field = event.currentTarget;
            requestAnimationFrame(() => field.select());
          }}
          onBlur={() => {
            commit();
            setFocused(false);
          }}
          onChange={(event) => onType(event.target.value)}
          onKeyDown={(event) => {
            if (event.key === "Escape" && draft !== null) {
              event.stopPropagation();
              setDraft(null);
              requestAnimationFrame(() => input.current?.select());
            }
          }}
        />
        {!isImpossible && judged?.band && current !== null && (
          <BandMark
            value={unit.toShown(current)}
            band={shownBand(parameter, judged.band, context.units)}
            family={family}
            isQuiet={judged.state === "watch"}
            decimals={PARAMETERS[parameter].decimals || 1}
          />
        )}
      </span>
      {isOpen && (
        <div className="pop" id={whyId}>
          <Bang />
          <p>
            <b>{isUnreadable ? "Not a number." : "Not possible."}</b>{" "}
            {isUnreadable ? "It will not be kept." : `${judged?.message}. It is kept, but does not count.`}
            {likelyText && ` Did you mean ${likelyText}?`}
          </p>
          {likely !== undefined && !isUnreadable && (
            <button
              type="button"
              className="btn quiet"
              // Before the field loses focus, or the popover would be gone.
              onMouseDown={(event) => event.preventDefault()}
              onClick={() => {
                setDraft(null);
                wasImpossible.current = false;
                onCommit(likely);
                requestAnimationFrame(() => input.current?.select());
              }}
            >
              Use {likelyText}
            </button>
          )}
        </div>
      )}
    </td>
  );
}
