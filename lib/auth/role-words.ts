/** How a role is named where people read it. */
export const ROLE_WORDS: Record<string, string> = {
  owner: "owner",
  writer: "service writer",
  technician: "technician",
};
