import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

/** Reads a PDF with poppler's tools: an independent reader, not the library that wrote it. */
function withFile<T>(bytes: Uint8Array, work: (path: string) => T): T {
  const folder = mkdtempSync(join(tmpdir(), "firedeck-pdf-"));
  try {
    const path = join(folder, "paper.pdf");
    writeFileSync(path, bytes);
    return work(path);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

const run = (command: string, args: string[]) => execFileSync(command, args, { encoding: "utf8", maxBuffer: 64e6 });

/** The text page by page, laid out as on paper. */
export const pagesOf = (bytes: Uint8Array): string[] =>
  withFile(bytes, (path) => run("pdftotext", ["-layout", path, "-"]).split("\f").slice(0, -1));

export function infoOf(bytes: Uint8Array): Record<string, string> {
  const lines = withFile(bytes, (path) => run("pdfinfo", [path]).split("\n"));
  return Object.fromEntries(
    lines.map((line) => [line.slice(0, line.indexOf(":")), line.slice(line.indexOf(":") + 1).trim()]),
  );
}

/** One entry a font: its name and whether it is embedded. */
export function fontsOf(bytes: Uint8Array): { name: string; embedded: boolean }[] {
  const rows = withFile(bytes, (path) => run("pdffonts", [path]).trimEnd().split("\n").slice(2));
  return rows.map((row) => ({ name: row.split(/\s+/)[0]!, embedded: / yes (yes|no) (yes|no) +\d+ +\d+$/.test(row) }));
}

/** Right edge of the furthest word and width of each page, in points. */
export function extentOf(bytes: Uint8Array): { right: number; width: number }[] {
  const html = withFile(bytes, (path) => run("pdftotext", ["-bbox", path, "-"]));
  return html
    .split("<page ")
    .slice(1)
    .map((page) => ({
      width: Number(/width="([\d.]+)"/.exec(page)![1]),
      right: Math.max(...[...page.matchAll(/xMax="([\d.]+)"/g)].map((match) => Number(match[1]))),
    }));
}
