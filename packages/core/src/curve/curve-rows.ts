import { quoted } from "../ground/quoted.js";
import { cellReader, type DensityQuantity } from "./cell-reader.js";
import { isAside, splitCells } from "./curve-cells.js";
import type { Column } from "./curve-columns.js";
import type { CurveLines } from "./curve-lines.js";
import type { CurveTable } from "./curve-table.js";
import { refusal } from "./refusal.js";

/** The rows of a table by columns, in SI units, in the order typed. */
export interface CurveRows {
  readonly frequency: Float64Array;
  readonly density: Float64Array;
  /** NaN where none was stated. */
  readonly uncertainty: Float64Array;
  /** 1 where the row is an aside. */
  readonly aside: Uint8Array;
  /** One array a column of common errors. */
  readonly effects: readonly Float64Array[];
  readonly quantity: DensityQuantity;
}

/** Reads all rows; allocates nothing a row as long as the cells are plain numbers. */
export function curveRows(
  text: string,
  lines: CurveLines,
  { separator, mark, columns, firstRow }: CurveTable,
): CurveRows {
  const count = lines.from.length - firstRow;
  const reader = cellReader(text, mark);
  const rows = {
    frequency: new Float64Array(count),
    density: new Float64Array(count),
    uncertainty: new Float64Array(count).fill(Number.NaN),
    aside: new Uint8Array(count),
    effects: columns.filter(({ role }) => role === "common").map(() => new Float64Array(count)),
  };
  // densities before uncertainties: their kind decides what 5 % means
  const order = (["frequency", "density", "uncertainty", "common"] as const).flatMap((role) =>
    columns.flatMap((column, place) => (column.role === role ? [{ place, role, unit: column.unit }] : [])),
  );
  const firstCommon = order.length - rows.effects.length;
  const values = order.map(({ role }, index) =>
    role === "common" ? (rows.effects[index - firstCommon] as Float64Array) : rows[role],
  );
  const bounds: number[] = [];
  for (let row = 0; row < count; row += 1) {
    const start = lines.from[firstRow + row] as number;
    const end = lines.to[firstRow + row] as number;
    const line = lines.line[firstRow + row] as number;
    const filled = filledCells(bounds, splitCells(text, start, end, separator, bounds), columns.length);
    const aside = isAside(text, bounds[2 * filled - 2] as number, bounds[2 * filled - 1] as number);
    if (aside) rows.aside[row] = 1;
    const cells = aside ? filled - 1 : filled;
    if (cells !== columns.length) throw wrongCount(text.slice(start, end), cells, columns, line);
    for (let index = 0; index < order.length; index += 1) {
      const { place, role, unit } = order[index] as (typeof order)[number];
      const value = reader[role](bounds[2 * place] as number, bounds[2 * place + 1] as number, unit, line);
      (values[index] as Float64Array)[row] = value;
    }
  }
  return { ...rows, quantity: reader.quantity() as DensityQuantity };
}

/** Cells without the empty ones that a separator at the end of a row makes. */
function filledCells(bounds: readonly number[], count: number, wanted: number): number {
  let filled = count;
  while (filled > wanted && bounds[2 * filled - 2] === bounds[2 * filled - 1]) filled -= 1;
  return filled;
}

function wrongCount(row: string, cells: number, columns: readonly Column[], line: number): Error {
  const wanted = columns.map(({ role, name }) => (role === "common" ? `common ${name}` : role)).join(", ");
  const dash =
    columns.length > 2 && cells < columns.length ? "; a dash stands for an uncertainty that is not stated" : "";
  return refusal(line, `expected ${columns.length} cells (${wanted}), got ${cells} in ${quoted(row)}${dash}`);
}
