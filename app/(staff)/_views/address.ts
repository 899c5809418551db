/** What a list page reads from its address. */
export type Search = Record<string, string | string[] | undefined>;

export const one = (value: string | string[] | undefined) => (Array.isArray(value) ? value[0] : value) ?? "";

/** Text typed into a search: trimmed, capped, free of NULs. */
export const typed = (value: string | string[] | undefined) => one(value).replaceAll("\u0000", "").trim().slice(0, 100);

/** The last row of a page, as "id|sorted text". */
export const placeOf = (id: string, text: string) => `${id}|${text}`;

export function readPlace(value: string | string[] | undefined): { id: string; text: string } | null {
  const text = one(value).replaceAll("\u0000", "").slice(0, 260);
  const cut = text.indexOf("|");
  return cut > 0 ? { id: text.slice(0, cut), text: text.slice(cut + 1) } : null;
}

export const wholeNumber = (value: string | string[] | undefined): number | null =>
  /^\d{1,9}$/.test(one(value)) ? Number(one(value)) : null;

/** An address with the parameters that hold something. */
export function address(path: string, params: Record<string, string | number | null | undefined>): string {
  const query = new URLSearchParams();
  for (const [name, value] of Object.entries(params)) if (value) query.set(name, String(value));
  const text = query.toString();
  return text ? `${path}?${text}` : path;
}
