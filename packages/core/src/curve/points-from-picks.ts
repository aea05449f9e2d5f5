import { requirePositive } from "../ground/domain.js";
import { MalformedDataError, OutOfDomainError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";
import type { AxisCoordinates, Pixel } from "./axis-fit.js";
import type { AxesCalibration } from "./calibrate-axes.js";
import type { CommonEffect, Curve, CurveSourceEntry } from "./curve.js";
import { curveFromPoints } from "./curve-from-points.js";

/** What {@link pointsFromPicks} takes besides the picks. */
export interface PicksOptions {
  /** Standard uncertainty of one pick in each direction, pixels; 0.5 unless given. */
  readonly pickErrorPixels?: number | undefined;
  /** Thickness of the drawn line, pixels: the centre of a line is known to its thickness over √12. 0 unless given. */
  readonly lineWidthPixels?: number | undefined;
  readonly label?: string | undefined;
  readonly source?: readonly CurveSourceEntry[] | undefined;
}

/** A picked point in coordinates of the axes, with what its uncertainty rests on. */
interface Reading {
  readonly at: AxisCoordinates;
  /** d v/d u of the curve here. */
  readonly slope: number;
  /** Change of ln density, at a fixed frequency, that a pixel of error in x and in y makes. */
  readonly perPixel: Pixel;
}

/**
 * A curve from places picked on a calibrated plot. Each point carries the uncertainty of its pick in both directions (an
 * error in frequency turns into one in density through the local slope), and the curve carries the errors of the
 * calibration, which all points share.
 *
 * With s the local slope d v/d u in the axes' coordinates, a pick that is off by (δu, δv) reads the density at its
 * frequency wrong by δv − s·δu.
 *
 * @param calibration - from `calibrateAxes`.
 * @param picks - places along the curve, or several series of the same places: those are averaged point by point, and their
 *   scatter replaces the assumed pick error.
 * @param options - `pickErrorPixels`, `lineWidthPixels`, label and provenance.
 * @returns a curve in ascending frequency.
 * @throws MalformedDataError for picks that are no numbers or series of different lengths; OutOfDomainError for fewer than
 *   two picks or picks far beyond the ticks.
 *
 * @example
 * ```ts
 * import { calibrateAxes, pointsFromPicks } from "@quietband/core";
 * const plot = calibrateAxes({
 *   unit: "V",
 *   frequency: { kind: "log", ticks: [{ pixel: 100, value: 1 }, { pixel: 700, value: 1000 }] },
 *   density: { kind: "log", ticks: [{ pixel: 400, value: 1e-9 }, { pixel: 50, value: 1e-7 }] },
 * });
 * const curve = pointsFromPicks(plot, [{ x: 100, y: 50 }, { x: 300, y: 225 }, { x: 700, y: 225 }]);
 * curve.points.map(({ density }) => density.toPrecision(4)).join(" "); // → 1.000e-7 1.000e-8 1.000e-8
 * ```
 */
export function pointsFromPicks(
  calibration: AxesCalibration,
  picks: readonly Pixel[] | readonly (readonly Pixel[])[],
  options: PicksOptions = {},
): Curve {
  refuseUnknownKeys("pointsFromPicks", ["pickErrorPixels", "lineWidthPixels", "label", "source"], options);
  const { pickErrorPixels = 0.5, lineWidthPixels = 0 } = options;
  requirePositive("pickErrorPixels", pickErrorPixels, "pixels");
  if (!(lineWidthPixels >= 0 && lineWidthPixels < Number.POSITIVE_INFINITY))
    throw new OutOfDomainError(`lineWidthPixels must be a finite number of pixels, 0 or more; got ${lineWidthPixels}.`);
  const series = seriesOf(picks);
  const places = averaged(series);
  const readings = readingsOf(calibration, places);
  const sigma = series.length > 1 ? scatterOf(calibration, series, readings) / Math.sqrt(series.length) : undefined;
  const single = Math.hypot(pickErrorPixels, lineWidthPixels / Math.sqrt(12));
  const { frequency, density } = calibration.axes;
  const points = readings.map(({ at, perPixel }, index) => {
    const place = places[index] as Pixel;
    return {
      ...calibration.pointAt(place.x, place.y),
      uncertainty: sigma ?? single * Math.hypot(perPixel.x, perPixel.y),
      at,
      log: frequency.logAt(at.u),
      own: density.logSlopeAt(at.v),
    };
  });
  const order = points
    .map((_, index) => index)
    .toSorted((one, other) => (points[one]?.log ?? 0) - (points[other]?.log ?? 0));
  const curve = curveFromPoints(
    order.map((index) => {
      const { frequency: hz, density: level, uncertainty } = points[index] as (typeof points)[number];
      return { frequency: hz, density: level, uncertainty };
    }),
    { unit: calibration.unit, label: options.label ?? "", source: options.source ?? [] },
  );
  const effects = calibration.axes.fit.components.map((component): CommonEffect => {
    const felt = order.map((index) => {
      const { at, slope } = readings[index] as Reading;
      return effectOf(component.shiftAt(at), slope, calibration, at);
    });
    return Object.freeze({ name: component.name, effects: Object.freeze(felt) });
  });
  return Object.freeze({ ...curve, commonEffects: Object.freeze(effects) });
}

/** ln density at a fixed frequency that a shift of the coordinates makes. */
function effectOf(shift: AxisCoordinates, slope: number, calibration: AxesCalibration, at: AxisCoordinates): number {
  return (shift.v - slope * shift.u) * calibration.axes.density.logSlopeAt(at.v);
}

function readingsOf(calibration: AxesCalibration, places: readonly Pixel[]): Reading[] {
  const { fit } = calibration.axes;
  const at = places.map((place) => fit.coordinatesAt(place));
  const order = at.map((_, index) => index).toSorted((one, other) => (at[one]?.u ?? 0) - (at[other]?.u ?? 0));
  const slopes = new Float64Array(at.length);
  for (const [rank, index] of order.entries()) {
    const before = at[order[Math.max(rank - 1, 0)] as number] as AxisCoordinates;
    const after = at[order[Math.min(rank + 1, order.length - 1)] as number] as AxisCoordinates;
    slopes[index] = after.u > before.u ? (after.v - before.v) / (after.u - before.u) : 0;
  }
  return at.map((coordinates, index) => {
    const slope = slopes[index] as number;
    return {
      at: coordinates,
      slope,
      perPixel: {
        x: effectOf(fit.shiftOf({ x: 1, y: 0 }), slope, calibration, coordinates),
        y: effectOf(fit.shiftOf({ x: 0, y: 1 }), slope, calibration, coordinates),
      },
    };
  });
}

/** Standard deviation of one pick's ln density about the mean of its series, pooled over all places. */
function scatterOf(
  calibration: AxesCalibration,
  series: readonly (readonly Pixel[])[],
  readings: readonly Reading[],
): number {
  let square = 0;
  for (const picks of series)
    for (const [index, { at, slope }] of readings.entries()) {
      const found = calibration.axes.fit.coordinatesAt(picks[index] as Pixel);
      square += effectOf({ u: found.u - at.u, v: found.v - at.v }, slope, calibration, at) ** 2;
    }
  const scatter = Math.sqrt(square / (readings.length * (series.length - 1)));
  if (scatter > 0) return scatter;
  throw new MalformedDataError("Repeated picks must differ to show their scatter; the series given are identical.");
}

function seriesOf(picks: readonly Pixel[] | readonly (readonly Pixel[])[]): readonly (readonly Pixel[])[] {
  const series = picks.every((item): item is readonly Pixel[] => Array.isArray(item)) ? picks : [picks];
  const count = series[0]?.length ?? 0;
  if (count < 2) throw new OutOfDomainError(`A curve needs at least two picks; got ${count}.`);
  for (const [which, one] of series.entries()) {
    if (one.length !== count)
      throw new MalformedDataError(
        `Repeated picks must come in series of one length; the first has ${count} picks, number ${which + 1} has ${one.length}.`,
      );
    for (const [index, pick] of one.entries())
      if (!(Number.isFinite(pick.x) && Number.isFinite(pick.y)))
        throw new MalformedDataError(`Pick ${index + 1} needs finite pixels x and y; got ${pick.x}, ${pick.y}.`, {
          index,
        });
  }
  return series;
}

function averaged(series: readonly (readonly Pixel[])[]): Pixel[] {
  return (series[0] ?? []).map((_, index) => ({
    x: series.reduce((sum, picks) => sum + (picks[index]?.x ?? 0), 0) / series.length,
    y: series.reduce((sum, picks) => sum + (picks[index]?.y ?? 0), 0) / series.length,
  }));
}
