import { gaussLegendre, legendreInto } from "../numerics/gauss-legendre.js";
import { lobedRule } from "../numerics/lobed-rule.js";
import { sumRule } from "../numerics/sum-rule.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { LobedGain, Weighting } from "../weighting/weighting.js";
import { adaptivePower } from "./adaptive-route.js";
import { lobedFactor } from "./lobed-factor.js";
import type { RoutedPower } from "./routed-power.js";

/** From this period on a power law over one period is a polynomial of low degree. */
const firstFolded = 9;
const nodesPerPeriod = 14;
/** Periods after which a band to ∞ goes on with the mean gain. */
const farBeyond = 1e7;

/**
 * The periods of a digital filter that a band holds whole, from the ninth or the last kink of the spectrum on: one period is
 * folded into fourteen weights, and the sum over periods into sixteen terms an octave, so that a million periods cost no
 * more than a few. Says which frequencies it covered.
 */
export function periodicPower(
  spectrum: Spectrum,
  weighting: Weighting,
  lobes: LobedGain,
  rate: number,
  [startHz, toHz]: readonly [number, number],
): { readonly fromHz: number; readonly toHz: number; readonly power: RoutedPower } {
  const endless = toHz === Number.POSITIVE_INFINITY;
  const lastKink = Math.max(0, ...spectrum.knots.filter((hz) => hz < toHz));
  const first = Math.max(firstFolded, Math.ceil(lastKink / rate) + 2, Math.ceil(startHz / rate + 0.5));
  const last = endless ? first * farBeyond : Math.floor(toHz / rate - 0.5);
  const [fromHz, end] = [(first - 0.5) * rate, (last + 0.5) * rate];
  const nothing: RoutedPower = { power: 0, error: 0, status: "converged", evaluations: 0 };
  if (last < first) return { fromHz: Math.min(fromHz, toHz), toHz, power: nothing };
  const { offsets, weights, mean } = periodRule(lobes, rate, weighting.knots[0] ?? rate);
  const smoothAt = (hz: number): number => spectrum.powerDensityAt(hz) * lobes.smoothAt(hz);
  let power = 0;
  let evaluations = 0;
  for (let low = first; low <= last; low *= 2) {
    const stretch = sumRule(low, Math.min(2 * low - 1, last));
    for (const [index, period] of stretch.nodes.entries()) {
      let sum = 0;
      for (let k = 0; k < offsets.length; k += 1)
        sum += (weights[k] as number) * smoothAt(period * rate + (offsets[k] as number));
      power += sum * (stretch.weights[index] as number);
    }
    evaluations += stretch.nodes.length * offsets.length;
  }
  const folded: RoutedPower = { power, error: 2e-14 * power, status: "converged", evaluations };
  if (!endless) return { fromHz, toHz: end, power: folded };
  const level = { ...weighting, knots: [], powerGainAt: (hz: number) => mean * lobes.smoothAt(hz) };
  const beyond = adaptivePower(spectrum, level, [end, Number.POSITIVE_INFINITY], 1e-12);
  return {
    fromHz,
    toHz,
    power: {
      ...folded,
      power: power + beyond.power,
      error: folded.error + beyond.error,
      evaluations: evaluations + beyond.evaluations,
    },
  };
}

/**
 * One period, −rate/2 to rate/2, as weights on Legendre nodes: exact for polynomials of degree 13. The gain is even, so odd
 * moments vanish.
 */
function periodRule(
  lobes: LobedGain,
  rate: number,
  lowestKnot: number,
): { readonly offsets: readonly number[]; readonly weights: readonly number[]; readonly mean: number } {
  const half = 0.5 * rate;
  const start = 1e-6 * Math.min(lobes.lobeHz, rate, lowestKnot);
  const fine = lobedRule(lobedFactor(lobes), [start, half], []);
  const moments = new Float64Array(nodesPerPeriod);
  const values = new Float64Array(nodesPerPeriod);
  const add = (hz: number, weight: number): void => {
    legendreInto(values, hz / half);
    for (let n = 0; n < nodesPerPeriod; n += 2)
      moments[n] = (moments[n] as number) + 2 * weight * (values[n] as number);
  };
  // below the first node the gain is level to 1e-12 of itself, over 1e-6 of a lobe or of its first knot
  add(0.5 * start, start * lobes.coreAt(0.5 * start));
  for (let k = 0; k < fine.nodes.length; k += 1) add(fine.nodes[k] as number, fine.weights[k] as number);
  const rule = gaussLegendre(nodesPerPeriod);
  const weights = rule.nodes.map((node, index) => {
    legendreInto(values, node);
    let sum = 0;
    for (let n = 0; n < nodesPerPeriod; n += 2) sum += (n + 0.5) * (moments[n] as number) * (values[n] as number);
    return sum * (rule.weights[index] as number);
  });
  return { offsets: rule.nodes.map((node) => half * node), weights, mean: (moments[0] as number) / rate };
}
