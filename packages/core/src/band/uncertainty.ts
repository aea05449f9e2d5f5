import { adaptiveRule, type QuadratureRule } from "../numerics/adaptive.js";
import { arrayBlock } from "../numerics/array-block.js";
import { gaussLegendre } from "../numerics/gauss-legendre.js";
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
 * The integrals share one rule, good to 1e-6 of S·|H|²: an uncertainty needs no more digits. Power laws through a brick wall,
 * a table or a filter without sharp resonances take a few fixed nodes a panel, anything else an adapted rule.
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
  const width = spectrum.pieces === undefined ? 0 : smoothWidth(weighting);
  if (width > leastWidth) return fixedRule(edges, Math.min(width, widest));
  return adaptiveRule(productOf(spectrum, weighting), edges, { relativeTolerance: 1e-6, mostHalvings: 400 });
}

/** Widest and narrowest panels of a fixed rule, in ln f: below the narrowest an adapted rule is cheaper. */
const widest = 2;
const leastWidth = 0.5;
const legendre = gaussLegendre(8);

/**
 * Width of panels in ln f on which eight nodes hold 1e-6: twice the distance of the nearest pole of |H|² from the real axis
 * there, which is its angle from the imaginary axis of s. 0 where nothing is known of its poles.
 */
function smoothWidth(weighting: Weighting | undefined): number {
  if (weighting === undefined || weighting.pieces !== undefined) return Number.POSITIVE_INFINITY;
  const { rational, saturating } = weighting;
  if (saturating !== undefined) return Math.PI / saturating.order;
  if (rational === undefined) return 0;
  return 2 * Math.min(...rational.poles.map(({ re, im }) => Math.atan2(Math.abs(re), Math.abs(im))));
}

/** Gauss–Legendre in ln f between the edges, on panels no wider than told; df = f d ln f is in the weights. */
function fixedRule(edges: readonly number[], width: number): QuadratureRule {
  const logs = edges.map(Math.log);
  const counts = logs.slice(1).map((to, index) => Math.max(1, Math.ceil((to - (logs[index] as number)) / width)));
  const total = legendre.nodes.length * counts.reduce((sum, count) => sum + count, 0);
  const [nodes, weights] = arrayBlock([total, total]);
  let at = 0;
  for (const [index, count] of counts.entries()) {
    const from = logs[index] as number;
    const half = ((logs[index + 1] as number) - from) / (2 * count);
    for (let panel = 0; panel < count; panel += 1)
      for (let k = 0; k < legendre.nodes.length; k += 1) {
        const hz = Math.exp(from + half * (2 * panel + 1 + (legendre.nodes[k] as number)));
        nodes[at] = hz;
        weights[at] = half * (legendre.weights[k] as number) * hz;
        at += 1;
      }
  }
  return { nodes, weights };
}
