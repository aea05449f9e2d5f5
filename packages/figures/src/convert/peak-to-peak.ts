import { OutOfDomainError } from "@quietband/core";
import { refuseUnknownKeys, requirePositive } from "./domain.js";
import { peakToPeakFactorFor } from "./peak-to-peak-factor-for.js";
import { type Rms, rmsOf } from "./rms.js";
import { shareOutside } from "./share-outside.js";

/** How a peak-to-peak value is made from an RMS value: by a factor, or by the share of time outside it. */
export interface PeakToPeakConvention {
  /** Peak-to-peak / RMS; 6.6 unless given. */
  readonly factor?: number | undefined;
  /** Instead of a factor: share of time outside, above 0 and below 1. */
  readonly shareOutside?: number | undefined;
}

/** A peak-to-peak value and the convention it rests on. Not a level: levels are of RMS values. */
export interface PeakToPeak {
  readonly kind: "peak-to-peak";
  /** In the unit of `rms`. */
  readonly peakToPeak: number;
  readonly rms: number;
  /** Peak-to-peak / RMS. The crest factor, peak / RMS, is half of it. */
  readonly factor: number;
  /** Share of time a Gaussian signal spends outside. */
  readonly shareOutside: number;
  /** The convention in words, for reports. */
  readonly convention: string;
}

/** Common practice, not a standard: ± 3.3 σ. */
export const peakToPeakDefaults: { readonly factor: number } = Object.freeze({ factor: 6.6 });

/**
 * Peak-to-peak value of Gaussian noise by a convention: factor · rms.
 *
 * It says what is outside for a fraction of the time, not what a record of some seconds shows: for that see
 * `expectedPeakToPeak`.
 *
 * @param rms - RMS value in any unit, positive, or a result that carries one.
 * @param convention - `factor` (peak-to-peak / RMS, 6.6 unless given) or `shareOutside`.
 * @returns the value with its convention and share outside.
 * @throws OutOfDomainError for an rms or a factor that is not positive, for both a factor and a share.
 *
 * @example
 * ```ts
 * import { peakToPeak } from "@quietband/figures";
 * const noise = peakToPeak(1.14e-6);
 * noise.peakToPeak; // → 7.52e-6
 * noise.convention; // → 6.6 × RMS (common practice), 0.0967 % of the time outside
 * ```
 */
export function peakToPeak(rms: Rms, convention: PeakToPeakConvention = {}): PeakToPeak {
  const value = rmsOf("rms", rms);
  const factor = factorOf("peakToPeak", convention);
  const outside = convention.shareOutside ?? shareOutside(factor);
  return Object.freeze({
    kind: "peak-to-peak",
    peakToPeak: factor * value,
    rms: value,
    factor,
    shareOutside: outside,
    convention: inWords(factor, outside),
  });
}

/** The factor a convention stands for; `where` names the function in messages. */
export function factorOf(where: string, convention: PeakToPeakConvention): number {
  refuseUnknownKeys(where, ["factor", "shareOutside"], convention);
  const { factor, shareOutside: share } = convention;
  if (share === undefined) return requirePositive("factor, peak-to-peak / RMS,", factor ?? peakToPeakDefaults.factor);
  if (factor === undefined) return peakToPeakFactorFor({ shareOutside: share });
  throw new OutOfDomainError(`${where} takes factor or shareOutside, not both: each follows from the other.`);
}

function inWords(factor: number, outside: number): string {
  const practice = factor === peakToPeakDefaults.factor ? " (common practice)" : "";
  return `${Number(factor.toPrecision(4))} × RMS${practice}, ${Number((100 * outside).toPrecision(3))} % of the time outside`;
}
