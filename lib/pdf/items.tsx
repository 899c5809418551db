import { Text, View } from "@react-pdf/renderer";
import type { ReactElement, ReactNode } from "react";
import type { Writing } from "./frame";
import { Lines, oneLine } from "./lines";
import { look, px } from "./look";
import type { BilledJob, PaperLine } from "./models";
import type { Words } from "./words";

/** How many of the last lines stay with the total. */
const KEPT_WITH_TOTAL = 3;

export function ItemHead({ words, priceLabel }: { words: Words; priceLabel: string }) {
  return (
    <View style={look.itemHead}>
      <Text style={{ ...look.label, ...look.what }}>{words.workAndParts}</Text>
      <Text style={{ ...look.label, ...look.quantity }}>{words.quantity}</Text>
      <Text style={{ ...look.label, ...look.each }}>{words.each}</Text>
      <Text style={{ ...look.label, ...look.price }}>{priceLabel}</Text>
    </View>
  );
}

function lineNote(line: PaperLine, words: Words): string {
  const condition = line.kind === "part" && line.condition ? words[line.condition] : null;
  return [line.partNumber ? `${words.partNumber} ${line.partNumber}` : null, condition].filter(Boolean).join(", ");
}

export function LineRow({ line, words, formats }: { line: PaperLine } & Writing) {
  const note = lineNote(line, words);
  return (
    <View style={look.line} wrap={false}>
      <Text style={{ ...look.what, paddingLeft: px(12) }}>
        {oneLine(note ? `${line.description} (${note})` : line.description)}
      </Text>
      <Text style={{ ...look.figures, ...look.quantity }}>{formats.quantity(line)}</Text>
      <Text style={{ ...look.figures, ...look.each }}>{formats.money(line.unitPriceMinor)}</Text>
      <Text style={{ ...look.figures, ...look.price }}>{formats.money(line.netMinor)}</Text>
    </View>
  );
}

/** A job's name and price; `under` says what was agreed for it. */
export function JobRow({ title, amount, under }: { title: string; amount: string; under?: string }) {
  return (
    <View style={look.jobHead}>
      <View style={look.what}>
        <Text style={look.jobTitle}>{oneLine(title)}</Text>
        {under ? <Text style={look.under}>{oneLine(under)}</Text> : null}
      </View>
      <Text style={{ ...look.figures, ...look.price, ...look.strong }}>{amount}</Text>
    </View>
  );
}

export const NoteRow = ({ text }: { text: string }) => (
  <View style={{ paddingLeft: px(12), paddingBottom: px(3) }} wrap={false}>
    <Lines style={look.under} text={text} />
  </View>
);

/** The rows of one job; its name never stands alone at the foot of a page. */
export function jobRows(key: string, head: ReactElement, rest: ReactElement[]): ReactElement[] {
  const [first, ...more] = rest;
  const opening = (
    <View key={`${key} head`} wrap={false}>
      {head}
      {first}
    </View>
  );
  return [opening, ...more];
}

/** Items with their total: the last rows and the total are one block that a page break cannot part. */
export function WithTotal({ rows, children }: { rows: ReactElement[]; children: ReactNode }) {
  const cut = Math.max(0, rows.length - KEPT_WITH_TOTAL);
  return (
    <>
      {rows.slice(0, cut)}
      <View wrap={false}>
        {rows.slice(cut)}
        {children}
      </View>
    </>
  );
}

export function billedRows(job: BilledJob, index: number, { words, formats }: Writing): ReactElement[] {
  const agreed =
    job.agreedMinor != null
      ? `${words.agreed} ${formats.money(job.agreedMinor)}, ${words.billed} ${formats.money(job.billedMinor ?? job.agreedMinor)}, ${words.withTax}`
      : undefined;
  const under = [job.note, agreed].filter(Boolean).join("; ") || undefined;
  const rest = [
    // biome-ignore lint/suspicious/noArrayIndexKey: a paper is rendered once, in this order
    ...job.lines.map((line, at) => <LineRow key={`${index} ${at}`} line={line} words={words} formats={formats} />),
    ...(job.correction ? [<NoteRow key={`${index} done`} text={job.correction} />] : []),
    ...(job.oldParts.length > 0
      ? [<NoteRow key={`${index} old`} text={`${words.oldParts}: ${job.oldParts.join("; ")}`} />]
      : []),
  ];
  return jobRows(String(index), <JobRow title={job.title} amount={formats.money(job.netMinor)} under={under} />, rest);
}
