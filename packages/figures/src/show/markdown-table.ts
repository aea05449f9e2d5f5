import { checkTable, standsRight, type Table, tableTexts } from "./table.js";
import { oneLine } from "./terminal-width.js";

/**
 * The table as Markdown with pipes; numbers in engineering notation, their columns aligned right. Texts are escaped, so
 * that a label shows as it was typed.
 *
 * @param table - columns and rows; one cell per column in each row.
 * @returns lines joined by newlines, without a newline at the end.
 * @throws OutOfDomainError for no column or a row of another length.
 *
 * @example
 * ```ts
 * import { markdownTable } from "@quietband/figures";
 * const columns = [{ heading: "source" }, { heading: "noise", unit: "V" }];
 * markdownTable({ columns, rows: [["bridge", 5.606e-9]] }).split("\n")[2]; // → | bridge | 5.606 nV |
 * ```
 */
export function markdownTable(table: Table): string {
  checkTable(table);
  const line = (cells: readonly string[]): string => `| ${cells.join(" | ")} |`;
  const headings = table.columns.map(({ heading }) => escapeMarkdown(heading));
  const rule = table.columns.map((_, index) => (standsRight(table, index) ? "---:" : "---"));
  return [line(headings), line(rule), ...tableTexts(table).map((row) => line(row.map(escapeMarkdown)))].join("\n");
}

/** Text that Markdown shows as it stands, on one line. */
export function escapeMarkdown(text: string): string {
  return oneLine(text)
    .replace(/[\\`*_[\]|~#]/g, (character) => `\\${character}`)
    .replace(/&/g, "&amp;")
    .replace(/</g, "&lt;");
}
