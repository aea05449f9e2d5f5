import { type CrossingHazard, levelStep, lowestLevel } from "./crossing-hazard.js";
import { normalDensity, normalTail } from "./normal-tail.js";
import type { SlowPaths } from "./slow-paths.js";

/** What moves about the slow path. */
export interface FastNoise {
  /** Standard deviation, positive. */
  readonly deviation: number;
  /** Root mean square of the difference of two neighbouring samples. */
  readonly stepDeviation: number;
  readonly samples: number;
  readonly hazard: CrossingHazard;
}

/** A range by its moments, and its distribution in cells for the largest of several records. */
export interface RangeMixture {
  readonly mean: number;
  readonly variance: number;
  /** Chance of the cell about cell·index, by index. */
  readonly chances: Float64Array;
  readonly cell: number;
}

/**
 * Range of slow paths with fast noise about them: given the path, maximum and minimum are independent, and the chance to
 * stay below a level is exp(−hazard) summed along the path, up-crossings helped on by its slope.
 */
export function rangeMixture(slow: SlowPaths, fast: FastNoise): RangeMixture {
  const cell = Math.max(fast.deviation / 4, 0.02 * Math.sqrt(slow.power + fast.deviation ** 2));
  const chances = new Float64Array(Math.ceil((2 * longestPath(slow) + 30 * fast.deviation) / cell) + 4);
  const weights = { up: new Float64Array(slow.points), down: new Float64Array(slow.points) };
  let mean = 0;
  let square = 0;
  let inner = 0;
  for (const path of slow.paths) {
    fillWeights(path, fast, weights);
    const up = extremeOf(path, 1, { fast, cell, weights: weights.up });
    const down = extremeOf(path, -1, { fast, cell, weights: weights.down });
    mean += up.mean + down.mean;
    square += (up.mean + down.mean) ** 2;
    inner += up.variance + down.variance;
    addSum(chances, up, down);
  }
  const count = slow.paths.length;
  mean /= count;
  return {
    mean,
    variance: inner / count + Math.max(0, square / count - mean * mean),
    chances: chances.map((chance) => chance / count),
    cell,
  };
}

interface Extreme {
  readonly mean: number;
  readonly variance: number;
  /** Cells, from the top down. */
  readonly chances: readonly number[];
  readonly topCell: number;
}

interface Given {
  readonly fast: FastNoise;
  readonly cell: number;
  readonly weights: Float64Array;
}

/** Maximum of path and noise (sign 1), or of both turned over (sign −1), level by level from the top down. */
function extremeOf(path: Float64Array, sign: 1 | -1, given: Given): Extreme {
  const { fast, cell } = given;
  const highest = path.reduce((most, value) => Math.max(most, sign * value), Number.NEGATIVE_INFINITY);
  const top = Math.ceil((highest + fast.hazard.top * fast.deviation) / cell);
  const chances: number[] = [];
  let above = 1;
  let sum = 0;
  let moment = 0;
  for (let index = 0; above > 1e-4; index += 1) {
    const below = index === 0 ? 1 : Math.exp(-hazardAt((top - index) * cell, path, sign, given));
    chances.push(above - below);
    sum += below;
    moment += index * below;
    above = below;
  }
  // Trapezoids of P(max ≤ level) down from the top, where it is flat: E = ∫ P, E² = 2·∫ (top − level)·P.
  const depth = sum - 0.5;
  return {
    mean: (top - depth) * cell,
    variance: (2 * moment + 1 / 6 - depth * depth) * cell * cell,
    chances,
    topCell: top,
  };
}

/**
 * Share of the record's steps at each point, times what the path's slope does to the rate of up-crossings: φ(v) + v·Φ(v)
 * over φ(0), v the slope over the noise's own step. Turned over, v changes its sign and the sum is v less.
 */
function fillWeights(
  path: Float64Array,
  fast: FastNoise,
  { up, down }: { up: Float64Array; down: Float64Array },
): void {
  const last = path.length - 1;
  const stepsApart = (fast.samples - 1) / last;
  for (let point = 0; point <= last; point += 1) {
    const before = Math.max(0, point - 1);
    const after = Math.min(last, point + 1);
    const slope = ((path[after] as number) - (path[before] as number)) / ((after - before) * stepsApart);
    const v = Math.abs(slope) / fast.stepDeviation;
    const along = normalDensity(v) + v * (1 - normalTail(v));
    const scale = (Math.sqrt(2 * Math.PI) * (point === 0 || point === last ? 0.5 : 1)) / last;
    const against = Math.max(0, along - v);
    up[point] = scale * (slope > 0 ? along : against);
    down[point] = scale * (slope > 0 ? against : along);
  }
}

function hazardAt(level: number, path: Float64Array, sign: 1 | -1, { fast, weights }: Given): number {
  const { table, start } = fast.hazard;
  const scale = 1 / (fast.deviation * levelStep);
  let sum = 0;
  for (let point = 0; point < path.length; point += 1) {
    const position = (level - sign * (path[point] as number)) * scale - lowestLevel / levelStep;
    if (position < 0) return Number.POSITIVE_INFINITY;
    const index = Math.floor(position);
    if (index >= table.length - 1) continue;
    const part = position - index;
    sum += (weights[point] as number) * ((table[index] as number) * (1 - part) + (table[index + 1] as number) * part);
    if (point === 0) sum += (start[index] as number) * (1 - part) + (start[index + 1] as number) * part;
  }
  return sum;
}

function addSum(chances: Float64Array, up: Extreme, down: Extreme): void {
  const top = up.topCell + down.topCell + 1;
  for (const [index, chance] of up.chances.entries())
    for (let other = 0; other < down.chances.length; other += 1) {
      const cell = top - index - other;
      chances[cell] = (chances[cell] as number) + chance * (down.chances[other] as number);
    }
}

function longestPath(slow: SlowPaths): number {
  let longest = 0;
  for (const path of slow.paths) for (const value of path) longest = Math.max(longest, Math.abs(value));
  return longest;
}
