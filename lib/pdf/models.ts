/**
 * What the papers are rendered from: plain values, already decided and priced. Nothing is computed from them but how
 * they are written; amounts are integer minor units of `currency`, quantities are thousandths, instants are ISO 8601.
 */
export type PaperLanguage = "en" | "es" | "fr" | "de";
export type PaperSize = "A4" | "Letter";
export type LineKind = "labour" | "part" | "sublet" | "fee" | "diagnosis";

export interface PaperBase {
  /** The language of the paper's own words; the people's words stay as they were written. */
  language: PaperLanguage;
  /** How numbers, amounts and dates are written (BCP 47). */
  locale: string;
  timeZone: string;
  currency: string;
  paper: PaperSize;
  number: string;
  caseNumber: number;
  issuedAt: string;
  /** 64 hexadecimal digits of the data this paper was made from; on every page. */
  sha256: string;
  shop: { name: string; address: string; phone: string; email: string; registration: string };
  customer: { name: string; address?: string | null; phone?: string | null; email?: string | null };
  vehicle: {
    label: string;
    modelYear: number | null;
    plate: string | null;
    vin: string | null;
    odometerInKm: number | null;
    odometerOutKm?: number | null;
    /** Why it could not be read. */
    odometerUnreadable?: string | null;
    distanceUnit: "km" | "mi";
  };
  warranty: string;
  legal: string;
}

export interface PaperLine {
  kind: LineKind;
  description: string;
  quantityMilli: number;
  unitPriceMinor: number;
  netMinor: number;
  partNumber?: string | null;
  condition?: "new" | "rebuilt" | "used" | null;
}

/** A reading against its usual band. */
export interface ReadingMark {
  value: string;
  /** Where it lies when the usual band is 0 … 1; below 0 and above 1 is outside. */
  at: number;
  family: "lean" | "rich" | "spark" | "mech" | null;
  inside: boolean;
}

export interface ReadingRow {
  /** Where it was taken ("Standing still, engine warm"); rows of the same place stand together. */
  place?: string;
  label: string;
  before: ReadingMark | null;
  after: ReadingMark | null;
}

export interface BilledJob {
  title: string;
  netMinor: number;
  /** The price with tax that the customer said yes to, and what is billed with tax; left out where nothing was agreed by job. */
  agreedMinor?: number | null;
  billedMinor?: number | null;
  /** "agreed at intake up to …": written behind the title. */
  note?: string | null;
  correction?: string | null;
  lines: PaperLine[];
  /** What became of the parts taken out. */
  oldParts: string[];
}

export interface Authorization {
  what: string;
  givenBy: string;
  how: string;
  contact: string | null;
  words: string | null;
  at: string;
  /** With tax. */
  amountMinor: number;
  takenBy: string;
}

export interface NotDone {
  title: string;
  /** The reason, and the risk as it was read. */
  why: string;
}

export interface Amount {
  label: string;
  amountMinor: number;
}

export interface Totals {
  netMinor: number;
  discounts?: Amount[];
  taxes: Amount[];
  totalMinor: number;
  payments?: Amount[];
  owingMinor?: number;
}

export interface InvoiceModel extends PaperBase {
  complaint: string;
  cause: string;
  correction: string;
  jobs: BilledJob[];
  totals: Totals;
  authorizations: Authorization[];
  notDone: NotDone[];
  readings: ReadingRow[];
  /** The verdict with its rule, and who measured when. */
  proof: string;
  partsReturned: string;
}

export interface ReleaseModel extends InvoiceModel {
  release: { reason: string; safetyNote: string | null; notSafeToDrive: boolean; acknowledgedBy: string | null };
}

export interface OfferedJob {
  title: string;
  urgency: "now" | "soon" | "optional";
  ifWaits: string;
  /** The title of the job it needs. */
  needs?: string | null;
  isSafety: boolean;
  /** With tax: what the customer's page shows. */
  totalMinor: number;
  lines: PaperLine[];
}

export interface QuoteModel extends PaperBase {
  word: "estimate" | "quotation";
  revision: number;
  complaint: string;
  headline: string;
  finding: string;
  readingsTitle: string;
  readings: ReadingRow[];
  readingsNote: string;
  jobs: OfferedJob[];
  /** Diagnosis and jobs agreed before, with tax. */
  agreed: Amount[];
  totals: { netMinor: number; taxes: Amount[]; totalMinor: number; neededNowMinor: number };
  readyAt: string | null;
  validUntil: string;
  keepParts: boolean;
}
