"use client";

import Link from "next/link";
import { useRef } from "react";
import { Glyph } from "@/components/ui/glyph";
import { useShortcuts } from "@/components/ui/shortcuts";
import { MiniStage } from "@/components/ui/strip";
import { Words } from "@/components/ui/words";
import type { CaseGroupView, CaseRowView } from "./model";

export interface CasesTableProps {
  groups: readonly CaseGroupView[];
  caption?: string;
}

const HEADS = [
  "No.",
  "Vehicle",
  "Plate",
  "Customer",
  "Complaint, in their words",
  "Leading cause",
  "Stage",
  "For",
  "Technician",
  "Promised",
];

/** The open work, grouped by whom it waits on. ↑ ↓ choose, Enter opens, Esc leaves. */
export function CasesTable({ groups, caption = "Cases" }: CasesTableProps) {
  const table = useRef<HTMLTableElement>(null);
  const links = () => [...(table.current?.querySelectorAll<HTMLAnchorElement>("td.first a") ?? [])];
  const move = (step: 1 | -1) => {
    const all = links();
    const at = all.indexOf(document.activeElement as HTMLAnchorElement);
    const next = at === -1 ? (step === 1 ? 0 : all.length - 1) : Math.min(all.length - 1, Math.max(0, at + step));
    all[next]?.focus();
  };
  useShortcuts([
    { keys: "ArrowDown", what: "next case", run: () => move(1) },
    { keys: "ArrowUp", what: "the case above", run: () => move(-1) },
    {
      keys: "Escape",
      what: "leave the table",
      run: () =>
        links()
          .find((link) => link === document.activeElement)
          ?.blur(),
    },
  ]);
  return (
    <table className="tbl" ref={table}>
      <caption className="vh">{caption}</caption>
      <thead>
        <tr>
          {HEADS.map((head) => (
            <th key={head} scope="col" className={head === "For" ? "r" : undefined}>
              {head}
            </th>
          ))}
        </tr>
      </thead>
      {groups.map((group) => (
        <tbody key={group.id}>
          <tr className="grp">
            <th colSpan={HEADS.length} scope="rowgroup">
              {group.title}
              <span>{group.note}</span>
            </th>
          </tr>
          {group.rows.map((row) => (
            <Row key={row.id} row={row} />
          ))}
        </tbody>
      ))}
    </table>
  );
}

function Row({ row }: { row: CaseRowView }) {
  return (
    <tr className="row">
      <td className="num first">
        <Link href={row.href} aria-label={`Case ${row.number}, ${row.vehicle}, ${row.customer}`}>
          {row.number}
        </Link>
      </td>
      <td className="nowrap strong veh">{row.vehicle}</td>
      <td className="num faint plate">{row.plate}</td>
      <td className="nowrap cust">{row.customer}</td>
      <td className="cut soft words" title={row.complaint}>
        {row.complaint}
      </td>
      <td className="nowrap cz">
        {row.cause ? (
          <>
            <Glyph family={row.cause.family} />
            <Words>{row.cause.label}</Words> <span className="faint">{row.cause.note}</span>
          </>
        ) : (
          <span className="faint">no readings yet</span>
        )}
      </td>
      <td className="nowrap st">
        <MiniStage now={row.stage} held={row.held} />
        <span>{row.stageWords}</span>
      </td>
      <td className="num r since">{row.since}</td>
      <td className="nowrap soft tech">{row.technician ?? <span className="faint">not yet given</span>}</td>
      <td className="nowrap pr">
        {row.promise ? (
          row.promise.isLate ? (
            <span className="alarm">{row.promise.words}</span>
          ) : (
            row.promise.words
          )
        ) : (
          <span className="faint">none</span>
        )}
      </td>
    </tr>
  );
}
