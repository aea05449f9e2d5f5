/** A text on one line: runs of white space and control characters become one blank, those at the ends go. */
export function tidyText(text: string): string {
  return text.replace(/[\s\p{Cc}\u200b\ufeff]+/gu, " ").trim();
}
