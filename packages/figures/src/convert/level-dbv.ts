import { amplitudeRatioFromDb } from "./amplitude-ratio-db.js";
import { type Rms, rmsOf } from "./rms.js";

/**
 * Level re 1 V RMS: 20·log10(rms/1 V), dBV.
 *
 * @param rms - RMS voltage, V, positive, or a result with an rms.
 * @throws OutOfDomainError for what is not positive, and for a peak-to-peak value.
 *
 * @example
 * ```ts
 * import { levelDbv } from "@quietband/figures";
 * levelDbv(1.248e-6); // → -118.08
 * ```
 */
export function levelDbv(rms: Rms): number {
  return 20 * Math.log10(rmsOf("rms", rms, "V"));
}

/**
 * RMS voltage, V, of a level in dBV.
 *
 * @example
 * ```ts
 * import { rmsFromDbv } from "@quietband/figures";
 * rmsFromDbv(-10); // → 0.31623
 * ```
 */
export function rmsFromDbv(dbv: number): number {
  return amplitudeRatioFromDb(dbv);
}
