import { adaptiveRule, type QuadratureRule } from "../numerics/adaptive.js";
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
 * The integrals share one rule, adapted to S·|H|² at 1e-6: an uncertainty needs no more digits.
 */
export function uncertaintyParts(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  band: readonly [number, number],
): readonly UncertaintyPart[] {
  const groups = spectrum.sensitivities ?? [];
  if (groups.length === 0) return [];
  const responses = groupResponses(spectrum, groups, weighting, band);
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
  groups: readonly Sensitivity[],
  weighting: Weighting | undefined,
  band: readonly [number, number],
): Float64Array[] {
  const bends = groups.flatMap((group) => [...group.knots]);
  const rule = ruleFor(spectrum, weighting, band, bends);
  const power = new Float64Array(rule.nodes.length);
  productOf(spectrum, weighting)(rule.nodes, power);
  let total = 0;
  for (let k = 0; k < power.length; k += 1) {
    power[k] = (power[k] as number) * (rule.weights[k] as number);
    total += power[k] as number;
  }
  return groups.map((group) => {
    const response = new Float64Array(group.count);
    if (total === 0) return response;
    for (let k = 0; k < power.length; k += 1) {
      const share = (0.5 * (power[k] as number)) / total;
      group.gradientAt(rule.nodes[k] as number, (parameter, slope) => {
        response[parameter] = (response[parameter] as number) + slope * share;
      });
    }
    return response;
  });
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

function ruleFor(
  spectrum: Spectrum,
  weighting: Weighting | undefined,
  [fromHz, toHz]: readonly [number, number],
  bends: readonly number[],
): QuadratureRule {
  const knots = [...spectrum.knots, ...(weighting?.knots ?? []), ...bends].filter((hz) => hz > fromHz && hz < toHz);
  const finite = [fromHz, toHz, ...knots].filter((hz) => hz > 0 && hz < Number.POSITIVE_INFINITY);
  const low = fromHz === 0 ? Math.min(...finite) * 1e-8 : fromHz;
  const high = toHz === Number.POSITIVE_INFINITY ? Math.max(...finite) * 1e8 : toHz;
  const edges = [...new Set([low, ...knots, high])].toSorted((one, other) => one - other);
  return adaptiveRule(productOf(spectrum, weighting), edges, { relativeTolerance: 1e-6, mostHalvings: 400 });
}
