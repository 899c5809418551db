import type { OpenCaseInput } from "@/lib/cases/schema";
import type { CaseVehicle } from "@/lib/diagnosis/case-file";

export interface CustomerChoice {
  id: string;
  name: string;
  /** "customer since 2021, 3 cases". */
  note: string;
  /** "555 0167, juniper@tock.example". */
  contact: string;
  vehicles: readonly VehicleChoice[];
}

export interface VehicleChoice {
  id: string;
  label: string;
  plate: string | null;
  vin: string | null;
  engine: CaseVehicle;
  /** "2.4 L, four cylinders, port injection, air-flow meter, coil on plug, E10". */
  engineWords: string;
  /** The last reading of the odometer, in kilometres, and when: "3 June". */
  lastOdometer: { km: number; on: string } | null;
  earlier: readonly { number: string; what: string; href: string }[];
}

export type OpenCaseResult =
  | { ok: true; href: string }
  | { ok: false; message: string /** Pointer ("/vehicle/vin") to reason. */; fieldErrors?: Record<string, string> };

export type OpenCase = (input: OpenCaseInput, then: "intake" | "testing") => Promise<OpenCaseResult>;

/** What was said and agreed, as the intake part of a case shows it. */
export interface IntakeView {
  words: string;
  complaints: readonly string[];
  /** In words: "Warm, uphill". */
  circumstances: readonly string[];
  history: readonly string[];
  conditionNote: string | null;
  arrival: string;
  odometer: string;
  keepParts: boolean;
  roadTestAllowed: boolean;
  customer: { name: string; contact: string; href?: string };
  vehicle: { label: string; plate: string | null; vin: string | null; engineWords: string; href?: string };
  promise: { words: string; note?: string } | null;
  technician: string | null;
  /** Each yes to diagnosis, newest first. */
  authorizations: readonly {
    amount: string;
    givenBy: string;
    how: string;
    when: string;
    takenBy: string;
    words?: string;
  }[];
  photos: readonly { id: string; src: string; alt: string; width: number; height: number }[];
  cautions: readonly { title: string; text: string }[];
}
