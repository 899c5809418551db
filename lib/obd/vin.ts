/**
 * Vehicle identification numbers. Sources: ISO 3779 (content), ISO 3780 (regions), 49 CFR 565.15 (check digit,
 * Tables III–V; model year, Table VII; position 7 rule of 565.15(b)).
 */

export type VinState = "valid" | "empty" | "bad_length" | "bad_character" | "bad_check_digit" | "bad_model_year";

export interface VinCheck {
  /** Upper case without blanks and dashes, otherwise as typed. */
  normalized: string;
  state: VinState;
  /** The check digit binds only US and Canadian numbers; elsewhere a failure warns and never blocks. */
  binding: boolean;
  /** Weighted sum and remainder of the check, when all 17 characters can be counted. */
  sum?: number;
  remainder?: number;
  expectedCheckDigit?: string;
  /** Positions (1 to 17) of characters a VIN cannot hold. */
  badPositions: number[];
  /** Numbers one likely slip away that pass the check; best first, at most five. */
  suspects: string[];
  /** Zero, one or two years, likelier first; two when position 7 does not decide. */
  modelYears: number[];
  region: VinRegion | null;
  /** Two-letter country where the first character alone tells it. */
  country: "US" | "CA" | "MX" | null;
}

export type VinRegion = "Africa" | "Asia" | "Europe" | "North America" | "Oceania" | "South America";

const LETTER_VALUES: Record<string, number> = {
  A: 1,
  B: 2,
  C: 3,
  D: 4,
  E: 5,
  F: 6,
  G: 7,
  H: 8,
  J: 1,
  K: 2,
  L: 3,
  M: 4,
  N: 5,
  P: 7,
  R: 9,
  S: 2,
  T: 3,
  U: 4,
  V: 5,
  W: 6,
  X: 7,
  Y: 8,
  Z: 9,
};
const WEIGHTS = [8, 7, 6, 5, 4, 3, 2, 10, 0, 9, 8, 7, 6, 5, 4, 3, 2];
const YEAR_CODES = "ABCDEFGHJKLMNPRSTVWXY123456789";
/** What eyes and pens confuse on a plate. */
const LOOKALIKES: Record<string, string> = {
  I: "1",
  O: "0",
  Q: "0",
  S: "5",
  "5": "S",
  Z: "2",
  "2": "Z",
  B: "8",
  "8": "B",
  G: "6",
  "6": "G",
};

function weightedSum(vin: string): number {
  let sum = 0;
  for (let i = 0; i < 17; i++) {
    const c = vin[i] ?? "";
    sum += (WEIGHTS[i] ?? 0) * (/\d/.test(c) ? Number(c) : (LETTER_VALUES[c] ?? 0));
  }
  return sum;
}

const checkCharacter = (remainder: number) => (remainder === 10 ? "X" : String(remainder));

function passes(vin: string): boolean {
  return /^[A-HJ-NPR-Z0-9]{17}$/.test(vin) && checkCharacter(weightedSum(vin) % 11) === vin[8];
}

function regionOf(first: string): VinRegion | null {
  if (/[A-H]/.test(first)) return "Africa";
  if (/[J-R]/.test(first)) return "Asia";
  if (/[S-Z]/.test(first)) return "Europe";
  if (/[1-5]/.test(first)) return "North America";
  if (/[67]/.test(first)) return "Oceania";
  if (/[89]/.test(first)) return "South America";
  return null;
}

function modelYears(vin: string, lightVehicle: boolean, binding: boolean): number[] {
  const at = YEAR_CODES.indexOf(vin[9] ?? " ");
  if (at < 0) return [];
  const [first, second] = [1980 + at, 2010 + at];
  if (!lightVehicle) return [first, second];
  const early = /\d/.test(vin[6] ?? "");
  // The position 7 rule is law for US and Canadian numbers only; elsewhere it just says which is likelier.
  if (binding) return early ? [first] : [second];
  return early ? [first, second] : [second, first];
}

function repairs(vin: string): string[] {
  const found: string[] = [];
  const keep = (candidate: string) => {
    if (found.length < 5 && !found.includes(candidate) && candidate !== vin && passes(candidate)) found.push(candidate);
  };
  // Letters a VIN never holds have one reading each; put them right before anything else is tried.
  const legal = [...vin].map((c) => (/[IOQ]/.test(c) ? (LOOKALIKES[c] ?? c) : c)).join("");
  keep(legal);
  for (let i = 0; i < legal.length; i++) {
    const other = LOOKALIKES[legal[i] ?? ""];
    if (other) keep(legal.slice(0, i) + other + legal.slice(i + 1));
  }
  for (let i = 0; i + 1 < legal.length; i++)
    if (legal[i] !== legal[i + 1]) keep(legal.slice(0, i) + legal[i + 1] + legal[i] + legal.slice(i + 2));
  return found;
}

/**
 * Checks a number as typed. Never throws; any text is accepted.
 *
 * @param options.lightVehicle car, multipurpose vehicle or truck to 4,536 kg (default true): position 7 then tells the
 * 30-year cycle of the model year
 */
export function checkVin(text: string, options: { lightVehicle?: boolean } = {}): VinCheck {
  const normalized = text.toUpperCase().replace(/[\s-]+/g, "");
  const first = normalized[0] ?? "";
  const country = /[145]/.test(first) ? "US" : first === "2" ? "CA" : first === "3" ? "MX" : null;
  const base: VinCheck = {
    normalized,
    state: "valid",
    binding: country === "US" || country === "CA",
    badPositions: [],
    suspects: [],
    modelYears: [],
    region: regionOf(first),
    country,
  };
  if (normalized === "") return { ...base, state: "empty" };
  base.badPositions = [...normalized].flatMap((c, i) => (/[A-HJ-NPR-Z0-9]/.test(c) ? [] : [i + 1]));
  if (normalized.length !== 17) return { ...base, state: "bad_length" };
  if (base.badPositions.length > 0) return { ...base, state: "bad_character", suspects: repairs(normalized) };

  const sum = weightedSum(normalized);
  const remainder = sum % 11;
  const expectedCheckDigit = checkCharacter(remainder);
  const years = modelYears(normalized, options.lightVehicle ?? true, base.binding);
  const full = { ...base, sum, remainder, expectedCheckDigit, modelYears: years };
  // The year's code is mandatory where the check digit is; elsewhere position 10 may hold anything.
  if (full.binding && years.length === 0) return { ...full, state: "bad_model_year", suspects: repairs(normalized) };
  if (expectedCheckDigit !== normalized[8]) return { ...full, state: "bad_check_digit", suspects: repairs(normalized) };
  return { ...full, state: "valid" };
}
