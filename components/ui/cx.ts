/** Joins class names, leaving out what is empty. */
export function cx(...parts: (string | false | null | undefined)[]): string | undefined {
  return parts.filter(Boolean).join(" ") || undefined;
}
