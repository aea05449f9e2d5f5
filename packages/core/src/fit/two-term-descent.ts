import type { FitModel } from "./fit-model.js";
import type { FitPoints } from "./fit-points.js";

/** Where a search ended. */
export interface Found {
  readonly parameters: Float64Array;
  /** Σ of squares of weighted residuals, the prior among them. */
  readonly sumOfSquares: number;
  readonly converged: boolean;
  /** Covariance of the parameters without the scale, row by row; undefined where they are not all fixed. */
  readonly inverse: Float64Array | undefined;
}

/** What one pass over the points adds up: χ², its half gradient and JᵀJ by corner and exponent, the scale eliminated. */
interface Sums {
  chi: number;
  corner: number;
  exponent: number;
  cornerCorner: number;
  cornerExponent: number;
  exponentExponent: number;
  /** Mean of what the shape leaves: the eliminated scale. */
  offset: number;
}

/** Where a pass looks: ln corner, exponent, and the scale that was best at the last place. */
interface Place {
  readonly corner: number;
  readonly exponent: number;
  readonly offset: number;
}

const mostSteps = 300;
/** A step that promises less than this share of χ² is none: its own rounding is as large. */
const gainTolerance = 1e-13;
/** Share of the product of the diagonal under which the determinant says that corner and exponent cannot be told apart. */
const leastDeterminant = 1e-12;

/**
 * Damped least squares of ln(1 + (f_c/f)^a) alone, for the model of nearly every fit: one pass over the points makes a step,
 * nothing is stored, and two parameters need no more than a determinant. Normal equations do here, since the steps correct
 * themselves and the last digits come from the gradient; everything else goes through `dampedLeastSquares`.
 */
export function twoTermDescent(model: FitModel, points: FitPoints, start: ArrayLike<number>): Found {
  const own = model.exponentAt >= 0;
  const evaluate = passOver(model, points);
  let corner = start[0] as number;
  let exponent = exponentOf(model, start);
  let [here, there] = [emptySums(), emptySums()];
  evaluate(corner, exponent, 0, here);
  let [damping, growth] = [1e-3, 2];
  let converged = here.chi === 0;
  for (let step = 0; step < mostSteps && !converged && growth < 1e30; step += 1) {
    const { byCorner, byExponent, promised } = stepFrom(here, damping, own);
    if (Number.isNaN(promised)) {
      damping *= growth;
      growth *= 2;
      continue;
    }
    const still = Math.abs(byCorner) <= 1e-15 * Math.abs(corner) && Math.abs(byExponent) <= 1e-15 * Math.abs(exponent);
    converged = damping < 1 && (promised <= gainTolerance * here.chi || still);
    if (converged) break;
    evaluate(corner + byCorner, exponent + byExponent, here.offset, there);
    if (there.chi <= here.chi) {
      damping *= Math.max(0.1, 1 - (2 * ((here.chi - there.chi) / promised) - 1) ** 3);
      growth = 2;
      [corner, exponent] = [corner + byCorner, exponent + byExponent];
      [here, there] = [there, here];
      converged = here.chi === 0;
    } else {
      converged = damping < 1 && promised <= 10 * gainTolerance * here.chi;
      damping *= growth;
      growth *= 2;
    }
  }
  return {
    parameters: own ? Float64Array.of(corner, exponent) : Float64Array.of(corner),
    sumOfSquares: here.chi,
    converged,
    inverse: inverseOf(here, own),
  };
}

function exponentOf({ exponent, exponentAt }: FitModel, start: ArrayLike<number>): number {
  if (exponentAt >= 0) return start[exponentAt] as number;
  return exponent.kind === "fixed" ? exponent.value : 1;
}

/** One pass: what the points add up to at a corner and an exponent, and what a prior adds. */
function passOver({ exponent: known, exponentAt }: FitModel, points: FitPoints) {
  return (corner: number, exponent: number, offset: number, sums: Sums): void => {
    addUp(points, { corner, exponent, offset }, sums);
    if (known.kind !== "prior" || exponentAt < 0) return;
    const off = (exponent - known.mean) / known.standardUncertainty;
    sums.chi += off * off;
    sums.exponent += off / known.standardUncertainty;
    sums.exponentExponent += 1 / known.standardUncertainty ** 2;
  };
}

