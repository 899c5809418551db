"use client";

import { type FormEvent, useState } from "react";
import { Button } from "./button";
import { cx } from "./cx";
import { formatPrice, formatQuantity } from "./format";
import { moneyEntry, parseMoney, parseNumber } from "./parse-entry";
import { ScrollX } from "./scroll-x";
import { EmptyState } from "./states";

export type CellValue = string | number | boolean | null;

export interface EditColumn {
  key: string;
  label: string;
  /** money: minor units; milli: thousandths (hours too); number: as it is. */
  kind: "text" | "money" | "milli" | "number" | "choice" | "flag" | "computed";
  options?: readonly { value: string; label: string }[];
  /** For computed columns. */
  show?: (values: Record<string, CellValue>) => string;
  unit?: string;
  mono?: boolean;
  optional?: boolean;
}

export interface EditRow {
  id: string;
  version: number;
  values: Record<string, CellValue>;
  isActive?: boolean;
}

export type EditResult = { ok: true } | { ok: false; message: string; fieldErrors?: Record<string, string> };

export interface EditableTableProps {
  caption: string;
  columns: readonly EditColumn[];
  rows: readonly EditRow[];
  currency?: string;
  locale?: string;
  /** `id` null adds a row. */
  onSave?: (row: {
    id: string | null;
    version: number | null;
    values: Record<string, CellValue>;
    isActive: boolean;
    reason: string;
  }) => Promise<EditResult>;
  addLabel: string;
  /** Ask for a reason with every change. */
  needsReason?: boolean;
  /** Why it can only be read. */
  readOnlyWhy?: string;
  emptyText?: string;
}

/** Rows edited in place, one at a time, each change with its reason. */
export function EditableTable(props: EditableTableProps) {
  const { caption, columns, rows, currency = "USD", locale = "en-US", onSave, addLabel, needsReason = true } = props;
  const [editing, setEditing] = useState<string | null>(null);
  const blank: EditRow = {
    id: "",
    version: 0,
    isActive: true,
    values: Object.fromEntries(
      columns.map((c) => [
        c.key,
        c.kind === "flag"
          ? false
          : c.kind === "choice"
            ? (c.options?.[0]?.value ?? "")
            : c.kind === "milli"
              ? 1000
              : c.kind === "money"
                ? 0
                : "",
      ]),
    ),
  };
  const form = (row: EditRow, isNew: boolean) => (
    <EditForm
      key={row.id || "new"}
      row={row}
      isNew={isNew}
      columns={columns}
      currency={currency}
      needsReason={needsReason}
      onLeave={() => setEditing(null)}
      onSave={async (values, isActive, reason) => {
        const result = await onSave!({
          id: isNew ? null : row.id,
          version: isNew ? null : row.version,
          values,
          isActive,
          reason,
        });
        if (result.ok) setEditing(null);
        return result;
      }}
    />
  );
  const isNumeric = (column: EditColumn) =>
    column.kind === "money" ||
    column.kind === "milli" ||
    column.kind === "number" ||
    (column.kind === "computed" && column.mono !== false);
  return (
    <div className="edittable">
      <div className="edithead">
        <h2>{caption}</h2>
        {onSave ? (
          <Button look="quiet" small disabled={editing !== null} onClick={() => setEditing("new")}>
            {addLabel}
          </Button>
        ) : (
          props.readOnlyWhy && <span className="label">{props.readOnlyWhy}</span>
        )}
      </div>
      {editing === "new" && form(blank, true)}
      {rows.length === 0 && editing !== "new" ? (
        <EmptyState title="Nothing here yet" level={3}>
          {props.emptyText ?? `“${addLabel}” makes the first.`}
        </EmptyState>
      ) : (
        <ScrollX label={caption}>
          <table className="tbl">
            <caption className="vh">{caption}</caption>
            <thead>
              <tr>
                {columns.map((column) => (
                  <th key={column.key} scope="col" className={isNumeric(column) ? "r" : undefined}>
                    {column.label}
                    {column.unit && `, ${column.unit}`}
                  </th>
                ))}
                {onSave && (
                  <th scope="col">
                    <span className="vh">Change</span>
                  </th>
                )}
              </tr>
            </thead>
            <tbody>
              {rows.map((row) =>
                editing === row.id ? (
                  <tr key={row.id} className="ex">
                    <td colSpan={columns.length + 1}>{form(row, false)}</td>
                  </tr>
                ) : (
                  <tr key={row.id} className={cx(row.isActive === false && "retired")}>
                    {columns.map((column, index) => {
                      const text = show(column, row.values, currency, locale);
                      const className = cx(isNumeric(column) && "r", (isNumeric(column) || column.mono) && "num");
                      return index === 0 ? (
                        <th key={column.key} scope="row" className={className}>
                          {text}
                          {row.isActive === false && <span className="faint"> retired</span>}
                        </th>
                      ) : (
                        <td key={column.key} className={className}>
                          {text}
                        </td>
                      );
                    })}
                    {onSave && (
                      <td className="r">
                        <Button look="link" disabled={editing !== null} onClick={() => setEditing(row.id)}>
                          Change<span className="vh"> {String(row.values[columns[0]?.key ?? ""] ?? "")}</span>
                        </Button>
                      </td>
                    )}
                  </tr>
                ),
              )}
            </tbody>
          </table>
        </ScrollX>
      )}
    </div>
  );
}

