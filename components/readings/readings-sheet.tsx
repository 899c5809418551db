"use client";

import { type ClipboardEvent, type KeyboardEvent, useRef, useState } from "react";
import { useAnnounce } from "@/components/ui/announcer";
import { BandMark } from "@/components/ui/band-mark";
import { Combobox } from "@/components/ui/combobox";
import { cx } from "@/components/ui/cx";
import { formatClock, formatNumber } from "@/components/ui/format";
import { Glyph } from "@/components/ui/glyph";
import { parseNumber } from "@/components/ui/parse-entry";
import { shownUnit } from "@/components/ui/units";
import { Words } from "@/components/ui/words";
import { LOOP_STATES, type LoopState } from "@/lib/diagnosis/vocabulary";
import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import { type Computed, misfiresAll, numberAt, placesFor, totalTrim } from "./judging";
import { LOOP_WORDS, MODE_WORDS } from "./mode-words";
import type { SampleView, SheetContext, Values } from "./model";
import { ReadingCell } from "./reading-cell";
import { otherParameters, rowLabel, type SheetRow, sheetRows } from "./rows";

export interface ReadingsSheetProps {
  samples: readonly SampleView[];
  /** By sample: what the server has with what was typed laid over it (`useSheet`). */
  values: Record<string, Values>;
  context: SheetContext;
  onCommit: (sampleId: string, cells: Record<string, unknown>) => void;
  /** Opens the sample's own dialog: mode, how it was taken, remove. */
  onEditSample?: (sample: SampleView) => void;
  readOnly?: boolean;
}

/**
 * Parameters down, samples across: a grid of inputs. Arrows move, typing replaces, Enter goes down, Tab right, Esc
 * restores; a column copied from a spreadsheet pastes downwards from the cell in focus.
 */
