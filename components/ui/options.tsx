import type { ChangeEventHandler, Ref } from "react";
import { cx } from "./cx";

export interface OptionsProps {
  /** What is being chosen; read out, and shown by the caller or by `showLegend`. */
  legend: string;
  showLegend?: boolean;
  name: string;
  options: readonly { value: string; label: string; disabled?: boolean }[];
  /** One answer, or several. */
  several?: boolean;
  value?: string | null | readonly string[];
  defaultValue?: string | readonly string[];
  onChange?: (value: string, checked: boolean) => void;
  /** For react-hook-form's register: spread its pieces here. */
  inputProps?: {
    onChange?: ChangeEventHandler<HTMLInputElement>;
    onBlur?: ChangeEventHandler<HTMLInputElement>;
    ref?: Ref<HTMLInputElement>;
  };
  dense?: boolean;
  className?: string;
}

function has(value: string | null | readonly string[] | undefined, option: string): boolean {
  return Array.isArray(value) ? value.includes(option) : value === option;
}

/** Up to five answers as joined boxes; more belong in a `Combobox`. */
export function Options(props: OptionsProps) {
  const { legend, showLegend, name, options, several, value, defaultValue, onChange, inputProps, dense, className } =
    props;
  return (
    <fieldset className={cx(showLegend && "field", className)}>
      <legend className={showLegend ? undefined : "vh"}>{legend}</legend>
      <div className={cx("opts", dense && "dense")}>
        {options.map((option) => (
          <label key={option.value}>
            <input
              {...inputProps}
              type={several ? "checkbox" : "radio"}
              name={name}
              value={option.value}
              disabled={option.disabled}
              {...(value !== undefined
                ? { checked: has(value, option.value), onChange: (e) => onChange?.(option.value, e.target.checked) }
                : {
                    defaultChecked: has(defaultValue, option.value),
                    ...(onChange ? { onChange: (e) => onChange(option.value, e.target.checked) } : {}),
                  })}
            />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
