import { OutOfDomainError } from "@quietband/core";
import { requirePositive } from "./domain.js";
import { factorOf, type PeakToPeak, type PeakToPeakConvention } from "./peak-to-peak.js";

/**
 * RMS value behind a peak-to-peak value of Gaussian noise: peak-to-peak / factor.
 *
 * @param given - peak-to-peak value, positive, in any unit; or what `peakToPeak` returned, which knows its own factor.
 * @param convention - how the value was made: `factor` (peak-to-peak / RMS, 6.6 unless given) or `shareOutside`.
 * @returns the RMS value in the unit given.
 * @throws OutOfDomainError for a value or factor that is not positive, or a convention beside a record that has one.
 *
 * @example
 * ```ts
 * import { rmsFromPeakToPeak } from "@quietband/figures";
 * rmsFromPeakToPeak(7.5e-6); // → 1.136e-6
 * ```
 */
export function rmsFromPeakToPeak(given: number | PeakToPeak, convention?: PeakToPeakConvention): number {
  if (given instanceof Object) {
    if (convention === undefined) return requirePositive("rms", given.rms);
    throw new OutOfDomainError(
      `The peak-to-peak value was made with the factor ${given.factor}; give no second convention, or the bare number with it.`,
    );
  }
  return requirePositive("The peak-to-peak value", given) / factorOf("rmsFromPeakToPeak", convention ?? {});
}
