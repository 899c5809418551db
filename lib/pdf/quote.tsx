import { Text, View } from "@react-pdf/renderer";
import type { ReactElement } from "react";
import { Section, Terms } from "./closing";
import { Frame, Prose, type Writing } from "./frame";
import { ItemHead, JobRow, jobRows, LineRow, NoteRow, WithTotal } from "./items";
import { Lines } from "./lines";
import { INK, look, px } from "./look";
import { readingRows } from "./marks";
import type { OfferedJob, QuoteModel } from "./models";
import { Sums } from "./sums";

const box = {
  width: px(11),
  height: px(11),
  borderWidth: px(1.2),
  borderColor: INK,
  borderStyle: "solid" as const,
  marginRight: px(5),
  marginTop: px(1),
};

function Choice({ words }: { words: Writing["words"] }) {
  return (
    <View style={{ ...look.row, paddingLeft: px(12), paddingTop: px(4), paddingBottom: px(4) }} wrap={false}>
      <View style={box} />
      <Text style={{ marginRight: px(20) }}>{words.yes}</Text>
      <View style={box} />
      <Text>{words.notNow}</Text>
    </View>
  );
}

function offeredRows(job: OfferedJob, index: number, { words, formats }: Writing): ReactElement[] {
  const urgency = { now: words.neededNow, soon: words.soon, optional: words.optional }[job.urgency];
  const under = [
    `${urgency}, ${words.withTax}`,
    job.isSafety ? words.safety : null,
    job.needs ? `${words.needs}: ${job.needs}` : null,
  ]
    .filter(Boolean)
    .join(" · ");
  const rest = [
    // biome-ignore lint/suspicious/noArrayIndexKey: a paper is rendered once, in this order
    ...job.lines.map((line, at) => <LineRow key={`${index} ${at}`} line={line} words={words} formats={formats} />),
    ...(job.ifWaits ? [<NoteRow key={`${index} waits`} text={`${words.ifWaits}: ${job.ifWaits}`} />] : []),
    <Choice key={`${index} choice`} words={words} />,
  ];
  return jobRows(
    String(index),
    <JobRow title={job.title} amount={formats.money(job.totalMinor)} under={under} />,
    rest,
  );
}

/** The quote on paper, for who wants to read or sign it away from a screen. Prices of jobs are with tax, as on the customer's page. */
export function Quote({ paper, words, formats }: { paper: QuoteModel } & Writing) {
  const before = paper.agreed.map((each) => (
    <JobRow
      key={`agreed ${each.label}`}
      title={each.label}
      under={`${words.agreedBefore}, ${words.withTax}`}
      amount={formats.money(each.amountMinor)}
    />
  ));
  const rows = [...before, ...paper.jobs.flatMap((job, index) => offeredRows(job, index, { words, formats }))];
  return (
    <Frame paper={paper} title={words[paper.word]} words={words} formats={formats}>
      <Prose
        parts={[
          { heading: words.complaint, text: paper.complaint.trim() ? `“${paper.complaint.trim()}”` : "" },
          { heading: paper.headline || words.found, text: paper.finding },
        ]}
      />
      {paper.readings.length > 0 && (
        <>
          <Section
            heading={paper.readingsTitle}
            aside={words.legendOne}
            rows={readingRows(paper.readings, words, true)}
            strength={1}
          />
          <Lines style={{ ...look.small, marginTop: px(4), marginBottom: px(16) }} text={paper.readingsNote || " "} />
        </>
      )}
      <ItemHead words={words} priceLabel={words.price} />
      <WithTotal rows={rows}>
        <Sums
          totals={{ netMinor: paper.totals.netMinor, taxes: paper.totals.taxes, totalMinor: paper.totals.totalMinor }}
          extra={[{ label: `${words.neededNow}, ${words.withTax}`, amountMinor: paper.totals.neededNowMinor }]}
          beside={<Conditions paper={paper} words={words} formats={formats} />}
          words={words}
          formats={formats}
        />
      </WithTotal>
      <View style={look.section} wrap={false}>
        <Text style={look.h2}>{words.answer}</Text>
        <Text style={{ marginBottom: px(34) }}>{words.answerHow}</Text>
        <Text
          style={{
            ...look.label,
            borderTopWidth: px(1),
            borderTopColor: INK,
            borderTopStyle: "solid",
            paddingTop: px(3),
          }}
        >
          {words.sign}
        </Text>
      </View>
      <Terms warranty={paper.warranty} legal={paper.legal} words={words} />
    </Frame>
  );
}

function Conditions({ paper, words, formats }: { paper: QuoteModel } & Writing) {
  const lines = [
    `${words.revision} ${paper.revision}`,
    `${words.stands} ${formats.instant(paper.validUntil)}`,
    ...(paper.readyAt ? [`${words.ready}: ${formats.instant(paper.readyAt)}`] : []),
    paper.keepParts ? words.keep : words.noKeep,
  ];
  return <Lines text={lines.join("\n")} />;
}
