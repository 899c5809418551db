import type { ReactNode } from "react";
import { cx } from "./cx";
import { Bang } from "./icons";

export interface FieldIds {
  id: string;
  "aria-invalid"?: true;
  "aria-describedby"?: string;
}

export interface FieldProps {
  id: string;
  label: ReactNode;
  hint?: ReactNode;
  /** The reason the value is refused, in one sentence. */
  error?: ReactNode;
  /** Optional fields say so; required ones don't. */
  optional?: boolean;
  className?: string;
  /** Receives id, aria-invalid and aria-describedby, so that no form has to remember them. */
  children: (ids: FieldIds) => ReactNode;
}

export function Field({ id, label, hint, error, optional, className, children }: FieldProps) {
  const described = [error && `${id}-why`, hint && `${id}-hint`].filter(Boolean).join(" ");
  return (
    <div className={cx("field", className)}>
      <label htmlFor={id}>
        {label}
        {optional && <span className="opt"> optional</span>}
      </label>
      {children({
        id,
        ...(error ? { "aria-invalid": true as const } : {}),
        ...(described ? { "aria-describedby": described } : {}),
      })}
      <FieldError id={`${id}-why`}>{error}</FieldError>
      {hint && (
        <p className="hint" id={`${id}-hint`}>
          {hint}
        </p>
      )}
    </div>
  );
}

export function FieldError({ id, children }: { id: string; children?: ReactNode }) {
  if (!children) return null;
  return (
    <p className="why" id={id}>
      <Bang />
      <span>{children}</span>
    </p>
  );
}
