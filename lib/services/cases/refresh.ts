import "server-only";
import { and, eq } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { type CaseParts, type CaseRow, caseById, loadCaseParts, lockCase } from "@/db/queries/cases";
import { cases, stageEvents } from "@/db/schema";
import type { Ctx } from "@/lib/auth/context";
import { isOver, type Stage, waitingOn } from "@/lib/cases/stages";
import { assess } from "@/lib/diagnosis/assess";
import { CAUSES } from "@/lib/diagnosis/causes";
import { AppError, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { shopMemory } from "../causes/memory";
import { caseFileOf, factsOf, parkReasonOf } from "./facts";

export interface OpenCaseOptions {
  /** Closed and released cases are frozen; the few verbs that still apply say so. */
  evenIfOver?: boolean;
}

/** Locks a case for a write and loads it; throws when it is not this shop's or is frozen. */
export async function openForWrite(
  tx: Tx,
  ctx: Ctx,
  caseId: string,
  options: OpenCaseOptions = {},
): Promise<CaseParts> {
  const row = await lockCase(tx, ctx.shopId, caseId);
  if (!row) throw notFound("The case");
  if (!options.evenIfOver && isOver(row.stage as Stage)) {
    throw new AppError(
      "precondition",
      `Case ${row.number} is ${row.stage === "closed" ? "closed" : "released"} and can't be changed. Open a comeback instead.`,
    );
  }
  return loadCaseParts(tx, row);
}

/** Only the row, locked: for the many small writes of the readings sheet. */
export async function lockOpenCase(tx: Tx, ctx: Ctx, caseId: string): Promise<CaseRow> {
  const row = await lockCase(tx, ctx.shopId, caseId);
  if (!row) throw notFound("The case");
  if (isOver(row.stage as Stage))
    throw new AppError("precondition", `Case ${row.number} is closed and can't be changed. Open a comeback instead.`);
  return row;
}

export async function setCase(
  tx: Tx,
  ctx: Ctx,
  caseId: string,
  change: Partial<typeof cases.$inferInsert>,
): Promise<void> {
  await tx
    .update(cases)
    .set(change)
    .where(and(eq(cases.shopId, ctx.shopId), eq(cases.id, caseId)));
}

export async function moveTo(
  tx: Tx,
  ctx: Ctx,
  row: Pick<CaseRow, "id" | "stage">,
  to: Stage,
  reason: string | null = null,
): Promise<void> {
  await setCase(tx, ctx, row.id, { stage: to, stageSince: ctx.now });
  await tx.insert(stageEvents).values({
    shopId: ctx.shopId,
    id: newId("stg"),
    caseId: row.id,
    fromStage: row.stage,
    toStage: to,
    reason,
    byId: ctx.actor.id,
    byName: ctx.actor.name,
    at: ctx.now,
  });
}

/**
 * Brings the columns that lists read up to date with the case: whom it waits on, the leading cause, the find text.
 * Every verb that touches a case ends here, so a list never has to compute them.
 */
export async function refreshCase(tx: Tx, ctx: Ctx, caseId: string): Promise<CaseParts> {
  const row = await caseById(tx, ctx.shopId, caseId);
  if (!row) throw notFound("The case");
  const parts = await loadCaseParts(tx, row);
  const waiting = waitingOn(factsOf(parts, ctx.now), parkReasonOf(parts));
  const change = {
    waitingOn: waiting.party,
    waitingFor: waiting.for,
    searchText: searchTextOf(parts),
    ...(await leadOf(tx, parts)),
  };
  const isSame = (Object.keys(change) as (keyof typeof change)[]).every((key) => change[key] === row[key]);
  if (!isSame) await setCase(tx, ctx, caseId, change);
  return { ...parts, row: { ...row, ...change } };
}

async function leadOf(
  tx: Tx,
  parts: CaseParts,
): Promise<Pick<CaseRow, "leadCause" | "leadFamily" | "leadProbability" | "leadMark">> {
  const marked = parts.marks.findLast((mark) => mark.mark === "proven") ?? parts.marks.at(-1);
  if (marked) {
    const cause = CAUSES[marked.causeId as keyof typeof CAUSES];
    return {
      leadCause: marked.causeId,
      leadFamily: cause?.family ?? null,
      leadProbability: null,
      leadMark: marked.mark,
    };
  }
  const hasReadings =
    parts.samples.some((sample) => Object.keys(sample.values).length > 0) ||
    parts.codes.length > 0 ||
    parts.tests.length > 0;
  const memory = hasReadings ? await shopMemory(tx, parts.row.shopId, parts.row.id) : undefined;
  const lead = hasReadings ? assess(caseFileOf(parts), { memory }).causes[0] : undefined;
  if (!lead) return { leadCause: null, leadFamily: null, leadProbability: null, leadMark: null };
  return {
    leadCause: lead.id,
    leadFamily: CAUSES[lead.id].family,
    leadProbability: Math.fround(lead.probability),
    leadMark: null,
  };
}

function searchTextOf(parts: CaseParts): string {
  const { row, customer, vehicle } = parts;
  const codes = parts.codes.map((code) => code.code);
  return [
    row.number,
    customer.name,
    vehicle.label,
    vehicle.plate,
    vehicle.plate?.replaceAll(/[\s-]/g, ""),
    vehicle.vin,
    ...codes,
  ]
    .filter(Boolean)
    .join(" ")
    .toLowerCase();
}
