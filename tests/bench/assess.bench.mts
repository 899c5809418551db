import { readdirSync, readFileSync } from "node:fs";
import { assess } from "@/lib/diagnosis/assess";
import { type CaseFile, parseCaseFile } from "@/lib/diagnosis/case-file";
import type { BenchResult } from "./run.mts";

const LIMIT = 10;
/** A frame at 60 Hz, on a machine four times slower than this one. */
const FRAME_MS = 16 / 4;

/** Median of repeated runs, ms of processor time a call: what else the machine does then falls out. */
function time(work: () => void, rounds = 31, each = 12): number {
  for (let i = 0; i < 60; i++) work();
  const took = Array.from({ length: rounds }, () => {
    const from = process.cpuUsage();
    for (let i = 0; i < each; i++) work();
    const used = process.cpuUsage(from);
    return (used.user + used.system) / 1000 / each;
  });
  return took.sort((a, b) => a - b)[Math.floor(rounds / 2)] ?? Number.NaN;
}

export default function bench(): BenchResult {
  const folder = new URL("../../fixtures/cases/examples/", import.meta.url);
  const cases = readdirSync(folder).map((f) => JSON.parse(readFileSync(new URL(f, folder), "utf8")).case as unknown);
  const full = cases.reduce<{ input: unknown; file: CaseFile } | null>((best, input) => {
    const parsed = parseCaseFile(input);
    return parsed.ok && (!best || JSON.stringify(input).length > JSON.stringify(best.input).length)
      ? { input, file: parsed.caseFile }
      : best;
  }, null);
  if (!full) throw new Error("no case to measure");
  const caseText = JSON.stringify(full.input);
  const answer = assess(full.file);
  const answerText = JSON.stringify(answer);
  const json = time(() => {
    JSON.parse(caseText);
    JSON.stringify(full.input);
    JSON.parse(answerText);
    JSON.stringify(answer);
  });
  const whole = time(() => {
    const parsed = parseCaseFile(full.input);
    if (parsed.ok) assess(parsed.caseFile);
  });
  const again = time(() =>
    assess({ ...full.file, tests: [...full.file.tests, { id: "intake-smoke", outcome: "no-leak" }] }),
  );
  const ratio = whole / json;
  return {
    lines: [
      `a full case checked and assessed in ${ratio.toFixed(1)} x the time of JSON parse and stringify of case and answer (limit ${LIMIT}); ${whole.toFixed(2)} ms against ${json.toFixed(2)} ms`,
      `the ledger with one more outcome in ${again.toFixed(2)} ms (limit ${FRAME_MS} ms here for one frame at four times less speed)`,
    ],
    ok: ratio <= LIMIT && again <= FRAME_MS,
  };
}
