import { requireNotNegative } from "./domain.js";
import { normalTail } from "./normal-tail.js";

/**
 * Share of time a Gaussian signal spends outside ± half a peak-to-peak value: erfc(factor/(2√2)), both tails together.
 *
 * @param peakToPeakFactor - peak-to-peak / RMS, not negative (6.6 by common practice). A crest factor, peak / RMS, is half
 *   of it.
 * @returns the share, 0 to 1; relative error below 1e-14 down to 1e-300.
 * @throws OutOfDomainError for a negative or non-finite factor.
 * Source: Abramowitz and Stegun, 26.2 (normal law); own Chebyshev series, checked at 50 digits.
 *
 * @example
 * ```ts
 * import { shareOutside } from "@quietband/figures";
 * shareOutside(6.6); // → 9.668483e-4
 * ```
 */
export function shareOutside(peakToPeakFactor: number): number {
  return 2 * normalTail(requireNotNegative("peakToPeakFactor, peak-to-peak / RMS,", peakToPeakFactor) / 2);
}
