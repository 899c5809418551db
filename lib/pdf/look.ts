import type { Styles } from "@react-pdf/renderer";
import { FIGURES, TEXT, WIDE } from "./fonts";

/** The papers are drawn in CSS pixels at 96 to the inch; PDF counts 72 points to the inch. */
export const px = (pixels: number): number => pixels * 0.75;

export const INK = "#14191c";
export const SECOND = "#3e4a51";
export const LABEL = "#57646b";
export const RULE = "#d2dbdf";
export const RULE_2 = "#a9b5bb";
export const BAND = "#c6d2d8";
export const FAMILY = { lean: "#2b74da", rich: "#dc640a", spark: "#8454d4", mech: "#5b676f" } as const;

const size = (fontSize: number, line: number) => ({ fontSize: px(fontSize), lineHeight: line / fontSize });
const rule = (width: number, color: string) => ({
  borderTopWidth: px(width),
  borderTopColor: color,
  borderTopStyle: "solid" as const,
});

export const PAGE_GUTTER = 56;
export const PAGE_HEIGHT = { A4: 1122.5, Letter: 1056 } as const;
/** Where the foot's first line begins, from the lower edge. */
export const FOOT_TOP = 61;
/** Room kept free for the foot: its rule lies 69 px above the edge. */
const FOOT = 86;

const row = { flexDirection: "row" as const };

export const look = {
  page: {
    paddingTop: px(52),
    paddingHorizontal: px(PAGE_GUTTER),
    paddingBottom: px(FOOT),
    fontFamily: TEXT,
    fontWeight: 400,
    color: INK,
    ...size(11, 16),
  },
  row,
  spread: { ...row, justifyContent: "space-between" },
  small: { ...size(10, 14), color: LABEL },
  label: { ...size(9.5, 13), color: LABEL },
  figures: { fontFamily: FIGURES, ...size(10.5, 16) },
  strong: { fontWeight: 600 },
  shopName: { fontFamily: WIDE, fontWeight: 600, ...size(17, 22), marginBottom: px(4) },
  title: { fontFamily: WIDE, fontWeight: 600, ...size(26, 30), textAlign: "right" },
  longTitle: size(20, 26),
  titleBlock: { width: px(320), alignItems: "flex-end" },
  number: { fontFamily: FIGURES, ...size(13, 18), marginTop: px(2), textAlign: "right" },
  facts: {
    ...row,
    justifyContent: "space-between",
    ...rule(2, INK),
    borderBottomWidth: px(1),
    borderBottomColor: RULE_2,
    borderBottomStyle: "solid",
    marginTop: px(26),
    paddingTop: px(12),
    paddingBottom: px(12),
  },
  h2: { fontFamily: WIDE, fontWeight: 600, ...size(12, 16), marginBottom: px(2) },
  itemHead: {
    ...row,
    ...rule(1, INK),
    borderBottomWidth: px(1),
    borderBottomColor: RULE_2,
    borderBottomStyle: "solid",
    paddingTop: px(4),
    paddingBottom: px(3),
  },
  jobHead: { ...row, paddingTop: px(9), paddingBottom: px(5) },
  jobTitle: { fontWeight: 600, ...size(11.5, 16) },
  line: { ...row, ...rule(1, RULE), paddingVertical: px(4), color: SECOND },
  under: { ...size(9.5, 13), color: LABEL },
  what: { flexGrow: 1, flexShrink: 1, flexBasis: 0, paddingRight: px(12) },
  quantity: { width: px(84), textAlign: "right" },
  each: { width: px(96), textAlign: "right" },
  price: { width: px(104), textAlign: "right" },
  sums: { ...row, justifyContent: "space-between", ...rule(1, INK), marginTop: px(14), paddingTop: px(12) },
  sumRow: { ...row, justifyContent: "space-between", paddingVertical: px(3.5) },
  grand: {
    ...row,
    justifyContent: "space-between",
    ...rule(1, INK),
    marginTop: px(4),
    paddingTop: px(6),
    paddingBottom: px(3.5),
    fontWeight: 600,
    ...size(14, 20),
  },
  due: {
    ...row,
    justifyContent: "space-between",
    ...rule(1, RULE_2),
    marginTop: px(3),
    paddingTop: px(5),
    fontWeight: 600,
  },
  section: { ...rule(2, INK), marginTop: px(24), paddingTop: px(10) },
  alarm: {
    backgroundColor: INK,
    color: "#ffffff",
    padding: px(12),
    marginTop: px(16),
    fontFamily: WIDE,
    fontWeight: 600,
    ...size(14, 20),
  },
  foot: {
    position: "absolute",
    left: px(PAGE_GUTTER),
    right: px(PAGE_GUTTER),
    bottom: px(36),
    ...rule(1, RULE_2),
    paddingTop: px(8),
    ...size(9.5, 13),
    color: LABEL,
  },
  // measured from the top and dressed in full: its text is only known once the pages are, too late to inherit or to push up
  pageCount: {
    position: "absolute",
    right: px(PAGE_GUTTER),
    width: px(120),
    fontFamily: TEXT,
    fontWeight: 400,
    ...size(9.5, 13),
    color: LABEL,
    textAlign: "right",
  },
  hash: { fontFamily: FIGURES, ...size(7.5, 12) },
} satisfies Styles;
