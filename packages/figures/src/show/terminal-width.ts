/** Columns a text takes on a terminal: East Asian wide characters two, combining marks none, others one. */
export function terminalWidth(text: string): number {
  let width = 0;
  for (const character of text) width += /\p{Mark}/u.test(character) ? 0 : isWide(character) ? 2 : 1;
  return width;
}

/** Fills a text with blanks up to a width, at its end or, for what stands right, before it. */
export function padText(text: string, width: number, right: boolean): string {
  const blanks = " ".repeat(Math.max(0, width - terminalWidth(text)));
  return right ? blanks + text : text + blanks;
}

/** A text on one line: line breaks become blanks, and control characters, which could steer a terminal, "�". */
export function oneLine(text: string): string {
  return text.replace(/\s+/g, " ").replace(/\p{Control}/gu, "\uFFFD");
}

/** The East Asian wide blocks and the pictographs. */
function isWide(character: string): boolean {
  const code = character.codePointAt(0) as number;
  const within = (low: number, high: number): boolean => code >= low && code <= high;
  if (code < 0x1100) return false;
  return (
    within(0x1100, 0x115f) ||
    within(0x2e80, 0xa4cf) ||
    within(0xac00, 0xd7a3) ||
    within(0xf900, 0xfaff) ||
    within(0xfe30, 0xfe6f) ||
    within(0xff00, 0xff60) ||
    within(0xffe0, 0xffe6) ||
    within(0x1f300, 0x1faff) ||
    within(0x20000, 0x3fffd)
  );
}
