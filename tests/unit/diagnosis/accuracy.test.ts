import { describe, expect, it, vi } from "vitest";
import { assess } from "@/lib/diagnosis/assess";
import { caseOf, type FixtureCase, fixtureCases } from "./helpers";

// Hundreds of whole assessments; a busy machine needs longer than the default.
vi.setConfig({ testTimeout: 120_000 });

interface Score {
  cases: number;
  first: number;
  three: number;
  /** Share of cases whose leading cause is wrong and above 0.8. */
  overConfident: number;
  /** Weighted mean distance of probability and frequency over ten bins of all cause-probability pairs. */
  calibrationError: number;
  next: [right: number, of: number];
  aboveDeserved: string[];
  wrong: string[];
}

function score(cases: FixtureCase[]): Score {
  const bins = Array.from({ length: 10 }, () => ({ n: 0, p: 0, hit: 0 }));
  const s: Score = {
    cases: cases.length,
    first: 0,
    three: 0,
    overConfident: 0,
    calibrationError: 0,
    next: [0, 0],
    aboveDeserved: [],
    wrong: [],
  };
  for (const c of cases) {
    const answer = assess(caseOf(c.case));
    const [lead] = answer.causes;
    if (!lead) throw new Error("no causes");
    const right = c.expected.top.includes(lead.id);
    if (right) s.first++;
    else {
      s.wrong.push(`${c.name}: ${lead.id} ${lead.probability.toFixed(2)} for ${c.expected.top[0]}`);
      if (lead.probability > 0.8) s.overConfident++;
    }
    if (answer.causes.slice(0, 3).some((x) => c.expected.top.includes(x.id))) s.three++;
    for (const { id, probability } of answer.causes) {
      const bin = bins[Math.min(9, Math.floor(probability * 10))];
      if (!bin) continue;
      bin.n++;
      bin.p += probability;
      if (id === c.expected.top[0]) bin.hit++;
    }
    if (c.expected.nextTest) {
      s.next[1]++;
      if (answer.nextTests.slice(0, 3).some((t) => c.expected.nextTest?.includes(t.id))) s.next[0]++;
    }
    if (c.expected.noneAbove !== undefined && lead.probability > c.expected.noneAbove)
      s.aboveDeserved.push(`${c.name} ${lead.probability.toFixed(2)}`);
  }
  const pairs = bins.reduce((n, b) => n + b.n, 0);
  s.calibrationError = bins.reduce((sum, b) => sum + Math.abs(b.p - b.hit) / pairs, 0);
  s.first /= s.cases;
  s.three /= s.cases;
  s.overConfident /= s.cases;
  return s;
}

const percent = (x: number) => `${(100 * x).toFixed(1)} %`;
function print(name: string, s: Score): void {
  console.log(
    `${name}: ${s.cases} cases, first place ${percent(s.first)}, first three ${percent(s.three)}, wrong above 0.8 ${percent(s.overConfident)}, ` +
      `calibration error ${s.calibrationError.toFixed(4)}, next test ${s.next[0]} of ${s.next[1]}${s.wrong.length > 0 ? `\n  ${s.wrong.join("\n  ")}` : ""}`,
  );
}

describe("expected causes", () => {
  const examples = fixtureCases("examples");
  it.each(examples)("$name: the expected cause is first", (c) => {
    const [lead] = assess(caseOf(c.case)).causes;
    console.log(`${c.name}: ${lead?.id} ${lead?.probability.toFixed(3)}`);
    expect(c.expected.top).toContain(lead?.id);
  });

  it("holds on the tuning cases", () => {
    const s = score(fixtureCases("tuning"));
    print("tuning", s);
    expect(s.first).toBeGreaterThanOrEqual(0.85);
    expect(s.three).toBeGreaterThanOrEqual(0.96);
    expect(s.overConfident).toBeLessThanOrEqual(0.02);
    expect(s.calibrationError).toBeLessThanOrEqual(0.05);
    expect(s.next[0] / s.next[1]).toBeGreaterThanOrEqual(0.85);
    expect(s.aboveDeserved).toEqual([]);
  });

  it("holds on the cases kept out of sight while tuning", () => {
    const s = score(fixtureCases("holdout"));
    print("kept out of sight", s);
    expect(s.first).toBeGreaterThanOrEqual(0.85);
    expect(s.three).toBeGreaterThanOrEqual(0.96);
    expect(s.overConfident).toBeLessThanOrEqual(0.02);
    expect(s.calibrationError).toBeLessThanOrEqual(0.05);
  });

  it("leads to the right cause before any test is recorded in most cases, and then is less sure", () => {
    const all = [...examples, ...fixtureCases("tuning")];
    const bare = all.map((c) => ({ ...c, case: { ...(c.case as object), tests: [] } }));
    const s = score(bare.map((c) => ({ ...c, expected: { top: c.expected.top, topThree: c.expected.topThree } })));
    print("tuning without its recorded tests", s);
    expect(s.first).toBeGreaterThanOrEqual(0.8);
    expect(s.overConfident).toBeLessThanOrEqual(0.02);
  });

  it("has every cause of the vocabulary in at least one case", async () => {
    const { CAUSE_IDS } = await import("@/lib/diagnosis/vocabulary");
    const seen = new Set(
      [...examples, ...fixtureCases("tuning"), ...fixtureCases("holdout")].flatMap((c) => c.expected.top),
    );
    expect(CAUSE_IDS.filter((id) => !seen.has(id))).toEqual([]);
  });
});
