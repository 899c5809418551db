import type { GivenAnswers } from "@/components/approve/model";

/** What a refused form brings back to its page: kept for two minutes in a cookie of that page alone, so it works without scripts. */
export interface Faults {
  errors: Record<string, string>;
  given?: GivenAnswers;
  question?: string;
}

export const FAULT_COOKIE = "fd-form";
const MOST = 3500;

export function faultCookie(path: string, faults: Faults): string {
  const text = encodeURIComponent(JSON.stringify(faults));
  const value = text.length > MOST ? encodeURIComponent(JSON.stringify({ errors: faults.errors })) : text;
  return `${FAULT_COOKIE}=${value}; Path=${path}; Max-Age=120; HttpOnly; SameSite=Lax`;
}

export const clearFaults = (path: string) => `${FAULT_COOKIE}=; Path=${path}; Max-Age=0; HttpOnly; SameSite=Lax`;

export function readFaults(value: string | undefined): Faults {
  if (!value) return { errors: {} };
  try {
    const parsed = JSON.parse(decodeURIComponent(value)) as Faults;
    return typeof parsed.errors === "object" && parsed.errors !== null ? parsed : { errors: {} };
  } catch {
    return { errors: {} };
  }
}

export function seeOther(location: string, cookie: string): Response {
  return new Response(null, { status: 303, headers: { location, "set-cookie": cookie } });
}
