import type { ReportTable } from "./report.js";

/** What the columns of a table rest on, and what was assumed for its rows: a sentence each. */
export function tableNotes({ columns, rows, assumptions = [] }: ReportTable): readonly string[] {
  const bases = columns.flatMap(({ heading, basis }) => (basis === undefined ? [] : [`${heading}: ${basis}.`]));
  const assumed = rows.flatMap((row, index) => {
    const assumption = assumptions[index] ?? "";
    return assumption === "" ? [] : [`${rowName(row)}: ${assumption}`];
  });
  return [...bases, ...assumed];
}

/** The first text of a row names it. */
export function rowName(row: ReportTable["rows"][number]): string {
  return String(row.find((cell) => typeof cell === "string" && cell !== "") ?? "row");
}
