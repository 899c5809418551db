import type { ReactNode } from "react";
import { AuditTable } from "@/components/audit/audit-table";
import type { AuditEntryView } from "@/components/audit/model";
import { Main } from "@/components/ui/case-frame";
import { formatBytes, formatPrice } from "@/components/ui/format";
import { ScrollX } from "@/components/ui/scroll-x";

export interface PaperView {
  id: string;
  number: string;
  /** "Estimate, revision 1", "Invoice". */
  title: string;
  /** "1 December, 14:12, Odile Tansy". */
  issued: string;
  total: { minor: number; currency: string } | null;
  bytes: number;
  sha256: string;
  href: string;
  /** "opened 14:15", "paid". */
  state?: string;
}

export interface PapersPartProps {
  /** "Three papers, the invoice is paid". */
  title: string;
  sub?: string;
  papers: readonly PaperView[];
  history: readonly AuditEntryView[];
  locale?: string;
  acts?: ReactNode;
  more?: ReactNode;
  /** Notes and messages sent, above the history. */
  children?: ReactNode;
}

/** Papers as issued, and every event in order. */
export function PapersPart({ title, sub, papers, history, locale, acts, more, children }: PapersPartProps) {
  return (
    <Main className="papers" title={title} sub={sub} acts={acts}>
      <section className="sec" aria-labelledby="papers-head">
        <header>
          <h2 id="papers-head">Papers</h2>
          <span className="label">as issued; they can’t change</span>
        </header>
        {papers.length === 0 ? (
          <p className="soft">None yet. A sent quote is the first.</p>
        ) : (
          <ScrollX label="Papers">
            <table className="tbl">
              <caption className="vh">Papers</caption>
              <thead>
                <tr>
                  <th scope="col">Number</th>
                  <th scope="col">What</th>
                  <th scope="col">Issued</th>
                  <th scope="col" className="r">
                    Total, tax included
                  </th>
                  <th scope="col" className="r">
                    Size
                  </th>
                  <th scope="col">SHA-256</th>
                  <th scope="col">Standing</th>
                </tr>
              </thead>
              <tbody>
                {papers.map((paper) => (
                  <tr key={paper.id}>
                    <td className="num">
                      <a className="link" href={paper.href}>
                        {paper.number}
                      </a>
                    </td>
                    <td>{paper.title}</td>
                    <td className="soft">{paper.issued}</td>
                    <td className="r num">
                      {paper.total ? formatPrice(paper.total.minor, paper.total.currency, locale) : ""}
                    </td>
                    <td className="r num faint">{formatBytes(paper.bytes)}</td>
                    <td className="num faint" title={paper.sha256}>
                      {paper.sha256.slice(0, 4)} {paper.sha256.slice(4, 8)} … {paper.sha256.slice(-4)}
                    </td>
                    <td>{paper.state}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          </ScrollX>
        )}
      </section>
      {children}
      <section className="sec history" aria-labelledby="history-head">
        <header>
          <h2 id="history-head">History</h2>
          <span className="label">newest first</span>
        </header>
        <ScrollX label="History">
          <AuditTable entries={history} caption="History of the case" />
        </ScrollX>
        {more}
      </section>
    </Main>
  );
}
