import { join } from "node:path";
import { Font } from "@react-pdf/renderer";

/** Static instances of the two typefaces (see fonts/README.md). Each stack ends with the extended Latin set. */
export const TEXT = ["Archivo", "Archivo Ext"];
export const WIDE = ["Archivo Wide", "Archivo Wide Ext"];
export const FIGURES = ["Martian Mono", "Martian Mono Ext", "Archivo", "Archivo Ext"];

const FOLDER = "lib/pdf/fonts";

const FAMILIES: Record<string, { file: string; fontWeight: number }[]> = {
  Archivo: [
    { file: "archivo-420", fontWeight: 400 },
    { file: "archivo-620", fontWeight: 600 },
  ],
  "Archivo Wide": [{ file: "archivo-620-wide", fontWeight: 600 }],
  "Martian Mono": [
    { file: "martian-mono-400", fontWeight: 400 },
    { file: "martian-mono-640", fontWeight: 600 },
  ],
};

let registered = false;

/** The library keeps fonts by process; registering once is enough. */
export function registerFonts(): void {
  if (registered) return;
  registered = true;
  for (const [family, fonts] of Object.entries(FAMILIES)) {
    for (const [suffix, ending] of [
      ["", ""],
      [" Ext", "-ext"],
    ]) {
      Font.register({
        family: family + suffix,
        fonts: fonts.map(({ file, fontWeight }) => ({
          src: join(process.cwd(), FOLDER, `${file}${ending}.ttf`),
          fontWeight,
        })),
      });
    }
  }
  // words are not split: a part number or a name broken by the renderer could no longer be searched for
  Font.registerHyphenationCallback((word) => splitOverlong(word));
}

/** Only what could not fit a line at all may break, without a hyphen being added to what somebody typed. */
const LONGEST = 34;
function splitOverlong(word: string): string[] {
  return word.length <= LONGEST ? [word] : (word.match(new RegExp(`.{1,${LONGEST}}`, "gu")) ?? [word]);
}
