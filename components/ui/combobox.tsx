"use client";

import { type KeyboardEvent, type ReactNode, useEffect, useId, useRef, useState } from "react";
import { cx } from "./cx";

export interface ComboOption {
  value: string;
  label: string;
  /** A second voice at the right of the row. */
  note?: string;
  /** More words the search should find it by. */
  also?: string;
}

export interface ComboboxProps {
  id?: string;
  label: string;
  options: readonly ComboOption[];
  onChoose: (option: ComboOption) => void;
  placeholder?: string;
  /** Called as one types, for lists the server searches; filtering then stays with the caller. */
  onQuery?: (query: string) => void;
  /** Text in the field after a choice; by default it empties so that another can be added. */
  keepText?: boolean;
  defaultText?: string;
  emptyText?: string;
  className?: string;
  inputClassName?: string;
  describedBy?: string;
  invalid?: boolean;
  /** The field takes the focus when it appears: for one that takes the place of the button that was pressed. */
  takesFocus?: boolean;
  /** Shown in front of the field, inside its border (chosen items). */
  before?: ReactNode;
}

function matches(option: ComboOption, query: string): boolean {
  const text = `${option.label} ${option.note ?? ""} ${option.also ?? ""}`.toLowerCase();
  return query
    .toLowerCase()
    .split(/\s+/)
    .every((word) => text.includes(word));
}

/** A searchable list: type to narrow, ↑ ↓ to choose, Enter to take, Esc to leave. */
export function Combobox(props: ComboboxProps) {
  const { label, options, onChoose, placeholder, onQuery, keepText, emptyText = "Nothing matches." } = props;
  const own = useId();
  const id = props.id ?? own;
  const [query, setQuery] = useState(props.defaultText ?? "");
  const [open, setOpen] = useState(false);
  const [active, setActive] = useState(0);
  const shown = (onQuery ? [...options] : options.filter((option) => matches(option, query.trim()))).slice(0, 60);
  const current = shown[Math.min(active, shown.length - 1)];
  const field = useRef<HTMLInputElement>(null);
  const { takesFocus } = props;
  useEffect(() => {
    if (takesFocus) field.current?.focus();
  }, [takesFocus]);
  const currentId = open && current ? `${id}-${current.value}` : undefined;
  useEffect(() => {
    // the list is longer than its box: the arrows bring the chosen row into sight
    if (currentId) document.getElementById(currentId)?.scrollIntoView?.({ block: "nearest" });
  }, [currentId]);

  function take(option: ComboOption | undefined) {
    if (!option) return;
    onChoose(option);
    setQuery(keepText ? option.label : "");
    if (!keepText) onQuery?.("");
    setOpen(false);
    setActive(0);
  }

  function onKeyDown(event: KeyboardEvent) {
    if (event.key === "ArrowDown" || event.key === "ArrowUp") {
      event.preventDefault();
      if (!open) return setOpen(true);
      const step = event.key === "ArrowDown" ? 1 : -1;
      setActive((at) => (shown.length === 0 ? 0 : (at + step + shown.length) % shown.length));
    } else if (event.key === "Enter" && open && !event.ctrlKey) {
      event.preventDefault();
      take(current);
    } else if (event.key === "Escape" && open) {
      event.stopPropagation();
      setOpen(false);
    }
  }

  return (
    <div className={cx("combo", props.className)}>
      {props.before}
      <input
        ref={field}
        id={id}
        className={cx("input", props.inputClassName)}
        role="combobox"
        aria-label={label}
        aria-expanded={open}
        aria-controls={`${id}-list`}
        aria-autocomplete="list"
        aria-activedescendant={currentId}
        aria-describedby={props.describedBy}
        aria-invalid={props.invalid || undefined}
        autoComplete="off"
        placeholder={placeholder}
        value={query}
        onChange={(event) => {
          setQuery(event.target.value);
          onQuery?.(event.target.value);
          setOpen(true);
          setActive(0);
        }}
        onClick={() => setOpen(true)}
        onBlur={() => setOpen(false)}
        onKeyDown={onKeyDown}
      />
      <div className="list" id={`${id}-list`} role="listbox" aria-label={label} hidden={!open}>
        {shown.map((option) => (
          // biome-ignore lint/a11y/useKeyWithClickEvents: focus stays in the field, which handles the keys
          <div
            key={option.value}
            id={`${id}-${option.value}`}
            role="option"
            tabIndex={-1}
            aria-selected={option === current}
            onPointerDown={(event) => event.preventDefault()}
            onClick={() => take(option)}
          >
            {option.label}
            {option.note && <span className="faint">{option.note}</span>}
          </div>
        ))}
        {shown.length === 0 && (
          <div className="none-found" role="option" tabIndex={-1} aria-selected="false" aria-disabled="true">
            {emptyText}
          </div>
        )}
      </div>
    </div>
  );
}
