import type { VinView } from "@/components/vehicles/model";
import { checkVin } from "@/lib/obd/vin";

/** What the check of a kept VIN says. Outside North America the ninth character need not be a check digit. */
export function vinView(text: string): VinView {
  const vin = checkVin(text);
  switch (vin.state) {
    case "valid": {
      const facts = [
        vin.modelYears.length > 0 && `model year ${vin.modelYears.join(" or ")}`,
        vin.region && `built in ${vin.region}`,
      ].filter(Boolean);
      return {
        text,
        state: "fits",
        words: `The check digit fits${facts.length > 0 ? `; ${facts.join(", ")}` : ""}.`,
      };
    }
    case "bad_length":
      return { text, state: "fails", words: `A VIN has 17 characters, this has ${vin.normalized.length}.` };
    case "bad_character":
      return { text, state: "fails", words: "It holds a character that no VIN has: I, O and Q are never used." };
    case "bad_model_year":
      return { text, state: "fails", words: "Its tenth character names no model year." };
    case "bad_check_digit":
      return vin.binding
        ? { text, state: "fails", words: `Its check digit should be ${vin.expectedCheckDigit}. Read it again.` }
        : {
            text,
            state: "warns",
            words: `Position 9 would be ${vin.expectedCheckDigit} by the North American check, which does not bind here${
              vin.region ? ` (${vin.region})` : ""
            }.`,
          };
    default:
      return { text, state: "fails", words: "" };
  }
}
