"use client";

import { useEffect, useId, useRef, useState } from "react";
import { useAnnounce } from "@/components/ui/announcer";
import { BandMark } from "@/components/ui/band-mark";
import { cx } from "@/components/ui/cx";
import { formatNumber } from "@/components/ui/format";
import { Glyph } from "@/components/ui/glyph";
import { parseNumber } from "@/components/ui/parse-entry";
import { SaveState, type SaveStateView } from "@/components/ui/save-state";
import { METRIC, shownUnit, type UnitPrefs } from "@/components/ui/units";
import { Words } from "@/components/ui/words";
import { MODES, type Mode, type Phase } from "@/lib/diagnosis/vocabulary";
import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import { formatReading, judgeReading, numberAt, shownBand, stateWord, totalTrim, verdictWords } from "./judging";
import { Keypad } from "./keypad";
import { MODE_WORDS } from "./mode-words";
import type { AddSample, SampleView, SheetContext, Values } from "./model";
import { rowLabel, sheetRows } from "./rows";

export interface BayReadingsProps {
  samples: readonly SampleView[];
  values: Record<string, Values>;
  context: SheetContext;
  onCommit: (sampleId: string, cells: Record<string, unknown>) => void;
  onAddSample: AddSample;
  first?: readonly ParameterId[];
  phase: Phase;
  state: SaveStateView;
  readOnly?: boolean;
}

/**
 * One sample at a time: modes as tabs, 64 px rows, a keypad with 88 px keys. Next commits and moves; Not taken is an
 * answer too. The first reading of a mode opens its sample.
 */
