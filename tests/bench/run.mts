import { readdirSync } from "node:fs";
import { fileURLToPath, pathToFileURL } from "node:url";

/** Runs every `*.bench.mts` beside it; each default-exports a function that returns its lines and whether its limits held,
 * or measures and prints on its own. */
export interface BenchResult {
  lines: string[];
  ok: boolean;
}

const folder = fileURLToPath(new URL(".", import.meta.url));
let failed = false;
for (const file of readdirSync(folder)
  .filter((f) => f.endsWith(".bench.mts"))
  .sort()) {
  const { default: bench } = (await import(pathToFileURL(`${folder}${file}`).href)) as {
    default?: () => BenchResult | Promise<BenchResult>;
  };
  // One that exports nothing has measured and printed on its own while it was imported.
  if (typeof bench !== "function") continue;
  const { lines, ok } = await bench();
  for (const line of lines) console.log(`${file.replace(".bench.mts", "")}: ${line}`);
  if (!ok) failed = true;
}
if (failed) process.exitCode = 1;
