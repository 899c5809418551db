import type { Metadata } from "next";
import type { ReactNode } from "react";

export const metadata: Metadata = { robots: { index: false, follow: false } };

/** Customers read by daylight, on their own device; the address itself is the key, so nothing here may be indexed. */
export default function CustomerLayout({ children }: { children: ReactNode }) {
  return <div className="day-only">{children}</div>;
}
