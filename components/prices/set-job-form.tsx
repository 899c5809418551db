"use client";

import { type FormEvent, useId, useRef, useState } from "react";
import { Button } from "@/components/ui/button";
import { formatPrice, formatQuantity } from "@/components/ui/format";
import { Bang } from "@/components/ui/icons";
import { Checkbox, Select, TextArea, TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import { moneyEntry, parseMoney, parseNumber } from "@/components/ui/parse-entry";
import { LINE_KINDS, type LineKind, type QuoteLineDraft } from "@/lib/cases/quote-schema";
import { KIND_WORDS, type SetJobDraft } from "./model";

/** A line as it is typed. */
interface TypedLine {
  key: string;
  kind: LineKind;
  description: string;
  quantity: string;
  each: string;
  cost: string;
  partNumber: string;
  rateId: string;
  kept: QuoteLineDraft | null;
}

export interface SetJobFormProps {
  job: SetJobDraft;
  causes: readonly { value: string; label: string }[];
  rates: readonly { id: string; name: string; perHourMinor: number }[];
  currency: string;
  locale: string;
  maySeeCost: boolean;
  busy: boolean;
  /** A refusal that belongs to no field. */
  failure: string;
  onSave: (job: SetJobDraft) => void;
  onLeave: () => void;
}

function typedOf(line: QuoteLineDraft, currency: string): TypedLine {
  return {
    key: line.id,
    kind: line.kind,
    description: line.description,
    quantity: formatQuantity(line.quantityMilli),
    each: moneyEntry(line.unitPriceMinor, currency),
    cost: line.costMinor == null ? "" : moneyEntry(line.costMinor, currency),
    partNumber: line.partNumber ?? "",
    rateId: line.rateId ?? "",
    kept: line,
  };
}

/** A set job and its lines. Typing an amount that can't be read is said at its line and nothing is sent. */
export function SetJobForm(props: SetJobFormProps) {
  const { job, causes, rates, currency, locale, maySeeCost } = props;
  const id = useId();
  const form = useRef<HTMLFormElement>(null);
  const [lines, setLines] = useState(() => job.lines.map((line) => typedOf(line, currency)));
  const [faults, setFaults] = useState<Record<string, string>>({});
  const change = (key: string, part: Partial<TypedLine>) =>
    setLines(lines.map((line) => (line.key === key ? { ...line, ...part } : line)));

  function add(kind: LineKind) {
    const [rate] = rates;
    setLines([
      ...lines,
      {
        key: `ln_${crypto.randomUUID().slice(0, 12)}`,
        kind,
        description: "",
        quantity: "1",
        each: kind === "labour" && rate ? moneyEntry(rate.perHourMinor, currency) : "",
        cost: "",
        partNumber: "",
        rateId: kind === "labour" && rate ? rate.id : "",
        kept: null,
      },
    ]);
  }

  function readLines(found: Record<string, string>): QuoteLineDraft[] {
    return lines.flatMap((line) => {
      const quantity = parseNumber(line.quantity);
      const each = parseMoney(line.each, currency);
      const cost = line.cost.trim() === "" ? null : parseMoney(line.cost, currency);
      if (line.description.trim() === "") found[line.key] = "Say what it is.";
      else if (quantity === null || quantity <= 0) found[line.key] = "The quantity is not a number above zero.";
      else if (each === null || each < 0) found[line.key] = "The price each is not an amount of money.";
      else if (line.cost.trim() !== "" && (cost === null || cost < 0)) found[line.key] = "The cost is not an amount.";
      else
        return [
          {
            ...(line.kept ?? {}),
            id: line.key,
            kind: line.kind,
            description: line.description.trim(),
            quantityMilli: Math.round(quantity * 1000),
            unitPriceMinor: each,
            costMinor: cost,
            partNumber: line.partNumber.trim() || null,
            condition: line.kept?.condition ?? (line.kind === "part" ? "new" : null),
            rateId: line.rateId || null,
          },
        ];
      return [];
    });
  }

  function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const data = new FormData(event.currentTarget);
    const text = (name: string) => String(data.get(name) ?? "").trim();
    const found: Record<string, string> = {};
    if (!text("name")) found.name = "The set job needs a name.";
    if (!text("customerTitle")) found.customerTitle = "Say what the customer reads.";
    const read = readLines(found);
    setFaults(found);
    const [first] = Object.keys(found);
    if (first) return form.current?.querySelector<HTMLElement>(`[data-fault="${CSS.escape(first)}"]`)?.focus();
    props.onSave({
      ...job,
      name: text("name"),
      customerTitle: text("customerTitle"),
      causeId: text("causeId") || null,
      urgency: (text("urgency") || "now") as SetJobDraft["urgency"],
      ifWaits: text("ifWaits"),
      isActive: data.get("isActive") === "on",
      lines: read,
    });
  }

  const net = lines.reduce((sum, line) => {
    const quantity = parseNumber(line.quantity);
    const each = parseMoney(line.each, currency);
    return quantity === null || each === null ? sum : sum + Math.round(quantity * each);
  }, 0);

  return (
    <form ref={form} className="stack edit-wide" noValidate onSubmit={submit}>
      <TextInput
        id={`${id}-name`}
        name="name"
        label="Name"
        maxLength={120}
        defaultValue={job.name}
        error={faults.name}
        data-fault="name"
      />
      <TextInput
        id={`${id}-title`}
        name="customerTitle"
        label="Its name for the customer"
        maxLength={160}
        defaultValue={job.customerTitle}
        error={faults.customerTitle}
        data-fault="customerTitle"
      />
      <Select
        id={`${id}-cause`}
        name="causeId"
        label="Offered when this cause is marked"
        placeholder="no cause: asked for, or maintenance"
        options={causes}
        defaultValue={job.causeId ?? ""}
      />
      <Options
        legend="How soon"
        showLegend
        name="urgency"
        options={[
          { value: "now", label: "Needed now" },
          { value: "soon", label: "Soon" },
          { value: "optional", label: "As you like" },
        ]}
        defaultValue={job.urgency}
      />
      <TextArea
        id={`${id}-waits`}
        name="ifWaits"
        label="If it waits"
        hint="In the customer’s words: what happens, and when."
        optional
        maxLength={600}
        fieldClassName="edit-full"
        defaultValue={job.ifWaits}
      />
      <fieldset className="edit-full rec-lines">
        <legend>Lines, before tax</legend>
        {lines.map((line, index) => (
          <fieldset key={line.key} className="rec-line">
            <legend className="vh">
              Line {index + 1}, {KIND_WORDS[line.kind].toLowerCase()}
            </legend>
            <span className="label rec-linekind">{KIND_WORDS[line.kind]}</span>
            <TextInput
              id={`${id}-${line.key}-what`}
              label="What"
              maxLength={200}
              value={line.description}
              data-fault={line.key}
              onChange={(event) => change(line.key, { description: event.target.value })}
              fieldClassName="rec-what"
              error={faults[line.key]}
            />
            {line.kind === "labour" ? (
              <Select
                id={`${id}-${line.key}-rate`}
                label="Rate"
                placeholder="by hand"
                options={rates.map((rate) => ({ value: rate.id, label: rate.name }))}
                value={line.rateId}
                onChange={(event) => {
                  const rate = rates.find((each) => each.id === event.target.value);
                  change(line.key, {
                    rateId: event.target.value,
                    ...(rate ? { each: moneyEntry(rate.perHourMinor, currency) } : {}),
                  });
                }}
              />
            ) : (
              <TextInput
                id={`${id}-${line.key}-number`}
                label="Number"
                mono
                optional
                maxLength={60}
                value={line.partNumber}
                onChange={(event) => change(line.key, { partNumber: event.target.value })}
              />
            )}
            <TextInput
              id={`${id}-${line.key}-quantity`}
              label={line.kind === "labour" || line.kind === "diagnosis" ? "Hours" : "Quantity"}
              mono
              inputMode="decimal"
              value={line.quantity}
              onChange={(event) => change(line.key, { quantity: event.target.value })}
            />
            <TextInput
              id={`${id}-${line.key}-each`}
              label="Each"
              mono
              inputMode="decimal"
              value={line.each}
              onChange={(event) => change(line.key, { each: event.target.value })}
            />
            {maySeeCost && (
              <TextInput
                id={`${id}-${line.key}-cost`}
                label="Cost"
                mono
                inputMode="decimal"
                value={line.cost}
                onChange={(event) => change(line.key, { cost: event.target.value })}
              />
            )}
            <Button
              look="link"
              aria-label={`Take out line ${index + 1}${line.description ? `, ${line.description}` : ""}`}
              onClick={() => setLines(lines.filter((each) => each.key !== line.key))}
            >
              Take out
            </Button>
          </fieldset>
        ))}
        <div className="acts wrap">
          {LINE_KINDS.filter((kind) => kind !== "diagnosis").map((kind) => (
            <Button key={kind} look="quiet" small onClick={() => add(kind)}>
              Add {kind === "part" ? "a part" : kind === "fee" ? "a fee" : kind}
            </Button>
          ))}
          <span className="num rec-net" aria-live="polite">
            {formatPrice(net, currency, locale)}
          </span>
        </div>
      </fieldset>
      {job.id && (
        <div className="edit-full">
          <Checkbox
            id={`${id}-active`}
            name="isActive"
            defaultChecked={job.isActive}
            note="Quotes already written keep it."
          >
            Offered for new quotes
          </Checkbox>
        </div>
      )}
      {!job.id && <input type="hidden" name="isActive" value="on" />}
      {props.failure && (
        <p className="why edit-full" role="alert">
          <Bang />
          <span>{props.failure}</span>
        </p>
      )}
      <div className="acts edit-full">
        <Button type="submit" busy={props.busy} busyLabel="Saving">
          Save the set job
        </Button>
        <Button look="quiet" onClick={props.onLeave}>
          Leave it
        </Button>
      </div>
    </form>
  );
}
