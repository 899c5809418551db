import type { ReactNode } from "react";
import { cx } from "./cx";
import type { Family } from "./family";

export interface NumProps {
  children: ReactNode;
  /** A deviant value: the family's colour and heavy weight. */
  family?: Family | null;
  className?: string;
}

/** Every measured value, amount, time, code, plate or VIN. */
export function Num({ children, family, className }: NumProps) {
  return <span className={cx("num", family && "dev", family, className)}>{children}</span>;
}

/** A unit after its number, in label style. */
export function Unit({ children }: { children: ReactNode }) {
  return <span className="faint"> {children}</span>;
}
