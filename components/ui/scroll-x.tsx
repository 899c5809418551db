import type { ReactNode } from "react";

/** Something wider than its place, which scrolls by itself and can be reached and scrolled by keyboard. */
export function ScrollX({ label, children }: { label: string; children: ReactNode }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: it scrolls, so it must be reachable by keyboard
    <section className="scrollx" tabIndex={0} aria-label={label}>
      {children}
    </section>
  );
}
