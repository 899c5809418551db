import type { Styles } from "@react-pdf/renderer";
import { Text, View } from "@react-pdf/renderer";

type Style = Styles[string];

/** Typed text as it can be set: composed letters, plain spaces, no control characters. */
export const clean = (text: string): string =>
  text
    .normalize("NFC")
    .replace(/\r\n?/g, "\n")
    .replace(/[\t\u00a0\u202f\u2009]/g, " ")
    // biome-ignore lint/suspicious/noControlCharactersInRegex: these are what is to go
    .replace(/[\u0000-\u0009\u000b-\u001f\u007f\u200b\u2028\ufeff]/g, "");

/** For places that hold a single line: breaks become spaces. */
export const oneLine = (text: string): string => clean(text).replace(/\s+/g, " ").trim();

/**
 * A text of one or several lines. Each line is set for itself: a line break is in no font, and one inside a text would
 * pull in a font that is not embedded.
 */
export function Lines({ text, style }: { text: string; style?: Style }) {
  const lines = clean(text)
    .split("\n")
    .map((line) => line.trim());
  if (lines.length === 1) return <Text style={style}>{lines[0]}</Text>;
  return (
    <View>
      {lines.map((line, index) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: a paper is rendered once, in this order
        <Text key={index} style={style}>
          {line || " "}
        </Text>
      ))}
    </View>
  );
}
