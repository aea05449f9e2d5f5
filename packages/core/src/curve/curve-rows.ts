import { quoted } from "../ground/quoted.js";
import { cellReader, type DensityQuantity } from "./cell-reader.js";
import { isAside, splitCells } from "./curve-cells.js";
import type { Column, ColumnRole } from "./curve-columns.js";
import type { CurveLines } from "./curve-lines.js";
import type { CurveTable } from "./curve-table.js";
import { refusal } from "./refusal.js";

/** The rows of a table by columns, in SI units, in the order typed. */
export interface CurveRows {
  readonly frequency: readonly number[];
  readonly density: readonly number[];
  /** NaN where none was stated. */
  readonly uncertainty: readonly number[];
  readonly inFit: readonly boolean[];
  /** One array a column of common errors. */
  readonly effects: readonly (readonly number[])[];
  readonly quantity: DensityQuantity;
}

/** Reads all rows; allocates nothing a row but what it keeps, as long as the cells are plain numbers. */
export function curveRows(text: string, { from, to, line }: CurveLines, table: CurveTable): CurveRows {
  const { separator, columns, firstRow } = table;
  const reader = cellReader(text, table.mark);
  const place = (role: ColumnRole): number => columns.findIndex((column) => column.role === role);
  const [first, second, third] = [place("frequency"), place("density"), place("uncertainty")];
  const common = columns.flatMap(({ role }, index) => (role === "common" ? [index] : []));
  const unit = columns.map((column) => column.unit);
  const rows = {
    frequency: [] as number[],
    density: [] as number[],
    uncertainty: [] as number[],
    inFit: [] as boolean[],
  };
  const effects = common.map((): number[] => []);
  const bounds: number[] = [];
  for (let index = firstRow; index < from.length; index += 1) {
    const start = from[index] as number;
    const end = to[index] as number;
    const number = line[index] as number;
    const count = splitCells(text, start, end, separator, bounds);
    const filled = filledCells(bounds, count, columns.length);
    const last = 2 * (filled - 1);
    const aside = isAside(text, bounds[last] as number, bounds[last + 1] as number);
    const cells = aside ? filled - 1 : filled;
    if (cells !== columns.length) throw wrongCount(text.slice(start, end), cells, columns, number);
    rows.frequency.push(
      reader.frequency(bounds[2 * first] as number, bounds[2 * first + 1] as number, unit[first], number),
    );
    rows.density.push(
      reader.density(bounds[2 * second] as number, bounds[2 * second + 1] as number, unit[second], number),
    );
    rows.uncertainty.push(
      third < 0
        ? Number.NaN
        : reader.uncertainty(bounds[2 * third] as number, bounds[2 * third + 1] as number, unit[third], number),
    );
    rows.inFit.push(!aside);
    for (const [which, at] of common.entries())
      effects[which]?.push(reader.effect(bounds[2 * at] as number, bounds[2 * at + 1] as number, unit[at], number));
  }
  return { ...rows, effects, quantity: reader.quantity() as DensityQuantity };
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
