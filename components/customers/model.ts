export interface CustomerRowView {
  id: string;
  name: string;
  href: string;
  /** "555 0167, juniper@tock.example". */
  contact: string;
  visits: number;
  /** "1 December 2026", or null before the first. */
  lastVisit: string | null;
}

export interface OwnedVehicleView {
  id: string;
  href: string;
  label: string;
  plate: string | null;
  vin: string | null;
  engine: string;
  newCaseHref: string;
}

export interface FactView {
  label: string;
  value: string;
  isMono?: boolean;
  href?: string;
}
