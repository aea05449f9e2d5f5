import { requireBetween } from "../ground/domain.js";
import { refuseUnknownKeys } from "../ground/options.js";
import type { CommonEffect, Curve, CurvePoint } from "./curve.js";

/** Relative change of the RMS of any band that thinning may cause, unless given. */
export const thinCurveTolerance = 1e-3;

/**
 * The fewest points of a curve whose straight lines in log-log stay within a tolerance of all the points left out, so that
 * the RMS of every band, each octave among them, changes by no more than the tolerance.
 *
 * From each point kept the next is the furthest one to which a line passes every point between within the tolerance; the
 * slopes still open form a cone that only narrows, so the work is linear in the points looked at.
 *
 * @param curve - any curve; a traced path of 1e5 points is what this is for.
 * @param options - `tolerance`: relative change allowed of the density between kept points; 0.1 % unless given.
 * @returns a curve of some of the same points, ends included.
 * @throws OutOfDomainError for a tolerance that is not between 0 and 0.5.
 *
 * @example
 * ```ts
 * import { curveFromPoints, thinCurve } from "@quietband/core";
 * const points = Array.from({ length: 1000 }, (_, k) => ({ frequency: 1 + k, density: 1e-8 }));
 * thinCurve(curveFromPoints(points, { unit: "V" })).points.length; // → 2
 * ```
 */
export function thinCurve(curve: Curve, options: { readonly tolerance?: number | undefined } = {}): Curve {
  refuseUnknownKeys("thinCurve", ["tolerance"], options);
  const tolerance = options.tolerance ?? thinCurveTolerance;
  requireBetween("tolerance", tolerance, [0, 0.5], { low: true });
  const kept = keptIndices(curve.points, Math.log1p(tolerance));
  const points = kept.map((index) => curve.points[index] as CurvePoint);
  const effects = curve.commonEffects?.map(
    (effect): CommonEffect =>
      Object.freeze({ ...effect, effects: Object.freeze(kept.map((index) => effect.effects[index] ?? 0)) }),
  );
  return Object.freeze({
    ...curve,
    points: Object.freeze(points),
    ...(effects !== undefined && { commonEffects: Object.freeze(effects) }),
  });
}

function keptIndices(points: readonly CurvePoint[], slack: number): number[] {
  const x = Float64Array.from(points, ({ frequency }) => Math.log(frequency));
  const y = Float64Array.from(points, ({ density }) => Math.log(density));
  const last = points.length - 1;
  const kept = [0];
  let anchor = 0;
  while (anchor < last) {
    let reach = anchor + 1;
    let steepest = Number.POSITIVE_INFINITY;
    let flattest = Number.NEGATIVE_INFINITY;
    for (let index = anchor + 1; index <= last && flattest <= steepest; index += 1) {
      const run = (x[index] as number) - (x[anchor] as number);
      const rise = (y[index] as number) - (y[anchor] as number);
      if (rise / run >= flattest && rise / run <= steepest) reach = index;
      steepest = Math.min(steepest, (rise + slack) / run);
      flattest = Math.max(flattest, (rise - slack) / run);
    }
    kept.push(reach);
    anchor = reach;
  }
  return kept;
}
