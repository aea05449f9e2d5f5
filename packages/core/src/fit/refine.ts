import { dampedLeastSquares } from "../numerics/damped-least-squares.js";
import type { FitModel } from "./fit-model.js";
import type { FitPoints } from "./fit-points.js";
import { firstStart, moreStarts } from "./start.js";
import { type Found, twoTermDescent } from "./two-term-descent.js";

/** A good start needs little damping; what the sum of squares no longer shows is no statistics either. */
const solverOptions = Object.freeze({
  damping: 1e-3,
  stepTolerance: 1e-14,
  gainTolerance: 1e-13,
  mostSteps: 300,
  stallTolerance: 1e-13,
  mostStalled: 5,
  polish: false,
});

/** A term too many runs off to where it does nothing; its last millionth of the sum of squares decides nothing. */
const threeTermOptions = Object.freeze({ ...solverOptions, mostSteps: 60, stallTolerance: 1e-9, mostStalled: 3 });

/** A model with its best parameters. */
export interface RefinedFit {
  readonly model: FitModel;
  /** ln of the power level that multiplies the shape. */
  readonly scale: number;
  readonly parameters: Float64Array;
  /** Σ of squares of weighted residuals, the prior among them. */
  readonly chiSquare: number;
  /** Points and priors less parameters. */
  readonly degrees: number;
  /** Covariance of scale and parameters, from the Jacobian, not widened; undefined where the points do not fix them all. */
  readonly covariance: readonly (readonly number[])[] | undefined;
  /** ln of density over the model's, point by point. */
  readonly residuals: readonly number[];
  readonly converged: boolean;
}

/** How {@link refine} departs from the plain fit. */
export interface RefineOptions {
  /** One a point, 0 to 1: multiplies the weights of a robust pass. */
  readonly trust?: Float64Array | undefined;
  /** Parameters of a neighbouring fit, in place of the first start. */
  readonly from?: ArrayLike<number>;
}

/** A first result above this χ² per degree may sit in the wrong valley. */
const doubtfulPerDegree = 4;

/**
 * The least squares of one model on log density. The scale is linear in the logarithm, so it is eliminated (variable
 * projection, Golub and Pereyra 1973): the mean comes off residuals and slopes, and the solver sees the other parameters
 * only. One start does where it ends well inside the points; else, and for models of three terms, the best of a grid are
 * refined too (`refine.test.ts` compares with many starts).
 */
export function refine(model: FitModel, points: FitPoints, { trust, from }: RefineOptions = {}): RefinedFit {
  const weight =
    trust === undefined ? points.weight : points.weight.map((value, i) => value * Math.sqrt(trust[i] as number));
  const given = { ...points, weight };
  if (model.parameters.length === 0) return assembled(model, given, nothingFound);
  const rows = points.x.length + priorRows(model);
  const search = searchOf(model, given, rows);
  let best = search(from ?? firstStart(model, points));
  if (!settled(model, given, best, rows))
    for (const start of moreStarts(model, points)) {
      const found = search(start);
      if (!(found.sumOfSquares >= best.sumOfSquares)) best = found;
    }
  return assembled(model, given, best);
}

/** The search of a model from a start: its own for two terms, the general one else. */
function searchOf(model: FitModel, points: FitPoints, rows: number): (start: ArrayLike<number>) => Found {
  if (model.name === "floorAndFlicker") return (start) => twoTermDescent(model, points, start);
  const projected = projection(model, points);
  const options = model.parameters.length > 2 ? threeTermOptions : solverOptions;
  return (start) => dampedLeastSquares(projected, start, rows, options);
}

/** Whether one search is enough: two terms at most, a corner among the points, and points that agree with it. */
function settled(
  model: FitModel,
  { x }: FitPoints,
  { parameters, sumOfSquares, converged, inverse }: Found,
  rows: number,
): boolean {
  if (model.name === "flicker") return converged; // linear in its only parameter
  if (model.parameters.length > 2 || !converged || inverse === undefined) return false;
  if (sumOfSquares > doubtfulPerDegree * Math.max(rows - parameters.length - 1, 1)) return false;
  const corner = parameters[0] as number;
  return corner > (x[0] as number) && corner < (x.at(-1) as number);
}

const nothingFound: Found = Object.freeze({
  parameters: new Float64Array(0),
  sumOfSquares: 0,
  converged: true,
  inverse: new Float64Array(0),
});

