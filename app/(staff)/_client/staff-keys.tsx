"use client";

import { usePathname, useRouter } from "next/navigation";
import { StaffShortcuts } from "@/components/ui/shortcuts";

const PARTS = { r: "readings", c: "causes", q: "quote", p: "proof" };

/** The keys every staff page knows; the parts of a case answer to G and a letter while a case is open. */
export function StaffKeys() {
  const router = useRouter();
  const found = /^\/cases\/(\d+)/.exec(usePathname());
  const parts = found
    ? Object.fromEntries(Object.entries(PARTS).map(([key, part]) => [key, `/cases/${found[1]}/${part}`]))
    : undefined;
  return <StaffShortcuts go={(href: string) => router.push(href)} parts={parts} />;
}
