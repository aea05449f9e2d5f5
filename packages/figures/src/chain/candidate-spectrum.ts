import { type Spectrum, scaleSpectrum, sumSpectra } from "@quietband/core";
import type { Candidate } from "./candidate.js";
import type { Temperature } from "./temperature.js";
import { thermalNoise } from "./thermal-noise.js";

/** A source that a candidate stands at. */
export interface CandidateSource extends Temperature {
  /** Ω; nothing of the source counts where it is 0, the default. */
  readonly sourceOhms?: number | undefined;
}

/**
 * A candidate's noise where candidates are compared: behind its gain, and with a source of R ohms as e² + (i·R)² + 4kTR.
 *
 * @throws OutOfDomainError for a gain of zero, or units that do not meet.
 */
export function candidateSpectrum(
  { spectrum, currentNoise, gain = 1 }: Candidate,
  { sourceOhms = 0, kelvin, celsius }: CandidateSource,
): Spectrum {
  const own = gain === 1 ? spectrum : scaleSpectrum(spectrum, gain);
  if (sourceOhms === 0) return own;
  const across = currentNoise === undefined ? [] : [scaleSpectrum(currentNoise, sourceOhms, { unit: own.unit })];
  return sumSpectra(own, ...across, thermalNoise({ ohms: sourceOhms, kelvin, celsius }));
}
