import { crossingHazard } from "./crossing-hazard.js";
import { extremesCovariance } from "./extremes-covariance.js";
import { largestOf, type WeightedValues } from "./largest-of.js";
import { narrowBandRanges } from "./narrow-band-range.js";
import { principalPaths } from "./principal-paths.js";
import { rangeMixture } from "./range-mixture.js";
import { rangeOfNormals } from "./range-of-normals.js";
import type { RecordDensity } from "./record-density.js";
import { type SlowPaths, slowPaths } from "./slow-paths.js";
import { recordPower, structureFunction } from "./structure-function.js";

/** How the range was found: exactly, from drawn samples, or from up-crossings. */
export type RecordRangeRoute = "independent samples" | "few samples" | "narrow band" | "up-crossings";

/** Mean and standard deviation of the range of a record, or of the largest of several, in the signal's unit. */
export interface RecordRange {
  readonly mean: number;
  readonly standardDeviation: number;
  readonly route: RecordRangeRoute;
}

/** What {@link recordRange} takes. */
export interface RecordRangeOptions {
  /** Samples of the record, at least 2. */
  readonly samples: number;
  /** Seconds between two of them. */
  readonly sampleSeconds: number;
  /** The range is the largest of that many independent records. */
  readonly records: number;
}

/** Paths drawn for the slow part; what the fast part adds is integrated and needs none. */
const pathCount = 256;
const pathPoints = 48;
/** Records this short are drawn sample by sample. */
const fewSamples = 64;
/** Anticorrelation from which noise is said to oscillate; then so many samples and components may be drawn, in 0.3 s. */
const oscillation = 0.4;
const mostDrawn = 2048;
const mostModes = 256;
const mostProducts = 1e5;
/** Noise slower than 6/T moves through the record as a path; half the power at that frequency counts as slow. */
const slowTurns = 6;
/** Below this share of the record's power a slow path changes nothing. */
const leastSlow = 3e-3;
/** A trace is drawn at lags over which the correlation stays above 0.92: of a sine a sixteenth of a turn. */
const smallGap = 0.08;
const nearLags = 320;
const farLags = 160;
/** Noise that oscillates has its turns told apart, over some fifty. */
const swellLags = 1200;
/** White noise up to half the sample rate comes out at 1e-3 or less, for the nodes begin a little above 0 Hz. */
const negligibleCorrelation = 1.5e-3;

/** Range of a stationary Gaussian record. See docs/method.md, "Peak-to-peak", for the method and how well it holds. */
export function recordRange(record: RecordDensity, options: RecordRangeOptions): RecordRange {
  const { samples, sampleSeconds, records } = options;
  const power = recordPower(record);
  const lags = lagsOf(samples, farLags);
  const structure = structureFunction(record, secondsOf(lags, sampleSeconds));
  const independent = structure.every((value) => Math.abs(value - power) <= negligibleCorrelation * power);
  const oscillates = structure.some((value) => value > (1 + oscillation) * power);
  const steps = lags[structure.findIndex((value) => value > smallGap * power) - 1] ?? 1;
  const found =
    (samples <= fewSamples ? drawn(record, options, 1) : undefined) ??
    (oscillates ? drawn(record, options, steps) : undefined) ??
    (oscillates ? swelling(record, options, structure, power) : undefined) ??
    crossed(record, lagsOf(samples, oscillates ? swellLags : farLags), options);
  const one = independent ? independentRange(samples, power) : found;
  const largest = largestOf(found.distribution, records, one);
  return { ...largest, route: independent ? "independent samples" : found.route };
}

interface Found {
  readonly mean: number;
  readonly standardDeviation: number;
  readonly route: RecordRangeRoute;
  readonly distribution: WeightedValues;
}

function independentRange(samples: number, power: number): { mean: number; standardDeviation: number } {
  const { mean, standardDeviation } = rangeOfNormals(samples);
  return { mean: mean * Math.sqrt(power), standardDeviation: standardDeviation * Math.sqrt(power) };
}

/**
 * A record of few samples; or of noise that oscillates and has few components, where one swell may fill the record and
 * crossings are no Poisson process. A trace is thinned to some 16 samples a turn, which loses 0.6 % at
 * most.
 *
 * @param every - of so many samples one is drawn.
 */
