import { decimalValue, readDecimal } from "../ground/decimal.js";
import { MalformedDataError } from "../ground/errors.js";
import { prefixPower } from "../ground/prefix.js";
import { parseQuantity } from "../ground/quantity.js";
import type { Curve, CurveSourceEntry } from "./curve.js";
import { curveFromPoints, type GivenPoint } from "./curve-from-points.js";
import { type DensityUnit, readDensityUnit } from "./density-unit.js";
import { type Columns, readHeading } from "./read-heading.js";
import { type TableLine, tableLines } from "./table-lines.js";

/** Word that, as the last cell of a row, keeps a point for show and out of fits. */
export const asideMark = "aside";

const nepersPerDb = Math.LN10 / 20;
const silent: Columns = Object.freeze({ frequencyPower: undefined, density: undefined, uncertaintyPower: undefined });

/**
 * A curve from what a person types while looking at a plot.
 *
 * Rows hold frequency, density and, if wanted, the point's uncertainty ("5 %", "0.4 dB"; k = 1), separated by commas,
 * semicolons, tabs or blanks; with semicolons and tabs a comma may be the decimal sign. Units stand in a heading
 * ("frequency [Hz], density [nV/√Hz]"), or in the cells ("1.2 kHz", "85n", "4k7"). The density may be an amplitude density, a
 * power density (V²/Hz) or a level (dBV/√Hz). A row that ends in "aside" is kept for show and left out of fits. Comments
 * begin with #; "# key: value" is provenance, of which "label", "uncertainty" (of every point that states none) and "axis
 * uncertainty" (an error all points share) also count.
 *
 * @param text - the table, in any order of rows.
 * @returns a curve, ascending, with its provenance.
 * @throws MalformedDataError with the line, the offending text and what was expected.
 *
 * @example
 * ```ts
 * import { readCurve } from "@quietband/core";
 * const curve = readCurve(`
 *   # document: invented
 *   f/kHz, e_n (nV/√Hz)
 *   1,     5
 *   0.01,  13, 10 %
 * `);
 * curve.points.map((point) => point.frequency); // → [10,1000]
 * curve.points[0]?.uncertainty; // → 0.1
 * ```
 */
export function readCurve(text: string): Curve {
  if (typeof text !== "string") throw new MalformedDataError("A curve is read from a text; got something else.");
  const table = tableLines(text);
  const columns = table.heading === undefined ? silent : readHeading(table.heading);
  const units = new Set<string>();
  const points: GivenPoint[] = [];
  const byFrequency = new Map<number, GivenPoint>();
  for (const row of table.rows) {
    const point = readRow(row, columns, table.decimalComma, units);
    const before = byFrequency.get(point.frequency);
    if (before !== undefined && before.density !== point.density)
      throw new MalformedDataError(
        `Line ${row.line}: ${point.frequency} Hz stands on line ${before.line} too, with another density; a curve has one density at each frequency.`,
        { line: row.line },
      );
    if (before !== undefined) continue;
    byFrequency.set(point.frequency, point);
    points.push(point);
  }
  if (points.length < 2)
    throw new MalformedDataError(
      `A curve needs at least two rows with different frequencies, for instance "1 kHz, 85 nV/√Hz"; got ${points.length}.`,
    );
  return curveFromPoints(points, {
    unit: [...units][0] ?? "V",
    label: stated(table.source, "label") ?? "",
    pointUncertainty: ratioOf(table.source, "uncertainty"),
    commonUncertainty: ratioOf(table.source, "axis uncertainty"),
    source: table.source,
  });
}

function readRow({ line, cells }: TableLine, columns: Columns, decimalComma: boolean, units: Set<string>): GivenPoint {
  const fail = (expected: string, got: string): never => {
    throw new MalformedDataError(`Line ${line}: expected ${expected}; got "${got.slice(0, 40)}".`, { line });
  };
  const inFit = cells.at(-1) !== asideMark;
  const filled = inFit ? cells : cells.slice(0, -1);
  const [first = "", second, third] = filled;
  if (second === undefined || second === "") return fail("a frequency and a density", cells.join(" "));
  if (filled.length > 3 && filled.slice(3).some((cell) => cell !== ""))
    return fail(`at most three cells (and "${asideMark}")`, cells.join(" "));
  const frequency = frequencyOf(first, columns.frequencyPower, decimalComma);
  if (frequency === undefined)
    return fail("a frequency with its unit in the cell or the heading, for instance 1.2 kHz", first);
  if (!(frequency > 0 && frequency < Number.POSITIVE_INFINITY)) return fail("a frequency above zero", first);
  const density = densityOf(second, columns.density, decimalComma);
  if (density === undefined)
    return fail("a density with its unit in the cell or the heading, for instance 85 nV/√Hz", second);
  if ("refusal" in density) throw new MalformedDataError(`Line ${line}: ${density.refusal}`, { line });
  if (!(density.value > 0 && density.value < Number.POSITIVE_INFINITY)) return fail("a density above zero", second);
  units.add(density.unit);
  if (units.size > 1)
    return fail(`one quantity all through the curve, ${[...units][0]}`, `${second}, which is in ${density.unit}`);
  const uncertainty =
    third === undefined || third === "" ? undefined : uncertaintyOf(third, density.kind, columns, decimalComma);
  if (uncertainty !== undefined && !(uncertainty > 0 && uncertainty <= 1))
    return fail("an uncertainty above 0 and at most 100 %, for instance 5 % or 0.4 dB", third ?? "");
  return { frequency, density: density.value, uncertainty, inFit, line };
}

