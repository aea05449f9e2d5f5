import { bandNoise } from "@quietband/core";
import { type NamedSpectrum, namedSpectrum } from "./named-spectrum.js";
import { referencePathNotes } from "./reference-path-notes.js";
import type { ReferencePathOptions } from "./reference-path-options.js";
import { seeReference } from "./reference-spectrum.js";
import { groupError, oneSpectrum, type ReferencePart, seenTotal } from "./seen-parts.js";

/** Noise seen through a reference, in volts at the converter's input. */
export interface ReferencePathNoise {
  readonly unit: string;
  /** V RMS: the exact answer where the input's lines are known, else that of the rule. */
  readonly rms: number;
  readonly basis: "exact" | "rule";
  /** The rule: noise of the reference in the band, times the RMS of the input over the reference voltage. */
  readonly byRule: number;
  /** V RMS of the input, dc part and bias included. */
  readonly inputRms: number;
  /** V RMS of the reference itself in the band, as the converter uses it. */
  readonly referenceRms: number;
  /** Bound on the relative error of rms made by the arithmetic alone. */
  readonly numericalError: number;
  /** Relative standard uncertainty of rms (k = 1) where the reference's spectrum carries one. */
  readonly standardUncertainty?: number;
  readonly parts: readonly ReferencePart[];
  /** The noise before the digital filter: a source for `noiseBudget`; missing where it is zero or only the rule is known. */
  readonly spectrum?: NamedSpectrum;
  readonly notes: readonly string[];
}

/**
 * Noise that a converter's reference brings in at a given input. A converter divides by its reference, so noise n of the
 * reference multiplies the input: e(t) = x(t)·n(t)/V. With the input at zero nothing is seen; at dc it is x/V of the
 * reference's noise; the general rule is RMS of the input over V. The rule holds while the input's lines and the noise around
 * them pass the filter. The exact answer is that of the skirts: each line of amplitude A and frequency f₀ carries
 * (A/2V)²·(S(|f − f₀|) + S(f + f₀)), also one which the filter rejects.
 *
 * Squares and triangles are summed over their odd harmonics; those above the 32nd stand together in groups, which enters
 * `numericalError`. A record of samples is taken to repeat; its lines are those of its Fourier series.
 *
 * @param options - see {@link ReferencePathOptions}.
 * @throws OutOfDomainError for values out of range, a sampler without a rate, a tone at a multiple of half a sampler's rate;
 *   the errors of `bandNoise`.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { referencePathNoise } from "@quietband/figures";
 * const reference = { spectrum: whiteFlicker({ floor: 100e-9, cornerHz: 0 }), referenceVolts: 2.5 };
 * const band = { fromHz: 0, toHz: 10e3 };
 * referencePathNoise({ ...reference, ...band, input: { kind: "dc", volts: 1 } }).rms; // → 4.000e-6
 * const sine = { kind: "sine", amplitude: 2.5, frequencyHz: 5e3 } as const;
 * referencePathNoise({ ...reference, ...band, input: sine }).rms; // → 7.071e-6
 * // a tone that a narrow filter rejects still brings noise in
 * const narrow = { fromHz: 0, toHz: 100 };
 * referencePathNoise({ ...reference, ...narrow, input: sine }).rms; // → 707.1e-9
 * ```
 */
export function referencePathNoise(options: ReferencePathOptions): ReferencePathNoise {
  const { base, mean, alternatingRms, seen, rate } = seeReference(options);
  const { spectrum, referenceVolts, fromHz, toHz, weighting, leaveOutHz } = options;
  const inputRms = Math.hypot(mean, alternatingRms);
  const band = { fromHz, toHz, weighting };
  // Around a tone, noise counts from leaveOutHz up; the mean brings it in from fromHz up.
  const lowest = mean === 0 && leaveOutHz !== undefined ? leaveOutHz : fromHz;
  const reference = bandNoise(base, { ...band, fromHz: lowest });
  const byRule = (inputRms / referenceVolts) * reference.rms;
  const exact = seen !== undefined;
  const notes = Object.freeze(referencePathNotes(options, { exact, beyond: reference.notes }));
  const shared = { unit: spectrum.unit, byRule, inputRms, referenceRms: reference.rms, notes };
  if (seen === undefined)
    return Object.freeze({
      ...shared,
      rms: byRule,
      basis: "rule",
      numericalError: reference.numericalError + 4 * Number.EPSILON,
      ...(reference.standardUncertainty !== undefined && { standardUncertainty: reference.standardUncertainty }),
      parts: Object.freeze([]),
    });
  return Object.freeze({
    ...shared,
    basis: "exact",
    // Where groups of harmonics land after folding is anybody's guess.
    ...seenTotal(seen, band, rate === undefined ? groupError : 1),
    ...(seen.length > 0 && { spectrum: namedSpectrum(oneSpectrum(seen, base), "reference", notes) }),
  });
}
