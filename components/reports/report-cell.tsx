"use client";

import { type ReactNode, useId, useState } from "react";

export interface ReportTable {
  heads: readonly string[];
  rows: readonly (readonly string[])[];
}

export interface ReportCellProps {
  /** What it shows, as a sentence: "Waiting takes longest". */
  title: string;
  note: string;
  table: ReportTable;
  children: ReactNode;
}

/** A chart with its finding as heading; the same figures as a table at a press. */
export function ReportCell({ title, note, table, children }: ReportCellProps) {
  const [isTable, setTable] = useState(false);
  const id = useId();
  return (
    <section className="cell" aria-labelledby={id}>
      <h2 id={id}>{title}</h2>
      <p className="note">{note}</p>
      {isTable ? (
        <table className="tbl">
          <caption className="vh">{title}</caption>
          <thead>
            <tr>
              {table.heads.map((head, index) => (
                <th key={head} scope="col" className={index > 0 ? "r" : undefined}>
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {table.rows.map((row) => (
              <tr key={row[0]}>
                {row.map((text, index) =>
                  index === 0 ? (
                    <th key={table.heads[index]} scope="row">
                      {text}
                    </th>
                  ) : (
                    <td key={table.heads[index]} className="r num">
                      {text}
                    </td>
                  ),
                )}
              </tr>
            ))}
          </tbody>
        </table>
      ) : (
        children
      )}
      <button type="button" className="link" aria-pressed={isTable} onClick={() => setTable(!isTable)}>
        {isTable ? "Show as a chart" : "Show as a table"}
      </button>
    </section>
  );
}
