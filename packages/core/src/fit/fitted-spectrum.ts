import type { Curve } from "../curve/curve.js";
import type { PowerLawPiece, PowerLawTerm } from "../numerics/power-law.js";
import { termsAt } from "../numerics/power-law.js";
import { type Beyond, type BeyondLaw, beyondNote, resolveBeyond } from "../spectrum/beyond.js";
import { commonSensitivity, exponentSensitivity } from "../spectrum/curve-sensitivity.js";
import { functionSpectrum } from "../spectrum/function-spectrum.js";
import { spectrumFromPieces } from "../spectrum/make-spectrum.js";
import type { Sensitivity, Spectrum } from "../spectrum/spectrum.js";
import { sumSpectra } from "../spectrum/sum-spectra.js";
import { type FitModel, termsOf } from "./fit-model.js";
import type { FitPoints } from "./fit-points.js";
import type { RefinedFit } from "./refine.js";

type Extras = Pick<Spectrum, "pointsSpan" | "sensitivities" | "notes">;

/**
 * The spectrum of a fit: the model over the fitted points, going on beyond them as told, with the covariance of its
 * parameters (already widened) as a sensitivity.
 */
export function fittedSpectrum(
  curve: Curve,
  points: FitPoints,
  fit: RefinedFit,
  covariance: readonly (readonly number[])[] | undefined,
  beyond: Beyond,
): Spectrum {
  const span = spanOf(points);
  const sides = sidesOf(beyond);
  const axis = curve.commonUncertainty > 0 ? [commonSensitivity("axis", curve.commonUncertainty)] : [];
  const sensitivities =
    covariance === undefined
      ? axis
      : [
          parameterSensitivity(fit, covariance, span, sides),
          ...axis,
          ...sharedSensitivities(curve, points, fit, span, sides),
        ];
  return modelSpectrum(curve.unit, span, fit, { beyond, sensitivities, what: "fitted points" });
}

/** From the first point that counts to the last, those of a bump among them. */
function spanOf({ points, leftOut }: FitPoints): readonly [number, number] {
  const bump = leftOut.filter(({ why }) => why === "bump").map(({ frequency }) => frequency);
  const all = [points[0]?.frequency ?? 1, points.at(-1)?.frequency ?? 1, ...bump];
  return [Math.min(...all), Math.max(...all)];
}

/** The spectrum of a model that stated figures gave, over the frequencies that they span. */
export function figuresSpectrum(
  unit: string,
  span: readonly [number, number],
  fit: FittedModel,
  covariance: readonly (readonly number[])[],
  beyond: Beyond,
): Spectrum {
  const sensitivities = [parameterSensitivity(fit, covariance, span, sidesOf(beyond))];
  return modelSpectrum(unit, span, fit, { beyond, sensitivities, what: "figures" });
}

/** A model with its parameters, however they were found. */
export type FittedModel = Pick<RefinedFit, "model" | "scale" | "parameters">;

function modelSpectrum(
  unit: string,
  [first, last]: readonly [number, number],
  { model, scale, parameters }: FittedModel,
  given: { readonly beyond: Beyond; readonly sensitivities: readonly Sensitivity[]; readonly what: string },
): Spectrum {
  const { terms, trap } = termsOf(model, scale, parameters);
  const law = resolveBeyond(given.beyond, {
    below: Math.max(...terms.map(({ exponent }) => exponent)),
    above: Math.min(...terms.map(({ exponent }) => exponent)),
  });
  const sides = sidesOf(given.beyond);
  const notes: string[] = [];
  const sensitivities = [...given.sensitivities];
  const pieces: PowerLawPiece[] = [{ from: first, to: last, terms: copied(terms) }];
  for (const side of ["below", "above"] as const) {
    const own = law[side];
    const edge = side === "below" ? first : last;
    if (own === undefined || edge === 0 || edge === Number.POSITIVE_INFINITY) continue;
    notes.push(sides[side] === "segments" ? formulaNote(side, edge, given.what) : beyondNote(side, edge, own));
    if (own.standardUncertainty > 0) sensitivities.push(exponentSensitivity(side, edge, own.standardUncertainty));
    const goingOn =
      sides[side] === "segments" ? copied(terms) : [lawFrom(edge, termsAt(terms, edge) + trapAt(trap, edge), own)];
    if (side === "below") pieces.unshift({ from: 0, to: edge, terms: goingOn });
    else pieces.push({ from: edge, to: Number.POSITIVE_INFINITY, terms: goingOn });
  }
  const extras: Extras = {
    pointsSpan: Object.freeze([first, last] as const),
    sensitivities: Object.freeze(sensitivities),
    notes: Object.freeze(notes),
  };
  if (trap === undefined) return spectrumFromPieces(unit, pieces, extras);
  return withTrap(unit, pieces, trap, extras);
}

