import type { BilledJob, InvoiceModel, PaperLine, QuoteModel, ReleaseModel } from "@/lib/pdf/models";

const line = (
  kind: PaperLine["kind"],
  description: string,
  quantityMilli: number,
  unitPriceMinor: number,
  netMinor: number,
): PaperLine => ({
  kind,
  description,
  quantityMilli,
  unitPriceMinor,
  netMinor,
  condition: kind === "part" ? "new" : null,
});

const base = {
  language: "en",
  locale: "en-US",
  timeZone: "America/Chicago",
  currency: "USD",
  paper: "A4",
  number: "2026-0417",
  caseNumber: 2431,
  issuedAt: "2026-12-01T22:52:00Z",
  sha256: "4be190c75f2a8d3e4be190c75f2a8d3e4be190c75f2a8d3e4be190c75f2ad83e",
  shop: {
    name: "Quillon Yard Motor Works",
    address: "3 Quillon Yard, Lower Pellam",
    phone: "555 0142",
    email: "desk@quillonyard.example",
    registration: "Licence MW 00417",
  },
  customer: { name: "Juniper Tock", address: "12 Almond Terrace, Pellam" },
  vehicle: {
    label: "Corvid Marlin 2.4",
    modelYear: 2012,
    plate: "QYR 431",
    vin: "U8ZCM24F3CP018264",
    odometerInKm: 182000,
    odometerOutKm: 182014,
    distanceUnit: "km",
  },
  warranty: "Parts and labour: 12 months or 20,000 km, whichever comes first.",
  legal: "You may ask for the parts we take out. Keep this paper: the warranty is shown with it.",
} as const;

/** The invoice of the mockup: 681.70 before tax at 10 %, 749.87 with it. */
export const invoice: InvoiceModel = {
  ...base,
  complaint: "Shakes at the lights, smooths out once we are moving. Engine light since Thursday.",
  cause: "The intake seal had hardened and let air in at the third cylinder. Shown by a smoke test at 13:41.",
  correction: "Intake manifold resealed, crankcase vent hose renewed, codes cleared and the idle checked warm.",
  jobs: [
    {
      title: "Diagnosis",
      note: "agreed at intake up to $180.00",
      netMinor: 17040,
      lines: [line("diagnosis", "Readings in four modes, smoke test", 1200, 14200, 17040)],
      oldParts: [],
    },
    {
      title: "Reseal the intake manifold",
      netMinor: 44020,
      agreedMinor: 48422,
      billedMinor: 48422,
      correction: "Sealing faces cleaned, gasket set and injector seals renewed.",
      lines: [
        line("labour", "Intake manifold, remove and refit", 2400, 14200, 34080),
        { ...line("part", "Manifold gasket set", 1000, 6420, 6420), partNumber: "GK-2204" },
        line("part", "Injector seal", 4000, 680, 2720),
        line("fee", "Cleaner and sealant", 1000, 800, 800),
      ],
      oldParts: ["Manifold gasket set: kept for the customer"],
    },
    {
      title: "Renew the crankcase vent hose",
      netMinor: 7110,
      agreedMinor: 7821,
      billedMinor: 7821,
      lines: [
        line("labour", "Vent hose, with the manifold off", 300, 14200, 4260),
        { ...line("part", "Vent hose, formed", 1000, 2850, 2850), condition: "rebuilt" },
      ],
      oldParts: [],
    },
  ],
  totals: {
    netMinor: 68170,
    taxes: [{ label: "Sales tax, 10 %", amountMinor: 6817 }],
    totalMinor: 74987,
    payments: [{ label: "Paid by card, 16:58", amountMinor: 74987 }],
    owingMinor: 0,
  },
  authorizations: [
    {
      what: "Diagnosis, up to",
      givenBy: "Juniper Tock",
      how: "in person",
      contact: null,
      words: null,
      at: "2026-12-01T14:20:00Z",
      amountMinor: 18000,
      takenBy: "Odile Marsh",
    },
    {
      what: "Revision 1, total",
      givenBy: "Juniper Tock",
      how: "by link",
      contact: "juniper@example.net",
      words: null,
      at: "2026-12-01T20:20:00Z",
      amountMinor: 74987,
      takenBy: "link",
    },
  ],
  notDone: [{ title: "Spark plugs", why: "Not now. We recommend them within the year; gap 1.3 mm, limit 1.1." }],
  readings: [
    {
      place: "Standing still, engine warm",
      label: "Fuel added",
      before: { value: "+24.3 %", at: 2.0, family: "lean", inside: false },
      after: { value: "+3.1 %", at: 0.68, family: null, inside: true },
    },
    {
      place: "Standing still, engine warm",
      label: "Misfires, third cylinder",
      before: { value: "38", at: 5, family: "spark", inside: false },
      after: { value: "0", at: 0.5, family: null, inside: true },
    },
    {
      place: "Standing still, engine warm",
      label: "Intake vacuum",
      before: { value: "51 kPa", at: -0.2, family: "mech", inside: false },
      after: { value: "63 kPa", at: 0.5, family: null, inside: true },
    },
    {
      place: "At 2,500 r/min",
      label: "Fuel added",
      before: { value: "+5.4 %", at: 0.84, family: null, inside: true },
      after: { value: "+2.4 %", at: 0.65, family: null, inside: true },
    },
  ],
  proof:
    "The repair passes its rule: every reading that was outside its usual range is inside it, held for 90 seconds, engine warm. Measured 16:20 to 16:31 by Bram Ferrule.",
  partsReturned: "The customer asked for the replaced parts.",
};

