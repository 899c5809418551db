import { Fragment, type ReactNode } from "react";

const FORMULA = /(?<![A-Za-z])(CO2|CO₂|H2O|H₂O|O2|O₂)(?![\w-])/g;

/**
 * Text whose chemical formulas get real subscripts. Neither typeface has subscript digits or Greek, so
 * "O2" becomes O<sub>2</sub> and the letter lambda becomes the word.
 */
export function Words({ children }: { children: string }): ReactNode {
  const text = children.replaceAll("λ", "lambda").replace(/^lambda/, "Lambda");
  const pieces = text.split(FORMULA);
  if (pieces.length === 1) return text;
  return pieces.map((piece, index) => {
    const match = /^(CO|H|O)[2₂](O?)$/.exec(piece);
    // biome-ignore lint/suspicious/noArrayIndexKey: the pieces of one string have no other identity
    if (!match) return <Fragment key={index}>{piece}</Fragment>;
    return (
      // biome-ignore lint/suspicious/noArrayIndexKey: as above
      <Fragment key={index}>
        {match[1]}
        <sub>2</sub>
        {match[2]}
      </Fragment>
    );
  });
}
