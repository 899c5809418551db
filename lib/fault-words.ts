import { z } from "zod";

/**
 * What a checked input says when a rule of its shape has no sentence of its own: plain words for the person who typed,
 * instead of the checker's. Importing this file is enough; sentences written beside a rule win over it.
 */
export function faultWords(issue: { code?: string; [key: string]: unknown }): string | undefined {
  const count = (of: string, one: string, many: string) =>
    `${issue[of]} ${issue[of] === 1 || issue[of] === 1n ? one : many}`;
  switch (issue.code) {
    case "too_big":
      if (issue.origin === "string") return `That is too long: at most ${count("maximum", "character", "characters")}.`;
      if (issue.origin === "array") return `That is too many: at most ${issue.maximum}.`;
      return `That is too much: at most ${issue.maximum}.`;
    case "too_small":
      if (issue.origin === "string")
        return issue.minimum === 1
          ? "This can’t be empty."
          : `That is too short: at least ${count("minimum", "character", "characters")}.`;
      if (issue.origin === "array") return `That is too few: at least ${issue.minimum}.`;
      return issue.inclusive === false
        ? `That is too little: more than ${issue.minimum}.`
        : `That is too little: at least ${issue.minimum}.`;
    case "invalid_format":
      return issue.format === "email" ? "That is not an e-mail address." : "That is not written as it should be.";
    case "invalid_type":
      if (issue.input === undefined) return "This is missing.";
      if (issue.expected === "int") return "That is not a whole number.";
      return issue.expected === "number" ? "That is not a number." : "That does not fit here.";
    case "not_multiple_of":
      return "That has more decimals than can be kept.";
    case "invalid_value":
      return "That is not one of the choices.";
    default:
      return undefined;
  }
}

z.config({ customError: faultWords });
