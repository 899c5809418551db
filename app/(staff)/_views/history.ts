import type { CaseGroupView } from "@/components/cases/model";
import { formatShortDate } from "@/components/ui/format";
import { isOver, type Stage } from "@/lib/cases/stages";
import type { HistoryRow } from "@/lib/services/customers/read";
import { caseRowView } from "./cases-list";

/** Cases of a customer or of a vehicle: what is open first, then the rest; each row says when it came in. */
export function historyGroups(rows: readonly HistoryRow[], now: Date, timeZone: string): CaseGroupView[] {
  const open = rows.filter((row) => !isOver(row.stage as Stage));
  const over = rows.filter((row) => isOver(row.stage as Stage));
  const group = (id: string, title: string, of: readonly HistoryRow[]): CaseGroupView[] =>
    of.length === 0
      ? []
      : [
          {
            id,
            title,
            note: `${of.length} ${of.length === 1 ? "case" : "cases"}`,
            rows: of.map((row) => caseRowView(row, now, timeZone)),
          },
        ];
  return [...group("open", "In the shop", open), ...group("over", "Earlier visits", over)];
}

/** "3 visits, the last on 1 Dec". */
export function visitsWords(count: number, last: Date | null, timeZone: string): string {
  if (count === 0 || !last) return "No visit yet";
  const on = formatShortDate(last.toISOString(), timeZone);
  return count === 1 ? `One visit, on ${on}` : `${count} visits, the last on ${on}`;
}
