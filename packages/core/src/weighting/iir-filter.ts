import { requirePositive } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { requireCoefficients } from "./coefficients.js";
import { inName, makeWeighting } from "./make-weighting.js";
import { tapGain } from "./tap-gain.js";
import { turnsAtRate } from "./turns-at-rate.js";
import type { Weighting } from "./weighting.js";

/** What {@link iirFilter} takes: y[k] = (Σ numerator[i]·x[k−i] − Σ_{i≥1} denominator[i]·y[k−i]) / denominator[0]. */
export interface IirFilterOptions {
  readonly numerator: readonly number[];
  readonly denominator: readonly number[];
  readonly sampleRateHz: number;
}

/** Samples a coefficient over which peaks of the gain are looked for. */
const samplesACoefficient = 64;

/**
 * A recursive digital filter: |H|² = |Σ b_k e^(−2πikf/f_s)|²/|Σ a_k e^(−2πikf/f_s)|², which repeats at f_s.
 *
 * @throws MalformedDataError for coefficients that are empty or not finite; OutOfDomainError for an unstable filter (a pole on
 *   or outside the unit circle, by the step-down recursion of Schur and Cohn) or a rate that is not positive.
 *
 * @example
 * ```ts
 * import { iirFilter, noiseBandwidth } from "@quietband/core";
 * // exponential average y += (x − y)/8
 * const average = iirFilter({ numerator: [0.125], denominator: [1, -0.875], sampleRateHz: 1000 });
 * noiseBandwidth(average).hz; // → 33.333
 * ```
 */
export function iirFilter({ numerator, denominator, sampleRateHz }: IirFilterOptions): Weighting {
  const above = tapGain(requireCoefficients("numerator", numerator));
  const recursion = requireCoefficients("denominator", denominator);
  const rate = requirePositive("sampleRateHz", sampleRateHz, "Hz");
  if (!isStable(recursion))
    throw new OutOfDomainError(
      "denominator makes an unstable filter: a pole lies on or outside the unit circle, so it has no noise gain; check the signs of its coefficients.",
    );
  const below = tapGain(recursion);
  const gainAt = (hz: number): number => {
    const turns = turnsAtRate(hz, rate);
    return above.powerAt(turns) / below.powerAt(turns);
  };
  return makeWeighting({
    name: `IIR filter, ${numerator.length} and ${denominator.length} coefficients, ${inName(rate)} Hz`,
    knots: peaksOf(gainAt, rate, samplesACoefficient * (numerator.length + denominator.length)),
    lowExponent: -2 * above.zerosAtDc,
    highExponent: 0,
    repeatsHz: rate,
    powerGainAt: gainAt,
  });
}

/** All poles inside the unit circle: every reflection coefficient of the step-down recursion is below 1 in size. */
function isStable(denominator: readonly number[]): boolean {
  const lead = denominator[0] as number;
  if (lead === 0) return false;
  let rest = denominator.map((value) => value / lead);
  while (rest.length > 1) {
    const reflection = rest.at(-1) as number;
    if (!(Math.abs(reflection) < 1)) return false;
    const scale = 1 / (1 - reflection * reflection);
    const reversed = rest.toReversed();
    rest = rest.slice(0, -1).map((value, index) => scale * (value - reflection * (reversed[index] as number)));
  }
  return true;
}

/** Frequencies of the local extremes in the first half period, its end, and the same mirrored in the second. */
function peaksOf(gainAt: (hz: number) => number, rate: number, count: number): number[] {
  const gains = Array.from({ length: count + 1 }, (_, index) => gainAt((0.5 * rate * index) / count));
  const peaks = gains.flatMap((gain, index) => {
    const [left, right] = [gains[index - 1] ?? gain, gains[index + 1] ?? gain];
    return (gain - left) * (gain - right) > 0 ? [(0.5 * rate * index) / count] : [];
  });
  return [...peaks, ...peaks.map((hz) => rate - hz), (0.5 * rate) / count, 0.5 * rate, rate];
}
