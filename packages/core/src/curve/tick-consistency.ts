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
  const suspects = findSuspects(placed, limit, name === "frequency" ? 1 : -1);
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

/**
 * The one tick without which the rest lie on one line, else the two that lie on it once swapped. Three ticks of four can
 * lie on a line by accident when two are swapped; then the fourth would be far off, and the swap is the likelier mistake.
 * Swapping the outer or the inner two of four can both give a line: the usual direction of the axis decides.
 */
function findSuspects(placed: readonly Placed[], limit: number, usual: 1 | -1): readonly number[] | undefined {
  const indices = placed.map((_, index) => index);
  const single = best(
    indices.map((index) => [index]),
    limit,
    ([out]) => {
      const rest = placed.filter((_, index) => index !== out);
      return rest.length >= 3 && inOrder(rest) ? worstOff(rest) : Number.POSITIVE_INFINITY;
    },
  );
  const pair = best(
    indices.flatMap((one) => indices.filter((other) => other > one).map((other) => [one, other])),
    limit,
    ([one, other]) => {
      const back = swapped(placed, one as number, other as number);
      const against = Math.sign(lineThrough(back).slope) === usual ? 0 : 0.5 * limit;
      return inOrder(back) ? worstOff(back) + against : Number.POSITIVE_INFINITY;
    },
  );
  if (single === undefined || pair === undefined) return single ?? pair;
  const pixels = placed.map(({ pixel }) => pixel);
  const spacing = (Math.max(...pixels) - Math.min(...pixels)) / (placed.length - 1);
  return distanceFromOthers(placed, single, single[0] as number) > 1.5 * spacing ? pair : single;
}

function best(
  candidates: readonly (readonly number[])[],
  limit: number,
  offWithout: (out: readonly number[]) => number,
): readonly number[] | undefined {
  let found: readonly number[] | undefined;
  let least = limit;
  for (const out of candidates) {
    const off = offWithout(out);
    if (off <= least) [found, least] = [out, off];
  }
  return found;
}

function swapped(placed: readonly Placed[], one: number, other: number): readonly Placed[] {
  const a = placed[one] as Placed;
  const b = placed[other] as Placed;
  return placed.map((tick, index) => {
    if (index === one) return { pixel: tick.pixel, coordinate: b.coordinate };
    return index === other ? { pixel: tick.pixel, coordinate: a.coordinate } : tick;
  });
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
