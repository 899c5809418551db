import { randomBytes } from "node:crypto";

const ALPHABET = "0123456789abcdefghjkmnpqrstvwxyz";

/**
 * A new opaque id with a prefix that tells its kind, as `case_01k…`. The first ten characters count milliseconds, so
 * rows written together lie together in an index; the last twelve are random (60 bits).
 */
export function newId(kind: string, now = Date.now()): string {
  let time = "";
  for (let rest = now, i = 0; i < 10; i++) {
    time = ALPHABET[rest % 32] + time;
    rest = Math.floor(rest / 32);
  }
  let random = "";
  for (const byte of randomBytes(12)) random += ALPHABET[byte % 32];
  return `${kind}_${time}${random}`;
}
