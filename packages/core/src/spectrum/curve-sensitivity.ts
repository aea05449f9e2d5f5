import type { CommonEffect, Curve } from "../curve/curve.js";
import type { Sensitivity } from "./spectrum.js";

/**
 * How a polyline answers to the densities of its points: d ln S / d ln e_i = 2 · hat_i, the hat being 1 at point i and
 * falling linearly in ln f to its neighbours; beyond the ends the last point carries everything. Errors that points
 * share come as groups of their own.
 */
export function pointSensitivities({ points, commonUncertainty, commonEffects = [] }: Curve): Sensitivity[] {
  const hz = Object.freeze(points.map((point) => point.frequency));
  const hats = hatsOver(hz);
  const own: Sensitivity = Object.freeze({
    name: "points",
    count: points.length,
    covariance: Object.freeze({ variances: Object.freeze(points.map(({ uncertainty }) => uncertainty * uncertainty)) }),
    knots: hz,
    straight: true,
    gradientAt(at: number, visit: (parameter: number, slope: number) => void): void {
      hats(at, (index, share) => visit(index, 2 * share));
    },
  });
  const axis = commonUncertainty > 0 ? [commonSensitivity("axis", commonUncertainty)] : [];
  return [own, ...axis, ...commonEffects.map((effect) => effectSensitivity(effect, hz, hats))];
}

/** A relative error of the density that all frequencies share (a misread axis): d ln S / d ln e = 2 everywhere. */
export function commonSensitivity(name: string, relativeUncertainty: number): Sensitivity {
  return Object.freeze({
    name,
    count: 1,
    covariance: Object.freeze({ variances: Object.freeze([relativeUncertainty * relativeUncertainty]) }),
    knots: Object.freeze([]),
    straight: true,
    gradientAt: (_: number, visit: (parameter: number, slope: number) => void) => visit(0, 2),
  });
}

/** An exponent that is assumed beyond an edge: d ln S / d a = −ln(f/edge) there, nothing on the other side. */
export function exponentSensitivity(side: "below" | "above", edgeHz: number, standardUncertainty: number): Sensitivity {
  return Object.freeze({
    name: `exponent ${side} the points`,
    count: 1,
    covariance: Object.freeze({ variances: Object.freeze([standardUncertainty * standardUncertainty]) }),
    knots: Object.freeze([edgeHz]),
    straight: true,
    gradientAt(hz: number, visit: (parameter: number, slope: number) => void): void {
      if (side === "below" ? hz < edgeHz : hz > edgeHz) visit(0, -Math.log(hz / edgeHz));
    },
  });
}

type Hats = (hz: number, visit: (index: number, share: number) => void) => void;

/** The one or two hats that are not zero at a frequency, and their shares. */
function hatsOver(hz: readonly number[]): Hats {
  const logs = Float64Array.from(hz, Math.log);
  const last = logs.length - 1;
  return (at, visit) => {
    const x = Math.log(at);
    if (x <= (logs[0] as number)) return visit(0, 1);
    if (x >= (logs[last] as number)) return visit(last, 1);
    let low = 0;
    let high = last;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if ((logs[middle] as number) <= x) low = middle;
      else high = middle;
    }
    const share = (x - (logs[low] as number)) / ((logs[high] as number) - (logs[low] as number));
    visit(low, 1 - share);
    visit(high, share);
  };
}

function effectSensitivity({ name, effects }: CommonEffect, hz: readonly number[], hats: Hats): Sensitivity {
  return Object.freeze({
    name,
    count: 1,
    covariance: Object.freeze({ variances: Object.freeze([1]) }),
    knots: hz,
    straight: true,
    gradientAt(at: number, visit: (parameter: number, slope: number) => void): void {
      let slope = 0;
      hats(at, (index, share) => {
        slope += 2 * share * (effects[index] ?? 0);
      });
      visit(0, slope);
    },
  });
}
