"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { type ReactNode, useEffect, useMemo, useRef, useState } from "react";
import { type SubmitErrorHandler, useForm } from "react-hook-form";
import { Button, WhyOff } from "@/components/ui/button";
import { Combobox } from "@/components/ui/combobox";
import { formatClock, formatNumber, formatPrice } from "@/components/ui/format";
import { type GateItem, TodoList } from "@/components/ui/gate";
import { Checkbox, Select, TextArea, TextInput } from "@/components/ui/inputs";
import { Options } from "@/components/ui/options";
import { moneyEntry, parseMoney, parseNumber } from "@/components/ui/parse-entry";
import { SaveState } from "@/components/ui/save-state";
import { useShortcuts } from "@/components/ui/shortcuts";
import { kmInternal, kmShown, type UnitPrefs } from "@/components/ui/units";
import { isoToZoned } from "@/components/ui/zoned-time";
import { ARRIVAL_LABELS, ARRIVALS, AUTHORIZATION_LABELS, AUTHORIZATION_WAYS } from "@/lib/cases/schema";
import { CIRCUMSTANCE_LABELS, CIRCUMSTANCES, HISTORIES, HISTORY_LABELS } from "@/lib/diagnosis/vocabulary";
import { ComplaintPicker } from "./complaint-picker";
import { EngineFields } from "./engine-fields";
import {
  FIELD_WORDS,
  type NewCaseValues,
  newCaseSchema,
  newCaseValues,
  SERVER_FIELDS,
  toOpenCase,
} from "./form-schema";
import { IntakeCautions } from "./intake-cautions";
import type { CustomerChoice, OpenCase } from "./model";
import { useDraft } from "./use-draft";
import { VinField } from "./vin-field";

export interface NewCaseFormProps {
  /** Finds customers by name, phone, e-mail, plate or VIN. */
  findCustomers: (query: string) => Promise<CustomerChoice[]>;
  openCase: OpenCase;
  /** Called after the case exists; the page goes there. */
  go: (href: string) => void;
  /** A customer chosen before (from a vehicle's page, or a comeback). */
  customer?: CustomerChoice;
  vehicleId?: string;
  technicians: readonly { id: string; name: string }[];
  currency: string;
  locale: string;
  timeZone: string;
  now: string;
  units: UnitPrefs;
  defaultCeilingMinor: number;
  /** A technician may take in a walk-in, but not record the yes to the diagnosis. */
  mayAuthorize: boolean;
  /** A place for photos, once the case exists or before. */
  photos?: ReactNode;
  /** Distinguishes drafts of several shops on one device. */
  draftKey: string;
}

