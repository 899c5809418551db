import "server-only";
import { authorizations, caseNotes } from "@/db/schema";
import { assignInput, authorizeDiagnosisInput, editIntakeInput, noteInput, promiseInput } from "@/lib/cases/schema";
import { AppError } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { currentRates } from "../prices/rates";
import { defineVerb } from "../verb";
import { settingsOf, technicianOf } from "./facts";
import { requireTechnician } from "./open";
import { openForWrite, refreshCase, setCase } from "./refresh";

export const editIntake = defineVerb({
  name: "case.editIntake",
  summary: "Change what was said at intake",
  action: "case.editIntake",
  input: editIntakeInput,
  async run(tx, ctx, { caseId, version, reason: _reason, promisedAt, technicianId, ...change }) {
    const { row } = await openForWrite(tx, ctx, caseId);
    if (row.version !== version) {
      throw new AppError("conflict", "Someone else changed the intake while you wrote.", { current: row });
    }
    if (technicianId) await requireTechnician(tx, ctx, technicianId);
    await setCase(tx, ctx, caseId, {
      ...Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined)),
      ...(change.odometerInKm !== undefined ? { odometerUnreadable: null } : {}),
      ...(promisedAt ? { promisedAt: new Date(promisedAt) } : {}),
      ...(technicianId ? { technicianId } : {}),
      version: version + 1,
    });
    await refreshCase(tx, ctx, caseId);
    return { version: version + 1 };
  },
});

export const authorizeDiagnosis = defineVerb({
  name: "case.authorizeDiagnosis",
  summary: "Record a yes to the diagnosis, or to a higher ceiling",
  action: "diagnosis.authorize",
  input: authorizeDiagnosisInput,
  async run(tx, ctx, { caseId, ...given }) {
    const parts = await openForWrite(tx, ctx, caseId);
    const before = parts.row.ceilingMinor;
    if (before !== null && given.amountMinor <= before) {
      throw new AppError("precondition", "The new ceiling must be higher than the one already agreed.");
    }
    await tx.insert(authorizations).values({
      shopId: ctx.shopId,
      id: newId("auth"),
      caseId,
      amountMinor: given.amountMinor,
      currency: settingsOf(parts).currency,
      givenBy: given.givenBy,
      how: given.how,
      contact: given.contact ?? null,
      words: given.words ?? null,
      takenById: ctx.actor.id,
      takenByName: ctx.actor.name,
      at: ctx.now,
    });
    await setCase(tx, ctx, caseId, {
      ceilingMinor: given.amountMinor,
      rates: parts.row.rates ?? (await currentRates(tx, ctx)),
    });
    await refreshCase(tx, ctx, caseId);
    return { ceilingMinor: given.amountMinor };
  },
});

export const assignTechnician = defineVerb({
  name: "case.assign",
  summary: "Give a case to a technician",
  action: "case.assign",
  input: assignInput,
  async run(tx, ctx, { caseId, technicianId }) {
    await openForWrite(tx, ctx, caseId);
    await requireTechnician(tx, ctx, technicianId);
    await setCase(tx, ctx, caseId, { technicianId });
    const parts = await refreshCase(tx, ctx, caseId);
    return { technicianName: technicianOf(parts)?.name ?? null };
  },
});

export const movePromise = defineVerb({
  name: "case.promise",
  summary: "Promise a time, or move it",
  action: "case.promise",
  input: promiseInput,
  async run(tx, ctx, { caseId, promisedAt }) {
    const { row } = await openForWrite(tx, ctx, caseId);
    const moved = row.promisedAt !== null && row.promisedAt.getTime() !== Date.parse(promisedAt);
    await setCase(tx, ctx, caseId, {
      promisedAt: new Date(promisedAt),
      promiseMoves: row.promiseMoves + (moved ? 1 : 0),
    });
    return { promisedAt };
  },
});

export const addNote = defineVerb({
  name: "case.note",
  summary: "Write a note, propose more work or a strike",
  action: "work.write",
  input: noteInput,
  async run(tx, ctx, { caseId, text, kind, workJobId }) {
    await openForWrite(tx, ctx, caseId);
    const id = newId("note");
    await tx.insert(caseNotes).values({
      shopId: ctx.shopId,
      id,
      caseId,
      workJobId: workJobId ?? null,
      kind,
      text,
      byId: ctx.actor.id,
      byName: ctx.actor.name,
      at: ctx.now,
    });
    return { id };
  },
});
