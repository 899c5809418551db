import { Text, View } from "@react-pdf/renderer";
import { authorizationRows, NotDoneList, Proof, Section, Terms } from "./closing";
import { Frame, Prose, type Writing } from "./frame";
import { billedRows, ItemHead, WithTotal } from "./items";
import { look, px } from "./look";
import type { ReleaseModel } from "./models";
import { Sums } from "./sums";

/** The paper of a vehicle that leaves as it came: findings, what was refused at what risk, the advice, and what is owed. */
export function Release({ paper, words, formats }: { paper: ReleaseModel } & Writing) {
  const { release } = paper;
  return (
    <Frame paper={paper} title={words.leftUnrepaired} words={words} formats={formats}>
      {release.notSafeToDrive && (
        <View style={look.alarm} wrap={false}>
          <Text>{words.notSafe}</Text>
          {release.acknowledgedBy ? (
            <Text
              style={{ ...look.small, color: "#ffffff" }}
            >{`${words.acknowledged} ${release.acknowledgedBy}, ${formats.instant(paper.issuedAt)}`}</Text>
          ) : null}
        </View>
      )}
      <Prose
        parts={[
          { heading: words.complaint, text: paper.complaint.trim() ? `“${paper.complaint.trim()}”` : "" },
          { heading: words.found, text: paper.cause },
          { heading: words.reason, text: release.reason },
          { heading: words.advice, text: release.safetyNote ?? "" },
        ]}
      />
      <NotDoneList list={paper.notDone} words={words} />
      {paper.jobs.length > 0 && (
        <View style={{ marginTop: px(20) }}>
          <ItemHead words={words} priceLabel={words.price} />
          <WithTotal rows={paper.jobs.flatMap((job, index) => billedRows(job, index, { words, formats }))}>
            <Sums totals={paper.totals} words={words} formats={formats} />
          </WithTotal>
        </View>
      )}
      <Proof paper={paper} words={words} />
      <Section
        heading={words.agreedTo}
        rows={authorizationRows(paper.authorizations, paper.partsReturned, { words, formats })}
      />
      <Terms warranty={paper.jobs.length > 0 ? paper.warranty : ""} legal={paper.legal} words={words} />
    </Frame>
  );
}
