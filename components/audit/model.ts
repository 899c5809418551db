export interface AuditFieldView {
  name: string;
  before: string;
  after: string;
  isChanged: boolean;
  numeric?: boolean;
}

export interface AuditEntryView {
  seq: number;
  /** "13:18:04", with the day in front where the list spans several. */
  time: string;
  who: string;
  /** "technician", "customer, by link", "mail". */
  role: string;
  /** One word: "added", "sent", "changed". */
  did: string;
  /** "2423 Sample". */
  to: string;
  /** "after, idling, 12 readings". */
  what: string;
  fields: readonly AuditFieldView[];
  reason?: string;
  /** "office, signed in 07:52", and the request's number. */
  from?: string;
  requestId?: string;
  touches?: string;
  /** The first eight of each hash; `next` is missing for the newest entry. */
  hashes: {
    previous: { seq: number; hash: string } | null;
    own: string;
    next: { seq: number; hash: string } | null;
    agree: boolean;
  };
}

export interface ChainDayView {
  /** ISO day. */
  day: string;
  /** "2 Oct". */
  label: string;
  entries: number;
  /** The entry at which the chain breaks, on that day. */
  breakAt?: number;
}
