import { requirePositive, requireWhole } from "../ground/domain.js";
import { inName, makeWeighting } from "./make-weighting.js";
import { sincDecimator } from "./sinc-decimator.js";
import type { Weighting } from "./weighting.js";

/**
 * Average of n readings taken at a period T: |H|² = |sin(πnfT)/(n sin(πfT))|², which repeats at 1/T.
 *
 * White noise falls by n in power; noise near multiples of 1/T is not averaged at all.
 *
 * @param options - `count` n, at least 2; `periodSeconds`, the time between readings.
 * @throws OutOfDomainError for a count or period out of range.
 *
 * @example
 * ```ts
 * import { averageOfReadings, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(averageOfReadings({ count: 16, periodSeconds: 0.01 })).hz; // → 3.1250
 * ```
 */
export function averageOfReadings(options: { readonly count: number; readonly periodSeconds: number }): Weighting {
  const { count, periodSeconds } = options;
  requireWhole("count", count, 2, 2 ** 30);
  requirePositive("periodSeconds", periodSeconds, "s");
  return makeWeighting({
    ...sincDecimator({ order: 1, ratio: count, modulatorRateHz: 1 / periodSeconds }),
    name: `average of ${count} readings, one in ${inName(periodSeconds)} s`,
  });
}
