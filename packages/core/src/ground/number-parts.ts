import { type DecimalMark, isDigit, isMinus } from "./decimal.js";
import { isBlank } from "./is-blank.js";
import { prefixExponent } from "./prefix.js";

/** A number and what stands behind it. */
export interface NumberParts {
  /** For `decimalIn` with the mark "." or the mark that was asked for. */
  readonly number: string;
  /** Letter of IEC 60062 notation that stood for the decimal mark (4k7), and its power of ten. */
  readonly letter: string;
  readonly letterExponent: number;
  /** What follows, without blanks at its ends: a unit, a prefix, or nothing. */
  readonly rest: string;
}

/** Letters that may stand for the decimal mark; R is that mark alone. IEC 60062, clause on letter and digit codes. */
const codeLetters = "RKkMGTpnµ\u03bcumf";

/** Splits a text that begins with a number; undefined when it does not. One pass, no backtracking. */
export function numberParts(text: string, mark: DecimalMark): NumberParts | undefined {
  const from = isSign(text.charCodeAt(0)) ? 1 : 0;
  let at = skipDigits(text, from);
  const letter = text.charAt(at);
  if (letter !== "" && codeLetters.includes(letter) && isDigit(text.charCodeAt(at + 1))) {
    const end = skipDigits(text, at + 1);
    return {
      number: `${text.slice(0, at)}.${text.slice(at + 1, end)}`.replace(",", "."),
      letter,
      letterExponent: letter === "R" ? 0 : (prefixExponent(letter) ?? 0),
      rest: trimmed(text, end),
    };
  }
  let digits = at - from;
  if (letter === mark) {
    const end = skipDigits(text, at + 1);
    digits += end - at - 1;
    at = end;
  }
  if (digits === 0) return undefined;
  at = skipExponent(text, at);
  return { number: text.slice(0, at), letter: "", letterExponent: 0, rest: trimmed(text, at) };
}

/** Behind `e±digits`; where a letter e begins a word instead, nothing is skipped. */
function skipExponent(text: string, at: number): number {
  const letter = text.charAt(at);
  if (letter !== "e" && letter !== "E") return at;
  const digits = isSign(text.charCodeAt(at + 1)) ? at + 2 : at + 1;
  const end = skipDigits(text, digits);
  return end > digits ? end : at;
}

function skipDigits(text: string, from: number): number {
  let at = from;
  while (isDigit(text.charCodeAt(at))) at += 1;
  return at;
}

function isSign(code: number): boolean {
  return code === 43 || isMinus(code);
}

function trimmed(text: string, from: number): string {
  let start = from;
  let end = text.length;
  while (start < end && isBlank(text.charCodeAt(start))) start += 1;
  while (end > start && isBlank(text.charCodeAt(end - 1))) end -= 1;
  return text.slice(start, end);
}
