import type { QuoteLineDraft, TaxRule } from "./model";

/** Half and above goes up; factors are integers, so nothing is lost before the one division. */
function scaled(amount: number, factor: number, scale: number): number {
  return Number((BigInt(amount) * BigInt(factor) * 2n + BigInt(scale)) / (2n * BigInt(scale)));
}

export function lineNet(line: Pick<QuoteLineDraft, "quantityMilli" | "unitPriceMinor">): number {
  return scaled(line.unitPriceMinor, line.quantityMilli, 1000);
}

export interface JobPrice {
  netMinor: number;
  taxMinor: number;
  totalMinor: number;
}

/** One job's price, as the shop rounds it. The server's figure counts; this is the same arithmetic while one types. */
export function jobPrice(lines: readonly QuoteLineDraft[], tax: TaxRule): JobPrice {
  const nets = lines.map(lineNet);
  const netMinor = nets.reduce((sum, net) => sum + net, 0);
  const taxed = nets.filter((_, i) => tax.kinds.includes(lines[i]!.kind));
  const taxMinor =
    tax.rounding === "line-then-sum"
      ? taxed.reduce((sum, net) => sum + scaled(net, tax.basisPoints, 10_000), 0)
      : scaled(
          taxed.reduce((sum, net) => sum + net, 0),
          tax.basisPoints,
          10_000,
        );
  return { netMinor, taxMinor, totalMinor: netMinor + taxMinor };
}

/** What the parts of a job cost the shop. */
export function jobCost(lines: readonly QuoteLineDraft[]): number {
  return lines.reduce((sum, line) => sum + (line.costMinor ? scaled(line.costMinor, line.quantityMilli, 1000) : 0), 0);
}

/** Price over cost: "×1.50". */
export function markupWords(line: QuoteLineDraft): string {
  if (!line.costMinor) return "";
  return `×${(line.unitPriceMinor / line.costMinor).toFixed(2)}`;
}
