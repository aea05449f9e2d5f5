import { gaussLegendre, legendreInto } from "../numerics/gauss-legendre.js";
import type { PowerLawTerm } from "../numerics/power-law.js";
import { logRatio } from "../numerics/power-law-integral.js";
import type { Weighting } from "../weighting/weighting.js";
import { weightingRule } from "./weighting-rule.js";

/** Nodes a panel, and its largest width in ln f: power laws up to exponent 4 are polynomials there to 1e-14. */
const nodesPerPanel = 18;
const widestPanel = Math.log(4);

/** Steepest power law that the panels represent to 1e-13. */
export const panelExponentLimit = 4;

/** A gain as weights on equal panels in ln f. */
export interface FoldedPanels {
  readonly weights: Float64Array;
  /** ∫ level·(f/at)^−exponent · |H|² df over the panels. */
  powerOf(term: PowerLawTerm): number;
}

export function panelCountFor(low: number, high: number): number {
  return Math.max(1, Math.ceil(logRatio(low, high) / widestPanel));
}

/**
 * Folds a gain into weights at the Gauss–Legendre nodes of equal panels in ln f:
 * w_i = γ_i · Σ_n (2n+1)/2 · P_n(s_i) · ∫ |H|²·P_n(s) df, s from −1 to 1 over the panel. A power law is the same shape on
 * every panel, so a term costs one exponential a node of one panel, then multiplications.
 */
export function foldIntoPanels(
  weighting: Weighting | undefined,
  [low, high]: readonly [number, number],
  panels: number,
): FoldedPanels {
  const width = logRatio(low, high) / panels;
  const rule = gaussLegendre(nodesPerPanel);
  const weights = new Float64Array(panels * nodesPerPanel);
  const basis = new Float64Array(nodesPerPanel);
  const atNodes = rule.nodes.map((node) => {
    const values = new Float64Array(nodesPerPanel);
    legendreInto(values, node);
    return values;
  });
  for (let panel = 0; panel < panels; panel += 1) {
    const from = panel === 0 ? low : low * Math.exp(width * panel);
    const to = panel === panels - 1 ? high : low * Math.exp(width * (panel + 1));
    const fine = weightingRule(weighting, [from, to], 1e-14);
    const moments = new Float64Array(nodesPerPanel);
    for (let k = 0; k < fine.nodes.length; k += 1) {
      const along = Math.log1p(((fine.nodes[k] as number) - from) / from);
      legendreInto(basis, (2 * along) / width - 1);
      for (let n = 0; n < nodesPerPanel; n += 1)
        moments[n] = (moments[n] as number) + (fine.weights[k] as number) * (basis[n] as number);
    }
    for (const [index, values] of atNodes.entries()) {
      let sum = 0;
      for (let n = 0; n < nodesPerPanel; n += 1) sum += (n + 0.5) * (moments[n] as number) * (values[n] as number);
      weights[panel * nodesPerPanel + index] = sum * (rule.weights[index] as number);
    }
  }
  const nodeLogs = Float64Array.from(rule.nodes, (node) => 0.5 * width * (1 + node));
  const white = weights.reduce((sum, weight) => sum + weight, 0);
  return {
    weights,
    powerOf: ({ at, level, exponent }) =>
      exponent === 0 ? level * white : level * dotWithPowerLaw(weights, nodeLogs, width, Math.log(low / at), exponent),
  };
}

/** Σ w_i · (f_i/at)^−a, with the same eighteen factors on every panel and a constant factor from panel to panel. */
function dotWithPowerLaw(
  weights: Float64Array,
  nodeLogs: Float64Array,
  width: number,
  lowLog: number,
  exponent: number,
): number {
  const shape = new Float64Array(nodesPerPanel);
  for (let index = 0; index < nodesPerPanel; index += 1)
    shape[index] = Math.exp(-exponent * (nodeLogs[index] as number));
  let sum = 0;
  for (let start = 0, panel = 0; start < weights.length; start += nodesPerPanel, panel += 1) {
    let dot = 0;
    for (let index = 0; index < nodesPerPanel; index += 1)
      dot += (weights[start + index] as number) * (shape[index] as number);
    sum += dot * Math.exp(-exponent * (lowLog + width * panel));
  }
  return sum;
}
