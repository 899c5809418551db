"use client";

import { type ReactNode, useState } from "react";
import { Button } from "@/components/ui/button";
import { Main } from "@/components/ui/case-frame";
import { type Density, useDensity } from "@/components/ui/device";
import { Dialog } from "@/components/ui/dialog";
import { SaveState } from "@/components/ui/save-state";
import { ConflictView, EmptyMark, EmptyState } from "@/components/ui/states";
import type { Mode, Phase } from "@/lib/diagnosis/vocabulary";
import { PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import { BayReadings } from "./bay-readings";
import { CodesList, type CodesListProps } from "./codes-list";
import { Cylinders } from "./cylinders";
import { GasTable } from "./gas-table";
import { formatReading } from "./judging";
import type { AddSample, FindingView, SampleView, SaveReadings, SheetContext } from "./model";
import { ReadingsSheet } from "./readings-sheet";
import { AddSampleForm, EditSampleForm } from "./sample-dialogs";
import { useSheet } from "./use-sheet";
import { WhatStandsOut } from "./what-stands-out";

export interface ReadingsPartProps {
  /** The finding: "Lean while idling, in band everywhere else". */
  title: string;
  sub?: string;
  samples: readonly SampleView[];
  context: SheetContext;
  findings: readonly FindingView[];
  findingCount?: string;
  /** Readings kept but not used, and contradictions, in a sentence each. */
  notes?: readonly string[];
  codes: CodesListProps["codes"];
  save: SaveReadings;
  onAddSample: AddSample;
  onDescribeSample: (
    sampleId: string,
    input: { mode: Mode; how?: string },
  ) => Promise<{ ok: true } | { ok: false; message: string }>;
  onRemoveSample: (sampleId: string, reason: string) => Promise<{ ok: true } | { ok: false; message: string }>;
  onAddCode?: CodesListProps["onAdd"];
  onRemoveCode?: CodesListProps["onRemove"];
  /** Links beside "Add a sample": import readings, import a log. */
  imports?: ReactNode;
  /** What to take first for this complaint; the rest is folded away in the bay. */
  first?: readonly ParameterId[];
  /** Advice for the empty sheet: "Idling, warm, is the most telling sample for a rough idle: 8 readings, about 3 minutes." */
  emptyAdvice?: string;
  density?: Density;
  readOnly?: boolean;
  /** Samples added here belong to this phase unless said otherwise. */
  phase?: Phase;
}

/** The readings part of a case: the sheet at the counter, one sample at a time with a keypad in the bay. */
export function ReadingsPart(props: ReadingsPartProps) {
  const { samples, context, codes, readOnly, phase = "before" } = props;
  const density = useDensity(props.density);
  const sheet = useSheet(samples, props.save);
  const [adding, setAdding] = useState<Mode | null>(null);
  const [editing, setEditing] = useState<SampleView | null>(null);

  const conflict = sheet.conflict && (
    <ConflictView
      who={sheet.conflict.by}
      theirsHead="Theirs, saved before yours"
      subject="Reading"
      fields={sheet.conflict.cells.map((cell) => ({
        label: PARAMETERS[cell.parameter as ParameterId]?.label ?? cell.parameter,
        yours: conflictText(cell.parameter, cell.yours, context),
        theirs: conflictText(cell.parameter, cell.theirs, context),
        numeric: true,
      }))}
      keepTheirsLabel={`Keep ${sheet.conflict.by}’s`}
      onKeepTheirs={() => sheet.settle("theirs")}
      onKeepMine={() => sheet.settle("mine")}
    />
  );
  const dialogs = (
    <>
      <Dialog open={adding !== null} onClose={() => setAdding(null)} title="Add a sample">
        <AddSampleForm
          onAdd={props.onAddSample}
          initialMode={adding ?? "idling"}
          initialPhase={phase}
          onDone={() => setAdding(null)}
        />
      </Dialog>
      <Dialog open={editing !== null} onClose={() => setEditing(null)} title="Change the sample">
        {editing && (
          <EditSampleForm
            sample={editing}
            onDescribe={(input) => props.onDescribeSample(editing.id, input)}
            onRemove={(reason) => props.onRemoveSample(editing.id, reason)}
            onDone={() => setEditing(null)}
          />
        )}
      </Dialog>
    </>
  );

  if (density === "bay") {
    return (
      <main id="main" className="bayreadings">
        <h1 className="vh">{props.title}</h1>
        {conflict}
        <BayReadings
          samples={samples}
          values={sheet.values}
          context={context}
          onCommit={sheet.commit}
          onAddSample={props.onAddSample}
          first={props.first}
          phase={phase}
          state={sheet.state}
          readOnly={readOnly}
        />
        {dialogs}
      </main>
    );
  }
  return (
    <Main
      className="readings"
      title={props.title}
      sub={props.sub}
      acts={
        !readOnly && (
          <>
            {sheet.state.kind !== "saved" && <SaveState state={sheet.state} />}
            {props.imports}
            <Button onClick={() => setAdding("idling")}>Add a sample</Button>
          </>
        )
      }
    >
      {conflict}
      <div className="two">
        {samples.length === 0 ? (
          <EmptyState
            title="No readings yet"
            mark={<EmptyMark />}
            acts={
              !readOnly && (
                <>
                  <Button onClick={() => setAdding("idling")}>Add an idling sample</Button>
                  {props.imports}
                </>
              )
            }
          >
            {props.emptyAdvice ??
              "Idling, warm, is the most telling sample to start with: eight readings, about three minutes."}
          </EmptyState>
        ) : (
          <ReadingsSheet
            samples={samples}
            values={sheet.values}
            context={context}
            onCommit={sheet.commit}
            onEditSample={setEditing}
            readOnly={readOnly}
          />
        )}
        <aside className="side" aria-label="What the readings say">
          <WhatStandsOut findings={props.findings} count={props.findingCount} notes={props.notes} />
          <Cylinders
            samples={samples}
            values={sheet.values}
            context={context}
            onCommit={sheet.commit}
            readOnly={readOnly}
          />
          <GasTable
            samples={samples}
            values={sheet.values}
            context={context}
            onCommit={sheet.commit}
            readOnly={readOnly}
          />
          <CodesList
            codes={codes}
            onAdd={readOnly ? undefined : props.onAddCode}
            onRemove={readOnly ? undefined : props.onRemoveCode}
            phase={phase}
          />
        </aside>
      </div>
      {dialogs}
    </Main>
  );
}

function conflictText(parameter: string, value: unknown, context: SheetContext): string {
  if (value === null || value === undefined) return "not taken";
  if (typeof value === "number" && parameter in PARAMETERS)
    return formatReading(parameter as ParameterId, value, context.units, context.locale);
  if (typeof value === "object")
    return Object.entries(value as Record<string, unknown>)
      .map(([cylinder, n]) => `${cylinder}: ${n}`)
      .join(", ");
  return String(value);
}
