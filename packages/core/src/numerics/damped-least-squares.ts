import { arrayBlock } from "./array-block.js";
import { backSubstitute, inverseOfSquare, triangularise } from "./householder.js";

/** Residuals and their Jacobian (row by row) at some parameters; both arrays are the solver's and are overwritten. */
export type ResidualFunction = (parameters: Float64Array, residuals: Float64Array, jacobian: Float64Array) => void;

export interface DampedOptions {
  /** Damping of the first step, relative to the columns' squares: small where the start is good. */
  readonly damping: number;
  /** Stops when a step changes every parameter by less than this, relative to its size (or to 1e-30). */
  readonly stepTolerance: number;
  /** Stops when a step of little damping promises to lower the sum of squares by less than this share of it. */
  readonly gainTolerance: number;
  readonly mostSteps: number;
  /** A step that lowers the sum of squares by less than this share has stalled. */
  readonly stallTolerance: number;
  /** Stops after so many stalled steps in a row. */
  readonly mostStalled: number;
  /** Undamped steps at the end, as long as each is shorter than the last: the digits that sums of squares do not show. */
  readonly polish: boolean;
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
  damping: 100,
  stepTolerance: 1e-11,
  gainTolerance: 0,
  mostSteps: 1000,
  stallTolerance: 2e-16,
  mostStalled: 300,
  polish: true,
});

/** What one search works in; nothing is allocated from step to step. */
interface Workspace {
  readonly rows: number;
  readonly size: number;
  readonly residualsAt: ResidualFunction;
  residuals: Float64Array;
  jacobian: Float64Array;
  trialResiduals: Float64Array;
  trialJacobian: Float64Array;
  /** J reduced to its triangle, with the residuals reflected along. */
  readonly reduced: Float64Array;
  readonly reflected: Float64Array;
  readonly diagonal: Float64Array;
  /** The triangle over the damping, reduced once more. */
  readonly stacked: Float64Array;
  readonly right: Float64Array;
  readonly stackedDiagonal: Float64Array;
  readonly scale: Float64Array;
  readonly step: Float64Array;
}

/**
 * Least squares by Levenberg's and Marquardt's damped steps with column scaling and Nielsen's rule for the damping (Madsen,
 * Nielsen, Tingleff, 2004). Each iterate reduces J once by Householder's reflections, and every damped step is a small
 * triangular system of its own; normal equations, which square the condition, never appear. Relative stopping rules only:
 * densities live at 1e-9.
 */
export function dampedLeastSquares(
  residualsAt: ResidualFunction,
  start: ArrayLike<number>,
  count: number,
  options: Partial<DampedOptions> = {},
): DampedResult {
  const rules = { ...dampedDefaults, ...options };
  const work = workspace(residualsAt, start.length, count);
  const { parameters: found, converged, steps } = descend(work, start, rules);
  const parameters = converged && rules.polish ? polished(work, found) : found;
  const full = reduce(work);
  return {
    parameters,
    sumOfSquares: squared(work.residuals),
    converged,
    steps,
    inverse: full ? inverseOfSquare(work.reduced, work.diagonal) : undefined,
  };
}

function descend(
  work: Workspace,
  start: ArrayLike<number>,
  rules: DampedOptions,
): Pick<DampedResult, "parameters" | "converged" | "steps"> {
  let parameters: Float64Array = Float64Array.from(start);
  let trial: Float64Array = new Float64Array(work.size);
  let best = evaluate(work, parameters);
  let { damping } = rules;
  let growth = 2;
  let stalled = 0;
  let converged = false;
  let steps = 0;
  reduce(work);
  for (; steps < rules.mostSteps && !converged; steps += 1) {
    const promised = dampedStep(work, damping);
    if (promised === undefined) break;
    const small = move(parameters, work.step, trial, rules.stepTolerance);
    if (damping < 1 && promised <= rules.gainTolerance * best) return { parameters, converged: true, steps };
    const found = evaluateTrial(work, trial);
    if (found <= best) {
      const gain = best - found;
      const ratio = promised > 0 ? gain / promised : 1;
      damping *= Math.max(1 / 3, 1 - (2 * ratio - 1) ** 3);
      growth = 2;
      [parameters, trial] = [trial, parameters];
      best = found;
      accept(work);
      reduce(work);
      stalled = gain <= rules.stallTolerance * best ? stalled + 1 : 0;
      // a small step counts only where damping is not what makes it small
      converged = best === 0 || (small && damping < 1) || stalled >= rules.mostStalled;
    } else {
      converged = nothingLower(damping, small, promised <= roundedGain * best && rules.gainTolerance > 0);
      damping *= growth;
      growth *= 2;
    }
  }
  return { parameters, converged, steps };
}

/** After a step that lowered nothing: whether there is nothing lower in any direction, to the last digit. */
function nothingLower(damping: number, small: boolean, lost: boolean): boolean {
  return damping < 1 ? small || lost : small && damping > 1e8;
}

