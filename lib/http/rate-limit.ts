import "server-only";
import { AppError } from "@/lib/errors";

const windows = new Map<string, { from: number; count: number }>();
const MINUTE_MS = 60_000;
const MOST_KEYS = 20_000;

/**
 * Counts calls by caller and purpose in this process, one minute at a time. It slows guessing; what makes a guess
 * hopeless is the length of the secret. Without a trusted address header all callers share one count.
 */
export function limitRate(
  request: Request,
  purpose: string,
  { perMinute }: { perMinute: number },
  now = Date.now(),
): void {
  const header = process.env.CLIENT_ADDRESS_HEADER;
  const caller = (header && request.headers.get(header)) || "all";
  const key = `${purpose}|${caller}`;
  const slot = windows.get(key);
  if (!slot || now - slot.from > MINUTE_MS) {
    if (windows.size > MOST_KEYS) windows.clear();
    windows.set(key, { from: now, count: 1 });
    return;
  }
  slot.count += 1;
  if (slot.count > perMinute)
    throw new AppError("too_many", "Too many tries in one minute. Wait a little, then try again.");
}
