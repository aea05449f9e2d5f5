import { OutOfDomainError, type Spectrum, sumSpectra, type Weighting } from "@quietband/core";
import { refuseUnknownKeys, requireFinite, requireNotNegative, requirePositive, shown } from "../convert/domain.js";
import { filteredSpectrum } from "./filtered-spectrum.js";
import type { ReferenceInput } from "./reference-input.js";
import { sampledSpectrum } from "./sampled-spectrum.js";

/** How a converter uses its reference. */
export type ReferenceConverter = "deltaSigma" | "sampler";

/** What {@link referencePathNoise} takes. */
export interface ReferencePathOptions {
  /** Noise of the reference, V²/Hz. */
  readonly spectrum: Spectrum;
  readonly referenceVolts: number;
  readonly input: ReferenceInput;
  /** Lower edge of the band that is looked at behind the converter, Hz. */
  readonly fromHz: number;
  /** Upper edge, Hz; at most half the rate of a sampler. */
  readonly toHz: number;
  /** The digital filter behind the conversion. */
  readonly weighting?: Weighting | undefined;
  /**
   * 'deltaSigma' (unless given): the division goes on at a high rate and the digital filter limits its noise too. 'sampler':
   * the reference is taken at one moment a sample, and all its noise folds into 0 .. sampleRateHz/2.
   */
  readonly converter?: ReferenceConverter | undefined;
  /** Rate of a sampler, Hz. */
  readonly sampleRateHz?: number | undefined;
  /** Filter between the reference and the converter, or what `ratiometricRemainder` leaves. */
  readonly referenceWeighting?: Weighting | undefined;
  /** Noise added behind that filter: a buffer, V²/Hz. */
  readonly added?: readonly Spectrum[] | undefined;
  /**
   * What the converter measures with its input shorted, V: mid-supply of an input that is biased there, half the range of an
   * offset-binary one. 0 unless given, and 0 where that voltage is made from the reference itself.
   */
  readonly biasVolts?: number | undefined;
  /** Reference noise slower than this counts as drift around a tone, Hz; fromHz unless given, at most half the tone's. */
  readonly leaveOutHz?: number | undefined;
}

const optionNames: readonly string[] = Object.freeze([
  "spectrum",
  "referenceVolts",
  "input",
  "fromHz",
  "toHz",
  "weighting",
  "converter",
  "sampleRateHz",
  "referenceWeighting",
  "added",
  "biasVolts",
  "leaveOutHz",
]);

const converters: readonly string[] = Object.freeze(["deltaSigma", "sampler"]);

/** Refuses what is out of range; the rate of a sampler, undefined for a delta-sigma converter. */
export function checkReferencePath(options: ReferencePathOptions): number | undefined {
  refuseUnknownKeys("referencePathNoise", optionNames, options);
  const { spectrum, referenceVolts, biasVolts, leaveOutHz, converter = "deltaSigma", sampleRateHz, toHz } = options;
  requirePositive("referenceVolts", referenceVolts, spectrum.unit);
  if (biasVolts !== undefined) requireFinite("biasVolts", biasVolts, spectrum.unit);
  if (leaveOutHz !== undefined) requireNotNegative("leaveOutHz", leaveOutHz, "Hz");
  if (!converters.includes(converter))
    throw new OutOfDomainError(`converter must be 'deltaSigma' or 'sampler'; got ${shown(converter)}.`);
  if (converter === "deltaSigma") {
    if (sampleRateHz === undefined) return undefined;
    throw new OutOfDomainError(
      "sampleRateHz belongs to a sampler; a delta-sigma converter has its filter as weighting.",
    );
  }
  if (sampleRateHz === undefined)
    throw new OutOfDomainError("A sampler needs sampleRateHz, in Hz: the reference's noise folds into half of it.");
  requirePositive("sampleRateHz", sampleRateHz, "Hz");
  if (toHz > 0.5 * sampleRateHz)
    throw new OutOfDomainError(
      `toHz must be at most half the rate of the sampler, ${0.5 * sampleRateHz} Hz; got ${toHz} Hz.`,
    );
  return sampleRateHz;
}

/** Noise of the reference as the division uses it: filtered, with what is added, folded by a sampler. */
export function referenceAsUsed(options: ReferencePathOptions, rate: number | undefined): Spectrum {
  const { spectrum, referenceWeighting, added = [] } = options;
  if (rate === undefined) return sumSpectra(filteredSpectrum(spectrum, referenceWeighting), ...added);
  return sumSpectra(
    sampledSpectrum(spectrum, rate, referenceWeighting),
    ...added.map((noise) => sampledSpectrum(noise, rate, undefined)),
  );
}
