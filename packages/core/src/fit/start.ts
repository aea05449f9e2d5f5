import { TheilSenRegression } from "ml-regression";
import type { FitModel, FitParameter } from "./fit-model.js";
import type { FitPoints } from "./fit-points.js";

/** How many starts of the grid are refined; the others are only looked at. */
const mostStarts = { twoTerms: 6, threeTerms: 2 };

/** All pairs of so many points give a slope good enough to start from. */
const mostForSlope = 12;

/**
 * The first start: the slope at the low end by Theil and Sen (half of all points may be wrong), and floor and 1/f level by
 * weighted linear least squares in power for that exponent.
 */
export function firstStart(model: FitModel, points: FitPoints): readonly number[] {
  const { x } = points;
  const [low, high] = [x[0] as number, x.at(-1) as number];
  const exponent = model.exponentAt < 0 ? fixedExponent(model) : exponentAtLowEnd(points);
  const corner = cornerByPower(points, exponent);
  return model.parameters.map((name) => startOf(name, { corner, exponent, inner: 0.5 * (low + high), low, high }));
}

/** The best few of a grid of corners over the points and a decade beyond, so that no other optimum is overlooked. */
export function moreStarts(model: FitModel, points: FitPoints): readonly (readonly number[])[] {
  const { x } = points;
  const [low, high] = [x[0] as number, x.at(-1) as number];
  const exponents = exponentsOf(model, points);
  const inners = model.parameters.includes("ln trap corner") ? [0.25, 0.5, 0.75] : [0.5];
  const candidates: number[][] = [];
  for (let step = -1; step <= 9; step += 1) {
    const corner = low + ((high - low) * step) / 8;
    for (const exponent of exponents)
      for (const share of inners) {
        const guess = { corner, exponent, inner: low + share * (high - low), low, high };
        candidates.push(model.parameters.map((name) => startOf(name, guess)));
      }
  }
  return candidates
    .map((start) => ({ start, misfit: misfitOf(model, points, start) }))
    .toSorted((one, other) => one.misfit - other.misfit)
    .slice(0, model.parameters.length > 2 ? mostStarts.threeTerms : mostStarts.twoTerms)
    .map(({ start }) => start);
}

/**
 * Exponents of the grid. A free exponent may end where nobody wants it, steep at one end point or rising; that optimum is
 * looked for as well, since it is for the judgement, not for the search, to call it absurd.
 */
function exponentsOf(model: FitModel, points: FitPoints): readonly number[] {
  if (model.exponentAt < 0) return [fixedExponent(model)];
  const near = [exponentAtLowEnd(points), 1];
  return model.exponent.kind === "free" && model.parameters.length === 2 ? [...near, 3, 12, -0.5, -3, -12] : near;
}

interface Guess {
  readonly corner: number;
  readonly exponent: number;
  readonly inner: number;
  readonly low: number;
  readonly high: number;
}

function startOf(name: FitParameter, { corner, exponent, inner, low, high }: Guess): number {
  switch (name) {
    case "ln corner":
      return corner;
    case "exponent":
      return exponent;
    case "ln walk corner":
      return low + 0.5 * (corner - low);
    case "ln trap level":
      return 0;
    case "ln trap corner":
      return inner;
    case "ln rise corner":
      return high;
    default:
      return 0;
  }
}

function fixedExponent({ exponent }: FitModel): number {
  return exponent.kind === "fixed" ? exponent.value : 1;
}

/** −2 × the slope of ln density over ln f in the lowest third of the points, at least three of them; kept between 0.3 and 3. */
function exponentAtLowEnd({ x, y }: FitPoints): number {
  const count = Math.max(3, Math.ceil(x.length / 3));
  if (x.length < 3) return 1;
  const stride = Math.ceil(count / mostForSlope);
  const [across, along]: [number[], number[]] = [[], []];
  for (let i = 0; i < count; i += stride) {
    across.push(x[i] as number);
    along.push(y[i] as number);
  }
  if (across.length < 3) return 1;
  const found = new TheilSenRegression(across, along);
  return Math.min(Math.max(-2 * found.slope, 0.3), 3);
}

/** ln of the corner from linear least squares of power on {1, f⁻ᵃ}, each row over its own power. */
function cornerByPower({ x, y }: FitPoints, exponent: number): number {
  // normal equations of two columns: a start needs no more digits
  let [aa, ab, bb, a1, b1] = [0, 0, 0, 0, 0];
  for (let i = 0; i < x.length; i += 1) {
    const a = Math.exp(2 * ((y[0] as number) - (y[i] as number)));
    const b = a * Math.exp(exponent * ((x[0] as number) - (x[i] as number)));
    aa += a * a;
    ab += a * b;
    bb += b * b;
    a1 += a;
    b1 += b;
  }
  const floor = a1 * bb - b1 * ab;
  const flicker = b1 * aa - a1 * ab;
  if (!(floor > 0 && flicker > 0)) return 0.5 * ((x[0] as number) + (x.at(-1) as number));
  return (x[0] as number) + Math.log(flicker / floor) / exponent;
}

/** Weighted variance of what the shape leaves, as a rank only. */
function misfitOf(model: FitModel, { x, y, weight }: FitPoints, start: readonly number[]): number {
  const slopes = new Float64Array(model.parameters.length);
  let square = 0;
  let mean = 0;
  let total = 0;
  for (let i = 0; i < x.length; i += 1) {
    const w2 = (weight[i] as number) ** 2;
    const value = (y[i] as number) - 0.5 * model.shapeAt(x[i] as number, start, slopes);
    square += w2;
    mean += w2 * value;
    total += w2 * value * value;
  }
  return total - (mean * mean) / square;
}
