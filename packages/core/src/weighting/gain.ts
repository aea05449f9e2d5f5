import { OutOfDomainError } from "../ground/errors.js";
import { inName, makeWeighting } from "./make-weighting.js";
import type { Weighting } from "./weighting.js";

/**
 * A plain factor: |H|² = factor² at all frequencies, for a cascade.
 *
 * @param options - `factor`, the amplitude gain; not zero, finite.
 * @throws OutOfDomainError for a factor of zero or not finite.
 *
 * @example
 * ```ts
 * import { gain } from "@quietband/core";
 * gain({ factor: -20 }).powerGainAt(1); // → 400.0
 * ```
 */
export function gain({ factor }: { readonly factor: number }): Weighting {
  const power = factor * factor;
  if (!(power > 0 && power < Number.POSITIVE_INFINITY))
    throw new OutOfDomainError(`factor must be a finite amplitude gain other than zero; got ${factor}.`);
  const term = Object.freeze({ at: 1, level: power, exponent: 0 });
  const piece = Object.freeze({ from: 0, to: Number.POSITIVE_INFINITY, terms: Object.freeze([term]) });
  return makeWeighting({
    name: `gain ${inName(factor)}`,
    lowExponent: 0,
    highExponent: 0,
    pieces: Object.freeze([piece]),
    rational: { gain: power, zerosAtOrigin: 0, zeros: [], poles: [] },
    powerGainAt: () => power,
  });
}