function frequencyOf(cell: string, headingPower: number | undefined, decimalComma: boolean): number | undefined {
  const plain = plainNumber(cell, headingPower, decimalComma);
  if (plain !== undefined) return plain;
  const found = parseQuantity(cell, decimalComma);
  if (found?.unit === "Hz") return found.value;
  // "10k" under a heading in Hz
  return found?.unit === "" && headingPower === 0 ? found.value : undefined;
}

/** A bare number in the unit of the heading: one conversion for digits and prefix. */
function plainNumber(cell: string, power: number | undefined, decimalComma: boolean): number | undefined {
  if (power === undefined) return undefined;
  const number = readDecimal(cell, decimalComma);
  return number !== undefined && number.end === cell.length
    ? decimalValue(number.digits, number.power + power)
    : undefined;
}

interface ReadDensity {
  readonly value: number;
  readonly unit: string;
  readonly kind: DensityUnit["kind"];
}

function densityOf(
  cell: string,
  heading: DensityUnit | undefined,
  decimalComma: boolean,
): ReadDensity | { readonly refusal: string } | undefined {
  const number = readDecimal(cell, decimalComma);
  if (number === undefined) return undefined;
  const rest = cell.slice(number.end).trim();
  if (rest === "") return heading === undefined ? undefined : made(number.digits, number.power, heading);
  const own = readDensityUnit(rest);
  if (own !== undefined) return "refusal" in own ? own : made(number.digits, number.power, own);
  if (heading === undefined || heading.kind === "level") return undefined;
  const prefix = prefixPower(rest);
  // "38n" under a heading in V/√Hz; under one in nV/√Hz two prefixes would stand on each other
  if (prefix !== undefined && heading.power === 0)
    return made(number.digits, number.power + (heading.kind === "power" ? 2 : 1) * prefix, heading);
  const letters = parseQuantity(cell, decimalComma);
  return letters?.unit === "" && heading.power === 0 && heading.kind === "density"
    ? { value: letters.value, unit: heading.unit, kind: heading.kind }
    : undefined;
}

function made(digits: string, power: number, { kind, unit, power: ofUnit }: DensityUnit): ReadDensity {
  if (kind === "level") {
    const level = decimalValue(digits, power);
    return { value: Math.exp(level * nepersPerDb) * 10 ** ofUnit, unit, kind };
  }
  const value = decimalValue(digits, power + ofUnit);
  return { value: kind === "power" ? Math.sqrt(value) : value, unit, kind };
}

/** Relative, of the amplitude density: 5 % of a power density is 2.5 % of the density; dB are dB of either. */
function uncertaintyOf(
  cell: string,
  kind: DensityUnit["kind"],
  columns: Columns,
  decimalComma: boolean,
): number | undefined {
  const plain = plainNumber(cell, columns.uncertaintyPower, decimalComma);
  const found = plain === undefined ? parseQuantity(cell, decimalComma) : { value: plain, unit: "1" };
  if (found?.unit === "dB") return found.value * nepersPerDb;
  if (found?.unit !== "1") return Number.NaN;
  return kind === "power" ? 0.5 * found.value : found.value;
}

function stated(source: readonly CurveSourceEntry[], key: string): string | undefined {
  return source.find((entry) => entry.key.toLowerCase() === key)?.value;
}

function ratioOf(source: readonly CurveSourceEntry[], key: string): number | undefined {
  const text = stated(source, key);
  if (text === undefined) return undefined;
  const found = parseQuantity(text, text.includes(","));
  const value = found?.unit === "dB" ? found.value * nepersPerDb : found?.unit === "1" ? found.value : undefined;
  if (value !== undefined && value > 0 && value <= 1) return value;
  throw new MalformedDataError(
    `Expected "# ${key}:" to state a ratio above 0 and at most 100 %, for instance 3 % or 0.3 dB; got "${text.slice(0, 40)}".`,
  );
}
