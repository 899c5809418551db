import { Circle, Line, Rect, Svg, Text, View } from "@react-pdf/renderer";
import type { ReactElement } from "react";
import { oneLine } from "./lines";
import { BAND, FAMILY, INK, LABEL, look, px, RULE, RULE_2 } from "./look";
import type { ReadingMark, ReadingRow } from "./models";
import type { Words } from "./words";

const WIDTH = 204;
const HEIGHT = 20;
const EDGE = 6;

/** The usual band always takes the middle third; beyond one band-width the mark stays at the edge. */
const place = (at: number) => Math.min(WIDTH - EDGE, Math.max(EDGE, WIDTH / 3 + (at * WIDTH) / 3));

/** Before as a ring, after as a bar: told apart without colour. */
export function BandMark({ before, after }: { before: ReadingMark | null; after: ReadingMark | null }) {
  const ring = before && (before.inside || !before.family ? LABEL : FAMILY[before.family]);
  return (
    <Svg width={px(WIDTH)} height={px(HEIGHT)} viewBox={`0 0 ${WIDTH} ${HEIGHT}`}>
      <Line x1={0} y1={10} x2={WIDTH} y2={10} stroke={RULE_2} strokeWidth={1} />
      <Rect x={WIDTH / 3} y={6.5} width={WIDTH / 3} height={7} fill={BAND} />
      {before && (
        <Circle cx={place(before.at)} cy={10} r={4.2} fill="#ffffff" stroke={ring ?? LABEL} strokeWidth={2.2} />
      )}
      {after && <Rect x={place(after.at) - 1.5} y={1} width={3} height={18} fill={INK} />}
    </Svg>
  );
}

const rowStyle = {
  flexDirection: "row" as const,
  alignItems: "center" as const,
  minHeight: px(30),
  borderTopWidth: px(1),
  borderTopColor: RULE,
  borderTopStyle: "solid" as const,
};

interface RowProps {
  row: ReadingRow;
  words: Words;
  /** Nothing was measured after a repair yet. */
  single?: boolean;
  /** The place is written once for rows that share it. */
  place?: string;
  hasPlaces: boolean;
}

function Reading({ row, words, single = false, place: where, hasPlaces }: RowProps) {
  return (
    <View style={rowStyle} wrap={false}>
      {hasPlaces && <Text style={{ width: px(150), fontWeight: 600, paddingRight: px(8) }}>{where ?? ""}</Text>}
      <Text style={{ flexGrow: 1, flexShrink: 1, flexBasis: 0, paddingRight: px(8) }}>{oneLine(row.label)}</Text>
      <Text
        style={{ ...look.figures, width: px(92), textAlign: "right", marginRight: px(14), color: single ? INK : LABEL }}
      >
        {row.before?.value ?? words.notMeasured}
      </Text>
      <BandMark before={row.before} after={row.after} />
      {!single && (
        <Text style={{ ...look.figures, fontWeight: 600, width: px(92), textAlign: "right", paddingLeft: px(8) }}>
          {row.after?.value ?? words.notMeasured}
        </Text>
      )}
    </View>
  );
}

/** Readings against their usual bands, one element a row. */
export function readingRows(rows: readonly ReadingRow[], words: Words, single = false): ReactElement[] {
  const hasPlaces = rows.some((row) => row.place);
  return rows.map((row, index) => {
    const isSamePlace = index > 0 && rows[index - 1]?.place === row.place;
    return (
      <Reading
        key={`${row.place ?? ""} ${row.label}`}
        row={row}
        words={words}
        single={single}
        place={isSamePlace ? undefined : row.place}
        hasPlaces={hasPlaces}
      />
    );
  });
}
