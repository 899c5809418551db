import Link from "next/link";
import type { ReactNode } from "react";
import { DensitySwitch, ThemeSwitch } from "./device-switches";
import { Mark } from "./logo";
import type { PartLink, StripView } from "./nav-model";

export interface BayBarProps {
  home?: string;
  strip: StripView;
  /** "Testing, due 16:30". */
  stateWords: string;
  /** "Late since 07:30", inverse. */
  late?: string;
  /** A `MiniStage`. */
  mini: ReactNode;
  /** The parts of the case: the first four stand in the bar, the rest under More. */
  parts: readonly PartLink[];
  save?: ReactNode;
  menu?: ReactNode;
  /** When it happens and what is agreed: kept in view on every bay page. */
  agreed?: string;
}

const IN_BAR = ["Readings", "Causes", "Repair", "Proof"];

/** The bar of the bay: everything a gloved hand needs, 60 px high, and the complaint under it. */
export function BayBar({ home = "/cases", strip, stateWords, late, mini, parts, save, menu, agreed }: BayBarProps) {
  const shown = parts.filter((part) => IN_BAR.includes(part.label));
  const rest = parts.filter((part) => !IN_BAR.includes(part.label));
  return (
    <header>
      <div className="baytop">
        <Link href={home} className="bk" aria-label="All cases">
          <Mark />
        </Link>
        <div className="bid">
          <span className="num">{strip.number}</span>
          <b>{strip.vehicle}</b>
        </div>
        <span className="bst">
          {mini} {stateWords} {late && <span className="alarm">{late}</span>}
        </span>
        <nav aria-label="Parts of the case">
          {shown.map((part) => (
            <Link key={part.href} href={part.href} aria-current={part.current ? "page" : undefined}>
              {part.label}
            </Link>
          ))}
          <details className="more">
            <summary aria-current={rest.some((part) => part.current) ? "true" : undefined}>More</summary>
            <div className="menu">
              {rest.map((part) => (
                <Link key={part.href} href={part.href} aria-current={part.current ? "page" : undefined}>
                  {part.label}
                </Link>
              ))}
              <div className="inner switches">
                <DensitySwitch server="bay" />
                <ThemeSwitch />
              </div>
              {menu && <div className="inner">{menu}</div>}
            </div>
          </details>
        </nav>
        {save}
      </div>
      <div className="baysaid">
        <span className="said" title={strip.complaint}>
          {strip.complaint}
        </span>
        {agreed && <span className="faint">{agreed}</span>}
      </div>
    </header>
  );
}
