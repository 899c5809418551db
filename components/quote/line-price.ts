import { lineGross } from "@/lib/quote/price";
import type { QuoteLineDraft } from "./model";

/** What the parts of a job cost the shop. */
export function jobCost(lines: readonly QuoteLineDraft[]): number {
  return lines.reduce((sum, line) => sum + (line.costMinor ? lineGross(line.costMinor, line.quantityMilli) : 0), 0);
}

/** Price over cost: "×1.50". */
export function markupWords(line: QuoteLineDraft): string {
  if (!line.costMinor) return "";
  return `×${(line.unitPriceMinor / line.costMinor).toFixed(2)}`;
}
