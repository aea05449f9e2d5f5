import { OutOfDomainError, writeQuantity } from "@quietband/core";

/** One column of a table. */
export interface TableColumn {
  readonly heading: string;
  /** Unit of the numbers in it; none for texts and pure numbers. */
  readonly unit?: string | undefined;
  /** Numbers stand right and texts left unless given. */
  readonly align?: "left" | "right" | undefined;
  /** Significant digits of numbers in text and Markdown, zeros included; up to 4 unless given. CSV keeps all. */
  readonly digits?: number | undefined;
}

/** A text already formatted, or a number in the column's unit; an empty text where there is nothing to say. */
export type TableCell = string | number;

/** What text, Markdown and CSV tables are made from. */
export interface Table {
  readonly columns: readonly TableColumn[];
  readonly rows: readonly (readonly TableCell[])[];
}

/** Digits of a number where the column names none. */
const usualDigits = 4;

/** Refuses rows that are longer or shorter than the heading: a number under a wrong heading is a wrong answer. */
export function checkTable({ columns, rows }: Table): void {
  if (columns.length === 0) throw new OutOfDomainError("A table needs at least one column; got none.");
  for (const [index, row] of rows.entries())
    if (row.length !== columns.length)
      throw new OutOfDomainError(
        `Every row of a table needs one cell per column, ${columns.length}; row ${index} has ${row.length}.`,
      );
}

/** All cells as people read them: numbers in engineering notation with their column's unit. */
export function tableTexts({ columns, rows }: Table): readonly (readonly string[])[] {
  return rows.map((row) =>
    row.map((cell, index) => {
      if (typeof cell === "string") return cell;
      const { unit = "", digits } = columns[index] as TableColumn;
      return digits === undefined
        ? writeQuantity(Number(cell.toPrecision(usualDigits)), unit)
        : writeQuantity(cell, unit, { digits });
    }),
  );
}

/** Whether a column stands right: as it says, or because it holds numbers and nothing else but empty cells. */
export function standsRight({ columns, rows }: Table, index: number): boolean {
  const align = columns[index]?.align;
  if (align !== undefined) return align === "right";
  const cells = rows.map((row) => row[index]);
  return (
    cells.some((cell) => typeof cell === "number") && cells.every((cell) => typeof cell === "number" || cell === "")
  );
}
