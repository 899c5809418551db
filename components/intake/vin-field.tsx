"use client";

import { type InputHTMLAttributes, type Ref, useId } from "react";
import { cx } from "@/components/ui/cx";
import { Bang } from "@/components/ui/icons";
import { checkVin, type VinCheck } from "@/lib/obd/vin";

export interface VinFieldProps extends Omit<InputHTMLAttributes<HTMLInputElement>, "id" | "value"> {
  id: string;
  value: string;
  /** Checked on leaving the field; until then the cells only mirror what is typed. */
  isChecked: boolean;
  /** VINs on file for this customer: a repair that matches one says so. */
  onFile?: readonly { vin: string; label: string }[];
  isKept: boolean;
  onRepair: (vin: string) => void;
  onKeep: () => void;
  error?: string;
  ref?: Ref<HTMLInputElement>;
}

/** Seventeen cells in three groups; the check cell goes inverse, the suspect character is underlined, one press repairs. */
export function VinField({
  id,
  value,
  isChecked,
  onFile = [],
  isKept,
  onRepair,
  onKeep,
  error,
  ...input
}: VinFieldProps) {
  const noteId = useId();
  const vin = checkVin(value);
  const repair = vin.suspects.find((suspect) => onFile.some((v) => v.vin === suspect)) ?? vin.suspects[0];
  const fault = isChecked && !isKept && value !== "" ? faultOf(vin) : null;
  const isBlocking = Boolean(error) || (fault !== null && vin.binding);
  const isShown = fault || error;
  const suspectAt = repair ? [...repair].findIndex((c, i) => c !== vin.normalized[i]) : -1;
  return (
    <div className="field wide vinfield">
      <label htmlFor={id}>
        VIN <span className="opt">optional</span>
      </label>
      <input
        {...input}
        id={id}
        value={value}
        className="input num"
        maxLength={20}
        autoCapitalize="characters"
        autoComplete="off"
        spellCheck={false}
        aria-invalid={isBlocking || undefined}
        aria-describedby={isShown || vin.state === "valid" ? noteId : undefined}
      />
      {vin.normalized.length > 0 && (
        <>
          <div className="vin" aria-hidden="true">
            {Array.from({ length: 17 }, (_, i) => (
              <span
                // biome-ignore lint/suspicious/noArrayIndexKey: a cell is its position
                key={i}
                className={cx(
                  "num",
                  i === 8 && fault !== null && vin.state === "bad_check_digit" && "ck",
                  isChecked && fault !== null && (i === suspectAt || vin.badPositions.includes(i + 1)) && "sus",
                )}
              >
                {vin.normalized[i] ?? ""}
              </span>
            ))}
          </div>
          <div className="vparts label" aria-hidden="true">
            <span>maker</span>
            <span>model and engine</span>
            <span>check</span>
            <span>year, plant, serial</span>
          </div>
        </>
      )}
      {isShown && (
        <p className="why" id={noteId}>
          <Bang />
          <span>
            {fault ?? error}{" "}
            {repair && (
              <>
                <button type="button" className="link" onClick={() => onRepair(repair)}>
                  Use {repair}
                </button>
                {onFile.find((v) => v.vin === repair) && `, the VIN of ${onFile.find((v) => v.vin === repair)?.label}`},
                or{" "}
              </>
            )}
            <button type="button" className="link" onClick={onKeep}>
              keep it as typed
            </button>
            , with a reason.
          </span>
        </p>
      )}
      {!isShown && vin.state === "valid" && (
        <p className="hint" id={noteId}>
          The check digit fits{vin.modelYears.length > 0 && `; model year ${vin.modelYears.join(" or ")}`}
          {vin.region && `, built in ${vin.region}`}.
        </p>
      )}
    </div>
  );
}

function faultOf(vin: VinCheck): string | null {
  switch (vin.state) {
    case "bad_length":
      return `A VIN has 17 characters, this has ${vin.normalized.length}.`;
    case "bad_character":
      return `A VIN holds no ${[...new Set(vin.badPositions.map((p) => vin.normalized[p - 1]))].join(", ")}.`;
    case "bad_check_digit":
      return vin.binding
        ? `The check digit is ${vin.normalized[8]}, but these characters give ${vin.expectedCheckDigit}. One is misread: often N for M, 8 for B, 5 for S, 2 for Z.`
        : `The check digit is ${vin.normalized[8]}; these characters would give ${vin.expectedCheckDigit}. Makers outside North America need not use one, but read it again.`;
    case "bad_model_year":
      return "The tenth character names no model year.";
    default:
      return null;
  }
}