export function BayReadings({
  samples,
  values,
  context: outer,
  onCommit,
  onAddSample,
  first,
  phase,
  state,
  readOnly,
}: BayReadingsProps) {
  const [mode, setMode] = useState<Mode>(() => {
    const own = samples.filter((s) => s.phase === phase);
    return own.some((s) => s.mode === "idling") ? "idling" : (own.at(-1)?.mode ?? "idling");
  });
  const [unitsOver, setUnitsOver] = useState<UnitPrefs | null>(null);
  const context = { ...outer, units: unitsOver ?? outer.units };
  const ofMode = (m: Mode) => samples.findLast((s) => s.mode === m && s.phase === phase) ?? null;
  const sample = ofMode(mode);
  const held: Values = sample ? (values[sample.id] ?? sample.values) : {};

  const all = sheetRows(context.vehicle, samples).flatMap((group) =>
    group.rows.flatMap((row) =>
      row.kind === "entry" && PARAMETERS[row.parameter].kind === "number" ? [row.parameter] : [],
    ),
  );
  const isUseful = (p: ParameterId) => first?.includes(p) || numberAt(held, p) !== null;
  const lead =
    first && first.length > 0
      ? [...new Set([...first.filter((p) => PARAMETERS[p].kind === "number"), ...all.filter(isUseful)])]
      : all;
  const folded = all.filter((p) => !lead.includes(p));
  const [isUnfolded, setUnfolded] = useState(false);
  const rows = isUnfolded ? [...lead, ...folded] : lead;
  const [chosen, setChosen] = useState<ParameterId | null>(null);
  const parameter =
    chosen && rows.includes(chosen) ? chosen : (rows.find((p) => numberAt(held, p) === null) ?? rows[0] ?? null);

  const [typed, setTyped] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  // A commit made before its sample exists waits here for the new column to arrive.
  const [waiting, setWaiting] = useState<{ sampleId: string; cells: Record<string, unknown> } | null>(null);
  useEffect(() => {
    if (!waiting || !samples.some((s) => s.id === waiting.sampleId)) return;
    setWaiting(null);
    onCommit(waiting.sampleId, waiting.cells);
  }, [samples, waiting, onCommit]);

  const list = useRef<HTMLDivElement>(null);
  const announce = useAnnounce();
  const panelId = useId();

  const value = parameter ? numberAt(held, parameter) : null;
  const unit = parameter ? shownUnit(parameter, context.units) : null;
  const number = typed === null ? null : parseNumber(typed);
  const current = typed === null ? value : number === null || !unit ? null : unit.toInternal(number);
  const judged = parameter && current !== null ? judgeReading(parameter, current, mode, context) : null;
  const family = judged?.state === "outside" ? (judged.family ?? "mech") : null;

  function choose(next: ParameterId) {
    setChosen(next);
    setTyped(null);
    requestAnimationFrame(() =>
      list.current?.querySelector(`[data-p="${next}"]`)?.scrollIntoView({ block: "nearest" }),
    );
  }

  async function put(cells: Record<string, unknown>) {
    setFault(null);
    if (sample) return onCommit(sample.id, cells);
    if (Object.values(cells).every((v) => v === null)) return;
    setBusy(true);
    const result = await onAddSample({ mode, phase });
    setBusy(false);
    if (!result.ok) return setFault(result.message);
    setWaiting({ sampleId: result.sampleId, cells });
  }

  function step(by: 1 | -1) {
    if (!parameter) return;
    const next = rows[rows.indexOf(parameter) + by];
    if (next) choose(next);
    else setTyped(null);
  }

  function next() {
    if (!parameter) return;
    if (typed !== null && current !== null) {
      void put({ [parameter]: current });
      if (judged?.state === "impossible") announce(`Not possible. ${judged.message}. Kept as typed.`, "assertive");
    }
    step(1);
  }

  function press(key: string) {
    const now = typed ?? "";
    if (key === "±") setTyped(now.startsWith("-") ? now.slice(1) : `-${now}`);
    else if (key === ".") setTyped(now.includes(".") ? now : `${now || "0"}.`);
    else if (key === "clear") setTyped("");
    else if (now.replace(/\D/g, "").length < 8) setTyped(now + key);
  }

  const shown =
    typed !== null
      ? typed.replace("-", "−") || "–"
      : parameter && value !== null
        ? formatReading(parameter, value, context.units, context.locale)
        : "–";
  const isConvertible =
    parameter !== null && (PARAMETERS[parameter].unit === "kPa" || PARAMETERS[parameter].unit === "°C");

  return (
    <>
      <div className="modes" role="tablist" aria-label="Operating mode">
        {MODES.map((m) => {
          const own = ofMode(m);
          const count = own
            ? Object.values(values[own.id] ?? own.values).filter((v) => v !== undefined && v !== null).length
            : 0;
          return (
            <button
              key={m}
              type="button"
              role="tab"
              aria-selected={m === mode}
              aria-controls={panelId}
              onClick={() => {
                setMode(m);
                setTyped(null);
              }}
            >
              <b>{MODE_WORDS[m]}</b>
              <span>{count > 0 ? `${count} taken` : "none yet"}</span>
            </button>
          );
        })}
      </div>
      <div className="bayread" id={panelId} role="tabpanel" aria-label={MODE_WORDS[mode]}>
        <div
          className="blist"
          role="listbox"
          aria-label="Parameters"
          tabIndex={0}
          ref={list}
          aria-activedescendant={parameter ? `${panelId}-${parameter}` : undefined}
          onKeyDown={(event) => {
            if (event.key === "ArrowDown" || event.key === "ArrowUp") {
              event.preventDefault();
              step(event.key === "ArrowDown" ? 1 : -1);
            }
          }}
        >
          {rows.map((p) => (
            <BayRow
              key={p}
              id={`${panelId}-${p}`}
              parameter={p}
              isCurrent={p === parameter}
              value={p === parameter && typed !== null ? current : numberAt(held, p)}
              mode={mode}
              context={context}
              total={
                p === "LONGFT1" ? totalTrim(held, 1)?.value : p === "LONGFT2" ? totalTrim(held, 2)?.value : undefined
              }
              onChoose={() => choose(p)}
            />
          ))}
          {folded.length > 0 && (
            <button
              type="button"
              className="brow fold"
              onClick={() => setUnfolded(!isUnfolded)}
              aria-expanded={isUnfolded}
            >
              {isUnfolded ? "Fewer readings" : `${folded.length} more readings`}
            </button>
          )}
        </div>
        {parameter && unit && (
          <section className={cx("pad", family)} aria-label="Enter a reading">
            {/* biome-ignore lint/a11y/noNoninteractiveTabindex: it scrolls on a low tablet, so the keyboard must reach it */}
            <section className="padhead" aria-label="Reading" tabIndex={0}>
              <div className="label">
                <Words>{rowLabel(parameter, context.vehicle.banks)}</Words>
              </div>
              <div className={cx("big", judged?.state === "impossible" && "impossible")}>
                <span className="num" aria-live="polite">
                  {shown}
                </span>
                {isConvertible ? (
                  <button
                    type="button"
                    className="unit link"
                    onClick={() => {
                      setUnitsOver(unitsOver ? null : otherUnits(outer.units));
                      setTyped(null);
                    }}
                  >
                    {unit.unit}
                    <span className="vh">, change the unit</span>
                  </button>
                ) : (
                  <span className="unit">{unit.unit}</span>
                )}
              </div>
              {judged?.band && current !== null && judged.state !== "impossible" ? (
                <>
                  <BandMark
                    value={unit.toShown(current)}
                    band={shownBand(parameter, judged.band, context.units)}
                    family={family}
                    isQuiet={judged.state === "watch"}
                    size="pad"
                    decimals={1}
                  />
                  <Scale
                    band={shownBand(parameter, judged.band, context.units)}
                    decimals={unit.decimals}
                    signed={PARAMETERS[parameter].signed === true}
                  />
                </>
              ) : (
                <div className="noscale" />
              )}
              <p className="verdict">
                {fault ? (
                  <b>{fault}</b>
                ) : judged ? (
                  <>
                    {family && <Glyph family={family} silent />}{" "}
                    <b>{verdictWords(parameter, current ?? 0, judged, context.units).word}</b>{" "}
                    {verdictWords(parameter, current ?? 0, judged, context.units).rest}
                  </>
                ) : (
                  "Not taken."
                )}
                {judged?.likely !== undefined && (
                  <button
                    type="button"
                    className="btn quiet likely"
                    onClick={() => void put({ [parameter]: judged.likely }).then(() => setTyped(null))}
                  >
                    Use {formatNumber(unit.toShown(judged.likely), Math.max(1, unit.decimals))}
                  </button>
                )}
              </p>
              <Also parameter={parameter} mode={mode} samples={samples} values={values} context={context} />
              <p className="baysave">
                <SaveState state={busy ? { kind: "saving" } : state} />
              </p>
            </section>
            {!readOnly && (
              <Keypad
                onKey={press}
                onNext={next}
                onBack={() => (typed ? setTyped(typed.slice(0, -1)) : step(-1))}
                onNotTaken={() => {
                  void put({ [parameter]: null });
                  step(1);
                }}
              />
            )}
          </section>
        )}
      </div>
    </>
  );
}

