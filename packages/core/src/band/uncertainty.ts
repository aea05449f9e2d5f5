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
  const rule = ruleFor(
    spectrum,
    weighting,
    band,
    groups.flatMap((group) => [...group.knots]),
  );
  const power = new Float64Array(rule.nodes.length);
  productOf(spectrum, weighting)(rule.nodes, power);
  let total = 0;
  for (let k = 0; k < power.length; k += 1) {
    power[k] = (power[k] as number) * (rule.weights[k] as number);
    total += power[k] as number;
  }
  return Object.freeze(
    groups.map((group) =>
      Object.freeze({ name: group.name, relative: total === 0 ? 0 : uncertaintyOf(group, rule.nodes, power, total) }),
    ),
  );
}

function uncertaintyOf(group: Sensitivity, nodes: Float64Array, power: Float64Array, total: number): number {
  const response = new Float64Array(group.count);
  for (let k = 0; k < nodes.length; k += 1) {
    const weight = power[k] as number;
    group.gradientAt(nodes[k] as number, (parameter, slope) => {
      response[parameter] = (response[parameter] as number) + slope * weight;
    });
  }
  return (0.5 * Math.sqrt(Math.max(varianceOf(group.covariance, response), 0))) / total;
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