export function NewCaseForm(props: NewCaseFormProps) {
  const { currency, locale, timeZone, now, units, mayAuthorize } = props;
  const context = useMemo(() => ({ currency, timeZone, now, units }), [currency, timeZone, now, units]);
  const schema = useMemo(() => newCaseSchema(context), [context]);
  const [customer, setCustomer] = useState<CustomerChoice | null>(props.customer ?? null);
  const [found, setFound] = useState<CustomerChoice[]>([]);
  const [isVinLeft, setVinLeft] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const [sending, setSending] = useState<"intake" | "testing" | null>(null);
  const draft = useDraft<NewCaseValues & { customer: CustomerChoice | null }>(`fd-draft-case-${props.draftKey}`);

  const form = useForm<NewCaseValues>({
    resolver: zodResolver(schema),
    mode: "onTouched",
    defaultValues: {
      customerId: props.customer?.id ?? "",
      name: "",
      phone: "",
      email: "",
      vehicleId: props.vehicleId ?? (props.customer?.vehicles.length === 1 ? props.customer.vehicles[0]!.id : ""),
      label: "",
      modelYear: "",
      plate: "",
      vin: "",
      vinKept: false,
      vinReason: "",
      engine: {},
      odometer: "",
      isOdometerUnreadable: false,
      odometerReason: "",
      words: "",
      complaints: [],
      circumstances: [],
      history: [],
      conditionNote: "",
      arrival: "drop-off",
      promised: "",
      technicianId: "",
      ceiling: moneyEntry(props.defaultCeilingMinor, currency),
      isAuthorized: false,
      givenBy: props.customer?.name ?? "",
      how: "in-person",
      contact: "",
      keepParts: false,
      roadTestAllowed: true,
    },
  });
  const { register, watch, setValue, formState } = form;
  const errors = formState.errors;
  const v = watch();
  const vehicle = customer?.vehicles.find((choice) => choice.id === v.vehicleId) ?? null;

  // A draft of an earlier sitting comes back once, unless the page was opened for a certain customer.
  const restored = useRef(false);
  useEffect(() => {
    if (restored.current) return;
    restored.current = true;
    if (props.customer) return;
    const kept = draft.read();
    const parsed = newCaseValues.partial().safeParse(kept);
    if (!kept || !parsed.success) return;
    form.reset({ ...form.getValues(), ...parsed.data } as NewCaseValues);
    setCustomer(kept.customer ?? null);
  }, [draft.read, form, props.customer]);
  useEffect(() => {
    const subscription = watch((values) => draft.save({ ...(values as NewCaseValues), customer }));
    return () => subscription.unsubscribe();
  }, [watch, draft.save, customer]);

  const query = useRef(0);
  async function search(text: string) {
    const mine = ++query.current;
    if (text.trim().length < 2) return setFound([]);
    const hits = await props.findCustomers(text.trim());
    if (mine === query.current) setFound(hits);
  }

  function chooseCustomer(choice: CustomerChoice | null) {
    setCustomer(choice);
    setValue("customerId", choice?.id ?? "", { shouldDirty: true });
    setValue("vehicleId", choice?.vehicles.length === 1 ? choice.vehicles[0]!.id : "");
    if (choice) setValue("givenBy", choice.name);
    form.clearErrors(["name", "label"]);
  }

  async function send(values: NewCaseValues, then: "intake" | "testing") {
    setFailure(null);
    setSending(then);
    try {
      const result = await props.openCase(toOpenCase(values, context), then);
      if (result.ok) {
        draft.clear();
        props.go(result.href);
        return;
      }
      setFailure(result.message);
      let isFirst = true;
      for (const [pointer, reason] of Object.entries(result.fieldErrors ?? {})) {
        const field = SERVER_FIELDS[pointer];
        if (!field) continue;
        form.setError(field, { type: "server", message: reason }, { shouldFocus: isFirst });
        isFirst = false;
      }
    } catch {
      setFailure("The case was not saved: no answer came. What you typed is kept on this device.");
    }
    setSending(null);
  }

  const onFault: SubmitErrorHandler<NewCaseValues> = () => setFailure(null);
  const submit = (then: "intake" | "testing") => form.handleSubmit((values) => send(values, then), onFault)();

  const hasOdometer = v.isOdometerUnreadable ? v.odometerReason !== "" : v.odometer !== "";
  const ready: GateItem[] = [
    { label: "Vehicle", isMet: Boolean(v.vehicleId || v.label) },
    { label: "Complaint", isMet: v.words.trim() !== "" },
    { label: "Odometer in", isMet: hasOdometer, note: hasOdometer ? undefined : "or why it can’t be read" },
    {
      label: "Authorization for diagnosis",
      isMet: v.isAuthorized,
      note: v.isAuthorized ? undefined : mayAuthorize ? "tick the agreement" : "the counter records it",
    },
  ];
  const faults = (Object.keys(errors) as (keyof NewCaseValues)[]).filter((key) => FIELD_WORDS[key]);
  const isReady = ready.every((item) => item.isMet) && faults.length === 0;
  const ceilingMinor = parseMoney(v.ceiling, currency);
  const odometerHint = odometerWords(v.odometer, vehicle?.lastOdometer ?? null, units, locale);

  useShortcuts([{ keys: "Ctrl+Enter", what: "save", run: () => submit(isReady ? "testing" : "intake") }]);

  return (
    <main id="main" className="nc">
      <div className="mainhead">
        <div>
          <h1>New case</h1>
          <p>What is typed here is kept on this device until it is saved.</p>
        </div>
        {draft.savedAt && (
          <SaveState state={{ kind: "saved", at: formatClock(draft.savedAt, timeZone) }} word="Draft saved" />
        )}
      </div>
      <form
        className="g"
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          submit(isReady ? "testing" : "intake");
        }}
      >
        <div>
          <section className="fs" aria-labelledby="nc-who">
            <h2 id="nc-who">Customer and vehicle</h2>
            <div className="fg">
              {customer ? (
                <>
                  <div className="found">
                    <p>
                      <b>{customer.name}</b> <span className="faint">{customer.note}</span>
                    </p>
                    <p className="soft">{customer.contact}</p>
                  </div>
                  <Button look="link" className="rt" onClick={() => chooseCustomer(null)}>
                    Someone else
                  </Button>
                </>
              ) : (
                <>
                  <div className="field wide">
                    <label htmlFor="find-customer">Known already?</label>
                    <Combobox
                      id="find-customer"
                      label="Find a customer"
                      placeholder="Name, phone, plate or VIN"
                      onQuery={search}
                      options={found.map((c) => ({
                        value: c.id,
                        label: c.name,
                        note: [c.contact, ...c.vehicles.map((x) => x.label)].filter(Boolean).join(", "),
                      }))}
                      onChoose={(option) => chooseCustomer(found.find((c) => c.id === option.value) ?? null)}
                      emptyText="No one by that; fill in the fields below."
                    />
                  </div>
                  <TextInput
                    id="name"
                    label="Name"
                    autoComplete="off"
                    error={errors.name?.message}
                    {...register("name")}
                  />
                  <TextInput
                    id="phone"
                    label="Phone"
                    optional
                    mono
                    type="tel"
                    inputMode="tel"
                    autoComplete="off"
                    error={errors.phone?.message}
                    {...register("phone")}
                  />
                  <TextInput
                    id="email"
                    label="E-mail"
                    optional
                    type="email"
                    autoComplete="off"
                    hint="Without one the quote is printed, or its link read out."
                    error={errors.email?.message}
                    {...register("email")}
                  />
                </>
              )}
              {customer && customer.vehicles.length > 0 && (
                <Options
                  legend="Vehicle"
                  showLegend
                  className="wide"
                  name="vehicle-choice"
                  value={v.vehicleId || "new"}
                  onChange={(value) =>
                    setValue("vehicleId", value === "new" ? "" : value, {
                      shouldDirty: true,
                      shouldValidate: formState.isSubmitted,
                    })
                  }
                  options={[
                    ...customer.vehicles.map((choice) => ({
                      value: choice.id,
                      label: [choice.label, choice.plate].filter(Boolean).join(", "),
                    })),
                    { value: "new", label: "Another vehicle" },
                  ]}
                />
              )}
              {!vehicle && (
                <>
                  <TextInput
                    id="label"
                    label="Vehicle"
                    placeholder="Make, model and engine"
                    error={errors.label?.message}
                    {...register("label")}
                  />
                  <TextInput
                    id="modelYear"
                    label="Model year"
                    optional
                    mono
                    inputMode="numeric"
                    maxLength={4}
                    error={errors.modelYear?.message}
                    {...register("modelYear")}
                  />
                  <VinField
                    {...register("vin", {
                      onChange: () => {
                        setVinLeft(false);
                        setValue("vinKept", false);
                      },
                    })}
                    id="vin"
                    value={v.vin}
                    isChecked={isVinLeft || formState.isSubmitted}
                    onBlur={(event) => {
                      setVinLeft(true);
                      register("vin").onBlur(event);
                    }}
                    isKept={v.vinKept}
                    onFile={customer?.vehicles.flatMap((x) =>
                      x.vin ? [{ vin: x.vin, label: `the ${x.label} on file` }] : [],
                    )}
                    onRepair={(vin) => setValue("vin", vin, { shouldDirty: true, shouldValidate: true })}
                    onKeep={() => setValue("vinKept", true, { shouldDirty: true, shouldValidate: true })}
                    error={errors.vin?.message}
                  />
                  {v.vinKept && (
                    <TextInput
                      id="vinReason"
                      label="Why the VIN is kept as typed"
                      fieldClassName="wide"
                      error={errors.vinReason?.message}
                      {...register("vinReason")}
                    />
                  )}
                </>
              )}
              <div className="field">
                {v.isOdometerUnreadable ? (
                  <TextInput
                    id="odometerReason"
                    label="Why the odometer can’t be read"
                    error={errors.odometerReason?.message}
                    {...register("odometerReason")}
                  />
                ) : (
                  <TextInput
                    id="odometer"
                    label={`Odometer, ${units.distance}`}
                    mono
                    inputMode="numeric"
                    hint={odometerHint}
                    error={errors.odometer?.message}
                    {...register("odometer")}
                  />
                )}
                <Checkbox id="isOdometerUnreadable" {...register("isOdometerUnreadable")}>
                  It can’t be read
                </Checkbox>
              </div>
              {!vehicle && (
                <TextInput id="plate" label="Plate" optional mono autoCapitalize="characters" {...register("plate")} />
              )}
              {vehicle ? (
                <p className="wide decode">
                  <span className="faint">On file for this vehicle:</span>{" "}
                  {vehicle.engineWords || "nothing of its engine"}
                  {vehicle.vin && (
                    <>
                      , VIN <span className="num">{vehicle.vin}</span>
                    </>
                  )}
                </p>
              ) : (
                <EngineFields register={register} />
              )}
              <Options
                legend="How it came"
                showLegend
                className="wide"
                name="arrival"
                value={v.arrival}
                onChange={(value) => setValue("arrival", value as NewCaseValues["arrival"], { shouldDirty: true })}
                options={ARRIVALS.map((value) => ({ value, label: ARRIVAL_LABELS[value] }))}
              />
            </div>
          </section>
          <section className="fs" aria-labelledby="nc-what">
            <h2 id="nc-what">Complaint</h2>
            <div className="fg">
              <TextArea
                id="words"
                label="In the customer’s words"
                fieldClassName="wide"
                error={errors.words?.message}
                {...register("words")}
              />
              <ComplaintPicker
                id="complaint"
                chosen={v.complaints}
                onChange={(chosen) => setValue("complaints", chosen, { shouldDirty: true })}
              />
              <IntakeCautions complaints={v.complaints} />
              <Options
                legend="When it happens"
                showLegend
                className="wide"
                several
                name="circumstances"
                value={v.circumstances}
                onChange={(value, checked) =>
                  setValue(
                    "circumstances",
                    toggled(v.circumstances, value as NewCaseValues["circumstances"][number], checked),
                    { shouldDirty: true },
                  )
                }
                options={CIRCUMSTANCES.map((value) => ({ value, label: CIRCUMSTANCE_LABELS[value] }))}
              />
              <TextInput
                id="conditionNote"
                label="More of when"
                optional
                fieldClassName="wide"
                {...register("conditionNote")}
              />
              <Options
                legend="Before it came"
                showLegend
                className="wide"
                several
                name="history"
                value={v.history}
                onChange={(value, checked) =>
                  setValue("history", toggled(v.history, value as NewCaseValues["history"][number], checked), {
                    shouldDirty: true,
                  })
                }
                options={HISTORIES.map((value) => ({ value, label: HISTORY_LABELS[value] }))}
              />
              {props.photos && <div className="wide">{props.photos}</div>}
            </div>
          </section>
          <section className="fs" aria-labelledby="nc-agreed">
            <h2 id="nc-agreed">Agreement</h2>
            <div className="fg">
              <TextInput
                id="ceiling"
                label="Ceiling for diagnosis, tax included"
                mono
                inputMode="decimal"
                error={errors.ceiling?.message}
                disabled={!mayAuthorize}
                {...register("ceiling")}
              />
              <TextInput
                id="promised"
                label="Promised for"
                optional
                mono
                type="datetime-local"
                min={isoToZoned(now, timeZone)}
                hint={`Time of the shop, ${timeZone.replaceAll("_", " ")}`}
                error={errors.promised?.message}
                {...register("promised")}
              />
              <Select
                id="technicianId"
                label="Technician"
                optional
                placeholder="not yet given"
                options={props.technicians.map((person) => ({ value: person.id, label: person.name }))}
                {...register("technicianId")}
              />
              <div className="field">
                <span className="label">Also agreed</span>
                <Checkbox id="keepParts" {...register("keepParts")}>
                  Keep the replaced parts for the customer
                </Checkbox>
                <Checkbox id="roadTestAllowed" {...register("roadTestAllowed")}>
                  The shop may drive it on the road
                </Checkbox>
              </div>
              <Checkbox
                id="isAuthorized"
                className="wide"
                disabled={!mayAuthorize}
                note={
                  mayAuthorize
                    ? "Recorded with your name, the time, and how. Without it the case can be saved but not tested."
                    : "A service writer or the owner records this."
                }
                {...register("isAuthorized", {
                  // nearly always the customer; the field stays open for someone who speaks for them
                  onChange: (event) => {
                    const name = customer?.name ?? form.getValues("name");
                    if (event.target.checked && !form.getValues("givenBy")) {
                      setValue("givenBy", name, { shouldDirty: true, shouldValidate: true });
                    }
                  },
                })}
              >
                {(customer?.name ?? v.name) || "The customer"} agrees to diagnosis up to{" "}
                {ceilingMinor ? formatPrice(ceilingMinor, currency, locale) : "this amount"}
              </Checkbox>
              {v.isAuthorized && (
                <>
                  <TextInput id="givenBy" label="Who agreed" error={errors.givenBy?.message} {...register("givenBy")} />
                  <TextInput id="contact" label="From which number or address" optional mono {...register("contact")} />
                  <Options
                    legend="How"
                    showLegend
                    className="wide"
                    name="how"
                    value={v.how}
                    onChange={(value) => setValue("how", value as NewCaseValues["how"], { shouldDirty: true })}
                    options={AUTHORIZATION_WAYS.map((value) => ({ value, label: AUTHORIZATION_LABELS[value] }))}
                  />
                </>
              )}
            </div>
          </section>
        </div>
        <aside className="ready" aria-label="What is still missing">
          <h2>Before testing can begin</h2>
          <TodoList items={ready} />
          {faults.length > 0 && (
            <>
              <h2 className="h2b">{faults.length === 1 ? "One thing to put right" : "Things to put right"}</h2>
              <ol>
                {faults.map((key) => (
                  <li key={key}>
                    <a className="link" href={`#${key}`}>
                      {FIELD_WORDS[key]}: {lower(String(errors[key]?.message ?? ""))}
                    </a>
                  </li>
                ))}
              </ol>
            </>
          )}
          {vehicle && vehicle.earlier.length > 0 && (
            <>
              <h2 className="h2b">Earlier cases of this vehicle</h2>
              <ul className="prev">
                {vehicle.earlier.map((earlier) => (
                  <li key={earlier.number}>
                    <a className="num" href={earlier.href}>
                      {earlier.number}
                    </a>{" "}
                    {earlier.what}
                  </li>
                ))}
              </ul>
            </>
          )}
        </aside>
      </form>
      <footer className="formbar">
        <Button
          disabled={!isReady}
          aria-describedby="why-not-testing"
          busy={sending === "testing"}
          busyLabel="Saving"
          onClick={() => submit("testing")}
        >
          Start testing
        </Button>
        <Button look="quiet" busy={sending === "intake"} busyLabel="Saving" onClick={() => submit("intake")}>
          Save as intake
        </Button>
        {failure ? (
          <span className="alarm" role="alert">
            {failure}
          </span>
        ) : (
          <WhyOff id="why-not-testing">
            {isReady ? "Everything is there." : "Testing starts once the fields are right and the agreement is ticked."}
          </WhyOff>
        )}
        <span className="keyhint counter-only">
          <kbd>Ctrl</kbd> <kbd>Enter</kbd> save
        </span>
      </footer>
    </main>
  );
}

function toggled<T extends string>(list: readonly T[], value: T, isOn: boolean): T[] {
  return isOn ? [...list, value] : list.filter((item) => item !== value);
}

function lower(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1).replace(/\.$/, "");
}

function odometerWords(
  typed: string,
  last: { km: number; on: string } | null,
  units: UnitPrefs,
  locale: string,
): string | undefined {
  if (!last) return undefined;
  const before = `${formatNumber(kmShown(last.km, units), 0, { locale })} on ${last.on}.`;
  const shown = parseNumber(typed);
  if (shown === null) return before;
  return `${before} ${kmInternal(shown, units) >= last.km ? "Fits." : "That is less: read it again."}`;
}
