import {
  type BandNoise,
  type Beyond,
  bandNoise,
  type Curve,
  OutOfDomainError,
  polyline,
  type Weighting,
} from "@quietband/core";
import { type PeakToPeak, peakToPeak } from "../convert/peak-to-peak.js";
import { readStatedFigure, type StatedFigure } from "./read-stated-figure.js";

/** What {@link checkStatedFigure} takes besides curve and figure. */
export interface CheckOptions {
  /** How the curve goes on beyond its points, where the figure's band reaches there. */
  readonly beyond?: Beyond | undefined;
  /** Peak-to-peak / RMS that the figure is assumed to rest on; 6.6 by common practice. */
  readonly factor?: number | undefined;
  /** The filter the figure was measured through, where it is known; a brick wall unless given. */
  readonly weighting?: Weighting | undefined;
  /** What a ratio (ppm) is of: the reference, in the curve's unit. */
  readonly relativeTo?: number | undefined;
}

/** A stated figure beside what its own curve gives. */
export interface StatedFigureCheck {
  readonly figure: StatedFigure;
  /** The stated value in the curve's unit. */
  readonly stated: number;
  /** What the curve gives for it: RMS, peak-to-peak by the factor, or a density. */
  readonly predicted: number;
  /** Noise of the band; undefined for a density. */
  readonly noise: BandNoise | undefined;
  readonly peakToPeak: PeakToPeak | undefined;
  /** 20·log10(stated/predicted). */
  readonly differenceDb: number;
  /** Relative standard uncertainty the comparison rests on: points and rounding, and what is not known of the measurement. */
  readonly tolerance: {
    readonly points: number;
    readonly rounding: number;
    readonly unknownMeasurement: number;
    readonly total: number;
  };
  /** What can be claimed while filter, record length and number of records are not known. */
  readonly claim: "within its tolerance" | "stated lower" | "stated higher";
  /** By which factor stated and predicted differ, at least 1. */
  readonly withinFactor: number;
  /** Share of the band's power that rests on points. */
  readonly shareInsidePoints: number;
  readonly notes: readonly string[];
}

/**
 * Relative standard uncertainty for a peak-to-peak figure of unknown filter, record length and number of records: one record of
 * ten seconds spreads by 11 %, its mean lies 5 to 15 % below 6.6 × RMS, and a filter of first order below and second above adds a
 * few per cent.
 */
export const unknownMeasurement = 0.2;

/** Standard deviations that a difference must reach to be called one (95 % coverage). */
const coverageFactor = 1.96;

/**
 * Compares a stated figure with the curve of the same part: predicted value, difference in dB, what the comparison rests on.
 *
 * While filter, record length and number of records of a peak-to-peak figure are not known it claims no more than "within a
 * factor of".
 *
 * @param curve - the part's noise-density curve.
 * @param figure - a {@link StatedFigure} or its words.
 * @param options - `beyond`, `factor`, `weighting`, `relativeTo`.
 * @throws OutOfDomainError for a figure in another unit than the curve; as `bandNoise` for a band beyond the points.
 *
 * @example
 * ```ts
 * import { readCurve } from "@quietband/core";
 * import { checkStatedFigure } from "@quietband/figures";
 * const curve = readCurve("f [Hz], e_n [nV/√Hz]\n0.1, 1000\n10, 100\n1000, 70");
 * const check = checkStatedFigure(curve, "4.5 µV peak-to-peak, 0.1 Hz to 10 Hz");
 * check.claim; // → within its tolerance
 * check.predicted; // → 4.479e-6
 * ```
 */
export function checkStatedFigure(
  curve: Curve,
  figure: StatedFigure | string,
  options: CheckOptions = {},
): StatedFigureCheck {
  const { beyond, factor, weighting, relativeTo } = options;
  const read = typeof figure === "string" ? readStatedFigure(figure) : figure;
  const scale = scaleOf(read, curve.unit, relativeTo);
  const stated = read.value * scale;
  const spectrum = polyline(curve, { beyond });
  const rounding = read.halfUnit / read.value / Math.sqrt(3);
  if (read.kind === "density") {
    const predicted = Math.sqrt(spectrum.powerDensityAt(read.fromHz));
    return verdict({
      figure: read,
      stated,
      predicted,
      noise: undefined,
      spread: undefined,
      points: nearestUncertainty(curve, read.fromHz),
      rounding,
      unknown: 0,
    });
  }
  const noise = bandNoise(spectrum, { fromHz: read.fromHz, toHz: read.toHz, weighting });
  const spread = read.kind === "peak-to-peak" ? peakToPeak(noise.rms, { factor }) : undefined;
  return verdict({
    figure: read,
    stated,
    predicted: spread?.peakToPeak ?? noise.rms,
    noise,
    spread,
    points: noise.standardUncertainty ?? 0,
    rounding,
    unknown: spread === undefined ? 0 : unknownMeasurement,
  });
}

interface Compared {
  readonly figure: StatedFigure;
  readonly stated: number;
  readonly predicted: number;
  readonly noise: BandNoise | undefined;
  readonly spread: PeakToPeak | undefined;
  readonly points: number;
  readonly rounding: number;
  readonly unknown: number;
}

function verdict({ figure, stated, predicted, noise, spread, points, rounding, unknown }: Compared): StatedFigureCheck {
  const total = Math.hypot(points, rounding, unknown);
  const difference = Math.log(stated / predicted);
  const outside = noise === undefined ? 0 : noise.outsidePoints.below + noise.outsidePoints.above;
  const notes = [...(noise?.notes ?? [])];
  if (unknown > 0)
    notes.push(
      "Filter, record length and number of records of the stated figure are not known; the comparison claims no more than a factor.",
    );
  if (outside > 0.1) notes.push(`${Math.round(100 * outside)} % of the band's power lies beyond the points.`);
  const significant = Math.abs(difference) > coverageFactor * total;
  return Object.freeze({
    figure,
    stated,
    predicted,
    noise,
    peakToPeak: spread,
    differenceDb: (20 / Math.LN10) * difference,
    tolerance: Object.freeze({ points, rounding, unknownMeasurement: unknown, total }),
    claim: significant ? (difference < 0 ? "stated lower" : "stated higher") : "within its tolerance",
    withinFactor: Math.exp(Math.abs(difference)),
    shareInsidePoints: 1 - outside,
    notes: Object.freeze(notes),
  });
}

function scaleOf({ unit, text }: StatedFigure, curveUnit: string, relativeTo: number | undefined): number {
  if (unit === curveUnit) return 1;
  if (unit === "1" && relativeTo !== undefined && relativeTo > 0) return relativeTo;
  const hint = unit === "1" ? "say what the ratio is of with relativeTo" : "give figure and curve in one unit";
  throw new OutOfDomainError(`The figure "${text.slice(0, 60)}" is in ${unit}, the curve in ${curveUnit}; ${hint}.`);
}

function nearestUncertainty({ points }: Curve, hz: number): number {
  const near = points.toSorted(
    (one, other) => Math.abs(Math.log(one.frequency / hz)) - Math.abs(Math.log(other.frequency / hz)),
  );
  return near[0]?.uncertainty ?? 0;
}
