import { dampedLeastSquares } from "../numerics/damped-least-squares.js";
import type { FigureReading } from "./band-figure.js";
import { type FitModel, fitModel } from "./fit-model.js";
import type { ResolvedExponent } from "./fit-options.js";

/** What stated figures give for one model. */
export interface SolvedFigures {
  readonly model: FitModel;
  readonly scale: number;
  readonly parameters: Float64Array;
  readonly chiSquare: number;
  readonly degrees: number;
  /** Covariance of scale and parameters, not widened. */
  readonly covariance: readonly (readonly number[])[] | undefined;
  /** ln of stated over predicted, figure by figure. */
  readonly residuals: readonly number[];
  /** By how much scale and parameters move when a figure's logarithm does: one row a figure, and one for the prior. */
  readonly effects: readonly (readonly number[])[];
  /** Largest share of the power that floor and 1/f part have in any figure. */
  readonly largestShares: { readonly floor: number; readonly flicker: number };
  readonly converged: boolean;
}

export type FigureModelName = "floor" | "flicker" | "floorAndFlicker";

const solverOptions = Object.freeze({ damping: 1e-3, mostSteps: 200 });

/** Corners of the grid of starts reach this far beyond the figures, in ln f. */
const beyondFigures = 5;

/**
 * Least squares of floor, corner and exponent on the logarithms of stated figures, each weighted by its own uncertainty. The
 * power of a figure is linear in floor and 1/f power, so each figure brings two integrals and no more. `logs` are the
 * figures' logarithms, which the search for what rounding leaves shifts.
 */
export function solveFigures(
  name: FigureModelName,
  exponent: ResolvedExponent,
  readings: readonly FigureReading[],
  logs: readonly number[] = readings.map(({ value }) => Math.log(value)),
): SolvedFigures {
  const model = fitModel(name, exponent);
  const prior = exponent.kind === "prior" && model.exponentAt >= 0 ? 1 : 0;
  const size = model.parameters.length + 1;
  const rows = readings.length + prior;
  const problem = { model, readings, logs, weights: readings.map(weightOf), at: centreOf(readings) };
  const residualsAt = residualsOf(problem, size);
  let best: ReturnType<typeof dampedLeastSquares> | undefined;
  for (const start of startsOf(problem)) {
    const found = dampedLeastSquares(residualsAt, start, rows, solverOptions);
    if (best === undefined || found.sumOfSquares < best.sumOfSquares) best = found;
  }
  const { parameters, sumOfSquares, converged, inverse } = best as NonNullable<typeof best>;
  const residuals = new Float64Array(rows);
  const jacobian = new Float64Array(rows * size);
  residualsAt(parameters, residuals, jacobian);
  const shares = readings.map((reading) => shareOfFlicker(problem, reading, parameters));
  return {
    model,
    scale: parameters[0] as number,
    parameters: parameters.slice(1),
    chiSquare: sumOfSquares,
    degrees: rows - size,
    covariance:
      inverse && Array.from({ length: size }, (_, r) => Array.from(inverse.subarray(r * size, (r + 1) * size))),
    residuals: problem.weights.map((weight, index) => -(residuals[index] as number) / weight),
    effects: inverse === undefined ? [] : effectsOf(inverse, jacobian, problem.weights, size),
    largestShares: { floor: Math.max(...shares.map((share) => 1 - share)), flicker: Math.max(...shares) },
    converged,
  };
}

interface Problem {
  readonly model: FitModel;
  readonly readings: readonly FigureReading[];
  readonly logs: readonly number[];
  readonly weights: readonly number[];
  /** Frequency that powers of f are taken about. */
  readonly at: number;
}

export function weightOf({ doubts }: Pick<FigureReading, "doubts">): number {
  return 1 / Math.hypot(...doubts.map(({ relative }) => relative));
}

function centreOf(readings: readonly FigureReading[]): number {
  const edges = readings.flatMap(({ span }) => span).filter((hz) => hz > 0 && hz < Number.POSITIVE_INFINITY);
  if (edges.length === 0) return 1;
  return Math.exp(edges.reduce((sum, hz) => sum + Math.log(hz), 0) / edges.length);
}

function exponentOf({ exponent, exponentAt }: FitModel, parameters: ArrayLike<number>): number {
  if (exponentAt >= 0) return parameters[exponentAt + 1] as number;
  return exponent.kind === "fixed" ? exponent.value : 1;
}

/** ln of the corner over the frequency that powers are taken about. */
function cornerOf({ model, at }: Problem, parameters: ArrayLike<number>): number {
  return (model.name === "flicker" ? 0 : (parameters[1] as number)) - Math.log(at);
}

