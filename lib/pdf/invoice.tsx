import { Text } from "@react-pdf/renderer";
import type { ReactElement } from "react";
import { authorizationRows, NotDoneList, Proof, Section, Terms } from "./closing";
import { Frame, Prose, type Writing } from "./frame";
import { billedRows, ItemHead, WithTotal } from "./items";
import { look } from "./look";
import type { Authorization, InvoiceModel } from "./models";
import { Sums } from "./sums";

/** Beside the sums there is room for a short record; a longer one gets a section of its own, so that the block fits a page. */
const fitsBeside = (list: Authorization[]) =>
  list.length <= 2 && list.every((each) => (each.words?.length ?? 0) + (each.contact?.length ?? 0) < 220);

const quoted = (words: string) => (words.trim() ? `“${words.trim()}”` : "");

export function Invoice({ paper, words, formats }: { paper: InvoiceModel } & Writing) {
  const record = authorizationRows(paper.authorizations, paper.partsReturned, { words, formats });
  const isBeside = fitsBeside(paper.authorizations);
  return (
    <Frame paper={paper} title={words.invoice} words={words} formats={formats}>
      <Prose
        parts={[
          { heading: words.complaint, text: quoted(paper.complaint) },
          { heading: words.cause, text: paper.cause },
          { heading: words.correction, text: paper.correction },
        ]}
      />
      <ItemHead words={words} priceLabel={words.price} />
      <WithTotal rows={paper.jobs.flatMap((job, index) => billedRows(job, index, { words, formats }))}>
        <Sums
          totals={paper.totals}
          beside={isBeside ? <Beside heading={words.agreedTo} rows={record} /> : undefined}
          words={words}
          formats={formats}
        />
      </WithTotal>
      {!isBeside && <Section heading={words.agreedTo} rows={record} />}
      <Proof paper={paper} words={words} />
      <NotDoneList list={paper.notDone} words={words} />
      <Terms warranty={paper.warranty} legal={paper.legal} words={words} />
    </Frame>
  );
}

const Beside = ({ heading, rows }: { heading: string; rows: ReactElement[] }) => (
  <>
    <Text style={look.h2}>{heading}</Text>
    {rows}
  </>
);
