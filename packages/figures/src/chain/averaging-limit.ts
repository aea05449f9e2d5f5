import { OutOfDomainError, type Spectrum, type Weighting, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys, requirePositive } from "../convert/domain.js";
import { type TwoSampleMeter, twoSampleMeter } from "./two-sample-meter.js";

/** What {@link averagingLimit} takes. */
export interface AveragingLimitOptions {
  /** Averaging times of the table, s, ascending; three a decade from 1 ms to 10⁵ s unless given. */
  readonly seconds?: readonly number[] | undefined;
  /** What the noise passes before it is averaged. */
  readonly weighting?: Weighting | undefined;
  /** Lower edge, Hz; 0 unless given. */
  readonly fromHz?: number | undefined;
  /** Upper edge, Hz; Infinity unless given. */
  readonly toHz?: number | undefined;
}

/** Two-sample deviation at one averaging time. */
export interface AveragedNoise {
  readonly seconds: number;
  /** In the spectrum's unit. */
  readonly deviation: number;
}

/** How far averaging helps: plain data. */
export interface AveragingLimit {
  readonly unit: string;
  readonly rows: readonly AveragedNoise[];
  /** Where averaging stops paying; missing where it pays, or does not pay, at all times searched. */
  readonly stopsPaying?: AveragedNoise;
  /** The smallest deviation found, and whether it lies at the end of the search. */
  readonly least: AveragedNoise & { readonly atEnd: boolean };
  /** Averaging times searched, s. */
  readonly searched: readonly [number, number];
  /** The answer in words. */
  readonly text: string;
}

const usualTimes: readonly number[] = Object.freeze(
  Array.from({ length: 25 }, (_, k) => Number(`${[1, 2, 5][k % 3]}e${Math.floor(k / 3) - 3}`)),
);

/** White noise falls as 1/τ in power and a 1/f floor does not fall: halfway between, half of what is averaged is floor. */
const halfway = -0.5;

/** Points a decade of the search. */
const searchPoints = 6;

/**
 * How far averaging helps: the two-sample deviation against averaging time, σ²(τ) = ∫ S·2 sin⁴(πfτ)/(πfτ)² df. White noise
 * gives floor²/(2τ), 1/f noise a floor of 2 ln 2 · S(1 Hz) that no averaging lowers, random walk rises.
 *
 * Averaging stops paying where ln σ² falls half as fast as for white noise: for a floor with a 1/f part at
 * τ = 1/(4 ln 2 · f_c) = 0.361/f_c, where both make the same; from there on at most a factor √2 is left to gain.
 *
 * @param spectrum - one-sided power density, defined on the band (all frequencies unless given).
 * @param options - `seconds` of the table, which also bound the search; `weighting`, band edges.
 * @throws OutOfDomainError for fewer than two times or times that do not ascend; DivergentIntegralError for noise that needs a
 *   band edge (exponents from 3 up at 0 Hz).
 * @see NIST SP 1065, section 7.1.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { averagingLimit } from "@quietband/figures";
 * const limit = averagingLimit(whiteFlicker({ floor: 10e-9, cornerHz: 0.1 }));
 * limit.stopsPaying?.seconds; // → 3.6067
 * limit.stopsPaying?.deviation; // → 5.266e-9
 * ```
 */
export function averagingLimit(spectrum: Spectrum, options: AveragingLimitOptions = {}): AveragingLimit {
  refuseUnknownKeys("averagingLimit", ["seconds", "weighting", "fromHz", "toHz"], options);
  const { seconds = usualTimes, weighting, fromHz = 0, toHz = Number.POSITIVE_INFINITY } = options;
  const [shortest, longest] = requireTimes(seconds);
  const meter = twoSampleMeter(spectrum, { weighting, fromHz, toHz });
  const at = (time: number): AveragedNoise =>
    Object.freeze({ seconds: time, deviation: Math.sqrt(meter.varianceAt(time)) });
  const count = Math.max(2, Math.ceil(searchPoints * Math.log10(longest / shortest)));
  const grid = Array.from({ length: count + 1 }, (_, k) => shortest * (longest / shortest) ** (k / count));
  const search = searchOver(grid, meter);
  const limit = slopeCrossing(search, halfway, 0);
  const stopsPaying = limit === undefined ? undefined : at(limit);
  const least = leastOf(search, at);
  const pays = (search.slopes[0] as number) < halfway;
  return Object.freeze({
    unit: spectrum.unit,
    rows: Object.freeze(seconds.map(at)),
    ...(stopsPaying !== undefined && { stopsPaying }),
    least,
    searched: Object.freeze([shortest, longest] as const),
    text: inWords(spectrum.unit, { stopsPaying, least, last: at(longest), pays }),
  });
}

