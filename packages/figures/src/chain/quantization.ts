import { type Spectrum, writeQuantity } from "@quietband/core";
import { refuseUnknownKeys, requireNotNegative, requirePositive } from "../convert/domain.js";
import { type NamedSpectrum, namedSpectrum } from "./named-spectrum.js";

/** What {@link quantization} takes. */
export interface QuantizationOptions {
  /** One step of the converter, in `unit`, positive. */
  readonly lsb: number;
  /** Rate of the samples, Hz, positive: without one there is no density. */
  readonly sampleRateHz: number;
  /** RMS of all other noise at the converter, in `unit`, where known: it decides whether the model holds. */
  readonly otherRms?: number | undefined;
  /** "V" unless given. */
  readonly unit?: string | undefined;
  /** For reports; "quantization" unless given. */
  readonly name?: string | undefined;
}

/** Quantization noise remembers its step, so that a budget can compare the other noise with it. */
export interface QuantizationNoise extends NamedSpectrum {
  readonly lsb: number;
}

/** RMS of other noise, in steps, from which on the rounding error is white and independent of the signal. */
export const leastDither = 0.5;

/**
 * Rounding error of a converter as white noise: density LSB/√(6·f_s) from 0 to f_s/2, nothing above; LSB/√12 in all.
 *
 * The model needs other noise of at least half a step (RMS): below it the error follows the signal, and no density
 * describes it. The spectrum says so when `otherRms` is given; `noiseBudget` says so by itself.
 *
 * @throws OutOfDomainError for a step or a rate that is not positive.
 * @see W. R. Bennett, Bell Syst. Tech. J. 27 (1948) 446; B. Widrow, I. Kollár, Quantization Noise, 2008.
 *
 * @example
 * ```ts
 * import { bandNoise } from "@quietband/core";
 * import { quantization } from "@quietband/figures";
 * const rounding = quantization({ lsb: 1e-6, sampleRateHz: 1000 });
 * bandNoise(rounding, { fromHz: 0, toHz: 500 }).rms; // → 288.675e-9
 * ```
 */
export function quantization(options: QuantizationOptions): QuantizationNoise {
  refuseUnknownKeys("quantization", ["lsb", "sampleRateHz", "otherRms", "unit", "name"], options);
  const { lsb, sampleRateHz, otherRms, unit = "V", name = "quantization" } = options;
  requirePositive("lsb", lsb, unit);
  requirePositive("sampleRateHz", sampleRateHz, "Hz");
  const model = `Rounding to ${writeQuantity(lsb, unit)} at ${writeQuantity(sampleRateHz, "Hz")}, taken as white`;
  const assumption =
    otherRms === undefined
      ? `${model}: holds where other noise at the converter is at least half a step.`
      : (ditherWarning(name, requireNotNegative("otherRms", otherRms, unit) / lsb) ?? `${model}.`);
  const spectrum = whiteUpTo(((lsb / 6) * lsb) / sampleRateHz, 0.5 * sampleRateHz, unit);
  return Object.freeze({ ...namedSpectrum(spectrum, name, [assumption]), lsb });
}

/** The sentence to print where other noise is too small for the model; undefined where it is large enough. */
export function ditherWarning(name: string, otherSteps: number): string | undefined {
  if (otherSteps >= leastDither) return undefined;
  return `${name}: the other noise is ${Number(otherSteps.toPrecision(2))} steps RMS, below half a step: the rounding error follows the signal, and the model of white noise does not hold.`;
}

/** White up to a frequency and nothing above: two power-law pieces, so that exact routes stay. */
function whiteUpTo(level: number, edgeHz: number, unit: string): Spectrum {
  const term = Object.freeze({ at: edgeHz, level, exponent: 0 });
  const none: readonly (typeof term)[] = Object.freeze([]);
  return Object.freeze({
    unit,
    support: Object.freeze([0, Number.POSITIVE_INFINITY] as const),
    knots: Object.freeze([edgeHz]),
    lowExponent: 0,
    highExponent: Number.POSITIVE_INFINITY,
    pieces: Object.freeze([
      Object.freeze({ from: 0, to: edgeHz, terms: Object.freeze([term]) }),
      Object.freeze({ from: edgeHz, to: Number.POSITIVE_INFINITY, terms: none }),
    ]),
    powerDensityAt: (hz: number) => (hz <= edgeHz ? level : 0),
  });
}