/** ln of the 1/f part's power in a figure over e^scale. */
function flickerLogOf(problem: Problem, reading: FigureReading, parameters: ArrayLike<number>): number {
  const exponent = exponentOf(problem.model, parameters);
  return reading.flickerLog(exponent, problem.at) + exponent * cornerOf(problem, parameters);
}

function shareOfFlicker(problem: Problem, reading: FigureReading, parameters: ArrayLike<number>): number {
  if (problem.model.name === "floor") return 0;
  if (problem.model.name === "flicker") return 1;
  return 1 / (1 + Math.exp(Math.log(reading.floorPower) - flickerLogOf(problem, reading, parameters)));
}

function residualsOf(problem: Problem, size: number) {
  const { model, readings, logs, weights } = problem;
  return (parameters: Float64Array, residuals: Float64Array, jacobian: Float64Array): void => {
    jacobian.fill(0);
    for (const [index, reading] of readings.entries()) {
      const half = 0.5 * (weights[index] as number);
      const row = index * size;
      const floor = Math.log(reading.floorPower);
      jacobian[row] = half;
      let shape = floor;
      if (model.name !== "floor") {
        const log = flickerLogOf(problem, reading, parameters);
        const share = model.name === "flicker" ? 1 : 1 / (1 + Math.exp(floor - log));
        const largest = Math.max(floor, log);
        shape = model.name === "flicker" ? log : largest + Math.log1p(Math.exp(Math.min(floor, log) - largest));
        if (model.name === "floorAndFlicker") jacobian[row + 1] = half * share * exponentOf(model, parameters);
        if (model.exponentAt >= 0)
          jacobian[row + 1 + model.exponentAt] =
            half *
            share *
            (reading.flickerSlope(exponentOf(model, parameters), problem.at) + cornerOf(problem, parameters));
      }
      residuals[index] =
        half * ((parameters[0] as number) + shape) - (weights[index] as number) * (logs[index] as number);
    }
    if (model.exponent.kind !== "prior" || model.exponentAt < 0) return;
    const { mean, standardUncertainty } = model.exponent;
    residuals[readings.length] = (exponentOf(model, parameters) - mean) / standardUncertainty;
    jacobian[readings.length * size + 1 + model.exponentAt] = 1 / standardUncertainty;
  };
}

/** Starts: the exponent expected, and the corners of a grid that leave least. */
function startsOf(problem: Problem): readonly (readonly number[])[] {
  const { model, readings, logs, weights } = problem;
  const exponent = model.exponent.kind === "fixed" ? [] : [model.exponent.kind === "prior" ? model.exponent.mean : 1];
  if (model.name !== "floorAndFlicker") return [[0, ...(model.exponentAt >= 0 ? exponent : [])]];
  const edges = readings.flatMap(({ span }) => span).filter((hz) => hz > 0 && hz < Number.POSITIVE_INFINITY);
  const low = Math.log(Math.min(...edges)) - beyondFigures;
  const high = Math.log(Math.max(...edges)) + beyondFigures;
  const square = weights.reduce((sum, weight) => sum + weight * weight, 0);
  return Array.from({ length: 17 }, (_, step) => {
    const corner = low + ((high - low) * step) / 16;
    const left = readings.map((reading, index) => {
      const flicker = Math.exp(flickerLogOf(problem, reading, [0, corner, ...exponent]));
      return (logs[index] as number) - 0.5 * Math.log(reading.floorPower + flicker);
    });
    const mean = left.reduce((sum, value, index) => sum + value * (weights[index] as number) ** 2, 0) / square;
    const misfit = left.reduce((sum, value, index) => sum + ((value - mean) * (weights[index] as number)) ** 2, 0);
    return { misfit, start: [2 * mean, corner, ...exponent] };
  })
    .toSorted((one, other) => one.misfit - other.misfit)
    .slice(0, 3)
    .map(({ start }) => start);
}

/** C·Jᵀ·w: what a figure's relative error does to scale and parameters. */
function effectsOf(
  inverse: Float64Array,
  jacobian: Float64Array,
  weights: readonly number[],
  size: number,
): readonly (readonly number[])[] {
  return Array.from({ length: jacobian.length / size }, (_, row) =>
    Array.from({ length: size }, (__, p) => {
      let sum = 0;
      for (let q = 0; q < size; q += 1) sum += (inverse[p * size + q] as number) * (jacobian[row * size + q] as number);
      return sum * (weights[row] ?? 1);
    }),
  );
}
