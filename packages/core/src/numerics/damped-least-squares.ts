import { linearLeastSquares } from "./linear-least-squares.js";

/** Residuals and their Jacobian (row by row) at some parameters; both arrays are the solver's and are overwritten. */
export type ResidualFunction = (parameters: Float64Array, residuals: Float64Array, jacobian: Float64Array) => void;

export interface DampedOptions {
  /** Stops when a step changes every parameter by less than this, relative to its size (or to 1e-30). */
  readonly stepTolerance: number;
  readonly mostSteps: number;
  /** A step that lowers the sum of squares by less than this share has stalled. */
  readonly stallTolerance: number;
  /** Stops after so many stalled steps in a row. */
  readonly mostStalled: number;
}

/** Where a fit ended. */
export interface DampedResult {
  readonly parameters: Float64Array;
  /** Half of this many squares were summed: Σ residual². */
  readonly sumOfSquares: number;
  readonly converged: boolean;
  readonly steps: number;
  /** (JᵀJ)⁻¹ at the end, row by row; undefined where J has not full rank. */
  readonly inverse: Float64Array | undefined;
}

export const dampedDefaults: DampedOptions = Object.freeze({
  stepTolerance: 1e-11,
  mostSteps: 1000,
  stallTolerance: 2e-16,
  mostStalled: 300,
});

/**
 * Least squares by Levenberg's and Marquardt's damped steps with column scaling and Nielsen's rule for the damping (Madsen,
 * Nielsen, Tingleff, 2004). Steps solve the augmented system by Householder QR, never by normal equations. Relative stopping
 * rules only: densities live at 1e-9.
 */
export function dampedLeastSquares(
  residualsAt: ResidualFunction,
  start: readonly number[],
  count: number,
  options: Partial<DampedOptions> = {},
): DampedResult {
  const { stepTolerance, mostSteps, stallTolerance, mostStalled } = { ...dampedDefaults, ...options };
  const size = start.length;
  const work = {
    residuals: new Float64Array(count),
    jacobian: new Float64Array(count * size),
    trialResiduals: new Float64Array(count),
    trialJacobian: new Float64Array(count * size),
  };
  let parameters: Float64Array = Float64Array.from(start);
  residualsAt(parameters, work.residuals, work.jacobian);
  let best = squared(work.residuals);
  const scale = new Float64Array(size);
  let damping = 100;
  let growth = 2;
  let converged = false;
  let stalled = 0;
  let steps = 0;
  for (; steps < mostSteps && !converged; steps += 1) {
    for (let p = 0; p < size; p += 1) scale[p] = Math.max(scale[p] as number, columnNorm(work.jacobian, p, size));
    const step = solveDamped(work.jacobian, work.residuals, scale, Math.sqrt(damping));
    if (step === undefined) break;
    const trial = parameters.map((value, p) => value + (step[p] as number));
    residualsAt(trial, work.trialResiduals, work.trialJacobian);
    const found = squared(work.trialResiduals);
    const small = step.every(
      (shift, p) => Math.abs(shift) <= stepTolerance * Math.max(Math.abs(parameters[p] as number), 1e-30),
    );
    const predicted = predictedGain(work.jacobian, work.residuals, step, best);
    const gain = best - found;
    if (found <= best && Number.isFinite(found)) {
      const ratio = predicted > 0 ? gain / predicted : 1;
      damping *= Math.max(1 / 3, 1 - (2 * ratio - 1) ** 3);
      growth = 2;
      parameters = trial;
      best = found;
      [work.residuals, work.trialResiduals] = [work.trialResiduals, work.residuals];
      [work.jacobian, work.trialJacobian] = [work.trialJacobian, work.jacobian];
      stalled = gain <= stallTolerance * best ? stalled + 1 : 0;
      // a small step counts only where damping is not what makes it small
      converged = best === 0 || (small && damping < 1) || stalled >= mostStalled;
    } else {
      // nothing lower in any direction, to the last digit
      converged = small && damping > 1e8;
      damping *= growth;
      growth *= 2;
    }
  }
  if (converged) parameters = polished(residualsAt, parameters, work, scale);
  residualsAt(parameters, work.residuals, work.jacobian);
  return {
    parameters,
    sumOfSquares: squared(work.residuals),
    converged,
    steps,
    inverse: inverseOfSquare(work.jacobian, size),
  };
}

/**
 * Comparing sums of squares finds a minimum to half the digits only. Plain Gauss–Newton steps from there, as long as each is
 * shorter than the last, find the rest.
 */
function polished(
  residualsAt: ResidualFunction,
  start: Float64Array,
  work: { readonly residuals: Float64Array; readonly jacobian: Float64Array },
  scale: Float64Array,
): Float64Array {
  let parameters = start;
  let shortest = Number.POSITIVE_INFINITY;
  for (let count = 0; count < 40; count += 1) {
    residualsAt(parameters, work.residuals, work.jacobian);
    const step = solveDamped(work.jacobian, work.residuals, scale, 0);
    if (step === undefined) return parameters;
    const length = Math.hypot(...step.map((shift, p) => shift * (scale[p] as number)));
    if (!(length < shortest)) return parameters;
    shortest = length;
    parameters = parameters.map((value, p) => value + (step[p] as number));
  }
  return parameters;
}

function squared(values: Float64Array): number {
  let sum = 0;
  for (const value of values) sum += value * value;
  return sum;
}

function columnNorm(matrix: Float64Array, column: number, columns: number): number {
  let sum = 0;
  for (let index = column; index < matrix.length; index += columns) sum += (matrix[index] as number) ** 2;
  return Math.sqrt(sum);
}

/** Decrease of the sum of squares that the linear model expects. */
function predictedGain(jacobian: Float64Array, residuals: Float64Array, step: Float64Array, before: number): number {
  const columns = step.length;
  let after = 0;
  for (let row = 0; row < residuals.length; row += 1) {
    let value = residuals[row] as number;
    for (let p = 0; p < columns; p += 1) value += (jacobian[row * columns + p] as number) * (step[p] as number);
    after += value * value;
  }
  return before - after;
}

/** min |J·step + r|² + |damping·scale·step|². */
function solveDamped(
  jacobian: Float64Array,
  residuals: Float64Array,
  scale: Float64Array,
  damping: number,
): Float64Array | undefined {
  const columns = scale.length;
  const rows = residuals.length + columns;
  const matrix = new Float64Array(rows * columns);
  matrix.set(jacobian);
  for (let p = 0; p < columns; p += 1)
    matrix[(residuals.length + p) * columns + p] = damping * ((scale[p] as number) || 1);
  const right = new Float64Array(rows);
  for (let row = 0; row < residuals.length; row += 1) right[row] = -(residuals[row] as number);
  return linearLeastSquares(matrix, right, columns)?.solution;
}

function inverseOfSquare(jacobian: Float64Array, columns: number): Float64Array | undefined {
  return linearLeastSquares(jacobian, new Float64Array(jacobian.length / columns), columns)?.inverse;
}
