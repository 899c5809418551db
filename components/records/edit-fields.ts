import { moneyEntry, parseMoney, parseNumber } from "@/components/ui/parse-entry";

interface FieldBase {
  /** Where the value goes in what is sent: a name, or a path as "engine.cylinders". */
  name: string;
  label: string;
  hint?: string;
  optional?: boolean;
}

export type Choice = { value: string; label: string };

/** One field of a record's dialog. `value` is what stands now, as it is stored. */
export type EditField = FieldBase &
  (
    | {
        kind: "text" | "area";
        value?: string | null;
        type?: "email" | "tel" | "text";
        mono?: boolean;
        max?: number;
      }
    | { kind: "money"; value?: number | null; currency: string }
    /** Shown as the stored number divided by `scale`. */
    | { kind: "number"; value?: number | null; unit?: string; scale?: number }
    | { kind: "choice"; value?: string | null; options: readonly Choice[]; placeholder?: string }
    | { kind: "yes-no"; value?: boolean | null }
    | { kind: "check"; value?: boolean }
    | { kind: "several"; value?: readonly string[]; options: readonly Choice[] }
  );

export class EntryError extends Error {}

/** What a field holds, read from the form, as it is stored; undefined when an optional one is empty. */
export function entryOf(field: EditField, form: FormData): unknown {
  if (field.kind === "check") return form.get(field.name) === "on";
  if (field.kind === "several") return form.getAll(field.name).map(String);
  const text = String(form.get(field.name) ?? "").trim();
  if (text === "") {
    if (field.optional) return undefined;
    throw new EntryError(`${field.label} is missing.`);
  }
  switch (field.kind) {
    case "money": {
      const minor = parseMoney(text, field.currency);
      if (minor === null) throw new EntryError("That is not an amount of money.");
      return minor;
    }
    case "number": {
      const number = parseNumber(text);
      if (number === null) throw new EntryError("That is not a number.");
      return Math.round(number * (field.scale ?? 1) * 1000) / 1000;
    }
    case "yes-no":
      return text === "yes";
    default:
      return text;
  }
}

/** A stored value as the field's own input would show it. */
export function entryText(field: EditField, value: unknown = field.value): string {
  if (value === null || value === undefined) return "";
  switch (field.kind) {
    case "money":
      return moneyEntry(Number(value), field.currency);
    case "number":
      return String(Math.round((Number(value) / (field.scale ?? 1)) * 1e6) / 1e6);
    case "yes-no":
      return value === true ? "yes" : value === false ? "no" : "";
    default:
      return String(value);
  }
}

/** A stored value in words, for two versions side by side. */
export function entryWords(field: EditField, value: unknown): string {
  if (field.kind === "check" || field.kind === "yes-no")
    return value === true ? "yes" : value === false ? "no" : "not said";
  if (field.kind === "choice") return field.options.find((option) => option.value === value)?.label ?? "not said";
  if (field.kind === "several") {
    const chosen = Array.isArray(value) ? value : [];
    return (
      field.options
        .filter((option) => chosen.includes(option.value))
        .map((option) => option.label)
        .join(", ") || "none"
    );
  }
  return entryText(field, value) || "empty";
}

export function valueAt(record: unknown, path: string): unknown {
  let at = record;
  for (const step of path.split(".")) at = (at as Record<string, unknown> | null | undefined)?.[step];
  return at;
}

/** A copy of `record` with the value at a path put in, or taken out when it is undefined. */
export function withValue(record: Record<string, unknown>, path: string, value: unknown): Record<string, unknown> {
  const [step = "", ...rest] = path.split(".");
  const next = { ...record };
  if (rest.length > 0) next[step] = withValue((record[step] ?? {}) as Record<string, unknown>, rest.join("."), value);
  else if (value === undefined) delete next[step];
  else next[step] = value;
  return next;
}

/** The fields in which two versions differ, in words. */
export function differences(
  fields: readonly EditField[],
  yours: unknown,
  theirs: unknown,
): { label: string; yours: string; theirs: string; numeric?: boolean }[] {
  return fields.flatMap((field) => {
    const mine = entryWords(field, valueAt(yours, field.name));
    const other = entryWords(field, valueAt(theirs, field.name));
    const numeric = field.kind === "money" || field.kind === "number";
    return mine === other ? [] : [{ label: field.label, yours: mine, theirs: other, numeric }];
  });
}
