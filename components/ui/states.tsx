import type { ReactNode } from "react";
import { Bang } from "./icons";
import { Num } from "./num";

export interface EmptyStateProps {
  /** What would be here. */
  title: string;
  /** The most useful first step. */
  children: ReactNode;
  /** One button and at most one alternative. */
  acts?: ReactNode;
  /** An empty mark or nothing. */
  mark?: ReactNode;
  level?: 2 | 3;
}

export function EmptyState({ title, children, acts, mark, level = 2 }: EmptyStateProps) {
  const Head = `h${level}` as const;
  return (
    <div className="emp">
      {mark}
      <Head>{title}</Head>
      <p>{children}</p>
      {acts && <div className="acts">{acts}</div>}
    </div>
  );
}

/** A band mark with no reading, for empty sheets. */
export function EmptyMark() {
  return (
    <svg className="bm" width="180" height="24" viewBox="0 0 180 24" aria-hidden="true">
      <path className="base" d="M0 12H180" />
      <rect className="band" x="60" y="8" width="60" height="8" />
    </svg>
  );
}

export interface ErrorStateProps {
  /** What did not happen. */
  title: string;
  /** What is still true, and what happens next. */
  children: ReactNode;
  /** Faults of ours carry a number to tell. */
  requestId?: string;
  at?: string;
  acts?: ReactNode;
  level?: 2 | 3;
}

export function ErrorState({ title, children, requestId, at, acts, level = 2 }: ErrorStateProps) {
  const Head = `h${level}` as const;
  return (
    <div className="emp" role="alert">
      <Head>
        <Bang />
        {title}
      </Head>
      <p>{children}</p>
      {requestId && (
        <p className="note">
          Tell us: <Num>{requestId}</Num>
          {at && `, ${at}`}
        </p>
      )}
      {acts && <div className="acts">{acts}</div>}
    </div>
  );
}

export interface NotAllowedProps {
  /** "Prices are the owner’s to change". */
  title: string;
  /** What one may do, and who may do this. */
  children: ReactNode;
  acts?: ReactNode;
}

export function NotAllowed({ title, children, acts }: NotAllowedProps) {
  return (
    <EmptyState title={title} acts={acts}>
      {children}
    </EmptyState>
  );
}

export interface ConflictViewProps {
  /** Who else changed it. */
  who: string;
  /** "hers, saved 13:20". */
  theirsHead: string;
  subject: string;
  /** Only the fields that differ. */
  fields: readonly { label: string; yours: string; theirs: string; numeric?: boolean }[];
  keepTheirsLabel: string;
  keepMineLabel?: string;
  onKeepTheirs: () => void;
  onKeepMine: () => void;
  busy?: boolean;
}

/** Two people, one row: both versions side by side and two buttons that say whose stays. */
export function ConflictView(props: ConflictViewProps) {
  return (
    <div className="conflict" role="alertdialog" aria-label={`${props.who} changed this while you were typing`}>
      <p className="lead2">{props.who} changed this while you were typing.</p>
      <table className="tbl">
        <thead>
          <tr>
            <th scope="col">{props.subject}</th>
            <th scope="col" className="r">
              Yours
            </th>
            <th scope="col" className="r">
              {props.theirsHead}
            </th>
          </tr>
        </thead>
        <tbody>
          {props.fields.map((field) => (
            <tr key={field.label}>
              <th scope="row">{field.label}</th>
              <td className={field.numeric ? "r num" : "r"}>{field.yours}</td>
              <td className={field.numeric ? "r num strong" : "r strong"}>{field.theirs}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <div className="acts">
        <button type="button" className="btn quiet" onClick={props.onKeepTheirs} aria-busy={props.busy || undefined}>
          {props.keepTheirsLabel}
        </button>
        <button type="button" className="btn quiet" onClick={props.onKeepMine} aria-busy={props.busy || undefined}>
          {props.keepMineLabel ?? "Put mine over it"}
        </button>
      </div>
    </div>
  );
}
