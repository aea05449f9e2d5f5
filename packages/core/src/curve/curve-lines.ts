import { isBlank } from "../ground/is-blank.js";
import { quoted } from "../ground/quoted.js";
import { refusal } from "./refusal.js";

/** Most rows and longest line, in characters, that a curve's text may have. */
export const mostRows = 1_000_000;
const longestLine = 1000;

/** A comment: what stands behind # on a line, and which line. */
export interface CommentLine {
  readonly line: number;
  readonly text: string;
}

/** Where the lines that hold cells stand in the text, without comments and without blanks at their ends. */
export interface CurveLines {
  readonly comments: readonly CommentLine[];
  readonly from: readonly number[];
  readonly to: readonly number[];
  /** Counted from 1. */
  readonly line: readonly number[];
}

/** Takes a text apart into lines, by one pass over its characters: rows by the million stay places, not strings. */
export function curveLines(text: string): CurveLines {
  const comments: CommentLine[] = [];
  const from: number[] = [];
  const to: number[] = [];
  const line: number[] = [];
  // a carriage return before a line feed is a blank at the end of the line; alone it ends lines where no line feed does
  const lineBreak = text.includes("\n") ? "\n" : "\r";
  const hashAfter = nextPlace(text, "#");
  const breakAfter = nextPlace(text, lineBreak);
  for (let start = 0, number = 1; start <= text.length; number += 1) {
    const end = breakAfter(start);
    if (end - start > longestLine)
      throw refusal(
        number,
        `expected at most ${longestLine} characters, got ${end - start}, beginning ${quoted(text.slice(start, start + 20))}`,
      );
    const content = Math.min(hashAfter(start), end);
    if (content < end) comments.push({ line: number, text: text.slice(content + 1, end) });
    const first = skipBlanks(text, start, content);
    if (first < content) {
      // one line more than rows: the first may be a heading
      if (from.length > mostRows) throw refusal(number, `expected at most ${mostRows} rows, got more; thin the curve`);
      from.push(first);
      to.push(skipBlanksBack(text, first, content));
      line.push(number);
    }
    start = end + 1;
  }
  return { comments, from, to, line };
}

/** The place of a character at or after a start, the text's end where there is none; each stretch is searched once. */
function nextPlace(text: string, character: string): (start: number) => number {
  let found = -1;
  return (start) => {
    if (found < start) found = text.indexOf(character, start);
    if (found < 0) found = text.length;
    return found;
  };
}

/** The first place in [from, to) that is no blank. */
export function skipBlanks(text: string, from: number, to: number): number {
  let at = from;
  while (at < to && isBlank(text.charCodeAt(at))) at += 1;
  return at;
}

/** The end of [from, to) without the blanks before it. */
export function skipBlanksBack(text: string, from: number, to: number): number {
  let at = to;
  while (at > from && isBlank(text.charCodeAt(at - 1))) at -= 1;
  return at;
}