export function ReadingsSheet({ samples, values, context, onCommit, onEditSample, readOnly }: ReadingsSheetProps) {
  const [added, setAdded] = useState<ParameterId[]>([]);
  const table = useRef<HTMLTableElement>(null);
  const announce = useAnnounce();
  const groups = sheetRows(context.vehicle, samples, added);
  const entries = groups.flatMap((group) => group.rows.flatMap((row) => (row.kind === "entry" ? [row.parameter] : [])));
  const firstAfter = samples.findIndex((sample) => sample.phase === "after");
  const others = otherParameters(groups, context.vehicle);

  function focusCell(row: number, column: number): boolean {
    const cell = table.current?.querySelector<HTMLElement>(`[data-r="${row}"][data-c="${column}"]`);
    cell?.focus();
    return Boolean(cell);
  }

  function onKeyDown(event: KeyboardEvent<HTMLTableElement>) {
    const target = event.target as HTMLElement;
    if (target.dataset.r === undefined || event.ctrlKey || event.metaKey || event.altKey) return;
    const row = Number(target.dataset.r);
    const column = Number(target.dataset.c);
    const move = (toRow: number, toColumn: number) => {
      if (focusCell(toRow, toColumn)) event.preventDefault();
    };
    switch (event.key) {
      case "ArrowDown":
        event.preventDefault();
        move(row + 1, column);
        break;
      case "ArrowUp":
        event.preventDefault();
        move(row - 1, column);
        break;
      case "Enter":
        event.preventDefault();
        move(row + (event.shiftKey ? -1 : 1), column);
        break;
      case "ArrowLeft":
        if (isAtEdge(target, "left")) move(row, column - 1);
        break;
      case "ArrowRight":
        if (isAtEdge(target, "right")) move(row, column + 1);
        break;
    }
  }

  function onPaste(event: ClipboardEvent<HTMLTableElement>) {
    const target = event.target as HTMLElement;
    if (readOnly || target.dataset.r === undefined) return;
    const text = event.clipboardData.getData("text/plain").replace(/\r/g, "");
    const grid = text
      .replace(/\n+$/, "")
      .split("\n")
      .map((line) => line.split("\t"));
    if (grid.length === 1 && grid[0]?.length === 1) return;
    event.preventDefault();
    const fromRow = Number(target.dataset.r);
    const fromColumn = Number(target.dataset.c);
    let taken = 0;
    let refused = 0;
    const cells: Record<string, Record<string, unknown>> = {};
    grid.forEach((line, i) => {
      line.forEach((word, j) => {
        const parameter = entries[fromRow + i];
        const sample = samples[fromColumn + j];
        if (!parameter || !sample || word.trim() === "") return;
        const now = pastedValue(parameter, word, context);
        if (now === null) refused++;
        else {
          taken++;
          cells[sample.id] = { ...cells[sample.id], [parameter]: now };
        }
      });
    });
    (target as HTMLInputElement).blur();
    for (const [sampleId, changed] of Object.entries(cells)) onCommit(sampleId, changed);
    announce(`${taken} readings pasted${refused > 0 ? `, ${refused} were no numbers and were left out` : ""}.`);
    requestAnimationFrame(() => focusCell(fromRow, fromColumn));
  }

  let entryIndex = -1;
  return (
    <div className={cx("sheetwrap", samples.length > 5 && "many")}>
      <table className="sheet" ref={table} aria-label="Readings sheet" onKeyDown={onKeyDown} onPaste={onPaste}>
        <thead>
          <tr>
            <th scope="col">
              <span className="vh">Parameter</span>
            </th>
            {samples.map((sample, column) => (
              <th scope="col" key={sample.id} className={cx(column === firstAfter && firstAfter > 0 && "after")}>
                <b>{MODE_WORDS[sample.mode]}</b>
                {onEditSample && !readOnly && (
                  <button type="button" className="link colact" onClick={() => onEditSample(sample)}>
                    Change
                    <span className="vh">
                      {" "}
                      the sample {MODE_WORDS[sample.mode]}, {formatClock(sample.takenAt, context.timeZone)}
                    </span>
                  </button>
                )}
                <span>
                  {sample.phase === "after" && "after, "}
                  {formatClock(sample.takenAt, context.timeZone)}
                  {sample.how && `, ${sample.how}`}
                </span>
                {sample.beforeConsent && <span className="before-yes">before the yes</span>}
              </th>
            ))}
          </tr>
        </thead>
        {groups.map((group) => (
          <tbody key={group.title}>
            <tr className="g">
              <th scope="rowgroup" colSpan={samples.length + 1}>
                {group.title}
              </th>
            </tr>
            {group.rows.map((row) => {
              if (row.kind === "entry") entryIndex++;
              const index = entryIndex;
              const figures =
                row.kind === "entry"
                  ? samples.flatMap((sample) => numberAt(values[sample.id] ?? sample.values, row.parameter) ?? [])
                  : [];
              return (
                <tr
                  key={
                    row.kind === "entry" ? row.parameter : row.kind === "total-trim" ? `total-${row.bank}` : row.kind
                  }
                >
                  <RowHead row={row} context={context} />
                  {samples.map((sample, column) => {
                    const held = values[sample.id] ?? sample.values;
                    if (row.kind !== "entry") {
                      const computed =
                        row.kind === "total-trim" ? totalTrim(held, row.bank) : misfiresAll(held, sample.mode, context);
                      return (
                        <ComputedCell
                          key={sample.id}
                          computed={computed}
                          decimals={row.kind === "total-trim" ? 1 : 0}
                          signed={row.kind === "total-trim"}
                        />
                      );
                    }
                    const label = `${rowLabel(row.parameter, context.vehicle.banks)}, ${MODE_WORDS[sample.mode].toLowerCase()}`;
                    if (PARAMETERS[row.parameter].kind === "loop") {
                      return (
                        <LoopCell
                          key={sample.id}
                          value={held[row.parameter]}
                          label={label}
                          row={index}
                          column={column}
                          readOnly={readOnly}
                          onCommit={(now) => onCommit(sample.id, { [row.parameter]: now })}
                        />
                      );
                    }
                    return (
                      <ReadingCell
                        key={sample.id}
                        parameter={row.parameter}
                        mode={sample.mode}
                        label={label}
                        value={numberAt(held, row.parameter)}
                        context={context}
                        places={placesFor(row.parameter, figures, context.units)}
                        row={index}
                        column={column}
                        readOnly={readOnly}
                        onCommit={(now) => onCommit(sample.id, { [row.parameter]: now })}
                      />
                    );
                  })}
                </tr>
              );
            })}
          </tbody>
        ))}
      </table>
      {!readOnly && others.length > 0 && (
        <div className="addrow">
          <Combobox
            label="Add a row"
            placeholder="Add a row: pump current, purge, knock"
            options={others.map((p) => ({ value: p, label: PARAMETERS[p].label, note: PARAMETERS[p].unit, also: p }))}
            onChoose={(option) => setAdded([...added, option.value as ParameterId])}
          />
        </div>
      )}
      <Legend />
    </div>
  );
}