function trapAt(trap: { readonly level: number; readonly cornerHz: number } | undefined, hz: number): number {
  return trap === undefined ? 0 : trap.level / (1 + (hz / trap.cornerHz) ** 2);
}

/** A Lorentzian beside the power laws: where the model itself holds, and nothing where another law took over. */
function withTrap(
  unit: string,
  pieces: readonly PowerLawPiece[],
  trap: { readonly level: number; readonly cornerHz: number },
  extras: Extras,
): Spectrum {
  const smooth = spectrumFromPieces(unit, pieces);
  const lorentzian = functionSpectrum((hz) => trapAt(trap, hz), {
    unit,
    support: smooth.support,
    knots: [trap.cornerHz],
    lowExponent: 0,
    highExponent: 2,
  });
  return Object.freeze({ ...sumSpectra(smooth, lorentzian), ...extras });
}

function sidesOf(beyond: Beyond): Sides {
  return { below: sideOf(beyond, "below"), above: sideOf(beyond, "above") };
}

function sideOf(beyond: Beyond, side: "below" | "above"): "segments" | "other" {
  const own = typeof beyond === "object" ? beyond[side] : beyond;
  return own === "segments" ? "segments" : "other";
}

function formulaNote(side: "below" | "above", edge: number, what: string): string {
  return `${side === "below" ? "Below" : "Above"} ${Number(edge.toPrecision(4))} Hz there are no ${what}; the model's own formula goes on.`;
}

function lawFrom(at: number, level: number, { exponent }: BeyondLaw): PowerLawTerm {
  return { at, level, exponent };
}

function copied(terms: readonly PowerLawTerm[]): PowerLawTerm[] {
  return terms.map((term) => ({ ...term }));
}

/** Frequency at which the model is asked: the edge itself where another law goes on from it. */
function within(
  hz: number,
  [first, last]: readonly [number, number],
  sides: { readonly below: string; readonly above: string },
): number {
  if (hz < first && sides.below !== "segments") return first;
  return hz > last && sides.above !== "segments" ? last : hz;
}

type Sides = { readonly below: "segments" | "other"; readonly above: "segments" | "other" };

function parameterSensitivity(
  { model, parameters }: FittedModel,
  covariance: readonly (readonly number[])[],
  span: readonly [number, number],
  sides: Sides,
): Sensitivity {
  const slopes = new Float64Array(model.parameters.length);
  return Object.freeze({
    name: "fit",
    count: model.parameters.length + 1,
    covariance: Object.freeze({ matrix: covariance }),
    knots: Object.freeze([]),
    gradientAt(hz: number, visit: (parameter: number, slope: number) => void): void {
      model.shapeAt(Math.log(within(hz, span, sides)), parameters, slopes);
      visit(0, 1);
      for (let p = 0; p < slopes.length; p += 1) visit(p + 1, slopes[p] as number);
    },
  });
}

/** Errors that points share move the parameters together: δθ = C·Jᵀ·(w·effect), C the covariance of unit weights. */
function sharedSensitivities(
  { commonEffects = [], points: all }: Curve,
  points: FitPoints,
  fit: RefinedFit,
  span: readonly [number, number],
  sides: Sides,
): Sensitivity[] {
  const index = new Map(all.map(({ frequency }, at) => [frequency, at]));
  return commonEffects.map(({ name, effects }) => {
    const felt = points.points.map(({ frequency }) => effects[index.get(frequency) ?? -1] ?? 0);
    const moved = movedParameters(fit, points, felt);
    const slopes = new Float64Array(fit.model.parameters.length);
    return Object.freeze({
      name,
      count: 1,
      covariance: Object.freeze({ variances: Object.freeze([1]) }),
      knots: Object.freeze([]),
      gradientAt(hz: number, visit: (parameter: number, slope: number) => void): void {
        fit.model.shapeAt(Math.log(within(hz, span, sides)), fit.parameters, slopes);
        visit(
          0,
          slopes.reduce((sum, slope, p) => sum + slope * (moved[p + 1] as number), moved[0] as number),
        );
      },
    });
  });
}

function movedParameters(fit: RefinedFit, { x, weight }: FitPoints, felt: readonly number[]): number[] {
  const model: FitModel = fit.model;
  const size = model.parameters.length + 1;
  const slopes = new Float64Array(size - 1);
  const pull = new Float64Array(size);
  for (let i = 0; i < x.length; i += 1) {
    model.shapeAt(x[i] as number, fit.parameters, slopes);
    const force = 0.5 * (weight[i] as number) ** 2 * (felt[i] as number);
    pull[0] = (pull[0] as number) + force;
    for (let p = 1; p < size; p += 1) pull[p] = (pull[p] as number) + force * (slopes[p - 1] as number);
  }
  return (fit.covariance ?? []).map((row) => row.reduce((sum, value, p) => sum + value * (pull[p] as number), 0));
}