/** An invoice of many jobs, each worth 100.00 before tax. */
export function longInvoice(jobCount: number, linesPerJob = 3): InvoiceModel {
  const jobs: BilledJob[] = Array.from({ length: jobCount }, (_, index) => ({
    title: `Job ${index + 1} of the list`,
    netMinor: 10_000,
    agreedMinor: 11_000,
    billedMinor: 11_000,
    lines: Array.from({ length: linesPerJob }, (_, at) =>
      line(
        "part",
        `Part ${index + 1}.${at + 1}`,
        1000,
        at === 0 ? 10_000 - 100 * (linesPerJob - 1) : 100,
        at === 0 ? 10_000 - 100 * (linesPerJob - 1) : 100,
      ),
    ),
    oldParts: [],
  }));
  const netMinor = 10_000 * jobCount;
  return {
    ...invoice,
    jobs,
    totals: { netMinor, taxes: [{ label: "Sales tax, 10 %", amountMinor: netMinor / 10 }], totalMinor: netMinor * 1.1 },
  };
}

export const quote: QuoteModel = {
  ...base,
  number: "2431-1",
  word: "estimate",
  revision: 1,
  complaint: invoice.complaint,
  headline: "Air gets in past the intake seal",
  finding:
    "The seal between intake and engine has hardened. Air that the engine does not know of gets in at the third cylinder, so it shakes while standing.",
  readingsTitle: "How much extra fuel the engine has to add to make up for the air.",
  readings: [
    { label: "Standing still", before: { value: "24 % extra", at: 2, family: "lean", inside: false }, after: null },
  ],
  readingsNote: "Measured 1 December 2026, 13:12 by Bram Ferrule.",
  jobs: [
    {
      title: "Reseal the intake manifold",
      urgency: "now",
      ifWaits: "The shaking gets worse and the third cylinder may be harmed.",
      isSafety: false,
      totalMinor: 48422,
      lines: invoice.jobs[1]!.lines,
    },
    {
      title: "Renew the crankcase vent hose",
      urgency: "now",
      ifWaits: "",
      needs: "Reseal the intake manifold",
      isSafety: false,
      totalMinor: 7821,
      lines: invoice.jobs[2]!.lines,
    },
    {
      title: "Spark plugs",
      urgency: "soon",
      ifWaits: "Starting gets harder within the year.",
      isSafety: false,
      totalMinor: 9900,
      lines: [line("part", "Spark plug", 4000, 2250, 9000)],
    },
  ],
  agreed: [{ label: "Diagnosis", amountMinor: 18744 }],
  totals: {
    netMinor: 77170,
    taxes: [{ label: "Sales tax, 10 %", amountMinor: 7717 }],
    totalMinor: 84887,
    neededNowMinor: 74987,
  },
  readyAt: "2026-12-02T22:00:00Z",
  validUntil: "2026-12-08T22:00:00Z",
  keepParts: true,
};

export const release: ReleaseModel = {
  ...invoice,
  correction: "",
  jobs: [invoice.jobs[0]!],
  totals: {
    netMinor: 17040,
    taxes: [{ label: "Sales tax, 10 %", amountMinor: 1704 }],
    totalMinor: 18744,
    owingMinor: 18744,
  },
  notDone: [{ title: "Fuel hose at the rail", why: "Safety. Not now. Fuel may spray on the hot exhaust." }],
  readings: invoice.readings.map((row) => ({ ...row, after: null })),
  proof: "",
  release: {
    reason: "The customer takes the car to another shop.",
    safetyNote: "Have it towed. Do not start the engine.",
    notSafeToDrive: true,
    acknowledgedBy: "Juniper Tock",
  },
};