function otherUnits(units: UnitPrefs): UnitPrefs {
  const isMetric = units.pressure === "kPa" && units.temperature === "C";
  return isMetric
    ? { ...METRIC, pressure: "psi", temperature: "F", distance: units.distance }
    : { ...METRIC, distance: units.distance };
}

interface BayRowProps {
  id: string;
  parameter: ParameterId;
  isCurrent: boolean;
  value: number | null;
  mode: Mode;
  context: SheetContext;
  total?: number;
  onChoose: () => void;
}

function BayRow({ id, parameter, isCurrent, value, mode, context, total, onChoose }: BayRowProps) {
  const unit = shownUnit(parameter, context.units);
  const judged = value === null ? null : judgeReading(parameter, value, mode, context);
  const family = judged?.state === "outside" ? (judged.family ?? "mech") : null;
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: the list handles the keys
    <div
      id={id}
      className={cx("brow", isCurrent && "cur", family)}
      role="option"
      aria-selected={isCurrent}
      tabIndex={-1}
      data-p={parameter}
      onClick={onChoose}
    >
      <span className="bn">
        <Words>{rowLabel(parameter, context.vehicle.banks)}</Words>
        <span>
          {unit.unit}
          {total !== undefined && `, total ${formatNumber(total, 1, { signed: true })}`}
        </span>
      </span>
      {judged?.band && value !== null && judged.state !== "impossible" ? (
        <BandMark
          value={unit.toShown(value)}
          band={shownBand(parameter, judged.band, context.units)}
          family={family}
          isQuiet={judged.state === "watch"}
          size="bay"
          decimals={1}
        />
      ) : (
        <span />
      )}
      <span className="bw">
        {family && (
          <>
            <Glyph family={family} silent />
            {stateWord(family, judged?.side ?? null)}
          </>
        )}
        {judged?.state === "impossible" && <span className="alarm">not possible</span>}
      </span>
      <span className={cx("num bv", family && "dev")}>
        {value === null ? (
          <>
            <span className="none" />
            <span className="vh">not taken</span>
          </>
        ) : (
          formatReading(parameter, value, context.units, context.locale)
        )}
      </span>
    </div>
  );
}

