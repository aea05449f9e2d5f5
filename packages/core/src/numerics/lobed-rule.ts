import { adaptiveRule } from "./adaptive.js";
import { gaussWeights, kronrodCount, kronrodWeights } from "./gauss-kronrod.js";
import { gaussLegendre } from "./gauss-legendre.js";
import { gradedPanels, type NearestPeaks } from "./graded-panels.js";
import { addWaveWeights, type LegendreTable, legendreTable, type WavePart } from "./wave-panel.js";

/** A gain with lobes: pointwise, and as envelopes times waves. */
export interface LobedFactor {
  readonly lobeWidth: number;
  readonly parts: readonly WavePart[];
  /** The envelopes peak at multiples of each of these. */
  readonly peaksEvery: readonly number[];
  valueAt(x: number): number;
}

/** Nodes and weights with the gain folded in, panel by panel, so that each panel can judge a smooth integrand. */
export interface LobedRule {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
  readonly panels: readonly RulePanel[];
}

interface RulePanel {
  readonly start: number;
  readonly count: number;
  /** Weights that pick the part of g that the rule does not resolve, to be summed against g at the nodes. */
  readonly doubt: Float64Array;
}

/** Lobes on either side of 0 and of every peak that are taken one by one: there envelope times waves would cancel. */
const lobesOneByOne = 12;
/** From this many lobes on a stretch is worth counting them. */
export const fewestLobes: number = 4 * lobesOneByOne;
const nodesPerPanel = 20;

/**
 * A rule for ∫ g(x)·gain(x) dx over [from, to], 0 < from, for any g that is smooth between the knots, with work that grows
 * with the logarithm of the number of lobes. Near 0 and near the peaks of the envelopes panels resolve each lobe; elsewhere
 * panels graded by their distance from those hold any number of lobes, and the waves are integrated exactly against Legendre
 * polynomials.
 */
export function lobedRule(
  gain: LobedFactor,
  [from, to]: readonly [number, number],
  knots: readonly number[],
  share = 0.4,
): LobedRule {
  const table = legendreTable(gaussLegendre(nodesPerPanel));
  const pieces: RulePiece[] = [];
  const peaks = peaksOf(gain);
  for (const { low, high, oneByOne } of stretchesOf(gain, from, to)) {
    if (oneByOne) pieces.push(...lobePanels(gain, [low, high], knots, peaks));
    else {
      const edges = gradedPanels([low, high], knots, peaks, share);
      for (let k = 1; k < edges.length; k += 1)
        pieces.push(wavePanel(gain, [edges[k - 1] as number, edges[k] as number], table));
    }
  }
  return joined(pieces);
}

interface RulePiece {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
  readonly doubt: Float64Array;
}

interface Stretch {
  readonly low: number;
  readonly high: number;
  readonly oneByOne: boolean;
}

/** Alternates stretches around 0 and the peaks with those between. */
function stretchesOf({ lobeWidth, peaksEvery }: LobedFactor, from: number, to: number): Stretch[] {
  const reach = lobesOneByOne * lobeWidth;
  if (to - from <= fewestLobes * lobeWidth) return [{ low: from, high: to, oneByOne: true }];
  const centres = [0];
  for (const every of peaksEvery)
    for (let k = Math.max(1, Math.floor((from - reach) / every)); k * every <= to + reach; k += 1)
      centres.push(k * every);
  const stretches: Stretch[] = [];
  let x = from;
  for (const centre of centres.toSorted((one, other) => one - other)) {
    const [begin, end] = [Math.max(centre - reach, x), Math.min(centre + reach, to)];
    if (end <= x || begin >= to) continue;
    if (begin > x) stretches.push({ low: x, high: begin, oneByOne: false });
    stretches.push({ low: begin, high: end, oneByOne: true });
    x = end;
  }
  if (x < to) stretches.push({ low: x, high: to, oneByOne: false });
  return stretches;
}

function peaksOf({ peaksEvery }: LobedFactor): NearestPeaks {
  return (x) => {
    let below = 0;
    let above = Number.POSITIVE_INFINITY;
    for (const every of peaksEvery) {
      const index = Math.floor(x / every);
      below = Math.max(below, index * every);
      above = Math.min(above, (index + 1) * every);
    }
    return [below, above];
  };
}

