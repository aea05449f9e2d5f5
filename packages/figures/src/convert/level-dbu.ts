import { amplitudeRatioFromDb } from "./amplitude-ratio-db.js";
import { type Rms, rmsOf } from "./rms.js";

/** √0.6 V, the voltage of 1 mW in 600 Ω. */
const reference = Math.sqrt(0.6);

/**
 * Level re √0.6 V = 0.7746 V RMS: 20·log10(rms/√0.6 V), dBu.
 *
 * @param rms - RMS voltage, V, positive, or a result with an rms.
 * @throws OutOfDomainError for what is not positive, and for a peak-to-peak value.
 * Source: ITU-R BS.645, IEC 60268.
 *
 * @example
 * ```ts
 * import { levelDbu } from "@quietband/figures";
 * levelDbu(1); // → 2.2185
 * ```
 */
export function levelDbu(rms: Rms): number {
  return 20 * Math.log10(rmsOf("rms", rms, "V") / reference);
}

/**
 * RMS voltage, V, of a level in dBu.
 *
 * @example
 * ```ts
 * import { rmsFromDbu } from "@quietband/figures";
 * rmsFromDbu(4); // → 1.2277
 * ```
 */
export function rmsFromDbu(dbu: number): number {
  return reference * amplitudeRatioFromDb(dbu);
}
