import Link from "next/link";
import { BandMark } from "@/components/ui/band-mark";
import { Num } from "@/components/ui/num";
import { Words } from "@/components/ui/words";
import type { ReadingColumn, VisitReadings } from "./model";

export interface ReadingsOverTimeProps {
  caption: string;
  columns: readonly ReadingColumn[];
  visits: readonly VisitReadings[];
}

/** One band mark a visit: the band keeps its place, so a reading that wanders is seen down the column. */
export function ReadingsOverTime({ caption, columns, visits }: ReadingsOverTimeProps) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a table wider than its place scrolls, and must be reached by keyboard
    <section className="scrollx" tabIndex={0} aria-label={caption}>
      <table className="tbl rec-time">
        <caption className="vh">{caption}</caption>
        <thead>
          <tr>
            <th scope="col">Visit</th>
            <th scope="col">Taken</th>
            <th scope="col" className="r">
              Odometer
            </th>
            {columns.map((column) => (
              <th key={column.id} scope="col" colSpan={2}>
                <Words>{column.label}</Words> <span className="faint">{column.unit}</span>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {visits.map((visit) => (
            <tr key={visit.id}>
              <th scope="row" className="nowrap">
                <Link className="link num" href={visit.href} aria-label={`Case ${visit.number}`}>
                  {visit.number}
                </Link>{" "}
                {visit.on}
              </th>
              <td className="nowrap soft">{visit.phase}</td>
              <td className="num r">{visit.odometer}</td>
              {visit.cells.map((cell, index) => {
                const column = columns[index];
                if (!column) return null;
                return cell ? (
                  <ReadingCells key={column.id} cell={cell} column={column} />
                ) : (
                  <NoReading key={column.id} />
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}

function ReadingCells({ cell, column }: { cell: NonNullable<VisitReadings["cells"][number]>; column: ReadingColumn }) {
  return (
    <>
      <td className="r rec-value">
        {cell.isImpossible ? (
          <span className="alarm num">{cell.text}</span>
        ) : (
          <Num family={cell.family}>{cell.text}</Num>
        )}
      </td>
      <td className="rec-mark">
        {cell.isImpossible ? (
          <span className="note">not possible</span>
        ) : cell.band ? (
          <BandMark
            value={cell.value}
            band={cell.band}
            family={cell.family}
            isQuiet={cell.family === null}
            decimals={column.decimals}
            unit={column.unit}
          />
        ) : (
          <span className="note">no band</span>
        )}
      </td>
    </>
  );
}

function NoReading() {
  return (
    <>
      <td className="r rec-value">
        <span className="none" aria-hidden="true" />
      </td>
      <td className="rec-mark note">not taken</td>
    </>
  );
}
