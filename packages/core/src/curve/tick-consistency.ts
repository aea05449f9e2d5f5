import { MalformedDataError, OutOfDomainError } from "../ground/errors.js";

/** A tick: where it is along its axis, and what is written there. */
export interface AxisTick {
  /** Pixel along the axis: x for the frequency axis, y for the density axis. */
  readonly pixel: number;
  /** Hz; unit/√Hz; or dB re unit/√Hz. */
  readonly value: number;
}

interface Placed {
  readonly pixel: number;
  readonly coordinate: number;
}

/** Pixels a tick may lie off the line of the others before it is taken for a mistake: eyes and scans do better. */
const leastSuspicious = 4;

/**
 * Refuses ticks that cannot be those of one axis: fewer than two distinct ones, places that are no numbers, values that
 * contradict each other. Among four or more the wrong one is found as the tick (or pair of ticks) without which the rest
 * lie on one line.
 */
export function requireConsistentTicks(
  name: string,
  ticks: readonly AxisTick[],
  placed: readonly Placed[],
  sigma: number,
): void {
  const stray = ticks.findIndex(({ pixel }) => !Number.isFinite(pixel));
  if (stray >= 0)
    throw new OutOfDomainError(
      `Tick ${stray + 1} of the ${name} axis needs a finite pixel; got ${ticks[stray]?.pixel}.`,
    );
  const places = new Set(placed.map(({ pixel }) => pixel));
  const values = new Set(placed.map(({ coordinate }) => coordinate));
  if (places.size < 2 || values.size < 2)
    throw new OutOfDomainError(
      `The ${name} axis needs at least two ticks at different pixels and with different values; got ${ticks.length}.`,
    );
  if (placed.length < 3) return;
  const limit = Math.max(8 * sigma, leastSuspicious);
  if (worstOff(placed) <= limit && inOrder(placed)) return;
  const suspects = findSuspects(placed, limit);
  const said = (index: number): string => `tick ${index + 1} (${ticks[index]?.value} at pixel ${ticks[index]?.pixel})`;
  if (suspects === undefined)
    throw new MalformedDataError(
      `The ticks of the ${name} axis do not lie on one line, by up to ${worstOff(placed).toFixed(1)} pixels; check their values and pixels, or the kind of the axis.`,
    );
  const off = Math.max(...suspects.map((index) => distanceFromOthers(placed, suspects, index)));
  throw new MalformedDataError(
    `The ${name} axis contradicts itself at ${suspects.map(said).join(" and ")}: ${off.toFixed(0)} pixels from where the other ticks put ${suspects.length === 1 ? "it" : "them"}; check for a wrong power of ten, a miscounted grid line${suspects.length === 1 ? "" : " or two values swapped"}.`,
    { index: suspects[0] as number },
  );
}

/** The one tick, else the pair, whose removal leaves a line; the best of several. Undefined when no removal does. */
function findSuspects(placed: readonly Placed[], limit: number): readonly number[] | undefined {
  const indices = placed.map((_, index) => index);
  const singles = indices.map((index) => [index]);
  const pairs = indices.flatMap((one) => indices.filter((other) => other > one).map((other) => [one, other]));
  for (const candidates of [singles, pairs]) {
    let best: readonly number[] | undefined;
    let least = limit;
    for (const out of candidates) {
      const rest = placed.filter((_, index) => !out.includes(index));
      if (rest.length < (out.length === 1 ? 3 : 2) || !inOrder(rest)) continue;
      const off = rest.length === 2 ? swapResidual(placed, out) : worstOff(rest);
      if (off <= least) {
        least = off;
        best = out;
      }
    }
    if (best !== undefined) return best;
  }
  return undefined;
}

/** With two ticks left any line fits; a swapped pair shows by fitting once swapped back. */
function swapResidual(placed: readonly Placed[], [one, other]: readonly number[]): number {
  const a = placed[one as number] as Placed;
  const b = placed[other as number] as Placed;
  const swapped = placed.map((tick, index) => {
    if (index === one) return { pixel: tick.pixel, coordinate: b.coordinate };
    return index === other ? { pixel: tick.pixel, coordinate: a.coordinate } : tick;
  });
  return worstOff(swapped);
}

function inOrder(placed: readonly Placed[]): boolean {
  const byPixel = placed.toSorted((one, other) => one.pixel - other.pixel);
  const steps = byPixel
    .slice(1)
    .map((tick, index) => Math.sign(tick.coordinate - (byPixel[index] as Placed).coordinate));
  return steps.every((step) => step === steps[0] && step !== 0);
}

function worstOff(placed: readonly Placed[]): number {
  const { offset, slope } = lineThrough(placed);
  return Math.max(...placed.map(({ pixel, coordinate }) => Math.abs(pixel - offset - slope * coordinate)));
}

function distanceFromOthers(placed: readonly Placed[], suspects: readonly number[], index: number): number {
  const { offset, slope } = lineThrough(placed.filter((_, at) => !suspects.includes(at)));
  const { pixel, coordinate } = placed[index] as Placed;
  return Math.abs(pixel - offset - slope * coordinate);
}

/** Least squares of pixel over coordinate. */
function lineThrough(placed: readonly Placed[]): { readonly offset: number; readonly slope: number } {
  const count = placed.length;
  const meanPixel = placed.reduce((sum, { pixel }) => sum + pixel, 0) / count;
  const mean = placed.reduce((sum, { coordinate }) => sum + coordinate, 0) / count;
  let square = 0;
  let product = 0;
  for (const { pixel, coordinate } of placed) {
    square += (coordinate - mean) ** 2;
    product += (coordinate - mean) * (pixel - meanPixel);
  }
  const slope = product / square;
  return { offset: meanPixel - slope * mean, slope };
}
