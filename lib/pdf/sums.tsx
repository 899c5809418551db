import { Text, View } from "@react-pdf/renderer";
import type { ReactNode } from "react";
import type { Writing } from "./frame";
import { look, px } from "./look";
import type { Amount, Totals } from "./models";

function Row({
  label,
  amount,
  style = look.sumRow,
}: {
  label: string;
  amount: string;
  style?: typeof look.sumRow | typeof look.grand | typeof look.due;
}) {
  const isGrand = style === look.grand;
  const weight = style === look.sumRow ? undefined : look.strong;
  return (
    <View style={style}>
      <Text style={{ flexGrow: 1, flexShrink: 1, flexBasis: 0, paddingRight: px(8) }}>{label}</Text>
      <Text
        style={{
          ...look.figures,
          ...weight,
          flexShrink: 0,
          ...(isGrand ? { fontSize: px(14), lineHeight: 20 / 14 } : {}),
        }}
      >
        {amount}
      </Text>
    </View>
  );
}

/** The sums at the right, with `beside` at their left. */
export function Sums({
  totals,
  extra = [],
  beside,
  words,
  formats,
}: { totals: Totals; extra?: Amount[]; beside?: ReactNode } & Writing) {
  const { discounts = [], payments = [], taxes } = totals;
  const less = (amount: Amount) => (
    <Row
      key={amount.label}
      label={amount.label}
      amount={formats.money(amount.amountMinor === 0 ? 0 : -amount.amountMinor)}
    />
  );
  return (
    <View style={look.sums} wrap={false}>
      <View style={{ width: px(370) }}>{beside}</View>
      <View style={{ width: px(264) }}>
        {discounts.map(less)}
        <Row label={words.beforeTax} amount={formats.money(totals.netMinor)} />
        {taxes.map((tax) => (
          <Row key={tax.label} label={tax.label} amount={formats.money(tax.amountMinor)} />
        ))}
        <Row label={words.total} amount={formats.money(totals.totalMinor)} style={look.grand} />
        {extra.map((amount) => (
          <Row key={amount.label} label={amount.label} amount={formats.money(amount.amountMinor)} />
        ))}
        {payments.map(less)}
        {totals.owingMinor !== undefined && (
          <Row label={words.owing} amount={formats.money(totals.owingMinor)} style={look.due} />
        )}
      </View>
    </View>
  );
}
