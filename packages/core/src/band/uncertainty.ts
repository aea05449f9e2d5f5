import { adaptiveRule, type QuadratureRule } from "../numerics/adaptive.js";
import { shortPanelRule } from "../numerics/short-panel-rule.js";
import type { Sensitivity, Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { productOf } from "./adaptive-route.js";
import { edgeShares, type PowerShares } from "./edge-shares.js";

/** One source of standard uncertainty of a band's rms; relative, k = 1. */
export interface UncertaintyPart {
  readonly name: string;
  readonly relative: number;
}

/**
 * Relative standard uncertainty of the rms from each group of parameters (JCGM 100, 5.2.2: u² = Σ Σ c_i c_j u_ij), with
 * c_k = d ln rms / d p_k = ½ ∫ S·|H|² · (d ln S/d p_k) df / ∫ S·|H|² df.
 *
 * Straight lines through points in a brick wall have closed forms. Else the integrals share one rule, good for S·|H|² to
 * 1e-6, since an uncertainty needs no more digits: a short fixed one where it meets the known power, an adapted one elsewhere.
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
  const straight = groups.every((group) => group.straight === true);
  const { nodes, shares, total } =
    (straight ? edgeShares(spectrum, weighting, edges) : undefined) ??
    sharesByRule(spectrum, weighting, edges, knownPower);
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

function sharesByRule(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  edges: readonly number[],
  knownPower: number,
): PowerShares {
  const short = measured(shortPanelRule(edges), spectrum, weighting);
  if (Math.abs(short.total / knownPower - 1) <= goodEnough) return short;
  return measured(adapted(edges, spectrum, weighting), spectrum, weighting);
}

function measured(
  { nodes, weights }: QuadratureRule,
  spectrum: Spectrum,
  weighting: Weighting | undefined,
): PowerShares {
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
  const lists = [spectrum.knots, weighting?.knots ?? [], ...groups.map(({ knots }) => knots)];
  const inside: number[] = [];
  for (const knots of lists) for (const hz of knots) if (hz > fromHz && hz < toHz) inside.push(hz);
  // lists that ascend are merged, not sorted
  const ascending = inside.toSorted((one, other) => one - other);
  const outermost = [ascending[0], ascending.at(-1), fromHz, toHz].filter(
    (hz): hz is number => hz !== undefined && hz > 0 && hz < Number.POSITIVE_INFINITY,
  );
  const edges = [fromHz === 0 ? Math.min(...outermost) * 1e-8 : fromHz];
  for (const hz of ascending) if (hz > (edges.at(-1) as number)) edges.push(hz);
  edges.push(toHz === Number.POSITIVE_INFINITY ? Math.max(...outermost) * 1e8 : toHz);
  return edges;
}
