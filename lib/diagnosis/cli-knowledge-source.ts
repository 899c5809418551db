import { TRIM_BEHAVIOURS } from "./knowledge/shape";
import { buildTrimTable } from "./severity";

/** The text of `tables/trims.ts`: the engine model's sweep, one line a severity. */
export function trimTableSource(): string {
  const table = buildTrimTable();
  const lines = [
    'import type { TrimTable } from "../severity";',
    "",
    "/**",
    " * Written by `npm run knowledge` from the engine model: do not edit by hand.",
    " * Trim in percent at: idling, 2,500 r/min without load, cruising, accelerating.",
    " */",
    "export const TRIM_TABLE: TrimTable = {",
  ];
  for (const metering of ["maf", "map"] as const) {
    lines.push(`  ${metering}: {`);
    for (const behaviour of TRIM_BEHAVIOURS) {
      lines.push(`    "${behaviour}": [`);
      for (const row of table[metering][behaviour])
        lines.push(
          `      { share: ${row.share}, scope: "${row.scope}", trimPct: [${row.trimPct.map((t) => (Object.is(t, -0) ? 0 : t)).join(", ")}] },`,
        );
      lines.push("    ],");
    }
    lines.push("  },");
  }
  lines.push("};", "");
  return lines.join("\n");
}
