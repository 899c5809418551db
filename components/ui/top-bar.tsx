import Link from "next/link";
import type { ReactNode } from "react";
import type { Density } from "./device";
import { DensitySwitch, ThemeSwitch } from "./device-switches";
import { Logo } from "./logo";
import type { NavItem, PersonView } from "./nav-model";

export interface TopBarProps {
  home?: string;
  shop: string;
  nav: readonly NavItem[];
  person: PersonView;
  /** Where the find field sends its `q`; it works without scripts. */
  findAction?: string;
  findText?: string;
  /** A `SaveState`. */
  save?: ReactNode;
  density?: Density;
  /** Sign-out and the like, under the person's name. */
  menu?: ReactNode;
  /** An offline line, shown inverse under the bar. */
  offline?: ReactNode;
}

export function TopBar(props: TopBarProps) {
  const { home = "/cases", shop, nav, person, findAction = "/cases", findText, save, density, menu, offline } = props;
  return (
    <>
      <header className="top">
        <Link className="brand" href={home} aria-label="Firedeck, cases">
          <Logo />
        </Link>
        <span className="shop">{shop}</span>
        <nav aria-label="Main">
          {nav.map((item) => (
            <Link key={item.href} href={item.href} aria-current={item.current ? "page" : undefined}>
              {item.label}
            </Link>
          ))}
        </nav>
        <search className="find">
          <form action={findAction}>
            <input
              className="input"
              type="search"
              name="q"
              defaultValue={findText}
              aria-label="Find a case"
              placeholder="Number, name, plate, VIN or code"
              data-find
            />
            <span className="kbd" aria-hidden="true">
              /
            </span>
          </form>
        </search>
        {save}
        <details className="who-menu">
          <summary>
            <span className="who">
              {person.name} <span className="faint">{person.role}</span>
            </span>
          </summary>
          <div className="menu">
            <div className="switches">
              <DensitySwitch server={density} />
              <ThemeSwitch />
            </div>
            {menu}
          </div>
        </details>
      </header>
      {offline}
    </>
  );
}
