import { OutOfDomainError } from "@quietband/core";
import { refuseUnknownKeys, requireInside } from "./domain.js";
import { centralNormalQuantile, upperNormalQuantile } from "./normal-quantile.js";

/** What {@link peakToPeakFactorFor} takes: one of the two. */
export interface GaussianShare {
  /** Share of time outside ± half the peak-to-peak value, both sides together; above 0 and below 1. */
  readonly shareOutside?: number;
  /** Share of time inside: the same said from the other side, for shares so near to 0 that 1 − share loses them. */
  readonly shareInside?: number;
}

/**
 * Peak-to-peak factor (peak-to-peak / RMS) that leaves a share of time outside, for a Gaussian signal: 2√2·erfc⁻¹(share).
 *
 * @param share - `shareOutside` (or `shareInside`), above 0 and below 1.
 * @returns the factor; relative error below 1e-15 for shares from 1e-300 up.
 * @throws OutOfDomainError for a share out of range, for none or both.
 * Source: Wichura, Algorithm AS 241 (1988).
 *
 * @example
 * ```ts
 * import { peakToPeakFactorFor } from "@quietband/figures";
 * // 6.6 is near, but not at, a thousandth of the time
 * peakToPeakFactorFor({ shareOutside: 0.001 }); // → 6.581053
 * ```
 */
export function peakToPeakFactorFor(share: GaussianShare): number {
  refuseUnknownKeys("peakToPeakFactorFor", ["shareOutside", "shareInside"], share);
  const { shareOutside, shareInside } = share;
  if ((shareOutside === undefined) === (shareInside === undefined))
    throw new OutOfDomainError(
      "peakToPeakFactorFor takes shareOutside, the share of time beyond ± half the peak-to-peak value, or shareInside; give exactly one.",
    );
  if (shareOutside !== undefined)
    return 2 * upperNormalQuantile(requireInside("shareOutside", shareOutside, [0, 1]) / 2);
  const inside = requireInside("shareInside", shareInside as number, [0, 1]);
  return 2 * (inside < 0.85 ? centralNormalQuantile(inside / 2) : upperNormalQuantile((1 - inside) / 2));
}
