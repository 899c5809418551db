import { Document, Page, Text, View } from "@react-pdf/renderer";
import type { ReactNode } from "react";
import { type Formats, groupedHash } from "./format";
import { Lines } from "./lines";
import { FOOT_TOP, look, PAGE_HEIGHT, px } from "./look";
import type { PaperBase } from "./models";
import type { Words } from "./words";

export interface Writing {
  words: Words;
  formats: Formats;
}

interface FrameProps extends Writing {
  paper: PaperBase;
  title: string;
  children: ReactNode;
}

/** The page all papers share: who writes, what it is called, for whom, for which vehicle; and the foot of every page. */
export function Frame({ paper, title, words, formats, children }: FrameProps) {
  const issued = new Date(paper.issuedAt);
  const name = `${title} ${paper.number}`;
  return (
    <Document
      title={`${name}, ${paper.shop.name}`}
      author={paper.shop.name}
      subject={`${words.case} ${paper.caseNumber}, ${paper.vehicle.label}`}
      creator="Firedeck"
      producer="Firedeck"
      language={paper.language}
      // the same data gives the same bytes: no clock is read
      creationDate={issued}
      modificationDate={issued}
    >
      <Page experimentalPagination size={paper.paper === "A4" ? "A4" : "LETTER"} style={look.page}>
        {/* first, since what repeats is taken over to the pages after the one it stands on */}
        <Foot paper={paper} name={name} words={words} />
        <Head paper={paper} title={title} />
        <Facts paper={paper} words={words} formats={formats} />
        {children}
      </Page>
    </Document>
  );
}

/** In letters; a longer one is set smaller so that it stays on one line. */
const LONG_TITLE = 16;

function Head({ paper, title }: { paper: PaperBase; title: string }) {
  const { shop } = paper;
  const contact = [shop.registration, shop.phone, shop.email].filter(Boolean).join(" · ");
  return (
    <View style={look.spread}>
      <View style={{ width: px(340) }}>
        <Lines style={look.shopName} text={shop.name} />
        <Lines style={look.small} text={[shop.address, contact].filter(Boolean).join("\n")} />
      </View>
      <View style={look.titleBlock}>
        <Text style={title.length > LONG_TITLE ? { ...look.title, ...look.longTitle } : look.title}>{title}</Text>
        <Text style={look.number}>{paper.number}</Text>
      </View>
    </View>
  );
}

function odometer(paper: PaperBase, words: Words, formats: Formats): string {
  const { odometerInKm, odometerOutKm, odometerUnreadable, distanceUnit } = paper.vehicle;
  const at = (km: number | null | undefined, word: string) =>
    km === null || km === undefined ? undefined : `${formats.distance(km)} ${distanceUnit} ${word}`;
  const known = [at(odometerInKm, words.odometerIn), at(odometerOutKm, words.odometerOut)].filter(Boolean).join(",\n");
  if (known) return known;
  return odometerUnreadable ? `${words.unreadable}: ${odometerUnreadable}` : "–";
}

function Facts({ paper, words, formats }: { paper: PaperBase } & Writing) {
  const { customer, vehicle } = paper;
  const fact = (label: string, value: string, figures = false) => (
    <View style={{ marginBottom: px(4) }}>
      <Text style={look.label}>{label}</Text>
      <Lines style={figures ? look.figures : undefined} text={value} />
    </View>
  );
  const label =
    vehicle.modelYear && !vehicle.label.includes(String(vehicle.modelYear))
      ? `${vehicle.label}, ${vehicle.modelYear}`
      : vehicle.label;
  const column = (width: number) => ({ width: px(width) });
  return (
    <View style={look.facts} wrap={false}>
      <View style={column(172)}>
        {fact(words.for, [customer.name, customer.address, customer.phone, customer.email].filter(Boolean).join("\n"))}
      </View>
      <View style={column(160)}>{fact(words.vehicle, [label, vehicle.plate].filter(Boolean).join("\n"))}</View>
      <View style={column(166)}>
        {fact(words.vin, vehicle.vin ?? "–", true)}
        {fact(words.odometer, odometer(paper, words, formats))}
      </View>
      <View style={column(146)}>
        {fact(words.case, String(paper.caseNumber))}
        {fact(words.issued, formats.instant(paper.issuedAt))}
      </View>
    </View>
  );
}

function Foot({ paper, name, words }: { paper: PaperBase; name: string; words: Words }) {
  const facts = [
    name,
    `${words.case} ${paper.caseNumber}`,
    paper.vehicle.vin ? `${words.vin} ${paper.vehicle.vin}` : null,
  ]
    .filter(Boolean)
    .join(" · ");
  const count = ({ pageNumber, totalPages }: { pageNumber: number; totalPages: number }) =>
    words.page.replace("{n}", String(pageNumber)).replace("{of}", String(totalPages));
  return (
    <>
      <View style={look.foot} fixed>
        <Lines text={facts} />
        <Text style={look.hash}>{`SHA-256 ${groupedHash(paper.sha256)}`}</Text>
      </View>
      <Text style={{ ...look.pageCount, top: px(PAGE_HEIGHT[paper.paper] - FOOT_TOP) }} render={count} fixed />
    </>
  );
}

/** Three short texts stand side by side, longer ones in pairs. */
const SHORT = 300;

/** Columns of prose: what was said, what it was. */
export function Prose({ parts }: { parts: readonly { heading: string; text: string }[] }) {
  const shown = parts.filter((part) => part.text.trim() !== "");
  const perRow = shown.length === 3 && shown.every((part) => part.text.length < SHORT) ? 3 : 2;
  const rows: (typeof shown)[] = [];
  for (let at = 0; at < shown.length; at += perRow) rows.push(shown.slice(at, at + perRow));
  const width = shown.length === 1 ? "100%" : perRow === 3 ? "31%" : "47.5%";
  return (
    <View style={{ paddingTop: px(14), paddingBottom: px(6) }}>
      {rows.map((pair) => (
        <View
          key={pair[0]!.heading}
          style={{ ...look.spread, marginBottom: px(12) }}
          wrap={pair.some((part) => part.text.length > 1200)}
        >
          {pair.map((part) => (
            <View key={part.heading} style={{ width }}>
              <Text style={look.h2} minPresenceAhead={px(32)}>
                {part.heading}
              </Text>
              <Lines text={part.text} />
            </View>
          ))}
        </View>
      ))}
    </View>
  );
}
