import "server-only";
import { sql } from "drizzle-orm";
import type { Tx } from "@/db/client";
import type { ShopMemory } from "@/lib/diagnosis/answer";
import { complaintFamily } from "@/lib/diagnosis/priors";
import { type CauseId, COMPLAINTS, type ComplaintId } from "@/lib/diagnosis/vocabulary";

/** Older cases say little about the cars that come in today, and the query stays one index range. */
const NEWEST = 1000;

const isComplaint = (id: string): id is ComplaintId => (COMPLAINTS as readonly string[]).includes(id);

/**
 * What this shop's own closed cases ended as, by family of complaint and fuel system. A case that came back takes its
 * own count away again; the case at hand never counts for itself. The row policy keeps other shops' cases out.
 */
export async function shopMemory(tx: Tx, shopId: string, exceptCaseId: string): Promise<ShopMemory> {
  const found = await tx.execute<{
    complaints: string[];
    fuel_system: string | null;
    cause_id: CauseId;
    came_back: boolean;
  }>(sql`
    with recent as (
      select shop_id, id, vehicle_id, complaints from cases
      where shop_id = ${shopId} and stage = 'closed' and id <> ${exceptCaseId} order by stage_since desc limit ${NEWEST}
    )
    select r.complaints, v.engine->>'fuelSystem' as fuel_system, m.cause_id,
      exists (select 1 from cases b where b.shop_id = r.shop_id and b.comeback_of_id = r.id) as came_back
    from recent r
    join vehicles v on v.shop_id = r.shop_id and v.id = r.vehicle_id
    join cause_marks m on m.shop_id = r.shop_id and m.case_id = r.id and m.mark = 'proven' and m.withdrawn_at is null`);
  const entries = new Map<string, ShopMemory["entries"][number]>();
  for (const row of found.rows) {
    if (row.came_back || !row.fuel_system) continue;
    const family = complaintFamily(row.complaints.filter(isComplaint));
    const key = `${family}|${row.fuel_system}`;
    const entry = entries.get(key) ?? { complaintFamily: family, fuelSystem: row.fuel_system, causes: {} };
    entry.causes[row.cause_id] = (entry.causes[row.cause_id] ?? 0) + 1;
    entries.set(key, entry);
  }
  return { entries: [...entries.values()] };
}
