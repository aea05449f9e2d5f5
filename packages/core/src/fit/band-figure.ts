import { bandNoise } from "../band/band-noise.js";
import { assumedPointUncertainty } from "../curve/assumed-point-uncertainty.js";
import { requireBand, requirePositive } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { refuseUnknownKeys } from "../ground/options.js";
import { powerLaws } from "../spectrum/power-laws.js";
import type { Weighting } from "../weighting/weighting.js";

/** A stated noise of a band: `rms`, or `peakToPeak` with the factor it was stated or taken with. */
export interface BandFigure {
  /** Hz. */
  readonly fromHz: number;
  readonly toHz: number;
  /** RMS, in the unit of the answer. */
  readonly rms?: number | undefined;
  /** Peak-to-peak value, in the unit of the answer. */
  readonly peakToPeak?: number | undefined;
  /** Peak-to-peak over RMS: 6.6 by common practice, but it has to be said. */
  readonly peakToPeakFactor?: number | undefined;
  /** Standard uncertainty (k = 1) of that factor, in the factor's own units. */
  readonly peakToPeakFactorUncertainty?: number | undefined;
  /** Half a unit of the last digit the figure was stated with, in the unit of the answer. */
  readonly roundingHalfUnit?: number | undefined;
  /** Relative standard uncertainty (k = 1) of the figure besides. */
  readonly uncertainty?: number | undefined;
  /** What the figure was measured through; a brick wall from fromHz to toHz unless given. */
  readonly weighting?: Weighting | undefined;
  /** How the answer names it; its band unless given. */
  readonly label?: string | undefined;
}

/** A density stated at one frequency. */
export interface SpotDensity {
  /** Hz. */
  readonly frequency: number;
  /** unit/√Hz. */
  readonly density: number;
  readonly roundingHalfUnit?: number | undefined;
  /** Relative standard uncertainty (k = 1). */
  readonly uncertainty?: number | undefined;
  readonly label?: string | undefined;
}

/** One cause of a figure's uncertainty, relative, k = 1. */
export interface FigureDoubt {
  readonly cause: "stated uncertainty" | "rounding" | "peak-to-peak factor" | "assumed";
  readonly relative: number;
}

/** A figure as the solver sees it. */
export interface FigureReading {
  readonly label: string;
  readonly span: readonly [number, number];
  /** RMS or density as stated. */
  readonly value: number;
  readonly doubts: readonly FigureDoubt[];
  /** Relative half unit of its rounding; 0 where none was stated. */
  readonly rounding: number;
  /** What a floor of power density 1 gives here. */
  readonly floorPower: number;
  /** ln of the power that (at/f)^exponent gives here. */
  flickerLog(exponent: number, at: number): number;
  /** Its slope by the exponent. */
  flickerSlope(exponent: number, at: number): number;
}

const bandKeys = [
  "fromHz",
  "toHz",
  "rms",
  "peakToPeak",
  "peakToPeakFactor",
  "peakToPeakFactorUncertainty",
  "roundingHalfUnit",
  "uncertainty",
  "weighting",
  "label",
];

export function readingOfBand(figure: BandFigure, index: number): FigureReading {
  const place = `figures[${index}]`;
  refuseUnknownKeys(place, bandKeys, figure);
  const { fromHz, toHz, weighting } = figure;
  requireBand(fromHz, toHz);
  const stated = statedValue(figure, place);
  const band = { fromHz, toHz, weighting };
  const flickerLog = (exponent: number, at: number): number =>
    Math.log(bandNoise(powerLaws([{ coefficient: at ** exponent, exponent }]), band).power);
  return {
    label: figure.label ?? `${fromHz} Hz to ${toHz} Hz`,
    span: [fromHz, toHz],
    ...stated,
    floorPower: bandNoise(powerLaws([{ coefficient: 1, exponent: 0 }]), band).power,
    flickerLog,
    flickerSlope(exponent, at) {
      // five points: the power is smooth in the exponent, and 1e-9 of a slope is more than a search needs
      const h = 1 / 64;
      const difference = (steps: number): number =>
        flickerLog(exponent + steps * h, at) - flickerLog(exponent - steps * h, at);
      return (8 * difference(1) - difference(2)) / (12 * h);
    },
  };
}

