import { OutOfDomainError } from "../ground/errors.js";
import { bracketedRoot } from "../numerics/bracketed-root.js";
import { chiSquareLimit } from "../numerics/chi-square-limit.js";
import type { FigureReading } from "./band-figure.js";
import { defaultExponent, type ResolvedExponent } from "./fit-options.js";
import { type SolvedFigures, solveFigures, weightOf } from "./solve-figures.js";

/** How far a corner can go where the figures show none. */
export interface CornerLimit {
  /** "below": the corner lies below `hz`, no 1/f part is visible; "above": no floor is. */
  readonly side: "below" | "above";
  readonly hz: number;
  /** One-sided. */
  readonly coverageProbability: 0.95;
}

/** Part of the power under which a term counts as not seen in any figure. */
const leastShare = 1e-7;
/** Normal quantile of 0.95 and its square: the one-sided 95 % limit of one parameter. */
const oneSided = 1.6448536269514722;
const rise = oneSided ** 2;
/** A corner is looked for this far beyond the figures, in ln f. */
const farAway = 60;

/** The model that nonnegative floor and 1/f power allow: both, or the one that is left when the other would be negative. */
export function nonnegativeSolution(exponent: ResolvedExponent, readings: readonly FigureReading[]): SolvedFigures {
  const both = solveFigures("floorAndFlicker", exponent, readings);
  const { floor, flicker } = both.largestShares;
  const floorOnly = solveFigures("floor", exponent, readings);
  const flickerOnly = solveFigures("flicker", exponent, readings);
  const single = floorOnly.chiSquare <= flickerOnly.chiSquare ? floorOnly : flickerOnly;
  const inside = both.converged && both.covariance !== undefined && Math.min(floor, flicker) > leastShare;
  return inside && both.chiSquare < single.chiSquare ? both : single;
}

/** Refuses figures that no floor and 1/f part reproduce within their own uncertainty, with the inequality that fails. */
export function requirePossible(
  solved: SolvedFigures,
  exponent: ResolvedExponent,
  readings: readonly FigureReading[],
): void {
  const degrees = solved.degrees;
  if (solved.model.name === "floorAndFlicker" || degrees < 1) return;
  if (solved.chiSquare <= chiSquareLimit(degrees)) return;
  const { one, other, limits, ratio, uncertainty, outside } = worstPair(expectedExponent(exponent), readings);
  if (!(outside > 0)) throw new OutOfDomainError(apartMessage(solved, readings));
  const [least, most] = limits.toSorted((a, b) => a - b);
  throw new OutOfDomainError(
    `No floor with a 1/f part gives these figures: "${other.label}" over "${one.label}" must lie between ${short(least ?? 0)} and ${short(most ?? 0)} (floor alone ${short(limits[0])}, 1/f^${short(expectedExponent(exponent))} alone ${short(limits[1])}), and it is ${short(ratio)} ± ${short(ratio * uncertainty)} (k = 1); check units, peak-to-peak factors and measurement filters.`,
  );
}

/** Where every two figures could stand, but not all of them. */
function apartMessage({ residuals, model }: SolvedFigures, readings: readonly FigureReading[]): string {
  const far = residuals.map((residual, index) => Math.abs(residual) * weightOf(readings[index] as FigureReading));
  const worst = far.indexOf(Math.max(...far));
  const off = Math.exp(Math.abs(residuals[worst] as number));
  return `No floor with a 1/f part gives these figures together: ${model.name === "floor" ? "a floor" : "a 1/f part"} comes nearest, and "${readings[worst]?.label}" is a factor ${short(off)} off, ${short(far[worst] as number)} of its standard uncertainties; check units, peak-to-peak factors and measurement filters.`;
}

/** The largest corner (or the smallest) that the figures still allow at 95 %; undefined where they allow any. */
export function cornerLimit(
  solved: SolvedFigures,
  exponent: ResolvedExponent,
  readings: readonly FigureReading[],
): CornerLimit | undefined {
  const side = solved.model.name === "floor" ? "below" : "above";
  // a free exponent fits anything at a corner far away
  const assumed: ResolvedExponent = exponent.kind === "free" ? { kind: "prior", ...defaultExponent } : exponent;
  const reference = solveFigures(solved.model.name === "floor" ? "floor" : "flicker", assumed, readings).chiSquare;
  const edges = readings.flatMap(({ span }) => span).filter((hz) => hz > 0 && hz < Number.POSITIVE_INFINITY);
  const low = Math.log(Math.min(...edges));
  const high = Math.log(Math.max(...edges));
  const excess = (corner: number): number => profile(corner, assumed, readings) - reference - rise;
  const range = side === "below" ? ([low - farAway, high] as const) : ([low, high + farAway] as const);
  const found = bracketedRoot(excess, range, 1e-10);
  return found === undefined ? undefined : Object.freeze({ side, hz: Math.exp(found.x), coverageProbability: 0.95 });
}

/** χ² at a given corner, scale and exponent at their best. */
function profile(corner: number, exponent: ResolvedExponent, readings: readonly FigureReading[]): number {
  const at = Math.exp(corner);
  const atExponent = (a: number): number => {
    const left = readings.map((reading) => {
      const flicker = Math.exp(reading.flickerLog(a, at));
      return Math.log(reading.value) - 0.5 * Math.log(reading.floorPower + flicker);
    });
    const weights = readings.map(weightOf);
    const square = weights.reduce((sum, weight) => sum + weight * weight, 0);
    const mean = left.reduce((sum, value, i) => sum + value * (weights[i] as number) ** 2, 0) / square;
    return left.reduce((sum, value, i) => sum + ((value - mean) * (weights[i] as number)) ** 2, 0);
  };
  if (exponent.kind !== "prior") return atExponent(expectedExponent(exponent));
  const { mean, standardUncertainty } = exponent;
  let best = Number.POSITIVE_INFINITY;
  // within three standard deviations of the prior: a limit needs three digits
  for (let step = -30; step <= 30; step += 1) {
    const away = step / 10;
    if (mean + away * standardUncertainty <= 0) continue;
    best = Math.min(best, atExponent(mean + away * standardUncertainty) + away * away);
  }
  return best;
}

function expectedExponent(exponent: ResolvedExponent): number {
  if (exponent.kind === "fixed") return exponent.value;
  return exponent.kind === "prior" ? exponent.mean : defaultExponent.mean;
}

/** The two figures whose ratio is furthest outside what floor alone and 1/f alone allow, in its own uncertainties. */
function worstPair(exponent: number, readings: readonly FigureReading[]) {
  const pairs = readings.flatMap((one, i) =>
    readings.slice(i + 1).map((other) => {
      const ratio = other.value / one.value;
      const flicker = Math.exp(0.5 * (other.flickerLog(exponent, 1) - one.flickerLog(exponent, 1)));
      const limits = [Math.sqrt(other.floorPower / one.floorPower), flicker] as const;
      const uncertainty = Math.hypot(1 / weightOf(one), 1 / weightOf(other));
      const outside = Math.max(Math.log(Math.min(...limits) / ratio), Math.log(ratio / Math.max(...limits)));
      return { one, other, limits, ratio, uncertainty, outside: outside / uncertainty };
    }),
  );
  return pairs.reduce((worst, pair) => (pair.outside > worst.outside ? pair : worst));
}

function short(value: number): string {
  return String(Number(value.toPrecision(3)));
}
