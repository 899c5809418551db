/**
 * How much more than agreed may be charged before the customer must be asked again. The shapes are those of published
 * laws (named beside each); the amounts are in whole units of the shop's currency. The default asks for any excess.
 */
export const EXCESS_RULES = {
  /** California, 16 CCR 3354: anything beyond the authorized price. */
  any: { label: "Ask again for any excess", fixed: null, percent: null, take: null, cap: null },
  /** Michigan, guidance on the Motor Vehicle Service and Repair Act. */
  "lesser-10-or-10pct": {
    label: "Ask above 10 or 10 %, whichever is less",
    fixed: 10,
    percent: 10,
    take: "lesser",
    cap: null,
  },
  /** Florida Statutes 559.909. */
  "greater-10-or-10pct-cap-50": {
    label: "Ask above 10 or 10 %, whichever is more, at most 50",
    fixed: 10,
    percent: 10,
    take: "greater",
    cap: 50,
  },
  /** Washington, RCW 46.71.025. */
  "10pct": { label: "Ask above 10 %", fixed: null, percent: 10, take: null, cap: null },
} as const satisfies Record<
  string,
  { label: string; fixed: number | null; percent: number | null; take: "lesser" | "greater" | null; cap: number | null }
>;

export type ExcessRule = keyof typeof EXCESS_RULES;

/**
 * Whether going on needs a new authorization.
 *
 * @param authorizedMinor what was agreed
 * @param neededMinor what it would come to
 * @param digits decimals of the currency's minor unit
 */
export function mustAskAgain(rule: ExcessRule, authorizedMinor: number, neededMinor: number, digits = 2): boolean {
  const { fixed, percent, take, cap } = EXCESS_RULES[rule];
  const excess = BigInt(neededMinor) - BigInt(authorizedMinor);
  if (excess <= 0n) return false;
  // compared in hundredths of a minor unit, so that a percentage needs no rounding
  const whole = 100n * 10n ** BigInt(digits);
  const limits = [
    ...(fixed === null ? [] : [BigInt(fixed) * whole]),
    ...(percent === null ? [] : [BigInt(authorizedMinor) * BigInt(percent)]),
  ];
  const [first = 0n, second = first] = limits;
  const chosen = (take === "greater") === first > second ? first : second;
  const limit = cap !== null && chosen > BigInt(cap) * whole ? BigInt(cap) * whole : chosen;
  return excess * 100n > limit;
}
