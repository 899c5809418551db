import { describe, expect, it } from "vitest";
import type { InvoiceSnapshot } from "@/lib/cases/paper-schema";
import type { RevisionSnapshot } from "@/lib/cases/quote-schema";
import type { RenderedMail } from "@/lib/mail/letter";
import {
  answerMail,
  approvalReceiptMail,
  invitationMail,
  invoiceMail,
  passwordResetMail,
  questionMail,
  quoteMail,
  releaseMail,
  reminderMail,
} from "@/lib/mail/templates";

const NASTY = `<img src=x onerror="alert(1)">&'`;
const shop = {
  name: `Quillon & Sons ${NASTY}`,
  address: "3 Quillon Yard",
  phone: "555 0142",
  email: "desk@quillonyard.example",
  registration: "Licence MW 00417",
};

const snapshot = {
  number: 1,
  caseNumber: 2431,
  paperWord: "estimate",
  currency: "USD",
  locale: "en-US",
  timeZone: "America/Chicago",
  shop,
  customer: { name: `Juniper ${NASTY}`, email: "juniper@example.net", phone: null },
  vehicle: {
    label: `Corvid Marlin ${NASTY}`,
    modelYear: 2012,
    plate: null,
    vin: null,
    odometerKm: 1,
    distanceUnit: "km",
  },
  headline: `Air gets in ${NASTY}`,
  finding: "The seal has hardened.",
  diagnosis: { netMinor: 17040, taxMinor: 1704, totalMinor: 18744, hoursMilli: 1200 },
  agreed: [{ title: "Battery", totalMinor: 5000 }],
  jobs: [
    { id: "a", customerTitle: `Reseal ${NASTY}`, ifWaits: "It gets worse.", isSafety: false, totalMinor: 48422 },
    { id: "b", customerTitle: "Fuel hose", ifWaits: "Fuel may spray.", isSafety: true, totalMinor: 9900 },
  ],
  totals: { netMinor: 0, taxMinor: 0, totalMinor: 82066, neededNowMinor: 72166, startsAtMinor: 23744 },
  validUntil: "2026-12-08T22:00:00Z",
} as unknown as RevisionSnapshot;

const invoice = {
  number: "1001",
  caseNumber: 2431,
  currency: "USD",
  locale: "en-US",
  timeZone: "America/Chicago",
  shop,
  customer: snapshot.customer,
  vehicle: snapshot.vehicle,
  correction: `Resealed ${NASTY}`,
  diagnosis: snapshot.diagnosis,
  jobs: [{ title: `Reseal ${NASTY}`, totalMinor: 48422 }],
  totals: { netMinor: 0, taxMinor: 0, totalMinor: 67166 },
  warranty: "Twelve months.",
  release: { reason: `Sold ${NASTY}`, safetyNote: "Have it towed.", notSafeToDrive: true, acknowledgedBy: "Juniper" },
} as unknown as InvoiceSnapshot;

const url = "https://firedeck.example/q/secret?a=1&b=2";
const to = "juniper@example.net";
const all: [string, RenderedMail][] = [
  ["invitation", invitationMail({ to, shopName: shop.name, inviterName: NASTY, role: "technician", url })],
  ["reset", passwordResetMail({ to, name: NASTY, url })],
  ["quote", quoteMail({ to, snapshot, url })],
  ["reminder", reminderMail({ to, snapshot, url })],
  ["receipt", approvalReceiptMail({ to, snapshot, yesJobIds: ["a"], totalMinor: 72166, givenBy: NASTY })],
  ["question", questionMail({ to, caseNumber: 2431, customerName: NASTY, text: NASTY })],
  ["answer", answerMail({ to, shopName: shop.name, customerName: NASTY, answeredBy: NASTY, text: NASTY })],
  ["invoice", invoiceMail({ to, snapshot: invoice, url })],
  ["release", releaseMail({ to, snapshot: invoice, url })],
];

describe.each(all)("the %s mail", (_, mail) => {
  it("lets no markup through from what people typed", () => {
    expect(mail.html).not.toContain("<img");
    expect(mail.html).toContain("&lt;img src=x onerror=&quot;alert(1)&quot;&gt;&amp;&#39;");
    expect(mail.text).toContain(NASTY);
  });

  it("has a subject of one line, and neither scripts nor anything loaded from outside", () => {
    expect(mail.subject).not.toMatch(/[\r\n]/);
    expect(mail.subject.length).toBeGreaterThan(8);
    expect(mail.html).not.toMatch(/<script|src="http|<link|url\(/);
  });

  it("says no word that means nothing, and leaves nothing undefined", () => {
    expect(mail.text + mail.html).not.toMatch(/undefined|\[object|NaN|null/);
  });
});

describe("what the mails say", () => {
  const of = (name: string) => all.find(([each]) => each === name)![1];

  it("carries the address in both forms", () => {
    for (const name of ["invitation", "reset", "quote", "reminder", "invoice", "release"]) {
      expect(of(name).text).toContain(url);
      expect(of(name).html).toContain('href="https://firedeck.example/q/secret?a=1&amp;b=2"');
    }
  });

  it("adds up the receipt by job, and repeats the risk of a safety job that was put off", () => {
    const { text } = of("receipt");
    for (const part of [
      "Diagnosis, agreed before: $187.44",
      "Battery, agreed before: $50.00",
      "Total, tax included: $721.66",
      "Not now: Fuel hose. Fuel may spray.",
      "! A job that concerns safety",
    ])
      expect(text).toContain(part);
  });

  it("writes when a quote runs out in the shop's own time", () =>
    expect(of("quote").text).toContain("Stands until: 8 December 2026, 16:00"));

  it("says not safe to drive before anything else of the vehicle that leaves", () =>
    expect(of("release").text).toContain("! Not safe to drive."));

  it("refuses an address that is not of the web", () =>
    expect(() => passwordResetMail({ to, name: "x", url: "javascript:alert(1)" })).toThrow("web address"));
});
