import { MultivariateLinearRegression, TheilSenRegression } from "ml-regression";
import type { FitModel, FitParameter } from "./fit-model.js";
import type { FitPoints } from "./fit-points.js";

/** How many starts are refined; the others are only looked at. */
const mostStarts = 3;

/**
 * Starting values: the slope at the low end by Theil and Sen (half of all points may be wrong), floor and 1/f level by weighted
 * linear least squares in power for that exponent, and a grid of corners over the points and a decade beyond, so that the
 * global optimum is among those refined.
 */
export function startsFor(model: FitModel, points: FitPoints): readonly (readonly number[])[] {
  if (model.parameters.length === 0) return [[]];
  const { x } = points;
  const [low, high] = [x[0] as number, x.at(-1) as number];
  const slope = exponentAtLowEnd(points);
  const exponents = model.exponentAt < 0 ? [fixedExponent(model)] : [slope, 1];
  const corners = [cornerByPower(points, exponents[0] as number)];
  for (let step = -1; step <= 9; step += 1) corners.push(low + ((high - low) * step) / 8);
  const candidates: number[][] = [];
  for (const corner of corners)
    for (const exponent of exponents)
      for (const inner of model.parameters.includes("ln trap corner") ? [0.25, 0.5, 0.75] : [0.5])
        candidates.push(
          model.parameters.map((name) =>
            startOf(name, { corner, exponent, inner: low + inner * (high - low), low, high }),
          ),
        );
  const distinct = [...new Map(candidates.map((start) => [start.join(), start])).values()];
  return distinct
    .map((start) => ({ start, misfit: misfitOf(model, points, start) }))
    .toSorted((one, other) => one.misfit - other.misfit)
    .slice(0, mostStarts)
    .map(({ start }) => start);
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
  const found = new TheilSenRegression(Array.from(x.subarray(0, count)), Array.from(y.subarray(0, count)));
  return Math.min(Math.max(-2 * found.slope, 0.3), 3);
}

/** ln of the corner from S/f⁻ᵃ-weighted linear least squares of power on {1, f⁻ᵃ}, each row over its own power. */
function cornerByPower({ x, y }: FitPoints, exponent: number): number {
  const rows = Array.from(x, (at, i) => {
    const power = Math.exp(2 * ((y[i] as number) - (y[0] as number)));
    return { one: 1 / power, flicker: Math.exp(-exponent * (at - (x[0] as number))) / power };
  });
  const fitted = new MultivariateLinearRegression(
    rows.map(({ one, flicker }) => [one, flicker]),
    rows.map(() => [1]),
    { intercept: false, statistics: false },
  );
  const [floor = 0, flicker = 0] = fitted.weights.map((row) => row[0] ?? 0);
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
