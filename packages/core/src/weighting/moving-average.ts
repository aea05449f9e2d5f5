import { requirePositive } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { sincSquared } from "../numerics/sinc-squared.js";
import { turnsOf } from "../numerics/turns.js";
import { inName, makeLobed } from "./make-weighting.js";
import { steady, wave } from "./waves.js";
import type { Weighting } from "./weighting.js";

/** What {@link movingAverage} takes. */
export interface MovingAverageOptions {
  /** Length of the average T, s; positive. */
  readonly seconds: number;
}

const needed: MovingAverageOptions = Object.freeze({ seconds: Number.NaN });

/**
 * Moving average over T: |H|² = (sin(πfT)/(πfT))².
 *
 * @throws OutOfDomainError for a length that is not positive and finite.
 *
 * @example
 * ```ts
 * import { movingAverage, noiseBandwidth } from "@quietband/core";
 * noiseBandwidth(movingAverage({ seconds: 0.02 })).hz; // → 25.000
 * ```
 */
export function movingAverage(options: MovingAverageOptions): Weighting {
  const { seconds } = completeOptions("movingAverage", needed, options);
  requirePositive("seconds", seconds, "s");
  return makeLobed({
    name: `moving average, ${inName(seconds)} s`,
    knots: [1 / seconds],
    lowExponent: 0,
    highExponent: 2,
    lobes: {
      lobeHz: 1 / seconds,
      peaksEveryHz: [],
      parts: [
        {
          envelopeAt: (hz: number) => 1 / (Math.PI * hz * seconds) ** 2,
          waves: [steady(0.5), wave(seconds, -0.5)],
        },
      ],
    },
    powerGainAt: (hz: number) => sincSquared(hz * seconds, turnsOf(hz, seconds)),
  });
}
