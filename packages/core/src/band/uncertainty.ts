import { adaptiveRule, type QuadratureRule } from "../numerics/adaptive.js";
import { shortPanelRule } from "../numerics/short-panel-rule.js";
import type { Sensitivity, Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { productOf } from "./adaptive-route.js";

/** One source of standard uncertainty of a band's rms; relative, k = 1. */
export interface UncertaintyPart {
  readonly name: string;
  readonly relative: number;
}

/**
 * Relative standard uncertainty of the rms from each group of parameters (JCGM 100, 5.2.2: u² = Σ Σ c_i c_j u_ij), with
 * c_k = d ln rms / d p_k = ½ ∫ S·|H|² · (d ln S/d p_k) df / ∫ S·|H|² df.
 *
 * The integrals share one rule, good for S·|H|² to 1e-6: an uncertainty needs no more digits.
 *
 * @param knownPower - ∫ S·|H|² df by the best route, against which the rule is checked.
 */
export function uncertaintyParts(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  band: readonly [number, number],
  knownPower: number,
): readonly UncertaintyPart[] {
  const groups = spectrum.sensitivities ?? [];
  if (groups.length === 0) return [];
  const responses = groupResponses(spectrum, weighting, band, { groups, knownPower });
  return Object.freeze(
    groups.map(({ name, covariance }, index) => {
      const variance = varianceOf(covariance, responses[index] as Float64Array);
      return Object.freeze({ name, relative: Math.sqrt(Math.max(variance, 0)) });
    }),
  );
}

/** d ln rms / d parameter over a band, for every parameter of each group. */
export function groupResponses(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  band: readonly [number, number],
  { groups, knownPower }: { readonly groups: readonly Sensitivity[]; readonly knownPower: number },
): Float64Array[] {
  const responses = groups.map((group) => new Float64Array(group.count));
  if (knownPower === 0) return responses;
  const edges = edgesBetween(spectrum, groups, weighting, band);
  let { nodes, shares, total } = measured(shortPanelRule(edges), spectrum, weighting);
  if (!(Math.abs(total / knownPower - 1) <= goodEnough))
    ({ nodes, shares, total } = measured(adapted(edges, spectrum, weighting), spectrum, weighting));
  for (const [index, group] of groups.entries()) {
    const response = responses[index] as Float64Array;
    let share = 0;
    const add = (parameter: number, slope: number): void => {
      response[parameter] = (response[parameter] as number) + slope * share;
    };
    for (let k = 0; k < nodes.length; k += 1) {
      share = (0.5 * (shares[k] as number)) / total;
      if (share > 0) group.gradientAt(nodes[k] as number, add);
    }
  }
  return responses;
}

/** Relative error of the power up to which a rule will do for an uncertainty. */
const goodEnough = 1e-6;

interface MeasuredRule {
  readonly nodes: Float64Array;
  /** What each node adds to the power. */
  readonly shares: Float64Array;
  readonly total: number;
}

function measured(
  { nodes, weights }: QuadratureRule,
  spectrum: Spectrum,
  weighting: Weighting | undefined,
): MeasuredRule {
  const shares = new Float64Array(nodes.length);
  productOf(spectrum, weighting)(nodes, shares);
  let total = 0;
  for (let k = 0; k < shares.length; k += 1) {
    shares[k] = (shares[k] as number) * (weights[k] as number);
    total += shares[k] as number;
  }
  return { nodes, shares, total };
}

/** For peaks and lobes between the knots, where a fixed rule misses the power. */
function adapted(edges: readonly number[], spectrum: Spectrum, weighting: Weighting | undefined): QuadratureRule {
  return adaptiveRule(productOf(spectrum, weighting), edges, { relativeTolerance: goodEnough, mostHalvings: 400 });
}

function varianceOf(covariance: Sensitivity["covariance"], response: Float64Array): number {
  let variance = 0;
  if ("variances" in covariance) {
    for (const [index, own] of covariance.variances.entries()) variance += own * (response[index] as number) ** 2;
    return variance;
  }
  for (const [row, values] of covariance.matrix.entries())
    for (const [column, value] of values.entries())
      variance += value * (response[row] as number) * (response[column] as number);
  return variance;
}

/** Everything that bends, and finite ends: beyond 1e8 times the outermost bend nothing is left that an uncertainty sees. */
function edgesBetween(
  spectrum: Spectrum,
  groups: readonly Sensitivity[],
  weighting: Weighting | undefined,
  [fromHz, toHz]: readonly [number, number],
): readonly number[] {
  const inside = new Set<number>();
  for (const { knots } of [spectrum, ...(weighting === undefined ? [] : [weighting]), ...groups])
    for (const hz of knots) if (hz > fromHz && hz < toHz) inside.add(hz);
  const knots = Float64Array.from(inside).toSorted();
  const outermost = [knots[0], knots.at(-1), fromHz, toHz].filter(
    (hz): hz is number => hz !== undefined && hz > 0 && hz < Number.POSITIVE_INFINITY,
  );
  const low = fromHz === 0 ? Math.min(...outermost) * 1e-8 : fromHz;
  const high = toHz === Number.POSITIVE_INFINITY ? Math.max(...outermost) * 1e8 : toHz;
  return [low, ...knots, high];
}
