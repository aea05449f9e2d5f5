import { requireFinite, requirePositive } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { spectrumFromPieces } from "./make-spectrum.js";
import type { Spectrum } from "./spectrum.js";

/** What {@link whiteFlicker} takes. */
export interface WhiteFlickerOptions {
  /** White floor, unit/√Hz; positive. */
  readonly floor: number;
  /** Hz, where the 1/f^exponent part equals the floor and the density is √2 above it; 0 for white noise alone. */
  readonly cornerHz: number;
  /** Exponent of the power density; 1 unless given. */
  readonly exponent?: number;
  /** Unit of the signal; "V" unless given. */
  readonly unit?: string;
}

/**
 * White floor with a low-frequency part: S(f) = floor² · (1 + (cornerHz/f)^exponent), in unit²/Hz.
 *
 * @returns a spectrum on all frequencies with exact band integrals.
 * @throws OutOfDomainError for a floor that is not positive, a negative corner, an exponent that is not finite.
 *
 * @example
 * ```ts
 * import { bandNoise, whiteFlicker } from "@quietband/core";
 * const reference = whiteFlicker({ floor: 70e-9, cornerHz: 60 });
 * bandNoise(reference, { fromHz: 0.1, toHz: 10 }).rms; // → 1.184e-6
 * ```
 */
export function whiteFlicker({ floor, cornerHz, exponent = 1, unit = "V" }: WhiteFlickerOptions): Spectrum {
  requirePositive("floor", floor, `${unit}/√Hz`);
  requireFinite("exponent", exponent);
  if (!(cornerHz >= 0 && cornerHz < Number.POSITIVE_INFINITY))
    throw new OutOfDomainError(`cornerHz must be a finite number of Hz, 0 for white noise alone; got ${cornerHz}.`);
  const level = floor * floor;
  const white = { at: 1, level, exponent: 0 };
  const terms = cornerHz === 0 ? [white] : [white, { at: cornerHz, level, exponent }];
  return spectrumFromPieces(unit, [{ from: 0, to: Number.POSITIVE_INFINITY, terms }]);
}