function pastedValue(parameter: ParameterId, word: string, context: SheetContext): unknown {
  if (PARAMETERS[parameter].kind === "loop") return LOOP_STATES.includes(word.trim() as LoopState) ? word.trim() : null;
  const n = parseNumber(word.replace(/[^\d.,+\-−eE\s]/g, ""));
  return n === null ? null : shownUnit(parameter, context.units).toInternal(n);
}

/** Left and right leave a cell only from its edge, or when the whole of it is selected. */
function isAtEdge(target: HTMLElement, side: "left" | "right"): boolean {
  if (!(target instanceof HTMLInputElement)) return true;
  const { selectionStart, selectionEnd, value } = target;
  if (selectionStart === 0 && selectionEnd === value.length) return true;
  return side === "left" ? selectionEnd === 0 : selectionStart === value.length;
}

function RowHead({ row, context }: { row: SheetRow; context: SheetContext }) {
  if (row.kind === "misfires-all") {
    return (
      <th scope="row">
        Misfires, all <span>count</span>
        <em>computed</em>
      </th>
    );
  }
  if (row.kind === "total-trim") {
    return (
      <th scope="row">
        Total trim, bank {row.bank} <span>%</span>
        <em>computed</em>
      </th>
    );
  }
  return (
    <th scope="row" title={PARAMETERS[row.parameter].label}>
      <Words>{rowLabel(row.parameter, context.vehicle.banks)}</Words>{" "}
      <span>{shownUnit(row.parameter, context.units).unit}</span>
    </th>
  );
}

function ComputedCell({
  computed,
  decimals,
  signed,
}: {
  computed: Computed | null;
  decimals: number;
  signed: boolean;
}) {
  return (
    <td className={cx("v computed", computed?.family)}>
      <span className="cell">
        {computed ? (
          <>
            <span className={cx("num", computed.family && "dev")}>
              {formatNumber(computed.value, decimals, { signed })}
            </span>
            {computed.band && (
              <BandMark value={computed.value} band={computed.band} family={computed.family} decimals={decimals} />
            )}
          </>
        ) : (
          <span className="num faint">
            <span className="none" />
            <span className="vh">not computed</span>
          </span>
        )}
      </span>
    </td>
  );
}

interface LoopCellProps {
  value: unknown;
  label: string;
  row: number;
  column: number;
  readOnly?: boolean;
  onCommit: (value: LoopState | null) => void;
}

function LoopCell({ value, label, row, column, readOnly, onCommit }: LoopCellProps) {
  return (
    <td className="v">
      <span className="cell">
        <select
          className="num faint"
          aria-label={label}
          data-r={row}
          data-c={column}
          disabled={readOnly}
          value={typeof value === "string" ? value : ""}
          onChange={(event) => onCommit((event.target.value as LoopState) || null)}
        >
          <option value="">–</option>
          {LOOP_STATES.map((state) => (
            <option key={state} value={state}>
              {LOOP_WORDS[state]}
            </option>
          ))}
        </select>
      </span>
    </td>
  );
}

function Legend() {
  return (
    <p className="note legend">
      <span>
        <BandMark value={0} band={{ low: -8, high: 8 }} /> inside the usual band
      </span>
      <span>
        <BandMark value={17} band={{ low: -8, high: 8 }} family="lean" /> outside: <Glyph family="lean" silent /> lean{" "}
        <Glyph family="rich" silent /> rich <Glyph family="spark" silent /> ignition <Glyph family="mech" silent />{" "}
        mechanical
      </span>
    </p>
  );
}
