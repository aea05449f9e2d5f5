import { alternatingWeights } from "./alternating-weights.js";

/** One end of a stretch. */
export interface StretchEdge {
  readonly x: number;
  /** ln x. */
  readonly ln: number;
  /** Y = x², or 1/x² where the stretch is mirrored. */
  readonly y: number;
  /** Y^s, right to two ulp. */
  readonly power: number;
  /** X^s of the integral asked for, mirrored or not. */
  readonly grown: number;
}

/** What ∫ X^(s−1)/(X + c) dX, X = x², shares between all poles: see `poleIntegral`. */
export interface PoleStretch {
  /** The s asked for. */
  readonly lead: number;
  /** At most ½: otherwise the stretch is mirrored, Y = 1/X, s → 1 − s, c → 1/c. */
  readonly s: number;
  readonly mirrored: boolean;
  /** Undefined at Y = 0. */
  readonly low: StretchEdge | undefined;
  /** Undefined at Y = ∞. */
  readonly high: StretchEdge | undefined;
  /** ∫ Y^(s+i−1) dY for i = 0, 1, … as far as they are needed. */
  readonly moments: readonly number[];
  /** For the first s + i in [−0.2, 0.8]: π/sin(πs), less 1/s where |s + i| < 0.2. */
  readonly centre: number;
}

/** Below this |s| a 1/s is taken out before it cancels. */
export const smallLead = 0.2;
/** Beyond this |s| the recursion costs more than it is worth. */
const mostReach = 16;
const weights = Float64Array.from(alternatingWeights(22), (weight, k) => (k % 2 === 0 ? weight : -weight));

/** `logWidth` is ln(to/from). Undefined for exponents so steep that the integrator is the better route. */
export function poleStretch(lead: number, from: number, to: number, logWidth: number): PoleStretch | undefined {
  if (!(Math.abs(lead) <= mostReach)) return undefined;
  const mirrored = lead > 0.5;
  const s = mirrored ? 1 - lead : lead;
  const first = from === 0 ? undefined : edgeAt(from, lead, mirrored);
  const last = to === Number.POSITIVE_INFINITY ? undefined : edgeAt(to, lead, mirrored);
  const low = mirrored ? last : first;
  const high = mirrored ? first : last;
  const moments: number[] = [];
  for (let order = s; order < smallLead; order += 1) moments.push(momentOf(order, moments.length, low, high, logWidth));
  let base = s;
  while (base < -smallLead) base += 1;
  return { lead, s, mirrored, low, high, moments, centre: centreOf(base) };
}

function edgeAt(x: number, lead: number, mirrored: boolean): StretchEdge {
  const square = x * x;
  const grown = x ** (2 * lead);
  if (!mirrored) return { x, ln: Math.log(x), y: square, power: grown, grown };
  return { x, ln: Math.log(x), y: 1 / square, power: grown / square, grown };
}

/** ∫ Y^(order−1) dY with order = s + index, relative to the end that holds most of it. */
function momentOf(
  order: number,
  index: number,
  low: StretchEdge | undefined,
  high: StretchEdge | undefined,
  logWidth: number,
): number {
  const edge = order > 0 ? high : low;
  if (edge === undefined) return Number.POSITIVE_INFINITY;
  const steep = Math.abs(order);
  const mean = steep === 0 ? 2 * logWidth : -Math.expm1(-2 * steep * logWidth) / steep;
  return edge.power * edge.y ** index * mean;
}

/** R(s) = π/sin(πs) − 1/s = 2s Σ (−1)^(k−1)/(k² − s²), whose terms are moments, so that 22 of them suffice. */
function centreOf(s: number): number {
  if (Math.abs(s) >= smallLead) return Math.PI / Math.sin(Math.PI * s);
  let sum = 0;
  for (let k = weights.length; k > 0; k -= 1) sum += (weights[k - 1] as number) / ((k - s) * (k + s));
  return 2 * s * sum;
}
