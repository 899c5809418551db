import { FAMILY_WORDS, type Family } from "./family";

export interface GlyphProps {
  family: Family;
  /** Set when the family's word follows in the text; otherwise the mark names itself. */
  silent?: boolean;
}

/** The family's shape: lean open ring, rich full disc, ignition diamond, mechanical square. */
export function Glyph({ family, silent = false }: GlyphProps) {
  const word = silent ? undefined : FAMILY_WORDS[family];
  return (
    <svg className={`glyph ${family}`} viewBox="0 0 9 9" role="img" aria-hidden={silent || undefined} aria-label={word}>
      {family === "lean" && <circle className="o" cx="4.5" cy="4.5" r="3.5" />}
      {family === "rich" && <circle className="f" cx="4.5" cy="4.5" r="4.5" />}
      {family === "spark" && <path className="f" d="M4.5-.6 9.6 4.5 4.5 9.6-.6 4.5z" />}
      {family === "mech" && <path className="f" d="M.5.5h8v8h-8z" />}
    </svg>
  );
}