function Scale({
  band,
  decimals,
  signed,
}: {
  band: { low: number | null; high: number | null };
  decimals: number;
  signed: boolean;
}) {
  const { low, high } = band;
  if (low === null || high === null)
    return (
      <div className="scale">
        {high !== null ? (
          <span>up to {formatNumber(high, decimals)}</span>
        ) : (
          <span>{formatNumber(low ?? 0, decimals)} or more</span>
        )}
      </div>
    );
  const step = high - low;
  const places = Math.max(decimals, step < 3 ? 2 : step < 30 ? 1 : 0);
  const write = (n: number) =>
    formatNumber(Number(n.toFixed(places)), Number.isInteger(Number(n.toFixed(places))) ? 0 : places, { signed });
  return (
    <div className="scale" aria-hidden="true">
      <span>{write(low - step)}</span>
      <span>{write(low)}</span>
      <span>{write(high)}</span>
      <span>{write(high + step)}</span>
    </div>
  );
}

interface AlsoProps {
  parameter: ParameterId;
  mode: Mode;
  samples: readonly SampleView[];
  values: Record<string, Values>;
  context: SheetContext;
}

/** The same reading in the other modes. */
function Also({ parameter, mode, samples, values, context }: AlsoProps) {
  const others = samples
    .filter((s) => s.mode !== mode && numberAt(values[s.id] ?? s.values, parameter) !== null)
    .slice(-3);
  if (others.length === 0) return null;
  const unit = shownUnit(parameter, context.units);
  return (
    <ul className="also">
      {others.map((sample) => {
        const value = numberAt(values[sample.id] ?? sample.values, parameter) ?? 0;
        const judged = judgeReading(parameter, value, sample.mode, context);
        const family = judged.state === "outside" ? (judged.family ?? "mech") : null;
        return (
          <li key={sample.id} className={cx(family)}>
            <span>
              {MODE_WORDS[sample.mode]}
              {sample.phase === "after" && ", after"}
            </span>
            {judged.band ? (
              <BandMark
                value={unit.toShown(value)}
                band={shownBand(parameter, judged.band, context.units)}
                family={family}
                isQuiet={judged.state === "watch"}
                size="row"
                decimals={1}
              />
            ) : (
              <span />
            )}
            <b className={cx("num", family && "dev")}>
              {formatReading(parameter, value, context.units, context.locale)}
            </b>
          </li>
        );
      })}
    </ul>
  );
}
