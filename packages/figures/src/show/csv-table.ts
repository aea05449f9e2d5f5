import { checkTable, type Table, type TableCell } from "./table.js";

/**
 * The table as comma-separated values after RFC 4180: one heading line, CR LF after every line, quotes where a cell
 * needs them. Numbers are written in the column's unit with all their digits, the unit stands in the heading, so that a
 * spreadsheet reads numbers and not texts.
 *
 * @param table - columns and rows; one cell per column in each row.
 * @returns the text of a CSV file.
 * @throws OutOfDomainError for no column or a row of another length.
 *
 * @example
 * ```ts
 * import { csvTable } from "@quietband/figures";
 * const columns = [{ heading: "source" }, { heading: "noise", unit: "V" }];
 * csvTable({ columns, rows: [["bridge", 5.606e-9]] }).split("\r\n")[1]; // → bridge,5.606e-9
 * ```
 */
export function csvTable(table: Table): string {
  checkTable(table);
  const headings = table.columns.map(({ heading, unit = "" }) => (unit === "" ? heading : `${heading} [${unit}]`));
  return [headings, ...table.rows].map((row) => `${row.map(field).join(",")}\r\n`).join("");
}

function field(cell: TableCell): string {
  const text = String(cell);
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
