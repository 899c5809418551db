"use client";

import { type FormEvent, useState } from "react";
import { Button } from "@/components/ui/button";
import { Checkbox, Select, TextArea, TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import { moneyEntry, parseMoney, parseNumber } from "@/components/ui/parse-entry";
import type { ShopSettings } from "@/lib/shops/schema";

export type SettingsResult = { ok: true } | { ok: false; message: string; fieldErrors?: Record<string, string> };

export interface SettingsFormProps {
  name: string;
  settings: ShopSettings;
  currencies: readonly string[];
  /** Left out where the person may only read. */
  onSave?: (input: { name: string; settings: ShopSettings; reason?: string }) => Promise<SettingsResult>;
}

const KINDS = [
  { value: "labour", label: "Labour" },
  { value: "part", label: "Parts" },
  { value: "sublet", label: "Sublet" },
  { value: "fee", label: "Fees" },
  { value: "diagnosis", label: "Diagnosis" },
] as const;
const EXCESS = [
  { value: "any", label: "Any cent over what was agreed asks again" },
  { value: "lesser-10-or-10pct", label: "10 or 10 %, whichever is less, without asking" },
  { value: "greater-10-or-10pct-cap-50", label: "10 or 10 %, whichever is more, up to 50" },
  { value: "10pct", label: "Up to 10 % without asking" },
];

/** The shop's own settings, one form; every change with its reason. */
export function SettingsForm({ name, settings, currencies, onSave }: SettingsFormProps) {
  const [units, setUnits] = useState(settings.units);
  const [taxKinds, setTaxKinds] = useState<readonly string[]>(settings.taxKinds);
  const [rounding, setRounding] = useState(settings.rounding);
  const [paper, setPaper] = useState(settings.paper);
  const [word, setWord] = useState(settings.paperWord);
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [message, setMessage] = useState<{ isFault: boolean; text: string } | null>(null);
  const [isBusy, setBusy] = useState(false);
  const off = !onSave;
  const error = (key: string) => errors[`/settings/${key}`] ?? errors[`/${key}`];

  async function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    if (!onSave) return;
    const form = new FormData(event.currentTarget);
    const text = (key: string) => String(form.get(key) ?? "").trim();
    const taxPercent = parseNumber(text("tax")) ?? 0;
    const currency = text("currency") || settings.currency;
    setBusy(true);
    setMessage(null);
    const result = await onSave({
      name: text("name"),
      reason: text("reason") || undefined,
      settings: {
        ...settings,
        address: text("address"),
        phone: text("phone"),
        email: text("email"),
        registration: text("registration"),
        locale: text("locale") || settings.locale,
        timeZone: text("timeZone"),
        currency,
        paper,
        paperWord: word,
        taxName: text("taxName"),
        taxBasisPoints: Math.round(taxPercent * 100),
        taxKinds: taxKinds as ShopSettings["taxKinds"],
        rounding,
        excessRule: text("excessRule") as ShopSettings["excessRule"],
        defaultCeilingMinor: parseMoney(text("defaultCeiling"), currency) ?? settings.defaultCeilingMinor,
        quoteValidDays: parseNumber(text("quoteValidDays")) ?? settings.quoteValidDays,
        writersMaySetRates: form.get("writersMaySetRates") !== null,
        units,
        warrantyText: text("warrantyText"),
        legalText: text("legalText"),
        dayOpens: text("dayOpens"),
        dayCloses: text("dayCloses"),
      },
    });
    setBusy(false);
    setErrors(result.ok ? {} : (result.fieldErrors ?? {}));
    setMessage(result.ok ? { isFault: false, text: "Saved." } : { isFault: true, text: result.message });
  }

  return (
    <form className="settings" onSubmit={submit} noValidate>
      <section className="fs" aria-labelledby="set-shop">
        <h2 id="set-shop">The shop</h2>
        <div className="fg">
          <TextInput
            id="name"
            name="name"
            label="Name"
            defaultValue={name}
            maxLength={120}
            disabled={off}
            error={error("name")}
          />
          <TextInput
            id="registration"
            name="registration"
            label="Licence or registration"
            optional
            defaultValue={settings.registration}
            maxLength={80}
            disabled={off}
          />
          <TextInput
            id="address"
            name="address"
            label="Address"
            fieldClassName="wide"
            defaultValue={settings.address}
            maxLength={300}
            disabled={off}
          />
          <TextInput
            id="phone"
            name="phone"
            label="Phone"
            mono
            type="tel"
            defaultValue={settings.phone}
            maxLength={40}
            disabled={off}
          />
          <TextInput
            id="email"
            name="email"
            label="E-mail"
            type="email"
            defaultValue={settings.email}
            maxLength={200}
            disabled={off}
          />
          <TextInput
            id="dayOpens"
            name="dayOpens"
            label="Opens"
            mono
            inputMode="numeric"
            maxLength={5}
            hint="24 hours, as 08:00"
            defaultValue={settings.dayOpens}
            disabled={off}
          />
          <TextInput
            id="dayCloses"
            name="dayCloses"
            label="Closes"
            mono
            inputMode="numeric"
            maxLength={5}
            hint="24 hours, as 08:00"
            defaultValue={settings.dayCloses}
            disabled={off}
          />
          <TextInput
            id="timeZone"
            name="timeZone"
            label="Time zone"
            defaultValue={settings.timeZone}
            hint="As Europe/Lisbon; every time is shown in it."
            disabled={off}
            error={error("timeZone")}
          />
          <TextInput
            id="locale"
            name="locale"
            label="How numbers are written"
            defaultValue={settings.locale}
            hint="As en-US or de-DE."
            disabled={off}
            error={error("locale")}
          />
        </div>
      </section>
      <section className="fs" aria-labelledby="set-units">
        <h2 id="set-units">Units</h2>
        <div className="fg">
          <Options
            legend="Pressure"
            showLegend
            name="u-pressure"
            value={units.pressure}
            onChange={(v) => setUnits({ ...units, pressure: v as typeof units.pressure })}
            options={["kPa", "psi", "inHg"].map((v) => ({ value: v, label: v, disabled: off }))}
          />
          <Options
            legend="Temperature"
            showLegend
            name="u-temperature"
            value={units.temperature}
            onChange={(v) => setUnits({ ...units, temperature: v as typeof units.temperature })}
            options={[
              { value: "C", label: "°C", disabled: off },
              { value: "F", label: "°F", disabled: off },
            ]}
          />
          <Options
            legend="Distance"
            showLegend
            name="u-distance"
            value={units.distance}
            onChange={(v) => setUnits({ ...units, distance: v as typeof units.distance })}
            options={["km", "mi"].map((v) => ({ value: v, label: v, disabled: off }))}
          />
        </div>
      </section>
      <section className="fs" aria-labelledby="set-money">
        <h2 id="set-money">Money and tax</h2>
        <div className="fg">
          <Select
            id="currency"
            name="currency"
            label="Currency"
            defaultValue={settings.currency}
            options={currencies.map((c) => ({ value: c, label: c }))}
            disabled={off}
            error={error("currency")}
          />
          <TextInput
            id="defaultCeiling"
            name="defaultCeiling"
            label="Usual ceiling for diagnosis, tax included"
            mono
            inputMode="decimal"
            defaultValue={moneyEntry(settings.defaultCeilingMinor, settings.currency)}
            disabled={off}
            error={error("defaultCeilingMinor")}
          />
          <TextInput
            id="taxName"
            name="taxName"
            label="Tax is called"
            defaultValue={settings.taxName}
            maxLength={40}
            disabled={off}
          />
          <TextInput
            id="tax"
            name="tax"
            label="Tax"
            unit="%"
            mono
            inputMode="decimal"
            defaultValue={String(settings.taxBasisPoints / 100)}
            disabled={off}
            error={error("taxBasisPoints")}
          />
          <Options
            legend="Taxed"
            showLegend
            className="wide"
            several
            name="taxKinds"
            value={taxKinds}
            onChange={(v, on) => setTaxKinds(on ? [...taxKinds, v] : taxKinds.filter((k) => k !== v))}
            options={KINDS.map((k) => ({ ...k, disabled: off }))}
          />
          <Options
            legend="Tax is rounded"
            showLegend
            className="wide"
            name="rounding"
            value={rounding}
            onChange={(v) => setRounding(v as typeof rounding)}
            options={[
              { value: "sum-then-tax", label: "Once, over the sum of a job", disabled: off },
              { value: "line-then-sum", label: "Line by line", disabled: off },
            ]}
          />
          <Select
            id="excessRule"
            name="excessRule"
            label="More than was agreed"
            fieldClassName="wide"
            defaultValue={settings.excessRule}
            options={EXCESS}
            hint="Nothing ever rises silently: what goes through is named on the paper."
            disabled={off}
          />
          <Checkbox name="writersMaySetRates" defaultChecked={settings.writersMaySetRates} disabled={off}>
            Service writers may change rates
          </Checkbox>
        </div>
      </section>
      <section className="fs" aria-labelledby="set-papers">
        <h2 id="set-papers">Papers</h2>
        <div className="fg">
          <Options
            legend="A quote is called"
            showLegend
            name="paperWord"
            value={word}
            onChange={(v) => setWord(v as typeof word)}
            options={[
              { value: "estimate", label: "Estimate", disabled: off },
              { value: "quotation", label: "Quotation", disabled: off },
            ]}
          />
          <Options
            legend="Sheet"
            showLegend
            name="paper"
            value={paper}
            onChange={(v) => setPaper(v as typeof paper)}
            options={[
              { value: "A4", label: "A4", disabled: off },
              { value: "Letter", label: "Letter", disabled: off },
            ]}
          />
          <TextInput
            id="quoteValidDays"
            name="quoteValidDays"
            label="A link works for"
            unit="days"
            mono
            inputMode="numeric"
            defaultValue={String(settings.quoteValidDays)}
            disabled={off}
            error={error("quoteValidDays")}
          />
          <TextArea
            id="warrantyText"
            name="warrantyText"
            label="Warranty"
            fieldClassName="wide"
            defaultValue={settings.warrantyText}
            maxLength={1000}
            disabled={off}
          />
          <TextArea
            id="legalText"
            name="legalText"
            label="What the law wants said"
            optional
            fieldClassName="wide"
            defaultValue={settings.legalText}
            maxLength={2000}
            disabled={off}
          />
        </div>
      </section>
      {onSave && (
        <footer className="formbar">
          <TextInput id="reason" name="reason" label="Reason" optional maxLength={300} />
          <Button type="submit" busy={isBusy} busyLabel="Saving">
            Save the settings
          </Button>
          {message && (
            <span className={message.isFault ? "alarm" : "soft"} role={message.isFault ? "alert" : "status"}>
              {message.text}
            </span>
          )}
        </footer>
      )}
    </form>
  );
}
