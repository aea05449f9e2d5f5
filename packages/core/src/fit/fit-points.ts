import type { Curve, CurvePoint } from "../curve/curve.js";
import { OutOfDomainError } from "../ground/errors.js";
import { arrayBlock } from "../numerics/array-block.js";
import type { Bump } from "./bump.js";

/** The points that take part in a fit, in logarithms. */
export interface FitPoints {
  readonly points: readonly CurvePoint[];
  /** ln f, centred on nothing: as it is. */
  readonly x: Float64Array;
  /** ln density. */
  readonly y: Float64Array;
  /** 1/uncertainty of each ln density. */
  readonly weight: Float64Array;
  /** Points of the curve that were left out, and why. */
  readonly leftOut: readonly LeftOutPoint[];
}

/** A point of the curve that took no part. */
export interface LeftOutPoint {
  readonly frequency: number;
  readonly line?: number;
  readonly why: "aside" | "bump" | "below fromHz" | "above toHz";
}

export function choosePoints(
  curve: Curve,
  fromHz = 0,
  toHz: number = Number.POSITIVE_INFINITY,
  bump?: Bump,
): FitPoints {
  if (!(fromHz >= 0 && toHz > fromHz))
    throw new OutOfDomainError(
      `The range of a fit must run from fromHz up to a higher toHz, in Hz; got ${fromHz} to ${toHz}.`,
    );
  const points: CurvePoint[] = [];
  const leftOut: LeftOutPoint[] = [];
  for (const point of curve.points) {
    const why = isIn(point, bump) ? "bump" : reasonToLeaveOut(point, fromHz, toHz);
    if (why === undefined) points.push(point);
    else leftOut.push({ frequency: point.frequency, why, ...(point.line !== undefined && { line: point.line }) });
  }
  if (points.length < 2)
    throw new OutOfDomainError(
      `A fit needs at least two points; ${fromHz} Hz to ${toHz} Hz holds ${points.length} that are not set aside; widen fromHz and toHz.`,
    );
  const [x, y, weight] = arrayBlock([points.length, points.length, points.length]);
  for (const [i, { frequency, density, uncertainty }] of points.entries()) {
    x[i] = Math.log(frequency);
    y[i] = Math.log(density);
    weight[i] = 1 / uncertainty;
  }
  return { points, x, y, weight, leftOut };
}

function isIn({ frequency }: CurvePoint, bump: Bump | undefined): boolean {
  return bump !== undefined && frequency >= bump.fromHz && frequency <= bump.toHz;
}

function reasonToLeaveOut(
  { inFit, frequency }: CurvePoint,
  fromHz: number,
  toHz: number,
): LeftOutPoint["why"] | undefined {
  if (!inFit) return "aside";
  if (frequency < fromHz) return "below fromHz";
  return frequency > toHz ? "above toHz" : undefined;
}
