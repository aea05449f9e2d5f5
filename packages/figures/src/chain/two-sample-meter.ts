import { bandNoise, cascade, powerLaws, type Spectrum, twoSampleVariance, type Weighting } from "@quietband/core";
import { plainTerms } from "./band-meter.js";

/** Two-sample variance of a noise against averaging time, and how steeply it falls. */
export interface TwoSampleMeter {
  /** unit². */
  varianceAt(seconds: number): number;
  /** d ln variance / d ln seconds: −1 for white noise, 0 on a 1/f floor, 1 for random walk. */
  slopeAt(seconds: number): number;
}

/** What the noise passes before it is averaged. */
export interface TwoSamplePath {
  readonly weighting: Weighting | undefined;
  readonly fromHz: number;
  readonly toHz: number;
}

export function twoSampleMeter(spectrum: Spectrum, path: TwoSamplePath): TwoSampleMeter {
  const terms = plainTerms(spectrum);
  const open = path.weighting === undefined && path.fromHz === 0 && path.toHz === Number.POSITIVE_INFINITY;
  if (terms === undefined || !open) return byIntegrals(spectrum, path);
  // f^−a gives τ^(a−1): one integral a term, at 1 s.
  const weighting = twoSampleVariance({ seconds: 1 });
  const laws = terms.map(({ at, level, exponent }) => {
    const law = powerLaws([{ coefficient: 1, exponent }], { unit: spectrum.unit });
    const { power } = bandNoise(law, { fromHz: 0, toHz: Number.POSITIVE_INFINITY, weighting });
    return { atOneSecond: power * level * at ** exponent, slope: exponent - 1 };
  });
  const sumOver = (seconds: number, weight: (slope: number) => number): number =>
    laws.reduce((sum, { atOneSecond, slope }) => sum + weight(slope) * atOneSecond * seconds ** slope, 0);
  return {
    varianceAt: (seconds) => sumOver(seconds, () => 1),
    slopeAt: (seconds) => sumOver(seconds, (slope) => slope) / sumOver(seconds, () => 1),
  };
}

/** Width in ln τ of the differences that make a slope; two widths together leave an error of its fourth power. */
const step = 0.05;

function byIntegrals(spectrum: Spectrum, { weighting, fromHz, toHz }: TwoSamplePath): TwoSampleMeter {
  // Only the values are wanted: without sensitivities no uncertainty is integrated.
  const { sensitivities: _, pointsSpan: __, ...bare } = spectrum;
  const varianceAt = (seconds: number): number => {
    const kernel = twoSampleVariance({ seconds });
    const through = weighting === undefined ? kernel : cascade(kernel, weighting);
    return bandNoise(bare, { fromHz, toHz, weighting: through, relativeTolerance: 1e-10 }).power;
  };
  const difference = (seconds: number, width: number): number =>
    Math.log(varianceAt(seconds * Math.exp(width)) / varianceAt(seconds * Math.exp(-width))) / (2 * width);
  return {
    varianceAt,
    slopeAt: (seconds) => (4 * difference(seconds, step) - difference(seconds, 2 * step)) / 3,
  };
}
