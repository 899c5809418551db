import type { ReactNode } from "react";

export interface OfflineLineProps {
  /** "13:22". */
  since: string;
  /** What is kept: "5 readings and 1 outcome are kept on this tablet and go out in order." */
  children: ReactNode;
}

/** Inverse, under the top bar. */
export function OfflineLine({ since, children }: OfflineLineProps) {
  return (
    <div className="off" role="status">
      <b>No network since {since}.</b> {children}
    </div>
  );
}

export interface KeptEntry {
  id: string;
  at: string;
  what: string;
}

/** Queued writes, oldest first, each saying that it is kept. */
export function KeptQueue({ entries }: { entries: readonly KeptEntry[] }) {
  return (
    <ul className="queue">
      {entries.map((entry) => (
        <li key={entry.id}>
          <span className="num">{entry.at}</span> {entry.what} <span className="faint">kept</span>
        </li>
      ))}
    </ul>
  );
}
