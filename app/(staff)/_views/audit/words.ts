/** What the audit calls the rows it speaks of, as people name them. */
export const SUBJECTS: Record<string, string> = {
  approvals: "Approval",
  authorizations: "Diagnosis agreed",
  case_codes: "Trouble code",
  case_notes: "Note",
  cases: "Case",
  cause_marks: "Cause",
  clock_entries: "Clock",
  customer_links: "Customer’s link",
  customers: "Customer",
  files: "Photo or file",
  labour_rates: "Labour rate",
  mails: "Mail",
  operations: "Labour operation",
  papers: "Paper",
  parts: "Part",
  parts_used: "Part used",
  payments: "Payment",
  people: "Person",
  questions: "Question",
  quote_drafts: "Quote",
  quote_jobs: "Job of the quote",
  quote_revisions: "Sent quote",
  samples: "Sample",
  set_jobs: "Set job",
  shops: "Shop and settings",
  stage_events: "Stage",
  test_outcomes: "Test",
  vehicles: "Vehicle",
  work_jobs: "Agreed job",
};

/** Verbs whose own word says more than added, changed or removed. */
const DID: Record<string, string> = {
  "approval.give": "answered",
  "approval.record": "recorded",
  "case.advance": "moved on",
  "case.assign": "gave",
  "case.back": "sent back",
  "case.close": "closed",
  "case.open": "opened",
  "case.park": "put on hold",
  "case.promise": "promised",
  "case.release": "let go",
  "case.unpark": "took off hold",
  "case.waiveProof": "waived",
  "cause.mark": "marked",
  "cause.unmark": "unmarked",
  "clock.correct": "corrected",
  "clock.off": "clocked off",
  "clock.on": "clocked on",
  "case.authorizeDiagnosis": "recorded",
  "payment.record": "recorded",
  "quote.ask": "asked",
  "quote.reply": "answered",
  "quote.send": "sent",
  "quote.withdraw": "withdrew",
  "test.record": "recorded",
  "test.undo": "undid",
  "work.finish": "finished",
  "work.strike": "struck",
};
const DONE: Record<string, string> = { insert: "added", update: "changed", delete: "removed" };

/** The subject of a verb keeps the verb's word; what it moved besides is added or changed. */
const MAIN: Record<string, readonly string[]> = {
  approvals: ["approval.give", "approval.record"],
  cases: ["case.open", "case.close", "case.release", "case.assign", "case.promise", "case.waiveProof"],
  stage_events: ["case.advance", "case.back", "case.park", "case.unpark"],
  cause_marks: ["cause.mark", "cause.unmark"],
  clock_entries: ["clock.on", "clock.off", "clock.correct"],
  authorizations: ["case.authorizeDiagnosis"],
  payments: ["payment.record"],
  questions: ["quote.ask", "quote.reply"],
  quote_revisions: ["quote.send", "quote.withdraw"],
  test_outcomes: ["test.record", "test.undo"],
  work_jobs: ["work.finish", "work.strike"],
};

export function didWords(verb: string, entity: string, action: string): string {
  // opening a case writes it and then brings it up to date: only the first is the opening
  if (verb === "case.open" && action !== "insert") return DONE[action] ?? action;
  const own = MAIN[entity]?.includes(verb) ? DID[verb] : undefined;
  return own ?? DONE[action] ?? action;
}

const FIELDS: Record<string, string> = {
  approved_minor: "Agreed price",
  amount_minor: "Amount",
  at: "When",
  by_name: "By",
  case_id: "Case",
  ceiling_minor: "Ceiling",
  cost_minor: "Cost",
  customer_id: "Customer",
  customer_title: "Name for the customer",
  for_customer: "Shown to the customer",
  hours_milli: "Hours",
  if_waits: "If it waits",
  is_active: "In use",
  keep_parts: "Old parts kept",
  lead_cause: "Leading cause",
  lead_family: "Its family",
  lead_mark: "Its mark",
  lead_probability: "Its probability",
  odometer_in_km: "Odometer in, km",
  odometer_out_km: "Odometer out, km",
  per_hour_minor: "Rate an hour",
  price_minor: "Price",
  promised_at: "Promised for",
  promise_moves: "Promise moved, times",
  quantity_milli: "Quantity",
  sha256: "SHA-256",
  stage_since: "In this stage since",
  to_address: "To",
  total_minor: "Total",
  unit_price_minor: "Price each",
  vin: "VIN",
  waiting_for: "Waiting",
  waiting_on: "Waiting on",
  words: "In their words",
};

/** Kept for the machine's sake; a reader of the audit gains nothing from them. */
export const HIDDEN = new Set([
  "shop_id",
  "id",
  "version",
  "search_text",
  "taken_by_id",
  "by_id",
  "sent_by_id",
  "storage_key",
  "display_key",
  "thumb_key",
  "target_id",
  "quote_job_id",
  "revision_id",
]);

export function fieldWords(name: string): string {
  const known = FIELDS[name];
  if (known) return known;
  const plain = name
    .replace(/_(id|minor|milli|at)$/, "")
    .replaceAll(/([a-z])([A-Z])/g, "$1 $2")
    .replaceAll("_", " ");
  return plain.charAt(0).toUpperCase() + plain.slice(1).toLowerCase();
}
