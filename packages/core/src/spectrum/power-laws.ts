import { requireFinite } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { spectrumFromPieces } from "./make-spectrum.js";
import type { Spectrum } from "./spectrum.js";

/** One term coefficient · f^−exponent of a power density; f in Hz. */
export interface PowerLaw {
  /** Power density at 1 Hz, unit²/Hz; not negative. */
  readonly coefficient: number;
  /** Exponent of the power density: 0 white, 1 flicker, 2 random walk; negative rises. */
  readonly exponent: number;
}

/**
 * A sum of power laws, S(f) = Σ coefficient · f^−exponent, in unit²/Hz with f in Hz.
 *
 * @param terms - at least one; coefficients not negative, at least one above zero.
 * @param options - `unit` of the signal ("V" unless given).
 * @returns a spectrum on all frequencies with exact band integrals.
 * @throws OutOfDomainError for an empty list, a negative or non-finite coefficient, a non-finite exponent.
 *
 * @example
 * ```ts
 * import { bandNoise, powerLaws } from "@quietband/core";
 * // 1 µV²/Hz of random walk at 1 Hz, over one decade: √(1e-12 · (1/0.1 − 1/1)) V
 * const drift = powerLaws([{ coefficient: 1e-12, exponent: 2 }], { unit: "V" });
 * bandNoise(drift, { fromHz: 0.1, toHz: 1 }).rms; // → 3.000e-6
 * ```
 */
export function powerLaws(terms: readonly PowerLaw[], { unit = "V" }: { readonly unit?: string } = {}): Spectrum {
  for (const [index, term] of terms.entries()) {
    requireFinite(`exponent of term ${index}`, term.exponent);
    if (!(term.coefficient >= 0 && term.coefficient < Number.POSITIVE_INFINITY))
      throw new OutOfDomainError(
        `coefficient of term ${index} must be a finite power density at 1 Hz, not negative, in ${unit}²/Hz; got ${term.coefficient}.`,
      );
  }
  const present = terms.filter((term) => term.coefficient > 0);
  if (present.length === 0)
    throw new OutOfDomainError("A sum of power laws needs at least one term with a coefficient above zero; got none.");
  return spectrumFromPieces(unit, [
    {
      from: 0,
      to: Number.POSITIVE_INFINITY,
      terms: present.map((term) => ({ at: 1, level: term.coefficient, exponent: term.exponent })),
    },
  ]);
}
