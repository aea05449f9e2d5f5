import { requireFinite } from "./domain.js";
import { type Rms, rmsOf } from "./rms.js";

/**
 * Level of an amplitude over another in dB: 20·log10(amplitude/reference). Both are RMS values (or densities in
 * unit/√Hz); for powers see `powerRatioDb`.
 *
 * @param amplitude - RMS value or density, positive, or a result with an rms.
 * @param reference - the same quantity in the same unit; 1 when `amplitude` is a ratio of amplitudes already.
 * @throws OutOfDomainError for what is not positive, and for a peak-to-peak value.
 * Source: IEC 60027-3.
 *
 * @example
 * ```ts
 * import { amplitudeRatioDb } from "@quietband/figures";
 * amplitudeRatioDb(2); // → 6.0206
 * amplitudeRatioDb(4.07e-9, 40.7e-9); // → -20
 * ```
 */
export function amplitudeRatioDb(amplitude: Rms, reference: Rms = 1): number {
  return 20 * Math.log10(rmsOf("amplitude", amplitude) / rmsOf("reference", reference));
}

/**
 * Ratio of two amplitudes from their level difference: 10^(dB/20).
 *
 * @param db - finite, dB.
 *
 * @example
 * ```ts
 * import { amplitudeRatioFromDb } from "@quietband/figures";
 * amplitudeRatioFromDb(-60); // → 1.000e-3
 * ```
 */
export function amplitudeRatioFromDb(db: number): number {
  return 10 ** (requireFinite("The level", db, "dB") / 20);
}