function show(column: EditColumn, values: Record<string, CellValue>, currency: string, locale: string): string {
  const value = values[column.key];
  if (column.kind === "computed") return column.show?.(values) ?? "";
  if (value === null || value === undefined || value === "") return "";
  if (column.kind === "money") return formatPrice(Number(value), currency, locale);
  if (column.kind === "milli") return formatQuantity(Number(value));
  if (column.kind === "flag") return value ? "yes" : "no";
  if (column.kind === "choice") return column.options?.find((o) => o.value === value)?.label ?? String(value);
  return String(value);
}

interface EditFormProps {
  row: EditRow;
  isNew: boolean;
  columns: readonly EditColumn[];
  currency: string;
  needsReason: boolean;
  onSave: (values: Record<string, CellValue>, isActive: boolean, reason: string) => Promise<EditResult>;
  onLeave: () => void;
}

function EditForm({ row, isNew, columns, currency, needsReason, onSave, onLeave }: EditFormProps) {
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [fault, setFault] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const fields = columns.filter((column) => column.kind !== "computed");
  const idOf = (key: string) => `ed-${row.id || "new"}-${key}`;

  async function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const values: Record<string, CellValue> = {};
    const bad: Record<string, string> = {};
    for (const column of fields) {
      const text = String(form.get(column.key) ?? "").trim();
      if (column.kind === "flag") values[column.key] = form.get(column.key) !== null;
      else if (column.kind === "money") {
        const minor = text === "" && column.optional ? null : parseMoney(text, currency);
        if (minor === null && !column.optional) bad[column.key] = "That is not an amount.";
        values[column.key] = minor;
      } else if (column.kind === "milli" || column.kind === "number") {
        const n = text === "" ? null : parseNumber(text);
        if (n === null && !(column.optional && text === "")) bad[column.key] = "That is not a number.";
        values[column.key] = n === null ? null : column.kind === "milli" ? Math.round(n * 1000) : n;
      } else {
        if (text === "" && !column.optional) bad[column.key] = `${column.label} is missing.`;
        values[column.key] = text;
      }
    }
    const reason = String(form.get("reason") ?? "").trim();
    if (needsReason && !isNew && reason === "") bad.reason = "Say why.";
    setErrors(bad);
    if (Object.keys(bad).length > 0) return;
    setBusy(true);
    setFault(null);
    const result = await onSave(values, form.get("isActive") !== null || isNew, reason);
    setBusy(false);
    if (!result.ok) {
      setFault(result.message);
      setErrors(
        Object.fromEntries(
          Object.entries(result.fieldErrors ?? {}).map(([pointer, reasonText]) => [
            pointer.replace(/^\//, ""),
            reasonText,
          ]),
        ),
      );
    }
  }

  const initial = (column: EditColumn) => {
    const value = row.values[column.key];
    if (value === null || value === undefined) return "";
    if (column.kind === "money") return isNew && value === 0 ? "" : moneyEntry(Number(value), currency);
    if (column.kind === "milli") return formatQuantity(Number(value));
    return String(value);
  };
  return (
    <form className="editform" onSubmit={submit} noValidate>
      {fields.map((column) => (
        <div className="field" key={column.key}>
          {column.kind === "flag" ? (
            <>
              <span className="label">{column.label}</span>
              <label className="check">
                <input type="checkbox" name={column.key} defaultChecked={row.values[column.key] === true} />
                <span>yes</span>
              </label>
            </>
          ) : (
            <>
              <label htmlFor={idOf(column.key)}>
                {column.label}
                {column.unit && `, ${column.unit}`}
                {column.optional && <span className="opt"> optional</span>}
              </label>
              {column.kind === "choice" ? (
                <select
                  id={idOf(column.key)}
                  name={column.key}
                  className="input"
                  defaultValue={String(row.values[column.key] ?? "")}
                >
                  {column.optional && <option value="">none</option>}
                  {column.options?.map((option) => (
                    <option key={option.value} value={option.value}>
                      {option.label}
                    </option>
                  ))}
                </select>
              ) : (
                <input
                  id={idOf(column.key)}
                  name={column.key}
                  className={cx("input", (column.kind !== "text" || column.mono) && "num")}
                  inputMode={column.kind === "text" ? undefined : "decimal"}
                  defaultValue={initial(column)}
                  aria-invalid={errors[column.key] ? true : undefined}
                  aria-describedby={errors[column.key] ? `${idOf(column.key)}-why` : undefined}
                />
              )}
              {errors[column.key] && (
                <p className="why" id={`${idOf(column.key)}-why`}>
                  {errors[column.key]}
                </p>
              )}
            </>
          )}
        </div>
      ))}
      {needsReason && !isNew && (
        <div className="field">
          <label htmlFor={idOf("reason")}>Reason</label>
          <input
            id={idOf("reason")}
            name="reason"
            className="input"
            maxLength={300}
            aria-invalid={errors.reason ? true : undefined}
          />
          {errors.reason && <p className="why">{errors.reason}</p>}
        </div>
      )}
      <div className="editacts">
        {!isNew && (
          <label className="check">
            <input type="checkbox" name="isActive" defaultChecked={row.isActive !== false} />
            <span>in use</span>
          </label>
        )}
        <Button type="submit" small busy={isBusy} busyLabel="Saving">
          Save
        </Button>
        <Button look="link" onClick={onLeave}>
          Leave
        </Button>
        {fault && (
          <span className="alarm" role="alert">
            {fault}
          </span>
        )}
      </div>
    </form>
  );
}
