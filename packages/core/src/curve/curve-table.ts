import type { DecimalMark } from "../ground/decimal.js";
import { commaUse } from "../ground/decimal-mark.js";
import { MalformedDataError } from "../ground/errors.js";
import { quoted } from "../ground/quoted.js";
import type { UnitReading } from "../ground/unit.js";
import { beginsNumber, cellCount, type Separator, separatorOf, splitHeading } from "./curve-cells.js";
import { type Column, headingColumns, plainColumns } from "./curve-columns.js";
import { type CurveLines, mostRows } from "./curve-lines.js";
import { refusal } from "./refusal.js";

/** How the rows of a text are to be read, decided once for all of them. */
export interface CurveTable {
  readonly separator: Separator;
  readonly mark: DecimalMark;
  readonly columns: readonly Column[];
  /** Index of the first row among the lines: 1 below a heading. */
  readonly firstRow: number;
}

/** Units of columns whose heading names none. */
export interface GivenUnits {
  readonly frequency: UnitReading | undefined;
  readonly density: UnitReading | undefined;
}

/** Looks at the first line, which may be a heading, and at the commas of the rows. */
export function curveTable(text: string, lines: CurveLines, given: GivenUnits): CurveTable {
  const lineText = (index: number): string => text.slice(lines.from[index] ?? 0, lines.to[index] ?? 0);
  const first = lineText(0);
  const firstRow = first !== "" && !beginsNumber(first, 0) ? 1 : 0;
  const count = lines.from.length - firstRow;
  if (count < 2)
    throw new MalformedDataError(
      `A curve needs at least two rows at different frequencies, such as "1 kHz, 85 nV/√Hz"; got ${count}${first === "" ? "" : ` after ${quoted(first)}`}.`,
    );
  if (count > mostRows)
    throw refusal(lines.line[firstRow + mostRows] ?? 0, `expected at most ${mostRows} rows, got more; thin the curve`);
  const separator = separatorOf(first);
  const cells = cellCount(lineText(firstRow), separator);
  const columns =
    firstRow === 0 ? plainColumns(cells) : headingColumns(splitHeading(first, separator, cells), lines.line[0] ?? 1);
  return {
    separator,
    mark: separator === ";" || separator === "\t" ? decimalMark(text, lines, firstRow) : ".",
    columns: columns.map((column) => withUnit(column, given)),
    firstRow,
  };
}

/** A comma between digits of any row makes the comma the mark of all rows, unless it may stand for thousands throughout. */
function decimalMark(text: string, { from, to, line }: CurveLines, firstRow: number): DecimalMark {
  let unclear: number | undefined;
  for (let index = firstRow; index < from.length; index += 1) {
    const use = commaUse(text, from[index], to[index]);
    if (use === "decimal") return ",";
    if (use === "ambiguous") unclear ??= index;
  }
  if (unclear === undefined) return ".";
  throw refusal(
    line[unclear] as number,
    `expected numbers that can be read in one way, got ${quoted(text.slice(from[unclear], to[unclear]))}, where the comma may be decimal or stand for thousands; write 1000 or 1.000`,
  );
}

function withUnit(column: Column, given: GivenUnits): Column {
  if (column.unit !== undefined || (column.role !== "frequency" && column.role !== "density")) return column;
  return { ...column, unit: given[column.role] };
}
