"use client";

import { type ReactNode, useState } from "react";
import { MODE_WORDS } from "@/components/readings/mode-words";
import { Button } from "@/components/ui/button";
import { Main } from "@/components/ui/case-frame";
import { cx } from "@/components/ui/cx";
import { Dialog } from "@/components/ui/dialog";
import { formatNumber } from "@/components/ui/format";
import { ScrollX } from "@/components/ui/scroll-x";
import { Words } from "@/components/ui/words";
import type { Mode } from "@/lib/diagnosis/vocabulary";
import { PARAMETER_IDS, PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import { LogTimeline, minutesSeconds, type Selection } from "./log-timeline";
import type { ColumnView, LogResult, LogView, ModeMeansView, TrimRowView } from "./model";
import { stretch } from "./trace";
import { TrimMap } from "./trim-map";

export interface LogPartProps {
  /** "Rail pressure falls as air flow rises, and both banks go lean". */
  title: string;
  /** "Log of 10:55, 14 min 20 s, ten readings a second." */
  sub?: string;
  log: LogView;
  trims: readonly TrimRowView[];
  means: readonly ModeMeansView[];
  /** Heads of the mean columns: "r/min", "Air, g/s". */
  meanHeads: readonly string[];
  columns: readonly ColumnView[];
  warnings?: readonly string[];
  onKeep: (stretch: { mode: Mode; fromS: number; toS: number }) => Promise<LogResult>;
  onKeepMode: (mode: Mode) => Promise<LogResult>;
  onKeepAll: () => Promise<LogResult>;
  onMap: (choices: Record<string, ParameterId | null>) => Promise<LogResult>;
  acts?: ReactNode;
  readOnly?: boolean;
}

/** A log of a case: the timeline, the trim map, the means by mode. A stretch or a mode is kept as a sample. */
export function LogPart(props: LogPartProps) {
  const { log, means, columns, readOnly } = props;
  const first = log.segments.find((segment) => segment.mode === "accelerating") ?? log.segments[0];
  const [selection, setSelection] = useState<Selection>(
    first ? { fromS: Math.round(first.fromS), toS: Math.round(first.toS) } : { fromS: 0, toS: Math.min(60, log.spanS) },
  );
  const [view, setView] = useState<Selection>({ fromS: 0, toS: log.spanS });
  const [isMapping, setMapping] = useState(false);
  const [busy, setBusy] = useState<string | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const unknown = columns.filter((column) => column.parameter === null);
  const mode = modeOf(log, selection);
  const isZoomed = view.fromS > 0 || view.toS < log.spanS;

  async function run(what: string, act: () => Promise<LogResult>) {
    if (busy) return;
    setBusy(what);
    setFault(null);
    const result = await act();
    setBusy(null);
    if (!result.ok) setFault(result.message);
  }

  return (
    <Main
      className="logpart"
      title={<Words>{props.title}</Words>}
      sub={
        <>
          {props.sub} {columns.length - unknown.length} columns mapped
          {unknown.length > 0 && (
            <>
              , {unknown.length} not known:{" "}
              <button type="button" className="link" onClick={() => setMapping(true)}>
                choose what {unknown.length === 1 ? "it is" : "they are"}
              </button>
            </>
          )}
        </>
      }
      acts={
        !readOnly && (
          <>
            <Button look="link" onClick={() => setMapping(true)}>
              Channels
            </Button>
            {props.acts}
            <Button
              look="quiet"
              busy={busy === "all"}
              busyLabel="Keeping"
              onClick={() => void run("all", props.onKeepAll)}
            >
              Keep every mode as a sample
            </Button>
          </>
        )
      }
    >
      {fault && (
        <p className="why" role="alert">
          {fault}
        </p>
      )}
      <LogTimeline
        log={log}
        view={view}
        selection={selection}
        onSelect={setSelection}
        label={`${log.lanes.length} traces over ${minutesSeconds(log.spanS)}: ${props.title}`}
      />
      <div className="selrow">
        <b>{Math.round(selection.toS - selection.fromS)} s chosen</b>
        <span>{mode ? MODE_WORDS[mode].toLowerCase() : "several modes"}</span>
        <Extremes log={log} selection={selection} />
        <span className="push">
          <button
            type="button"
            className="link"
            onClick={() =>
              setView(
                isZoomed
                  ? { fromS: 0, toS: log.spanS }
                  : { fromS: Math.max(0, selection.fromS - 10), toS: Math.min(log.spanS, selection.toS + 10) },
              )
            }
          >
            {isZoomed ? "Show all" : "Zoom in"}
          </button>
        </span>
        {!readOnly && mode && (
          <Button
            busy={busy === "stretch"}
            busyLabel="Keeping"
            onClick={() => void run("stretch", () => props.onKeep({ mode, ...selection }))}
          >
            Keep as {/^[aeiou]/.test(MODE_WORDS[mode].toLowerCase()) ? "an" : "a"} {MODE_WORDS[mode].toLowerCase()}{" "}
            sample
          </Button>
        )}
      </div>
      <div className="lower">
        <section className="sec" aria-labelledby="tm-head">
          <header>
            <h2 id="tm-head">Trim map</h2>
            <span className="label">total trim, settled seconds of each mode</span>
          </header>
          <TrimMap rows={props.trims} />
        </section>
        <section className="sec" aria-labelledby="bm-head">
          <header>
            <h2 id="bm-head">By mode</h2>
            <span className="label">means</span>
          </header>
          <ScrollX label="Means by mode, scrolls">
            <table className="tbl pm">
              <caption className="vh">Means by mode</caption>
              <thead>
                <tr>
                  <th scope="col">Mode</th>
                  <th scope="col" className="r">
                    Time
                  </th>
                  {props.meanHeads.map((head) => (
                    <th key={head} scope="col" className="r">
                      <Words>{head}</Words>
                    </th>
                  ))}
                  <th scope="col">
                    <span className="vh">Keep</span>
                  </th>
                </tr>
              </thead>
              <tbody>
                {means.map((row) => (
                  <tr key={row.mode}>
                    <th scope="row">{MODE_WORDS[row.mode]}</th>
                    <td className="r num">{minutesSeconds(row.seconds)}</td>
                    {row.values.map((value, index) => (
                      <td key={props.meanHeads[index]} className="r num">
                        {value.text ? (
                          <span className={cx(value.family && "dev", value.family)}>{value.text}</span>
                        ) : (
                          <span className="none" />
                        )}
                      </td>
                    ))}
                    <td className="r">
                      {row.isKept ? (
                        <span className="faint">kept</span>
                      ) : (
                        !readOnly &&
                        row.mayKeep && (
                          <button
                            type="button"
                            className="link"
                            onClick={() => void run(row.mode, () => props.onKeepMode(row.mode))}
                          >
                            Keep<span className="vh"> {MODE_WORDS[row.mode]}</span>
                          </button>
                        )
                      )}
                    </td>
                  </tr>
                ))}
              </tbody>
            </table>
          </ScrollX>
          {(props.warnings ?? []).map((warning) => (
            <p className="note" key={warning}>
              {warning}
            </p>
          ))}
        </section>
      </div>
      <Dialog open={isMapping} onClose={() => setMapping(false)} title="Channels" wide>
        <MapForm columns={columns} readOnly={readOnly} onMap={props.onMap} onDone={() => setMapping(false)} />
      </Dialog>
    </Main>
  );
}

/** The mode that fills most of the stretch, if it fills at least half. */
function modeOf(log: LogView, { fromS, toS }: Selection): Mode | null {
  const seconds = new Map<Mode, number>();
  for (const segment of log.segments) {
    const shared = Math.min(toS, segment.toS) - Math.max(fromS, segment.fromS);
    if (shared > 0) seconds.set(segment.mode, (seconds.get(segment.mode) ?? 0) + shared);
  }
  const [most] = [...seconds].sort((a, b) => b[1] - a[1]);
  return most && most[1] >= (toS - fromS) / 2 ? most[0] : null;
}

/** What the stretch shows: the lanes that leave their band, with how far. */
function Extremes({ log, selection }: { log: LogView; selection: Selection }) {
  return log.lanes.flatMap((lane) => {
    const points = lane.traces[0]?.points;
    const found = points && stretch(points, selection.fromS, selection.toS, log.stepS);
    if (!found || !lane.band) return [];
    const { low, high } = lane.band;
    const isLow = low !== null && found.low < low;
    const isHigh = high !== null && found.high > high;
    if (!isLow && !isHigh) return [];
    const family = isLow ? lane.family.low : lane.family.high;
    return [
      <span key={lane.id}>
        {lane.label.toLowerCase()} {isLow ? "down to" : "up to"}{" "}
        <span className={cx("num dev", family ?? "mech")}>
          {formatNumber(isLow ? found.low : found.high, lane.decimals, { signed: lane.signed })}
        </span>{" "}
        {lane.unit}
      </span>,
    ];
  });
}

interface MapFormProps {
  columns: readonly ColumnView[];
  readOnly?: boolean;
  onMap: LogPartProps["onMap"];
  onDone: () => void;
}

/** What each column of the file is. The shop's choice is remembered for this set of headers. */
function MapForm({ columns, readOnly, onMap, onDone }: MapFormProps) {
  const [choices, setChoices] = useState<Record<string, string>>(
    Object.fromEntries(columns.map((column) => [column.header, column.parameter ?? ""])),
  );
  const [error, setError] = useState<string>();
  const [isBusy, setBusy] = useState(false);
  return (
    <form
      onSubmit={async (event) => {
        event.preventDefault();
        setBusy(true);
        const result = await onMap(
          Object.fromEntries(
            Object.entries(choices).map(([header, id]) => [header, (id || null) as ParameterId | null]),
          ),
        );
        setBusy(false);
        if (result.ok) onDone();
        else setError(result.message);
      }}
    >
      <table className="tbl">
        <caption className="vh">Columns of the file</caption>
        <thead>
          <tr>
            <th scope="col">In the file</th>
            <th scope="col">What it is</th>
            <th scope="col">Unit</th>
            <th scope="col" className="r">
              Read
            </th>
            <th scope="col" className="r">
              Missing
            </th>
            <th scope="col" className="r">
              Not readable
            </th>
          </tr>
        </thead>
        <tbody>
          {columns.map((column) => (
            <tr key={column.header}>
              <th scope="row">{column.header}</th>
              <td>
                <select
                  className="input"
                  aria-label={`What “${column.header}” is`}
                  disabled={readOnly}
                  value={choices[column.header]}
                  onChange={(event) => setChoices({ ...choices, [column.header]: event.target.value })}
                >
                  <option value="">not used</option>
                  {PARAMETER_IDS.map((id) => (
                    <option key={id} value={id}>
                      {PARAMETERS[id].label}
                    </option>
                  ))}
                </select>
              </td>
              <td className="faint">{column.unit}</td>
              <td className="r num">{formatNumber(column.read)}</td>
              <td className="r num faint">{formatNumber(column.missing)}</td>
              <td className="r num faint">{formatNumber(column.refused)}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {error && <p className="why">{error}</p>}
      {!readOnly && (
        <div className="acts">
          <Button type="submit" busy={isBusy} busyLabel="Reading again">
            Read it so
          </Button>
        </div>
      )}
    </form>
  );
}
