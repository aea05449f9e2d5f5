const longest = 40;

/** Foreign text for a message: in quotes, cut to 40 characters, without what would move a terminal's cursor. */
export function quoted(foreign: unknown): string {
  const text = String(foreign);
  const cut = text.length > longest ? `${text.slice(0, longest)}…` : text;
  return `"${cut.replace(/[\p{Cc}\p{Zl}\p{Zp}]/gu, "·")}"`;
}

/** Ends a message like a sentence, unless it asks a question. */
export function sentence(text: string): string {
  return /[.?]$/.test(text) ? text : `${text}.`;
}
