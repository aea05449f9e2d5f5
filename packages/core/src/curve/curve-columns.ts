import { unwrapped } from "../ground/base-unit.js";
import { quoted } from "../ground/quoted.js";
import { readUnit, type UnitProblem, type UnitReading } from "../ground/unit.js";
import { refusal } from "./refusal.js";

/** What a column holds; "common" is an error that all points share (see `CommonEffect`). */
type ColumnRole = "frequency" | "density" | "uncertainty" | "common";

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

/** What a heading says of its columns: known by their units, else by name, else by place, frequency before density. */
export function headingColumns(cells: readonly string[], line: number): readonly Column[] {
  const read = cells.map((cell) => headingCell(cell, line));
  const taken = new Set(read.map(({ role }) => role));
  const open = (["frequency", "density"] as const).filter((role) => !taken.has(role));
  const columns = read.map((cell): Column => {
    const role = cell.role ?? open.shift();
    if (role !== undefined) return { role, name: cell.name, unit: cell.unit };
    throw refusal(line, `expected columns of frequency, density and uncertainty, got one more, ${quoted(cell.name)}`);
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
  if (unit === undefined) return { name, unit, role: namesUncertainty(name) ? "uncertainty" : undefined };
  if ("problem" in unit) throw refusal(line, `expected a heading such as ${example}, but ${unit.problem}`);
  if (unit.kind !== "signal") return { name, unit, role: "density" };
  if (unit.unit === "Hz") return { name, unit, role: "frequency" };
  const common = /^common\b:?\s*(.*)$/i.exec(name);
  if (isRelative(unit) && common !== null) return { name: common[1] ?? "", unit, role: "common" };
  if (isRelative(unit) && namesUncertainty(name)) return { name, unit, role: "uncertainty" };
  throw refusal(
    line,
    `expected columns of frequency, density (as nV/√Hz or dBV/√Hz) and uncertainty, got ${quoted(cell)} in ${unit.unit}`,
  );
}

/** A ratio or dB that is named otherwise is a gain or a distortion, and must not pass for an uncertainty. */
function namesUncertainty(name: string): boolean {
  return name === "" || /uncertainty|error|±|σ|sigma|^u\b/i.test(name);
}

function isRelative({ unit }: UnitReading): boolean {
  return unit === "1" || unit === "dB";
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
  if ("problem" in unit) return unit.meantAsUnit === true ? { name, unit } : undefined;
  const isOfColumn = unit.kind !== "signal" || unit.unit === "Hz" || isRelative(unit);
  return isOfColumn && text !== "1" ? { name, unit } : undefined;
}
