import {
  type BandNoise,
  bandNoise,
  cascade,
  DivergentIntegralError,
  firstOrderHighPass,
  OutOfDomainError,
  recordMeanRemoved,
  type Spectrum,
  spectralMoment,
  type Weighting,
} from "@quietband/core";
import { refuseUnknownKeys, requirePositive, shown } from "./domain.js";

/**
 * How the recorder is coupled. "dc": it sees the band as it is, with a brick wall at fromHz, which may be 0. "highPassed": a
 * first-order high-pass with its half-power frequency at fromHz stands in place of that wall. `highPassHz`: such a
 * high-pass besides the wall.
 */
export type RecordCoupling = "dc" | "highPassed" | { readonly highPassHz: number };

/** A band and what the noise passes on its way. */
export interface RecordBand {
  readonly fromHz: number;
  readonly toHz: number;
  readonly weighting?: Weighting | undefined;
}

/** The band that a coupled recorder sees. */
export function coupledBand({ fromHz, toHz, weighting }: RecordBand, coupling: RecordCoupling): RecordBand {
  if (coupling === "dc") return { fromHz, toHz, weighting };
  if (coupling === "highPassed") {
    const cutoffHz = requirePositive("fromHz, where the record is high-passed,", fromHz, "Hz");
    return { fromHz: 0, toHz, weighting: inFront(firstOrderHighPass({ cutoffHz }), weighting) };
  }
  if (typeof coupling === "object") {
    refuseUnknownKeys("coupling", ["highPassHz"], coupling);
    const cutoffHz = requirePositive(
      "highPassHz",
      (coupling as { highPassHz: number } | null)?.highPassHz as number,
      "Hz",
    );
    return { fromHz, toHz, weighting: inFront(firstOrderHighPass({ cutoffHz }), weighting) };
  }
  throw new OutOfDomainError(
    `coupling must be "dc", "highPassed" (first order, at fromHz) or { highPassHz }; got ${shown(coupling)}.`,
  );
}

/** Noise of the band a record sees. */
export interface RecordBandNoise {
  readonly noise: BandNoise;
  /** The band's own RMS is infinite, and `noise` is that about the record's mean. */
  readonly aboutMean: boolean;
}

/**
 * Noise of the band; where it is infinite because the band begins at 0 Hz, what a record shows about its own mean (finite
 * for exponents below 3), with a note that says so.
 */
export function recordBandNoise(spectrum: Spectrum, band: RecordBand, recordSeconds: number): RecordBandNoise {
  try {
    return { noise: bandNoise(spectrum, band), aboutMean: false };
  } catch (error) {
    if (!(error instanceof DivergentIntegralError && error.edge === "fromHz")) throw error;
    const weighting = inFront(recordMeanRemoved({ seconds: recordSeconds }), band.weighting);
    const noise = bandNoise(spectrum, { ...band, weighting });
    const note = `From 0 Hz the RMS of this noise is infinite: rms is what a record of ${recordSeconds} s shows about its own mean.`;
    return { noise: Object.freeze({ ...noise, notes: Object.freeze([...noise.notes, note]) }), aboutMean: true };
  }
}

/** Second spectral moment, unit²·Hz²; undefined where it is infinite and the noise is rough at every scale. */
export function secondMoment(spectrum: Spectrum, band: RecordBand): number | undefined {
  try {
    return spectralMoment(spectrum, 2, band).value;
  } catch (error) {
    if (error instanceof DivergentIntegralError && error.edge === "toHz") return undefined;
    throw error;
  }
}

function inFront(first: Weighting, weighting: Weighting | undefined): Weighting {
  return weighting === undefined ? first : cascade(first, weighting);
}
