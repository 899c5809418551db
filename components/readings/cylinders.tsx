"use client";

import { useState } from "react";
import { cx } from "@/components/ui/cx";
import type { Family } from "@/components/ui/family";
import { formatClock, formatNumber } from "@/components/ui/format";
import { parseNumber } from "@/components/ui/parse-entry";
import { shownUnit } from "@/components/ui/units";
import type { Mode } from "@/lib/diagnosis/vocabulary";
import { PARAMETERS } from "@/lib/obd/parameters";
import { Deck } from "./deck";
import { judgeReading } from "./judging";
import { MODE_WORDS } from "./mode-words";
import type { SampleView, SheetContext, Values } from "./model";
import { CYLINDER_LABELS, CYLINDER_PARAMETERS, type CylinderParameter } from "./rows";

export interface CylindersProps {
  samples: readonly SampleView[];
  values: Record<string, Values>;
  context: SheetContext;
  onCommit: (sampleId: string, cells: Record<string, unknown>) => void;
  readOnly?: boolean;
}

/** Where each measure is taken by custom; it may stand in any sample. */
const CUSTOM: Partial<Record<CylinderParameter, Mode>> = {
  misfireCounts: "idling",
  compressionKPa: "starting",
  relativeCompressionPct: "starting",
  leakdownPct: "key-on",
  plugGapMm: "key-on",
};
const ALWAYS: readonly CylinderParameter[] = ["misfireCounts", "compressionKPa", "leakdownPct"];

