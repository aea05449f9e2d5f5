import { bandNoise, cascade, recordMeanRemoved, type Spectrum, type Weighting } from "@quietband/core";
import { refuseUnknownKeys, requirePositive } from "../convert/domain.js";

/** What {@link observationNoise} takes. */
export interface ObservationNoiseOptions {
  /** Upper band edge, Hz. */
  readonly toHz: number;
  /** What the noise passes besides. */
  readonly weighting?: Weighting | undefined;
  /** Observation times, s; 10 s, 1 min, 10 min, 1 h and a day unless given. */
  readonly seconds?: readonly number[] | undefined;
}

/** Noise of a record of some length. */
export interface ObservedNoise {
  readonly seconds: number;
  /** RMS about the record's own mean, in the spectrum's unit. */
  readonly rms: number;
  /** RMS of the band from 1/seconds up, the usual shorthand. */
  readonly aboveInverse: number;
  /** Relative standard uncertainty of rms (k = 1), where the spectrum carries one. */
  readonly standardUncertainty?: number;
}

const usualTimes: readonly number[] = Object.freeze([10, 60, 600, 3600, 86_400]);

/**
 * Noise against observation time: the RMS that a record of T seconds shows about its own mean, ∫ S·|H|²·(1 − sinc²(fT)) df
 * from 0 Hz up. For 1/f noise it is the band from 0.400/T, not from 1/T; the shorthand stands beside it. White noise does not
 * depend on T, 1/f noise grows with the root of its logarithm, random walk with its root.
 *
 * @param spectrum - one-sided power density, defined from 0 Hz up, with an exponent below 3 there.
 * @throws OutOfDomainError for times that are not positive or a spectrum that does not reach down (say how it goes on with
 *   `beyond`); DivergentIntegralError.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { observationNoise } from "@quietband/figures";
 * const rows = observationNoise(whiteFlicker({ floor: 70e-9, cornerHz: 60 }), { toHz: 10, seconds: [10, 86400] });
 * rows[0]?.rms; // → 1.2929e-6
 * rows[1]?.rms; // → 2.0825e-6
 * ```
 */
export function observationNoise(spectrum: Spectrum, options: ObservationNoiseOptions): readonly ObservedNoise[] {
  refuseUnknownKeys("observationNoise", ["toHz", "weighting", "seconds"], options);
  const { toHz, weighting, seconds = usualTimes } = options;
  return Object.freeze(
    seconds.map((time): ObservedNoise => {
      requirePositive("Each of seconds", time, "s");
      const ownMean = recordMeanRemoved({ seconds: time });
      const through = weighting === undefined ? ownMean : cascade(ownMean, weighting);
      const { rms, standardUncertainty } = bandNoise(spectrum, { fromHz: 0, toHz, weighting: through });
      return Object.freeze({
        seconds: time,
        rms,
        aboveInverse: bandNoise(spectrum, { fromHz: 1 / time, toHz, weighting }).rms,
        ...(standardUncertainty !== undefined && { standardUncertainty }),
      });
    }),
  );
}
