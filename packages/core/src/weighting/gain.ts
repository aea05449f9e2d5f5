import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/** What {@link gain} takes. */
export interface GainOptions {
  /** Amplitude gain; finite, not zero. */
  readonly factor: number;
}

const needed: GainOptions = Object.freeze({ factor: Number.NaN });

/**
 * A plain factor: |H|² = factor² at all frequencies, for a cascade.
 *
 * @throws OutOfDomainError for a factor of zero or not finite.
 *
 * @example
 * ```ts
 * import { gain } from "@quietband/core";
 * gain({ factor: -20 }).powerGainAt(1); // → 400.0
 * ```
 */
export function gain(options: GainOptions): Weighting {
  const { factor } = completeOptions("gain", needed, options);
  const power = factor * factor;
  if (!(typeof factor === "number" && power > 0 && power < Number.POSITIVE_INFINITY))
    throw new OutOfDomainError(`factor must be an amplitude gain with a finite square above zero; got ${factor}.`);
  return makeWeighting({
    name: `gain ${inName(factor)}`,
    lowExponent: 0,
    highExponent: 0,
    pieces: [{ from: 0, to: Number.POSITIVE_INFINITY, terms: [{ at: 1, level: power, exponent: 0 }] }],
    rational: { gain: power, zerosAtOrigin: 0, zeros: [], poles: [] },
    powerGainAt: () => power,
  });
}
