import { Glyph } from "@/components/ui/glyph";
import { Words } from "@/components/ui/words";
import type { FindingView } from "./model";

export interface WhatStandsOutProps {
  findings: readonly FindingView[];
  /** "6 of 49 readings". */
  count?: string;
  /** Contradictions and readings that were not used, in a sentence each. */
  notes?: readonly string[];
}

/** What the readings say, the strongest first: the finding in a few words, then the figures. */
export function WhatStandsOut({ findings, count, notes = [] }: WhatStandsOutProps) {
  return (
    <section className="sec" aria-labelledby="out-head">
      <header>
        <h2 id="out-head">What stands out</h2>
        {count && <span className="label">{count}</span>}
      </header>
      {findings.length === 0 ? (
        <p className="soft">Nothing is outside its usual band so far.</p>
      ) : (
        <ol className="out">
          {findings.map((finding) => (
            <li key={finding.id}>
              <Glyph family={finding.family ?? "mech"} />
              <p>
                <b>
                  <Words>{finding.lead}</Words>
                </b>{" "}
                {finding.rest && <Words>{finding.rest}</Words>}
              </p>
            </li>
          ))}
        </ol>
      )}
      {notes.length > 0 && (
        <details className="notused">
          <summary className="link">
            {notes.length === 1 ? "1 reading not used" : `${notes.length} readings not used`}
          </summary>
          <ul>
            {notes.map((note) => (
              <li key={note} className="note">
                <Words>{note}</Words>
              </li>
            ))}
          </ul>
        </details>
      )}
    </section>
  );
}
