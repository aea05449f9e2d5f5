import { MalformedDataError } from "../ground/errors.js";
import type { CurveSourceEntry } from "./curve.js";

/** One line of a table that holds cells. */
export interface TableLine {
  /** Counted from 1. */
  readonly line: number;
  readonly cells: readonly string[];
}

/** A text taken apart: comments, an optional heading, rows. */
export interface TableText {
  readonly source: readonly CurveSourceEntry[];
  readonly heading: TableLine | undefined;
  readonly rows: readonly TableLine[];
  readonly decimalComma: boolean;
}

/** Most rows, and longest line in characters, that are read. */
export const mostRows = 1_000_000;
export const longestLine = 1000;

type Separator = ";" | "\t" | "," | " ";

/**
 * Takes a typed table apart in one pass. The separator is the first of semicolon, tab, comma, blanks that the first line with
 * a number has; with semicolon or tab a comma is a decimal sign.
 */
export function tableLines(text: string): TableText {
  const lines = text.split(/\r\n|\n|\r/);
  const source: CurveSourceEntry[] = [];
  const filled: { readonly line: number; readonly text: string }[] = [];
  for (const [index, whole] of lines.entries()) {
    if (whole.length > longestLine)
      throw new MalformedDataError(
        `Line ${index + 1} has ${whole.length} characters; a row of a curve has at most ${longestLine}. Is this the right file?`,
        { line: index + 1 },
      );
    const mark = whole.indexOf("#");
    if (mark >= 0) pushComment(source, whole.slice(mark + 1).trim(), whole.slice(0, mark).trim() === "");
    const content = (mark >= 0 ? whole.slice(0, mark) : whole).replace(/^\uFEFF/, "").trim();
    if (content !== "") filled.push({ line: index + 1, text: content });
  }
  const firstRow = filled.find(({ text: content }) => startsNumber(content));
  const separator = separatorOf(firstRow?.text ?? "");
  const [first] = filled;
  const hasHeading = first !== undefined && !startsNumber(first.text);
  const rows = hasHeading ? filled.slice(1) : filled;
  if (rows.length > mostRows)
    throw new MalformedDataError(`A curve has at most ${mostRows} rows; got ${rows.length}.`, {
      line: rows[mostRows]?.line ?? 0,
    });
  return {
    source,
    heading: hasHeading ? { line: first.line, cells: split(first.text, separator) } : undefined,
    rows: rows.map(({ line, text: content }) => ({ line, cells: split(content, separator) })),
    decimalComma: separator === ";" || separator === "\t",
  };
}

function pushComment(source: CurveSourceEntry[], comment: string, alone: boolean): void {
  if (comment === "") return;
  const colon = comment.indexOf(":");
  const key = colon > 0 ? comment.slice(0, colon).trim() : "";
  if (alone && key !== "" && key.length <= 40) source.push({ key, value: comment.slice(colon + 1).trim() });
  else source.push({ key: "", value: comment });
}

function startsNumber(text: string): boolean {
  return /^[+\-−]?[.,]?\d/.test(text);
}

function separatorOf(row: string): Separator {
  for (const separator of [";", "\t", ","] as const) if (row.includes(separator)) return separator;
  return " ";
}

function split(text: string, separator: Separator): string[] {
  if (separator !== " ") return text.split(separator).map((cell) => cell.trim());
  return joinUnits(text.split(/\s+/));
}

/** Between blanks a word that is no number belongs to the cell before it: "1.2 kHz", "density [V/√Hz]", "5 %". */
function joinUnits(words: readonly string[]): string[] {
  const cells: string[] = [];
  for (const word of words) {
    const attached =
      cells.length > 0 && word !== "aside" && !startsNumber(word) && isUnitLike(word, cells.at(-1) ?? "");
    if (attached) cells.push(`${cells.pop() ?? ""} ${word}`);
    else cells.push(word);
  }
  return cells;
}

/** After a number any word is its unit; after a heading's word only one in brackets is. */
function isUnitLike(word: string, before: string): boolean {
  return startsNumber(before) || word.startsWith("[") || word.startsWith("(");
}
