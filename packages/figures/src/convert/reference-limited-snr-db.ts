import { refuseUnknownKeys, requirePositive } from "./domain.js";
import { type Rms, rmsOf } from "./rms.js";

/** What {@link referenceLimitedSnrDb} takes. */
export interface ReferenceLimit {
  /** V, positive. */
  readonly referenceVolts: number;
  /** Noise of the reference in the band that reaches the output, V RMS. */
  readonly noiseRms: Rms;
}

/**
 * Signal-to-noise ratio when only the reference is noisy: 20·log10(V_ref/n_ref), dB. The noise seen is that of the
 * reference times input/reference, so the ratio is the same at every input level, dc or slow; it holds behind a filter
 * only while tone and noise band pass.
 *
 * @throws OutOfDomainError for what is not positive, and for a peak-to-peak value.
 *
 * @example
 * ```ts
 * import { referenceLimitedSnrDb } from "@quietband/figures";
 * referenceLimitedSnrDb({ referenceVolts: 2.5, noiseRms: 10e-6 }); // → 107.959
 * ```
 */
export function referenceLimitedSnrDb(limit: ReferenceLimit): number {
  refuseUnknownKeys("referenceLimitedSnrDb", ["referenceVolts", "noiseRms"], limit);
  const volts = requirePositive("referenceVolts", limit.referenceVolts, "V");
  return 20 * Math.log10(volts / rmsOf("noiseRms", limit.noiseRms, "V"));
}
