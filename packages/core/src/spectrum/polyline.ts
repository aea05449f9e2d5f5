import type { Curve, CurvePoint } from "../curve/curve.js";
import { OutOfDomainError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";
import type { PowerLawPiece, PowerLawTerm } from "../numerics/power-law.js";
import { logRatio } from "../numerics/power-law-integral.js";
import { type Beyond, type BeyondLaw, beyondNote, resolveBeyond } from "./beyond.js";
import { exponentSensitivity, pointSensitivities } from "./curve-sensitivity.js";
import { spectrumFromPieces } from "./make-spectrum.js";
import type { Sensitivity, Spectrum } from "./spectrum.js";

/**
 * Straight lines through the points of a curve, in log density over log frequency: between neighbours S is one power law.
 *
 * Inside the points this is the better basis for band noise than a model, since it follows what was read. Its known
 * bias: a chord over a convex knee lies above the curve, +0.3 to +0.5 % of the RMS at 2 to 3 points a decade.
 * Every point of the curve takes part, also one that is left out of fits; points are independent in uncertainty.
 *
 * @param curve - at least two points (`readCurve`, `curveFromPoints`).
 * @param options - `beyond`: how it goes on outside the points; refuses unless told (see {@link Beyond}).
 * @returns a spectrum with a piece for every segment, exact band integrals, and the points' uncertainty.
 * @throws OutOfDomainError for fewer than two points or an option that is none of the list.
 *
 * @example
 * ```ts
 * import { bandNoise, polyline, readCurve } from "@quietband/core";
 * const curve = readCurve("frequency [Hz], density [nV/√Hz]\n0.1, 1000\n10, 100\n1000, 70");
 * bandNoise(polyline(curve), { fromHz: 0.1, toHz: 10 }).rms; // → 678.6e-9
 * ```
 */
export function polyline(curve: Curve, options: { readonly beyond?: Beyond | undefined } = {}): Spectrum {
  refuseUnknownKeys("polyline", ["beyond"], options);
  const { points } = curve;
  const first = points[0];
  const last = points.at(-1);
  if (points.length < 2 || first === undefined || last === undefined)
    throw new OutOfDomainError(`A polyline needs at least two points; the curve has ${points.length}.`);
  const segments = points.slice(1).map((point, index) => segmentBetween(points[index] as CurvePoint, point));
  const law = resolveBeyond(options.beyond ?? "refuse", {
    below: exponentOf(segments[0]),
    above: exponentOf(segments.at(-1)),
  });
  const pieces: PowerLawPiece[] = [...segments];
  const sensitivities: Sensitivity[] = pointSensitivities(curve);
  const notes: string[] = [];
  const extend = (
    side: "below" | "above",
    { frequency, density }: CurvePoint,
    { exponent, standardUncertainty }: BeyondLaw,
  ): void => {
    const terms: PowerLawTerm[] = [{ at: frequency, level: density * density, exponent }];
    if (side === "below") pieces.unshift({ from: 0, to: frequency, terms });
    else pieces.push({ from: frequency, to: Number.POSITIVE_INFINITY, terms });
    notes.push(beyondNote(side, frequency, { exponent, standardUncertainty }));
    if (standardUncertainty > 0) sensitivities.push(exponentSensitivity(side, frequency, standardUncertainty));
  };
  if (law.below !== undefined) extend("below", first, law.below);
  if (law.above !== undefined) extend("above", last, law.above);
  return spectrumFromPieces(curve.unit, pieces, {
    pointsSpan: Object.freeze([first.frequency, last.frequency] as const),
    sensitivities: Object.freeze(sensitivities),
    notes: Object.freeze(notes),
  });
}

/**
 * The power law through two points, anchored at the end that holds most of its integral, so that the rounding of the
 * exponent is not amplified over the segment.
 */
function segmentBetween(low: CurvePoint, high: CurvePoint): PowerLawPiece {
  const exponent = (-2 * signedLogRatio(low.density, high.density)) / logRatio(low.frequency, high.frequency);
  const anchor = exponent > 1 ? low : high;
  const term = { at: anchor.frequency, level: anchor.density * anchor.density, exponent };
  return { from: low.frequency, to: high.frequency, terms: [term] };
}

function signedLogRatio(low: number, high: number): number {
  return high >= low ? logRatio(low, high) : -logRatio(high, low);
}

function exponentOf(segment: PowerLawPiece | undefined): number {
  return segment?.terms[0]?.exponent ?? 0;
}
