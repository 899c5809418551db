"use client";

import { Combobox } from "@/components/ui/combobox";
import { Cross } from "@/components/ui/icons";
import { COMPLAINT_LABELS, COMPLAINTS, type ComplaintId } from "@/lib/diagnosis/vocabulary";

export interface ComplaintPickerProps {
  id: string;
  chosen: readonly ComplaintId[];
  onChange: (chosen: ComplaintId[]) => void;
}

/** What the customer's words are in the trade's: several, found by typing. */
export function ComplaintPicker({ id, chosen, onChange }: ComplaintPickerProps) {
  return (
    <div className="field wide">
      <label htmlFor={id}>What that is</label>
      <div className="chosen">
        {chosen.length > 0 && (
          <ul>
            {chosen.map((complaint) => (
              <li key={complaint}>
                {COMPLAINT_LABELS[complaint]}
                <button
                  type="button"
                  aria-label={`Remove ${COMPLAINT_LABELS[complaint].toLowerCase()}`}
                  onClick={() => onChange(chosen.filter((c) => c !== complaint))}
                >
                  <Cross />
                </button>
              </li>
            ))}
          </ul>
        )}
        <Combobox
          id={id}
          label="Add a complaint"
          className="add"
          placeholder={chosen.length > 0 ? "Add another" : "Stalls, hesitates, knocks, smells of fuel"}
          options={COMPLAINTS.filter((c) => !chosen.includes(c)).map((c) => ({ value: c, label: COMPLAINT_LABELS[c] }))}
          onChoose={(option) => onChange([...chosen, option.value as ComplaintId])}
        />
      </div>
    </div>
  );
}
