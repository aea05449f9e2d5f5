import { requireBand } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import { timesFrequency } from "../spectrum/frequency-power.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import { type BandNoiseOptions, bandNoiseTolerance, requireReached } from "./band-noise.js";
import { bandPower } from "./band-power.js";
import { requireConvergent } from "./convergence.js";

/** A spectral moment, unit² · Hz^order, and the bound on its relative error. */
export interface SpectralMoment {
  readonly value: number;
  readonly numericalError: number;
}

/**
 * Spectral moment m_n = ∫ f^n · S(f)·|H(f)|² df over a band: m₀ is the power, √(m₂/m₀) the rate of up-crossings of a
 * Gaussian noise through its mean (Rice 1945), √(m₄/m₂) its rate of maxima.
 *
 * @param spectrum - one-sided power density, unit²/Hz.
 * @param order - 0, 1, 2 or 4.
 * @param options - as in `bandNoise`.
 * @throws DivergentIntegralError where the moment is infinite (white noise through one pole has no second moment);
 *   OutOfDomainError for another order or a band outside the support.
 *
 * @example
 * ```ts
 * import { powerLaws, spectralMoment } from "@quietband/core";
 * const white = powerLaws([{ coefficient: 1, exponent: 0 }]);
 * const m2 = spectralMoment(white, 2, { fromHz: 0, toHz: 10 }).value;
 * const m0 = spectralMoment(white, 0, { fromHz: 0, toHz: 10 }).value;
 * Math.sqrt(m2 / m0); // → 5.7735
 * ```
 */
export function spectralMoment(spectrum: Spectrum, order: 0 | 1 | 2 | 4, options: BandNoiseOptions): SpectralMoment {
  if (![0, 1, 2, 4].includes(order))
    throw new OutOfDomainError(`The order of a spectral moment must be 0, 1, 2 or 4; got ${String(order)}.`);
  const { fromHz, toHz, weighting, relativeTolerance } = completeOptions<BandNoiseOptions>(
    "spectralMoment",
    { fromHz: Number.NaN, toHz: Number.NaN, weighting: undefined, relativeTolerance: bandNoiseTolerance },
    options,
  );
  requireBand(fromHz, toHz);
  const integrand = timesFrequency(spectrum, order);
  requireConvergent(integrand, weighting, fromHz, toHz);
  const found = requireReached(
    bandPower(integrand, weighting, [fromHz, toHz], relativeTolerance ?? bandNoiseTolerance),
    spectrum.unit,
  );
  return Object.freeze({
    value: found.power,
    numericalError: found.power === 0 ? 0 : found.error / found.power + Number.EPSILON,
  });
}
