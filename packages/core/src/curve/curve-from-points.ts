import { requireBetween } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";
import { quoted } from "../ground/quoted.js";
import { readUnit } from "../ground/unit.js";
import { ascendingOrder } from "./ascending-order.js";
import { assumedPointUncertainty } from "./assumed-point-uncertainty.js";
import type { Curve, CurvePoint, CurveSourceEntry } from "./curve.js";
import { isSettingKey, longestKey } from "./curve-comments.js";
import { curveRange } from "./curve-range.js";
import { tidyText } from "./tidy-text.js";

/** A point as given to {@link curveFromPoints}; SI units. */
export interface GivenPoint {
  /** Hz, 1e-150 to 1e150. */
  readonly frequency: number;
  /** unit/√Hz, 1e-150 to 1e150. */
  readonly density: number;
  /** Relative standard uncertainty (k = 1) of the density, above 0 and at most 1. */
  readonly uncertainty?: number | undefined;
  /** False to keep the point for show and out of fits. */
  readonly inFit?: boolean | undefined;
}

/** What {@link curveFromPoints} takes besides the points. */
export interface CurveOptions {
  /** Unit of the signal, without prefix: "V" for densities in V/√Hz. */
  readonly unit: string;
  readonly label?: string | undefined;
  /** For points that state none; where this is missing too, 5 % is assumed, and the curve says so. */
  readonly pointUncertainty?: number | undefined;
  /** Relative standard uncertainty of an error common to all points, 0 to 1; 0 unless given. */
  readonly commonUncertainty?: number | undefined;
  /** Where it comes from, in the order reports print it. */
  readonly source?: readonly CurveSourceEntry[] | undefined;
}

/**
 * A curve from points in any order: sorted, checked, frozen.
 *
 * A point given twice alike counts once. Texts are kept on one line: white space in them becomes single blanks.
 *
 * @param points - at least two, at different frequencies.
 * @param options - unit, label, uncertainties, provenance.
 * @returns the points in ascending frequency, with what is known of them.
 * @throws OutOfDomainError for fewer than two points, values outside their range, two different points at one frequency, a unit
 *   that is unknown or has a prefix, a source key that has a colon, is longer than 60 characters, or is one of the settings
 *   that `readCurve` takes from comments (label, uncertainty, axis uncertainty).
 *
 * @example
 * ```ts
 * import { curveFromPoints } from "@quietband/core";
 * const curve = curveFromPoints([{ frequency: 10, density: 9e-9 }, { frequency: 1, density: 21e-9 }], { unit: "V" });
 * curve.points[0]?.frequency; // → 1
 * curve.points[0]?.uncertainty; // → 0.05
 * curve.uncertaintyIs; // → assumed
 * ```
 */
export function curveFromPoints(points: readonly GivenPoint[], options: CurveOptions): Curve {
  refuseUnknownKeys("curveFromPoints", ["unit", "label", "pointUncertainty", "commonUncertainty", "source"], options);
  const { unit, label = "", pointUncertainty, commonUncertainty = 0, source = [] } = options;
  requireUnit(unit);
  requireBetween("commonUncertainty", commonUncertainty, [0, 1]);
  if (pointUncertainty !== undefined) requireUncertainty("pointUncertainty", pointUncertainty);
  const made = points.map((point, index) => checkedPoint(point, index, pointUncertainty));
  const order = ascendingOrder(made, (first, second) => {
    throw new OutOfDomainError(
      `A curve has one density at each frequency; at ${first.frequency} Hz it got ${said(first)} and ${said(second)}.`,
    );
  });
  const sorted = order?.map((index) => made[index] as CurvePoint) ?? made;
  if (sorted.length < 2)
    throw new OutOfDomainError(`A curve needs at least two points at different frequencies; got ${sorted.length}.`);
  const allGiven = pointUncertainty !== undefined || points.every(({ uncertainty }) => uncertainty !== undefined);
  return Object.freeze({
    unit,
    label: tidyText(label),
    points: Object.freeze(sorted),
    uncertaintyIs: allGiven ? "given" : "assumed",
    commonUncertainty,
    source: Object.freeze(source.flatMap((entry) => tidyEntry(entry))),
  });
}

function checkedPoint(point: GivenPoint, index: number, pointUncertainty: number | undefined): CurvePoint {
  const { frequency, density, inFit = true } = point;
  requireInRange(frequency, index, "frequency");
  requireInRange(density, index, "density");
  const uncertainty = point.uncertainty ?? pointUncertainty ?? assumedPointUncertainty;
  requireUncertainty("the uncertainty of a point", uncertainty);
  return Object.freeze({ frequency, density, uncertainty, inFit });
}

function requireInRange(value: number, index: number, name: "frequency" | "density"): void {
  if (value >= curveRange[0] && value <= curveRange[1]) return;
  const unit = name === "frequency" ? "Hz" : "the unit/√Hz";
  throw new OutOfDomainError(
    `The ${name} of the point with index ${index} must be above zero, from ${curveRange[0]} to ${curveRange[1]} ${unit}; got ${value}.`,
  );
}

function requireUncertainty(name: string, value: number): void {
  requireBetween(`${name}, relative,`, value, [0, 1], { low: true });
}

function requireUnit(text: string): void {
  const unit = typeof text === "string" ? readUnit(text) : undefined;
  if (unit !== undefined && !("problem" in unit) && unit.unit === text && unit.kind === "signal" && !unit.isLevel)
    return;
  throw new OutOfDomainError(
    `A curve needs the unit of its signal without prefix, such as V, A, g or 1, with densities to match; got ${quoted(text)}.`,
  );
}

function tidyEntry(entry: CurveSourceEntry): CurveSourceEntry[] {
  const key = tidyText(entry.key);
  const value = tidyText(entry.value);
  if (key === "" && value === "") return [];
  if (`${key} `.includes(": ") || key.length > longestKey || isSettingKey(key))
    throw new OutOfDomainError(
      `The key of a source entry must have at most ${longestKey} characters and no colon, and be none of label, uncertainty and axis uncertainty, which are options; got ${quoted(key)}.`,
    );
  return [Object.freeze({ key, value })];
}

function said({ density, uncertainty, inFit }: CurvePoint): string {
  return `${density} (uncertainty ${uncertainty}${inFit ? "" : ", aside"})`;
}
