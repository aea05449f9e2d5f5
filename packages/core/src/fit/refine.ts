import { dampedLeastSquares } from "../numerics/damped-least-squares.js";
import { linearLeastSquares } from "../numerics/linear-least-squares.js";
import type { FitModel } from "./fit-model.js";
import type { FitPoints } from "./fit-points.js";

/** Statistics need no more; polishing steps find the last digits where there is a minimum. */
const solverOptions = Object.freeze({ mostSteps: 80, stallTolerance: 1e-12, mostStalled: 3 });

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
  readonly residuals: Float64Array;
  readonly converged: boolean;
}

/**
 * The least squares of one model on log density from given starts; the best of them. The scale is linear in the logarithm, so
 * it is eliminated (variable projection, Golub and Pereyra 1973): the mean comes off residuals and slopes, and the solver
 * sees the other parameters only. `trust` (one a point, 0 to 1) multiplies the weights of a robust pass.
 */
export function refine(
  model: FitModel,
  points: FitPoints,
  starts: readonly (readonly number[])[],
  trust?: Float64Array,
): RefinedFit {
  const weight =
    trust === undefined ? points.weight : points.weight.map((value, i) => value * Math.sqrt(trust[i] as number));
  const given = { ...points, weight };
  const projected = projection(model, given);
  const size = model.parameters.length;
  if (size === 0) return assembled(model, given, new Float64Array(0), true);
  const rows = points.x.length + priorRows(model);
  let best:
    | { readonly parameters: Float64Array; readonly sumOfSquares: number; readonly converged: boolean }
    | undefined;
  for (const start of starts) {
    const found = dampedLeastSquares(projected, start, rows, solverOptions);
    if (best === undefined || found.sumOfSquares < best.sumOfSquares) best = found;
  }
  return assembled(model, given, best?.parameters ?? new Float64Array(size), best?.converged ?? false);
}

function priorRows({ exponent, exponentAt }: FitModel): number {
  return exponent.kind === "prior" && exponentAt >= 0 ? 1 : 0;
}

/** Weighted residuals ½·ln S − y and their slopes with the weighted mean taken off. */
function projection(model: FitModel, { x, y, weight }: FitPoints) {
  const size = model.parameters.length;
  const count = x.length;
  const slopes = new Float64Array(size);
  let square = 0;
  for (let i = 0; i < count; i += 1) square += (weight[i] as number) ** 2;
  const means = new Float64Array(size);
  return (parameters: Float64Array, residuals: Float64Array, jacobian: Float64Array): void => {
    means.fill(0);
    let mean = 0;
    for (let i = 0; i < count; i += 1) {
      const w = weight[i] as number;
      const share = (w * w) / square;
      const value = 0.5 * model.shapeAt(x[i] as number, parameters, slopes) - (y[i] as number);
      residuals[i] = value;
      mean += share * value;
      for (let p = 0; p < size; p += 1) {
        const slope = 0.5 * (slopes[p] as number);
        jacobian[i * size + p] = slope;
        means[p] = (means[p] as number) + share * slope;
      }
    }
    for (let i = 0; i < count; i += 1) {
      const w = weight[i] as number;
      residuals[i] = w * ((residuals[i] as number) - mean);
      for (let p = 0; p < size; p += 1)
        jacobian[i * size + p] = w * ((jacobian[i * size + p] as number) - (means[p] as number));
    }
    if (model.exponent.kind !== "prior" || model.exponentAt < 0) return;
    const { mean: expected, standardUncertainty } = model.exponent;
    residuals[count] = ((parameters[model.exponentAt] as number) - expected) / standardUncertainty;
    for (let p = 0; p < size; p += 1) jacobian[count * size + p] = p === model.exponentAt ? 1 / standardUncertainty : 0;
  };
}

/** Scale, residuals and the covariance of all parameters at a solution. */
function assembled(
  model: FitModel,
  { x, y, weight }: FitPoints,
  parameters: Float64Array,
  converged: boolean,
): RefinedFit {
  const size = model.parameters.length;
  const count = x.length;
  const slopes = new Float64Array(size);
  const shape = x.map((at) => model.shapeAt(at, parameters, slopes));
  let square = 0;
  let sum = 0;
  for (let i = 0; i < count; i += 1) {
    const w2 = (weight[i] as number) ** 2;
    square += w2;
    sum += w2 * ((y[i] as number) - 0.5 * (shape[i] as number));
  }
  const scale = (2 * sum) / square;
  const residuals = y.map((value, i) => value - 0.5 * ((shape[i] as number) + scale));
  let chiSquare = 0;
  for (let i = 0; i < count; i += 1) chiSquare += ((weight[i] as number) * (residuals[i] as number)) ** 2;
  const prior = priorRows(model);
  const columns = size + 1;
  const matrix = new Float64Array((count + prior) * columns);
  for (let i = 0; i < count; i += 1) {
    model.shapeAt(x[i] as number, parameters, slopes);
    matrix[i * columns] = 0.5 * (weight[i] as number);
    for (let p = 0; p < size; p += 1) matrix[i * columns + p + 1] = 0.5 * (weight[i] as number) * (slopes[p] as number);
  }
  if (prior === 1 && model.exponent.kind === "prior") {
    const { mean, standardUncertainty } = model.exponent;
    chiSquare += (((parameters[model.exponentAt] as number) - mean) / standardUncertainty) ** 2;
    matrix[count * columns + model.exponentAt + 1] = 1 / standardUncertainty;
  }
  const inverse = linearLeastSquares(matrix, new Float64Array(count + prior), columns)?.inverse;
  const covariance =
    inverse === undefined
      ? undefined
      : Array.from({ length: columns }, (_, row) => Array.from(inverse.subarray(row * columns, (row + 1) * columns)));
  return { model, scale, parameters, chiSquare, degrees: count + prior - columns, covariance, residuals, converged };
}
