import { takesPrefix } from "../ground/base-unit.js";
import { OutOfDomainError } from "../ground/errors.js";
import { prefixSymbol } from "../ground/prefix.js";
import { quoted } from "../ground/quoted.js";
import { decimalExponent, writeNumber } from "../ground/write-number.js";
import { assumedPointUncertainty } from "./assumed-point-uncertainty.js";
import type { CommonEffect, Curve, CurvePoint } from "./curve.js";
import { asideMark } from "./curve-cells.js";
import { writeComment } from "./curve-comments.js";
import { tidyText } from "./tidy-text.js";

const separator = ", ";

/**
 * Writes a curve as the text that `readCurve` reads back to an equal curve, to the last bit; only the line numbers of its points
 * are those of the new text.
 *
 * @param curve - any curve; errors that its points share are written as columns of their own.
 * @returns settings and provenance as comments, a heading, a row a point.
 * @throws OutOfDomainError for a common error whose name cannot stand in a heading.
 *
 * @example
 * ```ts
 * import { readCurve, writeCurve } from "@quietband/core";
 * const text = writeCurve(readCurve("1 kHz, 85 nV/√Hz\n10 Hz, 0.12 µV/√Hz"));
 * text.split("\n")[0]; // → frequency [Hz], density [nV/√Hz]
 * text.split("\n")[1]; // → 10, 120
 * ```
 */
export function writeCurve(curve: Curve): string {
  const { points, commonEffects = [] } = curve;
  const exponent = densityExponent(curve);
  const withUncertainty =
    curve.uncertaintyIs === "given" || points.some(({ uncertainty }) => uncertainty !== assumedPointUncertainty);
  const heading = [
    "frequency [Hz]",
    `density [${prefixSymbol(exponent) ?? ""}${curve.unit}/√Hz]`,
    ...(withUncertainty ? ["uncertainty [%]"] : []),
    ...commonEffects.map(({ name }) => `common ${headingName(name)} [%]`),
  ];
  const rows = points.map((point, index) =>
    [
      writeNumber(point.frequency),
      writeNumber(point.density, { shift: -exponent }),
      ...(withUncertainty ? [uncertaintyCell(point, curve)] : []),
      ...commonEffects.map((effect) => percent(effectAt(effect, index))),
      ...(point.inFit ? [] : [asideMark]),
    ].join(separator),
  );
  return [
    ...(curve.label === "" ? [] : [writeComment({ key: "label", value: curve.label })]),
    ...curve.source.map((entry) => writeComment(entry)),
    ...(curve.commonUncertainty === 0
      ? []
      : [writeComment({ key: "axis uncertainty", value: `${percent(curve.commonUncertainty)} %` })]),
    heading.join(separator),
    ...rows,
    "",
  ].join("\n");
}

/** The prefix that gives the middle density one to three digits before the point. */
function densityExponent({ points, unit }: Curve): number {
  const middle = points[points.length >> 1];
  if (middle === undefined || !takesPrefix(unit)) return 0;
  const exponent = 3 * Math.floor(decimalExponent(middle.density) / 3);
  return prefixSymbol(exponent) === undefined ? 0 : exponent;
}

/** A dash where the curve's points are assumed to have 5 %, so that reading assumes it again. */
function uncertaintyCell({ uncertainty }: CurvePoint, { uncertaintyIs }: Curve): string {
  return uncertaintyIs === "assumed" && uncertainty === assumedPointUncertainty ? "-" : percent(uncertainty);
}

/** The decimal digits of a ratio, moved by two places. */
function percent(ratio: number): string {
  return writeNumber(ratio, { shift: 2 });
}

function effectAt({ name, effects }: CommonEffect, index: number): number {
  const effect = effects[index];
  if (effect !== undefined && Number.isFinite(effect)) return effect;
  throw new OutOfDomainError(
    `The common error ${quoted(name)} must have a finite effect on each point; point ${index} has ${effect}.`,
  );
}

function headingName(name: string): string {
  if (name === tidyText(name) && !/[,;#[\]]|^:/.test(name)) return name;
  throw new OutOfDomainError(
    `A common error must have a name that can stand in a heading, without separators, brackets and #; got ${quoted(name)}.`,
  );
}
