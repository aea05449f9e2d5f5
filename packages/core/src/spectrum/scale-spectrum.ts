import { OutOfDomainError } from "../ground/errors.js";
import type { Spectrum } from "./spectrum.js";

/**
 * A spectrum through a plain amplitude gain: S'(f) = gain² · S(f). Exact routes, knots and sensitivities stay.
 *
 * @param spectrum - any spectrum.
 * @param gain - amplitude gain, not zero and finite; its sign does not matter.
 * @param options - `unit` of the result when the gain has a unit (µε per V); the spectrum's own unless given.
 * @throws OutOfDomainError for a gain of zero or not finite.
 *
 * @example
 * ```ts
 * import { bandNoise, scaleSpectrum, whiteFlicker } from "@quietband/core";
 * const amplifier = whiteFlicker({ floor: 5e-9, cornerHz: 0 });
 * bandNoise(scaleSpectrum(amplifier, 100), { fromHz: 0, toHz: 1e4 }).rms; // → 50.00e-6
 * ```
 */
export function scaleSpectrum(
  spectrum: Spectrum,
  gain: number,
  { unit = spectrum.unit }: { readonly unit?: string } = {},
): Spectrum {
  const power = gain * gain;
  if (!(power > 0 && power < Number.POSITIVE_INFINITY))
    throw new OutOfDomainError(`gain must be a finite amplitude gain other than zero; got ${gain}.`);
  const { pieces, parts, skirt } = spectrum;
  return Object.freeze({
    ...spectrum,
    unit,
    ...(pieces !== undefined && {
      pieces: Object.freeze(
        pieces.map((piece) =>
          Object.freeze({
            ...piece,
            terms: Object.freeze(piece.terms.map((term) => Object.freeze({ ...term, level: term.level * power }))),
          }),
        ),
      ),
    }),
    ...(parts !== undefined && { parts: Object.freeze(parts.map((part) => scaleSpectrum(part, gain, { unit }))) }),
    ...(skirt !== undefined && { skirt: Object.freeze({ ...skirt, powerGain: skirt.powerGain * power }) }),
    powerDensityAt(hz: number): number {
      return power * spectrum.powerDensityAt(hz);
    },
  });
}