/** Bores in plan over the table of what was measured by cylinder. */
export function Cylinders({ samples, values, context, onCommit, readOnly }: CylindersProps) {
  const count = context.vehicle.cylinders ?? highestCylinder(values) ?? 0;
  if (count === 0 || samples.length === 0) return null;
  const all = Array.from({ length: count }, (_, i) => i + 1);
  const bank1 = context.vehicle.banks === 2 ? context.vehicle.bank1Cylinders : undefined;
  const banks = bank1 ? [all.filter((c) => bank1.includes(c)), all.filter((c) => !bank1.includes(c))] : [all];
  const rows = CYLINDER_PARAMETERS.flatMap((parameter) => {
    const sample = holderOf(parameter, samples, values);
    const held = sample ? values[sample.id]?.[parameter] : undefined;
    if (!sample || (held === undefined && !ALWAYS.includes(parameter))) return [];
    return [
      { parameter, sample, figures: (typeof held === "object" && held !== null ? held : {}) as Record<string, number> },
    ];
  });
  const deviant: Record<number, Family> = {};
  for (const { parameter, sample, figures } of rows)
    for (const cylinder of all) {
      const figure = figures[cylinder];
      if (figure === undefined || deviant[cylinder]) continue;
      const judged = judgeReading(parameter, figure, sample.mode, context);
      if (judged.state === "outside") deviant[cylinder] = judged.family ?? "mech";
    }
  const out = Object.keys(deviant);
  const source = [
    ...new Set(
      rows
        .filter((row) => Object.keys(row.figures).length > 0)
        .map(
          (row) => `${MODE_WORDS[row.sample.mode].toLowerCase()} ${formatClock(row.sample.takenAt, context.timeZone)}`,
        ),
    ),
  ];
  return (
    <section className="sec" aria-labelledby="cyl-head">
      <header>
        <h2 id="cyl-head">Cylinders</h2>
        <span className="label">{source.length > 0 ? source.join(", ") : "nothing measured yet"}</span>
      </header>
      {banks.map((cylinders, bank) => (
        <div key={cylinders.join("-")} className="bankdeck">
          {banks.length > 1 && <p className="label">Bank {bank + 1}</p>}
          <Deck
            cylinders={cylinders}
            deviant={deviant}
            label={`${cylinders.length} cylinders in line${out.length > 0 ? `; out of band: ${out.join(", ")}` : ""}`}
          />
          <table className={`cyls n${Math.min(8, cylinders.length)}`}>
            <thead>
              <tr>
                <th scope="col">
                  <span className="vh">Measure</span>
                </th>
                {cylinders.map((cylinder) => (
                  <th scope="col" key={cylinder}>
                    {cylinder}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {rows.map(({ parameter, sample, figures }) => (
                <tr key={parameter}>
                  <th
                    scope="row"
                    title={`${PARAMETERS[parameter].label}${shownUnit(parameter, context.units).unit && `, ${shownUnit(parameter, context.units).unit}`}`}
                  >
                    {CYLINDER_LABELS[parameter]}
                    <span className="vh"> {shownUnit(parameter, context.units).unit}</span>
                  </th>
                  {cylinders.map((cylinder) => (
                    <CylinderCell
                      key={cylinder}
                      parameter={parameter}
                      cylinder={cylinder}
                      mode={sample.mode}
                      value={figures[cylinder] ?? null}
                      context={context}
                      readOnly={readOnly}
                      onCommit={(now) => {
                        const next = { ...figures };
                        if (now === null) delete next[String(cylinder)];
                        else next[String(cylinder)] = now;
                        onCommit(sample.id, { [parameter]: Object.keys(next).length > 0 ? next : null });
                      }}
                    />
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      ))}
    </section>
  );
}

function highestCylinder(values: Record<string, Values>): number | null {
  let highest = 0;
  for (const held of Object.values(values))
    for (const parameter of CYLINDER_PARAMETERS) {
      const figures = held[parameter];
      if (typeof figures === "object" && figures !== null)
        for (const key of Object.keys(figures)) highest = Math.max(highest, Number(key));
    }
  return highest || null;
}

/** The newest sample as found that holds the measure (misfires: the one that holds most); else where it is taken by custom; else the first. */
function holderOf(
  parameter: CylinderParameter,
  samples: readonly SampleView[],
  values: Record<string, Values>,
): SampleView | null {
  const found = samples.filter((sample) => sample.phase === "before");
  const pool = found.length > 0 ? found : samples;
  if (parameter === "misfireCounts") {
    const total = (sample: SampleView) =>
      Object.values((values[sample.id]?.misfireCounts ?? {}) as Record<string, number>).reduce((sum, n) => sum + n, 0);
    const worst = pool.reduce<SampleView | null>(
      (best, sample) => (total(sample) > (best ? total(best) : 0) ? sample : best),
      null,
    );
    if (worst) return worst;
  }
  return (
    pool.findLast((sample) => values[sample.id]?.[parameter] !== undefined) ??
    pool.find((sample) => sample.mode === CUSTOM[parameter]) ??
    pool[0] ??
    null
  );
}

interface CylinderCellProps {
  parameter: CylinderParameter;
  cylinder: number;
  mode: Mode;
  value: number | null;
  context: SheetContext;
  readOnly?: boolean;
  onCommit: (value: number | null) => void;
}

function CylinderCell({ parameter, cylinder, mode, value, context, readOnly, onCommit }: CylinderCellProps) {
  const [draft, setDraft] = useState<string | null>(null);
  const unit = shownUnit(parameter, context.units);
  const typed = draft === null ? null : parseNumber(draft);
  const current = draft === null ? value : typed === null ? null : unit.toInternal(typed);
  const judged = current === null ? null : judgeReading(parameter, current, mode, context);
  const family = judged?.state === "outside" ? (judged.family ?? "mech") : null;
  return (
    <td className={cx(family)}>
      <input
        className={cx("num", family && "dev", judged?.state === "impossible" && "impossible")}
        inputMode="decimal"
        autoComplete="off"
        placeholder="–"
        aria-label={`${CYLINDER_LABELS[parameter]}, cylinder ${cylinder}`}
        aria-invalid={judged?.state === "impossible" || undefined}
        title={judged?.state === "impossible" ? judged.message : undefined}
        readOnly={readOnly}
        value={
          draft ?? (value === null ? "" : formatNumber(unit.toShown(value), unit.decimals, { locale: context.locale }))
        }
        onFocus={(event) => event.currentTarget.select()}
        onChange={(event) => setDraft(event.target.value)}
        onBlur={() => {
          if (draft !== null && draft.trim() === "") onCommit(null);
          else if (typed !== null) onCommit(unit.toInternal(typed));
          setDraft(null);
        }}
        onKeyDown={(event) => {
          if (event.key === "Enter") event.currentTarget.blur();
          if (event.key === "Escape") setDraft(null);
        }}
      />
    </td>
  );
}
