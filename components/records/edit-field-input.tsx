"use client";

import { Checkbox, Select, TextArea, TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import { type EditField, entryText } from "./edit-fields";

const YES_NO = [
  { value: "yes", label: "yes" },
  { value: "no", label: "no" },
];

/** The input of one field of a record's dialog; it keeps its own text until the form is read. */
export function EditFieldInput({ field, id, error }: { field: EditField; id: string; error?: string }) {
  const common = { id, name: field.name, label: field.label, hint: field.hint, optional: field.optional, error };
  switch (field.kind) {
    case "area":
      return <TextArea {...common} rows={3} maxLength={field.max} defaultValue={entryText(field)} />;
    case "money":
      return <TextInput {...common} mono inputMode="decimal" defaultValue={entryText(field)} unit={field.currency} />;
    case "number":
      return <TextInput {...common} mono inputMode="decimal" defaultValue={entryText(field)} unit={field.unit} />;
    case "choice":
      return (
        <Select
          {...common}
          options={field.options}
          placeholder={field.placeholder}
          defaultValue={field.value ?? undefined}
        />
      );
    case "yes-no":
      return <Select {...common} options={YES_NO} placeholder="not known" defaultValue={entryText(field)} />;
    case "check":
      return (
        <Checkbox id={id} name={field.name} defaultChecked={field.value} note={field.hint} error={error}>
          {field.label}
        </Checkbox>
      );
    case "several":
      return (
        <Options
          legend={field.label}
          showLegend
          name={field.name}
          options={field.options}
          several
          defaultValue={field.value ?? []}
        />
      );
    default:
      return (
        <TextInput
          {...common}
          type={field.type ?? "text"}
          mono={field.mono}
          maxLength={field.max}
          defaultValue={entryText(field)}
        />
      );
  }
}
