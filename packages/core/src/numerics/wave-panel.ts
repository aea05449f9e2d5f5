import { type LegendreRule, legendreInto } from "./gauss-legendre.js";
import { sphericalBesselInto } from "./spherical-bessel.js";
import { turnsOf } from "./turns.js";

/** cosine · cos(2π·delay·x) + sine · sin(2π·delay·x). */
export interface PlainWave {
  readonly delay: number;
  readonly cosine: number;
  readonly sine: number;
}

/** A smooth envelope times a sum of waves. */
export interface WavePart {
  envelopeAt(x: number): number;
  readonly waves: readonly PlainWave[];
}

/** What a panel needs of its rule: nodes, weights, and the Legendre polynomials at the nodes, node by node. */
export interface LegendreTable {
  readonly rule: LegendreRule;
  readonly polynomials: readonly Float64Array[];
}

export function legendreTable(rule: LegendreRule): LegendreTable {
  const polynomials = rule.nodes.map((node) => {
    const values = new Float64Array(rule.nodes.length);
    legendreInto(values, node);
    return values;
  });
  return { rule, polynomials };
}

/**
 * Weights at the Legendre nodes of [from, to] for ∫ g(x)·Σ waves dx, exact for g a polynomial of degree below the number of
 * nodes, however many turns the waves make: ∫_{−1}^{1} P_n(t) e^{iωt} dt = 2 iⁿ j_n(ω) (Filon's idea with Legendre polynomials;
 * Bakhvalov, Vasil'eva 1968). Turns at the centre are reduced exactly.
 */
export function addWaveWeights(
  weights: Float64Array,
  waves: readonly PlainWave[],
  [from, to]: readonly [number, number],
  { rule, polynomials }: LegendreTable,
): void {
  const count = rule.nodes.length;
  const centre = 0.5 * (from + to);
  const half = 0.5 * (to - from);
  const moments = new Float64Array(count);
  const bessel = new Float64Array(count);
  for (const { delay, cosine, sine } of waves) {
    const [across, along] = [2 * Math.PI * turnsOf(delay, half), 2 * Math.PI * turnsOf(delay, centre)];
    sphericalBesselInto(bessel, 2 * Math.PI * delay * half, Math.sin(across), Math.cos(across));
    const [c, s] = [Math.cos(along), Math.sin(along)];
    // Re((cosine − i·sine)·e^{iφ}·iⁿ), n by quarter turns
    const even = cosine * c + sine * s;
    const odd = sine * c - cosine * s;
    const turned = [even, odd, -even, -odd];
    for (let n = 0; n < count; n += 1)
      moments[n] = (moments[n] as number) + (2 * n + 1) * (turned[n & 3] as number) * (bessel[n] as number);
  }
  for (let k = 0; k < count; k += 1) {
    const values = polynomials[k] as Float64Array;
    let sum = 0;
    for (let n = 0; n < count; n += 1) sum += (moments[n] as number) * (values[n] as number);
    weights[k] = (weights[k] as number) + half * (rule.weights[k] as number) * sum;
  }
}
