import type { RevisionLine, RevisionReading, RevisionSnapshot } from "./quote-schema";

export interface PaperReading {
  label: string;
  before: RevisionReading | null;
  after: RevisionReading | null;
}

export interface PaperAuthorization {
  what: string;
  givenBy: string;
  how: string;
  contact: string | null;
  words: string | null;
  at: string;
  amountMinor: number;
  takenBy: string;
}

export interface PaperJob {
  title: string;
  netMinor: number;
  taxMinor: number;
  totalMinor: number;
  correction: string | null;
  lines: RevisionLine[];
  oldParts: string[];
}

/** An invoice as issued. Jobs that were not agreed, or were struck, carry no price here. */
export interface InvoiceSnapshot {
  version: 1;
  number: string;
  caseNumber: number;
  issuedAt: string;
  currency: string;
  locale: string;
  timeZone: string;
  paper: "A4" | "Letter";
  shop: RevisionSnapshot["shop"];
  customer: { name: string; email: string | null; phone: string | null; address: string | null };
  vehicle: {
    label: string;
    modelYear: number | null;
    plate: string | null;
    vin: string | null;
    odometerInKm: number | null;
    odometerOutKm: number | null;
    odometerUnreadable: string | null;
    distanceUnit: "km" | "mi";
  };
  complaint: string;
  cause: string;
  correction: string;
  readings: PaperReading[];
  proof: string;
  diagnosis: { netMinor: number; taxMinor: number; totalMinor: number; hoursMilli: number } | null;
  jobs: PaperJob[];
  notDone: { title: string; why: string }[];
  tax: { name: string; basisPoints: number };
  totals: { netMinor: number; taxMinor: number; totalMinor: number };
  authorizations: PaperAuthorization[];
  partsReturned: string;
  warranty: string;
  legal: string;
  /** For a vehicle that left unrepaired. */
  release: { reason: string; safetyNote: string | null; notSafeToDrive: boolean; acknowledgedBy: string | null } | null;
}
