import { OutOfDomainError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";
import type { Curve, CurvePoint, CurveSourceEntry } from "./curve.js";

/** Relative standard uncertainty of a point that states none: what a careful eye reads off a plot. */
export const assumedPointUncertainty = 0.05;

/** A point as given to {@link curveFromPoints}; SI units. */
export interface GivenPoint {
  /** Hz, positive. */
  readonly frequency: number;
  /** unit/√Hz, positive. */
  readonly density: number;
  /** Relative standard uncertainty of the density (k = 1), above 0 and at most 1. */
  readonly uncertainty?: number | undefined;
  /** False to keep the point for show and out of fits. */
  readonly inFit?: boolean | undefined;
  readonly line?: number | undefined;
}

/** What {@link curveFromPoints} takes besides the points. */
export interface CurveOptions {
  /** Unit of the signal; "V" unless given. */
  readonly unit?: string | undefined;
  readonly label?: string | undefined;
  /** For points that state none; 5 % is assumed, and said to be, where this is missing too. */
  readonly pointUncertainty?: number | undefined;
  /** Relative standard uncertainty of an error all points share; 0 unless given. */
  readonly commonUncertainty?: number | undefined;
  readonly source?: readonly CurveSourceEntry[] | undefined;
}

/**
 * A curve from points in any order: sorted, checked, frozen.
 *
 * @param points - at least two, at different frequencies.
 * @param options - unit, label, uncertainty of points that state none, provenance.
 * @throws OutOfDomainError for fewer than two points, values that are not positive and finite, two densities at one
 *   frequency, or an uncertainty that is not above 0 and at most 1.
 *
 * @example
 * ```ts
 * import { curveFromPoints } from "@quietband/core";
 * const curve = curveFromPoints([{ frequency: 10, density: 9e-9 }, { frequency: 1, density: 21e-9 }], { unit: "V" });
 * curve.points[0]?.frequency; // → 1
 * curve.points[0]?.uncertainty; // → 0.05
 * ```
 */
export function curveFromPoints(points: readonly GivenPoint[], options: CurveOptions = {}): Curve {
  refuseUnknownKeys("curveFromPoints", ["unit", "label", "pointUncertainty", "commonUncertainty", "source"], options);
  const { unit = "V", label = "", pointUncertainty, commonUncertainty = 0, source = [] } = options;
  if (pointUncertainty !== undefined) requireUncertainty("pointUncertainty", pointUncertainty);
  if (!(commonUncertainty >= 0 && commonUncertainty <= 1))
    throw new OutOfDomainError(
      `commonUncertainty must be at least 0 and at most 1, relative; got ${commonUncertainty}.`,
    );
  let assumed = false;
  const made = points.map((point, index): CurvePoint => {
    requireValue(index, "frequency", point.frequency, "Hz");
    requireValue(index, "density", point.density, `${unit}/√Hz`);
    const stated = point.uncertainty ?? pointUncertainty;
    if (stated === undefined) assumed = true;
    else requireUncertainty(`uncertainty of point ${index + 1}`, stated);
    return Object.freeze({
      frequency: point.frequency,
      density: point.density,
      uncertainty: stated ?? assumedPointUncertainty,
      inFit: point.inFit ?? true,
      ...(point.line !== undefined && { line: point.line }),
    });
  });
  const sorted = made.toSorted((one, other) => one.frequency - other.frequency);
  const distinct = sorted.filter((point, index) => {
    const before = sorted[index - 1];
    if (before === undefined || before.frequency !== point.frequency) return true;
    if (before.density === point.density) return false;
    throw new OutOfDomainError(
      `A curve has one density at each frequency; at ${point.frequency} Hz it got ${before.density} and ${point.density} ${unit}/√Hz.`,
    );
  });
  if (distinct.length < 2)
    throw new OutOfDomainError(`A curve needs at least two points at different frequencies; got ${distinct.length}.`);
  return Object.freeze({
    unit,
    label,
    points: Object.freeze(distinct),
    uncertaintyIs: assumed ? "assumed" : "given",
    commonUncertainty,
    source: Object.freeze(source.map(({ key, value }) => Object.freeze({ key, value }))),
  });
}

function requireValue(index: number, name: string, value: number, unit: string): void {
  if (typeof value === "number" && value > 0 && value < Number.POSITIVE_INFINITY) return;
  throw new OutOfDomainError(
    `The ${name} of point ${index + 1} must be a positive finite number of ${unit}; got ${value}.`,
  );
}

function requireUncertainty(name: string, value: number): void {
  if (value > 0 && value <= 1) return;
  throw new OutOfDomainError(`${name} must be relative, above 0 and at most 1 (100 %); got ${value}.`);
}
