"use client";

import { useEffect, useState } from "react";
import { cx } from "./cx";

export interface LoadingTableProps {
  heads: readonly string[];
  rows?: number;
  caption: string;
}

const WIDTHS = [
  ["w1", "w4", "w5", "w2"],
  ["w1", "w3", "w5", "w2"],
  ["w1", "w4", "w6", "w2"],
] as const;

/** The frame and the heads at once; grey bars for words, still; after four seconds a sentence. */
export function LoadingTable({ heads, rows = 4, caption }: LoadingTableProps) {
  return (
    <div aria-busy="true">
      <table className="tbl">
        <caption className="vh">{caption}</caption>
        <thead>
          <tr>
            {heads.map((head) => (
              <th scope="col" key={head}>
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {Array.from({ length: rows }, (_, row) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: the rows are all alike
            <tr key={row}>
              {heads.map((head, column) => (
                <td key={head}>
                  <i className={cx("sk", WIDTHS[row % 3]?.[column % 4])} />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      <StillFetching />
    </div>
  );
}

/** Bars for a paragraph. */
export function LoadingLines({ lines = 3 }: { lines?: number }) {
  return (
    <div aria-busy="true" className="grid gap-3 py-2">
      {Array.from({ length: lines }, (_, line) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: the lines are all alike
        <i className={cx("sk", line % 3 === 2 ? "w5" : "w6")} key={line} />
      ))}
      <StillFetching />
    </div>
  );
}

export function StillFetching() {
  const [late, setLate] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setLate(true), 4000);
    return () => clearTimeout(timer);
  }, []);
  return (
    <p className="note" role="status">
      {late && "Still fetching. The rest of the page works."}
    </p>
  );
}
