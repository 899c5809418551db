/**
 * How long a three-page invoice takes, warm, against a document of one line by the same library in the same run, and
 * against an invoice of one line. Run: npx tsx --tsconfig tsconfig.tools.json tests/bench/invoice-pdf.bench.mts
 */
import { Document, Page, renderToBuffer, Text } from "@react-pdf/renderer";
import { createElement } from "react";
import { renderInvoice } from "../../lib/pdf/render.ts";
import { longInvoice } from "../unit/pdf/papers.ts";
import { pagesOf } from "../unit/pdf/read-pdf.ts";

const WARM_UP = 8;
const ROUNDS = 25;

const median = (values: number[]) => values.toSorted((a, b) => a - b)[Math.floor(values.length / 2)]!;

async function measured(works: Record<string, () => Promise<unknown>>): Promise<Record<string, number>> {
  const times: Record<string, number[]> = Object.fromEntries(Object.keys(works).map((name) => [name, []]));
  // in turn, so that whatever else the machine does falls on all alike
  for (let round = -WARM_UP; round < ROUNDS; round++) {
    for (const [name, work] of Object.entries(works)) {
      const start = performance.now();
      await work();
      if (round >= 0) times[name]!.push(performance.now() - start);
    }
  }
  return Object.fromEntries(Object.entries(times).map(([name, list]) => [name, median(list)]));
}

async function main(): Promise<void> {
  const threePages = longInvoice(8, 6);
  const oneLine = longInvoice(1, 1);
  const pages = pagesOf(await renderInvoice(threePages)).length;
  if (pages !== 3) throw new Error(`the invoice has ${pages} pages, not three`);
  const line = (style: { fontFamily: string }) =>
    createElement(Document, null, createElement(Page, null, createElement(Text, { style }, "One line.")));
  const ms = await measured({
    "three pages": () => renderInvoice(threePages),
    "invoice of one line": () => renderInvoice(oneLine),
    "document of one line": () => renderToBuffer(line({ fontFamily: "Archivo" })),
  });
  for (const [name, time] of Object.entries(ms)) console.log(`${name.padEnd(24)}${time.toFixed(1)} ms`);
  const against = (name: string) => (ms["three pages"]! / ms[name]!).toFixed(2);
  console.log(
    `three pages cost ${against("invoice of one line")} × an invoice of one line, ${against("document of one line")} × a document of one line`,
  );
}

main().catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
