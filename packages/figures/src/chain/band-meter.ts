import {
  type BandNoise,
  bandNoise,
  type PowerLawTerm,
  powerLaws,
  type Spectrum,
  type Weighting,
} from "@quietband/core";

/** Band noise as a budget needs it. */
export type MeasuredBand = Pick<
  BandNoise,
  "power" | "numericalError" | "outsidePoints" | "notes" | "standardUncertainty"
>;

/** Measures spectra over one band, each behind its weighting. */
export type BandMeter = (spectrum: Spectrum, weighting: Weighting | undefined) => MeasuredBand;

/** Far beyond any noise; steeper laws go the way of bandNoise, which anchors them where they cannot overflow. */
const steepestShared = 20;

/**
 * Band noise for many sources at once. A spectrum met again behind the same weighting is measured once, and models that are
 * sums of power laws share one integral for each exponent: a thousand white and 1/f sources cost two.
 */
export function bandMeter(fromHz: number, toHz: number): BandMeter {
  const behind = new Map<Weighting | undefined, BandMeter>();
  return (spectrum, weighting) => {
    const known = behind.get(weighting);
    if (known !== undefined) return known(spectrum, weighting);
    const meter = meterBehind(weighting, fromHz, toHz);
    behind.set(weighting, meter);
    return meter(spectrum, weighting);
  };
}

function meterBehind(weighting: Weighting | undefined, fromHz: number, toHz: number): BandMeter {
  const spectra = new Map<Spectrum, MeasuredBand>();
  const laws = new Map<number, BandNoise>();
  const lawOf = (exponent: number): BandNoise => {
    const known = laws.get(exponent);
    if (known !== undefined) return known;
    const law = bandNoise(powerLaws([{ coefficient: 1, exponent }]), { fromHz, toHz, weighting });
    laws.set(exponent, law);
    return law;
  };
  return (spectrum) => {
    const known = spectra.get(spectrum);
    if (known !== undefined) return known;
    const terms = plainTerms(spectrum);
    const found = terms === undefined ? bandNoise(spectrum, { fromHz, toHz, weighting }) : sumOfLaws(terms, lawOf);
    spectra.set(spectrum, found);
    return found;
  };
}

/** The terms of a model that is one sum of power laws at all frequencies and carries nothing else. */
export function plainTerms({ pieces, pointsSpan, sensitivities }: Spectrum): readonly PowerLawTerm[] | undefined {
  const [piece, ...others] = pieces ?? [];
  if (piece === undefined || others.length > 0 || pointsSpan !== undefined || sensitivities !== undefined)
    return undefined;
  if (piece.from > 0 || piece.to < Number.POSITIVE_INFINITY) return undefined;
  return piece.terms.every(({ exponent }) => Math.abs(exponent) <= steepestShared) ? piece.terms : undefined;
}

function sumOfLaws(terms: readonly PowerLawTerm[], lawOf: (exponent: number) => BandNoise): MeasuredBand {
  let power = 0;
  let error = 0;
  for (const { at, level, exponent } of terms) {
    const law = lawOf(exponent);
    const part = law.power * level * at ** exponent;
    power += part;
    error += part * (2 * law.numericalError + 4 * Number.EPSILON);
  }
  return {
    power,
    numericalError: power === 0 ? 0 : (0.5 * error) / power + terms.length * Number.EPSILON,
    outsidePoints: nothingOutside,
    notes: noNotes,
  };
}

const nothingOutside: BandNoise["outsidePoints"] = Object.freeze({ below: 0, above: 0 });
const noNotes: readonly string[] = Object.freeze([]);