function drawn(
  record: RecordDensity,
  { samples, sampleSeconds }: RecordRangeOptions,
  every: number,
): Found | undefined {
  const taken = Math.floor((samples - 1) / every) + 1;
  if (taken > mostDrawn) return undefined;
  const step = ((samples - 1) * sampleSeconds) / (taken - 1);
  const lags = Array.from({ length: taken }, (_, lag) => lag);
  const structure = structureFunction(record, secondsOf(lags, step));
  const paths = principalPaths(structure, taken <= fewSamples ? taken : Math.min(mostModes, mostProducts / taken));
  if (paths === undefined) return undefined;
  return foundFrom(Float64Array.from(paths, (path) => rangeIn(path)).toSorted(), "few samples");
}

/** Noise of so narrow a band and so many turns that only its envelope is drawn. */
function swelling(
  record: RecordDensity,
  { samples, sampleSeconds }: RecordRangeOptions,
  structure: Float64Array,
  power: number,
): Found | undefined {
  const anticorrelation = structure.reduce((most, value) => Math.max(most, value), 0) / power - 1;
  const ranges = narrowBandRanges(record, (samples - 1) * sampleSeconds, anticorrelation);
  return ranges === undefined ? undefined : foundFrom(ranges, "narrow band");
}

/** Moments of ranges that were drawn. */
function foundFrom(ranges: Float64Array, route: RecordRangeRoute): Found {
  const mean = ranges.reduce((sum, range) => sum + range, 0) / ranges.length;
  const variance = ranges.reduce((sum, range) => sum + (range - mean) ** 2, 0) / ranges.length;
  const chances = ranges.map(() => 1 / ranges.length);
  return { mean, standardDeviation: Math.sqrt(variance), route, distribution: { values: ranges, chances } };
}

function crossed(
  record: RecordDensity,
  lags: readonly number[],
  { samples, sampleSeconds }: RecordRangeOptions,
): Found {
  const seconds = (samples - 1) * sampleSeconds;
  const slowShare = (hz: number): number => Math.exp(-Math.LN2 * ((hz * seconds) / slowTurns) ** 2);
  const points = Array.from({ length: pathPoints }, (_, point) => (point * seconds) / (pathPoints - 1));
  const paths = slowPaths(structureFunction(record, points, slowShare), pathCount);
  const fastShare = (hz: number): number => -Math.expm1(-Math.LN2 * ((hz * seconds) / slowTurns) ** 2);
  const split = paths.power > leastSlow * (paths.power + recordPower(record, fastShare));
  const share = split ? fastShare : undefined;
  const slow: SlowPaths = split ? paths : { paths: [new Float64Array(pathPoints)], points: pathPoints, power: 0 };
  const power = recordPower(record, share);
  const structure = structureFunction(record, secondsOf(lags, sampleSeconds), share);
  const hazard = crossingHazard({
    samples,
    lags,
    gaps: structure.map((value) => value / power),
    share: power / (power + slow.power),
  });
  const mixture = rangeMixture(slow, {
    deviation: Math.sqrt(power),
    stepDeviation: Math.sqrt(2 * (structure[0] as number)),
    samples,
    hazard,
  });
  return {
    mean: mixture.mean,
    standardDeviation: Math.sqrt(mixture.variance + 2 * power * extremesCovariance(hazard)),
    route: "up-crossings",
    distribution: { values: mixture.chances.map((_, index) => index * mixture.cell), chances: mixture.chances },
  };
}

function rangeIn(path: Float64Array): number {
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const value of path) {
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return high - low;
}

/** Every lag up to some five turns of a trace, then geometrically spaced ones. */
function lagsOf(samples: number, far: number): number[] {
  const most = samples - 1;
  const near = Array.from({ length: Math.min(most, nearLags) }, (_, index) => index + 1);
  if (most <= nearLags) return near;
  const ratio = Math.log(most / nearLags) / far;
  const beyond = Array.from({ length: far }, (_, index) => Math.round(nearLags * Math.exp(ratio * (index + 1))));
  return [...new Set([...near, ...beyond])];
}

function secondsOf(lags: readonly number[], sampleSeconds: number): number[] {
  return lags.map((lag) => lag * sampleSeconds);
}
