import { lineGross, partOf } from "./price";
import { divideHalfUp, toSafeNumber } from "./round";
import type { LineKind, Rounding } from "./schema";
import { taxJob } from "./tax";

/** The one tax a shop's settings hold: what share, on which kinds of line, rounded how. */
export interface ShopTax {
  basisPoints: number;
  kinds: readonly LineKind[];
  rounding: Rounding;
}

export interface JobLine {
  kind: LineKind;
  quantityMilli: number;
  unitPriceMinor: number;
}

export interface JobPrice {
  /** In the order of the lines; they add up to `netMinor`. */
  lineNets: number[];
  netMinor: number;
  taxMinor: number;
  totalMinor: number;
}

/** Unit price times quantity, rounded half up to the minor unit. */
export const lineNet = (line: Pick<JobLine, "quantityMilli" | "unitPriceMinor">): number =>
  lineGross(line.unitPriceMinor, line.quantityMilli);

/**
 * One job as it is quoted: each line is rounded to the minor unit first, then taxed by line or over the job. The editor
 * and the server call this same function, so that what is typed is what is charged.
 */
export function priceJob(lines: readonly JobLine[], tax: ShopTax): JobPrice {
  const taxes = [{ id: "tax", label: "tax", basisPoints: tax.basisPoints, kinds: [...tax.kinds], compound: false }];
  const taxed = lines.map((line) => ({ kind: line.kind, amountMinor: lineNet(line) }));
  const { lineNets, netMinor, taxMinor, totalMinor } = taxJob(taxed, {
    taxes,
    pricesIncludeTax: false,
    exempt: false,
    rounding: tax.rounding,
  });
  return { lineNets, netMinor, taxMinor, totalMinor };
}

/** A single amount as a job of one line. */
export const priceAmount = (netMinor: number, kind: LineKind, tax: ShopTax): JobPrice =>
  priceJob([{ kind, quantityMilli: 1000, unitPriceMinor: netMinor }], tax);

/** The highest net amount whose total with tax stays inside `totalMinor`: a ceiling is agreed tax included. */
export function netWithin(totalMinor: number, kind: LineKind, tax: ShopTax): number {
  if (!tax.kinds.includes(kind)) return totalMinor;
  // the quotient is within one unit of the answer; the check settles it
  let net = toSafeNumber(divideHalfUp(BigInt(totalMinor) * 10_000n, BigInt(10_000 + tax.basisPoints)));
  while (net > 0 && net + partOf(net, tax.basisPoints) > totalMinor) net -= 1;
  return net;
}
