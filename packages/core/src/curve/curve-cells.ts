import { isDigit, isMinus } from "../ground/decimal.js";
import { isBlank } from "../ground/is-blank.js";
import { skipBlanks, skipBlanksBack } from "./curve-lines.js";

/** What stands between the cells of a table. */
export type Separator = ";" | "\t" | "," | " ";

/** Word that, as the last cell of a row, keeps a point for show and out of fits. */
export const asideMark = "aside";

/** The separator of a table, decided on its first line: semicolon before tab before comma before blanks. */
export function separatorOf(line: string): Separator {
  for (const separator of [";", "\t", ","] as const) if (line.includes(separator)) return separator;
  return " ";
}

/**
 * Writes where the cells of [from, to) begin and end into `bounds`, two numbers a cell, and gives their count. Between
 * blanks a word that does not begin like a number belongs to the cell before it: `1.2 kHz`, `85 nV/√Hz`, `5 %`.
 */
export function splitCells(text: string, from: number, to: number, separator: Separator, bounds: number[]): number {
  return separator === " "
    ? splitWords(text, from, to, bounds)
    : splitAt(text, from, to, separator.charCodeAt(0), bounds);
}

function splitAt(text: string, from: number, to: number, separator: number, bounds: number[]): number {
  let count = 0;
  let start = from;
  for (let at = from; at <= to; at += 1) {
    if (at < to && text.charCodeAt(at) !== separator) continue;
    const first = skipBlanks(text, start, at);
    bounds[2 * count] = first;
    bounds[2 * count + 1] = skipBlanksBack(text, first, at);
    count += 1;
    start = at + 1;
  }
  return count;
}

function splitWords(text: string, from: number, to: number, bounds: number[]): number {
  let count = 0;
  for (let at = from; at < to; ) {
    const start = skipBlanks(text, at, to);
    at = start;
    while (at < to && !isBlank(text.charCodeAt(at))) at += 1;
    if (at === start) break;
    if (count === 0 || beginsCell(text, start, at)) {
      bounds[2 * count] = start;
      count += 1;
    }
    bounds[2 * count - 1] = at;
  }
  return count;
}

function beginsCell(text: string, from: number, to: number): boolean {
  return beginsNumber(text, from) || text.charAt(from) === "±" || isAside(text, from, to);
}

/** Whether a sign, a digit or a point stands here: a row begins so, a heading does not. */
export function beginsNumber(text: string, at: number): boolean {
  const code = text.charCodeAt(at);
  return isDigit(code) || isMinus(code) || code === 43 || code === 46 || code === 44;
}

export function isAside(text: string, from: number, to: number): boolean {
  return to - from === asideMark.length && text.startsWith(asideMark, from);
}

/** Number of cells of a row, its aside not counted. */
export function cellCount(row: string, separator: Separator): number {
  const bounds: number[] = [];
  const count = splitCells(row, 0, row.length, separator, bounds);
  return count > 0 && isAside(row, bounds[2 * count - 2] as number, bounds[2 * count - 1] as number)
    ? count - 1
    : count;
}

/**
 * Cells of a heading. Between blanks every word begins a cell, except a unit in brackets; where that makes more cells than
 * the rows have, names have several words and each cell ends with its bracket: `noise density [nV/√Hz]`.
 */
export function splitHeading(heading: string, separator: Separator, most: number): readonly string[] {
  if (separator !== " ") {
    const cells = heading.split(separator).map((cell) => cell.trim());
    return cells.slice(0, cells.findLastIndex((cell) => cell !== "") + 1);
  }
  const words = heading.split(/\s+/);
  const cells = joined(words, (word) => /^[[(]/.test(word));
  return cells.length <= most ? cells : joined(words, (_, before) => !/[\])]$/.test(before));
}

/** Words joined to cells: one goes to the cell before it where that has an open bracket or `belongs` says so. */
function joined(words: readonly string[], belongs: (word: string, before: string) => boolean): string[] {
  const cells: string[] = [];
  for (const word of words) {
    const before = cells.at(-1);
    if (before !== undefined && (isOpen(before) || belongs(word, before)))
      cells[cells.length - 1] = `${before} ${word}`;
    else cells.push(word);
  }
  return cells;
}

function isOpen(cell: string): boolean {
  return cell.lastIndexOf("[") > cell.lastIndexOf("]") || cell.lastIndexOf("(") > cell.lastIndexOf(")");
}
