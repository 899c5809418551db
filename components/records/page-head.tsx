import type { ReactNode } from "react";

export interface PageHeadProps {
  title: string;
  /** The second voice of the heading: "none of them waits on you". */
  titleNote?: string;
  /** A line under the heading. */
  sub?: ReactNode;
  acts?: ReactNode;
}

/** The head of a page of records: what it found, in a sentence, and what can be done here. */
export function PageHead({ title, titleNote, sub, acts }: PageHeadProps) {
  return (
    <div className="rec-head">
      <div>
        <h1>
          {title} {titleNote && <span>{titleNote}</span>}
        </h1>
        {sub && <p className="soft">{sub}</p>}
      </div>
      {acts && <div className="acts wrap">{acts}</div>}
    </div>
  );
}
