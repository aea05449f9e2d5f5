import { requirePositive } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { completeOptions } from "../ground/options.js";
import { requireInside } from "../spectrum/make-spectrum.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import type { Weighting } from "../weighting/weighting.js";
import { bandPower } from "./band-power.js";
import { requireConvergent } from "./convergence.js";
import { sumOfImages, zonesOf } from "./image-sum.js";

/** What {@link foldedSpectrum} takes. */
export interface FoldedSpectrumOptions {
  /** Rate of the sampler, Hz. */
  readonly sampleRateHz: number;
  /** What the noise passes before the sampler: the anti-alias filter. */
  readonly weighting?: Weighting | undefined;
}

/**
 * What a sampler makes of a spectrum behind its filter: all images of S·|H|² folded into 0 .. half the rate,
 * S_s(f) = Σ_k S(|f + k·f_s|)·|H(|f + k·f_s|)|², k over all integers.
 *
 * Folding moves power, it does not lose any: the band 0 .. f_s/2 of the result holds what S·|H|² holds from 0 to ∞. Images
 * are added one by one where S·|H|² bends on the scale of the rate; between, Gregory's summation takes any number of them
 * from one band integral (see sumOfImages).
 *
 * @param spectrum - one-sided power density, unit²/Hz, defined to ∞.
 * @param options - `sampleRateHz` and the `weighting` before the sampler.
 * @returns a spectrum on 0 .. sampleRateHz/2.
 * @throws DivergentIntegralError where the images do not converge (white noise without an anti-alias filter);
 *   OutOfDomainError for a rate that is not positive or a weighting with lobes that the rate does not line up with.
 *
 * @example
 * ```ts
 * import { bandNoise, firstOrderLowPass, foldedSpectrum, whiteFlicker } from "@quietband/core";
 * const noise = whiteFlicker({ floor: 10e-9, cornerHz: 0 });
 * const weighting = firstOrderLowPass({ cutoffHz: 1000 });
 * const sampled = foldedSpectrum(noise, { sampleRateHz: 100, weighting });
 * bandNoise(sampled, { fromHz: 0, toHz: 50 }).rms; // → 396.33e-9
 * bandNoise(noise, { fromHz: 0, toHz: Infinity, weighting }).rms; // → 396.33e-9
 * ```
 */
export function foldedSpectrum(spectrum: Spectrum, options: FoldedSpectrumOptions): Spectrum {
  const { sampleRateHz, weighting } = completeOptions<FoldedSpectrumOptions>(
    "foldedSpectrum",
    { sampleRateHz: Number.NaN, weighting: undefined },
    options,
  );
  requirePositive("sampleRateHz", sampleRateHz, "Hz");
  requireConvergent(spectrum, weighting, Math.max(0.25 * sampleRateHz, spectrum.support[0]), Number.POSITIVE_INFINITY);
  if (weighting?.lobes !== undefined) requireAligned(weighting, sampleRateHz);
  const throughFilter = (hz: number): number => spectrum.powerDensityAt(hz) * (weighting?.powerGainAt(hz) ?? 1);
  const zones = zonesOf(spectrum, weighting, sampleRateHz);
  const imagesFrom = (hz: number): number =>
    sumOfImages(
      {
        throughFilter,
        zones,
        rate: sampleRateHz,
        powerOver: (low, high) => bandPower(spectrum, weighting, [low, high], 1e-13).power,
      },
      hz,
    );
  const half = 0.5 * sampleRateHz;
  const support = Object.freeze([spectrum.support[0], half] as const);
  return Object.freeze({
    unit: spectrum.unit,
    support,
    knots: Object.freeze(foldedKnots([...spectrum.knots, ...(weighting?.knots ?? [])], sampleRateHz)),
    lowExponent: Math.max(0, spectrum.lowExponent + (weighting?.lowExponent ?? 0)),
    highExponent: 0,
    ...(spectrum.notes !== undefined && { notes: spectrum.notes }),
    powerDensityAt(hz: number): number {
      requireInside(hz, support);
      return imagesFrom(sampleRateHz - hz) + imagesFrom(sampleRateHz + hz) + throughFilter(hz);
    },
  });
}

function foldedKnots(knots: readonly number[], rate: number): number[] {
  const half = 0.5 * rate;
  const folded = knots.map((hz) => Math.abs(hz - Math.round(hz / rate) * rate)).filter((hz) => hz > 0 && hz < half);
  return [...new Set(folded)].toSorted((one, other) => one - other);
}

/** Lobes whose cosines are in step with the sampler stay put from image to image; others would sweep through the images. */
function requireAligned(weighting: Weighting, rate: number): void {
  for (const part of weighting.lobes?.parts ?? [])
    for (const { seconds } of part.waves) {
      const turns = seconds * rate;
      if (Math.abs(turns - Math.round(turns)) > 1e-9 * Math.max(turns, 1))
        throw new OutOfDomainError(
          `${weighting.name} has lobes that ${rate} Hz does not line up with (a delay of ${seconds} s is ${turns} samples); fold at a rate at which its delays are whole numbers of samples.`,
        );
    }
}
