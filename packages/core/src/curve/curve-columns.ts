import { unwrapped } from "../ground/base-unit.js";
import { quoted } from "../ground/quoted.js";
import { readUnit, type UnitProblem, type UnitReading } from "../ground/unit.js";
import { refusal } from "./refusal.js";

/** What a column holds; "common" is an error that all points share (see `CommonEffect`). */
export type ColumnRole = "frequency" | "density" | "uncertainty" | "common";

/** A column of a table. */
export interface Column {
  readonly role: ColumnRole;
  readonly name: string;
  /** Unit of cells that name none. */
  readonly unit: UnitReading | undefined;
}

const example = '"frequency [Hz], density [nV/√Hz]"';

/** Columns of a table without heading: frequency, density and perhaps uncertainty. */
export function plainColumns(count: number): readonly Column[] {
  const roles = ["frequency", "density", "uncertainty"] as const;
  return roles.slice(0, count > 2 ? 3 : 2).map((role) => ({ role, name: "", unit: undefined }));
}

/**
 * What a heading says of its columns. A column is known by its unit, else by its name, else by its place: frequency,
 * density, uncertainty.
 */
export function headingColumns(cells: readonly string[], line: number): readonly Column[] {
  const read = cells.map((cell) => headingCell(cell, line));
  const taken = new Set(read.map(({ role }) => role));
  const open = (["frequency", "density", "uncertainty"] as const).filter((role) => !taken.has(role));
  const columns = read.map((cell): Column => {
    const role = cell.role ?? open.shift();
    if (role !== undefined) return { role, name: cell.name, unit: cell.unit };
    throw refusal(line, `expected columns for frequency, density and uncertainty, got one more, ${quoted(cell.name)}`);
  });
  for (const role of ["frequency", "density", "uncertainty"] as const) {
    const count = columns.filter((column) => column.role === role).length;
    if (count === 0 && role !== "uncertainty")
      throw refusal(
        line,
        `expected a heading such as ${example}, got no column of ${role} in ${quoted(cells.join(" | "))}`,
      );
    if (count > 1)
      throw refusal(
        line,
        `expected one column of ${role}, got ${count} in ${quoted(cells.join(" | "))}; a text holds one curve`,
      );
  }
  return columns;
}

interface HeadingCell {
  readonly name: string;
  readonly unit: UnitReading | undefined;
  readonly role: ColumnRole | undefined;
}

function headingCell(cell: string, line: number): HeadingCell {
  const { name, unit } = nameAndUnit(cell);
  if (unit !== undefined && "problem" in unit)
    throw refusal(line, `expected a heading such as ${example}, but ${unit.problem}`);
  const common = /^common\b:?\s*(.*)$/i.exec(name);
  if (common !== null) return { name: common[1] ?? "", unit, role: "common" };
  if (unit === undefined) return { name, unit, role: /uncertainty/i.test(name) ? "uncertainty" : undefined };
  const role = roleOf(unit);
  if (role !== undefined) return { name, unit, role };
  throw refusal(
    line,
    `expected a heading such as ${example}, but ${quoted(cell)} is in ${unit.unit}, which is neither a frequency nor a density`,
  );
}

function roleOf({ kind, unit }: UnitReading): ColumnRole | undefined {
  if (kind !== "signal") return "density";
  if (unit === "Hz") return "frequency";
  return unit === "1" || unit === "dB" ? "uncertainty" : undefined;
}

interface NameAndUnit {
  readonly name: string;
  readonly unit: UnitReading | UnitProblem | undefined;
}

/** `frequency [Hz]`, `nV/√Hz`, `f/kHz`, `e_n (nV/sqrt(Hz))`, `frequency in Hz`, or a name alone. */
function nameAndUnit(cell: string): NameAndUnit {
  const bracket = cell.indexOf("[");
  if (bracket >= 0) {
    const close = cell.lastIndexOf("]");
    return {
      name: cell.slice(0, bracket).trim(),
      unit: readUnit(cell.slice(bracket + 1, close > bracket ? close : undefined)),
    };
  }
  return (
    meant("", cell) ??
    split(cell, cell.indexOf("/")) ??
    inParentheses(cell) ??
    split(cell, cell.lastIndexOf(" ")) ?? { name: cell, unit: undefined }
  );
}

function inParentheses(cell: string): NameAndUnit | undefined {
  const open = cell.indexOf("(");
  const close = cell.lastIndexOf(")");
  if (open < 0 || close < open) return undefined;
  const name = cell.slice(0, open).trim();
  const inside = cell.slice(open + 1, close);
  // "(typical)" belongs to the name; what has a slash was meant as a unit
  return meant(name, inside) ?? (inside.includes("/") ? { name, unit: readUnit(inside) } : undefined);
}

function split(cell: string, at: number): NameAndUnit | undefined {
  return at > 0 ? meant(cell.slice(0, at).trim(), cell.slice(at + 1).trim()) : undefined;
}

/** A text as the unit of a column, where it is one of a column or was surely meant as one. */
function meant(name: string, text: string): NameAndUnit | undefined {
  const unit = readUnit(unwrapped(text));
  const isUnit = "problem" in unit ? unit.meantAsUnit === true : roleOf(unit) !== undefined && text !== "1";
  return isUnit ? { name, unit } : undefined;
}
