import { requireFinite, requirePositive } from "./domain.js";

/**
 * Level of a power over another in dB: 10·log10(power/reference).
 *
 * There is no function that takes a ratio without saying of what: of amplitudes the same ratio is twice as many dB
 * (`amplitudeRatioDb`).
 *
 * @param power - power, power density or squared RMS, positive.
 * @param reference - the same quantity in the same unit; 1 when `power` is a ratio of powers already.
 * @throws OutOfDomainError for what is not positive.
 * Source: IEC 60027-3.
 *
 * @example
 * ```ts
 * import { powerRatioDb } from "@quietband/figures";
 * powerRatioDb(2); // → 3.0103
 * powerRatioDb(1e-18, 4e-18); // → -6.0206
 * ```
 */
export function powerRatioDb(power: number, reference = 1): number {
  return 10 * Math.log10(requirePositive("power", power) / requirePositive("reference", reference));
}

/**
 * Ratio of two powers from their level difference: 10^(dB/10).
 *
 * @param db - finite, dB.
 *
 * @example
 * ```ts
 * import { powerRatioFromDb } from "@quietband/figures";
 * powerRatioFromDb(3); // → 1.99526
 * ```
 */
export function powerRatioFromDb(db: number): number {
  return 10 ** (requireFinite("The level", db, "dB") / 10);
}