function requireTimes(seconds: readonly number[]): readonly [number, number] {
  for (const [index, time] of seconds.entries()) {
    requirePositive("Each of seconds", time, "s");
    if (index > 0 && !(time > (seconds[index - 1] as number)))
      throw new OutOfDomainError(`seconds must ascend; got ${time} s after ${seconds[index - 1]} s.`);
  }
  const [first, last] = [seconds[0], seconds.at(-1)];
  if (first !== undefined && last !== undefined && seconds.length > 1) return [first, last];
  throw new OutOfDomainError(`seconds must hold at least two averaging times in s; got ${seconds.length}.`);
}

interface Search {
  readonly grid: readonly number[];
  readonly variances: readonly number[];
  /** Geometric middles of the grid, and the mean slopes over its steps. */
  readonly middles: readonly number[];
  readonly slopes: readonly number[];
  readonly meter: TwoSampleMeter;
}

function searchOver(grid: readonly number[], meter: TwoSampleMeter): Search {
  const variances = grid.map((time) => meter.varianceAt(time));
  const steps = grid.slice(1).map((time, index) => [grid[index] as number, time] as const);
  return {
    grid,
    variances,
    middles: steps.map(([low, high]) => Math.sqrt(low * high)),
    slopes: steps.map(
      ([low, high], index) =>
        Math.log((variances[index + 1] as number) / (variances[index] as number)) / Math.log(high / low),
    ),
    meter,
  };
}

/** Where the slope first rises through a value from a step on; undefined where it does not. */
function slopeCrossing({ middles, slopes, meter }: Search, value: number, from: number): number | undefined {
  const after = slopes.findIndex(
    (slope, index) => index > from && slope >= value && (slopes[index - 1] as number) < value,
  );
  if (after < 0) return undefined;
  const excess = (time: number): number => meter.slopeAt(time) - value;
  // A mean slope is not the slope at the middle: the bracket may have to grow by a step.
  let low = after - 1;
  let high = after;
  while (low > 0 && excess(middles[low] as number) >= 0) low -= 1;
  while (high < middles.length - 1 && excess(middles[high] as number) < 0) high += 1;
  return rootBetween(excess, middles[low] as number, middles[high] as number);
}

/** Regula falsi in ln τ with the kept end halved (Illinois); the function rises. */
function rootBetween(excess: (time: number) => number, from: number, to: number): number {
  let [low, high] = [Math.log(from), Math.log(to)];
  let [below, above] = [excess(from), excess(to)];
  let kept = 0;
  for (let turn = 0; turn < 60 && high - low > 1e-12; turn += 1) {
    const middle = (low * above - high * below) / (above - below);
    const value = excess(Math.exp(middle));
    if (value === 0 || !(middle > low && middle < high)) return Math.exp(middle);
    if (value < 0) {
      [low, below] = [middle, value];
      if (kept === 1) above *= 0.5;
      kept = 1;
    } else {
      [high, above] = [middle, value];
      if (kept === -1) below *= 0.5;
      kept = -1;
    }
  }
  return Math.exp(0.5 * (low + high));
}

/** The smallest deviation in the range searched, refined where it lies inside. */
function leastOf(search: Search, at: (time: number) => AveragedNoise): AveragingLimit["least"] {
  const { grid, variances } = search;
  const place = variances.indexOf(Math.min(...variances));
  const inside = place > 0 && place < grid.length - 1 ? slopeCrossing(search, 0, place - 1) : undefined;
  return Object.freeze({ ...at(inside ?? (grid[place] as number)), atEnd: place === grid.length - 1 });
}

function inWords(
  unit: string,
  found: {
    readonly stopsPaying: AveragedNoise | undefined;
    readonly least: AveragingLimit["least"];
    readonly last: AveragedNoise;
    readonly pays: boolean;
  },
): string {
  const words = ({ seconds, deviation }: AveragedNoise): string =>
    `${writeQuantity(deviation, unit, { digits: 3 })} at ${writeQuantity(seconds, "s", { digits: 3 })}`;
  const end = found.least.atEnd
    ? `the least in the range searched is ${words(found.least)}, its end`
    : `the least is ${words(found.least)}, and it is ${words(found.last)}`;
  if (found.stopsPaying !== undefined) return `Averaging stops paying with ${words(found.stopsPaying)}; ${end}.`;
  return `Averaging pays ${found.pays ? "throughout" : "nowhere in the range searched"}; ${end}.`;
}
