import { isDigit } from "./decimal.js";

/** How a text uses commas between digits: not at all, surely as the decimal mark, or so that one cannot tell. */
export type CommaUse = "none" | "decimal" | "ambiguous";

/**
 * Looks at every comma between two digits in [from, to). `1,000` may be one or a thousand; `0,001`, `2,4` and `12345,678`
 * can only be decimal, and one such number settles a whole text.
 */
export function commaUse(text: string, from = 0, to: number = text.length): CommaUse {
  let use: CommaUse = "none";
  let runStart = from;
  for (let at = from; at < to; at += 1) {
    const code = text.charCodeAt(at);
    if (isDigit(code)) continue;
    if (code === 44 && at > runStart && at + 1 < to && isDigit(text.charCodeAt(at + 1))) {
      if (!looksGrouped(text, runStart, at, to)) return "decimal";
      use = "ambiguous";
    }
    runStart = at + 1;
  }
  return use;
}

/** One to three digits that do not begin with 0, the comma, exactly three digits. */
function looksGrouped(text: string, runStart: number, comma: number, to: number): boolean {
  const before = comma - runStart;
  if (before > 3 || text.charCodeAt(runStart) === 48) return false;
  let after = 0;
  while (after < 4 && comma + 1 + after < to && isDigit(text.charCodeAt(comma + 1 + after))) after += 1;
  return after === 3;
}
