import "server-only";
import { and, eq } from "drizzle-orm";
import { caseCodes, vehicles } from "@/db/schema";
import { codeInput, importReadingsInput, readinessInput, removeCodeInput } from "@/lib/cases/schema";
import { parseCaseFile } from "@/lib/diagnosis/case-file";
import { AppError, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { lockOpenCase, refreshCase, setCase } from "../cases/refresh";
import { recordOutcome } from "../causes/record";
import { defineVerb } from "../verb";
import { checkValues, insertSample } from "./samples";

export const addCode = defineVerb({
  name: "readings.addCode",
  summary: "Record a trouble code",
  action: "reading.write",
  input: codeInput,
  async run(tx, ctx, { caseId, code, status, phase, freezeFrame }) {
    await lockOpenCase(tx, ctx, caseId);
    const frozen = freezeFrame ? checkValues("idling", "before", freezeFrame) : null;
    const id = newId("dtc");
    const added = await tx
      .insert(caseCodes)
      .values({ shopId: ctx.shopId, id, caseId, code, status, phase, freezeFrame: frozen, at: ctx.now })
      .onConflictDoNothing()
      .returning({ id: caseCodes.id });
    if (added.length === 0) throw new AppError("conflict", `${code} is already recorded as ${status}.`);
    await refreshCase(tx, ctx, caseId);
    return { id };
  },
});

export const removeCode = defineVerb({
  name: "readings.removeCode",
  summary: "Take a trouble code out of the case (the audit keeps it)",
  action: "reading.write",
  input: removeCodeInput,
  async run(tx, ctx, { caseId, codeId }) {
    await lockOpenCase(tx, ctx, caseId);
    const gone = await tx
      .delete(caseCodes)
      .where(and(eq(caseCodes.shopId, ctx.shopId), eq(caseCodes.caseId, caseId), eq(caseCodes.id, codeId)))
      .returning({ id: caseCodes.id });
    if (gone.length === 0) throw notFound("The code");
    await refreshCase(tx, ctx, caseId);
    return { removed: true };
  },
});

export const setReadiness = defineVerb({
  name: "readings.readiness",
  summary: "Record which self-tests of the control unit have run",
  action: "reading.write",
  input: readinessInput,
  async run(tx, ctx, { caseId, readiness, afterCodesRead }) {
    await lockOpenCase(tx, ctx, caseId);
    await setCase(tx, ctx, caseId, { readiness, ...(afterCodesRead === undefined ? {} : { afterCodesRead }) });
    await refreshCase(tx, ctx, caseId);
    return { saved: true };
  },
});

/** Takes a case file (version 1): its samples, codes and tests join the case; its vehicle fills what is not known yet. */
export const importReadings = defineVerb({
  name: "readings.import",
  summary: "Import a case file's readings",
  action: "reading.write",
  input: importReadingsInput,
  async run(tx, ctx, { caseId, file }) {
    const row = await lockOpenCase(tx, ctx, caseId);
    const parsed = parseCaseFile(file);
    if (!parsed.ok) {
      throw new AppError("invalid", `The file does not fit: ${parsed.errors[0]?.path}: ${parsed.errors[0]?.reason}`, {
        fields: parsed.errors.map((error) => ({ pointer: `/file/${error.path}`, detail: error.reason })),
      });
    }
    const { caseFile } = parsed;
    for (const sample of caseFile.samples) {
      await insertSample(tx, ctx, caseId, row.ceilingMinor !== null, {
        mode: sample.mode,
        phase: sample.phase,
        how: "from a file",
        values: { ...sample.values },
      });
    }
    for (const code of caseFile.codes) {
      await tx
        .insert(caseCodes)
        .values({
          shopId: ctx.shopId,
          id: newId("dtc"),
          caseId,
          code: code.code,
          status: code.status,
          phase: "before",
          freezeFrame: code.freezeFrame?.values ?? null,
          at: ctx.now,
        })
        .onConflictDoNothing();
    }
    for (const test of caseFile.tests) {
      await recordOutcome(tx, ctx, caseId, {
        testId: test.id,
        outcome: test.outcome,
        phase: "before",
        cylinder: test.cylinder,
        bank: test.bank,
      });
    }
    const [vehicle] = await tx
      .select()
      .from(vehicles)
      .where(and(eq(vehicles.shopId, ctx.shopId), eq(vehicles.id, row.vehicleId)));
    if (vehicle) {
      const { modelYear, odometerKm: _odometer, ...engine } = caseFile.vehicle;
      await tx
        .update(vehicles)
        .set({ engine: { ...engine, ...vehicle.engine }, modelYear: vehicle.modelYear ?? modelYear ?? null })
        .where(and(eq(vehicles.shopId, ctx.shopId), eq(vehicles.id, row.vehicleId)));
    }
    if (caseFile.site) await setCase(tx, ctx, caseId, { site: { ...caseFile.site, ...row.site } });
    await refreshCase(tx, ctx, caseId);
    return { samples: caseFile.samples.length, codes: caseFile.codes.length, tests: caseFile.tests.length };
  },
});
