import { Text, View } from "@react-pdf/renderer";
import type { ReactElement } from "react";
import type { Writing } from "./frame";
import { Lines, oneLine } from "./lines";
import { look, px } from "./look";
import { readingRows } from "./marks";
import type { Authorization, InvoiceModel, NotDone } from "./models";

/** The record of who agreed to what, how and when: one element an entry. */
export function authorizationRows(
  list: Authorization[],
  partsReturned: string,
  { words, formats }: Writing,
): ReactElement[] {
  const entry = { marginBottom: px(5) };
  const rows = list.map((each) => {
    const contact = each.contact ? ` (${each.contact})` : "";
    const said = each.words ? ` “${each.words}”` : "";
    const taken = each.takenBy && each.takenBy !== "link" ? `, ${words.takenBy} ${each.takenBy}` : "";
    const text = `${each.what} ${formats.money(each.amountMinor)}, ${words.withTax}, ${words.under} ${each.givenBy}, ${each.how}${contact}, ${formats.instant(each.at)}${taken}.${said}`;
    return <Lines key={each.at + each.what} style={entry} text={text} />;
  });
  if (!partsReturned) return rows;
  return [...rows, <Lines key="parts" style={entry} text={partsReturned} />];
}

/** A section whose rule and heading never part from the first of its rows. */
export function Section({
  heading,
  aside,
  rows,
  strength = 2,
}: {
  heading?: string;
  aside?: string;
  rows: ReactElement[];
  strength?: 1 | 2;
}) {
  const [first, ...rest] = rows;
  return (
    <>
      <View style={{ ...look.section, borderTopWidth: px(strength) }} wrap={false}>
        {heading ? (
          <View style={{ ...look.spread, marginBottom: px(aside ? 6 : 0) }}>
            <Text style={{ ...look.h2, flexShrink: 1, paddingRight: px(12) }}>{heading}</Text>
            {aside ? <Text style={look.small}>{aside}</Text> : null}
          </View>
        ) : null}
        {first}
      </View>
      {rest}
    </>
  );
}

export function NotDoneList({ list, words }: { list: NotDone[]; words: Writing["words"] }) {
  if (list.length === 0) return null;
  const rows = list.map((each) => (
    <Text key={each.title} style={{ marginBottom: px(5) }}>
      <Text style={look.strong}>{oneLine(each.title)}</Text>
      {each.why ? `. ${oneLine(each.why)}` : ""}
    </Text>
  ));
  return <Section heading={words.notDone} rows={rows} />;
}

export function Proof({ paper, words }: { paper: InvoiceModel; words: Writing["words"] }) {
  if (paper.readings.length === 0 && !paper.proof) return null;
  const hasAfter = paper.readings.some((row) => row.after);
  const aside = paper.readings.length === 0 ? undefined : hasAfter ? words.legend : words.legendOne;
  const rows = [
    ...readingRows(paper.readings, words, !hasAfter),
    ...(paper.proof
      ? [<Lines key="proof" style={{ paddingTop: px(8), paddingRight: px(110) }} text={paper.proof} />]
      : []),
  ];
  return <Section heading={hasAfter || paper.proof ? words.measured : words.found} aside={aside} rows={rows} />;
}

export function Terms({ warranty, legal, words }: { warranty: string; legal: string; words: Writing["words"] }) {
  const rows = [
    ...(warranty
      ? [
          <Text key="warranty" style={look.small}>
            <Text style={look.strong}>{`${words.warranty}. `}</Text>
            {oneLine(warranty)}
          </Text>,
        ]
      : []),
    ...(legal ? [<Lines key="legal" style={{ ...look.small, marginTop: px(4) }} text={legal} />] : []),
  ];
  return rows.length > 0 ? <Section rows={rows} strength={1} /> : null;
}
