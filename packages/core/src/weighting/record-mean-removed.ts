import { requirePositive } from "../ground/domain.js";
import { completeOptions } from "../ground/options.js";
import { sincSquared } from "../numerics/sinc-squared.js";
import { turnsOf } from "../numerics/turns.js";
import { inName, makeLobed } from "./make-weighting.js";
import { steady, wave } from "./waves.js";
import type { Weighting } from "./weighting.js";

/** What {@link recordMeanRemoved} takes. */
export interface RecordMeanRemovedOptions {
  /** Length of the record T, s; positive. */
  readonly seconds: number;
}

const needed: RecordMeanRemovedOptions = Object.freeze({ seconds: Number.NaN });

/**
 * What a dc-coupled record of T seconds shows once its own mean is gone: |H|² = 1 − (sin(πfT)/(πfT))².
 *
 * Its variance is the mean over the record of (v − mean)². It converges from 0 Hz for exponents below 3 and equals, for pure
 * 1/f noise, a lower band edge of e^(3/2 − γ)/(2πT) = 0.400/T, not 1/T.
 *
 * @throws OutOfDomainError for a length that is not positive and finite.
 *
 * @example
 * ```ts
 * import { bandNoise, powerLaws, recordMeanRemoved } from "@quietband/core";
 * const flicker = powerLaws([{ coefficient: 1e-12, exponent: 1 }]);
 * const weighting = recordMeanRemoved({ seconds: 10 });
 * bandNoise(flicker, { fromHz: 0, toHz: 100, weighting }).rms; // → 2.797e-6
 * bandNoise(flicker, { fromHz: 0.0400, toHz: 100 }).rms; // → 2.797e-6
 * ```
 */
export function recordMeanRemoved(options: RecordMeanRemovedOptions): Weighting {
  const { seconds } = completeOptions("recordMeanRemoved", needed, options);
  requirePositive("seconds", seconds, "s");
  return makeLobed({
    name: `mean removed over ${inName(seconds)} s`,
    knots: [0.5 / seconds, 1 / seconds],
    lowExponent: -2,
    highExponent: 0,
    lobes: {
      lobeHz: 1 / seconds,
      peaksEveryHz: [],
      parts: [
        { envelopeAt: () => 1, waves: [steady(1)] },
        { envelopeAt: (hz: number) => -1 / (Math.PI * hz * seconds) ** 2, waves: [steady(0.5), wave(seconds, -0.5)] },
      ],
    },
    powerGainAt(hz: number): number {
      const turns = hz * seconds;
      return turns < 0.5 ? lossOfMean(Math.PI * turns) : 1 - sincSquared(turns, turnsOf(hz, seconds));
    },
  });
}

/** 1 − (sin x/x)² = Σ_{k≥1} (−1)^(k+1) 2^(2k+1) x^(2k)/(2k + 2)!, for x below π/2, where its terms lose a factor of two. */
function lossOfMean(x: number): number {
  const square = 4 * x * x;
  let term = square / 12;
  let sum = term;
  for (let k = 2; k < 20 && Math.abs(term) > 1e-18 * sum; k += 1) {
    term *= -square / ((2 * k + 1) * (2 * k + 2));
    sum += term;
  }
  return sum;
}
