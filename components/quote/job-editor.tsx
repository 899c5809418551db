"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Combobox } from "@/components/ui/combobox";
import { formatPrice } from "@/components/ui/format";
import { Glyph } from "@/components/ui/glyph";
import { Cross } from "@/components/ui/icons";
import { Checkbox, Select, TextArea, TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import { Words } from "@/components/ui/words";
import { lineNet, priceJob } from "@/lib/quote/job";
import { MoneyCell, QuantityCell, TextCell } from "./cell-input";
import { markupWords } from "./line-price";
import type {
  CatalogueChoice,
  CauseChoice,
  LineKind,
  QuoteJobView,
  QuoteLineDraft,
  QuoteMoney,
  RateChoice,
  Urgency,
} from "./model";

const KIND_WORDS: Record<LineKind, string> = {
  labour: "Labour",
  part: "Part",
  sublet: "Sublet",
  fee: "Fee",
  diagnosis: "Diagnosis",
};
const URGENCIES: readonly { value: Urgency; label: string }[] = [
  { value: "now", label: "Now" },
  { value: "soon", label: "Soon" },
  { value: "optional", label: "Optional" },
];

export interface JobEditorProps {
  job: QuoteJobView;
  number: number;
  causes: readonly CauseChoice[];
  others: readonly { id: string; title: string }[];
  money: QuoteMoney;
  rates: readonly RateChoice[];
  findInCatalogue?: (query: string) => Promise<CatalogueChoice[]>;
  maySeeCost: boolean;
  mayPrice: boolean;
  errors?: Record<string, string>;
  newLineId: () => string;
  onChange: (job: QuoteJobView) => void;
  onRemove: () => void;
  readOnly?: boolean;
}

/** A rule, a title, its cause with the proof, how soon, the lines, and what happens if it waits. */
export function JobEditor(props: JobEditorProps) {
  const { job, number, causes, others, money, rates, maySeeCost, mayPrice, errors = {}, onChange, readOnly } = props;
  const [isOpen, setOpen] = useState(false);
  const cause = causes.find((choice) => choice.id === job.causeId) ?? null;
  const price = priceJob(job.lines, money.tax);
  const set = (change: Partial<QuoteJobView>) => onChange({ ...job, ...change });
  const setLine = (id: string, change: Partial<QuoteLineDraft>) =>
    set({ lines: job.lines.map((line) => (line.id === id ? { ...line, ...change } : line)) });
  const add = (line: Omit<QuoteLineDraft, "id">) => set({ lines: [...job.lines, { ...line, id: props.newLineId() }] });
  const headId = `job-${job.id}`;
  return (
    <section className="job" aria-labelledby={headId}>
      <header>
        <span className="num jn">{number}</span>
        <div className="jt">
          <h2 id={headId}>{job.title || "A new job"}</h2>
          <p>
            {cause ? (
              <>
                <Glyph family={cause.family} /> <Words>{cause.title}</Words>,{" "}
                <span className="faint">{cause.note}</span>
              </>
            ) : (
              <span className="faint">no cause: asked for, or maintenance</span>
            )}
          </p>
        </div>
        <Options
          legend={`How soon, ${job.title}`}
          name={`soon-${job.id}`}
          dense
          value={job.urgency}
          onChange={(value) => set({ urgency: value as Urgency })}
          options={URGENCIES.map((u) => ({ ...u, disabled: readOnly }))}
        />
        <b className="jp num">{mayPrice ? formatPrice(price.netMinor, money.currency, money.locale) : ""}</b>
      </header>
      <div className="linewrap">
        <table className="lines">
          <thead>
            <tr>
              <th scope="col">Kind</th>
              <th scope="col">What</th>
              <th scope="col" className="r">
                Quantity
              </th>
              {maySeeCost && (
                <>
                  <th scope="col" className="r">
                    Cost
                  </th>
                  <th scope="col" className="r">
                    Markup
                  </th>
                </>
              )}
              {mayPrice && (
                <>
                  <th scope="col" className="r">
                    Each
                  </th>
                  <th scope="col" className="r">
                    Price
                  </th>
                </>
              )}
              {!readOnly && (
                <th scope="col">
                  <span className="vh">Remove</span>
                </th>
              )}
            </tr>
          </thead>
          <tbody>
            {job.lines.map((line, index) => {
              const isWork = line.kind === "labour" || line.kind === "diagnosis";
              const name = line.description || `line ${index + 1}`;
              return (
                <tr key={line.id}>
                  <td className="faint">{KIND_WORDS[line.kind]}</td>
                  <td>
                    <TextCell
                      label={`What, ${name}`}
                      value={line.description}
                      readOnly={readOnly}
                      placeholder="say what it is"
                      error={errors[`/lines/${index}/description`]}
                      onCommit={(description) => setLine(line.id, { description })}
                    />
                  </td>
                  <td className="r">
                    <QuantityCell
                      label={`Quantity, ${name}`}
                      milli={line.quantityMilli}
                      isHours={isWork}
                      readOnly={readOnly}
                      error={errors[`/lines/${index}/quantityMilli`]}
                      onCommit={(quantityMilli) => setLine(line.id, { quantityMilli })}
                    />
                  </td>
                  {maySeeCost && (
                    <>
                      <td className="r">
                        {!isWork && (
                          <MoneyCell
                            label={`Cost, ${name}`}
                            className="faint"
                            value={line.costMinor ?? null}
                            currency={money.currency}
                            locale={money.locale}
                            readOnly={readOnly}
                            isOptional
                            onCommit={(costMinor) => setLine(line.id, { costMinor })}
                          />
                        )}
                      </td>
                      <td className="r num faint">{markupWords(line)}</td>
                    </>
                  )}
                  {mayPrice && (
                    <>
                      <td className="r">
                        <MoneyCell
                          label={`Each, ${name}`}
                          value={line.unitPriceMinor}
                          currency={money.currency}
                          locale={money.locale}
                          readOnly={readOnly}
                          error={errors[`/lines/${index}/unitPriceMinor`]}
                          onCommit={(unitPriceMinor) => setLine(line.id, { unitPriceMinor: unitPriceMinor ?? 0 })}
                        />
                      </td>
                      <td className="r num">{formatPrice(lineNet(line), money.currency, money.locale)}</td>
                    </>
                  )}
                  {!readOnly && (
                    <td className="r">
                      <button
                        type="button"
                        className="rmline"
                        aria-label={`Remove ${name}`}
                        onClick={() => set({ lines: job.lines.filter((other) => other.id !== line.id) })}
                      >
                        <Cross />
                      </button>
                    </td>
                  )}
                </tr>
              );
            })}
            {job.lines.length === 0 && (
              <tr>
                <td colSpan={8} className="faint">
                  No lines yet.
                </td>
              </tr>
            )}
          </tbody>
        </table>
      </div>
      {errors.lines && <p className="why">{errors.lines}</p>}
      <div className="jf">
        {!readOnly && <AddLine rates={rates} find={props.findInCatalogue} onAdd={add} />}
        <span className="soft">
          <span className="faint">If it waits:</span> {job.ifWaits || "not said"}
        </span>
        {!readOnly && (
          <button type="button" className="link" aria-expanded={isOpen} onClick={() => setOpen(!isOpen)}>
            {isOpen ? "Less" : "Edit the words"}
          </button>
        )}
      </div>
      {isOpen && !readOnly && (
        <div className="jobmore">
          <TextInput
            id={`t-${job.id}`}
            label="Job"
            maxLength={120}
            defaultValue={job.title}
            error={errors["/title"]}
            onBlur={(e) => set({ title: e.target.value.trim() })}
          />
          <TextInput
            id={`c-${job.id}`}
            label="For the customer"
            maxLength={160}
            defaultValue={job.customerTitle}
            hint="In plain words, without a code."
            onBlur={(e) => set({ customerTitle: e.target.value.trim() })}
          />
          <TextArea
            id={`w-${job.id}`}
            label="If it waits"
            fieldClassName="wide"
            maxLength={600}
            defaultValue={job.ifWaits}
            hint="What will happen, and by when: in time or distance, not in grades."
            onBlur={(e) => set({ ifWaits: e.target.value.trim() })}
          />
          <Select
            id={`k-${job.id}`}
            label="Cause"
            placeholder="none: asked for, or maintenance"
            options={causes.map((choice) => ({ value: choice.id, label: choice.title }))}
            value={job.causeId ?? ""}
            onChange={(e) => set({ causeId: e.target.value || null })}
          />
          <Select
            id={`d-${job.id}`}
            label="Priced on the labour of"
            placeholder="nothing else"
            options={others.map((other) => ({ value: other.id, label: other.title }))}
            value={job.dependsOnId ?? ""}
            hint="Then it can only be agreed together with that job."
            onChange={(e) => set({ dependsOnId: e.target.value || null })}
          />
          <Checkbox
            checked={job.isSafety}
            onChange={(e) => set({ isSafety: e.target.checked })}
            note="A no is recorded with the risk read."
          >
            Concerns safety
          </Checkbox>
          <div className="rt">
            <Button look="ink" onClick={props.onRemove}>
              Remove the job
            </Button>
          </div>
        </div>
      )}
    </section>
  );
}

interface AddLineProps {
  rates: readonly RateChoice[];
  find?: (query: string) => Promise<CatalogueChoice[]>;
  onAdd: (line: Omit<QuoteLineDraft, "id">) => void;
}

function AddLine({ rates, find, onAdd }: AddLineProps) {
  const [isOpen, setOpen] = useState(false);
  const [found, setFound] = useState<CatalogueChoice[]>([]);
  const [query, setQuery] = useState("");
  const rate = rates[0];
  const blank = (kind: LineKind): Omit<QuoteLineDraft, "id"> => ({
    kind,
    description: query.trim(),
    quantityMilli: 1000,
    unitPriceMinor: kind === "labour" ? (rate?.perHourMinor ?? 0) : 0,
    rateId: kind === "labour" ? rate?.id : undefined,
  });
  if (!isOpen) {
    return (
      <Button look="link" onClick={() => setOpen(true)}>
        Add a line
      </Button>
    );
  }
  const free: { kind: LineKind; label: string }[] = [
    { kind: "labour", label: `Labour${query.trim() ? `: ${query.trim()}` : ""}` },
    { kind: "part", label: `Part${query.trim() ? `: ${query.trim()}` : ""}` },
    { kind: "sublet", label: "Sublet work" },
    { kind: "fee", label: "Fee" },
  ];
  return (
    <Combobox
      className="addline"
      takesFocus
      label="Add a line"
      placeholder="A part, an operation, or a new line"
      onQuery={(text) => {
        setQuery(text);
        if (find && text.trim().length > 1) void find(text.trim()).then(setFound);
        else setFound([]);
      }}
      options={[
        ...found.map((choice) => ({
          value: `c:${choice.id}`,
          label: choice.label,
          note: choice.note ?? KIND_WORDS[choice.kind],
        })),
        ...free.map((choice) => ({ value: `n:${choice.kind}`, label: choice.label, note: "new line" })),
      ]}
      onChoose={(option) => {
        const [from, id] = [option.value.slice(0, 1), option.value.slice(2)];
        const known = from === "c" ? found.find((choice) => choice.id === id) : undefined;
        onAdd(known ? known.line : blank(id as LineKind));
        setOpen(false);
        setQuery("");
      }}
    />
  );
}
