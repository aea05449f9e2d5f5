import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";

/**
 * Gregory's coefficients of the forward differences at a lower end: ∫ g = Σ g − ½ g₀ + Σ c_n Δⁿ g₀ (Jordan, Calculus of
 * Finite Differences, 1939, § 99).
 */
const gregory: readonly number[] = Object.freeze([
  1 / 12,
  -1 / 24,
  19 / 720,
  -3 / 160,
  863 / 60480,
  -275 / 24192,
  33953 / 3628800,
  -8183 / 1036800,
  3250433 / 479001600,
  -4671 / 788480,
]);

/** Images this far from 0 Hz, or from a narrow resonance, are smooth from one to the next: tenth differences below 1e-16. */
const smoothAfter = 64;
/** Below this many images in a smooth stretch adding them one by one is cheaper. */
const fewest = 2 * smoothAfter;

/** Where images must be added one by one, [from, to) in Hz, ascending and apart; and where the product has kinks. */
export interface ImageZones {
  readonly dense: readonly (readonly [number, number])[];
  readonly kinks: readonly number[];
}

/** What is summed: g at a frequency, its integral over a band, and the distance between images. */
export interface ImageSeries {
  readonly throughFilter: (hz: number) => number;
  readonly powerOver: (low: number, high: number) => number;
  readonly zones: ImageZones;
  readonly rate: number;
}

/**
 * Power laws bend on the scale of their frequency, so images are smooth beyond {@link smoothAfter} rates; a polyline or a
 * table has kinks at its knots; a filter is smooth over images unless its knots stand closer than that (a resonance).
 */
export function zonesOf(spectrum: Spectrum, weighting: Weighting | undefined, rate: number): ImageZones {
  const knots = weighting?.knots ?? [];
  const tabulated = weighting?.pieces !== undefined;
  const narrow = tabulated
    ? []
    : knots.filter((hz, index) => {
        const below = hz - (knots[index - 1] ?? Number.NEGATIVE_INFINITY);
        const above = (knots[index + 1] ?? Number.POSITIVE_INFINITY) - hz;
        return Math.min(below, above) < fewest * rate;
      });
  const reach = smoothAfter * rate;
  const dense: [number, number][] = [[0, reach]];
  for (const hz of narrow) {
    const last = dense.at(-1) as [number, number];
    if (hz - reach <= last[1]) last[1] = Math.max(last[1], hz + reach);
    else dense.push([hz - reach, hz + reach]);
  }
  const kinks = [...spectrum.knots, ...(tabulated ? knots : [])].toSorted((one, other) => one - other);
  return { dense, kinks };
}

/** Σ_{k≥0} g(from + k·rate): one by one in dense zones, by Gregory's formula in the smooth stretches between. */
export function sumOfImages(series: ImageSeries, from: number): number {
  const { zones, rate, throughFilter } = series;
  const breaks = [...zones.dense.flat(), ...zones.kinks]
    .filter((hz) => hz > from)
    .toSorted((one, other) => one - other);
  let sum = 0;
  let first = 0;
  for (const end of [...breaks, Number.POSITIVE_INFINITY]) {
    const start = from + first * rate;
    if (start >= end) continue;
    const count = Math.ceil((end - start) / rate);
    const crowded = zones.dense.some(([low, high]) => start >= low && start < high);
    if (crowded || count < fewest) for (let k = 0; k < count; k += 1) sum += throughFilter(from + (first + k) * rate);
    else sum += smoothSum(series, start, count);
    first += count;
  }
  return sum;
}

/** Σ of `count` images from `start`, count may be infinite. */
function smoothSum({ throughFilter, powerOver, rate }: ImageSeries, start: number, count: number): number {
  const end = start + (count - 1) * rate;
  const lower = endCorrection((k) => throughFilter(start + k * rate));
  const upper = end === Number.POSITIVE_INFINITY ? 0 : endCorrection((k) => throughFilter(end - k * rate));
  return powerOver(start, end) / rate + lower + upper;
}

/** ½ g₀ − Σ c_n Δⁿ g₀. */
function endCorrection(valueAt: (k: number) => number): number {
  const differences = Float64Array.from({ length: gregory.length + 1 }, (_, k) => valueAt(k));
  let sum = 0.5 * (differences[0] as number);
  for (const [order, coefficient] of gregory.entries()) {
    for (let k = 0; k < gregory.length - order; k += 1)
      differences[k] = (differences[k + 1] as number) - (differences[k] as number);
    sum -= coefficient * (differences[0] as number);
  }
  return sum;
}
