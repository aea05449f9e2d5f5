import { isBlank } from "../ground/is-blank.js";
import { quoted } from "../ground/quoted.js";
import { refusal } from "./refusal.js";

/** Most rows and longest line, in characters, that a curve's text may have. */
export const mostRows = 1_000_000;
export const longestLine = 1000;

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

const lineFeed = 10;
const carriageReturn = 13;
const hash = 35;

/** Takes a text apart into lines, by one pass over its characters: rows by the million stay places, not strings. */
export function curveLines(text: string): CurveLines {
  const comments: CommentLine[] = [];
  const from: number[] = [];
  const to: number[] = [];
  const line: number[] = [];
  let number = 0;
  for (let start = 0; start <= text.length; ) {
    number += 1;
    const end = lineEnd(text, start);
    if (end - start > longestLine)
      throw refusal(
        number,
        `expected at most ${longestLine} characters, got ${end - start}, beginning ${quoted(text.slice(start, start + 20))}`,
      );
    let contentEnd = end;
    const comment = hashIn(text, start, end);
    if (comment < end) {
      comments.push({ line: number, text: text.slice(comment + 1, end) });
      contentEnd = comment;
    }
    const first = skipBlanks(text, start, contentEnd);
    if (first < contentEnd) {
      if (from.length > mostRows)
        // one more line may be a heading
        throw refusal(number, `expected at most ${mostRows} rows, got more; thin the curve first`);
      from.push(first);
      to.push(skipBlanksBack(text, first, contentEnd));
      line.push(number);
    }
    start = text.charCodeAt(end) === carriageReturn && text.charCodeAt(end + 1) === lineFeed ? end + 2 : end + 1;
  }
  return { comments, from, to, line };
}

/** The place of the first blank run's end at or after `from`. */
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

function lineEnd(text: string, from: number): number {
  let at = from;
  for (; at < text.length; at += 1) {
    const code = text.charCodeAt(at);
    if (code === lineFeed || code === carriageReturn) break;
  }
  return at;
}

/** Looks no further than the line: a search to the end of the text from every line would be quadratic. */
function hashIn(text: string, from: number, to: number): number {
  let at = from;
  while (at < to && text.charCodeAt(at) !== hash) at += 1;
  return at;
}
