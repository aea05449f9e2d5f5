import { requirePositive } from "./domain.js";
import { type GaussianShare, peakToPeakFactorFor } from "./peak-to-peak-factor-for.js";
import { type Rms, rmsOf } from "./rms.js";

/**
 * Crest factor: peak / RMS. The trade's "crest factor 6.6" is a peak-to-peak factor; its crest factor is 3.3.
 *
 * @param peak - largest magnitude, positive, in the unit of `rms`.
 * @param rms - RMS value.
 * @throws OutOfDomainError for values that are not positive.
 *
 * @example
 * ```ts
 * import { crestFactor } from "@quietband/figures";
 * crestFactor(1, Math.SQRT1_2); // → 1.41421
 * ```
 */
export function crestFactor(peak: number, rms: Rms): number {
  return requirePositive("peak", peak) / rmsOf("rms", rms);
}

/**
 * Crest factor (peak / RMS) that a Gaussian signal exceeds in magnitude for a share of the time: half the peak-to-peak
 * factor of that share.
 *
 * @param share - as in `peakToPeakFactorFor`.
 * Source: H. W. Ott, Noise Reduction Techniques in Electronic Systems (1988), chapter 8, has the table.
 *
 * @example
 * ```ts
 * import { crestFactorFor } from "@quietband/figures";
 * crestFactorFor({ shareOutside: 0.01 }); // → 2.5758
 * ```
 */
export function crestFactorFor(share: GaussianShare): number {
  return peakToPeakFactorFor(share) / 2;
}
