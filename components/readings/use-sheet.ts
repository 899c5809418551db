"use client";

import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import type { SaveStateView } from "@/components/ui/save-state";
import type { CellChange, SampleView, SaveReadings, Values } from "./model";

type Edits = Record<string, Record<string, CellChange>>;

export interface SheetConflict {
  sampleId: string;
  by: string;
  cells: { parameter: string; yours: unknown; theirs: unknown }[];
}

const PAUSE_MS = 600;
const RETRY_MS = 5000;

function isSame(a: unknown, b: unknown): boolean {
  return a === b || JSON.stringify(a ?? null) === JSON.stringify(b ?? null);
}

/**
 * The sheet's values with what was typed laid over what the server last sent. Each committed cell is saved after a
 * short pause, cell by cell with what the writer saw, one request at a time and in order. A failed save is tried
 * again; a cell someone else wrote meanwhile comes back as a conflict.
 */
export function useSheet(samples: readonly SampleView[], save: SaveReadings) {
  const [edits, setEdits] = useState<Edits>({});
  const [state, setState] = useState<SaveStateView>({ kind: "saved" });
  const [conflict, setConflict] = useState<SheetConflict | null>(null);
  const queue = useRef<Edits>({});
  const isBusy = useRef(false);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const saveRef = useRef(save);
  useEffect(() => {
    saveRef.current = save;
  });

  // What the server now has need not be laid over any more.
  useEffect(() => {
    setEdits((was) => {
      const next: Edits = {};
      for (const sample of samples) {
        const rest = Object.entries(was[sample.id] ?? {}).filter(
          ([key, change]) => !isSame(sample.values[key], change.now),
        );
        if (rest.length > 0) next[sample.id] = Object.fromEntries(rest);
      }
      return next;
    });
  }, [samples]);

  const flush = useCallback(async () => {
    clearTimeout(timer.current);
    if (isBusy.current) return;
    isBusy.current = true;
    let kept = 0;
    try {
      for (;;) {
        const [sampleId, cells] = Object.entries(queue.current)[0] ?? [];
        if (!sampleId || !cells) break;
        delete queue.current[sampleId];
        setState({ kind: "saving" });
        const changes = Object.values(cells);
        const back = () => {
          queue.current[sampleId] = { ...cells, ...queue.current[sampleId] };
        };
        try {
          const result = await saveRef.current(sampleId, changes);
          if (result.ok) {
            if (result.kept) kept += changes.length;
          } else if (result.conflict) {
            setConflict({ sampleId, ...result.conflict });
            setState({ kind: "failed", reason: "two people wrote in one cell" });
            return;
          } else {
            back();
            setState({ kind: "failed", reason: result.message });
            timer.current = setTimeout(flush, RETRY_MS);
            return;
          }
        } catch {
          back();
          setState({ kind: "failed", reason: "no answer came; it is tried again" });
          timer.current = setTimeout(flush, RETRY_MS);
          return;
        }
      }
      setState(kept > 0 ? { kind: "kept", count: kept } : { kind: "saved" });
    } finally {
      isBusy.current = false;
    }
  }, []);

  const values = useMemo(() => {
    const merged: Record<string, Values> = {};
    for (const sample of samples) {
      const over = edits[sample.id];
      merged[sample.id] = over
        ? ({
            ...sample.values,
            ...Object.fromEntries(Object.entries(over).map(([key, change]) => [key, change.now ?? undefined])),
          } as Values)
        : sample.values;
    }
    return merged;
  }, [samples, edits]);
  const valuesRef = useRef(values);
  useEffect(() => {
    valuesRef.current = values;
  });

  /** Commits cells of one sample; what did not change is dropped. */
  const commit = useCallback(
    (sampleId: string, cells: Record<string, unknown>) => {
      const now = valuesRef.current[sampleId] ?? {};
      const changed = Object.entries(cells).filter(([key, value]) => !isSame(now[key], value));
      if (changed.length === 0) return;
      const pending = queue.current[sampleId] ?? {};
      for (const [parameter, value] of changed)
        pending[parameter] = { parameter, was: pending[parameter]?.was ?? now[parameter] ?? null, now: value ?? null };
      queue.current[sampleId] = pending;
      setEdits((was) => ({
        ...was,
        [sampleId]: {
          ...was[sampleId],
          ...Object.fromEntries(
            changed.map(([parameter, value]) => [parameter, { parameter, was: null, now: value ?? null }]),
          ),
        },
      }));
      setState({ kind: "saving" });
      clearTimeout(timer.current);
      timer.current = setTimeout(flush, PAUSE_MS);
    },
    [flush],
  );

  /** Whose cell stays: theirs is simply taken; mine is written again over what they wrote. */
  const settle = useCallback(
    (whose: "mine" | "theirs") => {
      if (!conflict) return;
      const { sampleId, cells } = conflict;
      setEdits((was) => {
        const rest = { ...was[sampleId] };
        for (const cell of cells)
          rest[cell.parameter] = {
            parameter: cell.parameter,
            was: null,
            now: whose === "mine" ? cell.yours : cell.theirs,
          };
        return { ...was, [sampleId]: rest };
      });
      if (whose === "mine") {
        const again = Object.fromEntries(
          cells.map((cell) => [cell.parameter, { parameter: cell.parameter, was: cell.theirs, now: cell.yours }]),
        );
        queue.current[sampleId] = { ...queue.current[sampleId], ...again };
      }
      setConflict(null);
      void flush();
    },
    [conflict, flush],
  );

  // Nothing typed is lost when the page is left or hidden.
  useEffect(() => {
    const onHide = () => {
      if (document.visibilityState === "hidden") void flush();
    };
    document.addEventListener("visibilitychange", onHide);
    return () => {
      document.removeEventListener("visibilitychange", onHide);
      void flush();
    };
  }, [flush]);

  return { values, commit, state, conflict, settle, flush };
}
