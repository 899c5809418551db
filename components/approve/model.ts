import type { RevisionSnapshot } from "@/lib/cases/quote-schema";

export type { RevisionReading, RevisionSnapshot } from "@/lib/cases/quote-schema";

export interface CustomerPhoto {
  id: string;
  src: string;
  alt: string;
  caption?: string;
}

export interface QuestionView {
  id: string;
  from: "customer" | "shop";
  name: string;
  text: string;
  /** "14:02" or "1 December, 14:02". */
  when: string;
}

/** A plain address that takes a POST, or a server action: both work without scripts. */
export type FormTarget = string | ((form: FormData) => void | Promise<void>);

/** What was typed before, when the page comes back with a fault. */
export interface GivenAnswers {
  answers: Record<string, "yes" | "not-now">;
  reasons: Record<string, string>;
  givenBy: string;
  keepParts: boolean;
}

export interface ApproveView {
  snapshot: RevisionSnapshot;
  photos: readonly CustomerPhoto[];
  questions: readonly QuestionView[];
}

export interface ProgressStep {
  label: string;
  /** Who and when: "Bram Ferrule, about 2 h 40". */
  note: string;
  state: "done" | "now" | "to-come";
}

export interface DoneView {
  snapshot: RevisionSnapshot;
  yesJobIds: readonly string[];
  totalMinor: number;
  givenBy: string;
  /** "14:20" and so on, in the shop's time. */
  recordedWords: string;
  /** "Ready by 17:30 today". */
  readyWords?: string;
  steps: readonly ProgressStep[];
  /** The paper, and the invoice once there is one. */
  papers: readonly { label: string; href: string }[];
  payHref?: string;
}
