"use client";

import { BandMark } from "@/components/ui/band-mark";
import { cx } from "@/components/ui/cx";
import { formatNumber } from "@/components/ui/format";
import { Words } from "@/components/ui/words";
import { PARAMETERS } from "@/lib/obd/parameters";
import { lambdaOf, numberAt, placesFor } from "./judging";
import { MODE_WORDS } from "./mode-words";
import type { SampleView, SheetContext, Values } from "./model";
import { ReadingCell } from "./reading-cell";
import { GAS_LABELS, GAS_PARAMETERS } from "./rows";

export interface GasTableProps {
  samples: readonly SampleView[];
  values: Record<string, Values>;
  context: SheetContext;
  onCommit: (sampleId: string, cells: Record<string, unknown>) => void;
  readOnly?: boolean;
}

/** Exhaust gas of at most two samples, with lambda computed from it. */
export function GasTable({ samples, values, context, onCommit, readOnly }: GasTableProps) {
  const holds = (sample: SampleView) => GAS_PARAMETERS.some((p) => numberAt(values[sample.id] ?? {}, p) !== null);
  const taken = samples.filter(holds);
  const columns =
    taken.length > 0
      ? taken.slice(-2)
      : samples.filter((s) => s.mode === "idling" || s.mode === "raised-idle").slice(0, 2);
  if (columns.length === 0) return null;
  const rows = GAS_PARAMETERS.filter(
    (p) => p !== "noxPpm" || columns.some((s) => numberAt(values[s.id] ?? {}, p) !== null),
  );
  return (
    <section className="sec" aria-labelledby="gas-head">
      <header>
        <h2 id="gas-head">Exhaust gas</h2>
        <span className="label">{taken.length === 0 && "not taken"}</span>
      </header>
      <table className="gas">
        <thead>
          <tr>
            <th scope="col">
              <span className="vh">Gas</span>
            </th>
            {columns.map((sample) => (
              <th scope="col" key={sample.id}>
                {MODE_WORDS[sample.mode]}
                {sample.phase === "after" && ", after"}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((parameter, row) => (
            <tr key={parameter}>
              <th scope="row" title={PARAMETERS[parameter].label}>
                <Words>{GAS_LABELS[parameter]}</Words> <span>{PARAMETERS[parameter].unit}</span>
              </th>
              {columns.map((sample, column) => (
                <ReadingCell
                  key={sample.id}
                  parameter={parameter}
                  mode={sample.mode}
                  label={`${PARAMETERS[parameter].label}, ${MODE_WORDS[sample.mode].toLowerCase()}`}
                  value={numberAt(values[sample.id] ?? sample.values, parameter)}
                  context={context}
                  places={placesFor(
                    parameter,
                    columns.flatMap((c) => numberAt(values[c.id] ?? c.values, parameter) ?? []),
                    context.units,
                  )}
                  row={1000 + row}
                  column={column}
                  readOnly={readOnly}
                  onCommit={(now) => onCommit(sample.id, { [parameter]: now })}
                />
              ))}
            </tr>
          ))}
          <tr>
            <th scope="row">
              Lambda <span>computed</span>
            </th>
            {columns.map((sample) => {
              const lambda = lambdaOf(values[sample.id] ?? sample.values);
              return (
                <td key={sample.id} className={cx("v computed", lambda?.family)}>
                  <span className="cell">
                    {lambda ? (
                      <>
                        <span className={cx("num", lambda.family && "dev")}>{formatNumber(lambda.value, 3)}</span>
                        {lambda.band && (
                          <BandMark value={lambda.value} band={lambda.band} family={lambda.family} decimals={2} />
                        )}
                      </>
                    ) : (
                      <span className="num faint">
                        <span className="none" />
                        <span className="vh">needs all four gases</span>
                      </span>
                    )}
                  </span>
                </td>
              );
            })}
          </tr>
        </tbody>
      </table>
    </section>
  );
}
