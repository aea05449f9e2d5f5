import { requirePositive, requireWhole } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { turnsOf } from "../numerics/turns.js";
import { averageEnvelope, averageGain } from "./average-gain.js";
import { inName, makeLobed } from "./make-weighting.js";
import { evenSinePower } from "./waves.js";
import type { Weighting } from "./weighting.js";

/** What {@link averageOfReadings} takes. */
export interface AverageOfReadingsOptions {
  /** Number of readings n, 2 to 2³⁰. */
  readonly count: number;
  /** Time T from one reading to the next, s; positive. */
  readonly periodSeconds: number;
}

const needed: AverageOfReadingsOptions = Object.freeze({ count: Number.NaN, periodSeconds: Number.NaN });

/**
 * Average of n readings taken at a period T: |H|² = |sin(πnfT)/(n sin(πfT))|², which repeats at 1/T.
 *
 * White noise falls by n in power; noise near multiples of 1/T is not averaged at all.
 *
 * @throws OutOfDomainError for a count or period out of range.
 *
 * @example
 * ```ts
 * import { averageOfReadings, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(averageOfReadings({ count: 16, periodSeconds: 0.01 })).hz; // → 3.1250
 * ```
 */
export function averageOfReadings(options: AverageOfReadingsOptions): Weighting {
  const { count, periodSeconds } = completeOptions("averageOfReadings", needed, options);
  requireWhole("count", count, 2, 2 ** 30);
  requirePositive("periodSeconds", periodSeconds, "s");
  const lobeHz = 1 / (count * periodSeconds);
  return makeLobed({
    name: `average of ${count} readings, one in ${inName(periodSeconds)} s`,
    knots: [lobeHz],
    lowExponent: 0,
    highExponent: 0,
    repeatsHz: 1 / periodSeconds,
    lobes: {
      lobeHz,
      peaksEveryHz: [1 / periodSeconds],
      parts: [
        {
          envelopeAt: (hz: number) => averageEnvelope(turnsOf(hz, periodSeconds), count, 1),
          waves: evenSinePower(1, count * periodSeconds),
        },
      ],
    },
    powerGainAt: (hz: number) => averageGain(turnsOf(hz, periodSeconds), count, 1),
  });
}
