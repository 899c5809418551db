import type { EditField } from "@/components/records/edit-fields";
import { RATE_PURPOSES } from "@/lib/cases/price-schema";
import { CONDITIONS } from "@/lib/cases/quote-schema";
import type { ShopSettings } from "@/lib/shops/schema";

export const PURPOSE_WORDS: Record<string, string> = {
  general: "repairs",
  diagnosis: "diagnosis",
  warranty: "warranty work",
};
export const CONDITION_WORDS: Record<string, string> = { new: "new", rebuilt: "rebuilt", used: "used" };
export const KIND_LABELS = {
  labour: "Labour",
  part: "Parts",
  sublet: "Sublet",
  fee: "Fees",
  diagnosis: "Diagnosis",
} as const;

const offered = (isActive: boolean | undefined): EditField[] =>
  isActive === undefined
    ? []
    : [
        {
          kind: "check",
          name: "isActive",
          label: "Offered for new quotes",
          value: isActive,
          hint: "Quotes already written keep it.",
        },
      ];

interface RateFacts {
  name: string;
  perHourMinor: number;
  purpose: string;
  isActive: boolean;
}

export function rateFields(currency: string, known?: RateFacts): EditField[] {
  return [
    { kind: "text", name: "name", label: "Name", value: known?.name, max: 80 },
    {
      kind: "choice",
      name: "purpose",
      label: "For",
      value: known?.purpose ?? "general",
      options: RATE_PURPOSES.map((value) => ({ value, label: PURPOSE_WORDS[value] ?? value })),
    },
    {
      kind: "money",
      name: "perHourMinor",
      label: "An hour, before tax",
      value: known?.perHourMinor,
      currency,
      hint: "Cases whose diagnosis is agreed keep the rate they were agreed at.",
    },
    { kind: "area", name: "reason", label: "Reason", optional: true, max: 300, hint: "It is kept in the audit." },
    ...offered(known?.isActive),
  ];
}

interface OperationFacts {
  name: string;
  hoursMilli: number;
  rateId: string;
  isActive: boolean;
}

export function operationFields(rates: readonly { id: string; name: string }[], known?: OperationFacts): EditField[] {
  return [
    { kind: "text", name: "name", label: "Operation", value: known?.name, max: 160 },
    { kind: "number", name: "hoursMilli", label: "Hours sold", value: known?.hoursMilli, scale: 1000, unit: "h" },
    {
      kind: "choice",
      name: "rateId",
      label: "At the rate",
      value: known?.rateId ?? rates[0]?.id,
      options: rates.map((rate) => ({ value: rate.id, label: rate.name })),
    },
    ...offered(known?.isActive),
  ];
}

interface PartFacts {
  name: string;
  number: string;
  condition: string;
  costMinor: number | null;
  priceMinor: number;
  isActive: boolean;
}

export function partFields(currency: string, known?: PartFacts): EditField[] {
  return [
    { kind: "text", name: "name", label: "Part", value: known?.name, max: 160 },
    { kind: "text", name: "number", label: "Number", value: known?.number, mono: true, max: 60 },
    {
      kind: "choice",
      name: "condition",
      label: "Condition",
      value: known?.condition ?? "new",
      options: CONDITIONS.map((value) => ({ value, label: CONDITION_WORDS[value] ?? value })),
    },
    { kind: "money", name: "costMinor", label: "Cost, before tax", value: known?.costMinor, currency },
    { kind: "money", name: "priceMinor", label: "Price, before tax", value: known?.priceMinor, currency },
    ...offered(known?.isActive),
  ];
}

/** Tax stands in the shop's settings, which are saved whole: the paths lead into them. */
export function taxFields(settings: ShopSettings): EditField[] {
  return [
    { kind: "text", name: "settings.taxName", label: "Name of the tax", value: settings.taxName, max: 40 },
    {
      kind: "number",
      name: "settings.taxBasisPoints",
      label: "Rate",
      value: settings.taxBasisPoints,
      scale: 100,
      unit: "%",
    },
    {
      kind: "several",
      name: "settings.taxKinds",
      label: "Charged on",
      value: settings.taxKinds,
      options: Object.entries(KIND_LABELS).map(([value, label]) => ({ value, label })),
    },
    {
      kind: "choice",
      name: "settings.rounding",
      label: "Rounded",
      value: settings.rounding,
      options: [
        { value: "sum-then-tax", label: "Tax on the sum, then rounded" },
        { value: "line-then-sum", label: "Tax on each line, rounded, then summed" },
      ],
    },
    { kind: "area", name: "reason", label: "Reason", optional: true, max: 300, hint: "It is kept in the audit." },
  ];
}
