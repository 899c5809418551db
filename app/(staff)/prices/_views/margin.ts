import { formatNumber } from "@/components/ui/format";

/** What is left of a price after its cost, in parts of the price; nothing to divide by where the price is nothing. */
export function marginOf(costMinor: number, priceMinor: number): number | null {
  return priceMinor === 0 ? null : (priceMinor - costMinor) / priceMinor;
}

export function marginWords(costMinor: number, priceMinor: number): string {
  const margin = marginOf(costMinor, priceMinor);
  return margin === null ? "none" : `${formatNumber(margin * 100, 0)} %`;
}

/** Thousandths of something at a price each, in whole minor units, half rounded up. */
export const sumOf = (quantityMilli: number, eachMinor: number) => Math.round((quantityMilli * eachMinor) / 1000);
