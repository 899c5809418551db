import type { InputHTMLAttributes, ReactNode, Ref, SelectHTMLAttributes, TextareaHTMLAttributes } from "react";
import { cx } from "./cx";
import { Field } from "./field";

interface Common {
  id: string;
  label: ReactNode;
  hint?: ReactNode;
  error?: ReactNode;
  optional?: boolean;
  fieldClassName?: string;
}

export interface TextInputProps extends Common, Omit<InputHTMLAttributes<HTMLInputElement>, "id"> {
  /** Measured values, amounts, plates and codes are set in the reading face. */
  mono?: boolean;
  unit?: string;
  ref?: Ref<HTMLInputElement>;
}

export function TextInput({
  id,
  label,
  hint,
  error,
  optional,
  fieldClassName,
  mono,
  unit,
  className,
  ...rest
}: TextInputProps) {
  return (
    <Field id={id} label={label} hint={hint} error={error} optional={optional} className={fieldClassName}>
      {(ids) => {
        const input = <input {...rest} {...ids} className={cx("input", mono && "num", className)} />;
        return unit ? (
          <span className="with-unit">
            {input}
            <span className="unit" aria-hidden="true">
              {unit}
            </span>
          </span>
        ) : (
          input
        );
      }}
    </Field>
  );
}

export interface TextAreaProps extends Common, Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, "id"> {
  ref?: Ref<HTMLTextAreaElement>;
}

export function TextArea({
  id,
  label,
  hint,
  error,
  optional,
  fieldClassName,
  className,
  rows = 2,
  ...rest
}: TextAreaProps) {
  return (
    <Field id={id} label={label} hint={hint} error={error} optional={optional} className={fieldClassName}>
      {(ids) => <textarea {...rest} {...ids} rows={rows} className={cx("input", className)} />}
    </Field>
  );
}

export interface SelectProps extends Common, Omit<SelectHTMLAttributes<HTMLSelectElement>, "id"> {
  options: readonly { value: string; label: string }[];
  /** Shown first, with an empty value. */
  placeholder?: string;
  ref?: Ref<HTMLSelectElement>;
}

export function Select({
  id,
  label,
  hint,
  error,
  optional,
  fieldClassName,
  className,
  options,
  placeholder,
  ...rest
}: SelectProps) {
  return (
    <Field id={id} label={label} hint={hint} error={error} optional={optional} className={fieldClassName}>
      {(ids) => (
        <select {...rest} {...ids} className={cx("input", className)}>
          {placeholder !== undefined && <option value="">{placeholder}</option>}
          {options.map((option) => (
            <option key={option.value} value={option.value}>
              {option.label}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}

export interface CheckboxProps extends Omit<InputHTMLAttributes<HTMLInputElement>, "type"> {
  children: ReactNode;
  note?: ReactNode;
  error?: ReactNode;
  ref?: Ref<HTMLInputElement>;
}

export function Checkbox({ children, note, error, className, id, ...rest }: CheckboxProps) {
  const why = error && id ? `${id}-why` : undefined;
  return (
    <div className={className}>
      <label className="check">
        <input {...rest} id={id} type="checkbox" aria-invalid={error ? true : undefined} aria-describedby={why} />
        <span>
          {children}
          {note && (
            <>
              <br />
              <span className="note">{note}</span>
            </>
          )}
        </span>
      </label>
      {error && (
        <p className="why" id={why}>
          <span className="bang" aria-hidden="true">
            !
          </span>
          <span>{error}</span>
        </p>
      )}
    </div>
  );
}
