import { requirePositive } from "../ground/domain.js";
import { MalformedDataError, OutOfDomainError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";
import type { Pixel } from "./axis-fit.js";
import type { AxesCalibration } from "./calibrate-axes.js";
import type { Curve, CurveSourceEntry } from "./curve.js";
import { flattenPath } from "./flatten-path.js";
import { pointsFromPicks } from "./points-from-picks.js";

/** What {@link pointsFromPath} takes besides the path. */
export interface PathOptions {
  /** Largest distance of a chord from its curve, pixels; 0.1 unless given. */
  readonly tolerancePixels?: number | undefined;
  /** Standard uncertainty of the trace against the true curve, pixels; 0.25 unless given. */
  readonly pickErrorPixels?: number | undefined;
  /** SVG transform matrix [a, b, c, d, e, f] from the path's coordinates to those of the calibration. */
  readonly matrix?: readonly [number, number, number, number, number, number] | undefined;
  readonly label?: string | undefined;
  readonly source?: readonly CurveSourceEntry[] | undefined;
}

/** Pixels by which the far end of a vertical stroke is moved on, so that a curve has one density at each frequency. */
const strokeStep = 1e-3;

/**
 * A curve traced by a vector path of a page: SVG path data whose vertices become points.
 *
 * @param calibration - from `calibrateAxes`, in the path's coordinates or in those the matrix leads to.
 * @param pathData - SVG path data (W3C SVG 2 grammar: all commands, relative and absolute, compact numbers).
 * @param options - flattening tolerance, pick error, transform, label and provenance.
 * @returns a curve in ascending frequency; `thinCurve` makes it small.
 * @throws MalformedDataError for text that is no path, a trace that doubles back in frequency by more than a pick error, or
 *   subpaths that overlap in frequency, with the place.
 *
 * @example
 * ```ts
 * import { calibrateAxes, pointsFromPath } from "@quietband/core";
 * const plot = calibrateAxes({
 *   unit: "V",
 *   frequency: { kind: "log", ticks: [{ pixel: 100, value: 1 }, { pixel: 700, value: 1000 }] },
 *   density: { kind: "log", ticks: [{ pixel: 400, value: 1e-9 }, { pixel: 50, value: 1e-7 }] },
 * });
 * pointsFromPath(plot, "M100 50L300 225h400").points.length; // → 3
 * ```
 */
export function pointsFromPath(calibration: AxesCalibration, pathData: string, options: PathOptions = {}): Curve {
  refuseUnknownKeys("pointsFromPath", ["tolerancePixels", "pickErrorPixels", "matrix", "label", "source"], options);
  const { tolerancePixels = 0.1, pickErrorPixels = 0.25, matrix = [1, 0, 0, 1, 0, 0] } = options;
  requirePositive("tolerancePixels", tolerancePixels, "pixels");
  requirePositive("pickErrorPixels", pickErrorPixels, "pixels");
  const [a, b, c, d, e, f] = matrix;
  // the larger singular value: what the matrix stretches most, columns need not be at right angles
  const scale = 0.5 * (Math.hypot(a + d, b - c) + Math.hypot(a - d, b + c));
  if (!(matrix.every(Number.isFinite) && Math.abs(a * d - b * c) > 0))
    throw new OutOfDomainError(
      `matrix must be six finite numbers [a, b, c, d, e, f] that can be inverted; got ${matrix.join(", ")}.`,
    );
  const strokes = flattenPath(pathData, tolerancePixels / scale)
    .map((subpath) => subpath.map(({ x, y }) => ({ x: a * x + c * y + e, y: b * x + d * y + f })))
    .map((subpath) => ascending(subpath, calibration, pickErrorPixels))
    .toSorted((one, other) => placeOf(one[0], calibration) - placeOf(other[0], calibration));
  const trace: Pixel[] = [];
  for (const stroke of strokes) {
    const end = trace.at(-1);
    const begin = stroke[0] as Pixel;
    if (end !== undefined && placeOf(begin, calibration) < placeOf(end, calibration) - pickErrorPixels)
      throw new MalformedDataError(
        `Two subpaths overlap in frequency at pixel ${said(begin)}; give the path of one curve only.`,
      );
    for (const place of stroke) append(trace, place, calibration);
  }
  if (placeOf(trace.at(-1), calibration) - placeOf(trace[0], calibration) < 2 * strokeStep)
    throw new MalformedDataError("The path must hold at least two places at different frequencies to be a curve.");
  return pointsFromPicks(calibration, trace, { pickErrorPixels, label: options.label, source: options.source });
}

/** Distance along the frequency axis in pixels. */
function placeOf(pixel: Pixel | undefined, { axes: { fit } }: AxesCalibration): number {
  if (pixel === undefined) return 0;
  const along = fit.shiftOf({ x: 1, y: 0 }).u;
  return fit.coordinatesAt(pixel).u / Math.abs(along);
}

/** A stroke turned to ascending frequency; small steps back are within the pick error and dropped, larger ones refused. */
function ascending(subpath: readonly Pixel[], calibration: AxesCalibration, pickError: number): readonly Pixel[] {
  const forward = placeOf(subpath.at(-1), calibration) >= placeOf(subpath[0], calibration);
  const stroke = forward ? subpath : subpath.toReversed();
  const kept: Pixel[] = [];
  let furthest = Number.NEGATIVE_INFINITY;
  for (const place of stroke) {
    const at = placeOf(place, calibration);
    if (at < furthest - pickError)
      throw new MalformedDataError(
        `The trace doubles back in frequency at pixel ${said(place)}, by ${(furthest - at).toFixed(1)} pixels; a curve has one density at each frequency.`,
      );
    if (at >= furthest) kept.push(place);
    furthest = Math.max(furthest, at);
  }
  return kept;
}

/** Keeps frequencies strictly ascending: of a vertical stroke the first place and, a step on, the last. */
function append(trace: Pixel[], place: Pixel, calibration: AxesCalibration): void {
  const last = trace.at(-1);
  if (last === undefined || placeOf(place, calibration) > placeOf(last, calibration) + strokeStep / 2) {
    trace.push(place);
    return;
  }
  // where one stroke ends and the next begins there is nothing new
  if (Math.hypot(place.x - last.x, place.y - last.y) < strokeStep / 2) return;
  const before = trace.at(-2);
  const direction = Math.sign(calibration.axes.fit.shiftOf({ x: 1, y: 0 }).u);
  if (before !== undefined && placeOf(last, calibration) - placeOf(before, calibration) <= 1.5 * strokeStep)
    trace.pop();
  trace.push({ x: last.x + direction * strokeStep, y: place.y });
}

function said({ x, y }: Pixel): string {
  return `(${x.toFixed(1)}, ${y.toFixed(1)})`;
}
