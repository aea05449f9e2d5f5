import { MalformedDataError } from "../ground/errors.js";
import { resolveUnit } from "../ground/unit.js";
import { type DensityUnit, readDensityUnit } from "./density-unit.js";
import type { TableLine } from "./table-lines.js";

/** What a heading says of the columns; undefined where it is silent and cells must say it themselves. */
export interface Columns {
  readonly frequencyPower: number | undefined;
  readonly density: DensityUnit | undefined;
  /** "relative" where the third column holds plain ratios. */
  readonly uncertaintyPower: number | undefined;
}

/** Reads units the way the trade writes them: "frequency [Hz]", "f/kHz", "e_n (nV/√Hz)", or the unit alone. */
export function readHeading(heading: TableLine): Columns {
  const [first = "", second, third] = heading.cells;
  if (second === undefined)
    throw new MalformedDataError(
      `Line ${heading.line}: expected a heading with two columns, for instance "frequency [Hz], density [nV/√Hz]"; got "${first.slice(0, 60)}".`,
      { line: heading.line },
    );
  return {
    frequencyPower: frequencyPower(first, heading.line),
    density: densityOf(second, heading.line),
    uncertaintyPower: third === undefined ? undefined : ratioPower(third),
  };
}

function frequencyPower(cell: string, line: number): number | undefined {
  const text = unitText(cell);
  if (text === undefined) return undefined;
  const found = resolveUnit(text);
  if (found?.unit === "Hz") return found.power;
  if (readDensityUnit(text) !== undefined)
    throw new MalformedDataError(
      `Line ${line}: expected the frequency in the first column; got "${cell.slice(0, 60)}", a density; put the columns in the order frequency, density.`,
      { line },
    );
  throw new MalformedDataError(
    `Line ${line}: expected a frequency in Hz for the first column; got the unit "${text.slice(0, 40)}".`,
    { line },
  );
}

function densityOf(cell: string, line: number): DensityUnit | undefined {
  const text = unitText(cell);
  if (text === undefined) return undefined;
  const found = readDensityUnit(text);
  if (found !== undefined && !("refusal" in found)) return found;
  const why =
    found?.refusal ??
    `got the unit "${text.slice(0, 40)}", which is none of a density; expected for instance nV/√Hz, V²/Hz or dBV/√Hz`;
  throw new MalformedDataError(`Line ${line}: ${why}${why.endsWith("?") ? "" : "."}`, { line });
}

function ratioPower(cell: string): number | undefined {
  const found = resolveUnit(unitText(cell) ?? "");
  return found?.unit === "1" ? found.power : undefined;
}

/** The unit of a heading's cell: in brackets, after the first slash of a name, or the whole cell when it is a unit. */
function unitText(cell: string): string | undefined {
  const open = Math.min(
    ...["[", "("].map((bracket) => cell.indexOf(bracket)).filter((at) => at > 0),
    Number.POSITIVE_INFINITY,
  );
  const close = Math.max(cell.lastIndexOf("]"), cell.lastIndexOf(")"));
  if (Number.isFinite(open) && close > open && !/^[a-zA-Zµμ]*\/(sqrt|rt|√)$/.test(cell.slice(0, open)))
    return cell.slice(open + 1, close).trim();
  if (resolveUnit(cell) !== undefined || readDensityUnit(cell) !== undefined) return cell;
  const slash = cell.indexOf("/");
  return slash > 0 ? cell.slice(slash + 1).trim() : undefined;
}
