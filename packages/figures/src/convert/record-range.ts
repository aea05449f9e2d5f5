import { crossingHazard } from "./crossing-hazard.js";
import { extremesCovariance } from "./extremes-covariance.js";
import { largestOf, type WeightedValues } from "./largest-of.js";
import { narrowBandRanges } from "./narrow-band-range.js";
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
/** Records this short are drawn sample by sample, eight times as often, for nothing else is drawn. */
const fewSamples = 64;
/** noise slower than 6/T moves through the record as a path; half the power at that frequency counts as slow. */
const slowTurns = 6;
/** Below this share of the record's power a slow path changes nothing. */
const leastSlow = 3e-3;
const mostLags = 128;
/** White noise up to half the sample rate comes out at 1e-3 or less, for the nodes begin a little above 0 Hz. */
const negligibleCorrelation = 1.5e-3;

/** Range of a stationary Gaussian record. See docs/method.md, "Peak-to-peak", for the method and how well it holds. */
export function recordRange(record: RecordDensity, options: RecordRangeOptions): RecordRange {
  const { samples, sampleSeconds, records } = options;
  const power = recordPower(record);
  const lags = lagsOf(samples);
  const structure = structureFunction(record, secondsOf(lags, sampleSeconds));
  const independent = structure.every((value) => Math.abs(value - power) <= negligibleCorrelation * power);
  const found = samples <= fewSamples ? drawn(record, options) : narrowOrCrossed(record, structure, lags, options);
  const one = independent ? independentRange(samples, power) : found;
  const largest = largestOf(found.distribution, records, one);
  return { ...largest, route: independent ? "independent samples" : found.route };
}

function narrowOrCrossed(
  record: RecordDensity,
  structure: Float64Array,
  lags: readonly number[],
  options: RecordRangeOptions,
): Found {
  const most = structure.reduce((largest, gap) => Math.max(largest, gap), 0);
  const anticorrelation = most / recordPower(record) - 1;
  const ranges = narrowBandRanges(record, (options.samples - 1) * options.sampleSeconds, anticorrelation);
  return ranges === undefined ? crossed(record, lags, options) : foundFrom(ranges, "narrow band");
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

function drawn(record: RecordDensity, { samples, sampleSeconds }: RecordRangeOptions): Found {
  const lags = Array.from({ length: samples }, (_, lag) => lag);
  const { paths } = slowPaths(structureFunction(record, secondsOf(lags, sampleSeconds)), 8 * pathCount);
  return foundFrom(Float64Array.from(paths, (path) => Math.max(...path) - Math.min(...path)).toSorted(), "few samples");
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

/** All lags of a short record, else about as many spaced geometrically. */
function lagsOf(samples: number): number[] {
  const most = samples - 1;
  if (most <= mostLags) return Array.from({ length: most }, (_, index) => index + 1);
  const lags = Array.from({ length: mostLags }, (_, index) =>
    Math.round(Math.exp((Math.log(most) * index) / (mostLags - 1))),
  );
  return [...new Set(lags)];
}

function secondsOf(lags: readonly number[], sampleSeconds: number): number[] {
  return lags.map((lag) => lag * sampleSeconds);
}
