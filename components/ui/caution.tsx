import type { ReactNode } from "react";

export interface CautionProps {
  /** A few words naming the danger. */
  title?: string;
  children: ReactNode;
}

/** Danger to people: a diagonal soot hatch, never a colour. It never blocks a record from being kept. */
export function Caution({ title, children }: CautionProps) {
  return (
    <div className="caution" role="note">
      <p>
        {title && <b>{title}</b>} {children}
      </p>
    </div>
  );
}