function priorRows({ exponent, exponentAt }: FitModel): number {
  return exponent.kind === "prior" && exponentAt >= 0 ? 1 : 0;
}

/** Weighted residuals ½·ln S − y and their slopes with the weighted mean taken off. */
function projection(model: FitModel, { x, y, weight }: FitPoints) {
  const size = model.parameters.length;
  const count = x.length;
  const square = squareOf(weight);
  const means = new Float64Array(size);
  return (parameters: Float64Array, residuals: Float64Array, jacobian: Float64Array): void => {
    model.shapeOver(x, parameters, residuals, jacobian);
    means.fill(0);
    let mean = 0;
    for (let i = 0; i < count; i += 1) {
      const w = weight[i] as number;
      const share = (w * w) / square;
      const value = 0.5 * (residuals[i] as number) - (y[i] as number);
      residuals[i] = value;
      mean += share * value;
      for (let p = 0; p < size; p += 1) means[p] = (means[p] as number) + share * (jacobian[i * size + p] as number);
    }
    for (let i = 0; i < count; i += 1) {
      const w = weight[i] as number;
      residuals[i] = w * ((residuals[i] as number) - mean);
      for (let p = 0; p < size; p += 1)
        jacobian[i * size + p] = 0.5 * w * ((jacobian[i * size + p] as number) - (means[p] as number));
    }
    if (model.exponent.kind !== "prior" || model.exponentAt < 0) return;
    const { mean: expected, standardUncertainty } = model.exponent;
    residuals[count] = ((parameters[model.exponentAt] as number) - expected) / standardUncertainty;
    for (let p = 0; p < size; p += 1) jacobian[count * size + p] = p === model.exponentAt ? 1 / standardUncertainty : 0;
  };
}

function squareOf(weight: Float64Array): number {
  let square = 0;
  for (let i = 0; i < weight.length; i += 1) square += (weight[i] as number) ** 2;
  return square;
}

/** Scale, residuals and the covariance of all parameters at a solution. */
function assembled(
  model: FitModel,
  { x, y, weight }: FitPoints,
  { parameters, converged, inverse }: Found,
): RefinedFit {
  const size = model.parameters.length;
  const count = x.length;
  const means = new Float64Array(size);
  const slopes = new Float64Array(size);
  const residuals: number[] = [];
  const square = squareOf(weight);
  let mean = 0;
  for (let i = 0; i < count; i += 1) {
    const share = (weight[i] as number) ** 2 / square;
    const value = (y[i] as number) - 0.5 * model.shapeAt(x[i] as number, parameters, slopes);
    residuals.push(value);
    mean += share * value;
    for (let p = 0; p < size; p += 1) means[p] = (means[p] as number) + share * (slopes[p] as number);
  }
  let chiSquare = 0;
  for (let i = 0; i < count; i += 1) {
    residuals[i] = (residuals[i] as number) - mean;
    chiSquare += ((weight[i] as number) * (residuals[i] as number)) ** 2;
  }
  const prior = priorRows(model);
  if (model.exponent.kind === "prior" && prior === 1) {
    const { mean: expected, standardUncertainty } = model.exponent;
    chiSquare += (((parameters[model.exponentAt] as number) - expected) / standardUncertainty) ** 2;
  }
  const covariance = inverse === undefined ? undefined : withScale(inverse, means, 4 / square);
  return {
    model,
    scale: 2 * mean,
    parameters,
    chiSquare,
    degrees: count + prior - size - 1,
    covariance,
    residuals,
    converged,
  };
}

/**
 * The covariance with the eliminated scale put back in front: the scale is the weighted mean of what the shape leaves, so it
 * moves by −means·δ with the parameters and by its own scatter besides.
 */
function withScale(inverse: Float64Array, means: Float64Array, ownVariance: number): readonly (readonly number[])[] {
  const size = means.length;
  const rows = Array.from({ length: size }, (_, row) => Array.from(inverse.subarray(row * size, (row + 1) * size)));
  const along = rows.map((row) => -row.reduce((sum, value, p) => sum + value * (means[p] as number), 0));
  const variance = along.reduce((sum, value, p) => sum - value * (means[p] as number), ownVariance);
  return [[variance, ...along], ...rows.map((row, p) => [along[p] as number, ...row])];
}