/** Gauss–Kronrod panels of the gain itself, one a lobe or finer; towards 0 they halve. */
function lobePanels(
  gain: LobedFactor,
  [low, high]: readonly [number, number],
  knots: readonly number[],
  peaks: NearestPeaks,
): RulePiece[] {
  const inner = knots.filter((knot) => knot > low && knot < high);
  const lobes: number[] = [];
  for (let k = Math.ceil(low / gain.lobeWidth); k * gain.lobeWidth < high; k += 1)
    if (k > 0) lobes.push(k * gain.lobeWidth);
  const halves: number[] = [];
  for (let x = gain.lobeWidth / 2; x > low; x /= 2) if (x < high) halves.push(x);
  const centres = peaks(high)[0] > low ? [peaks(high)[0]] : [];
  const edges = [...new Set([low, ...inner, ...lobes, ...halves, ...centres, high])]
    .filter((edge) => edge >= low && edge <= high)
    .toSorted((one, other) => one - other);
  const values = (nodes: Float64Array, out: Float64Array): void => {
    for (let k = 0; k < nodes.length; k += 1) out[k] = gain.valueAt(nodes[k] as number);
  };
  // each panel by itself: a steep g may put all its weight where the gain alone has little
  return edges.slice(1).flatMap((edge, index) => {
    const { nodes, weights } = adaptiveRule(values, [edges[index] as number, edge], {
      relativeTolerance: 1e-14,
      mostHalvings: 60,
    });
    const pieces: RulePiece[] = [];
    for (let start = 0; start < nodes.length; start += kronrodCount) {
      const own = nodes.slice(start, start + kronrodCount);
      const folded = weights
        .slice(start, start + kronrodCount)
        .map((weight, k) => weight * gain.valueAt(own[k] as number));
      const doubt = folded.map(
        (weight, k) => weight * (1 - (gaussWeights[k] as number) / (kronrodWeights[k] as number)),
      );
      pieces.push({ nodes: own, weights: folded, doubt });
    }
    return pieces;
  });
}

function wavePanel(gain: LobedFactor, [low, high]: readonly [number, number], table: LegendreTable): RulePiece {
  const { rule, polynomials } = table;
  const [centre, half] = [0.5 * (low + high), 0.5 * (high - low)];
  const nodes = Float64Array.from(rule.nodes, (node) => centre + half * node);
  const weights = new Float64Array(nodesPerPanel);
  const doubt = new Float64Array(nodesPerPanel);
  for (const part of gain.parts) {
    const kernel = new Float64Array(nodesPerPanel);
    addWaveWeights(kernel, part.waves, [low, high], table);
    const size = part.waves.reduce((sum, { cosine, sine }) => sum + Math.hypot(cosine, sine), 0);
    for (let k = 0; k < nodesPerPanel; k += 1) {
      const envelope = part.envelopeAt(nodes[k] as number);
      weights[k] = (weights[k] as number) + (kernel[k] as number) * envelope;
      // the highest Legendre coefficients of g·envelope tell what is left unresolved
      const top = (polynomials[k] as Float64Array)[nodesPerPanel - 1] as number;
      doubt[k] = (doubt[k] as number) + half * size * envelope * (rule.weights[k] as number) * nodesPerPanel * top;
    }
  }
  return { nodes, weights, doubt };
}

function joined(pieces: readonly RulePiece[]): LobedRule {
  const total = pieces.reduce((sum, { nodes }) => sum + nodes.length, 0);
  const nodes = new Float64Array(total);
  const weights = new Float64Array(total);
  const panels: RulePanel[] = [];
  let start = 0;
  for (const piece of pieces) {
    nodes.set(piece.nodes, start);
    weights.set(piece.weights, start);
    panels.push({ start, count: piece.nodes.length, doubt: piece.doubt });
    start += piece.nodes.length;
  }
  return { nodes, weights, panels };
}

/** The rule applied to values of g at its nodes: the integral, and what it does not resolve plus the rounding of its sums. */
export function applyLobedRule(
  { weights, panels }: LobedRule,
  values: Float64Array,
): { readonly value: number; readonly error: number } {
  let value = 0;
  let lost = 0;
  let error = 0;
  for (const { start, count, doubt } of panels) {
    let unresolved = 0;
    for (let k = 0; k < count; k += 1) {
      const part = (weights[start + k] as number) * (values[start + k] as number);
      const next = value + part;
      lost += Math.abs(value) >= Math.abs(part) ? value - next + part : part - next + value;
      value = next;
      unresolved += (doubt[k] as number) * (values[start + k] as number);
      error += 16 * Number.EPSILON * Math.abs(part);
    }
    error += Math.abs(unresolved);
  }
  return { value: value + lost, error };
}
