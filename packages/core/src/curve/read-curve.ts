import { MalformedDataError, OutOfDomainError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";
import { quoted, sentence } from "../ground/quoted.js";
import { readUnit, type UnitReading } from "../ground/unit.js";
import { ascendingOrder } from "./ascending-order.js";
import { assumedPointUncertainty } from "./assumed-point-uncertainty.js";
import type { CommonEffect, Curve, CurvePoint } from "./curve.js";
import { curveComments, type StatedText } from "./curve-comments.js";
import { type CurveLines, curveLines } from "./curve-lines.js";
import { type CurveRows, curveRows } from "./curve-rows.js";
import { curveTable } from "./curve-table.js";
import { refusal } from "./refusal.js";
import { relativeUncertainty } from "./relative-uncertainty.js";
import { tidyText } from "./tidy-text.js";

/** What {@link readCurve} takes besides the text; each stands in where the text is silent. */
export interface ReadCurveOptions {
  readonly label?: string | undefined;
  /** Unit of frequencies that have none: "Hz", "kHz" ... */
  readonly frequencyUnit?: string | undefined;
  /** Unit of densities that have none: "nV/√Hz", "V²/Hz", "dBV/√Hz" ... */
  readonly densityUnit?: string | undefined;
}

/**
 * Reads a curve as a person types it while looking at a plot: a row a point with frequency, density and, if wanted, the point's
 * uncertainty.
 *
 * - Cells are separated by semicolons, tabs, commas or blanks, the first of these that the first line has. With semicolons
 *   or tabs a comma may be the decimal mark.
 * - Units stand in a heading (`frequency [Hz], density [nV/√Hz]`, `f/kHz`, `e_n (nV/sqrt(Hz))`), in the cells (`1.2 kHz`, `85n`,
 *   `85 nV/√Hz`, `4k7`), or in the options. Densities may be amplitude densities (nV/√Hz, nV/rtHz, nV/Hz^0.5), power densities
 *   (V²/Hz, g^2/Hz) or levels (dBV/√Hz); all of one text are of one quantity.
 * - The uncertainty is relative and standard (k = 1): `5 %` or `0.4 dB`; 5 % of a power density is 2.5 % of the density. A dash
 *   stands for none. The heading calls the column uncertainty, error, u or σ.
 * - A row whose last cell is the word `aside` is kept for show and left out of fits.
 * - `#` begins a comment. `# key: value` is provenance, kept in order; `# label:` names the curve, `# uncertainty:` holds for points
 *   that state none, `# axis uncertainty:` is an error common to all points. A column headed `common <name> [%]` gives an error
 *   common to all points that each feels differently; `writeCurve` makes such columns.
 *
 * Values are the doubles nearest to what is written, prefix included, so a curve does not depend on the prefix chosen. Rows
 * may come in any order; one typed twice alike counts once. The work is linear in the length of the text.
 *
 * @param text - at most 1e6 rows, 1000 characters a line.
 * @param options - label and units where the text gives none.
 * @returns a curve in ascending frequency; points without uncertainty get 5 %, and `uncertaintyIs` says so.
 * @throws MalformedDataError with the line, what stands there and what was expected; OutOfDomainError for wrong options.
 *
 * @example
 * ```ts
 * import { readCurve } from "@quietband/core";
 * const curve = readCurve(`
 *   # document: invented
 *   f/kHz, e_n (nV/√Hz), uncertainty
 *   1,     5,            5 %
 *   0.01,  13,           0.4 dB
 *   0.02,  3.5,          -,      aside
 * `);
 * curve.points.map((point) => point.frequency); // → [10,20,1000]
 * curve.points[0]?.density; // → 1.3e-8
 * curve.points[0]?.uncertainty; // → 0.0461
 * curve.points[1]?.inFit; // → false
 * curve.source[0]; // → {"key":"document","value":"invented"}
 * ```
 */
export function readCurve(text: string, options: ReadCurveOptions = {}): Curve {
  refuseUnknownKeys("readCurve", ["label", "frequencyUnit", "densityUnit"], options);
  if (typeof text !== "string") throw new MalformedDataError("readCurve reads the text of a table; got no text.");
  const given = {
    frequency: unitOption("frequencyUnit", options.frequencyUnit, (unit) => unit.unit === "Hz"),
    density: unitOption("densityUnit", options.densityUnit, (unit) => unit.kind !== "signal"),
  };
  const lines = curveLines(text);
  const comments = curveComments(lines.comments);
  const table = curveTable(text, lines, given);
  const rows = curveRows(text, lines, table);
  const general = statedRatio(comments.pointUncertainty, rows);
  const typed = curvePoints(rows, general, lines, table.firstRow);
  const order = ascendingOrder(typed, (first, second) => {
    throw refusal(
      second.line ?? 0,
      `expected one density at each frequency, got another at ${second.frequency} Hz than on line ${first.line}`,
    );
  });
  const points = order?.map((index) => typed[index] as CurvePoint) ?? typed;
  if (points.length < 2)
    throw new MalformedDataError("A curve needs at least two rows at different frequencies; got one frequency only.");
  const names = table.columns.filter(({ role }) => role === "common").map(({ name }) => name);
  const effects = names.map((name, index): CommonEffect => {
    const column = Array.from(rows.effects[index] ?? []);
    return Object.freeze({ name, effects: Object.freeze(order?.map((at) => column[at] as number) ?? column) });
  });
  const allGiven = general !== undefined || !rows.uncertainty.some(Number.isNaN);
  return Object.freeze({
    unit: rows.quantity.signal,
    label: comments.label?.text ?? tidyText(options.label ?? ""),
    points: Object.freeze(points),
    uncertaintyIs: allGiven ? "given" : "assumed",
    commonUncertainty: statedRatio(comments.axisUncertainty, rows) ?? 0,
    ...(effects.length > 0 && { commonEffects: Object.freeze(effects) }),
    source: Object.freeze(comments.source.map((entry) => Object.freeze(entry))),
  });
}

function curvePoints(rows: CurveRows, general: number | undefined, lines: CurveLines, firstRow: number): CurvePoint[] {
  return Array.from(rows.frequency, (frequency, index): CurvePoint => {
    const uncertainty = rows.uncertainty[index] as number;
    return Object.freeze({
      frequency,
      density: rows.density[index] as number,
      uncertainty: Number.isNaN(uncertainty) ? (general ?? assumedPointUncertainty) : uncertainty,
      inFit: rows.aside[index] === 0,
      line: lines.line[firstRow + index] as number,
    });
  });
}

/** An uncertainty that a comment states for all points, of the quantity that the rows hold. */
function statedRatio(stated: StatedText | undefined, { quantity }: CurveRows): number | undefined {
  if (stated === undefined) return undefined;
  const expected = "expected an uncertainty above 0 and at most 100 %, such as 5 % or 0.4 dB";
  const found = relativeUncertainty(stated.text, undefined, quantity.kind);
  if ("problem" in found) throw refusal(stated.line, `${expected}, but ${found.problem}`);
  if (found.value > 0 && found.value <= 1) return found.value;
  throw refusal(stated.line, `${expected}, got ${quoted(stated.text)}`);
}

function unitOption(
  name: string,
  text: string | undefined,
  fits: (unit: UnitReading) => boolean,
): UnitReading | undefined {
  if (text === undefined) return undefined;
  const unit = readUnit(text);
  if ("problem" in unit) throw new OutOfDomainError(sentence(`${name} cannot be read: ${unit.problem}`));
  if (fits(unit)) return unit;
  throw new OutOfDomainError(
    `${name} must be such as ${name === "frequencyUnit" ? "kHz" : "nV/√Hz"}; got ${unit.unit}.`,
  );
}
