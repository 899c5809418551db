/** The four families of a finding. Each has a colour, a shape and a word; the word is never left out for the reader's ear. */
export type Family = "lean" | "rich" | "spark" | "mech";

export const FAMILY_WORDS: Record<Family, string> = {
  lean: "lean",
  rich: "rich",
  spark: "ignition",
  mech: "mechanical",
};
