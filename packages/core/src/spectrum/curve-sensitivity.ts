import type { Curve } from "../curve/curve.js";
import type { Sensitivity } from "./spectrum.js";

/**
 * How a polyline answers to the densities of its points: d ln S / d ln e_i = 2 · hat_i, the hat being 1 at point i and
 * falling linearly in ln f to its neighbours; beyond the ends the last point carries everything.
 */
export function pointSensitivities(curve: Curve): Sensitivity[] {
  const { points, commonUncertainty } = curve;
  const hz = Object.freeze(points.map((point) => point.frequency));
  const logs = Float64Array.from(hz, Math.log);
  const count = points.length;
  const groups: Sensitivity[] = [
    Object.freeze({
      name: "points",
      count,
      covariance: Object.freeze(
        points.map(({ uncertainty }, row) =>
          Object.freeze(points.map((_, column) => (row === column ? uncertainty * uncertainty : 0))),
        ),
      ),
      knots: hz,
      gradientAt(at: number, gradient: Float64Array): void {
        gradient.fill(0);
        const x = Math.log(at);
        let right = 0;
        while (right < count && (logs[right] as number) <= x) right += 1;
        if (right === 0) gradient[0] = 2;
        else if (right === count) gradient[count - 1] = 2;
        else {
          const left = logs[right - 1] as number;
          const share = (x - left) / ((logs[right] as number) - left);
          gradient[right - 1] = 2 * (1 - share);
          gradient[right] = 2 * share;
        }
      },
    }),
  ];
  if (commonUncertainty > 0) groups.push(commonSensitivity("axis", commonUncertainty));
  return groups;
}

/** A relative error of the density that all frequencies share (a misread axis): d ln S / d ln e = 2 everywhere. */
export function commonSensitivity(name: string, relativeUncertainty: number): Sensitivity {
  return Object.freeze({
    name,
    count: 1,
    covariance: Object.freeze([Object.freeze([relativeUncertainty * relativeUncertainty])]),
    knots: Object.freeze([]),
    gradientAt(_: number, gradient: Float64Array): void {
      gradient[0] = 2;
    },
  });
}

/** An exponent that is assumed beyond an edge: d ln S / d a = −ln(f/edge) there, nothing on the other side. */
export function exponentSensitivity(side: "below" | "above", edgeHz: number, standardUncertainty: number): Sensitivity {
  return Object.freeze({
    name: `exponent ${side} the points`,
    count: 1,
    covariance: Object.freeze([Object.freeze([standardUncertainty * standardUncertainty])]),
    knots: Object.freeze([edgeHz]),
    gradientAt(hz: number, gradient: Float64Array): void {
      const beyond = side === "below" ? hz < edgeHz : hz > edgeHz;
      gradient[0] = beyond ? -Math.log(hz / edgeHz) : 0;
    },
  });
}