/** A promised gain below this share of the sum of squares is lost in its rounding. */
const roundedGain = 1e-13;

/** trial = parameters + step; says whether every shift is small beside its parameter. */
function move(parameters: Float64Array, step: Float64Array, trial: Float64Array, tolerance: number): boolean {
  let small = true;
  for (let p = 0; p < step.length; p += 1) {
    const [from, shift] = [parameters[p] as number, step[p] as number];
    trial[p] = from + shift;
    small &&= Math.abs(shift) <= tolerance * Math.max(Math.abs(from), 1e-30);
  }
  return small;
}

function workspace(residualsAt: ResidualFunction, size: number, rows: number): Workspace {
  const cells = rows * size;
  const [residuals, trialResiduals, reflected, jacobian, trialJacobian, reduced, stacked, right] = arrayBlock([
    rows,
    rows,
    rows,
    cells,
    cells,
    cells,
    2 * size * size,
    2 * size,
  ]);
  return {
    rows,
    size,
    residualsAt,
    residuals,
    jacobian,
    trialResiduals,
    trialJacobian,
    reduced,
    reflected,
    diagonal: new Float64Array(size),
    stacked,
    right,
    stackedDiagonal: new Float64Array(size),
    scale: new Float64Array(size),
    step: new Float64Array(size),
  };
}

function evaluate(work: Workspace, parameters: Float64Array): number {
  work.residualsAt(parameters, work.residuals, work.jacobian);
  return squared(work.residuals);
}

function evaluateTrial(work: Workspace, parameters: Float64Array): number {
  work.residualsAt(parameters, work.trialResiduals, work.trialJacobian);
  return squared(work.trialResiduals);
}

function accept(work: Workspace): void {
  [work.residuals, work.trialResiduals] = [work.trialResiduals, work.residuals];
  [work.jacobian, work.trialJacobian] = [work.trialJacobian, work.jacobian];
}

/** Reduces J at the present parameters; a dependent column is left to the damping. False where there is one. */
function reduce({ jacobian, residuals, reduced, reflected, rows, size, diagonal, scale }: Workspace): boolean {
  for (let p = 0; p < size; p += 1) {
    let sum = 0;
    for (let index = p; index < jacobian.length; index += size) sum += (jacobian[index] as number) ** 2;
    scale[p] = Math.max(scale[p] as number, Math.sqrt(sum));
  }
  reduced.set(jacobian);
  for (let row = 0; row < rows; row += 1) reflected[row] = -(residuals[row] as number);
  return triangularise(reduced, reflected, rows, diagonal);
}

/**
 * min |J·step + r|² + damping·|scale·step|² into `step`; returns by how much the linear model lowers Σr². Undefined where
 * there is no such step.
 */
function dampedStep(work: Workspace, damping: number): number | undefined {
  const { size, reduced, reflected, diagonal, stacked, right, stackedDiagonal, scale, step } = work;
  const root = Math.sqrt(damping);
  for (let r = 0; r < size; r += 1) {
    right[r] = reflected[r] as number;
    right[size + r] = 0;
    for (let c = 0; c < size; c += 1) {
      stacked[r * size + c] = c > r ? (reduced[r * size + c] as number) : c === r ? (diagonal[r] as number) : 0;
      stacked[(size + r) * size + c] = c === r ? root * ((scale[r] as number) || 1) : 0;
    }
  }
  if (!triangularise(stacked, right, 2 * size, stackedDiagonal)) return undefined;
  backSubstitute(stacked, stackedDiagonal, right, step);
  let promised = 0;
  for (let r = 0; r < size; r += 1) {
    const before = reflected[r] as number;
    let moved = (diagonal[r] as number) * (step[r] as number);
    for (let c = r + 1; c < size; c += 1) moved += (reduced[r * size + c] as number) * (step[c] as number);
    promised += moved * (2 * before - moved);
  }
  return promised;
}

/** Comparing sums of squares finds a minimum to half the digits only. Plain Gauss–Newton steps from there find the rest. */
function polished(work: Workspace, start: Float64Array): Float64Array {
  let parameters = start;
  let shortest = Number.POSITIVE_INFINITY;
  for (let count = 0; count < 40; count += 1) {
    evaluate(work, parameters);
    if (!reduce(work)) break;
    backSubstitute(work.reduced, work.diagonal, work.reflected, work.step);
    const length = Math.hypot(...work.step.map((shift, p) => shift * (work.scale[p] as number)));
    if (!(length < shortest)) break;
    shortest = length;
    parameters = parameters.map((value, p) => value + (work.step[p] as number));
  }
  evaluate(work, parameters);
  return parameters;
}

function squared(values: Float64Array): number {
  let sum = 0;
  for (let index = 0; index < values.length; index += 1) sum += (values[index] as number) ** 2;
  return sum;
}
