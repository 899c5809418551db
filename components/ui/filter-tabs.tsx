import Link from "next/link";

export interface TabView {
  label: string;
  href: string;
  count?: number;
  current?: boolean;
}

/** A line of words; the chosen one carries the rule. They are links: the choice lives in the address. */
export function FilterTabs({ label, lead, tabs }: { label: string; lead?: string; tabs: readonly TabView[] }) {
  return (
    <nav className="pick" aria-label={label}>
      {lead && <span className="faint">{lead}</span>}
      {tabs.map((tab) => (
        <Link key={tab.href} href={tab.href} aria-current={tab.current ? "true" : undefined}>
          {tab.label} {tab.count !== undefined && <span className="num">{tab.count}</span>}
        </Link>
      ))}
    </nav>
  );
}
