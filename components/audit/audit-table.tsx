"use client";

import { Fragment, useState } from "react";
import { cx } from "@/components/ui/cx";
import { formatNumber } from "@/components/ui/format";
import { Bang, ChainLink, Tick } from "@/components/ui/icons";
import type { AuditEntryView } from "./model";

export interface AuditTableProps {
  entries: readonly AuditEntryView[];
  caption?: string;
  /** Where the entry number would tell nothing (the history of one case for those who don't see the audit). */
  hideChain?: boolean;
}

/** Entries newest first; each opens in place, one at a time. */
export function AuditTable({ entries, caption = "Entries", hideChain }: AuditTableProps) {
  const [open, setOpen] = useState<number | null>(null);
  return (
    <table className="tbl au">
      <caption className="vh">{caption}</caption>
      <thead>
        <tr>
          <th scope="col" className="r">
            Entry
          </th>
          <th scope="col">Time</th>
          <th scope="col">Who</th>
          <th scope="col">Did</th>
          <th scope="col">To</th>
          <th scope="col">What changed</th>
        </tr>
      </thead>
      <tbody>
        {entries.map((entry) => {
          const isOpen = open === entry.seq;
          return (
            <Fragment key={entry.seq}>
              <tr className={cx(isOpen && "open")}>
                <td className="r num faint">{formatNumber(entry.seq)}</td>
                <td className="num">{entry.time}</td>
                <td className="nowrap who">
                  {entry.who} <span className="faint">{entry.role}</span>
                </td>
                <td>{entry.did}</td>
                <td className="nowrap strong">{entry.to}</td>
                <td className="soft">
                  <button
                    type="button"
                    className="link plain"
                    aria-expanded={isOpen}
                    onClick={() => setOpen(isOpen ? null : entry.seq)}
                  >
                    {entry.what}
                    <span className="vh">, entry {entry.seq}</span>
                  </button>
                </td>
              </tr>
              {isOpen && (
                <tr className="ex">
                  <td />
                  <td colSpan={5}>
                    <Opened entry={entry} hideChain={hideChain} />
                  </td>
                </tr>
              )}
            </Fragment>
          );
        })}
      </tbody>
    </table>
  );
}

function Opened({ entry, hideChain }: { entry: AuditEntryView; hideChain?: boolean }) {
  const { hashes } = entry;
  return (
    <>
      <div className="diff">
        {entry.fields.length > 0 ? (
          <table>
            <thead>
              <tr>
                <th scope="col">Field</th>
                <th scope="col">Before</th>
                <th scope="col">After</th>
              </tr>
            </thead>
            <tbody>
              {entry.fields.map((field) => (
                <tr key={field.name} className={field.isChanged ? "moved" : undefined}>
                  <th scope="row">{field.name}</th>
                  <td className={cx(field.numeric && "num")}>
                    {field.isChanged && field.before ? (
                      <del>{field.before}</del>
                    ) : (
                      field.before || <span className="faint">none</span>
                    )}
                  </td>
                  <td className={cx(field.numeric && "num", !field.isChanged && "faint")}>
                    {field.isChanged ? (
                      field.after ? (
                        <ins>{field.after}</ins>
                      ) : (
                        <span className="faint">none</span>
                      )
                    ) : (
                      "the same"
                    )}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        ) : (
          <p className="soft">No fields; the act itself is the record.</p>
        )}
        <dl className="meta">
          {entry.reason && (
            <div>
              <dt>Reason given</dt>
              <dd>“{entry.reason}”</dd>
            </div>
          )}
          {(entry.from || entry.requestId) && (
            <div>
              <dt>From</dt>
              <dd>
                {entry.from} {entry.requestId && <span className="num faint">request {entry.requestId}</span>}
              </dd>
            </div>
          )}
          {entry.touches && (
            <div>
              <dt>Touches</dt>
              <dd>{entry.touches}</dd>
            </div>
          )}
        </dl>
      </div>
      {!hideChain && (
        <div className="links">
          {hashes.previous && (
            <>
              <span>
                <i className="num">{formatNumber(hashes.previous.seq)}</i>
                <b className="num">{hashes.previous.hash}</b>
              </span>
              <ChainLink />
            </>
          )}
          <span className="this">
            <i className="num">{formatNumber(entry.seq)}</i>
            <b className="num">{hashes.own}</b>
          </span>
          {hashes.next && (
            <>
              <ChainLink />
              <span>
                <i className="num">{formatNumber(hashes.next.seq)}</i>
                <b className="num">{hashes.next.hash}</b>
              </span>
            </>
          )}
          {hashes.agree ? (
            <span className="ok">
              <Tick /> each entry holds the hash of the one before it; these agree
            </span>
          ) : (
            <span className="ok">
              <Bang /> <b>these do not agree</b>
            </span>
          )}
        </div>
      )}
    </>
  );
}
