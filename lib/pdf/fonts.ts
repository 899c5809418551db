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

let ready: Promise<void> | undefined;

/** Registers and loads the fonts; the library keeps them by process, so once is enough. */
export function loadFonts(): Promise<void> {
  ready ??= load();
  return ready;
}

interface LoadedFont {
  characterSet: number[];
  glyphForCodePoint(codePoint: number): unknown;
}

async function load(): Promise<void> {
  // words are not split: a part number or a name broken by the renderer could no longer be searched for
  Font.registerHyphenationCallback((word) => splitOverlong(word));
  for (const [name, fonts] of Object.entries(FAMILIES)) {
    for (const [suffix, ending] of [
      ["", ""],
      [" Ext", "-ext"],
    ]) {
      const family = name + suffix;
      Font.register({
        family,
        fonts: fonts.map(({ file, fontWeight }) => ({
          src: join(process.cwd(), FOLDER, `${file}${ending}.ttf`),
          fontWeight,
        })),
      });
      for (const { fontWeight } of fonts) {
        await Font.load({ fontFamily: family, fontWeight });
        nameGlyphs(Font.getFont({ fontFamily: family, fontWeight })?.data as unknown as LoadedFont);
      }
    }
  }
}

/**
 * The font library notes the character of a glyph when it first meets it, for good. Met first as a part of another glyph
 * it has none, and every later paper of the process lacks that character ("−749,87" lost its sign); met under another
 * character it reads as that one. So all are met here, by character, in one order.
 */
function nameGlyphs(font: LoadedFont): void {
  for (const codePoint of [...font.characterSet].sort((a, b) => a - b)) font.glyphForCodePoint(codePoint);
}

/** Only what may be wider than a column can break, and nearly anywhere; nobody's name is that long. */
const LONGEST = 22;
const PIECE = /.{1,5}/gu;
const splitOverlong = (word: string): string[] => (word.length <= LONGEST ? [word] : (word.match(PIECE) ?? [word]));