export function readingOfSpot(spot: SpotDensity, place: string): FigureReading {
  refuseUnknownKeys(place, ["frequency", "density", "roundingHalfUnit", "uncertainty", "label"], spot);
  const frequency = requirePositive(`${place}.frequency`, spot.frequency, "Hz");
  const value = requirePositive(`${place}.density`, spot.density);
  return {
    label: spot.label ?? `density at ${frequency} Hz`,
    span: [frequency, frequency],
    value,
    ...doubtsOf(spot, value, place),
    floorPower: 1,
    flickerLog: (exponent, at) => exponent * Math.log(at / frequency),
    flickerSlope: (_exponent, at) => Math.log(at / frequency),
  };
}

function statedValue(figure: BandFigure, place: string): Pick<FigureReading, "value" | "doubts" | "rounding"> {
  const { rms, peakToPeak, peakToPeakFactor, peakToPeakFactorUncertainty: spread } = figure;
  if ((rms === undefined) === (peakToPeak === undefined))
    throw new OutOfDomainError(
      `${place} must state either rms or peakToPeak with its peakToPeakFactor; got ${rms === undefined ? "neither" : "both"}.`,
    );
  if (rms !== undefined) {
    if (peakToPeakFactor !== undefined || spread !== undefined)
      throw new OutOfDomainError(`${place} states an rms, which takes no peakToPeakFactor; leave the factor out.`);
    const value = requirePositive(`${place}.rms`, rms);
    return { value, ...doubtsOf(figure, value, place) };
  }
  const stated = requirePositive(`${place}.peakToPeak`, peakToPeak as number);
  if (peakToPeakFactor === undefined)
    throw new OutOfDomainError(
      `${place} states a peak-to-peak value, so it needs the peakToPeakFactor it was taken with (6.6 by common practice); got nothing.`,
    );
  const factor = requirePositive(`${place}.peakToPeakFactor`, peakToPeakFactor);
  const { doubts, rounding } = doubtsOf(figure, stated, place, factorDoubts(place, factor, spread));
  return { value: stated / factor, doubts, rounding };
}

function factorDoubts(place: string, factor: number, spread: number | undefined): readonly FigureDoubt[] {
  if (spread === undefined) return [];
  const relative = requirePositive(`${place}.peakToPeakFactorUncertainty`, spread) / factor;
  return [{ cause: "peak-to-peak factor", relative }];
}

function doubtsOf(
  { roundingHalfUnit, uncertainty }: Pick<BandFigure, "roundingHalfUnit" | "uncertainty">,
  stated: number,
  place: string,
  others: readonly FigureDoubt[] = [],
): Pick<FigureReading, "doubts" | "rounding"> {
  const doubts: FigureDoubt[] = [...others];
  let rounding = 0;
  if (uncertainty !== undefined) {
    if (!(uncertainty > 0 && uncertainty <= 1))
      throw new OutOfDomainError(
        `${place}.uncertainty must be above 0 and at most 1 (a relative standard uncertainty); got ${uncertainty}.`,
      );
    doubts.push({ cause: "stated uncertainty", relative: uncertainty });
  }
  if (roundingHalfUnit !== undefined) {
    rounding = requirePositive(`${place}.roundingHalfUnit`, roundingHalfUnit) / stated;
    if (rounding >= 1)
      throw new OutOfDomainError(
        `${place}.roundingHalfUnit must be smaller than the figure, ${stated}; got ${roundingHalfUnit}.`,
      );
    doubts.push({ cause: "rounding", relative: rounding / Math.sqrt(3) });
  }
  if (doubts.length === 0) doubts.push({ cause: "assumed", relative: assumedPointUncertainty });
  return { doubts, rounding };
}
