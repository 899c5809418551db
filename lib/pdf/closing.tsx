import { Text, View } from "@react-pdf/renderer";
import type { Writing } from "./frame";
import { look, px } from "./look";
import { Readings } from "./marks";
import type { Authorization, InvoiceModel, NotDone } from "./models";

export function Authorizations({
  list,
  partsReturned,
  words,
  formats,
}: { list: Authorization[]; partsReturned: string } & Writing) {
  return (
    <>
      <Text style={look.h2}>{words.agreedTo}</Text>
      {list.map((each) => {
        const contact = each.contact ? ` (${each.contact})` : "";
        const said = each.words ? ` “${each.words}”` : "";
        const taken = each.takenBy && each.takenBy !== "link" ? `, ${words.takenBy} ${each.takenBy}` : "";
        const text = `${each.what} ${formats.money(each.amountMinor)}, ${words.withTax}, ${words.under} ${each.givenBy}, ${each.how}${contact}, ${formats.instant(each.at)}${taken}.${said}`;
        return (
          <Text key={each.at + each.what} style={{ marginBottom: px(5) }}>
            {text}
          </Text>
        );
      })}
      {partsReturned ? <Text style={{ marginBottom: px(5) }}>{partsReturned}</Text> : null}
    </>
  );
}

export function NotDoneList({ list, words }: { list: NotDone[]; words: Writing["words"] }) {
  if (list.length === 0) return null;
  return (
    <View style={look.section}>
      <Text style={look.h2} minPresenceAhead={px(40)}>
        {words.notDone}
      </Text>
      {list.map((each) => (
        <View key={each.title} style={{ marginBottom: px(5) }} wrap={false}>
          <Text>
            <Text style={look.strong}>{each.title}</Text>
            {each.why ? `. ${each.why}` : ""}
          </Text>
        </View>
      ))}
    </View>
  );
}

export function Proof({ paper, words }: { paper: InvoiceModel; words: Writing["words"] }) {
  if (paper.readings.length === 0 && !paper.proof) return null;
  const hasAfter = paper.readings.some((row) => row.after);
  return (
    <View style={look.section}>
      <View style={{ ...look.spread, marginBottom: px(6) }} minPresenceAhead={px(70)}>
        <Text style={look.h2}>{hasAfter ? words.measured : words.found}</Text>
        {paper.readings.length > 0 && <Text style={look.small}>{hasAfter ? words.legend : words.legendOne}</Text>}
      </View>
      <Readings rows={paper.readings} words={words} single={!hasAfter} />
      {paper.proof ? <Text style={{ paddingTop: px(8), paddingRight: px(110) }}>{paper.proof}</Text> : null}
    </View>
  );
}

export function Terms({ warranty, legal, words }: { warranty: string; legal: string; words: Writing["words"] }) {
  if (!warranty && !legal) return null;
  return (
    <View style={{ ...look.section, borderTopWidth: px(1) }}>
      {warranty ? (
        <Text style={look.small}>
          <Text style={look.strong}>{`${words.warranty}. `}</Text>
          {warranty}
        </Text>
      ) : null}
      {legal ? <Text style={{ ...look.small, marginTop: px(4) }}>{legal}</Text> : null}
    </View>
  );
}
