import type { Trials } from "./choose.js";
import type { FitModelName } from "./fit-options.js";
import type { FitPoints } from "./fit-points.js";
import { type RefinedFit, refine } from "./refine.js";

/** A point that the others contradict grossly. */
export interface Misreading {
  readonly frequency: number;
  readonly density: number;
  /** Density that the other points give there. */
  readonly expectedDensity: number;
  readonly line?: number;
}

/** Fewest points among which one can be called wrong, and most that are called so. */
const fewestPoints = 8;
const mostMisreadings = 2;
/** A misreading is gross: a third off, and five standard deviations of what the other points scatter. */
const leastFactor = Math.log(1.3);
const leastDeviations = 5;

/**
 * Finds one or two gross misreadings by leaving each suspect out in turn: the one without which the rest agree best, if it
 * lies far off what the rest predict. Returns their indices among the fitted points and what was expected there.
 */
export function findMisreadings(
  trial: Trials,
  points: FitPoints,
): readonly { readonly index: number; readonly misreading: Misreading }[] {
  const count = points.x.length;
  if (count < fewestPoints) return [];
  const found: { readonly index: number; readonly misreading: Misreading }[] = [];
  const trust = new Float64Array(count).fill(1);
  while (found.length < mostMisreadings) {
    const worst = worstPoint(trial, points, trust);
    if (worst === undefined) break;
    trust[worst.index] = 0;
    found.push(worst);
  }
  return found;
}

function worstPoint(
  trial: Trials,
  points: FitPoints,
  trust: Float64Array,
): { readonly index: number; readonly misreading: Misreading } | undefined {
  const names: readonly FitModelName[] =
    points.x.length >= 10 ? ["floorAndFlicker", "floorFlickerRise"] : ["floorAndFlicker"];
  const whole = trust.every((value) => value === 1);
  let best: { readonly index: number; readonly fit: RefinedFit } | undefined;
  for (const name of names) {
    const plain = trial(name).fit;
    const fitted = whole ? plain : refine(plain.model, points, { trust, from: plain.parameters });
    const suspects = suspectsOf(fitted, points, trust);
    // what one law does not find suspicious needs no other
    if (suspects.length === 0 && best === undefined) return undefined;
    for (const index of suspects) {
      const without = trust.slice();
      without[index] = 0;
      const fit = refine(fitted.model, points, { trust: without });
      if (best === undefined || fit.chiSquare < best.fit.chiSquare) best = { index, fit };
    }
  }
  if (best === undefined) return undefined;
  const { index, fit } = best;
  const off = fit.residuals[index] as number;
  const trusted = trust.reduce((sum, value) => sum + value, 0) - 1;
  const scatter = Math.sqrt(Math.max(fit.chiSquare / Math.max(trusted - fit.model.parameters.length - 1, 1), 0.25));
  const deviations = (Math.abs(off) * (points.weight[index] as number)) / scatter;
  if (Math.abs(off) < leastFactor || deviations < leastDeviations) return undefined;
  const { frequency, density, line } = points.points[index] as (typeof points.points)[number];
  return {
    index,
    misreading: Object.freeze({
      frequency,
      density,
      expectedDensity: density * Math.exp(-off),
      ...(line !== undefined && { line }),
    }),
  };
}

/** A point whose residual, were it left out, falls short of this part of a gross error is not looked at. */
const suspicious = 0.5;
const mostSuspects = 5;

/**
 * Points that may lie a gross factor off what the others give: a point of leverage h pulls the fit by h, so left out it would
 * lie 1/(1 − h) times as far off.
 */
function suspectsOf(fit: RefinedFit, { x, weight }: FitPoints, trust: Float64Array): readonly number[] {
  const slopes = new Float64Array(fit.model.parameters.length);
  return Array.from(fit.residuals, (value, index) => {
    fit.model.shapeAt(x[index] as number, fit.parameters, slopes);
    const left = 1 - leverageOf(fit, slopes, weight[index] as number);
    return { index, size: Math.abs(value) * (weight[index] as number), off: Math.abs(value) / Math.max(left, 0.05) };
  })
    .filter(({ index, off }) => (trust[index] as number) > 0 && off > suspicious * leastFactor)
    .toSorted((one, other) => other.size - one.size)
    .slice(0, mostSuspects)
    .map(({ index }) => index);
}

/** Share of a point's own value in what the fit gives there; 0 where the points do not fix the parameters. */
function leverageOf({ covariance }: RefinedFit, slopes: Float64Array, weight: number): number {
  if (covariance === undefined) return 0;
  const along = [1, ...slopes].map((slope) => 0.5 * weight * slope);
  return along.reduce(
    (sum, one, row) =>
      sum + one * along.reduce((inner, other, column) => inner + other * (covariance[row]?.[column] ?? 0), 0),
    0,
  );
}