/** The damped step, and by how much the linear model lowers χ²; that is NaN where there is no such step. */
function stepFrom(
  sums: Sums,
  damping: number,
  own: boolean,
): { readonly byCorner: number; readonly byExponent: number; readonly promised: number } {
  const { corner: g, cornerCorner: h } = sums;
  if (!own) {
    const byCorner = -g / (h * (1 + damping));
    const promised = h > 0 ? -byCorner * (2 * g + h * byCorner) : Number.NaN;
    return { byCorner, byExponent: 0, promised };
  }
  const { exponent: q, cornerExponent: m, exponentExponent: k } = sums;
  const [dh, dk] = [h * (1 + damping), k * (1 + damping)];
  const determinant = dh * dk - m * m;
  const byCorner = (m * q - dk * g) / determinant;
  const byExponent = (m * g - dh * q) / determinant;
  const lowered = -(
    2 * (g * byCorner + q * byExponent) +
    h * byCorner ** 2 +
    2 * m * byCorner * byExponent +
    k * byExponent ** 2
  );
  const possible = determinant > 0 && Number.isFinite(byCorner) && Number.isFinite(byExponent);
  return { byCorner, byExponent, promised: possible ? lowered : Number.NaN };
}

function emptySums(): Sums {
  return { chi: 0, corner: 0, exponent: 0, cornerCorner: 0, cornerExponent: 0, exponentExponent: 0, offset: 0 };
}

/** Sums of residuals, slopes and their products by weight, what their means make of them taken off. */
function addUp({ x, y, weight }: FitPoints, at: Place, sums: Sums): void {
  const { corner, exponent, offset } = at;
  let [w, r, j, k, rr, rj, rk, jj, jk, kk] = [0, 0, 0, 0, 0, 0, 0, 0, 0, 0];
  for (let i = 0; i < x.length; i += 1) {
    const distance = corner - (x[i] as number);
    const z = exponent * distance;
    const smaller = Math.exp(z > 0 ? -z : z);
    const part = (z > 0 ? 0.5 : 0.5 * smaller) / (1 + smaller);
    const square = (weight[i] as number) * (weight[i] as number);
    // about the last offset, so that nothing cancels near the end
    const residual = 0.5 * (Math.max(z, 0) + Math.log1p(smaller)) - (y[i] as number) + offset;
    const byCorner = exponent * part;
    const byExponent = distance * part;
    const wr = square * residual;
    const wj = square * byCorner;
    const wk = square * byExponent;
    w += square;
    r += wr;
    j += wj;
    k += wk;
    rr += wr * residual;
    rj += wr * byCorner;
    rk += wr * byExponent;
    jj += wj * byCorner;
    jk += wj * byExponent;
    kk += wk * byExponent;
  }
  sums.chi = Math.max(rr - (r * r) / w, 0);
  sums.corner = rj - (r * j) / w;
  sums.exponent = rk - (r * k) / w;
  sums.cornerCorner = jj - (j * j) / w;
  sums.cornerExponent = jk - (j * k) / w;
  sums.exponentExponent = kk - (k * k) / w;
  sums.offset = offset - r / w;
}

function inverseOf({ cornerCorner, cornerExponent, exponentExponent }: Sums, own: boolean): Float64Array | undefined {
  if (!own) return cornerCorner > 0 ? Float64Array.of(1 / cornerCorner) : undefined;
  const determinant = cornerCorner * exponentExponent - cornerExponent * cornerExponent;
  if (!(determinant > leastDeterminant * cornerCorner * exponentExponent)) return undefined;
  return Float64Array.of(
    exponentExponent / determinant,
    -cornerExponent / determinant,
    -cornerExponent / determinant,
    cornerCorner / determinant,
  );
}
