import { fitModel } from "./fit-model.js";
import type { FitModelName, ResolvedExponent } from "./fit-options.js";
import type { FitPoints } from "./fit-points.js";
import { type RefinedFit, refine } from "./refine.js";
import { startsFor } from "./start.js";

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
 * Finds one or two gross misreadings by leaving each point out in turn: the one without which the rest agree best, if it lies
 * far off what the rest predict. Returns their indices among the fitted points and what was expected there.
 */
export function findMisreadings(
  exponent: ResolvedExponent,
  points: FitPoints,
): readonly { readonly index: number; readonly misreading: Misreading }[] {
  const count = points.x.length;
  if (count < fewestPoints) return [];
  const names: readonly FitModelName[] = count >= 10 ? ["floorAndFlicker", "floorFlickerRise"] : ["floorAndFlicker"];
  const found: { readonly index: number; readonly misreading: Misreading }[] = [];
  const trust = new Float64Array(count).fill(1);
  while (found.length < mostMisreadings) {
    const worst = worstPoint(names, exponent, points, trust);
    if (worst === undefined) break;
    trust[worst.index] = 0;
    found.push(worst);
  }
  return found;
}

function worstPoint(
  names: readonly FitModelName[],
  exponent: ResolvedExponent,
  points: FitPoints,
  trust: Float64Array,
): { readonly index: number; readonly misreading: Misreading } | undefined {
  let best: { readonly index: number; readonly fit: RefinedFit } | undefined;
  for (const name of names) {
    const model = fitModel(name, exponent);
    const whole = refine(model, points, startsFor(model, points).slice(0, 1), trust);
    // a fit is pulled by at most two thirds of a lone misreading; nothing near that is nothing gross
    if (whole.residuals.every((value, i) => Math.abs(value) < leastFactor / 3 || trust[i] === 0)) continue;
    for (const index of suspects(whole, points, trust)) {
      const without = trust.slice();
      without[index] = 0;
      const fit = refine(
        model,
        points,
        [Array.from(whole.parameters), ...startsFor(model, points).slice(0, 1)],
        without,
      );
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

/** The points with the largest residuals: a misreading pulls the fit, but not that far. */
function suspects({ residuals }: RefinedFit, { weight }: FitPoints, trust: Float64Array): readonly number[] {
  return Array.from(residuals, (value, index) => ({ index, size: Math.abs(value) * (weight[index] as number) }))
    .filter(({ index }) => (trust[index] as number) > 0)
    .toSorted((one, other) => other.size - one.size)
    .slice(0, 5)
    .map(({ index }) => index);
}
