import { compensatedSum } from "./compensated-sum.js";
import { gaussWeights, kronrodCount, kronrodNodes, kronrodWeights } from "./gauss-kronrod.js";
import { logRatio } from "./power-law-integral.js";

/** Fills `values` with the integrand at every node of one panel: one call a panel, nothing allocated inside. */
export type PanelFunction = (nodes: Float64Array, values: Float64Array) => void;

export interface AdaptiveOptions {
  /** Aim for the discretisation error, relative to the integral. */
  readonly relativeTolerance: number;
  /** Halvings after which the driver stops and says so. */
  readonly mostHalvings: number;
}

export const adaptiveDefaults: AdaptiveOptions = Object.freeze({ relativeTolerance: 1e-13, mostHalvings: 4000 });

/** An integral with a bound on its absolute error; `converged` is false when the tolerance was not reached. */
export interface Integral {
  readonly value: number;
  readonly error: number;
  readonly converged: boolean;
  readonly evaluations: number;
}

/** A quadrature rule: ∫ g · (what was folded in) dx ≈ Σ weights · g(nodes), nodes ascending by panel. */
export interface QuadratureRule {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
}

interface Panel {
  readonly from: number;
  readonly to: number;
  readonly value: number;
  /** |Kronrod − Gauss|. */
  readonly difference: number;
  /** Discretisation error that further halving can reduce. */
  readonly reducible: number;
  /** Rounding of the nodes and values, which halving cannot. */
  readonly floor: number;
}

/**
 * ∫ integrand dx between the first and the last of ascending positive finite `edges`, by adaptive Gauss–Kronrod panels in
 * ln x. The inner edges are where the integrand bends. Tolerance is relative only: power densities live at 1e-18.
 *
 * The error is the discretisation estimate plus a rounding floor: 12 ulp of ∫|integrand| and 4 ulp of its total variation
 * in ln x, since a node is right to an ulp and a steep integrand turns that into more (a band of relative width 1e-4 at
 * the zero of a gain has a condition of 1e4).
 */
export function integrateAdaptive(
  integrand: PanelFunction,
  edges: readonly number[],
  options: Partial<AdaptiveOptions> = {},
): Integral {
  const { panels, converged, evaluations } = refine(integrand, edges, { ...adaptiveDefaults, ...options });
  const value = compensatedSum(panels.map((panel) => panel.value));
  const error = compensatedSum(panels.map((panel) => panel.reducible + panel.floor));
  return { value, error, converged, evaluations };
}

/**
 * The rule on which {@link integrateAdaptive} settles for an integrand: use it for other integrands that are as smooth on
 * the same panels. The weights contain dx only.
 */
export function adaptiveRule(
  integrand: PanelFunction,
  edges: readonly number[],
  options: Partial<AdaptiveOptions> = {},
): QuadratureRule {
  const { panels } = refine(integrand, edges, { ...adaptiveDefaults, ...options });
  const ascending = panels.toSorted((one, other) => one.from - other.from);
  const nodes = new Float64Array(ascending.length * kronrodCount);
  const weights = new Float64Array(nodes.length);
  for (const [index, panel] of ascending.entries()) {
    const offset = index * kronrodCount;
    const width = placeNodes(panel.from, panel.to, nodes.subarray(offset, offset + kronrodCount));
    for (let k = 0; k < kronrodCount; k += 1)
      weights[offset + k] = 0.5 * width * (kronrodWeights[k] as number) * (nodes[offset + k] as number);
  }
  return { nodes, weights };
}

function refine(
  integrand: PanelFunction,
  edges: readonly number[],
  { relativeTolerance, mostHalvings }: AdaptiveOptions,
): { readonly panels: Panel[]; readonly converged: boolean; readonly evaluations: number } {
  const nodes = new Float64Array(kronrodCount);
  const values = new Float64Array(kronrodCount);
  const panels: Panel[] = [];
  let evaluations = 0;
  const measure = (from: number, to: number, parent?: Panel): Panel => {
    evaluations += kronrodCount;
    return measurePanel(integrand, [from, to], parent, nodes, values);
  };
  for (let index = 1; index < edges.length; index += 1) {
    const from = edges[index - 1] as number;
    const to = edges[index] as number;
    if (to > from) panels.push(measure(from, to));
  }
  const first = panels.length;
  for (;;) {
    let total = 0;
    let reducible = 0;
    let worst = -1;
    for (const [index, panel] of panels.entries()) {
      total += panel.value;
      reducible += panel.reducible;
      const worstSoFar = worst < 0 ? 0 : (panels[worst] as Panel).reducible;
      if (panel.reducible > worstSoFar && panel.reducible > 0.1 * panel.floor) worst = index;
    }
    const goal = relativeTolerance * Math.abs(total);
    // Where rounding rules every panel, halving gains nothing: the tolerance is out of reach and the bound says so.
    if (reducible <= goal || worst < 0) return { panels, converged: true, evaluations };
    const panel = panels[worst] as Panel;
    const middle = Math.sqrt(panel.from) * Math.sqrt(panel.to);
    if (panels.length - first >= mostHalvings || !(middle > panel.from && middle < panel.to))
      return { panels, converged: false, evaluations };
    panels[worst] = measure(panel.from, middle, panel);
    panels.push(measure(middle, panel.to, panel));
  }
}

/** Puts the nodes on [from, to] evenly in ln x, counted from the lower edge so that narrow panels keep their digits. */
function placeNodes(from: number, to: number, nodes: Float64Array): number {
  const width = logRatio(from, to);
  for (let k = 0; k < kronrodCount; k += 1)
    nodes[k] = from + from * Math.expm1(0.5 * width * (1 + (kronrodNodes[k] as number)));
  return width;
}

function measurePanel(
  integrand: PanelFunction,
  [from, to]: readonly [number, number],
  parent: Panel | undefined,
  nodes: Float64Array,
  values: Float64Array,
): Panel {
  const half = 0.5 * placeNodes(from, to, nodes);
  integrand(nodes, values);
  let kronrod = 0;
  let gauss = 0;
  let size = 0;
  let variation = 0;
  let before = 0;
  for (let k = 0; k < kronrodCount; k += 1) {
    const value = (values[k] as number) * (nodes[k] as number);
    values[k] = value;
    kronrod += (kronrodWeights[k] as number) * value;
    gauss += (gaussWeights[k] as number) * value;
    size += (kronrodWeights[k] as number) * Math.abs(value);
    if (k > 0) variation += Math.abs(value - before);
    before = value;
  }
  const mean = 0.5 * kronrod;
  let spread = 0;
  for (let k = 0; k < kronrodCount; k += 1)
    spread += (kronrodWeights[k] as number) * Math.abs((values[k] as number) - mean);
  const difference = half * Math.abs(kronrod - gauss);
  const floor = Number.EPSILON * (12 * half * size + 4 * variation);
  const rough = parent !== undefined && difference > floor && difference > 1e-3 * parent.difference;
  return {
    from,
    to,
    value: half * kronrod,
    difference,
    reducible: rough ? 4 * difference : discretisationError(difference, half * spread),
    floor,
  };
}

/**
 * The scaling of QUADPACK, (200·δ/spread)^1.5, describes smooth integrands; a twentieth of δ = |K − G| is kept as a lower
 * limit, so that a first panel is not believed to be better than its two rules together can show.
 */
function discretisationError(difference: number, spread: number): number {
  if (difference === 0 || spread === 0) return difference;
  const ratio = (200 * difference) / spread;
  const scaled = spread * ratio * Math.sqrt(ratio);
  return Math.min(difference, Math.max(scaled, 0.05 * difference));
}
