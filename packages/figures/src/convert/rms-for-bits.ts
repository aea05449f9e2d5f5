import { refuseUnknownKeys, requireNotNegative, requirePositive } from "./domain.js";
import { peakToPeakDefaults } from "./peak-to-peak.js";

/** What the inverse converter figures take. */
export interface RmsForBitsOptions {
  /** Largest minus smallest input, in the unit the RMS is wanted in; positive. */
  readonly rangePeakToPeak: number;
  /** Peak-to-peak / RMS of "noise-free"; 6.6 unless given. */
  readonly factor?: number | undefined;
}

/**
 * RMS noise allowed for a number of noise-free bits: range/(factor·2^bits).
 *
 * @param bits - noise-free bits wanted, not negative; need not be whole.
 * @param options - `rangePeakToPeak`, required, and `factor`.
 * @throws OutOfDomainError for values out of range.
 *
 * @example
 * ```ts
 * import { rmsForNoiseFreeBits } from "@quietband/figures";
 * rmsForNoiseFreeBits(18, { rangePeakToPeak: 5 }); // → 2.88992e-6
 * ```
 */
export function rmsForNoiseFreeBits(bits: number, options: RmsForBitsOptions): number {
  refuseUnknownKeys("rmsForNoiseFreeBits", ["rangePeakToPeak", "factor"], options);
  const factor = requirePositive("factor, peak-to-peak / RMS,", options.factor ?? peakToPeakDefaults.factor);
  return rangeOf(options) / (factor * 2 ** requireNotNegative("bits", bits));
}

/**
 * RMS noise allowed for a number of noise-limited effective bits: range/(√12·2^bits), as much as an ideal converter of
 * that resolution makes by rounding.
 *
 * @param bits - effective bits wanted, not negative; need not be whole.
 * @param options - `rangePeakToPeak`, required.
 * @throws OutOfDomainError for values out of range.
 *
 * @example
 * ```ts
 * import { rmsForEffectiveBits } from "@quietband/figures";
 * rmsForEffectiveBits(16, { rangePeakToPeak: 5 }); // → 2.2024e-5
 * ```
 */
export function rmsForEffectiveBits(bits: number, options: { readonly rangePeakToPeak: number }): number {
  refuseUnknownKeys("rmsForEffectiveBits", ["rangePeakToPeak"], options);
  return rangeOf(options) / (Math.sqrt(12) * 2 ** requireNotNegative("bits", bits));
}

/**
 * RMS noise allowed for an effective resolution: range/2^bits.
 *
 * @param bits - effective resolution wanted, not negative; need not be whole.
 * @param options - `rangePeakToPeak`, required.
 * @throws OutOfDomainError for values out of range.
 *
 * @example
 * ```ts
 * import { rmsForEffectiveResolution } from "@quietband/figures";
 * rmsForEffectiveResolution(20, { rangePeakToPeak: 5 }); // → 4.76837e-6
 * ```
 */
export function rmsForEffectiveResolution(bits: number, options: { readonly rangePeakToPeak: number }): number {
  refuseUnknownKeys("rmsForEffectiveResolution", ["rangePeakToPeak"], options);
  return rangeOf(options) / 2 ** requireNotNegative("bits", bits);
}

function rangeOf(options: { readonly rangePeakToPeak: number }): number {
  return requirePositive("rangePeakToPeak, largest minus smallest input,", options.rangePeakToPeak);
}
