import { checkTable, standsRight, type Table, tableTexts } from "./table.js";
import { oneLine, padText, terminalWidth } from "./terminal-width.js";

/** Space between columns. */
const gutter = "   ";

/**
 * A table for terminals and plain reports: headings, a rule, rows; numbers in engineering notation, right-aligned. No
 * line ends in blanks. Control characters become "�", so that a label cannot steer a terminal.
 *
 * @param table - columns and rows; one cell per column in each row.
 * @returns lines joined by newlines, without a newline at the end.
 * @throws OutOfDomainError for no column or a row of another length.
 *
 * @example
 * ```ts
 * import { textTable } from "@quietband/figures";
 * const columns = [{ heading: "source" }, { heading: "noise", unit: "V" }];
 * textTable({ columns, rows: [["bridge", 5.606e-9]] }).split("\n")[2]; // → bridge   5.606 nV
 * ```
 */
export function textTable(table: Table): string {
  checkTable(table);
  const texts = tableTexts(table).map((row) => row.map(oneLine));
  const headings = table.columns.map(({ heading }) => oneLine(heading));
  const right = table.columns.map((_, index) => standsRight(table, index));
  const widths = headings.map((heading, index) =>
    Math.max(terminalWidth(heading), ...texts.map((row) => terminalWidth(row[index] as string))),
  );
  const line = (cells: readonly string[]): string =>
    cells
      .map((cell, index) => padText(cell, widths[index] as number, right[index] === true))
      .join(gutter)
      .trimEnd();
  return [line(headings), widths.map((width) => "─".repeat(width)).join(gutter), ...texts.map(line)].join("\n");
}
