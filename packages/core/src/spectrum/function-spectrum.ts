import { OutOfDomainError } from "../ground/errors.js";
import { requireInside } from "./make-spectrum.js";
import type { Spectrum } from "./spectrum.js";

/** What {@link functionSpectrum} needs to know of a function it cannot look into. */
export interface FunctionSpectrumOptions {
  /** Unit of the signal; "V" unless given. */
  readonly unit?: string;
  /** Hz, where the function is defined; all frequencies unless given. */
  readonly support?: readonly [number, number];
  /** Hz, where it bends or peaks. An integrator finds what it is told of. */
  readonly knots?: readonly number[];
  /** S ~ f^−lowExponent towards 0 Hz; needed only where the support reaches 0. */
  readonly lowExponent: number;
  /** S ~ f^−highExponent towards ∞; needed only where the support reaches it. */
  readonly highExponent: number;
}

/**
 * A spectrum from any function of frequency: a Lorentzian, a measured formula, an expression from a paper.
 *
 * @param powerDensity - power density in unit²/Hz at a frequency in Hz; finite and not negative on the support.
 * @returns a spectrum that integrates adaptively between its knots.
 * @throws OutOfDomainError when asked where the function gives a negative or non-finite value.
 *
 * @example
 * ```ts
 * import { bandNoise, functionSpectrum } from "@quietband/core";
 * const trap = functionSpectrum((hz) => 4e-16 / (1 + (hz / 150) ** 2), { knots: [150], lowExponent: 0, highExponent: 2 });
 * bandNoise(trap, { fromHz: 0, toHz: Infinity }).rms; // → 307.0e-9
 * ```
 */
export function functionSpectrum(powerDensity: (hz: number) => number, options: FunctionSpectrumOptions): Spectrum {
  const [low, high] = options.support ?? [0, Number.POSITIVE_INFINITY];
  if (!(low >= 0 && high > low))
    throw new OutOfDomainError(`support must be two frequencies 0 ≤ low < high in Hz; got ${low} and ${high}.`);
  const support = Object.freeze([low, high] as const);
  const knots = [...(options.knots ?? [])].toSorted((a, b) => a - b);
  const stray = knots.find((hz) => !(hz > 0 && hz < Number.POSITIVE_INFINITY));
  if (stray !== undefined) throw new OutOfDomainError(`knots must be positive finite frequencies in Hz; got ${stray}.`);
  return Object.freeze({
    unit: options.unit ?? "V",
    support,
    knots: Object.freeze(knots.filter((hz) => hz > low && hz < high)),
    lowExponent: options.lowExponent,
    highExponent: options.highExponent,
    powerDensityAt(hz: number): number {
      requireInside(hz, support);
      const value = powerDensity(hz);
      if (value >= 0 && value < Number.POSITIVE_INFINITY) return value;
      throw new OutOfDomainError(
        `A power density must be finite and not negative; the function gave ${value} at ${hz} Hz.`,
      );
    },
  });
}
