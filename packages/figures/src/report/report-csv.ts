import { csvTable } from "../show/csv-table.js";
import type { TableCell } from "../show/table.js";
import type { NoiseReport, ReportTable } from "./report.js";
import { rowName } from "./table-notes.js";

/**
 * The numbers of a report as CSV (RFC 4180): one row a number, with its section, unit, basis and assumption; tables follow as
 * rows "section, row, column". Numbers keep all their digits.
 *
 * @param report - from `noiseReport`.
 * @returns the text of a CSV file.
 *
 * @example
 * ```ts
 * import { noiseReport, reportCsv } from "@quietband/figures";
 * const entries = [{ name: "RMS", value: 1.2e-6, unit: "V", basis: "measured" }];
 * const report = noiseReport({ title: "Bench", sections: [{ heading: "Noise", entries, notes: [] }] });
 * reportCsv(report).split("\r\n")[1]; // → Noise,RMS,0.0000012,V,measured,
 * ```
 */
export function reportCsv({ sections }: NoiseReport): string {
  const rows = sections.flatMap(({ heading, entries, table }) => [
    ...entries.map(({ name, value, unit, basis, assumption }) => [heading, name, value, unit, basis, assumption ?? ""]),
    ...(table === undefined ? [] : tableRows(heading, table)),
  ]);
  const columns = ["section", "figure", "value", "unit", "rests on", "assumed"].map((name) => ({ heading: name }));
  return csvTable({ columns, rows });
}

/** A row a cell: a table inside a table of numbers. */
function tableRows(section: string, { columns, rows, assumptions = [] }: ReportTable): TableCell[][] {
  return rows.flatMap((row, index) => {
    const name = rowName(row);
    return row.flatMap((cell, place) => {
      if (cell === "" || cell === name) return [];
      const { heading = "", unit = "", basis = "" } = columns[place] ?? {};
      return [[section, `${name}, ${heading}`, cell, unit, basis, assumptions[index] ?? ""]];
    });
  });
}
