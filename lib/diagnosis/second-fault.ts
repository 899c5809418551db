import type { SecondFault } from "./answer";
import { CAUSES } from "./causes";
import type { Observation } from "./observation";
import type { CauseId } from "./vocabulary";

/** How much better a pair must explain than its better half; one fault is the rule, two the exception. */
const THRESHOLD_BITS = 2;
/** Two faults at once cost this much before they explain anything: about one case in sixteen. Common practice. */
const PAIR_COST_BITS = 4;
const CANDIDATES = 12;

/**
 * Two causes that together explain what neither does alone. Of a pair, each finding out of the ordinary is explained by
 * the better of the two; a healthy finding must suit both.
 */
export function findSecondFault(
  observations: readonly Observation[],
  causes: readonly CauseId[],
  priorBits: readonly number[],
  weights: readonly (readonly number[])[],
  order: readonly number[],
): SecondFault | null {
  const lead = order[0];
  if (lead === undefined) return null;
  const alone = weights.reduce((s, row) => s + (row[lead] ?? 0), 0);
  let best: SecondFault | null = null;
  const candidates = [...new Set([...order.slice(0, CANDIDATES), ...strongestByFinding(observations, weights)])];
  for (const other of candidates) {
    if (other === lead) continue;
    const id = causes[other] as CauseId;
    if (id === "no-fault-found" || causes[lead] === "no-fault-found") continue;
    let together = 0;
    let gained = 0;
    observations.forEach((o, i) => {
      const a = weights[i]?.[lead] ?? 0;
      const b = weights[i]?.[other] ?? 0;
      together += o.abnormal ? Math.max(a, b) : Math.min(a, b);
      if (o.abnormal && b > 1.5 && a < 0.25) gained += 1;
    });
    const bits = together - alone + Math.min(0, (priorBits[other] ?? 0) + PAIR_COST_BITS) - PAIR_COST_BITS;
    if (gained > 0 && bits > THRESHOLD_BITS && (!best || bits > best.bits)) {
      const pair: [CauseId, CauseId] = [causes[lead] as CauseId, id];
      best = {
        causes: pair,
        bits: Number(bits.toFixed(2)),
        statement: `Two faults may be at work: ${CAUSES[pair[0]].title.toLowerCase()}, and ${CAUSES[pair[1]].title.toLowerCase()}. Together they explain what neither does alone.`,
      };
    }
  }
  return best;
}

/** For every finding out of the ordinary, the cause it favours most. */
function strongestByFinding(observations: readonly Observation[], weights: readonly (readonly number[])[]): number[] {
  return observations.flatMap((o, i) => {
    if (!o.abnormal) return [];
    const row = weights[i] ?? [];
    let best = 0;
    for (let c = 1; c < row.length; c++) if ((row[c] ?? 0) > (row[best] ?? 0)) best = c;
    return [best];
  });
}
