/** Font the pictures ask for; the width table holds for its first three names, the reader's machine picks one. */
export const fontFamily = "Arial, Helvetica, 'Liberation Sans', sans-serif";

/** Height of a line of text, in font sizes. */
export const lineHeight = 1.3;

/** Where the baseline sits below the top of a line, in font sizes. */
export const ascent = 1;

/**
 * Advance widths in thousandths of the font size, grouped: the widths of the Helvetica family, which its lookalikes
 * share. What is not listed counts as an average letter, or as a full square from the East Asian blocks up.
 */
const widths: readonly (readonly [number, string])[] = [
  [191, "'"],
  [222, "ijl"],
  [260, "|"],
  [278, " !,./:;I[]\\ft·"],
  [333, "()-`r²³{}"],
  [355, '"'],
  [389, "*"],
  [400, "°"],
  [469, "^"],
  [500, "Jckvsxyz"],
  [549, "√≈≤≥"],
  [556, "#$0123456789?L_abdeghnopqu–"],
  [584, "+<=>~±×−"],
  [576, "µμ"],
  [611, "FTZ"],
  [667, "&ABEKPSVXY"],
  [713, "∞"],
  [722, "CDHNRUw"],
  [768, "ΩΣ"],
  [778, "GOQ"],
  [833, "Mm"],
  [889, "%"],
  [944, "W"],
  [1000, "—…→←‰"],
  [1015, "@"],
];

const widthOf: ReadonlyMap<string, number> = new Map(
  widths.flatMap(([width, characters]) => Array.from(characters, (character) => [character, width] as const)),
);

/** A little room for fonts that run wider than the table, which holds exactly for Liberation Sans. */
const safety = 1.04;

/** Approximate width of one line of text in pixels, at a font size in pixels; bold runs 7 % wider. */
export function textWidth(text: string, size: number, bold = false): number {
  let thousandths = 0;
  for (const character of text) thousandths += characterWidth(character);
  return (thousandths / 1000) * size * safety * (bold ? 1.07 : 1);
}

function characterWidth(character: string): number {
  const known = widthOf.get(character);
  if (known !== undefined) return known;
  return (character.codePointAt(0) as number) >= 0x1100 ? 1000 : 600;
}

/** How {@link wrapText} sets text. */
export interface WrapOptions {
  readonly size: number;
  readonly width: number;
  readonly maxLines: number;
  readonly bold?: boolean;
}

/** Breaks text into at most `maxLines` lines no wider than `width`, at blanks where it can; what is cut ends in "…". */
export function wrapText(text: string, { size, width, maxLines, bold = false }: WrapOptions): readonly string[] {
  const fits = (line: string): boolean => textWidth(line, size, bold) <= width;
  const lines: string[] = [];
  let rest = text.trim().replace(/\s+/g, " ");
  while (rest !== "" && lines.length < maxLines) {
    if (fits(rest)) {
      lines.push(rest);
      return lines;
    }
    if (lines.length === maxLines - 1) {
      lines.push(`${longestStart(rest, (start) => fits(`${start}…`)).trimEnd()}…`);
      return lines;
    }
    const start = longestStart(rest, fits);
    const blank = rest[start.length] === " " ? start.length : start.lastIndexOf(" ");
    const line = blank > 0 ? rest.slice(0, blank) : start;
    lines.push(line);
    rest = rest.slice(line.length).trimStart();
  }
  return lines;
}

/** Longest start of `text`, at least one character and never half of a surrogate pair, for which `fits` holds. */
function longestStart(text: string, fits: (start: string) => boolean): string {
  let start = "";
  for (const character of text) {
    if (start !== "" && !fits(start + character)) break;
    start += character;
  }
  return start;
}
