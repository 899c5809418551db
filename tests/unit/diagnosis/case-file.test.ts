import { spawnSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { parseCaseFile } from "@/lib/diagnosis/case-file";
import { fixtureCases, PORT_MAF } from "./helpers";

const errors = (input: unknown) => {
  const parsed = parseCaseFile(input);
  return parsed.ok ? [] : parsed.errors;
};

describe("the case file", () => {
  it("takes every fixture", () => {
    for (const set of ["examples", "tuning", "holdout"] as const)
      for (const c of fixtureCases(set)) expect(errors(c.case), c.name).toEqual([]);
  });
  it("needs only version and vehicle, and reads null as not stated", () => {
    const parsed = parseCaseFile({
      version: 1,
      vehicle: { modelYear: null, fuel: null },
      site: null,
      samples: null,
      complaints: null,
      codes: [{ code: " p0171 ", status: null }],
    });
    expect(parsed.ok && parsed.caseFile).toMatchObject({
      version: 1,
      vehicle: {},
      samples: [],
      complaints: [],
      tests: [],
      codes: [{ code: "P0171", status: "stored" }],
    });
    const values = parseCaseFile({
      version: 1,
      vehicle: {},
      samples: [{ mode: "idling", values: { ECT: null, RPM: 800, misfireCounts: { "1": null, "2": 3 } } }],
    });
    expect(values.ok && values.caseFile.samples[0]?.values).toEqual({ RPM: 800, misfireCounts: { "2": 3 } });
  });
  it.each([
    ["not an object", 12, "(case)"],
    ["wrong version", { version: 2, vehicle: {} }, "version"],
    ["no vehicle", { version: 1 }, "vehicle"],
    ["unknown mode", { version: 1, vehicle: {}, samples: [{ mode: "flying", values: {} }] }, "samples[0].mode"],
    [
      "text for a number",
      { version: 1, vehicle: {}, samples: [{ mode: "idling", values: { ECT: "91" } }] },
      "samples[0].values.ECT",
    ],
    [
      "not a number",
      { version: 1, vehicle: {}, samples: [{ mode: "idling", values: { ECT: Number.NaN } }] },
      "samples[0].values.ECT",
    ],
    [
      "a number for cylinders",
      { version: 1, vehicle: {}, samples: [{ mode: "idling", values: { misfireCounts: 3 } }] },
      "samples[0].values.misfireCounts",
    ],
    [
      "cylinder zero",
      { version: 1, vehicle: {}, samples: [{ mode: "idling", values: { misfireCounts: { "0": 3 } } }] },
      "samples[0].values.misfireCounts.0",
    ],
    [
      "unknown loop state",
      { version: 1, vehicle: {}, samples: [{ mode: "idling", values: { FUELSYS1: "closed" } }] },
      "samples[0].values.FUELSYS1",
    ],
    ["unknown complaint", { version: 1, vehicle: {}, complaints: ["sad"] }, "complaints[0]"],
    ["no code", { version: 1, vehicle: {}, codes: [{ code: "0171" }] }, "codes[0].code"],
    ["unknown test", { version: 1, vehicle: {}, tests: [{ id: "tarot", outcome: "the-tower" }] }, "tests[0].id"],
    [
      "outcome of another test",
      { version: 1, vehicle: {}, tests: [{ id: "intake-smoke", outcome: "low" }] },
      "tests[0].outcome",
    ],
    ["displacement in cc", { version: 1, vehicle: { displacementL: 1998 } }, "vehicle.displacementL"],
    ["unknown fuel system", { version: 1, vehicle: { fuelSystem: "steam" } }, "vehicle.fuelSystem"],
  ])("refuses %s by its path", (_, input, path) => {
    const found = errors(input);
    expect(found.map((e) => e.path)).toContain(path);
    for (const e of found) expect(e.reason.length).toBeGreaterThan(8);
  });
  it("says what is accepted", () => {
    expect(
      errors({ version: 1, vehicle: {}, samples: [{ mode: "idling", values: { ECT: "x" } }] })[0]?.reason,
    ).toContain("-40 to 215 °C");
    expect(errors({ version: 1, vehicle: { fuelSystem: "steam" } })[0]?.reason).toContain("carburetted");
    expect(errors({ version: 1, vehicle: {}, tests: [{ id: "intake-smoke", outcome: "low" }] })[0]?.reason).toContain(
      "leak-seen",
    );
  });
  it("names every fault, not only the first", () => {
    expect(
      errors({
        version: 3,
        vehicle: { cylinders: 4.5 },
        complaints: ["x", "rough-idle", "y"],
        samples: [{ mode: "idling", values: { RPM: "a", ECT: false } }],
      }).length,
    ).toBe(6);
  });
  it("keeps what it does not know", () => {
    const parsed = parseCaseFile({
      version: 1,
      vehicle: {},
      samples: [{ mode: "idling", values: { someNewThing: 3, RPM: 700 } }],
    });
    expect(parsed.ok && parsed.caseFile.samples[0]?.values).toEqual({ someNewThing: 3, RPM: 700 });
  });
});

describe("the command line", () => {
  const root = fileURLToPath(new URL("../../../", import.meta.url));
  const run = (args: string[], input?: string) =>
    spawnSync("npx", ["tsx", "--tsconfig", "tsconfig.tools.json", "lib/diagnosis/cli.ts", ...args], {
      cwd: root,
      input,
      encoding: "utf8",
    });

  it("answers a file and standard input, exit 0", () => {
    const file = run(["-"], JSON.stringify({ version: 1, vehicle: PORT_MAF, complaints: ["misfires"] }));
    expect(file.status).toBe(0);
    expect(JSON.parse(file.stdout)).toMatchObject({ version: 1, findings: [] });
  }, 30_000);
  it("prints each fault on standard error, nothing on standard output, exit 2", () => {
    const bad = run(["-"], JSON.stringify({ version: 1, vehicle: { cylinders: "four" }, complaints: ["sad"] }));
    expect(bad).toMatchObject({ status: 2, stdout: "" });
    expect(bad.stderr).toMatch(/^vehicle\.cylinders: .+\ncomplaints\[0\]: .+\n$/);
  }, 30_000);
  it("reads one case a line and goes on past a faulty one", () => {
    const lines = [
      JSON.stringify({ version: 1, vehicle: PORT_MAF }),
      "{nonsense",
      JSON.stringify({ version: 1, vehicle: {} }),
    ];
    const out = run(["--ndjson", "-"], `${lines.join("\n")}\n`);
    expect(out.status).toBe(2);
    const answers = out.stdout
      .trim()
      .split("\n")
      .map((l) => JSON.parse(l));
    expect(answers.length).toBe(3);
    expect(answers[0].version).toBe(1);
    expect(answers[1].errors[0]).toMatchObject({ path: "(case)" });
    expect(answers[2].causes.length).toBeGreaterThan(50);
  }, 30_000);
});
