"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import "@/lib/fault-words";
import { type ReactNode, useState } from "react";
import { type FieldPath, type SubmitErrorHandler, type UseFormRegister, useForm } from "react-hook-form";
import { Button, WhyOff } from "@/components/ui/button";
import { Bang } from "@/components/ui/icons";
import { Checkbox, Select, TextArea, TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import { ConflictView } from "@/components/ui/states";
import type { ShopSettings } from "@/lib/shops/schema";
import {
  FIELD_WORDS,
  SERVER_FIELDS,
  type ShopFormValues,
  settingsOf,
  shopFormValues,
  valuesOf,
} from "./shop-form-values";

export interface SavedShop {
  name: string;
  version: number;
  settings: ShopSettings;
}

export type SaveShop = (
  shop: SavedShop & { reason?: string },
) => Promise<
  { ok: true; version: number } | { ok: false; message: string; fields: Record<string, string>; current?: SavedShop }
>;

export interface ShopFormProps {
  shop: SavedShop;
  timeZones: readonly string[];
  currencies: readonly string[];
  save: SaveShop;
  /** After saving: the page reads its own facts anew. */
  onSaved: () => void;
}

const TAX_KINDS = [
  { value: "labour", label: "Labour" },
  { value: "part", label: "Parts" },
  { value: "sublet", label: "Sublet" },
  { value: "fee", label: "Fees" },
  { value: "diagnosis", label: "Diagnosis" },
];
const ROUNDINGS = [
  { value: "sum-then-tax", label: "Tax on the sum" },
  { value: "line-then-sum", label: "Line by line" },
];
const EXCESS = [
  { value: "any", label: "Any excess asks again" },
  { value: "lesser-10-or-10pct", label: "Up to 10 of the currency or 10 %, whichever is less" },
  { value: "greater-10-or-10pct-cap-50", label: "Up to 10 of the currency or 10 %, whichever is more, 50 at most" },
  { value: "10pct", label: "Up to 10 %" },
];

/** The shop's settings as one form; what others changed meanwhile is shown beside one's own. */
export function ShopForm({ shop, timeZones, currencies, save, onSaved }: ShopFormProps) {
  const [kept, setKept] = useState(shop);
  const [failure, setFailure] = useState("");
  const [conflict, setConflict] = useState<{ theirs: SavedShop; mine: ShopFormValues } | null>(null);
  const form = useForm<ShopFormValues>({
    resolver: zodResolver(shopFormValues),
    mode: "onTouched",
    defaultValues: valuesOf(shop.name, shop.settings),
  });
  const { register, formState, getValues, handleSubmit, setError, setFocus, setValue, reset } = form;
  const { errors, isDirty, isSubmitting } = formState;
  const error = (name: keyof ShopFormValues) => errors[name]?.message as string | undefined;
  const start = valuesOf(shop.name, shop.settings);
  const text = (name: keyof ShopFormValues) => ({
    id: `shop-${name}`,
    // written by the server too, so that the fields are filled before the scripts arrive
    defaultValue: String(start[name]),
    label: FIELD_WORDS[name],
    error: error(name),
    ...register(name),
  });

  async function send(values: ShopFormValues, over: SavedShop = kept) {
    setFailure("");
    const typed = JSON.stringify(getValues());
    const next = { name: values.name, version: over.version, settings: settingsOf(values, over.settings) };
    const answer = await save({ ...next, reason: values.reason || undefined });
    if (answer.ok) {
      setConflict(null);
      setKept({ ...next, version: answer.version });
      // what was typed while it was on its way stays
      const isStill = JSON.stringify(getValues()) === typed;
      reset(valuesOf(next.name, next.settings), { keepValues: !isStill });
      if (!isStill) setValue("reason", "", { shouldDirty: true });
      return onSaved();
    }
    if (answer.current) return setConflict({ theirs: answer.current, mine: values });
    const found = Object.entries(answer.fields).flatMap(([pointer, message]) => {
      const name = SERVER_FIELDS[pointer] ?? (pointer.replace("/settings/", "") as keyof ShopFormValues);
      return name in FIELD_WORDS ? [{ name, message }] : [];
    });
    for (const { name, message } of found) setError(name as FieldPath<ShopFormValues>, { message });
    if (found[0]) setFocus(found[0].name as FieldPath<ShopFormValues>);
    else setFailure(answer.message);
  }

  const onInvalid: SubmitErrorHandler<ShopFormValues> = (found) => {
    const [first] = Object.keys(found);
    if (first) setFocus(first as FieldPath<ShopFormValues>);
  };

  if (conflict) {
    const theirs = valuesOf(conflict.theirs.name, conflict.theirs.settings);
    return (
      <ConflictView
        who="Someone else"
        theirsHead="Theirs, saved just now"
        subject="Setting"
        fields={(Object.keys(FIELD_WORDS) as (keyof ShopFormValues)[])
          .filter((name) => name !== "reason" && String(conflict.mine[name]) !== String(theirs[name]))
          .map((name) => ({
            label: FIELD_WORDS[name],
            yours: String(conflict.mine[name]) || "empty",
            theirs: String(theirs[name]) || "empty",
          }))}
        keepTheirsLabel="Keep theirs"
        busy={isSubmitting}
        onKeepTheirs={() => {
          setKept(conflict.theirs);
          reset(theirs);
          setConflict(null);
          onSaved();
        }}
        onKeepMine={() => void send(conflict.mine, conflict.theirs)}
      />
    );
  }

  const problems = Object.keys(errors) as (keyof ShopFormValues)[];
  return (
    <form className="rec-form" noValidate onSubmit={handleSubmit((values) => send(values), onInvalid)}>
      <Part id="shop" title="The shop" note="It stands on every page the customer sees and on every paper.">
        <TextInput {...text("name")} maxLength={120} />
        <TextInput {...text("registration")} optional maxLength={80} />
        <TextArea {...text("address")} optional maxLength={300} fieldClassName="rec-wide" />
        <TextInput {...text("phone")} type="tel" optional maxLength={40} />
        <TextInput {...text("email")} type="email" optional maxLength={200} />
      </Part>
      <Part id="money" title="Money and tax" note="Sent quotes and issued papers keep what they were made with.">
        <TextInput {...text("currency")} mono maxLength={3} list="shop-currencies" />
        <TextInput {...text("locale")} mono maxLength={12} hint="As en-US: how numbers, dates and money are written." />
        <TextInput {...text("taxName")} maxLength={40} />
        <TextInput {...text("taxPercent")} mono inputMode="decimal" unit="%" />
        <Choice name="taxKinds" options={TAX_KINDS} several register={register} kept={kept} />
        <Choice name="rounding" options={ROUNDINGS} register={register} kept={kept} />
        <datalist id="shop-currencies">
          {currencies.map((code) => (
            <option key={code} value={code} />
          ))}
        </datalist>
      </Part>
      <Part id="quotes" title="Quotes and papers">
        <Choice
          name="paperWord"
          options={[
            { value: "estimate", label: "Estimate" },
            { value: "quotation", label: "Quotation" },
          ]}
          register={register}
          kept={kept}
        />
        <Choice
          name="paper"
          options={[
            { value: "A4", label: "A4" },
            { value: "Letter", label: "Letter" },
          ]}
          register={register}
          kept={kept}
        />
        <TextInput {...text("ceiling")} mono inputMode="decimal" hint="Tax included; what intake proposes." />
        <TextInput {...text("quoteValidDays")} mono inputMode="numeric" unit="days" />
        <Select
          {...text("excessRule")}
          options={EXCESS}
          fieldClassName="rec-wide"
          hint="When a total may rise over what was agreed without a new yes. Nothing ever rises silently."
        />
        <Checkbox
          id="shop-writersMaySetRates"
          className="rec-wide"
          note="Otherwise labour rates are the owner’s alone."
          defaultChecked={start.writersMaySetRates}
          {...register("writersMaySetRates")}
        >
          Service writers may change labour rates
        </Checkbox>
      </Part>
      <Part id="units" title="Units and hours" note="What is kept does not change; only how it is typed and read.">
        <Choice
          name="pressure"
          options={["kPa", "psi", "inHg"].map((value) => ({ value, label: value }))}
          register={register}
          kept={kept}
        />
        <Choice
          name="temperature"
          options={[
            { value: "C", label: "°C" },
            { value: "F", label: "°F" },
          ]}
          register={register}
          kept={kept}
        />
        <Choice
          name="distance"
          options={[
            { value: "km", label: "km" },
            { value: "mi", label: "miles" },
          ]}
          register={register}
          kept={kept}
        />
        <TextInput {...text("timeZone")} list="shop-zones" />
        <TextInput {...text("dayOpens")} type="time" mono />
        <TextInput {...text("dayCloses")} type="time" mono />
        <datalist id="shop-zones">
          {timeZones.map((zone) => (
            <option key={zone} value={zone} />
          ))}
        </datalist>
      </Part>
      <Part id="texts" title="Texts" note="They stand on quotes and invoices.">
        <TextArea {...text("warrantyText")} optional rows={3} maxLength={1000} fieldClassName="rec-wide" />
        <TextArea {...text("legalText")} optional rows={4} maxLength={2000} fieldClassName="rec-wide" />
      </Part>
      <div className="rec-formbar">
        <TextInput {...text("reason")} optional maxLength={300} hint="It is kept in the audit." />
        <div className="acts wrap">
          <Button type="submit" busy={isSubmitting} busyLabel="Saving" disabled={!isDirty} aria-describedby="shop-why">
            Save the settings
          </Button>
          {!isDirty && <WhyOff id="shop-why">Nothing is changed.</WhyOff>}
          {isDirty && (
            <Button look="quiet" onClick={() => reset()}>
              Put it back
            </Button>
          )}
        </div>
        {(failure || problems.length > 0) && (
          <div className="why" role="alert">
            <Bang />
            <span>
              {failure || (
                <>
                  Not saved yet:{" "}
                  {problems.map((name, index) => (
                    <span key={name}>
                      {index > 0 && ", "}
                      <a className="link" href={`#shop-${name}`}>
                        {FIELD_WORDS[name]}
                      </a>
                    </span>
                  ))}
                  .
                </>
              )}
            </span>
          </div>
        )}
      </div>
    </form>
  );
}

function Part({ id, title, note, children }: { id: string; title: string; note?: string; children: ReactNode }) {
  return (
    <section className="rec-part" aria-labelledby={`part-${id}`}>
      <div>
        <h2 id={`part-${id}`}>{title}</h2>
        {note && <p className="note">{note}</p>}
      </div>
      <div className="rec-fields">{children}</div>
    </section>
  );
}

type ChoiceName = "taxKinds" | "rounding" | "paper" | "paperWord" | "pressure" | "temperature" | "distance";

function Choice({
  name,
  options,
  several,
  register,
  kept,
}: {
  name: ChoiceName;
  options: readonly { value: string; label: string }[];
  several?: boolean;
  register: UseFormRegister<ShopFormValues>;
  kept: SavedShop;
}) {
  return (
    <Options
      key={kept.version}
      legend={FIELD_WORDS[name]}
      showLegend
      several={several}
      options={options}
      className={several ? "rec-wide" : undefined}
      defaultValue={valuesOf(kept.name, kept.settings)[name]}
      name={name}
      inputProps={register(name)}
    />
  );
}
