import { bandNoise, OutOfDomainError, type Spectrum, toneSkirt } from "@quietband/core";
import { refuseUnknownKeys, requireFinite, requirePositive } from "../convert/domain.js";

/** What {@link skirtInBin} takes. */
export interface SkirtInBinOptions {
  /** Noise of the reference, V²/Hz. */
  readonly spectrum: Spectrum;
  readonly referenceVolts: number;
  readonly toneHz: number;
  /** Peak amplitude of the tone, V. */
  readonly amplitude: number;
  /** Centre of the bin from the tone, Hz; its sign tells the side. */
  readonly offsetHz: number;
  /** Width of the bin, Hz: rate over length of a transform, times the window's noise bandwidth. */
  readonly binHz: number;
}

/** A bin of the skirt that reference noise makes around a tone. */
export interface SkirtInBin {
  /** V RMS in the bin. */
  readonly rms: number;
  /** Power of the tone over the power in the bin, dB; the same at every amplitude. */
  readonly snrDb: number;
  /** Mean density in the bin relative to the tone, dB in 1 Hz. */
  readonly relativeDensityDb: number;
  /** Bound on the relative error of rms made by the arithmetic. */
  readonly numericalError: number;
}

/**
 * Noise in one bin beside a tone, from the reference alone: ∫ (A/2V)²·(S(|f − f₀|) + S(f + f₀)) df over the bin. The
 * ratio of tone to bin is the same at every amplitude: a larger tone brings its skirt along.
 *
 * @throws OutOfDomainError for a bin that holds the tone or reaches 0 Hz, and values that are not positive.
 *
 * @example
 * ```ts
 * import { whiteFlicker } from "@quietband/core";
 * import { skirtInBin } from "@quietband/figures";
 * const spectrum = whiteFlicker({ floor: 100e-9, cornerHz: 10 });
 * const bin = skirtInBin({ spectrum, referenceVolts: 2.5, toneHz: 1e3, amplitude: 2, offsetHz: 5, binHz: 1 });
 * bin.rms; // → 80.12e-9
 * bin.snrDb; // → 144.94
 * ```
 */
export function skirtInBin(options: SkirtInBinOptions): SkirtInBin {
  refuseUnknownKeys("skirtInBin", ["spectrum", "referenceVolts", "toneHz", "amplitude", "offsetHz", "binHz"], options);
  const { spectrum, referenceVolts, toneHz, amplitude, offsetHz, binHz } = options;
  requirePositive("amplitude", amplitude, spectrum.unit);
  requirePositive("binHz", binHz, "Hz");
  requireFinite("offsetHz", offsetHz, "Hz");
  const half = 0.5 * binHz;
  if (Math.abs(offsetHz) < half || toneHz + offsetHz - half < 0)
    throw new OutOfDomainError(
      `A bin of ${binHz} Hz at ${offsetHz} Hz from a tone at ${toneHz} Hz must hold neither the tone nor 0 Hz; move it.`,
    );
  const skirt = toneSkirt(spectrum, { toneHz, amplitude, reference: referenceVolts });
  const centre = toneHz + offsetHz;
  const found = bandNoise(skirt, { fromHz: centre - half, toHz: centre + half });
  const snrDb = 10 * Math.log10((0.5 * amplitude * amplitude) / found.power);
  return Object.freeze({
    rms: found.rms,
    snrDb,
    relativeDensityDb: -snrDb - 10 * Math.log10(binHz),
    numericalError: found.numericalError,
  });
}
